/** Facets as read -> a closed mesh that knows its inside, or what keeps it from being one. */
import { facetVector } from './facet-geometry.js';
import { buildFacetTree, type FacetTree, permuteTriples } from './facet-tree.js';
import { findShells, type Shells, shellDepths, shellVolumes } from './mesh-shells.js';
import { type EdgePairs, nextHalfEdge, pairEdges } from './pair-edges.js';
import { findSelfCuts } from './self-cuts.js';
import { smoothPatches } from './smooth-patches.js';

type Point = readonly [number, number, number];

/** Facets with welded corners, in mm. */
export interface MeshFacets {
  /** [point · 3] */
  readonly points: Float64Array;
  /** [facet · 3], counter-clockwise as seen from outside. */
  readonly corners: Int32Array;
  /** [facet]: which group of the file. */
  readonly group: Int32Array;
  readonly groups: readonly string[];
}

export interface ClosedMesh {
  /** In the coordinates of the file, mm. */
  readonly tree: FacetTree;
  /** [facet], in the order of the tree. */
  readonly group: Int32Array;
  readonly groups: readonly string[];
  readonly low: Point;
  readonly high: Point;
  /** mm³ and mm². */
  readonly volume: number;
  readonly area: number;
  readonly shells: number;
}

export interface MeshProblem {
  readonly kind: 'empty' | 'open' | 'crowded' | 'twisted' | 'self-cutting' | 'inside-out';
  readonly count: number;
  /** The search ended at this count. */
  readonly more: boolean;
  /** Some of the places. */
  readonly places: readonly Point[];
}

export interface MeshNotes {
  /** Facets left out because two of their corners are one. */
  readonly dropped: number;
  /** Shells that were turned inside out on request. */
  readonly turned: number;
}

export interface CloseMeshOptions {
  readonly turnInsideOut: boolean;
  /** Groups by smooth patch: the angle, rad, at which a patch ends; null keeps the groups of the file. */
  readonly crease: number | null;
}

export type MeshClosing =
  | { readonly ok: true; readonly mesh: ClosedMesh; readonly notes: MeshNotes }
  | { readonly ok: false; readonly problems: readonly MeshProblem[] };

/** Rounding may put a point on a facet this share of the largest coordinate beside it. */
export const REACH = 1e-10;

const MOST_CUTS = 1000;
const SHOWN = 3;
/** Each patch costs a place in every region: the smaller ones beyond this number share one name. */
const MOST_PATCHES = 500;

export function closeMesh(given: MeshFacets, options: CloseMeshOptions): MeshClosing {
  const { facets, dropped } = dropDegenerate(given);
  const { points, corners } = facets;
  if (corners.length === 0) return { ok: false, problems: [{ kind: 'empty', count: 0, more: false, places: [] }] };
  const pairs = pairEdges(corners);
  const problems = edgeProblems(facets, pairs);
  const { tree, order } = buildFacetTree(points, corners);
  const cuts = findSelfCuts(tree, MOST_CUTS);
  if (cuts.pairs.length > 0) {
    const places = spread(cuts.pairs).map(([facet]) => middle(tree, facet));
    problems.push({ kind: 'self-cutting', count: cuts.pairs.length, more: cuts.more, places });
  }
  if (problems.length > 0) return { ok: false, problems };

  const found = findShells(pairs.opposite);
  const wrong = wrongShells(points, corners, found);
  if (wrong.length > 0 && !options.turnInsideOut) {
    const places = spread(wrong).map((shell) => {
      const facet = found.shell.indexOf(shell);
      const p = 3 * corners[3 * facet];
      return [points[p], points[p + 1], points[p + 2]] as const;
    });
    return { ok: false, problems: [{ kind: 'inside-out', count: wrong.length, more: false, places }] };
  }
  const { group, groups } =
    options.crease === null ? facets : patchGroups(points, corners, pairs.opposite, options.crease);
  const ordered = order.map((facet) => group[facet]);
  turnShells(
    tree.facetCorner,
    order.map((facet) => found.shell[facet]),
    wrong,
  );
  return {
    ok: true,
    mesh: { tree, group: ordered, groups, shells: found.count, ...extent(tree) },
    notes: { dropped, turned: wrong.length },
  };
}

function dropDegenerate(given: MeshFacets): { facets: MeshFacets; dropped: number } {
  const { corners, group } = given;
  const kept = new Int32Array(group.length);
  let count = 0;
  for (let facet = 0; facet < group.length; facet++) {
    const [a, b, c] = [corners[3 * facet], corners[3 * facet + 1], corners[3 * facet + 2]];
    if (a !== b && b !== c && c !== a) kept[count++] = facet;
  }
  const dropped = group.length - count;
  if (dropped === 0) return { facets: given, dropped };
  const order = kept.subarray(0, count);
  const facets = {
    ...given,
    corners: permuteTriples(corners, order).slice(0, 3 * count),
    group: order.map((facet) => group[facet]),
  };
  return { facets, dropped };
}

function edgeProblems({ points, corners }: MeshFacets, pairs: EdgePairs): MeshProblem[] {
  const middleOf = (e: number): Point => {
    const a = 3 * corners[e];
    const b = 3 * corners[nextHalfEdge(e)];
    return [(points[a] + points[b]) / 2, (points[a + 1] + points[b + 1]) / 2, (points[a + 2] + points[b + 2]) / 2];
  };
  const problem = (kind: MeshProblem['kind'], edges: readonly number[], count: number): MeshProblem[] =>
    count === 0 ? [] : [{ kind, count, more: false, places: spread(edges).map(middleOf) }];
  return [
    ...problem('open', pairs.open, pairs.openCount),
    ...problem('crowded', pairs.crowded, pairs.crowdedCount),
    ...problem('twisted', pairs.twisted, pairs.twistedCount),
  ];
}

/** A few of a list, from all over it. */
function spread<T>(list: readonly T[]): T[] {
  if (list.length <= SHOWN) return [...list];
  return Array.from({ length: SHOWN }, (_, i) => list[Math.floor((i * (list.length - 1)) / (SHOWN - 1))]);
}

function middle({ facetPoint, facetCorner }: FacetTree, facet: number): Point {
  const at = (c: number) => [0, 1, 2].reduce((sum, k) => sum + facetPoint[3 * facetCorner[3 * facet + k] + c], 0) / 3;
  return [at(0), at(1), at(2)];
}

/** Shells whose facets look the wrong way: out of what is solid, into what is hollow. */
function wrongShells(points: Float64Array, corners: Int32Array, found: Shells): number[] {
  const volumes = shellVolumes(points, corners, found);
  const numbers = Array.from(volumes, (_, i) => i);
  if (found.count === 1) return numbers.filter(() => volumes[0] <= 0);
  const size = new Int32Array(found.count);
  for (const shell of found.shell) size[shell]++;
  const own = Array.from(size, (facets) => new Int32Array(3 * facets));
  const filled = new Int32Array(found.count);
  for (let facet = 0; facet < found.shell.length; facet++) {
    const shell = found.shell[facet];
    for (let k = 0; k < 3; k++) own[shell][filled[shell]++] = corners[3 * facet + k];
  }
  const trees = own.map((list, i) => ({ tree: buildFacetTree(points, list).tree, outward: volumes[i] > 0 }));
  const depths = shellDepths(trees, REACH * largestCoordinate(points));
  return numbers.filter((shell) => volumes[shell] > 0 !== (depths[shell] % 2 === 0));
}

function turnShells(corners: Int32Array, shell: Int32Array, wrong: readonly number[]): void {
  if (wrong.length === 0) return;
  const turned = new Set(wrong);
  for (let facet = 0; facet < shell.length; facet++) {
    if (!turned.has(shell[facet])) continue;
    const b = corners[3 * facet + 1];
    corners[3 * facet + 1] = corners[3 * facet + 2];
    corners[3 * facet + 2] = b;
  }
}

function patchGroups(points: Float64Array, corners: Int32Array, opposite: Int32Array, crease: number) {
  const { count, patch } = smoothPatches(points, corners, opposite, crease);
  const named = count <= MOST_PATCHES ? count : MOST_PATCHES - 1;
  const groups = Array.from({ length: named }, (_, i) => `patch-${i + 1}`);
  if (named < count) groups.push('rest');
  return { group: patch.map((each) => Math.min(each, groups.length - 1)), groups };
}

export function largestCoordinate(points: Float64Array): number {
  let largest = 0;
  for (let i = 0; i < points.length; i++) if (Math.abs(points[i]) > largest) largest = Math.abs(points[i]);
  return largest;
}

function extent({ facetPoint, facetCorner }: FacetTree) {
  const low: [number, number, number] = [Infinity, Infinity, Infinity];
  const high: [number, number, number] = [-Infinity, -Infinity, -Infinity];
  for (let i = 0; i < facetCorner.length; i++) {
    for (let c = 0; c < 3; c++) {
      const value = facetPoint[3 * facetCorner[i] + c];
      if (value < low[c]) low[c] = value;
      if (value > high[c]) high[c] = value;
    }
  }
  const vector = new Float64Array(3);
  let volume = 0;
  let area = 0;
  for (let facet = 0; facet < facetCorner.length / 3; facet++) {
    facetVector(facetPoint, facetCorner, facet, vector);
    area += Math.sqrt(vector[0] ** 2 + vector[1] ** 2 + vector[2] ** 2);
    const p = 3 * facetCorner[3 * facet];
    for (let c = 0; c < 3; c++) volume += ((facetPoint[p + c] - low[c]) * vector[c]) / 3;
  }
  return { low, high, volume, area };
}
