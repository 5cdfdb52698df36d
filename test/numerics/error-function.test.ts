import { describe, expect, test } from 'vitest';
import { scaledErfc } from '../../src/numerics/error-function.js';

describe('exp(x²) erfc(x)', () => {
  // Abramowitz & Stegun, table 7.1, erf to 10 decimals (from memory, high): exp(x²)(1 − erf x).
  test.each([
    [0, 0],
    [0.5, 0.5204998778],
    [1, 0.8427007929],
    [2, 0.995322265],
  ])('at x = %d holds erf x = %d', (x, erf) => {
    expect(1 - scaledErfc(x) * Math.exp(-x * x)).toBeCloseTo(erf, 9);
  });

  test('joins its two ways without a step', () => {
    expect(scaledErfc(2 - 1e-9)).toBeCloseTo(scaledErfc(2), 8);
    expect(Math.abs(scaledErfc(2 - 1e-13) / scaledErfc(2) - 1)).toBeLessThan(1e-11);
  });

  // Asymptotic series 1/(x√π)(1 − 1/2x² + 3/4x⁴ − 15/8x⁶), Abramowitz & Stegun 7.1.23 (from memory).
  test('goes over into the asymptotic series', () => {
    const x = 30;
    const series = (1 - 1 / (2 * x ** 2) + 3 / (4 * x ** 4) - 15 / (8 * x ** 6)) / (x * Math.sqrt(Math.PI));
    expect(scaledErfc(x) / series).toBeCloseTo(1, 10);
  });

  test('refuses what it does not know', () => {
    expect(() => scaledErfc(-1)).toThrow(RangeError);
    expect(() => scaledErfc(Number.NaN)).toThrow(RangeError);
  });
});
