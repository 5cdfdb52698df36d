/**
 * Reflectance, transmittance and phases of a stack of thin films between two transparent media, by characteristic matrices
 * (Abelès, Ann. Phys. (Paris) 5 596 (1950); Born & Wolf, Principles of Optics, §1.6). Indices are n − ik, fields vary as
 * exp(+iωt); lengths of wave vectors are in units of that of vacuum, so the conserved tangential one is β = n sin θ.
 */
import { type FilmLayer, type ThinFilms, thinFilms } from './thin-films.js';

/** Slots of what `stackAmplitudes` fills in: shares, and complex amplitudes of the tangential electric field. */
export const enum AMPLITUDES {
  reflectanceS = 0,
  reflectanceP = 1,
  transmittanceS = 2,
  transmittanceP = 3,
  reflectedSReal = 4,
  reflectedSImaginary = 5,
  reflectedPReal = 6,
  reflectedPImaginary = 7,
  transmittedSReal = 8,
  transmittedSImaginary = 9,
  transmittedPReal = 10,
  transmittedPImaginary = 11,
  COUNT = 12,
}

/** Beyond this size the fields of a long stack are scaled down; the logarithm of the factor is kept. */
const LARGE = 1e60;
/** Below it, sin δ/u is its series' first term. */
const SMALL = 1e-7;

/**
 * Light of one wavelength and one β on a stack, s and p at once. No overflow in thick metals: decaying exponentials are kept apart.
 * A rounding never makes R + T exceed 1; without absorbing layers T is exactly 1 − R.
 * @param normalIn normal component of the wave vector where the light comes from, n·cos θ, above 0
 * @param normalOut that beyond the stack; where nothing travels there, its decay √(β² − n²)
 * @param travels whether light travels beyond the stack, or only decays there
 * @param out AMPLITUDES.COUNT numbers
 */
export function stackAmplitudes(
  films: ThinFilms,
  indexIn: number,
  indexOut: number,
  beta2: number,
  normalIn: number,
  normalOut: number,
  travels: boolean,
  out: Float64Array,
): void {
  const { count, squareReal, squareImaginary, turns, absorbing } = films;
  const outReal = travels ? normalOut : 0;
  const outImaginary = travels ? 0 : -normalOut;
  const squareOut = indexOut * indexOut;
  const squareIn = indexIn * indexIn;
  // Tangential fields (B, C) at the exit, to be carried towards the light: s (1, u), p (u, n²), finite at every angle.
  let sBr = 1;
  let sBi = 0;
  let sCr = outReal;
  let sCi = outImaginary;
  let pBr = outReal;
  let pBi = outImaginary;
  let pCr = squareOut;
  let pCi = 0;
  let log = 0;
  let scaledS = 0;
  let scaledP = 0;
  for (let j = count - 1; j >= 0; j--) {
    const turn = turns[j];
    const n2r = squareReal[j];
    const n2i = squareImaginary[j];
    const u2r = n2r - beta2;
    // c = cos δ, q = sin δ/u, m = u·sin δ with δ = u·turn, each times exp(−|Im δ|). Then
    // s: B' = cB + iqC, C' = imB + cC; p: B' = cB + i(m/N²)C, C' = iN²qB + cC.
    if (n2i === 0) {
      let c: number;
      let q: number;
      let m: number;
      if (u2r >= 0) {
        const u = Math.sqrt(u2r);
        const sine = Math.sin(u * turn);
        c = Math.cos(u * turn);
        q = u < SMALL ? turn : sine / u;
        m = u * sine;
      } else {
        const kappa = Math.sqrt(-u2r);
        const echo = Math.exp(-2 * kappa * turn);
        const sinh = 0.5 * (1 - echo);
        c = 0.5 * (1 + echo);
        q = kappa < SMALL ? turn : sinh / kappa;
        m = -kappa * sinh;
        log += kappa * turn;
      }
      const e = m / n2r;
      const f = q * n2r;
      let b = c * sBr - q * sCi;
      sCi = c * sCi + m * sBr;
      sBr = b;
      b = c * sBi + q * sCr;
      sCr = c * sCr - m * sBi;
      sBi = b;
      b = c * pBr - e * pCi;
      pCi = c * pCi + f * pBr;
      pBr = b;
      b = c * pBi + e * pCr;
      pCr = c * pCr - f * pBi;
      pBi = b;
    } else {
      const modulus = Math.sqrt(u2r * u2r + n2i * n2i);
      // u = v − iw with w > 0; the larger of the two from the sum, the other without cancellation.
      let v: number;
      let w: number;
      if (u2r >= 0) {
        v = Math.sqrt(0.5 * (modulus + u2r));
        w = (-0.5 * n2i) / v;
      } else {
        w = Math.sqrt(0.5 * (modulus - u2r));
        v = (-0.5 * n2i) / w;
      }
      const echo = Math.exp(-2 * w * turn);
      const cosh = 0.5 * (1 + echo);
      const sinh = 0.5 * (1 - echo);
      const cos = Math.cos(v * turn);
      const sin = Math.sin(v * turn);
      log += w * turn;
      const cr = cos * cosh;
      const ci = sin * sinh;
      const sr = sin * cosh;
      const si = -cos * sinh;
      const qr = (sr * v - si * w) / modulus;
      const qi = (sr * w + si * v) / modulus;
      const mr = sr * v + si * w;
      const mi = si * v - sr * w;
      const size = n2r * n2r + n2i * n2i;
      const er = (mr * n2r + mi * n2i) / size;
      const ei = (mi * n2r - mr * n2i) / size;
      const fr = qr * n2r - qi * n2i;
      const fi = qr * n2i + qi * n2r;
      let br = cr * sBr - ci * sBi - (qr * sCi + qi * sCr);
      let bi = cr * sBi + ci * sBr + (qr * sCr - qi * sCi);
      let dr = cr * sCr - ci * sCi - (mr * sBi + mi * sBr);
      let di = cr * sCi + ci * sCr + (mr * sBr - mi * sBi);
      sBr = br;
      sBi = bi;
      sCr = dr;
      sCi = di;
      br = cr * pBr - ci * pBi - (er * pCi + ei * pCr);
      bi = cr * pBi + ci * pBr + (er * pCr - ei * pCi);
      dr = cr * pCr - ci * pCi - (fr * pBi + fi * pBr);
      di = cr * pCi + ci * pCr + (fr * pBr - fi * pBi);
      pBr = br;
      pBi = bi;
      pCr = dr;
      pCi = di;
    }
    if (Math.abs(sCr) + Math.abs(sCi) > LARGE) {
      sBr /= LARGE;
      sBi /= LARGE;
      sCr /= LARGE;
      sCi /= LARGE;
      scaledS += Math.log(LARGE);
    }
    if (Math.abs(pCr) + Math.abs(pCi) > LARGE) {
      pBr /= LARGE;
      pBi /= LARGE;
      pCr /= LARGE;
      pCi /= LARGE;
      scaledP += Math.log(LARGE);
    }
  }
  // s: r = (u₀B − C)/(u₀B + C); p: r = (n₀²B − u₀C)/(n₀²B + u₀C).
  finish(
    out,
    AMPLITUDES.reflectanceS,
    normalIn * sBr,
    normalIn * sBi,
    sCr,
    sCi,
    2 * normalIn,
    0,
    4 * normalIn * outReal,
    log + scaledS,
    absorbing,
    travels,
  );
  finish(
    out,
    AMPLITUDES.reflectanceP,
    squareIn * pBr,
    squareIn * pBi,
    normalIn * pCr,
    normalIn * pCi,
    2 * squareIn * outReal,
    2 * squareIn * outImaginary,
    4 * squareIn * normalIn * squareOut * outReal,
    log + scaledP,
    absorbing,
    travels,
  );
}

/** Shares and amplitudes of one polarisation from r = (F − G)/(F + G), t = sent/(F + G)·exp(−log), T = passed·exp(−2 log)/|F + G|². */
function finish(
  out: Float64Array,
  polarisation: AMPLITUDES.reflectanceS | AMPLITUDES.reflectanceP,
  fr: number,
  fi: number,
  gr: number,
  gi: number,
  sentReal: number,
  sentImaginary: number,
  passed: number,
  log: number,
  absorbing: boolean,
  travels: boolean,
): void {
  const sr = fr + gr;
  const si = fi + gi;
  const size = sr * sr + si * si;
  const rr = ((fr - gr) * sr + (fi - gi) * si) / size;
  const ri = ((fi - gi) * sr - (fr - gr) * si) / size;
  const damping = Math.exp(-log);
  let reflectance = Math.min(1, rr * rr + ri * ri);
  let transmittance = ((passed * damping) / size) * damping;
  if (!travels) {
    transmittance = 0;
    if (!absorbing) reflectance = 1;
  } else if (!absorbing) {
    // The smaller of the two is the one known well.
    if (reflectance < 0.5) transmittance = 1 - reflectance;
    else {
      transmittance = Math.min(1, transmittance);
      reflectance = 1 - transmittance;
    }
  } else transmittance = Math.min(transmittance, 1 - reflectance);
  out[polarisation] = reflectance;
  out[polarisation + 2] = transmittance;
  const slot = AMPLITUDES.reflectedSReal + 2 * polarisation;
  out[slot] = rr;
  out[slot + 1] = ri;
  out[slot + 4] = ((sentReal * sr + sentImaginary * si) / size) * damping;
  out[slot + 5] = ((sentImaginary * sr - sentReal * si) / size) * damping;
}

/** What a stack does to one polarisation. */
export interface PolarisedResponse {
  readonly reflectance: number;
  readonly transmittance: number;
  /** 1 − R − T, not negative. */
  readonly absorptance: number;
  /** Of the tangential electric field against that of the light that arrives, rad: reflected, and just beyond the stack. */
  readonly reflectedPhase: number;
  readonly transmittedPhase: number;
}

export interface StackResponse {
  readonly s: PolarisedResponse;
  readonly p: PolarisedResponse;
}

/**
 * Response of a stack to a plane wave.
 * At normal incidence s and p are the same: both refer to the tangential electric field, so that r_p is the negative of the other usual one.
 * @param layers in the order the light meets them; none is a bare interface
 * @param cosIncident cosine of the angle of incidence, above 0
 */
export function stackResponse(
  layers: readonly FilmLayer[],
  indexIn: number,
  indexOut: number,
  cosIncident: number,
  wavelengthNm: number,
): StackResponse {
  const out = new Float64Array(AMPLITUDES.COUNT);
  amplitudesAt(thinFilms(layers, wavelengthNm), indexIn, indexOut, cosIncident, out);
  return { s: polarised(out, 0), p: polarised(out, 1) };
}

/** As `stackAmplitudes`, from the cosine of incidence. */
export function amplitudesAt(
  films: ThinFilms,
  indexIn: number,
  indexOut: number,
  cosIncident: number,
  out: Float64Array,
): void {
  // At grazing incidence between like media nothing would be left to divide by.
  const normalIn = indexIn * Math.max(1e-9, cosIncident);
  const normal2 = normalIn * normalIn;
  const normalOut2 = (indexOut - indexIn) * (indexOut + indexIn) + normal2;
  const travels = normalOut2 > 0;
  const beta2 = indexIn * indexIn - normal2;
  stackAmplitudes(films, indexIn, indexOut, beta2, normalIn, Math.sqrt(Math.abs(normalOut2)), travels, out);
}

function polarised(out: Float64Array, polarisation: 0 | 1): PolarisedResponse {
  const reflectance = out[AMPLITUDES.reflectanceS + polarisation];
  const transmittance = out[AMPLITUDES.transmittanceS + polarisation];
  const slot = AMPLITUDES.reflectedSReal + 2 * polarisation;
  return {
    reflectance,
    transmittance,
    absorptance: Math.max(0, 1 - reflectance - transmittance),
    reflectedPhase: Math.atan2(out[slot + 1], out[slot]),
    transmittedPhase: Math.atan2(out[slot + 5], out[slot + 4]),
  };
}
