/**
 * Light scattered by a sphere: Mie's series, summed as in Bohren & Huffman, Absorption and Scattering of Light by Small Particles (1983)
 * chapter 4 and appendix A; number of terms after Wiscombe, Appl. Opt. 19 1505 (1980).
 */

/** Coefficients a_n and b_n for n = 1 … order, real and imaginary parts in turn: a_n stands at 2(n − 1). */
export interface MieSeries {
  /** 2π · radius · index around / wavelength in vacuum. */
  readonly size: number;
  readonly order: number;
  readonly a: Float64Array;
  readonly b: Float64Array;
}

export interface MieEfficiencies {
  /** Cross sections over π · radius². */
  readonly extinction: number;
  readonly scattering: number;
  /** Differential cross section straight back, times 4 over radius² (as in appendix A). */
  readonly back: number;
  /** Mean cosine of the scattering angle. */
  readonly anisotropy: number;
}

/** Slots of what `mieAmplitudes` fills in. */
export const enum AMPLITUDE {
  s1Real = 0,
  s1Imaginary = 1,
  s2Real = 2,
  s2Imaginary = 3,
  COUNT = 4,
}

/**
 * @param size above 0
 * @param n real part of the sphere's index over the index around
 * @param k imaginary part of it; above 0 absorbs
 * @throws RangeError for a size, n or k that no sphere has
 */
export function mieSeries(size: number, n: number, k: number): MieSeries {
  if (!(size > 0 && Number.isFinite(size))) throw new RangeError(`a sphere cannot have the size ${size}`);
  if (!(n > 0 && k >= 0)) throw new RangeError(`a sphere cannot have the index ${n} + ${k}i`);
  const order = wiscombeOrder(size);
  const [dReal, dImaginary] = logarithmicDerivatives(size * n, size * k, order);
  const a = new Float64Array(2 * order);
  const b = new Float64Array(2 * order);
  const norm = n * n + k * k;
  // Riccati-Bessel functions by upward recurrence: ψ, and χ with ξ = ψ − iχ.
  let psiBefore = Math.cos(size);
  let psi = Math.sin(size);
  let chiBefore = -Math.sin(size);
  let chi = Math.cos(size);
  for (let m = 1; m <= order; m++) {
    const psiNext = ((2 * m - 1) / size) * psi - psiBefore;
    const chiNext = ((2 * m - 1) / size) * chi - chiBefore;
    const re = dReal[m];
    const im = dImaginary[m];
    coefficient(a, m, (re * n + im * k) / norm + m / size, (im * n - re * k) / norm, psi, psiNext, chi, chiNext);
    coefficient(b, m, re * n - im * k + m / size, re * k + im * n, psi, psiNext, chi, chiNext);
    psiBefore = psi;
    psi = psiNext;
    chiBefore = chi;
    chi = chiNext;
  }
  return { size, order, a, b };
}

/** (f ψ_m − ψ_m−1) / (f ξ_m − ξ_m−1) for a complex f. */
function coefficient(
  out: Float64Array,
  m: number,
  re: number,
  im: number,
  psiBefore: number,
  psi: number,
  chiBefore: number,
  chi: number,
): void {
  const upReal = re * psi - psiBefore;
  const upImaginary = im * psi;
  const downReal = upReal + im * chi;
  const downImaginary = upImaginary - re * chi + chiBefore;
  const norm = downReal * downReal + downImaginary * downImaginary;
  out[2 * m - 2] = (upReal * downReal + upImaginary * downImaginary) / norm;
  out[2 * m - 1] = (upImaginary * downReal - upReal * downImaginary) / norm;
}

function wiscombeOrder(size: number): number {
  const root = Math.cbrt(size);
  if (size <= 8) return Math.max(2, Math.round(size + 4 * root + 1));
  return Math.round(size < 4200 ? size + 4.05 * root + 2 : size + 4 * root + 2);
}

/** ψ′/ψ of a complex argument by downward recurrence, which is stable (appendix A). */
function logarithmicDerivatives(re: number, im: number, order: number): [Float64Array, Float64Array] {
  const first = Math.round(Math.max(order, Math.hypot(re, im))) + 60;
  const dReal = new Float64Array(first + 1);
  const dImaginary = new Float64Array(first + 1);
  const norm = re * re + im * im;
  for (let m = first; m > 0; m--) {
    const overReal = (m * re) / norm;
    const overImaginary = (-m * im) / norm;
    const sumReal = dReal[m] + overReal;
    const sumImaginary = dImaginary[m] + overImaginary;
    const sumNorm = sumReal * sumReal + sumImaginary * sumImaginary;
    dReal[m - 1] = overReal - sumReal / sumNorm;
    dImaginary[m - 1] = overImaginary + sumImaginary / sumNorm;
  }
  return [dReal, dImaginary];
}

/** Efficiencies and mean cosine: Bohren & Huffman equations 4.61, 4.62 and section 4.5. */
export function mieEfficiencies({ size, order, a, b }: MieSeries): MieEfficiencies {
  let scattering = 0;
  let extinction = 0;
  let cosine = 0;
  let backReal = 0;
  let backImaginary = 0;
  for (let m = 1; m <= order; m++) {
    const at = 2 * m - 2;
    const weight = 2 * m + 1;
    scattering += weight * (a[at] ** 2 + a[at + 1] ** 2 + b[at] ** 2 + b[at + 1] ** 2);
    extinction += weight * (a[at] + b[at]);
    cosine += (weight / (m * (m + 1))) * (a[at] * b[at] + a[at + 1] * b[at + 1]);
    if (m < order) {
      const both = a[at] * a[at + 2] + a[at + 1] * a[at + 3] + b[at] * b[at + 2] + b[at + 1] * b[at + 3];
      cosine += ((m * (m + 2)) / (m + 1)) * both;
    }
    const sign = m % 2 === 0 ? 1 : -1;
    backReal += sign * weight * (a[at] - b[at]);
    backImaginary += sign * weight * (a[at + 1] - b[at + 1]);
  }
  return {
    extinction: (2 / size ** 2) * extinction,
    scattering: (2 / size ** 2) * scattering,
    back: (backReal ** 2 + backImaginary ** 2) / size ** 2,
    anisotropy: (2 * cosine) / scattering,
  };
}

/** S₁ (across the plane of scattering) and S₂ (in it) at a cosine of the scattering angle, into `out` (equation 4.74). */
export function mieAmplitudes({ order, a, b }: MieSeries, cosine: number, out: Float64Array): void {
  let s1Real = 0;
  let s1Imaginary = 0;
  let s2Real = 0;
  let s2Imaginary = 0;
  let piBefore = 0;
  let pi = 1;
  for (let m = 1; m <= order; m++) {
    const tau = m * cosine * pi - (m + 1) * piBefore;
    const weight = (2 * m + 1) / (m * (m + 1));
    const p = weight * pi;
    const t = weight * tau;
    const at = 2 * m - 2;
    s1Real += a[at] * p + b[at] * t;
    s1Imaginary += a[at + 1] * p + b[at + 1] * t;
    s2Real += a[at] * t + b[at] * p;
    s2Imaginary += a[at + 1] * t + b[at + 1] * p;
    const piNext = ((2 * m + 1) * cosine * pi - (m + 1) * piBefore) / m;
    piBefore = pi;
    pi = piNext;
  }
  out[AMPLITUDE.s1Real] = s1Real;
  out[AMPLITUDE.s1Imaginary] = s1Imaginary;
  out[AMPLITUDE.s2Real] = s2Real;
  out[AMPLITUDE.s2Imaginary] = s2Imaginary;
}

/** |S₁|² + |S₂|² at a cosine: unpolarised light by scattering angle, whose integral over the cosine is size² · efficiency of scattering. */
export function mieIntensity(series: MieSeries, cosine: number): number {
  mieAmplitudes(series, cosine, amplitudes);
  return amplitudes[0] ** 2 + amplitudes[1] ** 2 + amplitudes[2] ** 2 + amplitudes[3] ** 2;
}

const amplitudes = new Float64Array(AMPLITUDE.COUNT);
