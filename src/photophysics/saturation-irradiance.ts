import { photonEnergyJ } from '../units/constants.js';

/**
 * Irradiance, W/cm², at which a ground-state molecule is excited once in a lifetime: hν/(σ τ). Of two levels half are then excited.
 * Source: any text on dye lasers, as in Schäfer (ed.), Dye Lasers (from memory).
 * @returns Infinity where the dye does not absorb
 */
export function saturationIrradiance(wavelengthNm: number, crossSectionCm2: number, lifetimeNs: number): number {
  return photonEnergyJ(wavelengthNm) / (crossSectionCm2 * lifetimeNs * 1e-9);
}
