/** Patches of a closed mesh that bend by less than an angle from each facet to the next. */
import { facetVector } from './facet-geometry.js';

export interface SmoothPatches {
  readonly count: number;
  /** [facet], numbered from the largest area to the smallest. */
  readonly patch: Int32Array;
  /** [patch], mm². */
  readonly area: Float64Array;
}

/** @param crease angle between the normals of neighbours from which on they belong to different patches, rad */
export function smoothPatches(
  points: Float64Array,
  corners: Int32Array,
  opposite: Int32Array,
  crease: number,
): SmoothPatches {
  const facets = corners.length / 3;
  const normal = new Float64Array(3 * facets);
  const area = new Float64Array(facets);
  const vector = new Float64Array(3);
  for (let facet = 0; facet < facets; facet++) {
    facetVector(points, corners, facet, vector);
    area[facet] = Math.sqrt(vector[0] ** 2 + vector[1] ** 2 + vector[2] ** 2);
    for (let c = 0; c < 3; c++) normal[3 * facet + c] = area[facet] > 0 ? vector[c] / area[facet] : 0;
  }
  const least = Math.cos(crease);
  const raw = new Int32Array(facets).fill(-1);
  const waiting = new Int32Array(facets);
  const areas: number[] = [];
  for (let start = 0; start < facets; start++) {
    if (raw[start] >= 0 || area[start] === 0) continue;
    const patch = areas.length;
    areas.push(0);
    let length = 0;
    waiting[length++] = start;
    raw[start] = patch;
    while (length > 0) {
      const facet = waiting[--length];
      areas[patch] += area[facet];
      // A facet without area has no normal: it goes with a neighbour but leads no further.
      if (area[facet] === 0) continue;
      for (let k = 0; k < 3; k++) {
        const beyond = Math.floor(opposite[3 * facet + k] / 3);
        if (beyond < 0 || raw[beyond] >= 0) continue;
        const [i, j] = [3 * facet, 3 * beyond];
        const cosine = normal[i] * normal[j] + normal[i + 1] * normal[j + 1] + normal[i + 2] * normal[j + 2];
        if (cosine < least && area[beyond] > 0) continue;
        raw[beyond] = patch;
        waiting[length++] = beyond;
      }
    }
  }
  const order = areas.map((_, i) => i).sort((a, b) => areas[b] - areas[a] || a - b);
  const rank = new Int32Array(areas.length);
  order.forEach((patch, i) => {
    rank[patch] = i;
  });
  return {
    count: areas.length,
    patch: raw.map((patch) => (patch < 0 ? 0 : rank[patch])),
    area: Float64Array.from(order, (patch) => areas[patch]),
  };
}
