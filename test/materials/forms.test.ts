import { describe, expect, test } from 'vitest';
import { formShares } from '../../src/materials/acid-base.js';
import { readDye } from '../../src/materials/library.js';

// Fractions of the four forms and Σ fraction·yield, from pKa 2.08, 4.31, 6.43 and yields 0.18, 0.30, 0.37, 0.93
// (Sjöback, Nygren & Kubista, Spectrochim. Acta A 51 L7 (1995), verified; fractions computed elsewhere, exact).
const CHECK = [
  [1.0, 0.923176, 0.076786, 0.000038, 0, 0.18922],
  [2.0, 0.54471, 0.45307, 0.002219, 0, 0.23479],
  [3.0, 0.102826, 0.855269, 0.041889, 0.000016, 0.2906],
  [4.0, 0.007996, 0.665061, 0.325733, 0.00121, 0.3226],
  [5.0, 0.000198, 0.164448, 0.80543, 0.029925, 0.37521],
  [5.5, 0.000021, 0.05462, 0.845967, 0.099392, 0.42183],
  [6.0, 0.000002, 0.014668, 0.718414, 0.266916, 0.51845],
  [6.5, 0, 0.00296, 0.458431, 0.538609, 0.67141],
  [7.0, 0, 0.000433, 0.211981, 0.787586, 0.81102],
  [8.0, 0, 0.000005, 0.02621, 0.973785, 0.91532],
  [9.0, 0, 0, 0.002684, 0.997316, 0.9285],
  [11.0, 0, 0, 0.000027, 0.999973, 0.92998],
] as const;

describe('forms of fluorescein in water', () => {
  const { forms, extinction } = readDye('fluorescein', 'water');
  const pKa = forms.flatMap((form) => form.pKa ?? []);

  test.each(CHECK)('at pH %d', (pH, cation, neutral, monoanion, dianion, meanYield) => {
    const shares = formShares(pH, pKa);
    for (const [i, share] of [cation, neutral, monoanion, dianion].entries()) expect(shares[i]).toBeCloseTo(share, 5);
    expect(shares.reduce((sum, share, i) => sum + share * forms[i].quantumYield, 0)).toBeCloseTo(meanYield, 4);
  });

  // Peaks and extinctions: Sjöback et al. 1995, verified. The shapes between are a model.
  test.each([
    ['cation', 437, 53000],
    ['neutral', 434, 11000],
    ['dianion', 490, 76900],
  ])('%s peaks at %d nm with %d L/(mol cm)', (name, nm, height) => {
    const form = forms.find((each) => each.name === name);
    const curve = form?.extinction ?? (() => Number.NaN);
    const all = Array.from({ length: 401 }, (_, i) => 380 + i / 2);
    const top = all.reduce((best, x) => (curve(x) > curve(best) ? x : best), 380);
    expect(Math.abs(top - nm)).toBeLessThanOrEqual(2);
    expect(curve(top) / height).toBeCloseTo(1, 3);
  });

  // Two peaks of equal height, at 453 and 472 nm (same source).
  test('the monoanion has two peaks of one height', () => {
    const curve = forms[2].extinction;
    for (const [from, to, nm] of [
      [445, 461, 453],
      [463, 480, 472],
    ]) {
      const all = Array.from({ length: 2 * (to - from) + 1 }, (_, i) => from + i / 2);
      const top = all.reduce((best, x) => (curve(x) > curve(best) ? x : best), from);
      expect(Math.abs(top - nm)).toBeLessThanOrEqual(2);
      expect(Math.abs(curve(top) / 29000 - 1)).toBeLessThan(0.02);
    }
  });

  test('the dianion is the dye as the library has it', () => {
    expect(forms[3].extinction(470)).toBe(extinction(470));
  });

  // Brightness of the dye pumped at 490 nm rises from pH 5 to pH 9, by half near pKa 6.43 (standard pH probe; common practice, no source).
  test('brightness at 490 nm rises through the last pKa', () => {
    const bright = (pH: number) =>
      formShares(pH, pKa).reduce((sum, share, i) => sum + share * forms[i].quantumYield * forms[i].extinction(490), 0);
    const half = bright(6.43) / bright(10);
    expect(half).toBeGreaterThan(0.5);
    expect(half).toBeLessThan(0.54);
    expect(bright(5) / bright(10)).toBeLessThan(0.1);
  });
});

test('shares stay finite at any acidity', () => {
  expect(formShares(-400, [2, 4])).toEqual([1, 0, 0]);
  expect(formShares(400, [2, 4])[2]).toBe(1);
});
