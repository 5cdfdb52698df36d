/**
 * Where a ray next goes through a closed mesh. The test of ray and facet leaves no gap between facets that share an edge (Woop, Benthin and
 * Wald, J. Comput. Graph. Tech. 2(1) 65, 2013). Nothing is allocated.
 */
import { facetDistance2, facetVector } from './facet-geometry.js';
import { type FacetTree, WALK_DEPTH } from './facet-tree.js';

/** What `crossFacets` is given and gives beside the ray. */
export const enum CROSS {
  /** Given: no crossing farther than this is wanted. */
  limit = 0,
  /** Given: nearer than this to a facet, rounding decides on which side of it a point lies, mm. */
  reach = 1,
  /** Distance to the crossing. */
  distance = 2,
  /** Distance to the nearest crossing of the other kind that lies before it, ∞ without. */
  wrong = 3,
  /** Share of the facet between the crossing and its nearest edge; near 0 it lies on an edge. */
  inset = 4,
  COUNT = 5,
}

/** Crossings by which light leaves the inside of the mesh, and by which it comes in. */
export const enum SENSE {
  leaving = -1,
  entering = 1,
}

const walk = new Int32Array(WALK_DEPTH);
const vector = new Float64Array(3);

/**
 * Nearest crossing of the wanted kind ahead of the ray (origin and unit direction in `ray` [0..5]).
 * @param last facet the ray has just met and cannot meet again, −1 none
 * @returns its facet, −1 for none
 */
export function crossFacets(
  tree: FacetTree,
  root: number,
  ray: Float64Array,
  sense: number,
  last: number,
  cross: Float64Array,
): number {
  const points = tree.facetPoint;
  const corners = tree.facetCorner;
  const nodeBox = tree.nodeBox;
  const nodeChild = tree.nodeChild;
  const reach = cross[CROSS.reach];
  const ox = ray[0];
  const oy = ray[1];
  const oz = ray[2];
  const dx = ray[3];
  const dy = ray[4];
  const dz = ray[5];
  const ix = 1 / (dx !== 0 ? dx : 1e-30);
  const iy = 1 / (dy !== 0 ? dy : 1e-30);
  const iz = 1 / (dz !== 0 ? dz : 1e-30);
  const nearX = ix >= 0 ? 0 : 3;
  const nearY = iy >= 0 ? 1 : 4;
  const nearZ = iz >= 0 ? 2 : 5;
  const farX = 3 - nearX;
  const farY = 5 - nearY;
  const farZ = 7 - nearZ;
  // The ray's largest component becomes the axis along which the others are sheared to nothing.
  const ax = Math.abs(dx);
  const ay = Math.abs(dy);
  const az = Math.abs(dz);
  const kz = ax > ay ? (ax > az ? 0 : 2) : ay > az ? 1 : 2;
  let kx = kz === 2 ? 0 : kz + 1;
  let ky = kx === 2 ? 0 : kx + 1;
  const along = ray[3 + kz];
  if (along < 0) {
    const swap = kx;
    kx = ky;
    ky = swap;
  }
  const shearX = ray[3 + kx] / along;
  const shearY = ray[3 + ky] / along;
  const shearZ = 1 / along;
  const okx = ray[kx];
  const oky = ray[ky];
  const okz = ray[kz];

  let best = cross[CROSS.limit];
  let wrong = Infinity;
  let found = -1;
  let inset = 0;
  let depth = 0;
  let node = root;
  for (;;) {
    // ---- both children of a node
    const b = 12 * node;
    const x1 = (nodeBox[b + nearX] - ox) * ix;
    const y1 = (nodeBox[b + nearY] - oy) * iy;
    const z1 = (nodeBox[b + nearZ] - oz) * iz;
    const x2 = (nodeBox[b + farX] - ox) * ix;
    const y2 = (nodeBox[b + farY] - oy) * iy;
    const z2 = (nodeBox[b + farZ] - oz) * iz;
    const x3 = (nodeBox[b + 6 + nearX] - ox) * ix;
    const y3 = (nodeBox[b + 6 + nearY] - oy) * iy;
    const z3 = (nodeBox[b + 6 + nearZ] - oz) * iz;
    const x4 = (nodeBox[b + 6 + farX] - ox) * ix;
    const y4 = (nodeBox[b + 6 + farY] - oy) * iy;
    const z4 = (nodeBox[b + 6 + farZ] - oz) * iz;
    let in1 = x1 > y1 ? x1 : y1;
    if (z1 > in1) in1 = z1;
    let out1 = x2 < y2 ? x2 : y2;
    if (z2 < out1) out1 = z2;
    let in2 = x3 > y3 ? x3 : y3;
    if (z3 > in2) in2 = z3;
    let out2 = x4 < y4 ? x4 : y4;
    if (z4 < out2) out2 = z4;
    // A hair of slack: the boxes must hold whatever rounding does to these distances.
    const slack = 1e-9 * Math.abs(out1) + reach;
    const slack2 = 1e-9 * Math.abs(out2) + reach;
    const hit1 = in1 <= out1 + slack && out1 >= -reach && in1 <= best + slack;
    const hit2 = in2 <= out2 + slack2 && out2 >= -reach && in2 <= best + slack2;
    let near = -1;
    let leaf1 = 0;
    let leaf2 = 0;
    if (hit1) {
      const child = nodeChild[2 * node];
      if (child >= 0) near = child;
      else leaf1 = child;
    }
    if (hit2) {
      const child = nodeChild[2 * node + 1];
      if (child < 0) leaf2 = child;
      else if (near < 0) near = child;
      else if (in2 < in1) {
        walk[depth++] = near;
        near = child;
      } else walk[depth++] = child;
    }

    // ---- facets of the leaves
    for (let leaf = leaf1; ; leaf = leaf2) {
      if (leaf !== 0) {
        const first = ~leaf >> 3;
        const end = first + (~leaf & 7);
        for (let facet = first; facet < end; facet++) {
          const a = 3 * corners[3 * facet];
          const b = 3 * corners[3 * facet + 1];
          const c = 3 * corners[3 * facet + 2];
          const aAlong = points[a + kz] - okz;
          const bAlong = points[b + kz] - okz;
          const cAlong = points[c + kz] - okz;
          const aX = points[a + kx] - okx - shearX * aAlong;
          const aY = points[a + ky] - oky - shearY * aAlong;
          const bX = points[b + kx] - okx - shearX * bAlong;
          const bY = points[b + ky] - oky - shearY * bAlong;
          const cX = points[c + kx] - okx - shearX * cAlong;
          const cY = points[c + ky] - oky - shearY * cAlong;
          const u = cX * bY - cY * bX;
          const v = aX * cY - aY * cX;
          const w = bX * aY - bY * aX;
          if ((u < 0 || v < 0 || w < 0) && (u > 0 || v > 0 || w > 0)) continue;
          const sum = u + v + w;
          if (sum === 0 || facet === last) continue;
          const t = ((u * aAlong + v * bAlong + w * cAlong) * shearZ) / sum;
          if (!(t >= 0 && t < best)) continue;
          if (sum * sense > 0) {
            best = t;
            found = facet;
            const least = Math.abs(u) < Math.abs(v) ? Math.abs(u) : Math.abs(v);
            inset = (least < Math.abs(w) ? least : Math.abs(w)) / Math.abs(sum);
          } else if (t < wrong && !(t < 1e4 * reach && isGhost(points, corners, facet, ray, reach))) wrong = t;
        }
      }
      if (leaf === leaf2) break;
    }
    if (near >= 0) node = near;
    else if (depth > 0) node = walk[--depth];
    else break;
  }
  cross[CROSS.distance] = best;
  cross[CROSS.wrong] = wrong < best ? wrong : Infinity;
  cross[CROSS.inset] = inset;
  return found;
}

/** The ray starts on the plane of the facet, as far as rounding lets one tell. */
function isGhost(points: Float64Array, corners: Int32Array, facet: number, ray: Float64Array, reach: number): boolean {
  facetVector(points, corners, facet, vector);
  const a = 3 * corners[3 * facet];
  const rise =
    (points[a] - ray[0]) * vector[0] + (points[a + 1] - ray[1]) * vector[1] + (points[a + 2] - ray[2]) * vector[2];
  const area2 = vector[0] * vector[0] + vector[1] * vector[1] + vector[2] * vector[2];
  return rise * rise <= reach * reach * area2;
}

/**
 * The facet within `reach` of the ray's origin that the ray's direction crosses in the wanted sense; the nearest of several, −1 for none. This is
 * where light is that rounding has put on the wrong side of an edge.
 */
export function facetAt(tree: FacetTree, root: number, ray: Float64Array, sense: number, reach: number): number {
  const { facetPoint, facetCorner, nodeBox, nodeChild } = tree;
  let depth = 0;
  let found = -1;
  let least = reach * reach;
  walk[depth++] = root;
  while (depth > 0) {
    const node = walk[--depth];
    for (let side = 0; side < 2; side++) {
      const b = 12 * node + 6 * side;
      let away = false;
      for (let c = 0; c < 3; c++) {
        if (ray[c] < nodeBox[b + c] - reach || ray[c] > nodeBox[b + 3 + c] + reach) away = true;
      }
      if (away) continue;
      const child = nodeChild[2 * node + side];
      if (child >= 0) {
        walk[depth++] = child;
        continue;
      }
      const first = ~child >> 3;
      for (let facet = first; facet < first + (~child & 7); facet++) {
        facetVector(facetPoint, facetCorner, facet, vector);
        const turn = vector[0] * ray[3] + vector[1] * ray[4] + vector[2] * ray[5];
        // Light leaves along the outward normal.
        if (!(turn * sense < 0)) continue;
        const square = facetDistance2(facetPoint, facetCorner, facet, ray);
        if (square <= least) {
          least = square;
          found = facet;
        }
      }
    }
  }
  return found;
}
