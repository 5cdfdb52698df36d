/** Rings of points and the belts of facets between them. */
import type { Vector3 } from '../design/description.js';
import { add, cross, dot, scale } from '../scene/vector.js';
import type { Facet, SideMark } from './facet.js';

/** Angles of a full turn in equal steps, from 0. */
export const evenAngles = (count: number): number[] =>
  Array.from({ length: count }, (_, i) => (2 * Math.PI * i) / count);

/** v or −v, so that u, v and the axis are right-handed and rings run counterclockwise as seen from where the axis points. */
export const handed = (u: Vector3, v: Vector3, axis: Vector3): Vector3 =>
  dot(cross(u, v), axis) < 0 ? scale(v, -1) : v;

export function radials(u: Vector3, v: Vector3, angles: readonly number[]): Vector3[] {
  return angles.map((angle) => add(scale(u, Math.cos(angle)), scale(v, Math.sin(angle))));
}

/** Points of a circle, from u towards v. */
export function ringOf(centre: Vector3, u: Vector3, v: Vector3, radius: number, angles: readonly number[]): Vector3[] {
  return radials(u, v, angles).map((radial) => add(centre, scale(radial, radius)));
}

export interface Ring {
  readonly ring: readonly Vector3[];
  readonly normals: readonly Vector3[];
  /** All its points are one. */
  readonly pointed: boolean;
}

/** Facets between two rings of which `high` lies further along the axis. */
export function belt(low: Ring, high: Ring, lowMark: SideMark, highMark: SideMark): Facet[] {
  return low.ring.map((_, i): Facet => {
    const j = (i + 1) % low.ring.length;
    const corners: Vector3[] = [low.ring[i]];
    const normals: Vector3[] = [low.normals[i]];
    const sides: SideMark[] = [];
    if (!low.pointed) {
      corners.push(low.ring[j]);
      normals.push(low.normals[j]);
      sides.push(lowMark);
    }
    corners.push(high.ring[j]);
    normals.push(high.normals[j]);
    sides.push('mesh');
    if (!high.pointed) {
      corners.push(high.ring[i]);
      normals.push(high.normals[i]);
      sides.push(highMark);
    }
    sides.push('mesh');
    return { corners, normals, sides };
  });
}
