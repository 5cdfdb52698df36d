/** Where a face bounds its part: elsewhere a later part covers it or a hole has taken it away, and no light crosses it. */
import type { Vector3 } from '../design/description.js';
import type { RecorderPlan } from './compile-recorders.js';
import type { SceneFace } from './compile-solids.js';
import type { FacePatch } from './convex-solid.js';
import { lineOfSight } from './line-of-sight.js';
import type { RegionGraph } from './region-graph.js';
import { isRevolved, revolvedPoint } from './revolved.js';
import { add, normalise, scale, subtract } from './vector.js';

/** Step off the face to look at either side, mm. */
const STEP = 1e-5;

interface Spot {
  readonly point: Vector3;
  readonly normal: Vector3;
}

/** Share, 0 to 1, of the spots of a face mapped to (u, v) that bound its part; (u, v) as in the extent of the map. */
export function bareShare(plan: RecorderPlan, face: SceneFace, graph: RegionGraph): (u: number, v: number) => number {
  const ownerAt = (point: Vector3, direction: Vector3, step: number): number => {
    const [x, y, z] = add(point, scale(direction, step));
    if (graph.crowded) graph.forget();
    return graph.owner[graph.locate(x, y, z, 0.6, 0.64, 0.48)];
  };
  const spots = spotsOf(plan, face.patch);
  return (u, v) => {
    const all = spots(u, v);
    if (all.length === 0) return 0;
    const bare = all.filter(({ point, normal }) => {
      const out = face.hollow ? scale(normal, -1) : normal;
      return ownerAt(point, out, -STEP) === face.owner && ownerAt(point, out, STEP) !== face.owner;
    });
    return bare.length / all.length;
  };
}

/** Points of the patch that the map shows at (u, v), at least one; two on a dome beyond its equator. */
function spotsOf(plan: RecorderPlan, patch: FacePatch): (u: number, v: number) => readonly Spot[] {
  const [[uLow, uHigh], [vLow]] = plan.extent;
  if (isRevolved(patch)) {
    return (u, v) => [revolvedPoint(patch, v, 2 * Math.PI * ((u - uLow) / (uHigh - uLow) - 0.5))];
  }
  if (patch.kind === 'dish' || patch.kind === 'group') return lineOfSight(plan, patch);
  if (patch.kind === 'zone') {
    const { centre, radius, axis, from } = patch;
    return (u, v) => {
      const lift = Math.sqrt(Math.max(0, radius ** 2 - u * u - v * v));
      return [lift, -lift]
        .filter((height, i) => i === 0 || height >= from)
        .map((height) => {
          const point = add(centre, add(scale(axis, height), add(scale(patch.u, u), scale(patch.v, v))));
          return { point, normal: normalise(subtract(point, centre)) };
        });
    };
  }
  return (u, v) => {
    const point = add(plan.origin, add(scale(plan.u, u - uLow), scale(plan.v, v - vLow)));
    return [{ point, normal: patch.normal }];
  };
}
