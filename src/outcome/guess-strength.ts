/** A first guess of how strong a dye should be, before any tracing. */
import type { DissolvedDye } from '../design/description.js';
import { emissionWeights } from '../photophysics/emission-weights.js';
import { firstStrength, type StrengthGuess } from '../photophysics/first-strength.js';

/** What a guess knows of the ways light takes. */
export interface GuessPaths {
  readonly pumps: readonly { readonly share: number; readonly wavelengthNm: number; readonly pathMm: number }[];
  /** Mean way of emitted light, whose lengths are taken to be spread exponentially. */
  readonly emittedPathMm: number;
}

/**
 * The strength at which most photons get away after one straight crossing of the pump: Σ (1 − exp(−μL)) × Φ(1 − a)/(1 − aΦ) with
 * a = ∫ E(λ) μℓ/(1 + μℓ) dλ, the overlap over exponentially spread paths of mean ℓ.
 * @param yieldAt quantum yield at so many times the strength at hand
 */
export function guessStrength(
  dye: DissolvedDye,
  { pumps, emittedPathMm }: GuessPaths,
  yieldAt: (times: number) => number = () => dye.quantumYield,
): StrengthGuess {
  const { nm, weights } = emissionWeights(dye.emission, 1);
  const depths = nm.map((at) => Math.max(0, dye.absorption(at)) * emittedPathMm);
  return firstStrength({
    absorbed: (times) =>
      pumps.reduce(
        (sum, { share, wavelengthNm, pathMm }) =>
          sum - share * Math.expm1(-times * Math.max(0, dye.absorption(wavelengthNm)) * pathMm),
        0,
      ),
    overlap: (times) => depths.reduce((sum, depth, i) => sum + (weights[i] * times * depth) / (1 + times * depth), 0),
    quantumYield: yieldAt,
  });
}
