import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { linearCurve } from '../../src/numerics/interpolate.js';

const HOLD = { below: 'hold', above: 'hold' } as const;
const ZERO = { below: 'zero', above: 'zero' } as const;

describe('linearCurve', () => {
  test('passes through its points and runs straight between them', () => {
    const curve = linearCurve([0, 10, 40], [1, 3, 0], HOLD);
    expect([0, 5, 10, 25, 40].map(curve)).toEqual([1, 2, 3, 1.5, 0]);
  });

  test('beyond the ends stands what was asked for', () => {
    expect([-1, 41].map(linearCurve([0, 40], [1, 2], HOLD))).toEqual([1, 2]);
    expect([-1, 41].map(linearCurve([0, 40], [1, 2], ZERO))).toEqual([0, 0]);
    expect([-1, 41].map(linearCurve([0, 40], [1, 2], { below: 'hold', above: 'zero' }))).toEqual([1, 0]);
    // The ends themselves belong to the curve.
    expect([0, 40].map(linearCurve([0, 40], [1, 2], ZERO))).toEqual([1, 2]);
  });

  test('one point is a constant, or a spike', () => {
    expect([-1, 5, 9].map(linearCurve([5], [7], HOLD))).toEqual([7, 7, 7]);
    expect([-1, 5, 9].map(linearCurve([5], [7], ZERO))).toEqual([0, 7, 0]);
  });

  test('returns any straight line unchanged, whatever the positions', () => {
    const positions = fc.uniqueArray(fc.integer({ min: -1000, max: 1000 }), { minLength: 2, maxLength: 40 });
    fc.assert(
      fc.property(
        positions,
        fc.integer({ min: -9, max: 9 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (xs, slope, t) => {
          const sorted = xs.toSorted((a, b) => a - b);
          const line = (x: number) => slope * x + 3;
          const x = sorted[0] + t * (sorted[sorted.length - 1] - sorted[0]);
          expect(linearCurve(sorted, sorted.map(line), ZERO)(x)).toBeCloseTo(line(x), 9);
        },
      ),
    );
  });

  test('refuses positions that do not ascend, missing values and no points', () => {
    expect(() => linearCurve([0, 0], [1, 2], HOLD)).toThrow('positions must ascend; 0 follows 0');
    expect(() => linearCurve([0, Number.NaN], [1, 2], HOLD)).toThrow(RangeError);
    expect(() => linearCurve([0, 1], [1], HOLD)).toThrow(RangeError);
    expect(() => linearCurve([], [], HOLD)).toThrow(RangeError);
  });
});
