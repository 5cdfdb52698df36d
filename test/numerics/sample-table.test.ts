/** The alias method against the weights it stands for, by exact bookkeeping of its cells. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { nextUnit, seedStream } from '../../src/numerics/random-stream.js';
import { buildAliasTable, drawIndex } from '../../src/numerics/sample-table.js';

/** Probability of each index: what its own cell keeps and what other cells pass on, each cell counting 1/n. */
function sharesOf(weights: ArrayLike<number>): number[] {
  const { keep, other } = buildAliasTable(weights);
  const shares = new Array<number>(keep.length).fill(0);
  keep.forEach((kept, cell) => {
    shares[cell] += kept / keep.length;
    shares[other[cell]] += (1 - kept) / keep.length;
  });
  return shares;
}

const anyWeight = fc.oneof(
  fc.constant(0),
  fc.double({ min: 0, max: 1e6, noNaN: true }),
  fc.double({ min: 0, max: 1e-6, noNaN: true }),
);
const anyWeights = fc
  .array(anyWeight, { minLength: 1, maxLength: 60 })
  .filter((weights) => weights.some((weight) => weight > 1e-300));

describe('buildAliasTable', () => {
  test('the cells add up to the weights', () => {
    fc.assert(
      fc.property(anyWeights, (weights) => {
        const total = weights.reduce((sum, weight) => sum + weight, 0);
        sharesOf(weights).forEach((share, i) => {
          expect(Math.abs(share - weights[i] / total)).toBeLessThan(1e-12);
        });
      }),
      { numRuns: 500 },
    );
  });

  test('an index of no weight is never drawn, and each cell is a proper share', () => {
    fc.assert(
      fc.property(anyWeights, (weights) => {
        const { keep, other } = buildAliasTable(weights);
        keep.forEach((kept, cell) => {
          expect(kept).toBeGreaterThanOrEqual(0);
          expect(kept).toBeLessThanOrEqual(1);
          if (weights[cell] === 0) expect(kept).toBe(0);
          if (kept < 1) expect(weights[other[cell]]).toBeGreaterThan(0);
        });
      }),
      { numRuns: 500 },
    );
  });

  test('equal weights keep to themselves; a single index is always drawn', () => {
    expect(sharesOf([3, 3, 3, 3])).toEqual([0.25, 0.25, 0.25, 0.25]);
    expect(sharesOf([1e-9])).toEqual([1]);
    expect(sharesOf([0, 0, 2, 0])).toEqual([0, 0, 1, 0]);
  });

  test('refuses weights that are no weights', () => {
    for (const weights of [[], [0, 0], [1, -1], [1, Number.NaN], [1, Number.POSITIVE_INFINITY]])
      expect(() => buildAliasTable(weights)).toThrow(RangeError);
  });
});

describe('drawIndex', () => {
  test('evenly spaced numbers hit each index in proportion, also in a pooled table', () => {
    const weights = [1, 0, 4, 2.5, 0.5];
    const { keep, other } = buildAliasTable(weights);
    const pooledKeep = Float64Array.from([0.3, 0.7, 0.1, ...keep]);
    const pooledOther = Int32Array.from([1, 0, 2, ...other]);
    const count = 80_000;
    const hits = new Array<number>(weights.length).fill(0);
    for (let i = 0; i < count; i++) hits[drawIndex(pooledKeep, pooledOther, 3, weights.length, (i + 0.5) / count)]++;
    // Each of the five cells can be one number out at its border.
    hits.forEach((hit, i) => {
      expect(Math.abs(hit - (count * weights[i]) / 8)).toBeLessThanOrEqual(5);
    });
    expect(hits[1]).toBe(0);
  });

  test('both ends of the unit interval', () => {
    const { keep, other } = buildAliasTable([1, 1, 1]);
    expect(drawIndex(keep, other, 0, 3, 0)).toBe(0);
    expect(drawIndex(keep, other, 0, 3, 1 - 2 ** -33)).toBe(2);
  });

  test('random draws follow Planck weights (100 000 draws, seed 5 6 7 8, 4 standard errors)', () => {
    const weights = Array.from({ length: 30 }, (_, i) => (i + 1) ** 3 / Math.expm1((i + 1) / 5));
    const total = weights.reduce((sum, weight) => sum + weight, 0);
    const { keep, other } = buildAliasTable(weights);
    const state = new Int32Array(4);
    seedStream(state, Int32Array.of(5, 6, 7, 8));
    const hits = new Array<number>(weights.length).fill(0);
    const count = 100_000;
    for (let i = 0; i < count; i++) hits[drawIndex(keep, other, 0, weights.length, nextUnit(state))]++;
    hits.forEach((hit, i) => {
      const share = weights[i] / total;
      expect(Math.abs(hit / count - share)).toBeLessThan(4 * Math.sqrt((share * (1 - share)) / count));
    });
  });
});
