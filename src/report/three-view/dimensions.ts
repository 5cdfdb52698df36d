/** Which lengths are dimensioned beside a view, and in which row each stands: the shorter the nearer, none over another. */
import type { Drawing } from '../../record/drawing.js';
import type { Box } from './sheet-bounds.js';
import { textWidth } from './text-width.js';

export interface Measure {
  /** Ends along the axis, mm. */
  readonly low: number;
  readonly high: number;
  /** Where the extension lines of either end start on the axis across, mm. */
  readonly startAt: number;
  readonly parts: readonly string[];
  readonly text: string;
}

export interface RowedMeasure extends Measure {
  /** From 0, the row next to the view. */
  readonly row: number;
}

/** Rows beyond these would push the views apart; the table of parts has all sizes. */
export const MOST_ROWS = 7;

/**
 * Sizes of the bounding boxes of the parts along an axis and of all parts together; equal ones once.
 * @param across axis along which extension lines run, @param outward whether they run to its high side
 */
export function measuresOf(
  { parts }: Drawing,
  whole: Box,
  axis: 0 | 1 | 2,
  across: 0 | 1 | 2,
  outward: 1 | -1,
): Measure[] {
  const found = new Map<string, Measure>();
  const all = [
    ...parts.map(({ name, bounds }) => ({ name, low: bounds[0], high: bounds[1] })),
    { name: 'all parts', ...whole },
  ];
  for (const { name, low, high } of all) {
    const text = lengthText(high[axis] - low[axis]);
    const key = `${low[axis].toFixed(3)} ${high[axis].toFixed(3)}`;
    const startAt = outward === 1 ? high[across] : low[across];
    const known = found.get(key);
    const outmost = outward === 1 ? Math.max : Math.min;
    found.set(key, {
      low: low[axis],
      high: high[axis],
      startAt: known === undefined ? startAt : outmost(known.startAt, startAt),
      parts: [...(known?.parts ?? []), name],
      text,
    });
  }
  return [...found.values()].filter(({ low, high }) => high > low);
}

/** @param scale sheet units per mm */
export function arrangeMeasures(measures: readonly Measure[], scale: number): { rows: RowedMeasure[]; left: number } {
  const taken: (readonly [number, number])[][] = [];
  const rows: RowedMeasure[] = [];
  let left = 0;
  for (const measure of measures.toSorted((a, b) => a.high - a.low - (b.high - b.low) || a.low - b.low)) {
    const span = roomOf(measure, scale);
    let row = 0;
    while ((taken[row] ?? []).some(([from, to]) => span[0] < to && span[1] > from)) row++;
    // The whole is dimensioned come what may.
    if (row >= MOST_ROWS && !measure.parts.includes('all parts')) {
      left++;
      continue;
    }
    taken[row] = [...(taken[row] ?? []), span];
    rows.push({ ...measure, row });
  }
  return { rows, left };
}

/** Sheet units along the axis that a dimension takes up, its arrows and text included. */
function roomOf({ low, high, text }: Measure, scale: number): readonly [number, number] {
  const outside = isTight(text, (high - low) * scale);
  return outside ? [low * scale - 18, high * scale + 20 + textWidth(text)] : [low * scale + 0.5, high * scale - 0.5];
}

/** Whether the text has no room between its arrows. */
export function isTight(text: string, length: number): boolean {
  return length < textWidth(text) + 24;
}

/** mm to a ten-thousandth, no trailing zeros. */
export function lengthText(mm: number): string {
  return String(Number(mm.toFixed(mm < 0.1 ? 4 : 3)));
}
