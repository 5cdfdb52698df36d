/** Alias table for drawing an index in proportion to weights: Walker 1977, built as in Vose, IEEE Trans. Softw. Eng. 17 972 (1991). */
export interface AliasTable {
  /** Share of each cell that stays with its own index. */
  readonly keep: Float64Array;
  readonly other: Int32Array;
}

/**
 * @param weights non-negative, at least one positive, their sum finite.
 * @throws RangeError for other weights
 */
export function buildAliasTable(weights: ArrayLike<number>): AliasTable {
  const count = weights.length;
  let total = 0;
  for (let i = 0; i < count; i++) {
    const weight = weights[i];
    if (!(weight >= 0)) throw new RangeError(`weight ${i} is ${weight}; weights must not be negative`);
    total += weight;
  }
  if (!(total > 0)) throw new RangeError('all weights are zero');
  if (!Number.isFinite(total)) throw new RangeError('the sum of the weights is not finite');
  const keep = new Float64Array(count);
  const other = new Int32Array(count);
  const small: number[] = [];
  const large: number[] = [];
  for (let i = 0; i < count; i++) {
    keep[i] = (weights[i] * count) / total;
    other[i] = i;
    (keep[i] < 1 ? small : large).push(i);
  }
  while (small.length > 0 && large.length > 0) {
    const poor = small.pop() as number;
    const rich = large[large.length - 1];
    other[poor] = rich;
    keep[rich] -= 1 - keep[poor];
    if (keep[rich] < 1) {
      large.pop();
      small.push(rich);
    }
  }
  // What is left differs from 1 by rounding only; a cell of zero weight must never keep itself.
  for (const i of large) keep[i] = 1;
  for (const i of small) keep[i] = weights[i] > 0 ? 1 : 0;
  const heaviest = indexOfLargest(weights);
  for (const i of small) if (keep[i] === 0) other[i] = heaviest;
  return { keep, other };
}

function indexOfLargest(values: ArrayLike<number>): number {
  let best = 0;
  for (let i = 1; i < values.length; i++) if (values[i] > values[best]) best = i;
  return best;
}

/** Draws from the table that starts at `offset` in the pooled arrays; `unit` in [0, 1). */
export function drawIndex(keep: Float64Array, other: Int32Array, offset: number, count: number, unit: number): number {
  const scaled = unit * count;
  const cell = scaled | 0;
  return scaled - cell < keep[offset + cell] ? cell : other[offset + cell];
}
