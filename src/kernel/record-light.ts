/** Maps, spectra and angles of light that crosses a recorded face or plane, and the voxels where light is absorbed. */
import { AZIMUTH_CELLS, POLAR_CELLS, RECORDER, type Scene } from '../scene/scene-layout.js';
import type { GrownTally } from '../tallies/batch-tally.js';

/** Cell coordinate along the map's u and v of a point on the recorder, in cells (not rounded). */
export function mapCoordinate(scene: Scene, recorder: number, axis: 0 | 1, x: number, y: number, z: number): number {
  const frame = scene.recorderFrame;
  const at = recorder * RECORDER.STRIDE;
  const px = x - frame[at];
  const py = y - frame[at + 1];
  const pz = z - frame[at + 2];
  if (axis === 0 && scene.recorderWrap[recorder] === 1) {
    const u = px * frame[at + RECORDER.axisU] + py * frame[at + RECORDER.axisU + 1] + pz * frame[at + RECORDER.axisU + 2];
    const v = px * frame[at + RECORDER.axisV] + py * frame[at + RECORDER.axisV + 1] + pz * frame[at + RECORDER.axisV + 2];
    return (Math.atan2(v, u) / (2 * Math.PI) + 0.5) * scene.recorderCells[2 * recorder];
  }
  const step = at + (axis === 0 ? RECORDER.stepU : RECORDER.stepV);
  return px * frame[step] + py * frame[step + 1] + pz * frame[step + 2];
}

/** Adds one photon to a recorder: its point and direction. */
export function recordCrossing(
  scene: Scene,
  tally: GrownTally,
  recorder: number,
  half: number,
  light: number,
  wavelength: number,
  x: number,
  y: number,
  z: number,
  dx: number,
  dy: number,
  dz: number,
): void {
  if ((scene.recorderLights[recorder] >> light) & 1) {
    const cellsU = scene.recorderCells[2 * recorder];
    const cellsV = scene.recorderCells[2 * recorder + 1];
    const quanta = scene.energyQuanta[wavelength];
    const iu = clampCell(mapCoordinate(scene, recorder, 0, x, y, z), cellsU);
    const iv = clampCell(mapCoordinate(scene, recorder, 1, x, y, z), cellsV);
    tally.maps[half * scene.mapCells + scene.recorderMap[recorder] + iu + cellsU * iv] += quanta;
    const angles = scene.recorderAngles[recorder];
    if (angles >= 0) tally.angles[angles + angularCell(scene.recorderFrame, recorder, dx, dy, dz)] += quanta;
  }
  const spectrum = scene.recorderSpectrum[recorder];
  if (spectrum >= 0) tally.spectra[spectrum + light * scene.wavelengths + wavelength]++;
}

/** Whether light crosses a free plane along its normal and within its outline. */
export function inAperture(scene: Scene, recorder: number, way: number, x: number, y: number, z: number): boolean {
  const upwards = (way & 1) === 1 ? 1 : -1;
  if (upwards !== scene.detectorSign[recorder]) return false;
  const u = mapCoordinate(scene, recorder, 0, x, y, z) / scene.recorderCells[2 * recorder];
  const v = mapCoordinate(scene, recorder, 1, x, y, z) / scene.recorderCells[2 * recorder + 1];
  if (scene.detectorAperture[2 * recorder + 1] < 0) return (2 * u - 1) ** 2 + (2 * v - 1) ** 2 <= 1;
  return u >= 0 && u < 1 && v >= 0 && v < 1;
}

/** A photon on the very edge of a face belongs to its last cell. */
function clampCell(coordinate: number, cells: number): number {
  const cell = Math.floor(coordinate);
  return cell < 0 ? 0 : cell >= cells ? cells - 1 : cell;
}

function angularCell(frame: Float64Array, recorder: number, dx: number, dy: number, dz: number): number {
  const at = recorder * RECORDER.STRIDE;
  const n = at + RECORDER.axisN;
  const u = at + RECORDER.axisU;
  const v = at + RECORDER.axisV;
  const along = dx * frame[n] + dy * frame[n + 1] + dz * frame[n + 2];
  const polar = Math.acos(Math.max(-1, Math.min(1, along)));
  const a = dx * frame[u] + dy * frame[u + 1] + dz * frame[u + 2];
  const b = dx * frame[v] + dy * frame[v + 1] + dz * frame[v + 2];
  const turn = Math.atan2(b, a) / (2 * Math.PI);
  // Light that leaves a curved face backwards of its axis is kept in the last polar cell.
  const row = clampCell((polar / (Math.PI / 2)) * POLAR_CELLS, POLAR_CELLS);
  return row * AZIMUTH_CELLS + clampCell((turn < 0 ? turn + 1 : turn) * AZIMUTH_CELLS, AZIMUTH_CELLS);
}

/** Adds an absorbed photon to the voxel maps. */
export function depositVoxel(
  scene: Scene,
  maps: Float64Array,
  half: number,
  light: number,
  quanta: number,
  x: number,
  y: number,
  z: number,
): void {
  const { voxelOrigin, voxelScale, voxelCells } = scene;
  const cellsX = voxelCells[0];
  const cellsY = voxelCells[1];
  const ix = Math.floor((x - voxelOrigin[0]) * voxelScale[0]);
  const iy = Math.floor((y - voxelOrigin[1]) * voxelScale[1]);
  const iz = Math.floor((z - voxelOrigin[2]) * voxelScale[2]);
  if (ix < 0 || iy < 0 || iz < 0 || ix >= cellsX || iy >= cellsY || iz >= voxelCells[2]) return;
  const cell = half * scene.mapCells + ix + cellsX * (iy + cellsY * iz);
  maps[(light === 0 ? scene.voxelPumpMap : scene.voxelEmittedMap) + cell] += quanta;
}
