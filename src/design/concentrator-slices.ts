import { concentratorWall } from './concentrator-wall.js';
import type { ConcentratorDescription } from './description.js';

/**
 * Cone frusta needed for a round wall: chords of a parabola over equal steps Δ of its tangent leave it by Δ²/(16 f) at most, measured
 * along its axis, which is no less than the distance (closed form, no source needed).
 */
export function concentratorSlices(
  shape: Pick<ConcentratorDescription, 'smallEnd' | 'halfAngle' | 'height'>,
  tolerance: number,
): number {
  const { from, to, focalLength } = concentratorWall(shape);
  const slices = Math.ceil((to - from) / Math.sqrt(16 * focalLength * tolerance));
  return Number.isNaN(slices) ? 1 : Math.max(1, slices);
}
