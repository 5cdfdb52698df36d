const LONGEST = 48;
const LONGEST_BYTES = 120;
/** Names that Windows keeps for devices, whatever follows the first dot. */
const DEVICE = /^(?:con|prn|aux|nul|com\d|lpt\d)$/;

/**
 * A file name, or part of one, out of any text: lower-case letters and digits of any script, joined by single hyphens. Never empty,
 * never a path, no dot, at most 48 characters and 120 bytes.
 * @param fallback stands in when nothing of `text` is left
 */
export function slug(text: string, fallback: string): string {
  const words = text.slice(0, 1000).normalize('NFKC').toLowerCase().normalize('NFC');
  const joined = words.replace(/[^\p{L}\p{M}\p{N}]+/gu, '-').replace(/^[-\p{M}]+/u, '');
  const cut = cutTo(joined).replace(/-+$/, '');
  if (cut === '') return fallback;
  return DEVICE.test(cut) ? `${fallback}-${cut}` : cut;
}

function cutTo(text: string): string {
  let cut = '';
  let bytes = 0;
  for (const character of [...text].slice(0, LONGEST)) {
    bytes += Buffer.byteLength(character);
    if (bytes > LONGEST_BYTES) break;
    cut += character;
  }
  return cut;
}

/** Slugs of several texts, no two alike: repeats get -2, -3 and so on. */
export function uniqueSlugs(texts: readonly string[], fallback: string): string[] {
  const taken = new Set<string>();
  return texts.map((text) => {
    const base = slug(text, fallback);
    let name = base;
    for (let copy = 2; taken.has(name); copy++) name = `${base}-${copy}`;
    taken.add(name);
    return name;
  });
}
