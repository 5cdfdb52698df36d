import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { beadScattering } from '../../src/optics/bead-scattering.js';
import { AMPLITUDE, mieAmplitudes, mieEfficiencies, mieIntensity, mieSeries } from '../../src/optics/mie.js';
import { gaussNodes } from '../../src/proofs/quadrature.js';

const efficiencies = (size: number, n: number, k = 0) => mieEfficiencies(mieSeries(size, n, k));
const amplitudes = (size: number, n: number, k: number, cosine: number) => {
  const out = new Float64Array(AMPLITUDE.COUNT);
  mieAmplitudes(mieSeries(size, n, k), cosine, out);
  return out;
};

describe('published numbers', () => {
  // Bohren & Huffman (1983), appendix A, sample output: index 1.55, radius 0.525 µm, 0.6328 µm (from memory).
  test('the worked example of appendix A', () => {
    const size = (2 * Math.PI * 0.525) / 0.6328;
    expect(size).toBeCloseTo(5.213, 3);
    const { extinction, scattering, back } = efficiencies(size, 1.55);
    expect(extinction).toBeCloseTo(3.10543, 5);
    expect(scattering).toBeCloseTo(3.10543, 5);
    expect(back).toBeCloseTo(2.92534, 5);
    const series = mieSeries(size, 1.55, 0);
    const relative = (degrees: number) =>
      mieIntensity(series, Math.cos((degrees * Math.PI) / 180)) / mieIntensity(series, 1);
    expect(relative(9)).toBeCloseTo(0.78539, 5);
    expect(relative(18)).toBeCloseTo(0.356897, 6);
    expect(relative(27)).toBeCloseTo(0.0766119, 6);
    expect(relative(36)).toBeCloseTo(0.0355355, 6);
    expect(relative(45)).toBeCloseTo(0.0701845, 6);
    expect(relative(90)).toBeCloseTo(0.0124601, 6);
  });

  // Wiscombe, NCAR/TN-140+STR (1979), tables of test cases (from memory): extinction, scattering, mean cosine.
  test.each([
    [10, 0.75, 0, 2.232265, 2.232265, 0.896473],
    [1000, 0.75, 0, 1.997908, 1.997908, 0.844944],
    [1, 1.33, 1e-5, 0.093952, 0.093923, 0.184517],
    [100, 1.33, 1e-5, 2.101321, 2.096594, 0.868959],
    [1, 1.5, 1, 2.336321, 0.663454, 0.192136],
    [100, 1.5, 1, 2.097502, 1.283697, 0.850252],
    [10_000, 1.5, 1, 2.004368, 1.236574, 0.846309],
    [1, 10, 10, 2.532993, 2.049405, -0.110664],
    [100, 10, 10, 2.071124, 1.836785, 0.556215],
  ])('size %f, index %f + %fi', (size, n, k, extinction, scattering, anisotropy) => {
    const found = efficiencies(size, n, k);
    expect(Math.abs(found.extinction - extinction)).toBeLessThan(1.1e-6);
    expect(Math.abs(found.scattering - scattering)).toBeLessThan(1.1e-6);
    expect(Math.abs(found.anisotropy - anisotropy)).toBeLessThan(1.1e-6);
  });
});

describe('limits', () => {
  test.each([
    [1.5, 0],
    [1.33, 0.1],
    [0.8, 0],
  ])('Rayleigh: 8/3 x⁴ |(m² − 1)/(m² + 2)|² and 4x Im of it, index %f + %fi', (n, k) => {
    const x = 0.002;
    const [re, im] = [n * n - k * k, 2 * n * k];
    const norm = (re + 2) ** 2 + im ** 2;
    const ratio = { re: ((re - 1) * (re + 2) + im * im) / norm, im: (3 * im) / norm };
    const scattering = (8 / 3) * x ** 4 * (ratio.re ** 2 + ratio.im ** 2);
    const found = efficiencies(x, n, k);
    expect(found.scattering / scattering).toBeCloseTo(1, 4);
    expect(found.extinction / (scattering + 4 * x * ratio.im)).toBeCloseTo(1, 4);
    expect(Math.abs(found.anisotropy)).toBeLessThan(1e-5);
    const series = mieSeries(x, n, k);
    // 1 + cos²
    expect(mieIntensity(series, 0) / mieIntensity(series, 1)).toBeCloseTo(0.5, 5);
  });

  test('extinction paradox: a large sphere takes twice its shadow; the excess falls as x^(−2/3) (Nussenzveig & Wiscombe 1980: 1.9924 x^(−2/3))', () => {
    for (const x of [500, 2000]) {
      expect((efficiencies(x, 1.5, 0.1).extinction - 2) / (1.9924 * x ** (-2 / 3))).toBeCloseTo(1, 0);
    }
    expect(efficiencies(5000, 1.5, 0.1).extinction).toBeCloseTo(2, 1);
  });

  test('anomalous diffraction (van de Hulst 1957 ch. 11) within 3 % for an index near 1', () => {
    for (const x of [40, 60, 100, 150]) {
      const rho = 2 * x * 0.02;
      const expected = 2 - (4 / rho) * Math.sin(rho) + (4 / rho ** 2) * (1 - Math.cos(rho));
      expect(Math.abs(efficiencies(x, 1.02).extinction / expected - 1)).toBeLessThan(0.03);
    }
  });
});

describe('what holds for every sphere', () => {
  const nodes = gaussNodes(300);
  const sphere = fc.tuple(
    fc.double({ min: 0.05, max: 60, noNaN: true }),
    fc.double({ min: 0.6, max: 2.5, noNaN: true }),
    fc.oneof(fc.constant(0), fc.double({ min: 1e-5, max: 1, noNaN: true })),
  );

  test('the integral of the intensity is the scattering, its first moment the mean cosine', () => {
    fc.assert(
      fc.property(sphere, ([size, n, k]) => {
        const { scattering, anisotropy } = efficiencies(size, n, k);
        fc.pre(scattering > 1e-12);
        const series = mieSeries(size, n, k);
        let total = 0;
        let first = 0;
        for (const { at, weight } of nodes) {
          const cosine = 2 * at - 1;
          const light = 2 * weight * mieIntensity(series, cosine);
          total += light;
          first += light * cosine;
        }
        expect(total / size ** 2 / scattering).toBeCloseTo(1, 8);
        expect(first / total).toBeCloseTo(anisotropy, 8);
      }),
      { numRuns: 60, seed: 1 },
    );
  });

  test('optical theorem: extinction is 4/x² Re S(0); clear spheres absorb nothing, others something', () => {
    fc.assert(
      fc.property(sphere, ([size, n, k]) => {
        const { extinction, scattering } = efficiencies(size, n, k);
        const ahead = amplitudes(size, n, k, 1);
        expect((4 * ahead[AMPLITUDE.s1Real]) / size ** 2 / extinction).toBeCloseTo(1, 8);
        expect(ahead[AMPLITUDE.s2Real]).toBeCloseTo(ahead[AMPLITUDE.s1Real], 8);
        if (k === 0) expect(Math.abs(scattering - extinction)).toBeLessThan(1e-9 * Math.max(1, extinction));
        else expect(scattering).toBeLessThan(extinction);
      }),
      { numRuns: 200, seed: 2 },
    );
  });
});

test('cross sections scale with the area, and a bead as the medium about it does not scatter', () => {
  const { scattering, absorption } = beadScattering(0.001, 1.59, 0, 1.33, 500);
  expect(absorption).toBe(0);
  expect(scattering / (Math.PI * 1e-6)).toBeCloseTo(
    efficiencies((2 * Math.PI * 1000 * 1.33) / 500, 1.59 / 1.33).scattering,
    12,
  );
  expect(beadScattering(0.001, 1.33, 0, 1.33, 500).scattering).toBeLessThan(1e-20);
});

test('what no sphere has is refused', () => {
  expect(() => mieSeries(0, 1.5, 0)).toThrow(RangeError);
  expect(() => mieSeries(Number.POSITIVE_INFINITY, 1.5, 0)).toThrow(RangeError);
  expect(() => mieSeries(1, 0, 0)).toThrow(RangeError);
  expect(() => mieSeries(1, 1.5, -0.1)).toThrow(RangeError);
});
