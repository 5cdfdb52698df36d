/** The block at the foot of the sheet: what is drawn, how, and how large. */
import { round } from '../charts/picture.js';
import { type Markup, markup } from '../markup.js';
import { lengthText } from './dimensions.js';
import { MARGIN, SHEET_WIDTH } from './sheet-layout.js';
import { fitText, textWidth } from './text-width.js';

export interface SheetAbout {
  readonly title: string;
  readonly file: string;
  /** Dials as used, name -> text. */
  readonly dials: Readonly<Record<string, string>>;
}

const CELLS = [MARGIN, 430, 800, 1020, SHEET_WIDTH - MARGIN] as const;
const LINE = 15;
const MOST_LINES = 8;
const SIZES = { note: 11.5, strong: 14, 'small soft': 10 } as const;

/** @param scale sheet units per mm */
export function titleBlock(
  { title, file, dials }: SheetAbout,
  scale: number,
  top: number,
): { drawn: Markup; bottom: number } {
  const dialLines = packed(
    Object.entries(dials).map(([name, text]) => `${name} = ${text}`),
    CELLS[2] - CELLS[1] - 20,
  );
  const height = Math.max(5, dialLines.length + 1) * LINE + 14;
  const text = (cell: number, line: number, words: string, name: keyof typeof SIZES = 'note') =>
    markup`<text class="${name}" x="${CELLS[cell] + 10}" y="${round(top + 6 + line * LINE)}">${fitText(words, CELLS[cell + 1] - CELLS[cell] - 16, SIZES[name])}</text>`;
  const rules = CELLS.slice(1, -1)
    .map((x) => `M${x} ${round(top)}V${round(top + height)}`)
    .join('');
  const frame = markup`<path class="frame" d="M${MARGIN} ${round(top)}H${SHEET_WIDTH - MARGIN}V${round(top + height)}H${MARGIN}Z${rules}"/>`;
  return {
    drawn: markup`<g class="title-block">${frame}${text(0, 1, 'Design', 'small soft')}${text(0, 2.1, title, 'strong')}${text(0, 3.3, 'File', 'small soft')}${text(0, 4.3, file)}${text(1, 1, 'Dials', 'small soft')}${
      dialLines.length === 0 ? text(1, 2.1, 'none') : dialLines.map((line, i) => text(1, 2.1 + i, line))
    }${text(2, 1, 'Third-angle projection', 'note')}${text(2, 2, 'Top view above the front,', 'small soft')}${text(2, 2.9, 'right view to its right.', 'small soft')}${text(2, 3.8, 'The front looks along +y.', 'small soft')}${text(2, 4.8, 'Lengths in mm', 'small soft')}${scaleBar(scale, top)}</g>`,
    bottom: top + height,
  };
}

/** As many dials to a line as fit, so many lines at most. */
function packed(dials: readonly string[], width: number): string[] {
  const lines: string[] = [];
  for (const [i, dial] of dials.entries()) {
    const last = lines.at(-1);
    if (last !== undefined && textWidth(`${last}; ${dial}`) <= width) lines[lines.length - 1] = `${last}; ${dial}`;
    else if (lines.length < MOST_LINES - 1) lines.push(dial);
    else return [...lines, `and ${dials.length - i} more`];
  }
  return lines;
}

/** The longest of 1, 2 and 5 times a power of ten that fits. */
function scaleBar(scale: number, top: number): Markup {
  const room = CELLS[4] - CELLS[3] - 44;
  const power = 10 ** Math.floor(Math.log10(room / scale));
  const length = ([5, 2, 1].find((step) => step * power * scale <= room) ?? 1) * power;
  const [x, y] = [CELLS[3] + 14, top + 46];
  const end = x + length * scale;
  const middle = (x + end) / 2;
  return markup`<text class="small soft" x="${CELLS[3] + 10}" y="${round(top + 21)}">Scale bar</text><path class="bar" d="M${x} ${round(y - 4)}H${round(middle)}V${round(y + 4)}H${x}Z"/><path class="frame" d="M${x} ${round(y - 4)}H${round(end)}V${round(y + 4)}H${x}Z"/><text class="note" x="${x}" y="${round(y + 20)}" text-anchor="middle">0</text><text class="note" x="${round(end)}" y="${round(y + 20)}" text-anchor="middle">${lengthText(length)} mm</text>`;
}
