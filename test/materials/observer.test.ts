/** The standard observer against printed sums, white points and the definition of the photopic peak. */
import { describe, expect, test } from 'vitest';
import { colourMatching, observerTable } from '../../src/materials/observer.js';
import { d65Power } from '../../src/proofs/daylight-d65.js';

function chromaticity(power: (nm: number) => number): readonly [number, number] {
  const sum = [0, 0, 0];
  for (const { nm, xyz } of observerTable()) {
    for (let i = 0; i < 3; i++) sum[i] += power(nm) * xyz[i];
  }
  const total = sum[0] + sum[1] + sum[2];
  return [sum[0] / total, sum[1] / total];
}

function expectWhite(power: (nm: number) => number, x: number, y: number, within: number): void {
  const [measuredX, measuredY] = chromaticity(power);
  expect(Math.abs(measuredX - x)).toBeLessThan(within);
  expect(Math.abs(measuredY - y)).toBeLessThan(within);
}

describe('observerTable', () => {
  test('81 rows, 380 to 780 nm in steps of 5', () => {
    expect(observerTable().map(({ nm }) => nm)).toEqual(Array.from({ length: 81 }, (_, i) => 380 + 5 * i));
  });

  // CIE 15:2004, table T.4, last line: 21.3714, 21.3711, 21.3715; the six-decimal tables in circulation sum to 21.3715, 21.3713, 21.3715.
  test('sums as printed', () => {
    const sum = (i: 0 | 1 | 2) => observerTable().reduce((total, { xyz }) => total + xyz[i], 0);
    expect(Math.abs(sum(0) - 21.3714)).toBeLessThan(3e-4);
    expect(Math.abs(sum(1) - 21.3711)).toBeLessThan(3e-4);
    expect(Math.abs(sum(2) - 21.3715)).toBeLessThan(3e-4);
  });

  test('equal energy is white at a third, a third (CIE 15:2004)', () => expectWhite(() => 1, 1 / 3, 1 / 3, 5e-6));

  // Illuminant A by its formula (ISO/CIE 11664-2): 100 (560/λ)⁵ (exp(c/(2848·560)) − 1)/(exp(c/(2848 λ)) − 1), c = 1.435e7 nm K.
  test('illuminant A', () => {
    const c = 1.435e7 / 2848;
    expectWhite((nm) => ((560 / nm) ** 5 * Math.expm1(c / 560)) / Math.expm1(c / nm), 0.44757, 0.40745, 3e-5);
  });

  // ISO/CIE 11664-2: x = 0.31272, y = 0.32903 for the 2° observer (from memory, high).
  test('daylight D65', () => expectWhite(d65Power, 0.31272, 0.32903, 2e-5));
});

describe('colourMatching', () => {
  test('the eye is most sensitive at 555 nm, V = 1', () => {
    expect(colourMatching(555)[1]).toBe(1);
    for (let nm = 370; nm < 790; nm++) expect(colourMatching(nm)[1]).toBeLessThanOrEqual(1);
  });

  // V(λ) at other wavelengths, CIE 15:2004 (also in any handbook of photometry).
  test.each([
    [450, 0.038],
    [490, 0.208],
    [510, 0.503],
    [580, 0.87],
    [610, 0.503],
    [650, 0.107],
  ])('V(%i nm)', (nm, v) => expect(Math.abs(colourMatching(nm)[1] - v)).toBeLessThan(5e-4));

  test('straight between rows', () => {
    const [low, high] = [colourMatching(520), colourMatching(525)];
    for (const i of [0, 1, 2]) expect(colourMatching(522)[i]).toBeCloseTo(0.6 * low[i] + 0.4 * high[i], 12);
  });

  test('nothing outside 380 to 780 nm', () => {
    for (const nm of [379.99, 780.01, 0, -5, Number.NaN, Number.POSITIVE_INFINITY])
      expect(colourMatching(nm)).toEqual([0, 0, 0]);
    expect(colourMatching(380)[0]).toBeCloseTo(0.001368, 9);
    expect(colourMatching(780)[0]).toBeCloseTo(0.000042, 6);
  });
});
