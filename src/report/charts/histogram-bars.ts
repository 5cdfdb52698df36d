import type { RunRecord } from '../../record/run-record.js';
import { markup } from '../markup.js';
import { significant } from '../number-format.js';
import { axisScale, bottomAxis, leftAxis } from './axis.js';
import { type Picture, picture, round } from './picture.js';

type Histogram = RunRecord['histograms'][number];

const LEFT = 46;
const RIGHT = 352;
/** Above it stands what the last bar holds, clear of the bar. */
const TOP = 24;
const BOTTOM = 162;
const WIDTH = 372;
/** The bar for everything above the last cell stands apart by this much. */
const GAP = 10;
const OVERFLOW_WIDTH = 14;
/** More bars than this would be thinner than a pixel or two: neighbours are joined. */
const MOST_BARS = 60;
/** What lies above holds at most this share, and goes into the overflow bar. */
const TAIL = 1e-3;

export interface HistogramWords {
  readonly title: string;
  /** Title of the axis across, with its unit. */
  readonly across: string;
  /** Of what each bar is a share. */
  readonly of: string;
}

/** Shares of histories as bars, those above the last one named apart. Whole counts stand centred on their number. @param id unique on the page */
export function histogramBars(id: string, histogram: Histogram, words: HistogramWords): Picture {
  const { bars, width, from, above } = shownBars(histogram);
  const counts = histogram.unit === '';
  // A cell of whole counts holds one number: its bar stands astride of it.
  const start = counts ? from - width / 2 : from;
  const end = start + bars.length * width;
  const highest = Math.max(...bars, above, Number.MIN_VALUE);
  const plotRight = RIGHT - GAP - OVERFLOW_WIDTH;
  const across = {
    domain: [start, end] as const,
    range: [LEFT, plotRight] as const,
    label: words.across,
    ticks: Math.min(8, counts ? bars.length : 8),
  };
  const up = {
    domain: [0, 100 * highest] as const,
    range: [BOTTOM, TOP] as const,
    label: `% of ${words.of}`,
    ticks: 4,
  };
  const x = axisScale(across);
  const y = axisScale(up);
  const bar = (left: number, right: number, share: number, name: string) =>
    share > 0
      ? markup`<rect class="${name}" x="${round(left)}" y="${round(y(100 * share))}" width="${round(Math.max(0.6, right - left - 0.8))}" height="${round(BOTTOM - y(100 * share))}"/>`
      : null;
  const top = Math.max(0, counts ? from + bars.length * width - 1 : end);
  const beyond = `above ${significant(top, 4)}${counts ? '' : ` ${histogram.unit}`}: ${percent(above)}`;
  return picture(
    {
      id,
      title: words.title,
      description: `Bars of the share of ${words.of}, up to ${percent(highest)}, against ${words.across}; ${beyond}.`,
    },
    WIDTH,
    BOTTOM + 36,
    markup`${bars.map((share, i) => bar(x(start + i * width), x(start + (i + 1) * width), share, 'bar-share'))}${bar(RIGHT - OVERFLOW_WIDTH, RIGHT, above, 'bar-above')}<line class="base" x1="${RIGHT - OVERFLOW_WIDTH - 3}" x2="${RIGHT + 3}" y1="${BOTTOM}" y2="${BOTTOM}"/><text class="caption" x="${RIGHT + 4}" y="${TOP - 10}" text-anchor="end">${beyond}</text><text class="caption" x="${RIGHT - OVERFLOW_WIDTH / 2}" y="${BOTTOM + 15}" text-anchor="middle">above</text>${bottomAxis(across, BOTTOM)}${leftAxis(up, LEFT, 12)}`,
    'histogram',
  );
}

const percent = (share: number): string => (share === 0 ? 'none' : `${significant(100 * share, 2)} %`);

/** Cells joined where there are many, cut where hardly anything follows; the rest is the overflow. */
function shownBars({ from, width, shares, unit }: Histogram): {
  bars: number[];
  width: number;
  from: number;
  above: number;
} {
  const cells = shares.slice(0, -1);
  let last = cells.length;
  let tail = shares.at(-1) ?? 0;
  while (last > 1 && tail + cells[last - 1] <= TAIL) tail += cells[--last];
  const join = unit === '' ? 1 : Math.max(1, Math.ceil(last / MOST_BARS));
  // Whole bars only: a last one made of fewer cells would look too low.
  const whole = Math.ceil(last / join) * join;
  const end = whole <= cells.length ? whole : whole - join;
  const bars: number[] = [];
  for (let i = 0; i < end; i += join) bars.push(cells.slice(i, i + join).reduce((a, b) => a + b, 0));
  const kept = bars.reduce((a, b) => a + b, 0);
  const all = shares.reduce((a, b) => a + b, 0);
  return { bars, width: width * join, from, above: Math.max(0, all - kept) < 1e-12 ? 0 : all - kept };
}
