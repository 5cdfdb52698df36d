/** Where a pump photon starts, where it goes and what colour it has. */
import { drawIndex } from '../numerics/sample-table.js';
import { sobolUnit } from '../numerics/sobol.js';
import { BEAM, OUTLINE, PUMP, type Scene } from '../scene/scene-layout.js';

/** Sobol dimensions of a launch; the last one draws the first free path. */
export enum LAUNCH {
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

export function choosePump(scene: Scene, points: Int32Array): number {
  const unit = sobolUnit(points, LAUNCH.pump);
  let pump = 0;
  while (pump < scene.pumpCount - 1 && unit >= scene.pumpCumulative[pump]) pump++;
  return pump;
}

/**
 * Writes position and direction of a new photon into `ray` (x y z dx dy dz).
 * @returns its wavelength index.
 */
export function launchPump(scene: Scene, pump: number, points: Int32Array, ray: Float64Array): number {
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
  if (beam === BEAM.diodes) {
    const across = p[at + PUMP.across];
    const along = p[at + PUMP.along];
    a = (Math.min(across - 1, Math.floor(unitA * across)) - (across - 1) / 2) * p[at + PUMP.pitchU];
    b = (Math.min(along - 1, Math.floor(unitB * along)) - (along - 1) / 2) * p[at + PUMP.pitchV];
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
  if (beam === BEAM.lambertian) {
    const r = Math.sqrt(unitC);
    du = r * Math.cos(2 * Math.PI * unitD);
    dv = r * Math.sin(2 * Math.PI * unitD);
    dw = Math.sqrt(Math.max(1 - unitC, 1e-24));
  } else if (p[at + PUMP.spreadU] > 0 || p[at + PUMP.spreadV] > 0) {
    const r = Math.sqrt(-2 * Math.log(unitC));
    du = slope(p[at + PUMP.spreadU] * r * Math.cos(2 * Math.PI * unitD));
    dv = slope(p[at + PUMP.spreadV] * r * Math.sin(2 * Math.PI * unitD));
  }
  if (p[at + PUMP.lensPower] !== 0) {
    // Thin lens: a ray that meets it at distance r from the axis has its slope changed by −r/f.
    forward = p[at + PUMP.lensDistance];
    a += forward * du;
    b += forward * dv;
    du -= a * p[at + PUMP.lensPower];
    dv -= b * p[at + PUMP.lensPower];
  }
  const norm = 1 / Math.sqrt(du * du + dv * dv + dw * dw);
  du *= norm;
  dv *= norm;
  dw *= norm;
  for (let i = 0; i < 3; i++) {
    const u = p[at + PUMP.axisU + i];
    const v = p[at + PUMP.axisV + i];
    const w = p[at + PUMP.axisW + i];
    ray[i] = p[at + PUMP.originX + i] + a * u + b * v + forward * w;
    ray[3 + i] = du * u + dv * v + dw * w;
  }
  const cells = scene.wavelengths;
  const unit = sobolUnit(points, LAUNCH.wavelength);
  return drawIndex(scene.spectrumKeep, scene.spectrumOther, scene.pumpSpectrum[pump] * cells, cells, unit);
}

function slope(angle: number): number {
  return Math.tan(Math.max(-WIDEST, Math.min(WIDEST, angle)));
}
