import type { DrawnPump } from '../../record/drawing.js';
import type { Bounds } from './bounds.js';

/** Length and gap of an arrow as shares of the diagonal of all parts. */
const LENGTH = 0.26;
const GAP = 0.03;

/**
 * Where to draw a pump's direction: just outside the parts, on the axis of its light, for the pump itself may stand far
 * off. Where the axis misses the parts, or the pump sits within them, the arrow starts at the pump.
 */
export function pumpArrow(
  { at, direction }: Pick<DrawnPump, 'at' | 'direction'>,
  { low, high }: Bounds,
): { readonly tail: readonly number[]; readonly tip: readonly number[] } {
  const diagonal = Math.hypot(...high.map((value, i) => value - low[i])) || 1;
  const point = (t: number) => at.map((value, i) => value + t * direction[i]);
  const entry = boxEntry(at, direction, low, high);
  if (entry === null || entry <= 0) return { tail: point(0), tip: point(LENGTH * diagonal) };
  const tip = Math.max(entry - GAP * diagonal, entry / 2);
  return { tail: point(Math.max(0, tip - LENGTH * diagonal)), tip: point(tip) };
}

/** Distance along a ray at which it comes into a box; null when it misses. */
function boxEntry(
  at: readonly number[],
  direction: readonly number[],
  low: readonly number[],
  high: readonly number[],
): number | null {
  let near = Number.NEGATIVE_INFINITY;
  let far = Number.POSITIVE_INFINITY;
  for (let i = 0; i < 3; i++) {
    if (Math.abs(direction[i]) < 1e-12) {
      if (at[i] < low[i] || at[i] > high[i]) return null;
      continue;
    }
    const one = (low[i] - at[i]) / direction[i];
    const other = (high[i] - at[i]) / direction[i];
    near = Math.max(near, Math.min(one, other));
    far = Math.min(far, Math.max(one, other));
  }
  return near <= far && far > 0 ? near : null;
}
