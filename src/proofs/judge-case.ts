import type { Estimate } from './estimate.js';
import type { ProofCase } from './proof.js';

/** Width of the band, standard errors: one false alarm in 16 000 cases. */
export const STANDARD_ERRORS_ALLOWED = 4;
/** Sums of ten thousand doubles: what arithmetic alone may differ by. */
const ARITHMETIC = 1e-9;

/** Puts a measured number beside the expected one. */
export function compare(
  label: string,
  against: string,
  measured: Estimate,
  expected: number,
  tolerance = 0,
): ProofCase {
  const { value } = measured;
  // A ratio without chance in it still scatters in its last digits.
  const floor = ARITHMETIC * Math.max(1, Math.abs(value));
  const standardError = measured.standardError <= floor ? 0 : measured.standardError;
  return {
    label,
    against,
    measured: value,
    standardError,
    expected,
    tolerance,
    deviation: standardError === 0 ? null : (value - expected) / standardError,
  };
}

/** True when the case lies inside its band. NaN never does. */
export function passes(proofCase: ProofCase): boolean {
  const { measured, expected, standardError, tolerance } = proofCase;
  return Math.abs(measured - expected) <= STANDARD_ERRORS_ALLOWED * standardError + tolerance + ARITHMETIC;
}
