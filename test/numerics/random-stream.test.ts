/** The generator against its published definition worked out again in whole numbers without limit. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  BLOCK,
  exponentialOf,
  fillExponentials,
  fillUnits,
  nextBits,
  nextUnit,
  seedStream,
} from '../../src/numerics/random-stream.js';

const MASK = 0xffffffffn;

/** sfc32 as in PractRand (C. Doty-Humphrey; constants 21, 9, 3 from memory, high): 32-bit words, every sum modulo 2^32. */
function* sfc32(words: readonly number[]): Generator<bigint> {
  let [a, b, c, counter] = words.map((word) => BigInt.asUintN(32, BigInt(word)));
  for (;;) {
    const output = (a + b + counter) & MASK;
    counter = (counter + 1n) & MASK;
    a = b ^ (b >> 9n);
    b = (c + (c << 3n)) & MASK;
    c = (((c << 21n) | (c >> 11n)) + output) & MASK;
    yield output;
  }
}

const anyWords = fc.array(fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 }), { minLength: 4, maxLength: 4 });

describe('nextBits', () => {
  test('follows the published algorithm from any state', () => {
    fc.assert(
      fc.property(anyWords, (words) => {
        const state = Int32Array.from(words);
        const reference = sfc32(words);
        for (let i = 0; i < 50; i++) expect(BigInt(nextBits(state) >>> 0)).toBe(reference.next().value);
      }),
    );
  });

  test('the counter runs over without a hitch', () => {
    const words = [1, 2, 3, -1];
    const state = Int32Array.from(words);
    const reference = sfc32(words);
    for (let i = 0; i < 4; i++) expect(BigInt(nextBits(state) >>> 0)).toBe(reference.next().value);
    expect(state[3]).toBe(3);
  });
});

describe('seedStream', () => {
  test('takes the first four words and drops 16 outputs', () => {
    const words = [0x9e3779b9 | 0, -7, 42, 1, 99];
    const state = new Int32Array(4);
    seedStream(state, Int32Array.from(words));
    const reference = sfc32(words.slice(0, 4));
    for (let i = 0; i < 16; i++) reference.next();
    expect(BigInt(nextBits(state) >>> 0)).toBe(reference.next().value);
  });

  test('streams of neighbouring seeds share nothing', () => {
    const first = new Int32Array(4);
    const second = new Int32Array(4);
    seedStream(first, Int32Array.of(0, 0, 0, 1));
    seedStream(second, Int32Array.of(1, 0, 0, 1));
    let differing = 0;
    for (let i = 0; i < 1000; i++) {
      for (let bits = nextBits(first) ^ nextBits(second); bits !== 0; bits &= bits - 1) differing++;
    }
    // Half of 32 000 bits, standard deviation √(32 000)/2 = 89.
    expect(Math.abs(differing - 16_000)).toBeLessThan(4 * 89.5);
  });
});

describe('nextUnit', () => {
  test('is never 0 and never 1', () => {
    // States chosen so that the output is all zeros, then all ones.
    expect(nextUnit(Int32Array.of(0, 0, 5, 0))).toBe(2 ** -33);
    expect(nextUnit(Int32Array.of(-1, 0, 5, 0))).toBe(1 - 2 ** -33);
  });

  test('mean, variance and neighbours of 200 000 numbers, seed 7 11 13 17', () => {
    const state = new Int32Array(4);
    seedStream(state, Int32Array.of(7, 11, 13, 17));
    const count = 200_000;
    let sum = 0;
    let squares = 0;
    let products = 0;
    let before = nextUnit(state) - 0.5;
    for (let i = 0; i < count; i++) {
      const centred = nextUnit(state) - 0.5;
      sum += centred;
      squares += centred * centred;
      products += centred * before;
      before = centred;
    }
    // Uniform law: variances of u, u² and of u u' about 1/2 are 1/12, 1/180 and 1/144.
    expect(Math.abs(sum / count)).toBeLessThan(4 * Math.sqrt(1 / 12 / count));
    expect(Math.abs(squares / count - 1 / 12)).toBeLessThan(4 * Math.sqrt(1 / 180 / count));
    expect(Math.abs(products / count)).toBeLessThan(4 * Math.sqrt(1 / 144 / count));
  });
});

describe('fillUnits', () => {
  test('gives the numbers nextUnit would and leaves the same state', () => {
    fc.assert(
      fc.property(anyWords, (words) => {
        const one = Int32Array.from(words);
        const block = Int32Array.from(words);
        const units = new Float64Array(BLOCK.draws);
        for (let round = 0; round < 2; round++) {
          fillUnits(block, units);
          expect(Array.from(units)).toEqual(Array.from({ length: BLOCK.draws }, () => nextUnit(one)));
          expect(block).toEqual(one);
        }
      }),
      { numRuns: 20 },
    );
  });
});

describe('exponentialOf', () => {
  test('is -ln of the unit the bits stand for, against Math.log', () => {
    const check = (bits: number) => {
      const wanted = -Math.log(((bits >>> 0) + 0.5) * 2 ** -32);
      expect(Math.abs(exponentialOf(bits) - wanted)).toBeLessThan(1e-14 * Math.max(1, wanted));
    };
    for (const bits of [0, 1, 2, 3, 4095, 4096, 4097, -1, -2, -(2 ** 31), 2 ** 31 - 1, 2 ** 30]) check(bits);
    fc.assert(fc.property(fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 }), check), { numRuns: 20_000 });
    fc.assert(fc.property(fc.integer({ min: 0, max: 2 ** 16 }), check), { numRuns: 5000 });
  });

  test('fills blocks from the same bits', () => {
    const one = Int32Array.of(1, 2, 3, 4);
    const other = one.slice();
    const block = new Float64Array(BLOCK.draws);
    fillExponentials(one, block);
    expect(Array.from(block)).toEqual(Array.from({ length: BLOCK.draws }, () => exponentialOf(nextBits(other))));
    expect(one).toEqual(other);
  });
});
