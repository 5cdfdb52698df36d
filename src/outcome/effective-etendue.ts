/**
 * Effective size of what light fills, after the participation of its cells: (Σ p)² / Σ (p²/w), p the light and w the size of a cell. Light
 * that is even over a part of the cells and absent elsewhere gives the size of that part.
 */
import type { Estimate } from './error-bars.js';

/**
 * The squares are products of two independent halves, so that counting noise does not pass for unevenness; the error is that of these
 * products, from the differences of the halves.
 * @param halves light of each cell from even and from odd batches
 * @returns null where the halves hold too little light
 */
export function effectiveSize(
  [even, odd]: readonly [Float64Array, Float64Array],
  size: (cell: number) => number,
): Estimate | null {
  const [a, b] = [even, odd].map((half) => half.reduce((sum, value) => sum + value, 0));
  if (!(a > 0 && b > 0)) return null;
  let sum = 0;
  let variance = 0;
  for (let i = 0; i < even.length; i++) {
    const w = size(i);
    if (!(w > 0)) continue;
    const p = even[i] / a;
    const q = odd[i] / b;
    sum += (p * q) / w;
    // Var(pq) = 2 m² s² + s⁴; s² from (p − q)²/2, s⁴ from its square, which a normal law makes three times too large.
    const s2 = (p - q) ** 2 / 2;
    variance += (2 * ((p + q) / 2) ** 2 * s2 + s2 ** 2 / 3) / w ** 2;
  }
  if (!(sum > 0)) return null;
  return { value: 1 / sum, standardError: Math.sqrt(variance) / sum ** 2 };
}

/** Solid angle of a cell times the mean cosine over it, sr; nothing beyond 90°. Angles in rad. */
export function projectedSolidAngle(fromPolar: number, toPolar: number, azimuthCells: number): number {
  const sine = (angle: number) => Math.sin(Math.min(angle, Math.PI / 2));
  return (Math.PI / azimuthCells) * (sine(toPolar) ** 2 - sine(fromPolar) ** 2);
}
