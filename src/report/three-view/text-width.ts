/** Letters of East Asian scripts fill a square. */
const SQUARE = /[\u1100-\u11ff\u2e80-\ua4cf\uac00-\ud7af\uf900-\ufaff\uff00-\uff60]|[\u{1f000}-\u{3ffff}]/u;

/** Width of a line of text, in units of the sheet; no font is at hand, so this errs to the wide side. */
export function textWidth(text: string, size = 11.5): number {
  return [...text].reduce((sum, letter) => sum + (SQUARE.test(letter) ? 1.05 : 0.6), 0) * size;
}

/** As many of the letters as fit, with an ellipsis where some do not. */
export function fitText(text: string, width: number, size = 11.5): string {
  const letters = [...text.replace(/\s+/gu, ' ')].slice(0, 400);
  if (textWidth(letters.join(''), size) <= width) return letters.join('');
  while (letters.length > 1 && textWidth(`${letters.join('')}…`, size) > width) letters.pop();
  return `${letters.join('')}…`;
}
