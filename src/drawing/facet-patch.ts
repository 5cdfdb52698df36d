/** The patch of a face as flat facets. Round faces are inscribed polyhedra, so that solids made of them are closed and convex. */
import type { Vector3 } from '../design/description.js';
import type { FacePatch } from '../scene/convex-solid.js';
import { add, normalise, scale, subtract } from '../scene/vector.js';
import type { Facet, SideMark } from './facet.js';
import { meshFacets } from './mesh-facets.js';

/** Facets round a full turn. A multiple of 4, so that extremes along a face's own axes are kept. */
export const FACETS_ROUND = 48;

export function facetPatch(patch: FacePatch): Facet[] {
  switch (patch.kind) {
    case 'polygon':
      return [flatFacet(patch.corners, patch.normal)];
    case 'disc': {
      if (patch.radius === 0) return [];
      const ring = ringOf(patch.centre, patch.u, patch.v, patch.radius);
      return [flatFacet(ring, patch.normal)];
    }
    case 'side': {
      const top = add(patch.base, scale(patch.axis, patch.height));
      const lean = patch.bottomRadius - patch.topRadius;
      const normals = radials(patch.u, patch.v).map((radial) =>
        normalise(add(scale(radial, patch.height), scale(patch.axis, lean))),
      );
      return belt(
        { ring: ringOf(patch.base, patch.u, patch.v, patch.bottomRadius), normals, pointed: patch.bottomRadius === 0 },
        { ring: ringOf(top, patch.u, patch.v, patch.topRadius), normals, pointed: patch.topRadius === 0 },
        'rim',
        'rim',
      );
    }
    case 'facets':
      return meshFacets(patch);
    case 'zone':
      return zoneFacets(patch);
  }
}

/** A polygon whose corners run the way its normal says. */
function flatFacet(corners: readonly Vector3[], normal: Vector3): Facet {
  const [a, b, c] = corners;
  const [p, q] = [subtract(b, a), subtract(c, b)];
  const up =
    (p[1] * q[2] - p[2] * q[1]) * normal[0] +
    (p[2] * q[0] - p[0] * q[2]) * normal[1] +
    (p[0] * q[1] - p[1] * q[0]) * normal[2];
  return {
    corners: up < 0 ? corners.toReversed() : corners,
    normals: corners.map(() => normal),
    sides: corners.map(() => 'rim' as const),
  };
}

interface Ring {
  readonly ring: readonly Vector3[];
  readonly normals: readonly Vector3[];
  /** All its points are one. */
  readonly pointed: boolean;
}

/** Facets between two rings of which `high` lies further along the axis. */
function belt(low: Ring, high: Ring, lowMark: SideMark, highMark: SideMark): Facet[] {
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

function zoneFacets({ centre, radius, axis, from, u, v }: Extract<FacePatch, { kind: 'zone' }>): Facet[] {
  const whole = from <= -radius;
  // Polar angle of the rim from the crown.
  const widest = whole ? Math.PI : Math.acos(from / radius);
  const belts = Math.max(2, Math.ceil((widest * FACETS_ROUND) / (2 * Math.PI)));
  const ringAt = (k: number): Ring => {
    const angle = (widest * k) / belts;
    const middle = add(centre, scale(axis, k === belts && !whole ? from : radius * Math.cos(angle)));
    const pointed = k === 0 || (whole && k === belts);
    const ring = ringOf(middle, u, v, pointed ? 0 : radius * Math.sin(angle));
    return { ring, normals: ring.map((point) => normalise(subtract(point, centre))), pointed };
  };
  return Array.from({ length: belts }, (_, k) =>
    belt(ringAt(k + 1), ringAt(k), k + 1 === belts && !whole ? 'rim' : 'mesh', 'mesh'),
  ).flat();
}

function radials(u: Vector3, v: Vector3): Vector3[] {
  return Array.from({ length: FACETS_ROUND }, (_, i) => {
    const angle = (2 * Math.PI * i) / FACETS_ROUND;
    return add(scale(u, Math.cos(angle)), scale(v, Math.sin(angle)));
  });
}

/** Points of a circle, from u to v and on; also what outlines are drawn with. */
export function ringOf(centre: Vector3, u: Vector3, v: Vector3, radius: number): Vector3[] {
  return radials(u, v).map((radial) => add(centre, scale(radial, radius)));
}
