/** A word as a POSIX shell reads it back: bare where that is safe, else in single quotes. */
export function shellQuote(word: string): string {
  return /^[\w@%+=:,./-]+$/.test(word) ? word : `'${word.replaceAll("'", "'\\''")}'`;
}
