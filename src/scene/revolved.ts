/** Sides of cylinders and cones, and lines of straight pieces turned about an axis: one mathematics for both. */
import type { Vector3 } from '../design/description.js';
import type { FacePatch } from './convex-solid.js';
import { roots } from './dish.js';
import { add, dot, normalise, scale, subtract } from './vector.js';

export type Revolved = Extract<FacePatch, { kind: 'side' | 'profile' }>;
/** Height above the base, radius. */
export type Station = readonly [height: number, radius: number];

export const isRevolved = (patch: FacePatch): patch is Revolved => patch.kind === 'side' || patch.kind === 'profile';

export function stationsOf(patch: Revolved): readonly Station[] {
  if (patch.kind === 'profile') return patch.stations;
  return [
    [0, patch.bottomRadius],
    [patch.height, patch.topRadius],
  ];
}

export const heightOf = (patch: Revolved): number => stationsOf(patch).at(-1)?.[0] ?? 0;

/** Length round the side at its mean radius: the width of its map, mm. */
export function girthOf(patch: Revolved): number {
  let sum = 0;
  for (const [[z0, r0], [z1, r1]] of slices(patch)) sum += ((r0 + r1) / 2) * (z1 - z0);
  return (2 * Math.PI * sum) / heightOf(patch);
}

export function slices(patch: Revolved): readonly (readonly [Station, Station])[] {
  const stations = stationsOf(patch);
  return stations.slice(1).map((station, i) => [stations[i], station] as const);
}

const sliceArea = ([[z0, r0], [z1, r1]]: readonly [Station, Station]): number =>
  Math.PI * (r0 + r1) * Math.hypot(z1 - z0, r1 - r0);

export const revolvedArea = (patch: Revolved): number =>
  slices(patch).reduce((sum, slice) => sum + sliceArea(slice), 0);

/** A point uniform in area for (s, t) uniform in the unit square, with the outward normal there. */
export function revolvedSample(patch: Revolved, s: number, t: number): { point: Vector3; normal: Vector3 } {
  const all = slices(patch);
  let rest = s * revolvedArea(patch);
  let i = 0;
  while (i < all.length - 1 && rest > sliceArea(all[i])) rest -= sliceArea(all[i++]);
  const [[z0, r0], [z1, r1]] = all[i];
  const share = Math.min(1, rest / sliceArea(all[i]));
  // Inverse of the area below height fraction h: r0 h + (r1 − r0) h²/2.
  const mean = (r0 + r1) / 2;
  const h =
    Math.abs(r1 - r0) < 1e-12 * mean ? share : (Math.sqrt(r0 * r0 + 2 * (r1 - r0) * mean * share) - r0) / (r1 - r0);
  return revolvedPoint(patch, z0 + h * (z1 - z0), 2 * Math.PI * t);
}

/** Point of the side at a height and an angle from u, and the outward normal there. */
export function revolvedPoint(patch: Revolved, height: number, angle: number): { point: Vector3; normal: Vector3 } {
  const [[z0, r0], [z1, r1]] = sliceAt(patch, height);
  const radial = add(scale(patch.u, Math.cos(angle)), scale(patch.v, Math.sin(angle)));
  const radius = r0 + ((r1 - r0) * (height - z0)) / (z1 - z0);
  const point = add(patch.base, add(scale(patch.axis, height), scale(radial, radius)));
  return { point, normal: normalise(add(scale(radial, z1 - z0), scale(patch.axis, r0 - r1))) };
}

function sliceAt(patch: Revolved, height: number): readonly [Station, Station] {
  const all = slices(patch);
  return all.find(([, [z1]]) => height <= z1) ?? all[all.length - 1];
}

/** True area per area of the map (girth by height) at a height. */
export function revolvedStretch(patch: Revolved): (height: number) => number {
  const girth = girthOf(patch);
  return (height) => {
    const [[z0, r0], [z1, r1]] = sliceAt(patch, height);
    const radius = r0 + ((r1 - r0) * (height - z0)) / (z1 - z0);
    return ((2 * Math.PI * radius) / girth) * (Math.hypot(z1 - z0, r1 - r0) / (z1 - z0));
  };
}

/** Distances at which a ray meets the side, with the outward normals there. */
export function revolvedMeetings(
  patch: Revolved,
  origin: Vector3,
  direction: Vector3,
): { distance: number; normal: Vector3 }[] {
  const { axis } = patch;
  return slices(patch).flatMap(([[z0, r0], [z1, r1]]) => {
    const slope = (r1 - r0) / (z1 - z0);
    const from = subtract(origin, add(patch.base, scale(axis, z0)));
    // |p|² − (p·a)² = (r₀ + slope p·a)² along p = from + t d.
    const start = dot(from, axis);
    const dz = dot(direction, axis);
    const a = dot(direction, direction) - (1 + slope * slope) * dz * dz;
    const b = dot(from, direction) - (1 + slope * slope) * start * dz - slope * r0 * dz;
    const c = dot(from, from) - (1 + slope * slope) * start * start - 2 * slope * r0 * start - r0 ** 2;
    return roots(a, b, c).flatMap((distance) => {
      const p = add(from, scale(direction, distance));
      const z = dot(p, axis);
      if (z < 0 || z > z1 - z0) return [];
      const radial = normalise(subtract(p, scale(axis, z)));
      return [{ distance, normal: normalise(subtract(radial, scale(axis, slope))) }];
    });
  });
}
