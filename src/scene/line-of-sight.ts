/** What a flat map of a curved face or of many faces shows at a point: where the line of sight meets them. */

import type { Vector3 } from '../design/description.js';
import { type Meeting, meetings } from './aimed-face.js';
import type { RecorderPlan } from './compile-recorders.js';
import type { FacePatch } from './convex-solid.js';
import { patchRange } from './face-patch.js';
import { add, cross, dot, normalise, scale } from './vector.js';

export interface Sighting {
  readonly point: Vector3;
  readonly normal: Vector3;
  /** True area per area of the map. */
  readonly stretch: number;
}

/** Seen edge on, a face has no place on its map. */
const EDGE_ON = 1e-6;

/** (u, v) as in the extent of the map. */
export function lineOfSight(plan: RecorderPlan, patch: FacePatch): (u: number, v: number) => readonly Sighting[] {
  const [[uLow], [vLow]] = plan.extent;
  const sight = normalise(cross(plan.u, plan.v));
  const [u0, v0] = [dot(plan.origin, plan.u), dot(plan.origin, plan.v)];
  const members = patch.kind === 'group' ? patch.members : [patch];
  // Most lines pass most members by.
  const bounds = members.map((member) => ({
    member,
    u: patchRange(member, plan.u).map((at) => at - u0 + uLow),
    v: patchRange(member, plan.v).map((at) => at - v0 + vLow),
  }));
  return (u, v) => {
    const near = bounds.filter(({ u: [a, b], v: [c, d] }) => u >= a && u <= b && v >= c && v <= d);
    if (near.length === 0) return [];
    const start = add(plan.origin, add(scale(plan.u, u - uLow), scale(plan.v, v - vLow)));
    const seen: Meeting[] = near.flatMap(({ member }) => meetings(member, start, sight));
    return seen
      .filter(({ normal }) => Math.abs(dot(normal, sight)) > EDGE_ON)
      .map(({ distance, normal }) => ({
        point: add(start, scale(sight, distance)),
        normal,
        stretch: 1 / Math.abs(dot(normal, sight)),
      }));
  };
}
