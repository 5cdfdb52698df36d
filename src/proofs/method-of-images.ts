/** Irradiance at the end of a hollow square rod of side 1 with perfect walls, lit by a Lambertian point in its entrance. */
import { gaussNodes } from './quadrature.js';

/** Images either side along each axis: the tail beyond is below 1e-7 for rods up to length 2. */
const IMAGES = 60;

/**
 * Irradiance over its mean at (x, y) of the exit plane, point source of power 1 at (x0, y0), both from the axis:
 * Σ L²/(π(L² + dx² + dy²)²) over image sources (m + (−1)^m x0, n + (−1)^n y0), exact for perfect mirrors. What lies beyond the
 * square of images summed is added as an even glow.
 */
export function rodIrradiance(length: number, x0: number, y0: number, x: number, y: number): number {
  let sum = 0;
  for (let m = -IMAGES; m <= IMAGES; m++) {
    const dx = m + (m % 2 === 0 ? x0 : -x0) - x;
    for (let n = -IMAGES; n <= IMAGES; n++) {
      const dy = n + (n % 2 === 0 ? y0 : -y0) - y;
      sum += (length / (length * length + dx * dx + dy * dy)) ** 2;
    }
  }
  // The integral of L²/(π r⁴) outside the square |x|, |y| < a, half a cell beyond the last image.
  const a = IMAGES + 0.5;
  return sum / Math.PI + (length * length * (Math.PI + 2)) / (2 * Math.PI * a * a);
}

/** Share of all light that meets the cell of the exit plane between the given edges: mean of the irradiance by quadrature. */
export function rodShare(
  length: number,
  source: readonly [number, number],
  [left, right]: readonly [number, number],
  [low, high]: readonly [number, number],
): number {
  const nodes = gaussNodes(5);
  let mean = 0;
  for (const u of nodes) {
    for (const v of nodes) {
      const at = rodIrradiance(length, source[0], source[1], left + (right - left) * u.at, low + (high - low) * v.at);
      mean += u.weight * v.weight * at;
    }
  }
  return mean * (right - left) * (high - low);
}
