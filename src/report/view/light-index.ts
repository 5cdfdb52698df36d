/** Wavelengths of paths as bytes: steps of 2 nm from 350 nm. */
const FROM_NM = 350;
const STEP_NM = 2;
export const LIGHTS = 256;

export function lightIndex(wavelengthNm: number): number {
  return Math.min(LIGHTS - 1, Math.max(0, Math.round((wavelengthNm - FROM_NM) / STEP_NM)));
}

export function lightNm(index: number): number {
  return FROM_NM + STEP_NM * index;
}
