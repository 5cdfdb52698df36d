/** Where a mesh goes through itself: pairs of facets that cross, or lie on each other. */
import { type FacetTree, facetBox, WALK_DEPTH } from './facet-tree.js';

export interface SelfCuts {
  /** Pairs of facets, at most as many as asked for. */
  readonly pairs: readonly (readonly [number, number])[];
  /** The search ended there. */
  readonly more: boolean;
}

/** Rounding of a 3 × 3 determinant of differences (Shewchuk, Discrete Comput. Geom. 18 305, 1997: first bound of orient3d). */
const ERROR = 7.8e-16;

const A = new Float64Array(9);
const B = new Float64Array(9);

export function findSelfCuts(tree: FacetTree, most: number): SelfCuts {
  const { facetPoint, facetCorner, nodeBox, nodeChild } = tree;
  const facets = facetCorner.length / 3;
  const walk = new Int32Array(WALK_DEPTH);
  const own = new Float32Array(6);
  const pairs: [number, number][] = [];
  for (let facet = 0; facet < facets; facet++) {
    facetBox(facetPoint, facetCorner, facet, own, 0);
    let depth = 0;
    walk[depth++] = 0;
    while (depth > 0) {
      const node = walk[--depth];
      for (let side = 0; side < 2; side++) {
        const b = 12 * node + 6 * side;
        if (
          own[0] > nodeBox[b + 3] ||
          own[1] > nodeBox[b + 4] ||
          own[2] > nodeBox[b + 5] ||
          own[3] < nodeBox[b] ||
          own[4] < nodeBox[b + 1] ||
          own[5] < nodeBox[b + 2]
        )
          continue;
        const child = nodeChild[2 * node + side];
        if (child >= 0) {
          walk[depth++] = child;
          continue;
        }
        const end = (~child >> 3) + (~child & 7);
        for (let other = Math.max(~child >> 3, facet + 1); other < end; other++) {
          if (!facetsCut(facetPoint, facetCorner, facet, other)) continue;
          if (pairs.length === most) return { pairs, more: true };
          pairs.push([facet, other]);
        }
      }
    }
  }
  return { pairs, more: false };
}

/** Whether two facets have more in common than the edge or corner they share. A mere touch is no cut. */
function facetsCut(points: Float64Array, corners: Int32Array, a: number, b: number): boolean {
  let shared = 0;
  let sharedA = -1;
  let sharedB = -1;
  for (let i = 0; i < 3; i++) {
    for (let j = 0; j < 3; j++) {
      if (corners[3 * a + i] !== corners[3 * b + j]) continue;
      shared++;
      sharedA = i;
      sharedB = j;
    }
  }
  if (shared === 3) return true;
  load(points, corners, a, A);
  load(points, corners, b, B);
  const a0 = orient(B, 0, 3, 6, A, 0);
  const a1 = orient(B, 0, 3, 6, A, 3);
  const a2 = orient(B, 0, 3, 6, A, 6);
  if ((a0 > 0 && a1 > 0 && a2 > 0) || (a0 < 0 && a1 < 0 && a2 < 0)) return false;
  if (a0 === 0 && a1 === 0 && a2 === 0) return overlapInPlane();
  if (shared === 2) return false;
  const b0 = orient(A, 0, 3, 6, B, 0);
  const b1 = orient(A, 0, 3, 6, B, 3);
  const b2 = orient(A, 0, 3, 6, B, 6);
  // With a corner in common only the edges opposite to it can cut.
  const edge = (k: number, own: number) => shared === 0 || k === (own + 1) % 3;
  return (
    (edge(0, sharedA) && a0 * a1 < 0 && pierces(A, 0, 3, B)) ||
    (edge(1, sharedA) && a1 * a2 < 0 && pierces(A, 3, 6, B)) ||
    (edge(2, sharedA) && a2 * a0 < 0 && pierces(A, 6, 0, B)) ||
    (edge(0, sharedB) && b0 * b1 < 0 && pierces(B, 0, 3, A)) ||
    (edge(1, sharedB) && b1 * b2 < 0 && pierces(B, 3, 6, A)) ||
    (edge(2, sharedB) && b2 * b0 < 0 && pierces(B, 6, 0, A))
  );
}

function load(points: Float64Array, corners: Int32Array, facet: number, out: Float64Array): void {
  for (let k = 0; k < 3; k++) {
    const p = 3 * corners[3 * facet + k];
    out[3 * k] = points[p];
    out[3 * k + 1] = points[p + 1];
    out[3 * k + 2] = points[p + 2];
  }
}

/** −1, 0, 1: on which side of the plane of three points of `f` the point of `g` lies; 0 when rounding forbids to say. */
function orient(f: Float64Array, p: number, q: number, r: number, g: Float64Array, s: number): number {
  return determinant(
    f[p] - g[s],
    f[p + 1] - g[s + 1],
    f[p + 2] - g[s + 2],
    f[q] - g[s],
    f[q + 1] - g[s + 1],
    f[q + 2] - g[s + 2],
    f[r] - g[s],
    f[r + 1] - g[s + 1],
    f[r + 2] - g[s + 2],
  );
}

/** Whether the edge p → q of `f`, whose ends lie on either side of `g`, goes through it; through a corner of it counts as a touch. */
function pierces(f: Float64Array, p: number, q: number, g: Float64Array): boolean {
  const side = (r: number, s: number) =>
    determinant(
      f[q] - f[p],
      f[q + 1] - f[p + 1],
      f[q + 2] - f[p + 2],
      g[r] - f[p],
      g[r + 1] - f[p + 1],
      g[r + 2] - f[p + 2],
      g[s] - f[p],
      g[s + 1] - f[p + 1],
      g[s + 2] - f[p + 2],
    );
  const u = side(0, 3);
  const v = side(3, 6);
  const w = side(6, 0);
  const sum = u + v + w;
  return Math.abs(sum) >= 2 && Math.abs(u) + Math.abs(v) + Math.abs(w) === Math.abs(sum);
}

function determinant(
  ax: number,
  ay: number,
  az: number,
  bx: number,
  by: number,
  bz: number,
  cx: number,
  cy: number,
  cz: number,
): number {
  const yz = by * cz;
  const zy = bz * cy;
  const zx = bz * cx;
  const xz = bx * cz;
  const xy = bx * cy;
  const yx = by * cx;
  const value = ax * (yz - zy) + ay * (zx - xz) + az * (xy - yx);
  const bound =
    ERROR *
    (Math.abs(ax) * (Math.abs(yz) + Math.abs(zy)) +
      Math.abs(ay) * (Math.abs(zx) + Math.abs(xz)) +
      Math.abs(az) * (Math.abs(xy) + Math.abs(yx)));
  return value > bound ? 1 : value < -bound ? -1 : 0;
}

/** Of the facets in A and B, which lie in one plane: whether no line along one of their edges parts them. */
function overlapInPlane(): boolean {
  const nx = (A[4] - A[1]) * (A[8] - A[2]) - (A[5] - A[2]) * (A[7] - A[1]);
  const ny = (A[5] - A[2]) * (A[6] - A[0]) - (A[3] - A[0]) * (A[8] - A[2]);
  const nz = (A[3] - A[0]) * (A[7] - A[1]) - (A[4] - A[1]) * (A[6] - A[0]);
  const largest = Math.max(Math.abs(nx), Math.abs(ny), Math.abs(nz));
  // A facet without area covers nothing.
  if (largest === 0) return false;
  const u = largest === Math.abs(nx) ? 1 : 0;
  const v = largest === Math.abs(nz) ? 1 : 2;
  return !parted(A, B, u, v) && !parted(B, A, u, v);
}

function parted(f: Float64Array, g: Float64Array, u: number, v: number): boolean {
  for (let k = 0; k < 9; k += 3) {
    const [p, q, r] = [k, (k + 3) % 9, (k + 6) % 9];
    const own = side2(f, p, q, f, r, u, v);
    if (own === 0) return true;
    const others = [0, 3, 6].map((s) => own * side2(f, p, q, g, s, u, v));
    if (others.every((side) => side <= 0)) return true;
  }
  return false;
}

function side2(f: Float64Array, p: number, q: number, g: Float64Array, s: number, u: number, v: number): number {
  const left = (f[q + u] - f[p + u]) * (g[s + v] - f[p + v]);
  const right = (f[q + v] - f[p + v]) * (g[s + u] - f[p + u]);
  const value = left - right;
  const bound = 4 * ERROR * (Math.abs(left) + Math.abs(right));
  return value > bound ? 1 : value < -bound ? -1 : 0;
}
