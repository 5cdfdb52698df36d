/** A group of facets as a face: area, middle, mean normal, sample points. */
import type { Vector3 } from '../../design/description.js';
import { facetVector } from '../../numerics/mesh/facet-geometry.js';
import { add, cross, dot, length, normalise, scale, subtract } from '../vector.js';
import type { PlacedMesh } from './placed-mesh.js';

export interface FacetPatch {
  readonly kind: 'facets';
  readonly mesh: PlacedMesh;
  readonly group: number;
  /** Numbers of its facets. */
  readonly facets: Int32Array;
  /** Area of the facets up to and with each, mm². */
  readonly areas: Float64Array;
  readonly flat: boolean;
  /** Middle of area: off the face where it is curved. */
  readonly centre: Vector3;
  /** Mean outward normal. Where that is 0: +z of the mesh for a whole closed surface, else the axis along which most of the face is seen. */
  readonly normal: Vector3;
  readonly u: Vector3;
  readonly v: Vector3;
}

/** Normals that differ by less than 4e-5 on average, and heights by less than this share of the width, count as flat. */
const FLAT_NORMALS = 1e-9;
const FLAT_HEIGHT = 1e-5;

/** @param frame u and v of the same face before the mesh was moved; else they are chosen as those of a box */
export function facetPatch(
  mesh: PlacedMesh,
  group: number,
  facets: Int32Array,
  frame: { readonly normal: Vector3; readonly u: Vector3; readonly v: Vector3 } | null,
): FacetPatch {
  const corners = mesh.source.tree.facetCorner;
  const vector = new Float64Array(3);
  const areas = new Float64Array(facets.length);
  const sum = [0, 0, 0];
  const seen = [0, 0, 0];
  const middle = [0, 0, 0];
  let area = 0;
  facets.forEach((facet, i) => {
    facetVector(mesh.points, corners, facet, vector);
    const own = Math.sqrt(vector[0] ** 2 + vector[1] ** 2 + vector[2] ** 2);
    area += own;
    areas[i] = area;
    for (let c = 0; c < 3; c++) {
      sum[c] += vector[c];
      seen[c] += Math.abs(vector[c]);
      for (let k = 0; k < 3; k++) middle[c] += (own * mesh.points[3 * corners[3 * facet + k] + c]) / 3;
    }
  });
  const total: Vector3 = [sum[0], sum[1], sum[2]];
  const centre: Vector3 =
    area > 0 ? [middle[0] / area, middle[1] / area, middle[2] / area] : facetCorner(mesh, facets[0], 0);
  const closed = facets.length === mesh.source.group.length;
  const directed = length(total) > 1e-6 * area && area > 0;
  const normal = directed ? normalise(total) : (frame?.normal ?? (closed ? [0, 0, 1] : widestView(seen)));
  const axes = frame ?? boxAxes(normal);
  const patch = { kind: 'facets', mesh, group, facets, areas, centre, normal, u: axes.u, v: axes.v } as const;
  return {
    ...patch,
    flat: directed && length(total) >= area * (1 - FLAT_NORMALS) && isThin({ ...patch, flat: true }, area),
  };
}

/** As a draughtsman looks: from the front, the right or the top. */
function widestView([x, y, z]: readonly number[]): Vector3 {
  if (y >= x && y >= z) return [0, -1, 0];
  return x >= z ? [1, 0, 0] : [0, 0, 1];
}

function isThin(patch: FacetPatch, area: number): boolean {
  const [low, high] = facetsRange(patch, patch.normal);
  return high - low <= FLAT_HEIGHT * Math.sqrt(area);
}

/** v upright where it can be, u along +x or else +y, so that maps read as those of a box. */
function boxAxes(normal: Vector3): { u: Vector3; v: Vector3 } {
  if (Math.abs(normal[2]) > 1 - 1e-9) return { u: [1, 0, 0], v: [0, 1, 0] };
  const v = normalise(subtract([0, 0, 1], scale(normal, normal[2])));
  const u = normalise(cross(v, normal));
  const backward = Math.abs(u[0]) > 1e-9 ? u[0] < 0 : u[1] < 0;
  return { u: backward ? scale(u, -1) : u, v };
}

/** Corner 0, 1 or 2 of a facet. */
export function facetCorner(mesh: PlacedMesh, facet: number, k: number): Vector3 {
  const p = 3 * mesh.source.tree.facetCorner[3 * facet + k];
  return [mesh.points[p], mesh.points[p + 1], mesh.points[p + 2]];
}

/** Corners of all facets of the patch, 9 numbers each, counter-clockwise as seen from outside: what a drawing needs. */
export function facetTriangles({ mesh, facets }: FacetPatch): Float64Array {
  const out = new Float64Array(9 * facets.length);
  facets.forEach((facet, i) => {
    for (let k = 0; k < 3; k++) out.set(facetCorner(mesh, facet, k), 9 * i + 3 * k);
  });
  return out;
}

export const facetsArea = ({ areas }: FacetPatch): number => areas[areas.length - 1] ?? 0;

export function facetNormal(mesh: PlacedMesh, facet: number): Vector3 {
  const vector = new Float64Array(3);
  facetVector(mesh.points, mesh.source.tree.facetCorner, facet, vector);
  const normal: Vector3 = [vector[0], vector[1], vector[2]];
  return length(normal) > 0 ? normalise(normal) : [0, 0, 1];
}

/** Even in area for (s, t) even in the unit square. */
export function facetsPoint({ mesh, facets, areas }: FacetPatch, s: number, t: number) {
  const wanted = s * (areas[areas.length - 1] ?? 0);
  let low = 0;
  let high = areas.length - 1;
  while (low < high) {
    const half = (low + high) >> 1;
    if (areas[half] > wanted) high = half;
    else low = half + 1;
  }
  const before = low > 0 ? areas[low - 1] : 0;
  const own = areas[low] - before;
  // The share of s within the facet is as even as s.
  const a = Math.sqrt(own > 0 ? Math.min(1, Math.max(0, (wanted - before) / own)) : 0.5);
  const facet = facets[low];
  const corner = facetCorner(mesh, facet, 0);
  const [e, f] = [subtract(facetCorner(mesh, facet, 1), corner), subtract(facetCorner(mesh, facet, 2), corner)];
  return { point: add(corner, add(scale(e, a * (1 - t)), scale(f, a * t))), normal: facetNormal(mesh, facet) };
}

export function facetsRange({ mesh, facets }: FacetPatch, [x, y, z]: Vector3): readonly [number, number] {
  const corners = mesh.source.tree.facetCorner;
  const { points } = mesh;
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < facets.length; i++) {
    for (let k = 0; k < 3; k++) {
      const p = 3 * corners[3 * facets[i] + k];
      const value = x * points[p] + y * points[p + 1] + z * points[p + 2];
      if (value < low) low = value;
      if (value > high) high = value;
    }
  }
  return [low, high];
}

/** Where a line meets the facets of the patch: distances along the unit direction, before and behind the origin. */
export function facetsMeetings({ mesh, facets }: FacetPatch, origin: Vector3, direction: Vector3) {
  const found: { distance: number; normal: Vector3 }[] = [];
  for (const facet of facets) {
    const a = facetCorner(mesh, facet, 0);
    const [e, f] = [subtract(facetCorner(mesh, facet, 1), a), subtract(facetCorner(mesh, facet, 2), a)];
    const p = cross(direction, f);
    const whole = dot(e, p);
    if (whole === 0) continue;
    const s = subtract(origin, a);
    const u = dot(s, p) / whole;
    const q = cross(s, e);
    const v = dot(direction, q) / whole;
    if (u < -1e-12 || v < -1e-12 || u + v > 1 + 1e-12) continue;
    found.push({ distance: dot(f, q) / whole, normal: facetNormal(mesh, facet) });
  }
  return found;
}

/** The outermost spot of the face along its normal through its middle (of a whole closed surface: towards −y, as of a sphere). */
export function facetsAim(patch: FacetPatch): { point: Vector3; normal: Vector3; u: Vector3; v: Vector3 } {
  const closed = !patch.flat && patch.facets.length === patch.mesh.source.group.length;
  const look = closed ? scale(patch.v, -1) : patch.normal;
  const rest = closed ? { u: patch.u, v: patch.normal } : { u: patch.u, v: patch.v };
  const meetings = facetsMeetings(patch, patch.centre, look).sort((a, b) => b.distance - a.distance);
  if (meetings.length > 0)
    return { point: add(patch.centre, scale(look, meetings[0].distance)), normal: look, ...rest };
  const { point } = facetsPoint(patch, 0.5, 0.5);
  return { point, normal: look, ...rest };
}
