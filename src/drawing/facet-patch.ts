/** The patch of a face as flat facets. Round faces are inscribed polyhedra, so that solids made of them are closed and convex. */
import type { Vector3 } from '../design/description.js';
import type { FacePatch } from '../scene/convex-solid.js';
import { type Revolved, stationsOf } from '../scene/revolved.js';
import { add, normalise, scale, subtract } from '../scene/vector.js';
import type { Facet } from './facet.js';
import { dishFacets } from './facet-dish.js';
import { meshFacets } from './mesh-facets.js';
import { belt, evenAngles, handed, type Ring, radials, ringOf } from './rings.js';

/** Facets round a full turn. A multiple of 4, so that extremes along a face's own axes are kept. */
export const FACETS_ROUND = 48;

/** @param round facets round a full turn, a multiple of 4 */
export function facetPatch(patch: FacePatch, round: number): Facet[] {
  switch (patch.kind) {
    case 'polygon':
      return [flatFacet(patch.corners, patch.normal)];
    case 'disc': {
      if (patch.radius === 0) return [];
      const ring = ringOf(patch.centre, patch.u, patch.v, patch.radius, evenAngles(round));
      return [flatFacet(ring, patch.normal)];
    }
    case 'side':
    case 'profile':
      return revolvedFacets(patch, round);
    case 'facets':
      return meshFacets(patch);
    case 'zone':
      return zoneFacets(patch, round);
    case 'dish':
      return dishFacets(patch, round);
    case 'group':
      return patch.members.flatMap((member) => facetPatch(member, round));
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

/** Sides of cylinders and cones, and lines turned about an axis, whose normals are smooth across their corners. */
function revolvedFacets(patch: Revolved, round: number): Facet[] {
  const { base, axis, u } = patch;
  const v = handed(u, patch.v, axis);
  const angles = evenAngles(round);
  const stations = stationsOf(patch);
  const leans = stations.slice(1).map(([height, radius], i) => {
    const [h, r] = [height - stations[i][0], stations[i][1] - radius];
    return [h / Math.hypot(h, r), r / Math.hypot(h, r)] as const;
  });
  const rings = stations.map(([height, radius], i): Ring => {
    const [below, above] = [leans[i - 1] ?? leans[i], leans[i] ?? leans[i - 1]];
    const [out, up] = [below[0] + above[0], below[1] + above[1]];
    return {
      ring: ringOf(add(base, scale(axis, height)), u, v, radius, angles),
      normals: radials(u, v, angles).map((radial) => normalise(add(scale(radial, out), scale(axis, up)))),
      pointed: radius === 0,
    };
  });
  return rings
    .slice(1)
    .flatMap((ring, i) => belt(rings[i], ring, i === 0 ? 'rim' : 'mesh', i + 2 === rings.length ? 'rim' : 'mesh'));
}

function zoneFacets(
  { centre, radius, axis, from, u, v }: Extract<FacePatch, { kind: 'zone' }>,
  round: number,
): Facet[] {
  const whole = from <= -radius;
  // Polar angle of the rim from the crown.
  const widest = whole ? Math.PI : Math.acos(from / radius);
  const belts = Math.max(2, Math.ceil((widest * round) / (2 * Math.PI)));
  const ringAt = (k: number): Ring => {
    const angle = (widest * k) / belts;
    const middle = add(centre, scale(axis, k === belts && !whole ? from : radius * Math.cos(angle)));
    const pointed = k === 0 || (whole && k === belts);
    const ring = ringOf(middle, u, handed(u, v, axis), pointed ? 0 : radius * Math.sin(angle), evenAngles(round));
    return { ring, normals: ring.map((point) => normalise(subtract(point, centre))), pointed };
  };
  return Array.from({ length: belts }, (_, k) =>
    belt(ringAt(k + 1), ringAt(k), k + 1 === belts && !whole ? 'rim' : 'mesh', 'mesh'),
  ).flat();
}
