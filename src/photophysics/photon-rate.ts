import { ELEMENTARY_CHARGE_C } from '../units/constants.js';

/** Photons per second of a power in W, at a mean photon energy in eV. */
export const photonRate = (watts: number, meanEv: number): number => watts / (meanEv * ELEMENTARY_CHARGE_C);
