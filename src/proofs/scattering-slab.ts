/**
 * A dye that emits at its own absorption wavelength with quantum yield φ, in a medium matched to what surrounds it, is
 * isotropic scattering of albedo φ. So the printed tables of radiative transfer check the chain of reabsorption itself.
 */
import type { BeamDescription, Description, Vector3 } from '../design/description.js';
import { radians } from './fresnel-law.js';
import { cell, dye, ENDLESS, lambertianDisc, medium, PUMP_NM, part, pump, thinBeam } from './proof-cells.js';

const INDEX = 1.36;
const SIDE_MM = 10;
/** Height of the diffuse source above the face, mm: all but one ray in 10⁸ meet the face. */
const NEAR_MM = 0.0005;

/** How the light falls on the slab: along the normal, at 60° to it (µ₀ = 0.5), or from everywhere. */
export type Incidence = 'normal' | '60' | 'diffuse';
export const INCIDENCE_WORDS: Readonly<Record<Incidence, string>> = {
  normal: 'normal incidence',
  '60': 'incidence at 60°',
  diffuse: 'diffuse incidence',
};

/** A slab without end of optical thickness `tau` and yield `albedo`, lit on its top; its bottom is the exit. */
export function scatteringSlab(tau: number, albedo: number, incidence: Incidence): Description {
  const thickness = Math.max(1, tau / 10);
  const top = thickness / 2;
  return cell(`tau ${tau}, albedo ${albedo}, ${incidence}`, {
    media: [medium('dyed', INDEX, { dyes: [dye('dye', tau / thickness, albedo, PUMP_NM)] }), medium('matched', INDEX)],
    around: 'matched',
    parts: [part('slab', 'dyed', { kind: 'box', size: [SIDE_MM, SIDE_MM, thickness] }, { faces: ENDLESS })],
    pumps: [pump(...lit(incidence, top))],
    exit: 'slab.bottom',
  });
}

function lit(incidence: Incidence, top: number): [Vector3, Vector3, BeamDescription] {
  if (incidence === 'diffuse') return [[0, 0, top + NEAR_MM], [0, 0, -1], lambertianDisc(0.01)];
  const angle = radians(incidence === '60' ? 60 : 0);
  const along: Vector3 = [Math.sin(angle), 0, -Math.cos(angle)];
  return [[-along[0], 0, top - along[2]], along, thinBeam()];
}
