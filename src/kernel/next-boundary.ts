/** Distance to the surfaces that bound a region, where not all are axis planes, and their normals. */

import { QUADRIC_STRIDE } from '../scene/quadric.js';
import type { RegionGraph } from '../scene/region-graph.js';
import type { Scene } from '../scene/scene-layout.js';
import { facetNormal, findFacet } from './meet-mesh.js';
import { NOW, RAY } from './photon.js';

/** Next boundary of the photon's region among surfaces of every kind. */
export function findBoundary(scene: Scene, graph: RegionGraph, ray: Float64Array, now: Int32Array): void {
  const region = now[NOW.region];
  const x = ray[0];
  const y = ray[1];
  const z = ray[2];
  const dx = ray[3];
  const dy = ray[4];
  const dz = ray[5];
  let nearest = Number.POSITIVE_INFINITY;
  let way = -1;
  const families = scene.families;
  const normal = scene.familyNormal;
  const bound = graph.bound;
  // A ray that lies in a plane has no distance to it (0 · ∞ is no number) and never wins.
  const b = 2 * region * families;
  const wayX = dx >= 0 ? 1 : 0;
  const wayY = dy >= 0 ? 3 : 2;
  const wayZ = dz >= 0 ? 5 : 4;
  const toX = (bound[b + wayX] - x) * ray[RAY.perDx];
  const toY = (bound[b + wayY] - y) * ray[RAY.perDy];
  const toZ = (bound[b + wayZ] - z) * ray[RAY.perDz];
  if (toX < nearest) {
    nearest = toX;
    way = wayX;
  }
  if (toY < nearest) {
    nearest = toY;
    way = wayY;
  }
  if (toZ < nearest) {
    nearest = toZ;
    way = wayZ;
  }
  for (let f = 3; f < families; f++) {
    const nx = normal[3 * f];
    const ny = normal[3 * f + 1];
    const nz = normal[3 * f + 2];
    const speed = nx * dx + ny * dy + nz * dz;
    if (speed === 0) continue;
    const up = speed > 0 ? 1 : 0;
    const t = (bound[2 * (region * families + f) + up] - (nx * x + ny * y + nz * z)) / speed;
    if (t < nearest) {
      nearest = t;
      way = 2 * f + up;
    }
  }
  const near = graph.near;
  const first = region * scene.quadrics;
  const last = first + graph.nearCount[region];
  const sides = graph.sides;
  const q = scene.quadric;
  for (let i = first; i < last; i++) {
    const k = near[i];
    const at = k * QUADRIC_STRIDE;
    const side = graph.side[region * sides + k];
    // side·q(p + t d) = a t² + 2 b t + c, not negative at t = 0; wanted is the first t at which it turns negative.
    const gx = q[at] * x + q[at + 3] * y + q[at + 4] * z + q[at + 6];
    const gy = q[at + 3] * x + q[at + 1] * y + q[at + 5] * z + q[at + 7];
    const gz = q[at + 4] * x + q[at + 5] * y + q[at + 2] * z + q[at + 8];
    const a =
      side *
      (q[at] * dx * dx +
        q[at + 1] * dy * dy +
        q[at + 2] * dz * dz +
        2 * (q[at + 3] * dx * dy + q[at + 4] * dx * dz + q[at + 5] * dy * dz));
    const b = side * (gx * dx + gy * dy + gz * dz);
    if (b >= 0 && a >= 0) continue;
    const value = side * (gx * x + gy * y + gz * z + q[at + 6] * x + q[at + 7] * y + q[at + 8] * z + q[at + 9]);
    // Rounding may put a point on the surface a hair beyond it; its region knows better.
    const c = value > 0 ? value : 0;
    const discriminant = b * b - a * c;
    if (discriminant < 0) continue;
    const root = Math.sqrt(discriminant);
    const t = b < 0 ? c / (root - b) : (b + root) / -a;
    if (t < nearest) {
      nearest = t;
      way = 2 * families + k;
    }
  }
  ray[RAY.ahead] = nearest > 0 ? nearest : 0;
  now[NOW.way] = way;
  if (scene.meshes > 0) findFacet(scene, graph, ray, now);
}

/** Unit normal of the surface at a point, turned along the direction of travel, into `out` [0..2]. */
export function travelNormal(scene: Scene, way: number, ray: Float64Array, out: Float64Array): void {
  let nx: number;
  let ny: number;
  let nz: number;
  if (way >= 2 * scene.families + scene.quadrics) {
    facetNormal(scene, ray, out);
    nx = out[0];
    ny = out[1];
    nz = out[2];
  } else if (way < 2 * scene.families) {
    const f = 3 * (way >> 1);
    nx = scene.familyNormal[f];
    ny = scene.familyNormal[f + 1];
    nz = scene.familyNormal[f + 2];
  } else {
    const q = scene.quadric;
    const at = (way - 2 * scene.families) * QUADRIC_STRIDE;
    const x = ray[0];
    const y = ray[1];
    const z = ray[2];
    nx = q[at] * x + q[at + 3] * y + q[at + 4] * z + q[at + 6];
    ny = q[at + 3] * x + q[at + 1] * y + q[at + 5] * z + q[at + 7];
    nz = q[at + 4] * x + q[at + 5] * y + q[at + 2] * z + q[at + 8];
    const norm = 1 / Math.sqrt(nx * nx + ny * ny + nz * nz);
    nx *= norm;
    ny *= norm;
    nz *= norm;
  }
  const sign = nx * ray[3] + ny * ray[4] + nz * ray[5] < 0 ? -1 : 1;
  out[0] = sign * nx;
  out[1] = sign * ny;
  out[2] = sign * nz;
}
