/** Pumps -> frames, beam shapes and spectra. */
import type { Aim, Description, PumpDescription, Vector3 } from '../design/description.js';
import { EV_NM } from '../units/constants.js';
import { patchAim } from './face-patch.js';
import { faceNormal, findFace, type PlacedPart } from './place-parts.js';
import { BEAM, OUTLINE, PUMP } from './scene-layout.js';
import type { SpectrumPool } from './spectrum-pool.js';
import { add, cross, dot, frameAbout, normalise, scale, snapDirection, subtract } from './vector.js';
import { cellPhotons, FWHM_PER_SIGMA, linePhotons, nearestIndex, type WavelengthGrid } from './wavelength-grid.js';

const BEAMS = {
  patch: BEAM.patch,
  gaussian: BEAM.gaussian,
  lambertian: BEAM.lambertian,
  diodes: BEAM.diodes,
  rays: BEAM.rays,
} as const;
const OUTLINES = { rectangle: OUTLINE.rectangle, disc: OUTLINE.disc } as const;

export interface BeamFrame {
  readonly origin: Vector3;
  readonly u: Vector3;
  readonly v: Vector3;
  /** Direction of the beam. */
  readonly w: Vector3;
}

export interface CompiledPumps {
  readonly pumps: Float64Array;
  readonly beam: number[];
  readonly outline: number[];
  readonly spectrum: number[];
  /** Cumulative share of launched photons. */
  readonly cumulative: number[];
  readonly frames: readonly BeamFrame[];
}

export function compilePumps(
  description: Description,
  parts: readonly PlacedPart[],
  grid: WavelengthGrid,
  pool: SpectrumPool,
): CompiledPumps {
  const pumps = new Float64Array(description.pumps.length * PUMP.STRIDE);
  const beam: number[] = [];
  const outline: number[] = [];
  const spectrum: number[] = [];
  const frames: BeamFrame[] = [];
  const photonRates: number[] = [];
  description.pumps.forEach((pump, i) => {
    const frame = beamFrame(pump, parts);
    frames.push(frame);
    const at = i * PUMP.STRIDE;
    pumps.set([...frame.origin, ...frame.u, ...frame.v, ...frame.w], at);
    writeBeam(pump, pumps, at);
    const { polarised = null } = pump;
    if (polarised !== null) {
      const field = add(scale(frame.u, Math.cos(polarised)), scale(frame.v, Math.sin(polarised)));
      pumps.set(field, at + PUMP.fieldX);
    }
    beam.push(BEAMS[pump.beam.kind]);
    outline.push(
      pump.beam.kind === 'patch' || pump.beam.kind === 'lambertian'
        ? OUTLINES[pump.beam.outline.kind]
        : OUTLINE.rectangle,
    );
    const photons = pumpPhotons(pump, grid);
    spectrum.push(pool.add(photons));
    photonRates.push(pump.power / meanPhotonEnergy(photons, grid));
  });
  const total = photonRates.reduce((a, b) => a + b, 0);
  let sum = 0;
  const cumulative = photonRates.map((rate) => {
    sum += rate;
    return sum / total;
  });
  return { pumps, beam, outline, spectrum, cumulative, frames };
}

/** Photons of a pump in each cell of the grid, relative. */
function pumpPhotons(
  { beam, spectrum = null, wavelengthNm, linewidthNm }: PumpDescription,
  grid: WavelengthGrid,
): Float64Array {
  if (spectrum !== null) return cellPhotons(grid, spectrum.photonsPerNm, spectrum.fromNm, spectrum.toNm);
  if (beam.kind !== 'rays' || beam.rays.wavelengthNm === null) return linePhotons(grid, wavelengthNm, linewidthNm);
  const photons = new Float64Array(grid.nm.length);
  beam.rays.wavelengthNm.forEach((nm, i) => {
    photons[nearestIndex(grid.nm, nm)] += beam.rays.watts[i] * nm;
  });
  return photons;
}

function meanPhotonEnergy(photons: Float64Array, grid: WavelengthGrid): number {
  let energy = 0;
  let count = 0;
  photons.forEach((n, w) => {
    energy += (n * EV_NM) / grid.nm[w];
    count += n;
  });
  return energy / count;
}

/** Where a pump sits and looks. Its face must exist (checked before). */
export function beamFrame({ aim }: PumpDescription, parts: readonly PlacedPart[]): BeamFrame {
  const frame = aimedFrame(aim, parts);
  const { turned = null } = aim;
  if (turned === null) return frame;
  const { axis, through, angle } = turned;
  const turn = (vector: Vector3) => turnAbout(vector, AXES[axis], angle);
  const origin = add(through, turn(subtract(frame.origin, through)));
  return { origin, u: turn(frame.u), v: turn(frame.v), w: snapDirection(turn(frame.w)) };
}

const AXES: Readonly<Record<'x' | 'y' | 'z', Vector3>> = { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] };

function aimedFrame(aim: Aim, parts: readonly PlacedPart[]): BeamFrame {
  if (aim.kind === 'along') {
    const w = snapDirection(aim.direction);
    const start = frameAbout(w);
    const [c, s] = [Math.cos(aim.roll), Math.sin(aim.roll)];
    const u = add(scale(start.u, c), scale(start.v, s));
    return { origin: aim.at, u, v: cross(w, u), w };
  }
  const face = findFace(parts, aim.face);
  if (face === null) throw new Error(`face ${aim.face} does not exist`);
  const spot = patchAim(face.patch);
  const inward = scale(faceNormal(face) ?? scale(spot.normal, face.hollow ? -1 : 1), -1);
  const target = add(spot.point, add(scale(spot.u, aim.shift[0]), scale(spot.v, aim.shift[1])));
  const tilted = turnAbout(turnAbout(inward, spot.u, aim.tilt[0]), spot.v, aim.tilt[1]);
  const w = snapDirection(tilted);
  const u = normalise(subtract(spot.u, scale(w, dot(spot.u, w))));
  const side = cross(w, u);
  const v = dot(side, spot.v) < 0 ? scale(side, -1) : side;
  return { origin: subtract(target, scale(w, aim.distance)), u, v, w };
}

/** Rodrigues' rotation. */
function turnAbout(d: Vector3, axis: Vector3, angle: number): Vector3 {
  if (angle === 0) return d;
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return add(add(scale(d, c), scale(cross(axis, d), s)), scale(axis, dot(axis, d) * (1 - c)));
}

function writeBeam({ beam }: PumpDescription, pumps: Float64Array, at: number): void {
  const set = (slot: number, value: number) => {
    pumps[at + slot] = value;
  };
  switch (beam.kind) {
    case 'patch':
      set(PUMP.spreadU, beam.divergence[0] / FWHM_PER_SIGMA);
      set(PUMP.spreadV, beam.divergence[1] / FWHM_PER_SIGMA);
      break;
    case 'gaussian':
      // The 1/e² radius is two standard deviations.
      set(PUMP.sizeU, beam.radius / 2);
      set(PUMP.spreadU, beam.halfAngle / 2);
      set(PUMP.spreadV, beam.halfAngle / 2);
      break;
    case 'lambertian':
    case 'rays':
      break;
    case 'diodes':
      set(PUMP.across, beam.across);
      set(PUMP.along, beam.along);
      set(PUMP.pitchU, beam.pitch[0]);
      set(PUMP.pitchV, beam.pitch[1]);
      set(PUMP.spreadU, beam.divergence[0] / FWHM_PER_SIGMA);
      set(PUMP.spreadV, beam.divergence[1] / FWHM_PER_SIGMA);
      set(PUMP.rows, beam.stack?.rows ?? 1);
      set(PUMP.rowPitch, beam.stack?.pitch ?? 0);
      set(PUMP.rowStep, beam.stack?.step ?? 0);
      if (beam.lens !== null) {
        set(PUMP.lensPower, 1 / beam.lens.focalLength);
        set(PUMP.lensDistance, beam.lens.distance);
      }
      break;
  }
  if (beam.kind === 'patch' || beam.kind === 'lambertian') {
    set(PUMP.sizeU, beam.outline.kind === 'disc' ? beam.outline.radius : beam.outline.size[0]);
    set(PUMP.sizeV, beam.outline.kind === 'disc' ? beam.outline.radius : beam.outline.size[1]);
  }
}
