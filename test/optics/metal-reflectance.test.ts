/** Metals against complex arithmetic written out here and against tabulated normal reflectances. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { metalNames, readMetal } from '../../src/materials/library.js';
import { numberIn, readTable } from '../../src/materials/read-table.js';
import { fresnelReflectance } from '../../src/optics/fresnel.js';
import { metalReflectance } from '../../src/optics/metal-reflectance.js';

type Complex = readonly [number, number];
const add = ([a, b]: Complex, [c, d]: Complex): Complex => [a + c, b + d];
const sub = ([a, b]: Complex, [c, d]: Complex): Complex => [a - c, b - d];
const mul = ([a, b]: Complex, [c, d]: Complex): Complex => [a * c - b * d, a * d + b * c];
const div = (p: Complex, [c, d]: Complex): Complex => mul(p, [c / (c * c + d * d), -d / (c * c + d * d)]);
const power = ([a, b]: Complex) => a * a + b * b;
function root([a, b]: Complex): Complex {
  const size = Math.sqrt(Math.hypot(a, b));
  const turn = Math.atan2(b, a) / 2;
  return [size * Math.cos(turn), size * Math.sin(turn)];
}

/** Fresnel's amplitudes with a complex index and a complex angle: Born & Wolf, Principles of Optics, §1.5.2 eq. (20a), §14.2. */
function byComplexNumbers(n0: number, n: number, k: number, cosine: number): number {
  const inside: Complex = [n, -k];
  const outside: Complex = [n0, 0];
  const sine = div([n0 * Math.sqrt(1 - cosine * cosine), 0], inside);
  const refracted = root(sub([1, 0], mul(sine, sine)));
  const before: Complex = [cosine, 0];
  const amplitude = (p: Complex, q: Complex) => div(sub(p, q), add(p, q));
  const s = amplitude(mul(outside, before), mul(inside, refracted));
  const p = amplitude(mul(inside, before), mul(outside, refracted));
  return (power(s) + power(p)) / 2;
}

describe('metalReflectance', () => {
  test('agrees with complex arithmetic at any angle, for any metal in any liquid', () => {
    const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    fc.assert(
      fc.property(between(1, 1.8), between(0.03, 5), between(0.05, 9), between(0, 1), (n0, n, k, cosine) => {
        expect(metalReflectance(n0, n, k, cosine)).toBeCloseTo(byComplexNumbers(n0, n, k, cosine), 11);
      }),
    );
  });

  test('without absorption it is the interface of two transparent media', () => {
    for (const cosine of [0, 0.1, 0.5, 0.9, 1]) {
      expect(metalReflectance(1.36, 1.52, 0, cosine)).toBeCloseTo(fresnelReflectance(1.36, 1.52, cosine), 12);
      expect(metalReflectance(1.52, 1.36, 0, cosine)).toBeCloseTo(fresnelReflectance(1.52, 1.36, cosine), 12);
    }
  });

  test('grazing light is reflected, and nothing is ever created', () => {
    expect(metalReflectance(1.36, 0.9, 6, 0)).toBe(1);
    for (let cosine = 0; cosine <= 1; cosine += 0.001) {
      const reflectance = metalReflectance(1.36, 0.05, 3.3, cosine);
      expect(reflectance).toBeGreaterThan(0.9);
      expect(reflectance).toBeLessThanOrEqual(1);
    }
  });

  // Normal reflectances tabulated beside n and k, |(n0 − n + ik)/(n0 + n − ik)|² to four decimals.
  test.each(metalNames())('%s: tabulated normal reflectance in air and in n = 1.36', (name) => {
    const { n, k } = readMetal(name);
    const rows = readTable('metals.csv').rows.filter(({ material }) => material === name);
    expect(rows).toHaveLength(31);
    for (const row of rows) {
      const nm = numberIn(row, 'wavelength_nm');
      // n and k are rounded to four decimals, which can cost one in the last digit of R.
      expect(Math.abs(metalReflectance(1, n(nm), k(nm), 1) - numberIn(row, 'R0_air'))).toBeLessThan(1.01e-4);
      expect(Math.abs(metalReflectance(1.36, n(nm), k(nm), 1) - numberIn(row, 'R0_n1.36'))).toBeLessThan(1.01e-4);
    }
  });

  // Evaporated aluminium, normal incidence: 92.2 % at 450 nm, 91.6 % at 550 nm (Hass, J. Opt. Soc. Am. 45 945 (1955); from memory).
  test('aluminium reflects what evaporated mirrors do', () => {
    const { n, k } = readMetal('aluminium');
    expect(Math.abs(metalReflectance(1, n(450), k(450), 1) - 0.922)).toBeLessThan(0.005);
    expect(Math.abs(metalReflectance(1, n(550), k(550), 1) - 0.916)).toBeLessThan(0.005);
  });
});
