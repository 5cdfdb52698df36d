/** Fresnel's formulas against closed forms and handbook values that the code does not use. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fresnelReflectance } from '../../src/optics/fresnel.js';

const angle = (degrees: number) => Math.cos((degrees * Math.PI) / 180);

/** The sine and tangent form: Born & Wolf, Principles of Optics, §1.5.2, eq. (21a). */
function bySinesAndTangents(n1: number, n2: number, incidence: number): number {
  const refraction = Math.asin((n1 / n2) * Math.sin(incidence));
  const s = Math.sin(incidence - refraction) / Math.sin(incidence + refraction);
  const p = Math.tan(incidence - refraction) / Math.tan(incidence + refraction);
  return (s * s + p * p) / 2;
}

/**
 * Hemispherical reflectance for Lambertian light from air: the closed form of Walsh (1926) as printed by
 * Duntley, J. Opt. Soc. Am. 32 61 (1942); from memory.
 */
function walsh(n: number): number {
  const n2 = n * n;
  const n4 = n2 * n2;
  return (
    0.5 +
    ((n - 1) * (3 * n + 1)) / (6 * (n + 1) ** 2) +
    ((n2 * (n2 - 1) ** 2) / (n2 + 1) ** 3) * Math.log((n - 1) / (n + 1)) -
    (2 * n ** 3 * (n2 + 2 * n - 1)) / ((n2 + 1) * (n4 - 1)) +
    ((8 * n4 * (n4 + 1)) / ((n2 + 1) * (n4 - 1) ** 2)) * Math.log(n)
  );
}

/** Mean of f(cosine) over Lambertian light, ∫ 2µ f dµ, by the midpoint rule: good to 1e-7 here. */
function lambertianMean(f: (cosine: number) => number): number {
  const count = 4000;
  let sum = 0;
  for (let i = 0; i < count; i++) {
    const cosine = (i + 0.5) / count;
    sum += 2 * cosine * f(cosine);
  }
  return sum / count;
}

/** Lambertian light from inside n: the part within the critical angle is integrated over the angle outside. */
function fromInside(n: number): number {
  const within = lambertianMean((outside) =>
    fresnelReflectance(n, 1, Math.sqrt(1 - (1 - outside * outside) / (n * n))),
  );
  return 1 - (1 - within) / (n * n);
}

describe('fresnelReflectance', () => {
  test('normal incidence: ((n1 − n2)/(n1 + n2))², 4 % for glass of 1.5', () => {
    expect(fresnelReflectance(1, 1.5, 1)).toBeCloseTo(0.04, 15);
    expect(fresnelReflectance(1.5, 1, 1)).toBeCloseTo(0.04, 15);
    expect(fresnelReflectance(1.3614, 1.5168, 1)).toBeCloseTo((0.1554 / 2.8782) ** 2, 15);
  });

  test("Brewster's angle: only s is reflected, ((n² − 1)/(n² + 1))² of it", () => {
    for (const n of [1.33, 1.5, 1.77, 2.4]) {
      const s = ((n * n - 1) / (n * n + 1)) ** 2;
      expect(fresnelReflectance(1, n, Math.cos(Math.atan(n)))).toBeCloseTo(s / 2, 14);
    }
  });

  test('beyond the critical angle everything is reflected; grazing light too', () => {
    // asin(1/1.5) = 41.81°, Hecht, Optics, table of critical angles.
    expect(fresnelReflectance(1.5, 1, angle(41.82))).toBe(1);
    expect(fresnelReflectance(1.5, 1, angle(41.8))).toBeLessThan(1);
    expect(fresnelReflectance(1.5, 1, 0)).toBe(1);
    expect(fresnelReflectance(1, 1.5, 0)).toBeCloseTo(1, 15);
  });

  test('agrees with the sine and tangent form at 1° to 89°, both ways', () => {
    for (let degrees = 1; degrees < 90; degrees++) {
      const incidence = (degrees * Math.PI) / 180;
      expect(fresnelReflectance(1, 1.3614, angle(degrees))).toBeCloseTo(bySinesAndTangents(1, 1.3614, incidence), 12);
      if (1.3614 * Math.sin(incidence) < 1) {
        expect(fresnelReflectance(1.3614, 1, angle(degrees))).toBeCloseTo(bySinesAndTangents(1.3614, 1, incidence), 12);
      }
    }
  });

  test('is the same from either side of the interface (Stokes relations)', () => {
    const index = fc.double({ min: 1, max: 3, noNaN: true });
    fc.assert(
      fc.property(index, index, fc.double({ min: 0.01, max: 1, noNaN: true }), (n1, n2, cosine) => {
        const sine = (n1 / n2) * Math.sqrt(1 - cosine * cosine);
        fc.pre(sine < 0.9999);
        const back = fresnelReflectance(n2, n1, Math.sqrt(1 - sine * sine));
        expect(fresnelReflectance(n1, n2, cosine)).toBeCloseTo(back, 9);
      }),
    );
  });

  // Computed elsewhere by quadrature, six decimals; 0.066, 0.092, 0.472, 0.596 are the printed ones (Duntley 1942).
  test.each([
    [1.33, 0.065931, 0.471949],
    [1.3614, 0.070861, 0.498687],
    [1.4, 0.076812, 0.528985],
    [1.4318, 0.081635, 0.552028],
    [1.47, 0.087347, 0.577652],
    [1.5, 0.091778, 0.596346],
    [1.5168, 0.09424, 0.606308],
    [1.585, 0.104102, 0.643385],
  ])('Lambertian light on n = %f', (n, external, internal) => {
    const measured = lambertianMean((cosine) => fresnelReflectance(1, n, cosine));
    expect(Math.abs(measured - external)).toBeLessThan(1e-6);
    expect(Math.abs(measured - walsh(n))).toBeLessThan(1e-6);
    expect(Math.abs(fromInside(n) - internal)).toBeLessThan(1e-6);
  });
});
