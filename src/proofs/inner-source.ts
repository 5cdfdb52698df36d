/** An isotropic source inside a cell: a dye that takes the pump at once and emits every photon at a wavelength it does not take. */
import type { BeamDescription, MediumDescription, PumpDescription, Vector3 } from '../design/description.js';
import type { Curve } from '../units/curve.js';
import { dye, medium, pump, thinBeam, twoColour } from './proof-cells.js';

/** Of the pump, 1/mm: half of it is gone after 0.7 µm. */
export const AT_ONCE = 1000;

/** A medium that glows isotropically with yield 1 where the pump enters it; `absorption` is the bare medium's, 1/mm. */
export function glowing(name: string, index: number, absorption: number | Curve = 0): MediumDescription {
  return medium(name, index, { absorption, dyes: [dye('glow', twoColour(AT_ONCE, 0), 1)] });
}

/** A pump that lights the glow at a point inside. */
export function innerSource(at: Vector3 = [0, 0, 0], beam: BeamDescription = thinBeam()): PumpDescription {
  return pump(at, [1, 0, 0], beam);
}
