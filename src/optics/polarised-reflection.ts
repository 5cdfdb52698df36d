/**
 * Reflection of s and p light apart, with what it does to their phases. Amplitudes r follow Born & Wolf, Principles of Optics, §1.5:
 * p is direction × s both before and after; the time law is exp(+iωt), so that an absorbing index is n − ik.
 */

/** Places in what these functions write, from `at` on. */
export const enum REFLECTION {
  s = 0,
  p = 1,
  /** Real and imaginary part of r_s · conjugate of r_p. */
  real = 2,
  imaginary = 3,
}

/**
 * Smooth interface of two transparent media, total reflection with its phases (Born & Wolf §1.5.4) included.
 * @param cosIncident 0..1 @param out reflectances and cross product, from `at` on
 */
export function reflectTransparent(
  nIncident: number,
  nTransmitted: number,
  cosIncident: number,
  out: Float64Array,
  at: number,
): void {
  const ratio = nIncident / nTransmitted;
  const sine2 = ratio * ratio * (1 - cosIncident * cosIncident);
  if (sine2 >= 1) {
    const kappa = Math.sqrt(sine2 - 1);
    const turn =
      2 * Math.atan2(nTransmitted * kappa, nIncident * cosIncident) -
      2 * Math.atan2(nIncident * kappa, nTransmitted * cosIncident);
    out[at + REFLECTION.s] = 1;
    out[at + REFLECTION.p] = 1;
    out[at + REFLECTION.real] = Math.cos(turn);
    out[at + REFLECTION.imaginary] = Math.sin(turn);
    return;
  }
  const cosTransmitted = Math.sqrt(1 - sine2);
  const a = nIncident * cosIncident;
  const b = nTransmitted * cosTransmitted;
  const c = nIncident * cosTransmitted;
  const d = nTransmitted * cosIncident;
  const s = (a - b) / (a + b);
  const p = (d - c) / (d + c);
  out[at + REFLECTION.s] = s * s;
  out[at + REFLECTION.p] = p * p;
  out[at + REFLECTION.real] = s * p;
  out[at + REFLECTION.imaginary] = 0;
}

/** Opaque metal of index n − ik under a transparent medium (Born & Wolf §14.2). */
export function reflectMetal(
  nIncident: number,
  n: number,
  k: number,
  cosIncident: number,
  out: Float64Array,
  at: number,
): void {
  const sin2 = 1 - cosIncident * cosIncident;
  // m² = (n − ik)²/nIncident², g = √(m² − sin²) = u − iv.
  const mReal = (n * n - k * k) / (nIncident * nIncident);
  const mImaginary = (-2 * n * k) / (nIncident * nIncident);
  const real = mReal - sin2;
  const modulus = Math.sqrt(real * real + mImaginary * mImaginary);
  const u = Math.sqrt(Math.max(0, 0.5 * (modulus + real)));
  const v = Math.sqrt(Math.max(0, 0.5 * (modulus - real)));
  // r_s = (cos − g)/(cos + g), r_p = (m² cos − g)/(m² cos + g).
  const c = cosIncident;
  const sNorm = (c + u) * (c + u) + v * v;
  const sReal = (c * c - u * u - v * v) / sNorm;
  const sImaginary = (2 * c * v) / sNorm;
  const x = mReal * c;
  const y = mImaginary * c;
  const pNorm = (x + u) * (x + u) + (y - v) * (y - v);
  const pReal = (x * x + y * y - u * u - v * v) / pNorm;
  const pImaginary = (2 * (x * v + y * u)) / pNorm;
  out[at + REFLECTION.s] = sReal * sReal + sImaginary * sImaginary;
  out[at + REFLECTION.p] = pReal * pReal + pImaginary * pImaginary;
  out[at + REFLECTION.real] = sReal * pReal + sImaginary * pImaginary;
  out[at + REFLECTION.imaginary] = sImaginary * pReal - sReal * pImaginary;
}
