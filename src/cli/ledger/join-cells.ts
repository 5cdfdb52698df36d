import type { MapArray } from '../../record/run-arrays.js';

/** Means over patches of a map of a face. */
export interface Patches {
  readonly across: number;
  readonly up: number;
  /** Index across + up·(patches across); NaN where there is no face. */
  readonly values: Float64Array;
}

/** @param across wanted, up wanted: more than the map has cells are not made */
export function joinCells({ shape, values, measure }: MapArray, wanted: { across: number; up: number }): Patches {
  const [nu, nv = 1] = shape;
  const across = Math.max(1, Math.min(nu, wanted.across));
  const up = Math.max(1, Math.min(nv, wanted.up));
  const sum = new Float64Array(across * up);
  const weight = new Float64Array(across * up);
  for (let i = 0; i < values.length; i++) {
    if (!(measure[i] > 0) || !Number.isFinite(values[i])) continue;
    const u = i % nu;
    const to = Math.floor((u * across) / nu) + across * Math.floor((((i - u) / nu) * up) / nv);
    sum[to] += values[i] * measure[i];
    weight[to] += measure[i];
  }
  return { across, up, values: sum.map((total, i) => total / weight[i]) };
}
