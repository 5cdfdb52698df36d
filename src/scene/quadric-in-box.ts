/** Whether the surface of a quadric comes anywhere near a box along the axes: where it does not, light in the box cannot cross it. */

/** The box is taken this much larger, mm: far more than rounding moves light. */
const MARGIN = 1e-6;
/** Below this share of its terms a value of the form is nothing but rounding. */
const ROUNDING = 1e-9;

/** Exact where the axes of the quadric are those of the box, else never false where the surface passes. Coefficients as in quadric.ts. */
export function quadricMeetsBox(
  q: ArrayLike<number>,
  at: number,
  low: ArrayLike<number>,
  high: ArrayLike<number>,
): boolean {
  let least = q[at + 9];
  let most = q[at + 9];
  let size = Math.abs(q[at + 9]);
  for (let axis = 0; axis < 3; axis++) {
    const a = q[at + axis];
    const b = q[at + 6 + axis];
    if (a === 0 && b === 0) continue;
    const from = low[axis] - MARGIN;
    const to = high[axis] + MARGIN;
    const start = along(a, b, from);
    const end = along(a, b, to);
    let lowest = start < end ? start : end;
    let highest = start < end ? end : start;
    // The vertex of the parabola a·x² + 2·b·x.
    const turn = -b / a;
    if (a !== 0 && turn > from && turn < to) {
      const vertex = -(b * b) / a;
      if (vertex < lowest) lowest = vertex;
      if (vertex > highest) highest = vertex;
    }
    least += lowest;
    most += highest;
    if (Number.isFinite(lowest)) size += Math.abs(lowest);
    if (Number.isFinite(highest)) size += Math.abs(highest);
  }
  for (let pair = 0; pair < 3; pair++) {
    const c = 2 * q[at + 3 + pair];
    if (c === 0) continue;
    const i = pair === 2 ? 1 : 0;
    const j = pair === 0 ? 1 : 2;
    const product = Math.abs(c) * farthest(low[i], high[i]) * farthest(low[j], high[j]);
    // Without bounds on both axes nothing can be told.
    if (!Number.isFinite(product)) return true;
    least -= product;
    most += product;
    size += product;
  }
  const slack = ROUNDING * size;
  // Infinities of both signs make no number: then the surface may be there.
  return !(least > slack || most < -slack);
}

/** a·x² + 2·b·x; at infinity what it tends to. */
function along(a: number, b: number, x: number): number {
  if (Number.isFinite(x)) return (a * x + 2 * b) * x;
  return a !== 0 ? a * Number.POSITIVE_INFINITY : b * x;
}

const farthest = (low: number, high: number): number => Math.max(Math.abs(low - MARGIN), Math.abs(high + MARGIN));
