/**
 * Polarisation carried along with a photon: its Stokes parameters over the first one, Q, U, V, about an axis across its direction (Born &
 * Wolf §1.4; Bohren & Huffman §2.11). At an interface the axis is turned into the normal of the plane of incidence; Q = 1 is s light.
 * The interface reflects by Q, and light goes on in the state that its amplitudes make of it. Dyes and everything that scatters leave
 * light unpolarised.
 */
import { REFLECTION, reflectMetal, reflectTransparent } from '../optics/polarised-reflection.js';
import { INTERFACE } from '../scene/region-graph.js';
import { PUMP, type Scene, SPLIT } from '../scene/scene-layout.js';
import { RAY } from './photon.js';
import { SHARES } from './shares.js';

/** Squared sine of incidence below which every plane is a plane of incidence. */
const NORMAL = 1e-18;

/** Pump light as its pump sends it out. */
export function startPolarised(scene: Scene, pump: number, ray: Float64Array): void {
  const field = pump * PUMP.STRIDE + PUMP.fieldX;
  let x = scene.pumps[field];
  let y = scene.pumps[field + 1];
  let z = scene.pumps[field + 2];
  losePolarisation(ray);
  holdDirection(ray);
  if (x === 0 && y === 0 && z === 0) return;
  const along = x * ray[RAY.dx] + y * ray[RAY.dy] + z * ray[RAY.dz];
  x -= along * ray[RAY.dx];
  y -= along * ray[RAY.dy];
  z -= along * ray[RAY.dz];
  const size = Math.sqrt(x * x + y * y + z * z);
  // A ray along the field of its own pump has no side to swing to.
  if (size < 1e-9) return;
  ray[RAY.stokesQ] = 1;
  ray[RAY.axisX] = x / size;
  ray[RAY.axisY] = y / size;
  ray[RAY.axisZ] = z / size;
}

export function losePolarisation(ray: Float64Array): void {
  ray[RAY.stokesQ] = 0;
  ray[RAY.stokesU] = 0;
  ray[RAY.stokesV] = 0;
}

/** From here on the state in `ray` holds for the direction in `ray`. */
export function holdDirection(ray: Float64Array): void {
  ray[RAY.heldX] = ray[RAY.dx];
  ray[RAY.heldY] = ray[RAY.dy];
  ray[RAY.heldZ] = ray[RAY.dz];
}

/**
 * As `splitLight`, which must have been called: what is reflected and transmitted of light in the state in `ray`, whose axis is turned to
 * the normal of the plane of incidence. @param gx unit normal of the interface along the direction of travel
 */
export function splitPolarised(
  scene: Scene,
  interfaces: Int32Array,
  record: number,
  wavelength: number,
  ray: Float64Array,
  gx: number,
  gy: number,
  gz: number,
  shares: Float64Array,
): void {
  const turned = ray[RAY.dx] !== ray[RAY.heldX] || ray[RAY.dy] !== ray[RAY.heldY] || ray[RAY.dz] !== ray[RAY.heldZ];
  if (turned) losePolarisation(ray);
  turnAxis(ray, gx, gy, gz);
  amplitudes(scene, interfaces, record, wavelength, shares);
  const q = ray[RAY.stokesQ];
  const s = 0.5 * (1 + q);
  const p = 0.5 * (1 - q);
  const reflected = s * shares[SHARES.reflectedS] + p * shares[SHARES.reflectedP];
  const transmitted = s * shares[SHARES.transmittedS] + p * shares[SHARES.transmittedP];
  shares[SHARES.reflected] = reflected > 1 - 1e-12 ? 1 : reflected;
  shares[SHARES.transmitted] = transmitted > 1 - 1e-12 ? 1 : transmitted;
}

/** Turns the axis of the Stokes parameters to the normal of the plane of incidence. */
function turnAxis(ray: Float64Array, gx: number, gy: number, gz: number): void {
  const dx = ray[RAY.dx];
  const dy = ray[RAY.dy];
  const dz = ray[RAY.dz];
  let sx = dy * gz - dz * gy;
  let sy = dz * gx - dx * gz;
  let sz = dx * gy - dy * gx;
  const sine2 = sx * sx + sy * sy + sz * sz;
  if (sine2 < NORMAL) return;
  const norm = 1 / Math.sqrt(sine2);
  sx *= norm;
  sy *= norm;
  sz *= norm;
  const ex = ray[RAY.axisX];
  const ey = ray[RAY.axisY];
  const ez = ray[RAY.axisZ];
  const q = ray[RAY.stokesQ];
  const u = ray[RAY.stokesU];
  if (q !== 0 || u !== 0) {
    const cosine = ex * sx + ey * sy + ez * sz;
    // Along direction × axis.
    const sine = (dy * ez - dz * ey) * sx + (dz * ex - dx * ez) * sy + (dx * ey - dy * ex) * sz;
    const cosine2 = cosine * cosine - sine * sine;
    const sineOf2 = 2 * cosine * sine;
    ray[RAY.stokesQ] = q * cosine2 + u * sineOf2;
    ray[RAY.stokesU] = u * cosine2 - q * sineOf2;
  }
  ray[RAY.axisX] = sx;
  ray[RAY.axisY] = sy;
  ray[RAY.axisZ] = sz;
}

/**
 * Shares of s and p, and their cross products; those of a stack are there already. A finish that is told no more than its shares treats
 * both alike.
 */
function amplitudes(
  scene: Scene,
  interfaces: Int32Array,
  record: number,
  wavelength: number,
  shares: Float64Array,
): void {
  const finish = interfaces[record + INTERFACE.finish];
  const split = scene.finishSplit[finish];
  const row = finish * scene.wavelengths + wavelength;
  const index = shares[SHARES.index];
  const cosine = shares[SHARES.cosine];
  if (split === SPLIT.fresnel) {
    reflectTransparent(index, shares[SHARES.indexBeyond], cosine, shares, SHARES.reflectedS);
    passRest(shares);
  } else if (split === SPLIT.metal) {
    reflectMetal(index, scene.finishA[row], scene.finishB[row], cosine, shares, SHARES.reflectedS);
    alike(shares, SHARES.transmittedS, 0, 1);
  } else if (split !== SPLIT.stack) {
    // Reflection turns the handedness, as every mirror's does at normal incidence.
    alike(shares, SHARES.reflectedS, shares[SHARES.reflected], -1);
    alike(shares, SHARES.transmittedS, shares[SHARES.transmitted], 1);
  }
}

/** What a lossless interface does not reflect passes it, in phase. */
function passRest(shares: Float64Array): void {
  const s = Math.max(0, 1 - shares[SHARES.reflectedS]);
  const p = Math.max(0, 1 - shares[SHARES.reflectedP]);
  shares[SHARES.transmittedS] = s;
  shares[SHARES.transmittedP] = p;
  shares[SHARES.transmittedReal] = Math.sqrt(s * p);
  shares[SHARES.transmittedImaginary] = 0;
}

function alike(shares: Float64Array, at: number, share: number, sign: number): void {
  shares[at + REFLECTION.s] = share;
  shares[at + REFLECTION.p] = share;
  shares[at + REFLECTION.real] = sign * share;
  shares[at + REFLECTION.imaginary] = 0;
}

/** The state of light after the interface that `splitPolarised` was asked about; its axis stays. */
export function carryPolarisation(shares: Float64Array, reflects: boolean, ray: Float64Array): void {
  const at = reflects ? SHARES.reflectedS : SHARES.transmittedS;
  const q = ray[RAY.stokesQ];
  const u = ray[RAY.stokesU];
  const v = ray[RAY.stokesV];
  const s = 0.5 * (1 + q) * shares[at + REFLECTION.s];
  const p = 0.5 * (1 - q) * shares[at + REFLECTION.p];
  const power = s + p;
  // By rounding alone: nothing goes where no power goes.
  if (power <= 0) {
    losePolarisation(ray);
    return;
  }
  const real = shares[at + REFLECTION.real] / power;
  const imaginary = shares[at + REFLECTION.imaginary] / power;
  const newQ = (s - p) / power;
  const newU = u * real - v * imaginary;
  const newV = u * imaginary + v * real;
  // Products read from a table may be a little too large for their shares: light is polarised whole at most.
  const size2 = newQ * newQ + newU * newU + newV * newV;
  const scale = size2 > 1 ? 1 / Math.sqrt(size2) : 1;
  ray[RAY.stokesQ] = scale * newQ;
  ray[RAY.stokesU] = scale * newU;
  ray[RAY.stokesV] = scale * newV;
}
