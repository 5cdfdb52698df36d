import type { Curve } from '../units/curve.js';

/**
 * CIE standard illuminant D65, relative spectral power, 380 to 780 nm in steps of 10 nm (ISO/CIE 11664-2:2022, table 1;
 * from memory). The standard interpolates linearly between these.
 */
const D65_POWER = [
  49.9755, 54.6482, 82.7549, 91.486, 93.4318, 86.6823, 104.865, 117.008, 117.812, 114.861, 115.923, 108.811, 109.354,
  107.802, 104.79, 107.689, 104.405, 104.046, 100, 96.3342, 95.788, 88.6856, 90.0062, 89.5991, 87.6987, 83.2886,
  83.6992, 80.0268, 80.2146, 82.2778, 78.2842, 69.7213, 71.6091, 74.349, 61.604, 69.8856, 75.087, 63.5927, 46.4182,
  66.8054, 63.3828,
] as const;

export const D65_FROM_NM = 380;
export const D65_TO_NM = 780;

/** Relative spectral power of D65; 0 outside 380 to 780 nm. */
export const d65Power: Curve = (nm) => {
  if (nm < D65_FROM_NM || nm > D65_TO_NM) return 0;
  const place = Math.min((nm - D65_FROM_NM) / 10, D65_POWER.length - 1.000001);
  const low = Math.floor(place);
  return D65_POWER[low] + (place - low) * (D65_POWER[low + 1] - D65_POWER[low]);
};
