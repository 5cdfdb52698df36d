import type { Curve } from '../units/curve.js';

/** The first band is taken to end at the lowest point within this of its peak, 1/cm. */
const BAND_PER_CM = 5000;

/**
 * Lifetime a dye would have were light its only decay, ns, from its spectra (Strickler & Berg, J. Chem. Phys. 37 814 (1962)):
 * 1/τ = 2.880e-9 n² ⟨ν⁻³⟩⁻¹ ∫ε dν/ν over the first absorption band, ν in 1/cm, ⟨ν⁻³⟩ over the emitted photons. Null where it cannot be told.
 */
export function naturalLifetime(
  extinction: Curve,
  photonsPerNm: Curve,
  [emissionFromNm, emissionToNm]: readonly [number, number],
  [absorptionFromNm, absorptionToNm]: readonly [number, number],
  index: number,
): number | null {
  const step = 0.5;
  let [photons, cubes] = [0, 0];
  for (let nm = emissionFromNm; nm <= emissionToNm; nm += step) {
    const weight = Math.max(0, photonsPerNm(nm));
    photons += weight;
    cubes += weight * (nm / 1e7) ** 3;
  }
  let [peakNm, peak] = [Number.NaN, 0];
  for (let nm = absorptionFromNm; nm <= absorptionToNm; nm += step) {
    if (extinction(nm) > peak) [peakNm, peak] = [nm, extinction(nm)];
  }
  if (!(photons > 0 && peak > 0)) return null;
  const end = Math.max(absorptionFromNm, 1e7 / (1e7 / peakNm + BAND_PER_CM));
  let fromNm = peakNm;
  for (let nm = peakNm; nm >= end; nm -= step) {
    if (extinction(nm) < extinction(fromNm)) fromNm = nm;
  }
  // dν/ν = dλ/λ.
  let band = 0;
  for (let nm = fromNm; nm <= absorptionToNm; nm += step) band += (Math.max(0, extinction(nm)) * step) / nm;
  const rate = (2.88e-9 * index * index * band) / (cubes / photons);
  return rate > 0 ? 1e9 / rate : null;
}
