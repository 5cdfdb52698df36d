/** Radiance: light by place and by direction from the outward normal where it crosses. */
import { LOCAL_NORMAL, NORMAL, RECORDER, type Scene } from '../scene/scene-layout.js';
import type { GrownTally } from './batch-tally.js';

const normal = new Float64Array(3);
const tangent = new Float64Array(3);

/** Adds a photon to a recorder's radiance record. @param acrossU, acrossV where it crosses, as shares of the map's width and height */
export function recordRadiance(
  scene: Scene,
  tally: GrownTally,
  recorder: number,
  half: number,
  quanta: number,
  acrossU: number,
  acrossV: number,
  ray: Float64Array,
): void {
  const grid = 4 * recorder;
  const cellsU = scene.radianceGrid[grid];
  const cellsV = scene.radianceGrid[grid + 1];
  const polarCells = scene.radianceGrid[grid + 2];
  const azimuthCells = scene.radianceGrid[grid + 3];
  setFrame(scene, recorder, ray);
  const [nx, ny, nz] = normal;
  const [tx, ty, tz] = tangent;
  const dx = ray[3];
  const dy = ray[4];
  const dz = ray[5];
  const out = dx * nx + dy * ny + dz * nz;
  const a = dx * tx + dy * ty + dz * tz;
  const b = dx * (ny * tz - nz * ty) + dy * (nz * tx - nx * tz) + dz * (nx * ty - ny * tx);
  const polar = Math.atan2(Math.sqrt(a * a + b * b), out) / (Math.PI / 2);
  const turn = Math.atan2(b, a) / (2 * Math.PI);
  const row = Math.min(polarCells - 1, Math.floor(polar * polarCells));
  const column = Math.min(azimuthCells - 1, Math.floor((turn < 0 ? turn + 1 : turn) * azimuthCells));
  // A photon on the very edge of a face belongs to its last cell.
  const u = Math.max(0, Math.min(cellsU - 1, Math.floor(acrossU * cellsU)));
  const v = Math.max(0, Math.min(cellsV - 1, Math.floor(acrossV * cellsV)));
  const cell = ((v * cellsU + u) * polarCells + row) * azimuthCells + column;
  tally.radiance[half * scene.radianceCells + scene.recorderRadiance[recorder] + cell] += quanta;
}

/**
 * Outward normal at the photon, and azimuth 0 across it: axis u of a flat recorder, on round ones the way of rising azimuth about the axis.
 */
function setFrame(scene: Scene, recorder: number, ray: Float64Array): void {
  const frame = scene.recorderFrame;
  const at = recorder * RECORDER.STRIDE;
  const local = scene.recorderNormal;
  const own = recorder * LOCAL_NORMAL.STRIDE;
  const kind = local[own];
  const ax = frame[at + RECORDER.axisN];
  const ay = frame[at + RECORDER.axisN + 1];
  const az = frame[at + RECORDER.axisN + 2];
  if (kind === NORMAL.flat) {
    set(normal, ax, ay, az);
    set(tangent, frame[at + RECORDER.axisU], frame[at + RECORDER.axisU + 1], frame[at + RECORDER.axisU + 2]);
    return;
  }
  const from = kind === NORMAL.ofSide ? frame : local;
  const start = kind === NORMAL.ofSide ? at : own + LOCAL_NORMAL.centreX;
  const px = ray[0] - from[start];
  const py = ray[1] - from[start + 1];
  const pz = ray[2] - from[start + 2];
  const height = px * ax + py * ay + pz * az;
  const rx = px - height * ax;
  const ry = py - height * ay;
  const rz = pz - height * az;
  const radius = Math.sqrt(rx * rx + ry * ry + rz * rz);
  const sign = local[own + LOCAL_NORMAL.sign];
  if (kind === NORMAL.ofSide) {
    const radial = (sign * local[own + LOCAL_NORMAL.radial]) / radius;
    const axial = sign * local[own + LOCAL_NORMAL.axial];
    set(normal, radial * rx + axial * ax, radial * ry + axial * ay, radial * rz + axial * az);
  } else {
    const scale = sign / Math.sqrt(px * px + py * py + pz * pz);
    set(normal, scale * px, scale * py, scale * pz);
  }
  if (radius < 1e-12) {
    set(tangent, frame[at + RECORDER.axisU], frame[at + RECORDER.axisU + 1], frame[at + RECORDER.axisU + 2]);
    return;
  }
  const per = 1 / radius;
  set(tangent, per * (ay * rz - az * ry), per * (az * rx - ax * rz), per * (ax * ry - ay * rx));
}

function set(to: Float64Array, x: number, y: number, z: number): void {
  to[0] = x;
  to[1] = y;
  to[2] = z;
}
