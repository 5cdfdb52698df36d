import type { Curve } from '../units/curve.js';

/** What is compared reaches so far to either side of the peaks. */
const STEP_PER_CM = 20;
const REACH_PER_CM = 4000;

export interface MirrorImage {
  /** Peak of emission below that of absorption, 1/cm; negative where light comes out bluer than it goes in. */
  readonly shiftPerCm: number;
  /** Cosine of the angle between ε(ν)/ν and the mirrored F(ν)/ν³, peaks laid on each other; 1 for a perfect mirror image. */
  readonly likeness: number;
}

/** How far emission is the mirror image of the first absorption band (Levshin's rule, from memory). Null for spectra without peaks. */
export function mirrorImage(
  extinction: Curve,
  photonsPerNm: Curve,
  emissionNm: readonly [number, number],
  absorptionNm: readonly [number, number],
): MirrorImage | null {
  const absorbed = (perCm: number) => Math.max(0, extinction(1e7 / perCm)) / perCm;
  // Photons per nm to photons per 1/cm: λ² ∝ ν⁻²; over ν³ for the density of modes.
  const emitted = (perCm: number) => Math.max(0, photonsPerNm(1e7 / perCm)) / perCm ** 5;
  const a = peakOf(absorbed, absorptionNm);
  const e = peakOf(emitted, emissionNm);
  if (a === null || e === null) return null;
  let [both, first, second] = [0, 0, 0];
  for (let d = -REACH_PER_CM; d <= REACH_PER_CM; d += STEP_PER_CM) {
    const [x, y] = [absorbed(a + d), emitted(e - d)];
    both += x * y;
    first += x * x;
    second += y * y;
  }
  return { shiftPerCm: a - e, likeness: both / Math.sqrt(first * second) };
}

/** Wavenumber of the highest point, 1/cm. */
function peakOf(value: (perCm: number) => number, [fromNm, toNm]: readonly [number, number]): number | null {
  let [at, top] = [Number.NaN, 0];
  for (let perCm = 1e7 / toNm; perCm <= 1e7 / fromNm; perCm += STEP_PER_CM) {
    if (value(perCm) > top) [at, top] = [perCm, value(perCm)];
  }
  return top > 0 ? at : null;
}
