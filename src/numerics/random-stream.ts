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
export enum BLOCK {
  draws = 256,
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
