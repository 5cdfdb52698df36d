import { line } from 'd3-shape';
import { type Markup, markup } from '../markup.js';
import { type Axis, axisScale, axisTicks, bottomAxis, leftAxis } from './axis.js';
import { bottomLogAxis, logScale } from './log-axis.js';
import { type Picture, picture, round } from './picture.js';

/** A curve of a plot. Colours and dashes are told apart in grey too. */
export interface PlotLine {
  readonly words: string;
  readonly colour: 'pump' | 'output' | 'lost' | 'ink';
  readonly dash?: 1 | 2;
  readonly points: readonly (readonly [x: number, y: number])[];
  /** Standard errors of the points, which are then drawn as dots with bars. */
  readonly errors?: readonly (number | null)[];
}

/** A value of x that is pointed out. */
export interface PlotMark {
  readonly x: number;
  readonly words: string;
}

export interface PlotWords {
  readonly id: string;
  readonly title: string;
  readonly description: string;
  readonly across: string;
  readonly up: string;
}

const LEFT = 48;
const RIGHT = 500;
const WIDTH = 520;
const HEIGHT = 230;
const LEGEND_LINE = 17;
const MARK_LINE = 13;

/** Curves against a linear or logarithmic x, with a legend above. @param highest of y; y starts at 0 */
export function linePlot(
  words: PlotWords,
  domain: readonly [number, number],
  scale: 'linear' | 'log',
  highest: number,
  lines: readonly PlotLine[],
  marks: readonly PlotMark[] = [],
  band: readonly [number, number] | null = null,
): Picture {
  const top = lines.length * LEGEND_LINE + 10 + marks.length * MARK_LINE + 6;
  const bottom = top + HEIGHT;
  const across = { domain, range: [LEFT, RIGHT] as const, label: words.across };
  const up: Axis = { domain: [0, highest], range: [bottom, top], label: words.up, ticks: 5 };
  const atX = scale === 'log' ? logScale(across) : axisScale({ ...across, ticks: 8 });
  const atY = axisScale(up);
  const inside = (y: number) => Math.min(highest, Math.max(0, y));
  const grid = axisTicks(up).map((value) => {
    const y = round(atY(value));
    return markup`<line class="plot-grid" x1="${LEFT}" x2="${RIGHT}" y1="${y}" y2="${y}"/>`;
  });
  const curve = ({ colour, dash, points, errors }: PlotLine): Markup => {
    const d = line<readonly [number, number]>()
      .x(([x]) => round(atX(x)))
      .y(([, y]) => round(atY(inside(y))))(points);
    const dashed = dash === undefined ? '' : ` plot-dash-${dash}`;
    return markup`<path class="plot-line plot-${colour}${dashed}" d="${d ?? ''}"/>${errors === undefined ? null : points.map(([x, y], i) => bar(x, y, errors[i] ?? null))}`;
  };
  const bar = (x: number, y: number, error: number | null): Markup => {
    const at = round(atX(x));
    const bars =
      error === null
        ? null
        : markup`<line class="plot-error" x1="${at}" x2="${at}" y1="${round(atY(inside(y - error)))}" y2="${round(atY(inside(y + error)))}"/>`;
    return markup`${bars}<circle class="plot-dot" cx="${at}" cy="${round(atY(inside(y)))}" r="2.6"/>`;
  };
  const legend = lines.map(({ words: text, colour, dash }, i) => {
    const y = i * LEGEND_LINE + 12;
    const dashed = dash === undefined ? '' : ` plot-dash-${dash}`;
    return markup`<line class="plot-line plot-${colour}${dashed}" x1="${LEFT}" x2="${LEFT + 30}" y1="${y - 4}" y2="${y - 4}"/><text x="${LEFT + 38}" y="${y}">${text}</text>`;
  });
  const shown = marks.filter(({ x }) => x >= domain[0] && x <= domain[1]);
  const pointers = shown.map(({ x, words: text }, i) => {
    const at = round(atX(x));
    const y = top - (shown.length - i) * MARK_LINE + 6;
    const right = at > (LEFT + RIGHT) / 2;
    return markup`<line class="plot-mark" x1="${at}" x2="${at}" y1="${y - 8}" y2="${bottom}"/><text class="caption" x="${right ? at - 5 : at + 5}" y="${y}" text-anchor="${right ? 'end' : 'start'}">${text}</text>`;
  });
  const shade =
    band === null
      ? null
      : markup`<rect class="plot-band" x="${round(atX(band[0]))}" y="${top}" width="${round(Math.max(1, atX(band[1]) - atX(band[0])))}" height="${HEIGHT}"/>`;
  return picture(
    { id: words.id, title: words.title, description: words.description },
    WIDTH,
    bottom + 36,
    markup`${shade}${grid}${legend}${pointers}<rect class="frame" x="${LEFT}" y="${top}" width="${RIGHT - LEFT}" height="${HEIGHT}"/>${lines.map(curve)}${
      scale === 'log' ? bottomLogAxis(across, bottom) : bottomAxis({ ...across, ticks: 8 }, bottom)
    }${leftAxis(up, LEFT, 12)}`,
  );
}
