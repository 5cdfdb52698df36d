/** What a stack does to the phase between s and p light. */
import { AMPLITUDES } from './thin-film-stack.js';

/** Slots of what `stackProducts` fills in: amplitude of s times the conjugate of that of p. */
export const enum PRODUCTS {
  reflectedReal = 0,
  reflectedImaginary = 1,
  transmittedReal = 2,
  transmittedImaginary = 3,
  COUNT = 4,
}

/**
 * From the amplitudes of `stackAmplitudes`, in the conventions of `polarised-reflection.ts`: p is direction × s, so that r_p is the negative
 * of that of the tangential field, and t_p that one times cos θ/cos θ'. The transmitted product is one of powers: |product|² = T_s·T_p.
 * @param ratio index beyond the stack over that before it
 * @param out PRODUCTS.COUNT numbers
 */
export function stackProducts(amplitudes: Float64Array, ratio: number, out: Float64Array): void {
  const rsr = amplitudes[AMPLITUDES.reflectedSReal];
  const rsi = amplitudes[AMPLITUDES.reflectedSImaginary];
  const rpr = amplitudes[AMPLITUDES.reflectedPReal];
  const rpi = amplitudes[AMPLITUDES.reflectedPImaginary];
  out[PRODUCTS.reflectedReal] = -(rsr * rpr + rsi * rpi);
  out[PRODUCTS.reflectedImaginary] = -(rsi * rpr - rsr * rpi);
  // √(T_s/|t_s|² · T_p/|t_p|²) = √(n'cos θ'/(n cos θ) · n'cos θ/(n cos θ')) = n'/n.
  const tsr = amplitudes[AMPLITUDES.transmittedSReal];
  const tsi = amplitudes[AMPLITUDES.transmittedSImaginary];
  const tpr = amplitudes[AMPLITUDES.transmittedPReal];
  const tpi = amplitudes[AMPLITUDES.transmittedPImaginary];
  out[PRODUCTS.transmittedReal] = ratio * (tsr * tpr + tsi * tpi);
  out[PRODUCTS.transmittedImaginary] = ratio * (tsi * tpr - tsr * tpi);
}
