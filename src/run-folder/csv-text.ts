/** A field of a CSV file. null and NaN are left blank. */
export type CsvField = string | number | null;

/**
 * CSV after RFC 4180, but with bare line feeds, which every reader takes: one header line, then the rows. Numbers are written with as many
 * digits as bring back the same bits.
 */
export function csvText(header: readonly string[], rows: Iterable<readonly CsvField[]>): string {
  const lines = [header.map(field).join(',')];
  for (const row of rows) lines.push(row.map(field).join(','));
  return `${lines.join('\n')}\n`;
}

function field(value: CsvField): string {
  if (typeof value === 'number') return Number.isNaN(value) ? '' : String(value);
  if (value === null) return '';
  const line = value.replace(/[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/gu, ' ');
  // A spreadsheet would compute a text that begins like a formula.
  const text = /^\s*[=+\-@]/.test(line) ? `'${line}` : line;
  return /[",]|^\s|\s$/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
