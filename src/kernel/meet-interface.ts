/** Light at an interface, in full: free planes and spheres, recorders, every finish, refraction and scatter. */
import { FLAG, INTERFACE, type RegionGraph } from '../scene/region-graph.js';
import { FACE_SLOT, type Scene, SLOT, SPREAD } from '../scene/scene-layout.js';
import type { GrownTally } from './batch-tally.js';
import { travelNormal } from './next-boundary.js';
import { NOW, RAY } from './photon.js';
import { carryPolarisation, holdDirection, losePolarisation, splitPolarised } from './polarised-light.js';
import { inAperture, recordCrossing } from './record-light.js';
import { scatterAbout, scatterLambertian, scatterOval } from './scatter.js';
import { scatterByTable } from './scatter-by-table.js';
import { SHARES } from './shares.js';
import { splitLight } from './split-light.js';

const normal = new Float64Array(3);

/**
 * Takes the photon in `ray` and `now` over the interface it is at, or back from it.
 * @returns slot of its fate, −1 if it travels on.
 */
export function meetInterface(
  scene: Scene,
  graph: RegionGraph,
  grown: GrownTally,
  half: number,
  ray: Float64Array,
  now: Int32Array,
  shares: Float64Array,
  random: Int32Array,
): number {
  const { interfaces } = graph;
  const way = now[NOW.way];
  const at = now[NOW.region] * graph.ways + way;
  const record = graph.crossing[at];
  const beyond = graph.neighbour[at];
  const wavelength = now[NOW.wavelength];
  const light = now[NOW.light];
  const flags = interfaces[record + INTERFACE.flags];
  if ((flags & FLAG.freeSurface) !== 0) {
    const recorder = interfaces[record + INTERFACE.recorder];
    const sphere = way - 2 * graph.families;
    const leaves = sphere < 0 || graph.side[now[NOW.region] * graph.quadrics + sphere] < 0;
    if (leaves && inAperture(scene, recorder, way, ray)) {
      recordCrossing(scene, grown, recorder, half, light, wavelength, ray);
      if (scene.detectorExit[recorder] === 1) return light === 0 ? SLOT.exitPump : SLOT.exitEmitted;
    }
    now[NOW.region] = beyond;
    return -1;
  }
  if ((flags & FLAG.recordsArrival) !== 0 && light === 0) {
    recordCrossing(scene, grown, interfaces[record + INTERFACE.recorder], half, light, wavelength, ray);
  }

  // ---- reflected, transmitted or absorbed?
  let dx = ray[RAY.dx];
  let dy = ray[RAY.dy];
  let dz = ray[RAY.dz];
  let gx = 0;
  let gy = 0;
  let gz = 0;
  // Way 2·axis leads down the axis, 2·axis + 1 up.
  if (way < 2) gx = 2 * way - 1;
  else if (way < 4) gy = 2 * way - 5;
  else if (way < 6) gz = 2 * way - 9;
  else {
    travelNormal(scene, way, ray, normal);
    gx = normal[0];
    gy = normal[1];
    gz = normal[2];
  }
  const cosine = gx * dx + gy * dy + gz * dz;
  const n1 = ray[RAY.index];
  shares[SHARES.index] = n1;
  shares[SHARES.cosine] = cosine;
  splitLight(scene, interfaces, record, wavelength, shares);
  const polarised = scene.polarised !== 0;
  if (polarised) splitPolarised(scene, interfaces, record, wavelength, ray, gx, gy, gz, shares);
  const reflected = shares[SHARES.reflected];
  const transmitted = shares[SHARES.transmitted];
  const n2 = shares[SHARES.indexBeyond];
  let reflects = true;
  // Nothing is left to chance at a perfect reflector or a finish that passes everything.
  if (reflected < 1) {
    if (reflected === 0 && transmitted === 1) reflects = false;
    else {
      now[NOW.closed] = 0;
      const unit = ray[RAY.unit];
      reflects = unit < reflected;
      if (!reflects && unit >= reflected + transmitted) {
        return scene.faceSlot[interfaces[record + INTERFACE.faceActing]] + FACE_SLOT.absorbedPump + light;
      }
    }
  }
  if (reflects && now[NOW.entered] === 0) now[NOW.lastFace] = interfaces[record + INTERFACE.faceActing];

  // ---- a new direction
  const finish = interfaces[record + INTERFACE.finish];
  let spread: number = SPREAD.specular;
  if ((flags & FLAG.spreads) !== 0) {
    spread = reflects ? scene.finishReflectSpread[finish] : scene.finishTransmitSpread[finish];
  }
  const sign = reflects ? -1 : 1;
  if (polarised) {
    if (spread === SPREAD.specular) carryPolarisation(shares, reflects, ray);
    else losePolarisation(ray);
  }
  if (spread === SPREAD.lambertian) {
    now[NOW.closed] = 0;
    scatterLambertian(ray, sign * gx, sign * gy, sign * gz, random);
  } else if (spread === SPREAD.table) {
    now[NOW.closed] = 0;
    scatterByTable(scene, finish, reflects, ray, sign * gx, sign * gy, sign * gz, random);
  } else {
    if (reflects) {
      dx -= 2 * cosine * gx;
      dy -= 2 * cosine * gy;
      dz -= 2 * cosine * gz;
    } else if (n1 !== n2) {
      const ratio = n1 / n2;
      const bend = Math.sqrt(1 - ratio * ratio * (1 - cosine * cosine)) - ratio * cosine;
      dx = ratio * dx + bend * gx;
      dy = ratio * dy + bend * gy;
      dz = ratio * dz + bend * gz;
    }
    ray[RAY.dx] = dx;
    ray[RAY.dy] = dy;
    ray[RAY.dz] = dz;
    if (spread !== SPREAD.specular) {
      now[NOW.closed] = 0;
      const width = scene.finishWidth[finish];
      if (spread < SPREAD.gaussianOval) scatterAbout(ray, spread, width, sign * gx, sign * gy, sign * gz, random);
      else {
        const axis = 3 * interfaces[record + INTERFACE.faceActing];
        const widthV = scene.finishWidthV[finish];
        const hat = spread === SPREAD.topHatOval;
        scatterOval(ray, hat, width, widthV, scene.faceAxis, axis, sign * gx, sign * gy, sign * gz, random);
      }
    }
  }
  if (polarised) holdDirection(ray);
  if (reflects) return -1;

  // ---- through: another medium, another owner
  const owner = interfaces[record + INTERFACE.ownerBeyond];
  now[NOW.region] = beyond;
  now[NOW.medium] = interfaces[record + INTERFACE.mediumBeyond];
  now[NOW.owner] = owner;
  if (owner !== 0) now[NOW.entered] = 1;
  const faceOut = interfaces[record + INTERFACE.faceOut];
  now[NOW.lastFace] = faceOut >= 0 ? faceOut : interfaces[record + INTERFACE.faceIn];
  if (faceOut >= 0 && scene.faceRecorderOut[faceOut] >= 0) {
    recordCrossing(scene, grown, scene.faceRecorderOut[faceOut], half, light, wavelength, ray);
    if (scene.faceExit[faceOut] === 1) return light === 0 ? SLOT.exitPump : SLOT.exitEmitted;
  }
  return -1;
}
