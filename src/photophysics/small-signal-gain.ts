import type { Curve } from '../units/curve.js';

/** A dye where its light is densest. Densities in 1/cm³, cross-sections in cm². */
export interface PumpedDye {
  readonly excited: number;
  readonly ground: number;
  /** By wavelength, nm. */
  readonly stimulated: Curve;
  readonly absorption: Curve;
}

export interface Gain {
  /** Net gain, 1/cm; below 0 the liquid absorbs at every wavelength looked at. */
  readonly perCm: number;
  readonly wavelengthNm: number;
}

/**
 * Largest small-signal gain over wavelengths: g(λ) = Σ n₁ σ_e(λ) − n₀ σ_a(λ) over the dyes, less what the bare liquid absorbs. Absorption by
 * excited and triplet molecules, for which there are no data, is left out: the true gain is smaller.
 * Source: any text on dye lasers, as in Schäfer (ed.), Dye Lasers (from memory).
 * @param bare Napierian absorption of the bare liquid, 1/cm
 */
export function largestGain(dyes: readonly PumpedDye[], bare: Curve, wavelengthsNm: Iterable<number>): Gain | null {
  let best: Gain | null = null;
  for (const nm of wavelengthsNm) {
    let perCm = -bare(nm);
    for (const { excited, ground, stimulated, absorption } of dyes) {
      perCm += excited * stimulated(nm) - ground * absorption(nm);
    }
    if (best === null || perCm > best.perCm) best = { perCm, wavelengthNm: nm };
  }
  return best;
}
