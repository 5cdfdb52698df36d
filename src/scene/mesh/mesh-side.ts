/** On which side of a mesh a point lies. */
import { CROSS, crossFacets, SENSE } from '../../numerics/mesh/cross-facets.js';
import type { Scene } from '../scene-layout.js';

/** Nearer than this to a facet, the direction of travel decides, mm. */
const TIE = 1e-9;
/** A look that passes a facet nearer to its edge than this share is asked again another way. */
const CLEAR = 1e-9;
const TILT = 0.013;

const look = new Float64Array(6);
const cross = new Float64Array(CROSS.COUNT);

/**
 * −1 inside, +1 outside, of the point and direction in `ray` [0..5]: what lies ahead tells, for a closed surface is left from inside and
 * entered from outside. On an edge three other ways are looked and the majority believed.
 */
export function meshSide(scene: Scene, mesh: number, ray: ArrayLike<number>): number {
  const direct = sideAhead(scene, mesh, ray, -1);
  if (cross[CROSS.inset] > CLEAR) return direct;
  let sum = 0;
  for (let axis = 0; axis < 3; axis++) sum += sideAhead(scene, mesh, ray, axis);
  return sum < 0 ? -1 : 1;
}

function sideAhead(scene: Scene, mesh: number, ray: ArrayLike<number>, axis: number): number {
  for (let c = 0; c < 3; c++) {
    look[c] = ray[c] + TIE * ray[3 + c];
    look[3 + c] = ray[3 + c];
  }
  if (axis >= 0) look[3 + axis] += TILT;
  const norm = 1 / Math.sqrt(look[3] * look[3] + look[4] * look[4] + look[5] * look[5]);
  for (let c = 3; c < 6; c++) look[c] *= norm;
  cross[CROSS.limit] = Number.POSITIVE_INFINITY;
  // No crossing is a ghost here: the point has been moved off the surface.
  cross[CROSS.reach] = 0;
  const facet = crossFacets(scene, scene.meshRoot[mesh], look, SENSE.leaving, -1, cross);
  const inside = facet >= 0 && cross[CROSS.wrong] === Number.POSITIVE_INFINITY;
  // Nothing ahead leaves no doubt.
  if (facet < 0) cross[CROSS.inset] = 1;
  return inside ? -1 : 1;
}
