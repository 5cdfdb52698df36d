/** Maps, spectra, angles and radiance of light that crosses a recorded face, plane or sphere. */
import { CELLS, RECORDER, type Scene, WRAP } from '../scene/scene-layout.js';
import type { GrownTally } from './batch-tally.js';
import { recordRadiance } from './record-radiance.js';

/** Cell coordinate along the map's u and v of a point on the recorder, in cells (not rounded). */
export function mapCoordinate(scene: Scene, recorder: number, axis: 0 | 1, ray: Float64Array): number {
  const frame = scene.recorderFrame;
  const at = recorder * RECORDER.STRIDE;
  const px = ray[0] - frame[at];
  const py = ray[1] - frame[at + 1];
  const pz = ray[2] - frame[at + 2];
  const wrap = scene.recorderWrap[recorder];
  if (wrap === WRAP.sphere) return sphereCoordinate(scene, recorder, axis, px, py, pz);
  if (axis === 0 && wrap === WRAP.side) {
    const u =
      px * frame[at + RECORDER.axisU] + py * frame[at + RECORDER.axisU + 1] + pz * frame[at + RECORDER.axisU + 2];
    const v =
      px * frame[at + RECORDER.axisV] + py * frame[at + RECORDER.axisV + 1] + pz * frame[at + RECORDER.axisV + 2];
    return (Math.atan2(v, u) / (2 * Math.PI) + 0.5) * scene.recorderCells[2 * recorder];
  }
  const step = at + (axis === 0 ? RECORDER.stepU : RECORDER.stepV);
  return px * frame[step] + py * frame[step + 1] + pz * frame[step + 2];
}

/** Azimuth and polar angle about the axis of a sphere, in cells. */
function sphereCoordinate(scene: Scene, recorder: number, axis: 0 | 1, px: number, py: number, pz: number): number {
  const frame = scene.recorderFrame;
  const at = recorder * RECORDER.STRIDE;
  const along = (place: number) => px * frame[at + place] + py * frame[at + place + 1] + pz * frame[at + place + 2];
  const u = along(RECORDER.axisU);
  const v = along(RECORDER.axisV);
  if (axis === 0) {
    const turn = Math.atan2(v, u) / (2 * Math.PI);
    return (turn < 0 ? turn + 1 : turn) * scene.recorderCells[2 * recorder];
  }
  const polar = Math.atan2(Math.sqrt(u * u + v * v), along(RECORDER.axisN));
  const from = scene.detectorAperture[2 * recorder];
  const to = scene.detectorAperture[2 * recorder + 1];
  return ((polar - from) / (to - from)) * scene.recorderCells[2 * recorder + 1];
}

/** Adds one photon, by its point and direction, to a recorder and to those that share its face. */
export function recordCrossing(
  scene: Scene,
  tally: GrownTally,
  recorder: number,
  half: number,
  light: number,
  wavelength: number,
  ray: Float64Array,
): void {
  for (let r = recorder; r >= 0; r = scene.recorderNext[r]) recordOne(scene, tally, r, half, light, wavelength, ray);
}

function recordOne(
  scene: Scene,
  tally: GrownTally,
  recorder: number,
  half: number,
  light: number,
  wavelength: number,
  ray: Float64Array,
): void {
  if (((scene.recorderLights[recorder] >> light) & 1) === 1) {
    const cellsU = scene.recorderCells[2 * recorder];
    const cellsV = scene.recorderCells[2 * recorder + 1];
    const quanta = scene.energyQuanta[wavelength];
    let u: number;
    let v: number;
    if (scene.recorderWrap[recorder] !== WRAP.flat) {
      u = mapCoordinate(scene, recorder, 0, ray);
      v = mapCoordinate(scene, recorder, 1, ray);
    } else {
      // mapCoordinate of a flat recorder, written out: a call would box what it returns.
      const frame = scene.recorderFrame;
      const at = recorder * RECORDER.STRIDE;
      const px = ray[0] - frame[at];
      const py = ray[1] - frame[at + 1];
      const pz = ray[2] - frame[at + 2];
      u = px * frame[at + RECORDER.stepU] + py * frame[at + RECORDER.stepU + 1] + pz * frame[at + RECORDER.stepU + 2];
      v = px * frame[at + RECORDER.stepV] + py * frame[at + RECORDER.stepV + 1] + pz * frame[at + RECORDER.stepV + 2];
    }
    // A photon on the very edge of a face belongs to its last cell.
    const iu = u < 0 ? 0 : u >= cellsU ? cellsU - 1 : u | 0;
    const iv = v < 0 ? 0 : v >= cellsV ? cellsV - 1 : v | 0;
    tally.maps[half * scene.mapCells + scene.recorderMap[recorder] + iu + cellsU * iv] += quanta;
    const angles = scene.recorderAngles[recorder];
    if (angles >= 0) {
      const cell = angles + angularCell(scene, recorder, ray);
      tally.angles[half * scene.angleCells + cell] += quanta;
      tally.angles[2 * scene.angleCells + cell] += scene.luminousQuanta[wavelength];
    }
    if (scene.recorderRadiance[recorder] >= 0) {
      recordRadiance(scene, tally, recorder, half, quanta, u / cellsU, v / cellsV, ray);
    }
  }
  const spectrum = scene.recorderSpectrum[recorder];
  if (spectrum >= 0) tally.spectra[spectrum + light * scene.wavelengths + wavelength]++;
}

/** Whether light crosses a free plane along its normal and within its outline, or a free sphere where it records. */
export function inAperture(scene: Scene, recorder: number, way: number, ray: Float64Array): boolean {
  if (scene.recorderWrap[recorder] === WRAP.sphere) {
    const polar = mapCoordinate(scene, recorder, 1, ray);
    return polar >= 0 && polar <= scene.recorderCells[2 * recorder + 1];
  }
  const upwards = (way & 1) === 1 ? 1 : -1;
  if (upwards !== scene.detectorSign[recorder]) return false;
  const u = mapCoordinate(scene, recorder, 0, ray) / scene.recorderCells[2 * recorder];
  const v = mapCoordinate(scene, recorder, 1, ray) / scene.recorderCells[2 * recorder + 1];
  if (scene.detectorAperture[2 * recorder + 1] < 0) return (2 * u - 1) ** 2 + (2 * v - 1) ** 2 <= 1;
  return u >= 0 && u < 1 && v >= 0 && v < 1;
}

function clampCell(coordinate: number, cells: number): number {
  const cell = Math.floor(coordinate);
  return cell < 0 ? 0 : cell >= cells ? cells - 1 : cell;
}

function angularCell(scene: Scene, recorder: number, ray: Float64Array): number {
  const frame = scene.recorderFrame;
  const rows = scene.recorderPolar[recorder];
  const at = recorder * RECORDER.STRIDE;
  const n = at + RECORDER.axisN;
  const u = at + RECORDER.axisU;
  const v = at + RECORDER.axisV;
  if (scene.recorderWrap[recorder] === WRAP.side) return angularCellOfSide(frame, at, ray);
  const along = ray[3] * frame[n] + ray[4] * frame[n + 1] + ray[5] * frame[n + 2];
  const a = ray[3] * frame[u] + ray[4] * frame[u + 1] + ray[5] * frame[u + 2];
  const b = ray[3] * frame[v] + ray[4] * frame[v + 1] + ray[5] * frame[v + 2];
  return cellOfAngles(along, a, b, rows);
}

/** On the side of a cylinder or cone the angles are taken where light leaves: from the radius, with azimuth 0 round the side and 90° along the axis. */
function angularCellOfSide(frame: Float64Array, at: number, ray: Float64Array): number {
  const n = at + RECORDER.axisN;
  const u = at + RECORDER.axisU;
  const v = at + RECORDER.axisV;
  const px = ray[0] - frame[at];
  const py = ray[1] - frame[at + 1];
  const pz = ray[2] - frame[at + 2];
  const pu = px * frame[u] + py * frame[u + 1] + pz * frame[u + 2];
  const pv = px * frame[v] + py * frame[v + 1] + pz * frame[v + 2];
  const radius = Math.sqrt(pu * pu + pv * pv);
  const du = ray[3] * frame[u] + ray[4] * frame[u + 1] + ray[5] * frame[u + 2];
  const dv = ray[3] * frame[v] + ray[4] * frame[v + 1] + ray[5] * frame[v + 2];
  const along = ray[3] * frame[n] + ray[4] * frame[n + 1] + ray[5] * frame[n + 2];
  return cellOfAngles((du * pu + dv * pv) / radius, (dv * pu - du * pv) / radius, along, CELLS.polar);
}

/** Cell of a direction by its parts along the normal and along azimuth 0 and 90°. */
function cellOfAngles(out: number, a: number, b: number, rows: number): number {
  const polar = Math.acos(Math.max(-1, Math.min(1, out)));
  const turn = Math.atan2(b, a) / (2 * Math.PI);
  const row = clampCell((polar / (Math.PI / 2)) * CELLS.polar, rows);
  return row * CELLS.azimuth + clampCell((turn < 0 ? turn + 1 : turn) * CELLS.azimuth, CELLS.azimuth);
}
