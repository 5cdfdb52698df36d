import type { Curve } from '../units/curve.js';
import type { EmissionWeights } from './emission-weights.js';

/**
 * Chance that a dye's own absorption takes an emitted photon back on a straight path: 1 − ∫ E(λ) exp(−μ(λ) L) dλ, E in photons per nm
 * of area 1. Beer–Lambert's law averaged over the emission; Birks, Photophysics of Aromatic Molecules (1970; from memory).
 * @param absorption Napierian, 1/mm
 */
export function overlapProbability({ nm, weights }: EmissionWeights, absorption: Curve, pathMm: number): number {
  let taken = 0;
  for (let i = 0; i < nm.length; i++) taken += weights[i] * -Math.expm1(-Math.max(0, absorption(nm[i])) * pathMm);
  return taken;
}

/**
 * Photons that get away per photon absorbed when each emission is taken back with probability a: Φ' = Φ(1 − a)/(1 − aΦ).
 * Birks, Photophysics of Aromatic Molecules (1970; from memory).
 */
export function escapingYield(quantumYield: number, overlap: number): number {
  return (quantumYield * (1 - overlap)) / (1 - overlap * quantumYield);
}
