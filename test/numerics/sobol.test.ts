/** Sobol points against a reference library, published properties and the defining net property. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { nextBits, nextUnit, seedStream } from '../../src/numerics/random-stream.js';
import { SOBOL_DIMENSIONS, sobolUnit, startSobol, stepSobol } from '../../src/numerics/sobol.js';

const PLAIN = new Int32Array(SOBOL_DIMENSIONS);
const anyShift = fc
  .array(fc.integer({ min: -(2 ** 31), max: 2 ** 31 - 1 }), {
    minLength: SOBOL_DIMENSIONS,
    maxLength: SOBOL_DIMENSIONS,
  })
  .map((words) => Int32Array.from(words));

/** The first `count` points as whole numbers of 2^-32. */
function wordsOf(count: number, shift: Int32Array): number[][] {
  const point = new Int32Array(SOBOL_DIMENSIONS);
  startSobol(point, shift);
  return Array.from({ length: count }, (_, index) => {
    if (index > 0) stepSobol(point, index - 1);
    return Array.from(point, (word) => word >>> 0);
  });
}

const leading = (word: number, bits: number): number => Math.floor(word / 2 ** (32 - bits));

describe('the sequence without a shift', () => {
  // The example output of Joe & Kuo's generator for three dimensions (from memory, high).
  test('first ten points', () => {
    expect(wordsOf(10, PLAIN).map((point) => point.slice(0, 3).map((word) => word / 2 ** 32))).toEqual([
      [0, 0, 0],
      [0.5, 0.5, 0.5],
      [0.75, 0.25, 0.25],
      [0.25, 0.75, 0.75],
      [0.375, 0.375, 0.625],
      [0.875, 0.875, 0.125],
      [0.625, 0.125, 0.875],
      [0.125, 0.625, 0.375],
      [0.1875, 0.3125, 0.9375],
      [0.6875, 0.8125, 0.4375],
    ]);
  });

  // scipy 1.17.1: [int(v * 2**32) for v in scipy.stats.qmc.Sobol(8, scramble=False, bits=32).random(2048)[i]].
  test('eight dimensions as in a reference library', () => {
    const points = wordsOf(2048, PLAIN);
    const known: readonly (readonly [number, readonly number[]])[] = [
      [3, [1073741824, 3221225472, 3221225472, 3221225472, 1073741824, 1073741824, 3221225472, 1073741824]],
      [37, [3959422976, 2751463424, 2483027968, 3959422976, 3288334336, 1275068416, 738197504, 3422552064]],
      [100, [1778384896, 1107296256, 3321888768, 3120562176, 3791650816, 3187671040, 100663296, 2046820352]],
      [1000, [943718400, 415236096, 2227175424, 2906652672, 1203765248, 3896508416, 197132288, 3862953984]],
      [2047, [2097152, 2694840320, 3999268864, 1507852288, 2707423232, 2824863744, 505413632, 136314880]],
    ];
    for (const [index, point] of known) expect(points[index]).toEqual(point);
  });
});

// Niederreiter, Random Number Generation and Quasi-Monte Carlo Methods (1992), chapter 4; a digital shift keeps nets nets.
describe('the net property, whatever the shift', () => {
  test('each dimension: 2^m points fall one each into the 2^m equal intervals', () => {
    fc.assert(
      fc.property(anyShift, fc.integer({ min: 0, max: 10 }), (shift, m) => {
        const points = wordsOf(2 ** m, shift);
        for (let dimension = 0; dimension < SOBOL_DIMENSIONS; dimension++) {
          expect(new Set(points.map((point) => leading(point[dimension], m))).size).toBe(2 ** m);
        }
      }),
      { numRuns: 30 },
    );
  });

  test('later blocks of 2^m points too', () => {
    const points = wordsOf(1024, PLAIN);
    for (let block = 0; block < 1024; block += 64) {
      for (let dimension = 0; dimension < SOBOL_DIMENSIONS; dimension++) {
        const cells = points.slice(block, block + 64).map((point) => leading(point[dimension], 6));
        expect(new Set(cells).size).toBe(64);
      }
    }
  });

  test('dimensions 0 and 1 together: one point in every elementary rectangle of area 2^-m', () => {
    fc.assert(
      fc.property(anyShift, fc.integer({ min: 0, max: 9 }), (shift, m) => {
        const points = wordsOf(2 ** m, shift);
        for (let across = 0; across <= m; across++) {
          const cells = points.map(([x, y]) => `${leading(x, across)} ${leading(y, m - across)}`);
          expect(new Set(cells).size).toBe(2 ** m);
        }
      }),
      { numRuns: 30 },
    );
  });

  // Property A of Sobol, held by these direction numbers up to dimension 1111: Joe & Kuo, SIAM J. Sci. Comput. 30 2635 (2008).
  test('256 points fall one each into the 2^8 halves of eight dimensions', () => {
    fc.assert(
      fc.property(anyShift, (shift) => {
        const octants = wordsOf(256, shift).map((point) => point.map((word) => leading(word, 1)).join(''));
        expect(new Set(octants).size).toBe(256);
      }),
      { numRuns: 10 },
    );
  });
});

describe('sobolUnit', () => {
  test('stays inside 0 and 1 and keeps the order of the words', () => {
    expect(sobolUnit(Int32Array.of(0), 0)).toBe(2 ** -33);
    expect(sobolUnit(Int32Array.of(-1), 0)).toBe(1 - 2 ** -33);
    expect(sobolUnit(Int32Array.of(5, 1 << 30), 1)).toBeCloseTo(0.25, 9);
  });
});

describe('averages over randomly shifted points', () => {
  const dimensions = 7;
  const streamOf = (seed: number): Int32Array => {
    const state = new Int32Array(4);
    seedStream(state, Int32Array.of(seed, 2, 3, 1));
    return state;
  };
  /** Mean over `count` shifted points of Π (1/2 + x_i), whose integral is 1. */
  function shiftedMean(count: number, state: Int32Array): number {
    const point = new Int32Array(SOBOL_DIMENSIONS);
    startSobol(
      point,
      Int32Array.from(point, () => nextBits(state)),
    );
    let sum = 0;
    for (let index = 0; index < count; index++) {
      if (index > 0) stepSobol(point, index - 1);
      let product = 1;
      for (let i = 0; i < dimensions; i++) product *= 0.5 + sobolUnit(point, i);
      sum += product;
    }
    return sum / count;
  }
  const errorsOf = (count: number, seed: number): number[] => {
    const state = streamOf(seed);
    return Array.from({ length: 32 }, () => shiftedMean(count, state) - 1);
  };
  const rootMeanSquare = (values: readonly number[]): number =>
    Math.sqrt(values.reduce((sum, value) => sum + value * value, 0) / values.length);
  /** Standard error of as many independent points: the variance of the product is (13/12)^7 − 1. */
  const randomError = (count: number): number => Math.sqrt(((13 / 12) ** dimensions - 1) / count);

  test('are unbiased (32 shifts of 256 points, seed 1, 4 standard errors)', () => {
    const errors = errorsOf(256, 1);
    const mean = errors.reduce((sum, error) => sum + error, 0) / errors.length;
    expect(Math.abs(mean)).toBeLessThan((4 * rootMeanSquare(errors)) / Math.sqrt(errors.length - 1));
  });

  test('err less than independent points, and the lead grows with their number (32 shifts, seed 2)', () => {
    const lead = (count: number) => randomError(count) / rootMeanSquare(errorsOf(count, 2));
    const few = lead(256);
    const many = lead(4096);
    expect(few).toBeGreaterThan(2);
    // 16 times the points: errors near 1/N fall by up to 16, independent ones by 4.
    expect(many).toBeGreaterThan(1.5 * few);
  });

  test('the yardstick itself: independent points err as their variance says (64 repeats, seed 3)', () => {
    const state = streamOf(3);
    const errors = Array.from({ length: 64 }, () => {
      let sum = 0;
      for (let n = 0; n < 256; n++) {
        let product = 1;
        for (let i = 0; i < dimensions; i++) product *= 0.5 + nextUnit(state);
        sum += product;
      }
      return sum / 256 - 1;
    });
    // A root mean square of 64 normal values has a relative standard error of 1/√128.
    expect(Math.abs(rootMeanSquare(errors) / randomError(256) - 1)).toBeLessThan(4 / Math.sqrt(128));
  });
});
