/** Shells: the closed surfaces a mesh consists of. One may lie within another, as the wall of a cavity. */
import { CROSS, crossFacets, SENSE } from './cross-facets.js';
import { facetVector, facetVolume } from './facet-geometry.js';
import type { FacetTree } from './facet-tree.js';

export interface Shells {
  readonly count: number;
  /** [facet] */
  readonly shell: Int32Array;
}

/** Facets joined by edges. */
export function findShells(opposite: Int32Array): Shells {
  const facets = opposite.length / 3;
  const shell = new Int32Array(facets).fill(-1);
  const waiting = new Int32Array(facets);
  let count = 0;
  for (let start = 0; start < facets; start++) {
    if (shell[start] >= 0) continue;
    let length = 0;
    waiting[length++] = start;
    shell[start] = count;
    while (length > 0) {
      const facet = waiting[--length];
      for (let k = 0; k < 3; k++) {
        const other = opposite[3 * facet + k];
        if (other < 0) continue;
        const beyond = Math.floor(other / 3);
        if (shell[beyond] >= 0) continue;
        shell[beyond] = count;
        waiting[length++] = beyond;
      }
    }
    count++;
  }
  return { count, shell };
}

/** Volume, mm³, within each shell: positive when its facets look out of it. */
export function shellVolumes(points: Float64Array, corners: Int32Array, { count, shell }: Shells): Float64Array {
  const volume = new Float64Array(count);
  const from = points.subarray(0, 3);
  for (let facet = 0; facet < shell.length; facet++) volume[shell[facet]] += facetVolume(points, corners, facet, from);
  return volume;
}

/** Each shell as a closed mesh of its own tree, for asking what lies within it. */
export interface ShellTree {
  readonly tree: FacetTree;
  /** Looks out of itself. */
  readonly outward: boolean;
}

/**
 * How many other shells each shell lies within. Shells must not cut each other.
 * @param reach mm within which a point lies on a facet
 */
export function shellDepths(shells: readonly ShellTree[], reach: number): Int32Array {
  const depth = new Int32Array(shells.length);
  const ray = new Float64Array(6);
  const cross = new Float64Array(CROSS.COUNT);
  const vector = new Float64Array(3);
  shells.forEach(({ tree }, own) => {
    // From the middle of a facet along its normal: no direction is better than another.
    const { facetPoint, facetCorner } = tree;
    let facet = 0;
    let length = 0;
    for (let i = 0; i < facetCorner.length / 3 && length === 0; i++) {
      facetVector(facetPoint, facetCorner, i, vector);
      length = Math.sqrt(vector[0] ** 2 + vector[1] ** 2 + vector[2] ** 2);
      facet = i;
    }
    for (let c = 0; c < 3; c++) {
      ray[3 + c] = vector[c] / length;
      ray[c] = 0;
      for (let k = 0; k < 3; k++) ray[c] += facetPoint[3 * facetCorner[3 * facet + k] + c] / 3;
    }
    shells.forEach(({ tree: other, outward }, i) => {
      if (i === own) return;
      const nearest = (sense: number) => {
        cross[CROSS.limit] = Infinity;
        cross[CROSS.reach] = reach;
        return crossFacets(other, 0, ray, sense, -1, cross) < 0 ? Infinity : cross[CROSS.distance];
      };
      const leaving = nearest(outward ? SENSE.leaving : SENSE.entering);
      const entering = nearest(outward ? SENSE.entering : SENSE.leaving);
      if (leaving < entering) depth[own]++;
    });
  });
  return depth;
}
