/** Shares from 0 to 1 as characters of a terminal, two rows to a line. */
import { PALETTE, paletteIndex } from '../../report/charts/palette.js';
import type { ColourDepth } from '../colour-depth.js';

const UPPER = '▀';
const LOWER = '▄';
const SHADES = [' ', '░', '▒', '▓', '█'];
const LETTERS = [' ', '.', ':', '-', '=', '+', '*', '#', '%', '@'];
const ESCAPE = '\u001b[';
const RESET = `${ESCAPE}0m`;

/** Lines of text of a field of shares, rows from the top, an even number of them; NaN stays blank. */
export function paintCells(rows: readonly (readonly number[])[], depth: ColourDepth, unicode: boolean): string[] {
  const lines: string[] = [];
  for (let top = 0; top < rows.length; top += 2) {
    const pairs = rows[top].map((share, i) => [share, rows[top + 1]?.[i] ?? Number.NaN] as const);
    lines.push(depth === 'none' || !unicode ? shadeLine(pairs, unicode) : colourLine(pairs, depth));
  }
  return lines;
}

type Pair = readonly [upper: number, lower: number];

/** Without colour a character stands for the mean of its two cells. */
function shadeLine(pairs: readonly Pair[], unicode: boolean): string {
  const ramp = unicode ? SHADES : LETTERS;
  return pairs
    .map((pair) => {
      const known = pair.filter(Number.isFinite);
      if (known.length === 0) return ' ';
      const mean = known.reduce((a, b) => a + b, 0) / known.length;
      return ramp[Math.min(ramp.length - 1, Math.max(0, Math.floor(mean * ramp.length)))];
    })
    .join('')
    .trimEnd();
}

/** A change of colour is told once, not at every sign. */
function colourLine(pairs: readonly Pair[], depth: ColourDepth): string {
  let line = '';
  let now = RESET;
  for (const [upper, lower] of pairs) {
    const [above, below] = [Number.isFinite(upper), Number.isFinite(lower)];
    const sign = above ? UPPER : below ? LOWER : ' ';
    const wanted =
      above && below
        ? `${ESCAPE}${colour(38, upper, depth)};${colour(48, lower, depth)}m`
        : above || below
          ? `${RESET}${ESCAPE}${colour(38, above ? upper : lower, depth)}m`
          : RESET;
    line += wanted === now ? sign : `${wanted}${sign}`;
    now = wanted;
  }
  return now === RESET ? line : `${line}${RESET}`;
}

/** Parameters of the colour sequences of ECMA-48 and ISO/IEC 8613-6: 38 for the sign, 48 for what is behind it. */
function colour(part: 38 | 48, share: number, depth: ColourDepth): string {
  if (depth === '256') return `${part};5;${greyIndex(share)}`;
  const at = 3 * paletteIndex(share);
  const [red, green, blue] = PALETTE.subarray(at, at + 3);
  return `${part};2;${red};${green};${blue}`;
}

const FIRST_GREY = 232;
const GREYS = 24;

/** The greys of the usual 256 colours (common practice of terminals); the few hues between them would show steps that are not there. */
function greyIndex(share: number): number {
  return FIRST_GREY + Math.min(GREYS - 1, Math.max(0, Math.floor(share * GREYS)));
}
