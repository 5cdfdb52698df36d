/**
 * sfc32 (Chris Doty-Humphrey, Small Fast Counting generator, PractRand): 128 bits of state, period at least 2^32, passes
 * PractRand and TestU01 BigCrush. State lives in an Int32Array of 4 so that the optimiser keeps it flat.
 */
const TO_UNIT = 2 ** -32;

/** Next 32 random bits as a signed integer; advances `state`. */
export function nextBits(state: Int32Array): number {
  const a = state[0];
  const b = state[1];
  const c = state[2];
  const counter = state[3];
  const result = (((a + b) | 0) + counter) | 0;
  state[3] = (counter + 1) | 0;
  state[0] = b ^ (b >>> 9);
  state[1] = (c + (c << 3)) | 0;
  state[2] = (((c << 21) | (c >>> 11)) + result) | 0;
  return result;
}

/** Uniform in (0, 1), never 0 and never 1, on a grid of 2^-32. */
export function nextUnit(state: Int32Array): number {
  return ((nextBits(state) >>> 0) + 0.5) * TO_UNIT;
}

/** Takes four words as state and discards the first outputs, which still resemble the seed. */
export function seedStream(state: Int32Array, words: Int32Array): void {
  state.set(words.subarray(0, 4));
  for (let i = 0; i < 16; i++) nextBits(state);
}

/** Numbers per block of `fillUnits`. */
export const enum BLOCK {
  draws = 512,
}

/** Fills a block of BLOCK.draws numbers, each as from `nextUnit`. */
export function fillUnits(state: Int32Array, units: Float64Array): void {
  let a = state[0];
  let b = state[1];
  let c = state[2];
  let counter = state[3];
  for (let i = 0; i < BLOCK.draws; i++) {
    const result = (((a + b) | 0) + counter) | 0;
    counter = (counter + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (((c << 21) | (c >>> 11)) + result) | 0;
    units[i] = ((result >>> 0) + 0.5) * TO_UNIT;
  }
  state[0] = a;
  state[1] = b;
  state[2] = c;
  state[3] = counter;
}

/** Reciprocal and −ln of the middle of each of 256 parts of [1, 2), and powers of two by leading zeros. */
const PARTS = 256;
const RECIPROCAL = Float64Array.from({ length: PARTS }, (_, i) => 1 / (1 + (i + 0.5) / PARTS));
const MINUS_LOG = Float64Array.from({ length: PARTS }, (_, i) => -Math.log(1 + (i + 0.5) / PARTS));
const SCALE = Float64Array.from({ length: 33 }, (_, zeros) => 2 ** (zeros - 31));
const MINUS_LOG_SCALE = Float64Array.from({ length: 33 }, (_, zeros) => (zeros + 1) * Math.LN2);

/**
 * −ln of the unit that 32 random bits stand for (as in `nextUnit`): an exponential variate of mean 1. Table of the leading bits and
 * series for the rest; error below 1e-14.
 */
export function exponentialOf(bits: number): number {
  // So few bits would leave the series too much.
  if (bits >>> 12 === 0) return -Math.log((bits + 0.5) * TO_UNIT);
  const zeros = Math.clz32(bits);
  const part = (bits << (zeros + 1)) >>> 24;
  const r = ((bits >>> 0) + 0.5) * SCALE[zeros] * RECIPROCAL[part] - 1;
  return MINUS_LOG_SCALE[zeros] + MINUS_LOG[part] - r * (1 - r * (1 / 2 - r * (1 / 3 - r * (1 / 4 - r * (1 / 5)))));
}

/** Fills a block of BLOCK.draws exponential variates of mean 1. */
export function fillExponentials(state: Int32Array, exponentials: Float64Array): void {
  for (let i = 0; i < BLOCK.draws; i++) exponentials[i] = exponentialOf(nextBits(state));
}
