/** Where a pump photon starts, where it goes and what colour it has. */
import { exponentialOf } from '../numerics/random-stream.js';
import { drawIndex } from '../numerics/sample-table.js';
import { sobolUnit } from '../numerics/sobol.js';
import type { RegionGraph } from '../scene/region-graph.js';
import { BEAM, OUTLINE, PUMP, type Scene, SURROUNDINGS } from '../scene/scene-layout.js';
import { NOW, RAY } from './photon.js';
import { startPolarised } from './polarised-light.js';

/** Sobol dimensions of a launch; the last one draws the first free path. */
export const enum LAUNCH {
  positionU = 0,
  positionV = 1,
  directionU = 2,
  directionV = 3,
  wavelength = 4,
  pump = 5,
  freePath = 6,
}

/** Beyond this the tangent of an angle is no direction any more; a Gaussian far field is cut here, rad. */
const WIDEST = 1.55;

/** Starts a photon in `ray` and `now`. */
export function launchPump(
  scene: Scene,
  graph: RegionGraph,
  points: Int32Array,
  startRegion: Int32Array,
  ray: Float64Array,
  now: Int32Array,
): void {
  const unit = sobolUnit(points, LAUNCH.pump);
  let pump = 0;
  while (pump < scene.pumpCount - 1 && unit >= scene.pumpCumulative[pump]) pump++;
  placeInBeam(scene, pump, points, ray);
  if (scene.polarised !== 0) startPolarised(scene, pump, ray);
  ray[RAY.depth] = exponentialOf(points[LAUNCH.freePath]);
  const cells = scene.wavelengths;
  const table = scene.pumpSpectrum[pump] * cells;
  const colour = sobolUnit(points, LAUNCH.wavelength);
  const own = scene.rayStart[pump] < 0 ? -1 : scene.rayWavelength[rayOf(scene, pump, points)];
  now[NOW.wavelength] = own >= 0 ? own : drawIndex(scene.spectrumKeep, scene.spectrumOther, table, cells, colour);
  let region = startRegion[pump];
  if (region < 0 || !graph.holds(region, ray)) {
    region = graph.locate(ray[0], ray[1], ray[2], ray[3], ray[4], ray[5]);
    startRegion[pump] = region;
  }
  now[NOW.region] = region;
  now[NOW.medium] = graph.medium[region];
  now[NOW.owner] = graph.owner[region];
  now[NOW.entered] = graph.owner[region] !== SURROUNDINGS ? 1 : 0;
  now[NOW.light] = 0;
  now[NOW.lastFace] = -1;
  now[NOW.closed] = 0;
  now[NOW.absorptions] = 0;
  ray[RAY.path] = 0;
}

/** Writes position and direction of a new photon into `ray`. */
function placeInBeam(scene: Scene, pump: number, points: Int32Array, ray: Float64Array): void {
  const p = scene.pumps;
  const at = pump * PUMP.STRIDE;
  const unitA = sobolUnit(points, LAUNCH.positionU);
  const unitB = sobolUnit(points, LAUNCH.positionV);
  const unitC = sobolUnit(points, LAUNCH.directionU);
  const unitD = sobolUnit(points, LAUNCH.directionV);
  const beam = scene.pumpBeam[pump];

  // Position in the plane of the beam.
  let a = 0;
  let b = 0;
  /** Behind the plane of the beam. */
  let back = 0;
  let errorU = 0;
  let errorV = 0;
  if (beam === BEAM.diodes) {
    const across = p[at + PUMP.across];
    const along = p[at + PUMP.along];
    const rows = p[at + PUMP.rows];
    const i = Math.min(across - 1, Math.floor(unitA * across));
    const j = Math.min(along * rows - 1, Math.floor(unitB * along * rows));
    const row = Math.floor(j / along);
    a = (i - (across - 1) / 2) * p[at + PUMP.pitchU];
    b = (j - row * along - (along - 1) / 2) * p[at + PUMP.pitchV] + (row - (rows - 1) / 2) * p[at + PUMP.rowPitch];
    back = row * p[at + PUMP.rowStep];
    if (scene.pointingStart[pump] >= 0) {
      const emitter = scene.pointingStart[pump] + 2 * (i + across * j);
      errorU = scene.pointing[emitter];
      errorV = scene.pointing[emitter + 1];
    }
  } else if (beam === BEAM.rays) {
    const ray6 = 6 * rayOf(scene, pump, points);
    a = scene.rays[ray6];
    b = scene.rays[ray6 + 1];
    back = -scene.rays[ray6 + 2];
  } else if (beam === BEAM.gaussian) {
    const r = p[at + PUMP.sizeU] * Math.sqrt(-2 * Math.log(unitA));
    a = r * Math.cos(2 * Math.PI * unitB);
    b = r * Math.sin(2 * Math.PI * unitB);
  } else if (scene.pumpOutline[pump] === OUTLINE.disc) {
    const r = p[at + PUMP.sizeU] * Math.sqrt(unitA);
    a = r * Math.cos(2 * Math.PI * unitB);
    b = r * Math.sin(2 * Math.PI * unitB);
  } else {
    a = (unitA - 0.5) * p[at + PUMP.sizeU];
    b = (unitB - 0.5) * p[at + PUMP.sizeV];
  }

  // Direction as components along u, v, w.
  let du = 0;
  let dv = 0;
  let dw = 1;
  let forward = 0;
  if (beam === BEAM.rays) {
    const ray6 = 6 * rayOf(scene, pump, points);
    du = scene.rays[ray6 + 3];
    dv = scene.rays[ray6 + 4];
    dw = scene.rays[ray6 + 5];
  } else if (beam === BEAM.lambertian) {
    const r = Math.sqrt(unitC);
    du = r * Math.cos(2 * Math.PI * unitD);
    dv = r * Math.sin(2 * Math.PI * unitD);
    dw = Math.sqrt(Math.max(1 - unitC, 1e-24));
  } else if (scene.farFieldStart[pump] >= 0) {
    du = slope(farFieldAngle(scene, pump, 0, unitC) + errorU);
    dv = slope(farFieldAngle(scene, pump, 1, unitD) + errorV);
  } else if (p[at + PUMP.spreadU] > 0 || p[at + PUMP.spreadV] > 0 || errorU !== 0 || errorV !== 0) {
    const r = Math.sqrt(-2 * Math.log(unitC));
    du = slope(p[at + PUMP.spreadU] * r * Math.cos(2 * Math.PI * unitD) + errorU);
    dv = slope(p[at + PUMP.spreadV] * r * Math.sin(2 * Math.PI * unitD) + errorV);
  }
  if (p[at + PUMP.lensPower] !== 0) {
    // Thin lens: a ray that meets it at distance r from the axis has its slope changed by −r/f.
    forward = p[at + PUMP.lensDistance];
    a += (forward + back) * du;
    b += (forward + back) * dv;
    back = 0;
    du -= a * p[at + PUMP.lensPower];
    dv -= b * p[at + PUMP.lensPower];
  }
  forward -= back;
  const norm = 1 / Math.sqrt(du * du + dv * dv + dw * dw);
  du *= norm;
  dv *= norm;
  dw *= norm;
  const ux = p[at + PUMP.axisU];
  const uy = p[at + PUMP.axisU + 1];
  const uz = p[at + PUMP.axisU + 2];
  const vx = p[at + PUMP.axisV];
  const vy = p[at + PUMP.axisV + 1];
  const vz = p[at + PUMP.axisV + 2];
  const wx = p[at + PUMP.axisW];
  const wy = p[at + PUMP.axisW + 1];
  const wz = p[at + PUMP.axisW + 2];
  ray[RAY.x] = p[at + PUMP.originX] + a * ux + b * vx + forward * wx;
  ray[RAY.y] = p[at + PUMP.originX + 1] + a * uy + b * vy + forward * wy;
  ray[RAY.z] = p[at + PUMP.originX + 2] + a * uz + b * vz + forward * wz;
  ray[RAY.dx] = du * ux + dv * vx + dw * wx;
  ray[RAY.dy] = du * uy + dv * vy + dw * wy;
  ray[RAY.dz] = du * uz + dv * vz + dw * wz;
}

function slope(angle: number): number {
  return Math.tan(Math.max(-WIDEST, Math.min(WIDEST, angle)));
}

/** Ray of the pump's table that this launch takes. */
function rayOf(scene: Scene, pump: number, points: Int32Array): number {
  const first = scene.rayStart[pump];
  const unit = sobolUnit(points, LAUNCH.positionU);
  return first + drawIndex(scene.rayKeep, scene.rayOther, first, scene.rayCount[pump], unit);
}

/** Angle from a cut of a measured far field, linear between its points: the inverse of its integral. @param cut 0 along u, 1 along v */
function farFieldAngle(scene: Scene, pump: number, cut: number, unit: number): number {
  const { farFields } = scene;
  const points = scene.farFieldPoints[pump];
  const angles = scene.farFieldStart[pump];
  const density = angles + (1 + 2 * cut) * points;
  const integral = density + points;
  let low = 0;
  let high = points - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (farFields[integral + middle] <= unit) low = middle;
    else high = middle;
  }
  const rest = unit - farFields[integral + low];
  const width = farFields[angles + high] - farFields[angles + low];
  const from = farFields[density + low];
  const rise = (farFields[density + high] - from) / width;
  // from·t + rise·t²/2 = rest, in the form that divides by no small number.
  const root = Math.sqrt(Math.max(0, from * from + 2 * rise * rest));
  return farFields[angles + low] + (from + root > 0 ? Math.min(width, (2 * rest) / (from + root)) : 0);
}
