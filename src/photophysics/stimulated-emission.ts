import { SPEED_OF_LIGHT_M_PER_S } from '../units/constants.js';

/**
 * Cross-section of stimulated emission, cm², from a fluorescence spectrum: σ_e(λ) = λ⁴ Φ E(λ)/(8π n² c τ), with E in photons per
 * wavelength and of area 1. Source: Füchtbauer–Ladenburg relation as used for dyes, Peterson, Webb, McColgin & Eberly,
 * J. Appl. Phys. 42 (1971) 1917 (from memory).
 * @param photonsPerNm E, 1/nm
 */
export function stimulatedCrossSectionCm2(
  wavelengthNm: number,
  photonsPerNm: number,
  quantumYield: number,
  lifetimeNs: number,
  index: number,
): number {
  const lambdaCm = wavelengthNm * 1e-7;
  const perCm = photonsPerNm * 1e7;
  const cmPerS = SPEED_OF_LIGHT_M_PER_S * 100;
  return (lambdaCm ** 4 * quantumYield * perCm) / (8 * Math.PI * index ** 2 * cmPerS * lifetimeNs * 1e-9);
}
