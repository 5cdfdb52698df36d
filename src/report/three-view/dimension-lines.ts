/** Dimension lines with arrows, extension lines and text, after the practice of ISO 129-1. */
import { round } from '../charts/picture.js';
import { type Markup, markup } from '../markup.js';
import { shortName } from '../name-text.js';
import { isTight, type RowedMeasure } from './dimensions.js';

/** Sheet units from row to row. */
export const ROW = 19;
const ARROW = 8;
/** Gap between the part and its extension line, and how far that runs on past the dimension line. */
const GAP = 3;
const PAST = 4;

export interface DimensionSide {
  /** Places along the axis and across it on the sheet. */
  readonly along: (mm: number) => number;
  readonly across: (mm: number) => number;
  /** Sheet place of the first row. */
  readonly firstRow: number;
  /** Rows stand to the right of the view instead of below. */
  readonly upright: boolean;
}

export function dimensionLine(measure: RowedMeasure, { along, across, firstRow, upright }: DimensionSide): Markup {
  const level = firstRow + ROW * measure.row;
  const start = across(measure.startAt) + GAP;
  const ends = [along(measure.low), along(measure.high)];
  const [from, to] = [Math.min(...ends), Math.max(...ends)];
  const at = (a: number, b: number): string => (upright ? `${round(b)} ${round(a)}` : `${round(a)} ${round(b)}`);
  const short = to - from < 3 * ARROW;
  const tight = isTight(measure.text, to - from);
  const extension = [from, to].map((a) => (start < level ? `M${at(a, start)}L${at(a, level + PAST)}` : '')).join('');
  // Read from below, or from the right.
  const outsideEnd = upright ? from - 2 * ARROW - 3 : to + 2 * ARROW + 3;
  const line = short
    ? `M${at(from - 2 * ARROW, level)}L${at(to + 2 * ARROW, level)}`
    : `M${at(from, level)}L${at(to, level)}${tight ? `M${at(upright ? from : to, level)}L${at(upright ? from - 2 * ARROW : to + 2 * ARROW, level)}` : ''}`;
  const arrows = short ? arrow(from, -1) + arrow(to, 1) : arrow(from, 1) + arrow(to, -1);
  function arrow(tip: number, into: 1 | -1): string {
    const tail = tip + into * ARROW;
    return `M${at(tip, level)}L${at(tail, level - 1.6)}L${at(tail, level + 1.6)}Z`;
  }
  const middle = tight ? outsideEnd : (from + to) / 2;
  const lift = tight ? -4 : 4;
  const [x, y] = upright ? [level - lift, middle] : [middle, level - lift];
  const turn = upright ? ` rotate(-90)` : '';
  return markup`<g class="dimension"><title>${measure.text} mm: ${measure.parts.slice(0, 12).map((name, i) => `${i === 0 ? '' : ', '}${shortName(name, 40)}`)}</title><path class="thin" d="${extension}${line}"/><path class="arrow" d="${arrows}"/><text transform="translate(${round(x)} ${round(y)})${turn}" text-anchor="${tight ? 'start' : 'middle'}">${measure.text}</text></g>`;
}
