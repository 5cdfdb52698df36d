/** How a dye's own crowding lowers its yield: published laws, each as yield at a strength over that of the dilute dye. */
import { scaledErfc } from '../numerics/error-function.js';

/** A law with its constants. */
export type QuenchingLaw =
  /** Transfer from dye to dye until a dark dimer traps it (Bojarski, J. Lumin. 5 413 (1972)); radii in nm, pairing constant in L/mol. */
  | {
      readonly kind: 'transfer-to-dimers';
      readonly radiusNm: number;
      readonly dimerRadiusNm: number;
      readonly pairing: number;
    }
  /** 1/(1 + (c/half)²), empirical; half in mol/L. */
  | { readonly kind: 'half-strength'; readonly half: number }
  /** 1/(1 + K c), K in L/mol (Stern & Volmer 1919). */
  | { readonly kind: 'stern-volmer'; readonly constant: number }
  /** exp(−c/critical), mol/L (Perrin 1924). */
  | { readonly kind: 'perrin'; readonly critical: number };

export interface Quenched {
  /** Yield at this strength over that of the dilute dye, per absorbed photon, 0..1. */
  readonly factor: number;
  /** Share of the molecules bound in dimers, 0..1. */
  readonly dimerShare: number;
}

/**
 * @param concentration mol/L of dye, however bound. Dimers are taken to absorb as two single molecules would, and to stay dark.
 * @throws RangeError for a negative concentration
 */
export function selfQuenching(law: QuenchingLaw, concentration: number): Quenched {
  if (!(concentration >= 0)) throw new RangeError(`no concentration: ${concentration} mol/L`);
  switch (law.kind) {
    case 'transfer-to-dimers': {
      const { pairing, radiusNm, dimerRadiusNm } = law;
      const singles = singleMolecules(pairing, concentration);
      const alone = concentration === 0 ? 1 : singles / concentration;
      return {
        factor: alone * hoppingYield(singles, (concentration - singles) / 2, radiusNm, dimerRadiusNm),
        dimerShare: 1 - alone,
      };
    }
    case 'half-strength':
      return { factor: 1 / (1 + (concentration / law.half) ** 2), dimerShare: 0 };
    case 'stern-volmer':
      return { factor: 1 / (1 + law.constant * concentration), dimerShare: 0 };
    case 'perrin':
      return { factor: Math.exp(-concentration / law.critical), dimerShare: 0 };
  }
}

/** Concentration of single molecules, mol/L, where 2 M ⇌ D with K = [D]/[M]². @param pairing K, L/mol */
export function singleMolecules(pairing: number, concentration: number): number {
  // The root of 2 K m² + m − c = 0 without loss of digits.
  return (2 * concentration) / (1 + Math.sqrt(1 + 8 * pairing * concentration));
}

/** Concentration at which a sphere of the transfer radius holds one molecule, mol/L; R₀ in nm (Förster 1948). */
export const criticalConcentration = (radiusNm: number): number => 3 / (4 * Math.PI * 0.602214076 * radiusNm ** 3);

/**
 * Yield of what single molecules absorb, over that of the dilute dye (Bojarski 1972, α₀ = 1):
 * (1 − f(γ))/(1 − α f(γ)), f = √π γ exp(γ²) erfc(γ), γ = (√π/2)(c_M/c₀M + c_D/c₀D), α the share of γ due to single molecules.
 * @param singles mol/L of single molecules @param dimers mol/L of dimers
 */
export function hoppingYield(singles: number, dimers: number, radiusNm: number, dimerRadiusNm: number): number {
  const own = singles / criticalConcentration(radiusNm);
  const traps = dimers / criticalConcentration(dimerRadiusNm);
  if (traps === 0) return 1;
  const gamma = (Math.sqrt(Math.PI) / 2) * (own + traps);
  const f = Math.sqrt(Math.PI) * gamma * scaledErfc(gamma);
  return (1 - f) / (1 - (own / (own + traps)) * f);
}
