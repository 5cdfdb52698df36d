/** An idealised dichroic, the same at every angle; wavelengths in nm, shares 0..1. */
export interface DichroicLaw {
  readonly edgeNm: number;
  /** Over which the step goes from 10 to 90 %; 0 is sharp. */
  readonly widthNm: number;
  /** Side of the edge that is let through. */
  readonly passes: 'below' | 'above';
  /** Transmittance of the pass band. */
  readonly transmits: number;
  /** Reflectance of the stop band. */
  readonly reflects: number;
  /** Absorptance at every wavelength. */
  readonly absorbs: number;
}

/** A logistic goes from 10 to 90 % over this many of its scale lengths. */
const TEN_TO_NINETY = 2 * Math.log(9);

/**
 * Shares of a dichroic at a wavelength: the pass band transmits `transmits` and reflects the rest but `absorbs`, the stop band
 * reflects `reflects` and transmits the rest but `absorbs`; a logistic leads from one to the other. The edge itself passes
 * half, or all if the edge is sharp.
 */
export function dichroicShares(
  { edgeNm, widthNm, passes, transmits, reflects, absorbs }: DichroicLaw,
  wavelengthNm: number,
): { reflectance: number; transmittance: number } {
  const inside = passes === 'below' ? edgeNm - wavelengthNm : wavelengthNm - edgeNm;
  const pass = widthNm === 0 ? Number(inside >= 0) : 1 / (1 + Math.exp((-inside * TEN_TO_NINETY) / widthNm));
  const share = pass * transmits + (1 - pass) * (1 - reflects - absorbs);
  // Rounding must not leave a share just below nothing.
  const transmittance = Math.max(0, share);
  return { transmittance, reflectance: Math.max(0, 1 - transmittance - absorbs) };
}
