const EIGHTHS = ['', '▏', '▎', '▍', '▌', '▋', '▊', '▉'];

/** A bar of at most `width` characters for a share of 0 to 1: eighths of a block, or whole '#' in plain ASCII. */
export function drawBar(share: number, width: number, unicode: boolean): string {
  const length = Math.min(Math.max(share, 0), 1) * width;
  if (!unicode) return '#'.repeat(Math.round(length));
  const eighths = Math.round(length * 8);
  return '█'.repeat(Math.floor(eighths / 8)) + EIGHTHS[eighths % 8];
}
