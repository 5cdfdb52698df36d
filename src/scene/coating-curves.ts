/** Curves of a finish over wavelength and angle, for a look at it without any cell. */
import type { FinishDescription, MediumDescription } from '../design/description.js';
import { finishResponse } from './finish-response.js';

/** Light through the finish one way. */
export interface Passage {
  readonly from: MediumDescription;
  readonly to: MediumDescription;
  /** From outside of the face into its part. */
  readonly inward: boolean;
}

export interface CoatingCurves {
  readonly from: string;
  readonly to: string;
  readonly wavelengthsNm: readonly number[];
  readonly anglesDeg: readonly number[];
  /** [wavelength · angles + angle], shares of s light, of p light. */
  readonly reflectanceS: Float64Array;
  readonly reflectanceP: Float64Array;
  readonly transmittanceS: Float64Array;
  readonly transmittanceP: Float64Array;
  /** Angle beyond which nothing gets through, degrees, at the middle wavelength; null without one. */
  readonly criticalDeg: number | null;
}

/** At 90° nothing meets a face: the last angle stands just before it. */
const GRAZING_DEG = 89.999;

export function coatingCurves(
  finish: FinishDescription,
  { from, to, inward }: Passage,
  wavelengthsNm: readonly number[],
  anglesDeg: readonly number[],
): CoatingCurves {
  const size = wavelengthsNm.length * anglesDeg.length;
  const curves = {
    reflectanceS: new Float64Array(size),
    reflectanceP: new Float64Array(size),
    transmittanceS: new Float64Array(size),
    transmittanceP: new Float64Array(size),
  };
  wavelengthsNm.forEach((wavelengthNm, w) => {
    const indexHere = from.index(wavelengthNm);
    const indexBeyond = to.index(wavelengthNm);
    anglesDeg.forEach((degrees, a) => {
      const cosine = Math.cos((Math.min(degrees, GRAZING_DEG) * Math.PI) / 180);
      const { s, p } = finishResponse(finish, { indexHere, indexBeyond, cosine, wavelengthNm, inward });
      const at = w * anglesDeg.length + a;
      curves.reflectanceS[at] = s.reflectance;
      curves.reflectanceP[at] = p.reflectance;
      curves.transmittanceS[at] = s.transmittance;
      curves.transmittanceP[at] = p.transmittance;
    });
  });
  const middle = wavelengthsNm[wavelengthsNm.length >> 1];
  const sine = to.index(middle) / from.index(middle);
  const criticalDeg = sine < 1 ? (Math.asin(sine) * 180) / Math.PI : null;
  return { from: from.name, to: to.name, wavelengthsNm, anglesDeg, ...curves, criticalDeg };
}
