import { describe, expect, test } from 'vitest';
import { readDye } from '../../src/materials/library.js';
import { doseToLose, shareLeft, timeToLose } from '../../src/photophysics/bleaching.js';
import { crossSectionCm2 } from '../../src/photophysics/cross-section.js';
import { emissionWeights } from '../../src/photophysics/emission-weights.js';
import { firstStrength } from '../../src/photophysics/first-strength.js';
import { escapingYield, overlapProbability } from '../../src/photophysics/overlap-probability.js';
import { photonRate } from '../../src/photophysics/photon-rate.js';
import { saturationIrradiance } from '../../src/photophysics/saturation-irradiance.js';
import { largestGain } from '../../src/photophysics/small-signal-gain.js';
import { stimulatedCrossSectionCm2 } from '../../src/photophysics/stimulated-emission.js';
import { EV_NM } from '../../src/units/constants.js';
import { rungeKutta } from '../helpers/runge-kutta.js';

describe('cross-section and saturation', () => {
  // 3.82e-21 ε: handbook factor of spectroscopy (from memory).
  test('a molar extinction of 1e5 L/(mol cm) is 3.82e-16 cm²', () => {
    const perMm = (Math.LN10 * 1e5 * 1e-3) / 10;
    expect(crossSectionCm2(perMm, 1e-3)).toBeCloseTo(3.8235e-16, 19);
  });

  // hν/(σ τ) by hand: 445 nm is 4.4639e-19 J; ε 7950 is 3.0397e-17 cm²; 4 ns.
  test('fluorescein at 445 nm saturates at 3.67 MW/cm²', () => {
    expect(saturationIrradiance(445, 3.0397e-17, 4)).toBeCloseTo(4.4639e-19 / (3.0397e-17 * 4e-9), -3);
  });

  test('a dye that does not absorb never saturates', () => {
    expect(saturationIrradiance(500, 0, 4)).toBe(Number.POSITIVE_INFINITY);
  });

  // Common practice, no source: 205 W at 445 nm with 4 ns keep 1.84e12 molecules excited, about a nanogram.
  test('205 W at 445 nm keep 1.84e12 molecules excited for 4 ns each', () => {
    const excited = photonRate(205, EV_NM / 445) * 4e-9;
    expect(excited / 1e12).toBeCloseTo(1.84, 2);
    expect(((excited * 332.31) / 6.02214076e23) * 1e9).toBeCloseTo(1.01, 2);
  });
});

describe('stimulated emission', () => {
  // Integral form of Füchtbauer–Ladenburg: 8π n² c ∫ σ/λ⁴ dλ = Φ/τ, whatever the shape.
  test('the sum over a spectrum gives back the radiative rate', () => {
    const { nm, weights } = emissionWeights({
      kind: 'spectrum',
      photonsPerNm: (at) => Math.exp(-(((at - 540) / 20) ** 2)),
      fromNm: 440,
      toNm: 640,
    });
    const step = nm[1] - nm[0];
    let sum = 0;
    for (let i = 0; i < nm.length; i++) {
      const sigma = stimulatedCrossSectionCm2(nm[i], weights[i] / step, 0.9, 4, 1.36);
      sum += (sigma / (nm[i] * 1e-7) ** 4) * step * 1e-7;
    }
    expect(8 * Math.PI * 1.36 ** 2 * 2.99792458e10 * sum).toBeCloseTo(0.9 / 4e-9, -2);
  });

  // Handbooks of dye lasers give 1e-16 to 4e-16 cm² for rhodamine 6G near its peak (from memory).
  test('rhodamine 6G comes out at some 2e-16 cm²', () => {
    const { emission, quantumYield, lifetimeNs } = readDye('rhodamine-6g', 'ethanol');
    const { nm, weights } = emissionWeights({ kind: 'spectrum', ...emission }, 1);
    const peak = weights.reduce((best, w, i) => (w > weights[best] ? i : best), 0);
    const sigma = stimulatedCrossSectionCm2(
      nm[peak],
      weights[peak] / (nm[1] - nm[0]),
      quantumYield,
      lifetimeNs ?? 4,
      1.361,
    );
    expect(sigma).toBeGreaterThan(1e-16);
    expect(sigma).toBeLessThan(4e-16);
  });

  test('gain is where emission beats absorption: n₁σₑ − n₀σₐ by hand', () => {
    const dye = {
      excited: 2e16,
      ground: 1e18,
      stimulated: () => 2e-16,
      absorption: (nm: number) => (nm < 550 ? 1e-16 : 1e-18),
    };
    const gain = largestGain([dye], () => 0.5, [500, 560]);
    expect(gain?.wavelengthNm).toBe(560);
    expect(gain?.perCm).toBeCloseTo(4 - 1 - 0.5, 12);
    expect(largestGain([dye], () => 0, [])).toBeNull();
  });
});

describe('bleaching', () => {
  // 0.105/yield photons for 10 %: Eggeling et al. 1998 (the law; abstract).
  test('a tenth is lost after 0.105/Y photons per molecule', () => {
    expect(doseToLose(0.1, 4e-7)).toBeCloseTo(0.10536 / 4e-7, -1);
  });

  test('share left and time are the integral of dN/dt = −Y r N', () => {
    const [integrated] = rungeKutta(([n]) => [-3e-6 * 5000 * n], [1], 60, 2000);
    expect(shareLeft(3e-6, 5000, 60)).toBeCloseTo(integrated, 10);
    expect(shareLeft(3e-6, 5000, timeToLose(0.1, 3e-6, 5000))).toBeCloseTo(0.9, 12);
    expect(timeToLose(0.1, 0, 5000)).toBe(Number.POSITIVE_INFINITY);
  });
});

describe('overlap', () => {
  const { emission, extinction } = readDye('fluorescein', 'ethanol');
  const shape = { kind: 'spectrum', ...emission } as const;
  const absorption = (nm: number) => (Math.LN10 * 2e-4 * extinction(nm)) / 10;

  test.each([0.1, 1, 8, 80])('over %d mm of fluorescein: Simpson’s rule on the same integral', (path) => {
    const steps = 20_000;
    const h = (emission.toNm - emission.fromNm) / steps;
    let top = 0;
    let bottom = 0;
    for (let i = 0; i <= steps; i++) {
      const nm = emission.fromNm + i * h;
      const weight = i === 0 || i === steps ? 1 : i % 2 === 1 ? 4 : 2;
      top += weight * emission.photonsPerNm(nm) * Math.exp(-absorption(nm) * path);
      bottom += weight * emission.photonsPerNm(nm);
    }
    expect(overlapProbability(emissionWeights(shape), absorption, path)).toBeCloseTo(1 - top / bottom, 4);
  });

  test('a line is Beer–Lambert alone', () => {
    const weights = emissionWeights({ kind: 'line', wavelengthNm: 510 });
    expect(overlapProbability(weights, () => 0.3, 2)).toBeCloseTo(1 - Math.exp(-0.6), 15);
  });

  // Birks: the sum Φ(1 − a)(1 + aΦ + (aΦ)² + …).
  test('what gets away is the geometric series of re-emissions', () => {
    let sum = 0;
    for (let k = 0; k < 500; k++) sum += 0.9 * 0.4 * (0.6 * 0.9) ** k;
    expect(escapingYield(0.9, 0.6)).toBeCloseTo(sum, 12);
  });
});

describe('first guess of strength', () => {
  // d/dt of (1 − e⁻ᵗ) Φ/(1 + (1 − Φ) t) with a = t/(1 + t): e⁻ᵗ(1 + k t) = k(1 − e⁻ᵗ), k = 1 − Φ. By hand for k = 0.1: t = 2.61.
  test('the optimum of a case solved by hand', () => {
    const guess = firstStrength({
      absorbed: (t) => -Math.expm1(-t),
      overlap: (t) => t / (1 + t),
      quantumYield: () => 0.9,
    });
    const t = guess.times;
    expect(Math.exp(-t) * (1 + 0.1 * t)).toBeCloseTo(0.1 * (1 - Math.exp(-t)), 2);
    expect(t).toBeGreaterThan(2.3);
    expect(t).toBeLessThan(2.7);
  });
});
