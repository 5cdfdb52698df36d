/** The cutting of facets and segments by a convex polyhedron. */
import type { Vector3 } from '../design/description.js';
import { dot } from '../scene/vector.js';
import { type Facet, facetNormal, type Segment, splitFacet } from './facet.js';
import type { FacetedSolid } from './facet-solid.js';

/** Where a facet counts that lies in a face of the solid: looking the same way as that face, or the opposite way. */
export interface Contact {
  readonly same: 'in' | 'out';
  readonly opposed: 'in' | 'out';
}

export interface Parted {
  /** Its cut sides are marked 'cut'. */
  readonly inside: Facet | null;
  readonly outside: readonly Facet[];
}

/** Parts a facet by a convex solid. A facet that the solid does not reach stays whole. */
export function partFacet(facet: Facet, solid: FacetedSolid, contact: Contact, tolerance: number): Parted {
  const whole: Parted = { inside: null, outside: [facet] };
  if (solid.planes.length === 0 || boxesApart(facet.corners, solid, tolerance)) return whole;
  const own = facetNormal(facet);
  const outside: Facet[] = [];
  let rest = facet;
  for (const plane of solid.planes) {
    const lies = rest.corners.every((corner) => Math.abs(dot(corner, plane.normal) - plane.offset) <= tolerance);
    if (lies) {
      if (contact[dot(own, plane.normal) > 0 ? 'same' : 'opposed'] === 'out') return whole;
      continue;
    }
    const split = splitFacet(rest, plane, tolerance);
    if (split.inside === null) return whole;
    if (split.outside !== null) outside.push(split.outside);
    rest = split.inside;
  }
  return { inside: rest, outside };
}

/** The parts of a segment outside a convex solid; what runs along its skin stays. */
export function segmentOutside([a, b]: Segment, solid: FacetedSolid, tolerance: number): Segment[] {
  if (solid.planes.length === 0 || boxesApart([a, b], solid, tolerance)) return [[a, b]];
  let [from, to] = [0, 1];
  for (const { normal, offset } of solid.planes) {
    const da = dot(a, normal) - offset;
    const db = dot(b, normal) - offset;
    if (da >= -tolerance && db >= -tolerance) return [[a, b]];
    if (da > 0 && db < 0) from = Math.max(from, da / (da - db));
    if (da < 0 && db > 0) to = Math.min(to, da / (da - db));
  }
  if (from >= to) return [[a, b]];
  const at = (share: number): Vector3 => [
    a[0] + share * (b[0] - a[0]),
    a[1] + share * (b[1] - a[1]),
    a[2] + share * (b[2] - a[2]),
  ];
  const pieces: Segment[] = [];
  if (from > 1e-9) pieces.push([a, at(from)]);
  if (to < 1 - 1e-9) pieces.push([at(to), b]);
  return pieces;
}

function boxesApart(points: readonly Vector3[], { low, high }: FacetedSolid, tolerance: number): boolean {
  for (const axis of [0, 1, 2] as const) {
    if (points.every((point) => point[axis] < low[axis] - tolerance)) return true;
    if (points.every((point) => point[axis] > high[axis] + tolerance)) return true;
  }
  return false;
}
