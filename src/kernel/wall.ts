/**
 * What the six walls of a region between axis planes do to the light of the flight in hand. Specular light keeps the sizes of its
 * direction's components there, and has the same ones whenever it comes back to the region: each wall is worked out once.
 */
import { INTERFACE, type RegionGraph } from '../scene/region-graph.js';
import type { Scene } from '../scene/scene-layout.js';
import { NOW, RAY } from './photon.js';
import { SHARES } from './shares.js';
import { splitLight } from './split-light.js';

/** Doubles per wall in `graph.walls`, which is indexed [(region · 6 + way) · WALL.STRIDE]. */
export const enum WALL {
  /** Reflectance, or one of REFLECTED. */
  reflected = 0,
  /** Reflectance and transmittance together. */
  reach = 1,
  /** Index here over index beyond, 0 where crossing is left to the long way. */
  bend = 2,
  /** Cosine beyond the wall. */
  cosine = 3,
  STRIDE = 4,
}
export const enum REFLECTED {
  unknown = -1,
  /** All of it is left to the long way. */
  slow = 0,
}

/** Fills in the wall ahead of the photon in `ray` and `now`, where `createFlight` leaves it to others: metals and tabulated finishes. */
export function workOutWall(
  scene: Scene,
  graph: RegionGraph,
  ray: Float64Array,
  now: Int32Array,
  shares: Float64Array,
): void {
  const way = now[NOW.way];
  const record = graph.crossing[now[NOW.region] * 6 + way];
  const { interfaces, walls } = graph;
  const at = (now[NOW.region] * 6 + way) * WALL.STRIDE;
  const incident = Math.abs(ray[RAY.dx + (way >> 1)]);
  shares[SHARES.index] = ray[RAY.index];
  shares[SHARES.cosine] = incident;
  splitLight(scene, interfaces, record, now[NOW.wavelength], shares);
  walls[at + WALL.reflected] = shares[SHARES.reflected];
  walls[at + WALL.reach] = shares[SHARES.reflected] + shares[SHARES.transmitted];
  walls[at + WALL.bend] = 0;
  const faceOut = interfaces[record + INTERFACE.faceOut];
  const bend = shares[SHARES.index] / shares[SHARES.indexBeyond];
  const sine2 = bend * bend * (1 - incident * incident);
  if (shares[SHARES.transmitted] <= 0 || sine2 >= 1 || (faceOut >= 0 && scene.faceRecorderOut[faceOut] >= 0)) return;
  walls[at + WALL.bend] = bend;
  walls[at + WALL.cosine] = Math.sqrt(1 - sine2);
}
