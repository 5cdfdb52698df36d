import { describe, expect, it } from 'vitest';
import { type Film, filmShares } from '../../src/proofs/film-law.js';
import { fresnelReflectance, metalReflectance, radians } from '../../src/proofs/fresnel-law.js';
import { rodIrradiance, rodShare } from '../../src/proofs/method-of-images.js';
import { gaussNodes, integrate } from '../../src/proofs/quadrature.js';
import { coaxialDiscs, parallelRectangles, perpendicularRectangles } from '../../src/proofs/view-factors.js';

describe('closed formulas of the proofs against printed numbers', () => {
  // Howell's catalogue of view factors, C-41, C-11, C-14; evaluated apart from this code, the rectangles checked by quadrature.
  it.each([
    ['discs 1, 1', coaxialDiscs(1, 1), 0.381966],
    ['discs 0.5, 1', coaxialDiscs(0.5, 1), 0.468871],
    ['discs 2, 1', coaxialDiscs(2, 1), 0.190983],
    ['parallel 1, 1', parallelRectangles(1, 1), 0.199825],
    ['parallel 2, 0.5', parallelRectangles(2, 0.5), 0.165269],
    ['parallel 0.4, 0.4', parallelRectangles(0.4, 0.4), 0.046137],
    ['perpendicular 1, 1', perpendicularRectangles(1, 1), 0.200044],
    ['perpendicular 2, 1', perpendicularRectangles(2, 1), 0.232853],
    ['perpendicular 0.25, 0.5', perpendicularRectangles(0.25, 0.5), 0.166855],
  ])('view factor, %s', (_, value, printed) => expect(value).toBeCloseTo(printed, 6));

  it('Fresnel: 4 % at normal incidence, half of ((n² − 1)/(n² + 1))² at the Brewster angle, 1 beyond the critical one', () => {
    expect(fresnelReflectance(1, 1.5, 0)).toBeCloseTo(0.04, 12);
    expect(fresnelReflectance(1, 1.5, Math.atan(1.5))).toBeCloseTo((1.25 / 3.25) ** 2 / 2, 10);
    expect(fresnelReflectance(1.5, 1, Math.asin(1 / 1.5) + 1e-9)).toBe(1);
  });

  it('diffuse Fresnel integrals, Duntley 1942: 0.066 for n = 1.33, 0.092 for 1.5', () => {
    const diffuse = (n: number) =>
      integrate((angle) => fresnelReflectance(1, n, angle) * Math.sin(2 * angle), 0, Math.PI / 2);
    expect(diffuse(1.33)).toBeCloseTo(0.065931, 5);
    expect(diffuse(1.5)).toBeCloseTo(0.091778, 5);
  });

  // Table of independently computed multilayer values.
  it('thin films by echoes: 15 quarter waves in liquid, silver-like metal, frustrated total reflection', () => {
    const quarter = (n: number): Film => [n, 0, 520 / (4 * n)];
    const fifteen = Array.from({ length: 15 }, (_, i) => quarter(i % 2 ? 1.46 : 2.35));
    const at = (degrees: number) => filmShares(fifteen, 1.3614, 1.52, radians(degrees), 520).reflectance;
    expect(at(30)).toBeCloseTo((0.998883 + 0.983165) / 2, 6);
    expect(at(45)).toBeCloseTo((0.997678 + 0.074491) / 2, 6);
    expect(at(60)).toBeCloseTo((0.891896 + 0.000806) / 2, 6);
    const silver = filmShares([[0.05, 3.3, 50]], 1.3614, 1.5168, radians(30), 520);
    expect(silver.reflectance).toBeCloseTo((0.951325 + 0.931581) / 2, 6);
    expect(silver.transmittance).toBeCloseTo((0.028958 + 0.042564) / 2, 6);
    const gap = filmShares([[1, 0, 100]], 1.3614, 1.3614, radians(50), 520);
    expect(gap.reflectance).toBeCloseTo((0.265891 + 0.141452) / 2, 6);
  });

  // Rakić 1995, as tabulated with R at normal incidence in air and in n = 1.36.
  it.each([
    [0.4879, 4.8355, 1, 0.9238],
    [0.4879, 4.8355, 1.36, 0.901],
    [0.8878, 6.281, 1, 0.9174],
    [0.8878, 6.281, 1.36, 0.8915],
  ])('metal n %f, k %f in %f reflects %f', (n, k, outside, printed) => {
    expect(metalReflectance(outside, n, k, 0)).toBeCloseTo(printed, 4);
  });

  it('a metal without absorption is a dielectric at every angle', () => {
    for (const degrees of [0, 30, 60, 85]) {
      expect(metalReflectance(1, 1.5, 0, radians(degrees))).toBeCloseTo(
        fresnelReflectance(1, 1.5, radians(degrees)),
        10,
      );
    }
  });

  // Point values of the mixing-rod table, summed to 800 images.
  it.each([
    [0.5, 0, 0, 0.5, 0.5, 0.71],
    [0.5, 0.25, 0, -0.25, 0, 0.63962],
    [0.5, 0.25, 0.25, 0.5, 0.5, 2.38174],
    [1, 0.25, 0, 0.5, 0, 1.17127],
    [2, 0.25, 0.25, 0.5, 0.5, 1.01862],
  ])('rod of length %f, source (%f, %f), at (%f, %f)', (length, x0, y0, x, y, printed) => {
    expect(rodIrradiance(length, x0, y0, x, y)).toBeCloseTo(printed, 5);
  });

  it('a rod with perfect walls loses nothing', () => {
    expect(rodShare(1, [0.25, 0.25], [-0.5, 0.5], [-0.5, 0.5])).toBeCloseTo(1, 5);
  });

  // Abramowitz & Stegun, table 25.4, n = 5.
  it('Gauss–Legendre nodes', () => {
    const [first, second, third] = gaussNodes(5);
    expect(1 - 2 * first.at).toBeCloseTo(0.906179845938664, 14);
    expect(2 * first.weight).toBeCloseTo(0.236926885056189, 14);
    expect(1 - 2 * second.at).toBeCloseTo(0.538469310105683, 14);
    expect(third.at).toBeCloseTo(0.5, 14);
    expect(2 * third.weight).toBeCloseTo(0.568888888888889, 14);
  });
});
