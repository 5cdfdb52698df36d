/** Where light next crosses the surface of a mesh. */
import { CROSS, crossFacets, facetAt, SENSE } from '../numerics/mesh/cross-facets.js';
import { facetVector } from '../numerics/mesh/facet-geometry.js';
import type { RegionGraph } from '../scene/region-graph.js';
import type { Scene } from '../scene/scene-layout.js';
import { NOW, RAY } from './photon.js';

const cross = new Float64Array(CROSS.COUNT);

/**
 * Puts the facet ahead in place of the boundary found among other surfaces, where it is nearer. Light inside a mesh leaves it next, light
 * outside can only enter it: crossings of the other kind are told from the facet light stands on by that. Where they still lie ahead, rounding
 * has put light beyond the edge of a facet that it should have crossed: it crosses that facet where it is.
 */
export function findFacet(scene: Scene, graph: RegionGraph, ray: Float64Array, now: Int32Array): void {
  const sides = now[NOW.region] * graph.sides + graph.quadrics;
  let ahead = ray[RAY.ahead];
  let facet = -1;
  // Light that is absorbed before needs no boundary.
  const mu = scene.attenuation[now[NOW.medium] * scene.wavelengths + now[NOW.wavelength]];
  const depth = ray[RAY.depth] * (1 + 1e-9);
  if (mu * ahead > depth) ahead = depth / mu;
  const open = ahead === Number.POSITIVE_INFINITY;
  const standing = ray[RAY.x] === ray[RAY.facetX] && ray[RAY.y] === ray[RAY.facetY] && ray[RAY.z] === ray[RAY.facetZ];
  const last = standing ? ray[RAY.facet] - 1 : -1;
  for (let mesh = 0; mesh < scene.meshes; mesh++) {
    const inside = graph.side[sides + mesh] < 0;
    const sense = inside ? SENSE.leaving : SENSE.entering;
    const root = scene.meshRoot[mesh];
    cross[CROSS.limit] = ahead;
    cross[CROSS.reach] = scene.meshReach[mesh];
    let found = crossFacets(scene, root, ray, sense, last, cross);
    let distance = cross[CROSS.distance];
    if (cross[CROSS.wrong] < distance || (found < 0 && inside && open && facet < 0)) {
      const strayed = strayedFrom(scene, mesh, ray, sense, last, found < 0 && inside && open);
      if (strayed >= 0) {
        found = strayed;
        distance = 0;
      }
    }
    if (found >= 0) {
      facet = found;
      ahead = distance;
    }
  }
  ray[RAY.facet] = facet + 1;
  if (facet < 0) return;
  ray[RAY.ahead] = ahead;
  now[NOW.way] = 2 * scene.families + scene.quadrics + scene.facetGroup[facet];
  // As the flight will compute it.
  ray[RAY.facetX] = ray[RAY.x] + ahead * ray[RAY.dx];
  ray[RAY.facetY] = ray[RAY.y] + ahead * ray[RAY.dy];
  ray[RAY.facetZ] = ray[RAY.z] + ahead * ray[RAY.dz];
}

/** Facet that light should have crossed where it is; −1 where none is near. Light that has no way out at all is given one (`must`). */
function strayedFrom(
  scene: Scene,
  mesh: number,
  ray: Float64Array,
  sense: number,
  last: number,
  must: boolean,
): number {
  const root = scene.meshRoot[mesh];
  const reach = scene.meshReach[mesh];
  let facet = facetAt(scene, root, ray, sense, reach);
  if (facet < 0) facet = facetAt(scene, root, ray, sense, 1000 * reach);
  if (facet >= 0 || !must) return facet;
  const first = scene.meshFacet[mesh];
  return last >= first && last < scene.meshFacet[mesh + 1] ? last : first;
}

/** Unit outward normal of the facet light is at, into `out` [0..2]. Smooth normals of the corners would bend light where no surface does. */
export function facetNormal(scene: Scene, ray: Float64Array, out: Float64Array): void {
  facetVector(scene.facetPoint, scene.facetCorner, ray[RAY.facet] - 1, out);
  const square = out[0] * out[0] + out[1] * out[1] + out[2] * out[2];
  if (square > 0) {
    const norm = 1 / Math.sqrt(square);
    out[0] *= norm;
    out[1] *= norm;
    out[2] *= norm;
    return;
  }
  // A facet without area has no normal of its own.
  out[0] = ray[RAY.dx];
  out[1] = ray[RAY.dy];
  out[2] = ray[RAY.dz];
}
