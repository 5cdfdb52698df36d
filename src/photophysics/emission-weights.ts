import type { Curve } from '../units/curve.js';

/** Photons of an emission by wavelength; the weights add up to 1. */
export interface EmissionWeights {
  readonly nm: Float64Array;
  readonly weights: Float64Array;
}

/** What is known of an emission: one line, or photons per nm between two wavelengths. */
export type EmissionShape =
  | { readonly kind: 'line'; readonly wavelengthNm: number }
  | { readonly kind: 'spectrum'; readonly photonsPerNm: Curve; readonly fromNm: number; readonly toNm: number };

/** Cells of `stepNm` or a little less, each valued at its middle (midpoint rule). */
export function emissionWeights(emission: EmissionShape, stepNm = 0.5): EmissionWeights {
  if (emission.kind === 'line') return { nm: Float64Array.of(emission.wavelengthNm), weights: Float64Array.of(1) };
  const { photonsPerNm, fromNm, toNm } = emission;
  const cells = Math.max(1, Math.ceil((toNm - fromNm) / stepNm));
  const width = (toNm - fromNm) / cells;
  const nm = Float64Array.from({ length: cells }, (_, i) => fromNm + (i + 0.5) * width);
  const photons = nm.map((at) => Math.max(0, photonsPerNm(at)));
  const total = photons.reduce((a, b) => a + b, 0);
  return { nm, weights: photons.map((count) => (total > 0 ? count / total : 0)) };
}
