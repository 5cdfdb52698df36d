/** Facets of a mesh's face, for drawings. Large meshes are drawn coarser, their corners joined on a grid. */
import type { Vector3 } from '../design/description.js';
import { type FacetPatch, facetTriangles } from '../scene/mesh/facet-patch.js';
import { dot } from '../scene/vector.js';
import { type Facet, facetNormal, type SideMark } from './facet.js';

const MOST_FACETS = 20_000;
/** Neighbours that turn by more than 30° make a crease. */
const CREASE = Math.cos(Math.PI / 6);

interface Triangle {
  readonly corners: readonly [Vector3, Vector3, Vector3];
  readonly keys: readonly [string, string, string];
}

export function meshFacets(patch: FacetPatch): Facet[] {
  let triangles = trianglesOf(patch, 0);
  for (let cells = 96; triangles.length > MOST_FACETS; cells = Math.floor(cells * 0.7)) {
    triangles = trianglesOf(patch, cells);
  }
  const flat = triangles.map(({ corners }): Facet => {
    const bare = { corners, normals: [], sides: [] };
    const normal = facetNormal(bare);
    return { corners, normals: [normal, normal, normal], sides: ['mesh', 'mesh', 'mesh'] };
  });
  const across = new Map<string, number>();
  triangles.forEach(({ keys }, i) => {
    for (let k = 0; k < 3; k++) across.set(`${keys[k]}>${keys[(k + 1) % 3]}`, i);
  });
  return flat.map((facet, i): Facet => {
    const sides = [0, 1, 2].map((k): SideMark => {
      const { keys } = triangles[i];
      const other = across.get(`${keys[(k + 1) % 3]}>${keys[k]}`);
      return other === undefined || dot(flat[other].normals[0], facet.normals[0]) < CREASE ? 'rim' : 'mesh';
    });
    return { ...facet, sides };
  });
}

/** @param cells along the longest side of the box round the face on which corners are joined; 0: as they are */
function trianglesOf(patch: FacetPatch, cells: number): Triangle[] {
  const all = facetTriangles(patch);
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const x of all) {
    if (x < low) low = x;
    if (x > high) high = x;
  }
  const step = cells > 0 ? (high - low) / cells : 0;
  const found: Triangle[] = [];
  for (let i = 0; i < all.length; i += 9) {
    const corners = [0, 3, 6].map((k): Vector3 => {
      const at = [all[i + k], all[i + k + 1], all[i + k + 2]] as const;
      return step > 0
        ? [Math.round(at[0] / step) * step, Math.round(at[1] / step) * step, Math.round(at[2] / step) * step]
        : at;
    });
    const keys = corners.map((corner) => corner.map((x) => x.toFixed(9)).join());
    if (keys[0] === keys[1] || keys[1] === keys[2] || keys[2] === keys[0]) continue;
    found.push({ corners: [corners[0], corners[1], corners[2]], keys: [keys[0], keys[1], keys[2]] });
  }
  return found;
}
