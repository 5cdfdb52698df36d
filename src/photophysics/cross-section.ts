import { AVOGADRO_PER_MOL } from '../units/constants.js';

/**
 * Absorption cross-section of one molecule, cm², from a Napierian absorption of 1/mm at a strength of mol/L: σ = μ/n.
 * (With a decadic molar extinction ε in L/(mol cm): σ = ln 10 · 1000 ε/N_A; IUPAC Gold Book, "absorption cross-section".)
 */
export function crossSectionCm2(absorptionPerMm: number, molesPerLitre: number): number {
  return (10 * absorptionPerMm) / moleculesPerCm3(molesPerLitre);
}

/** Number density, 1/cm³, of a strength in mol/L. */
export const moleculesPerCm3 = (molesPerLitre: number): number => molesPerLitre * 1e-3 * AVOGADRO_PER_MOL;
