/** Spectral locus of the CIE 1931 2° observer (CIE 15:2004, chromaticity coordinates beside Table T.4; from memory). */
import { describe, expect, test } from 'vitest';
import { colourMatching } from '../../src/materials/observer.js';
import { chromaticityX, chromaticityY, dominantWavelength } from '../../src/outcome/colour.js';

const LOCUS = [
  [450, 0.1566, 0.0177],
  [500, 0.0082, 0.5384],
  [520, 0.0743, 0.8338],
  [550, 0.3016, 0.6923],
  [600, 0.627, 0.3725],
] as const;

describe('colour of a line', () => {
  test.each(LOCUS)('%i nm: x = %d, y = %d', (nm, x, y) => {
    const xyz = colourMatching(nm);
    expect(Math.abs(chromaticityX(...xyz) - x)).toBeLessThan(1e-4);
    expect(Math.abs(chromaticityY(...xyz) - y)).toBeLessThan(1e-4);
    expect(dominantWavelength(x, y)).toBeCloseTo(nm, 0);
  });
});

describe('dominant wavelength', () => {
  test.each([455, 487.5, 520, 531, 575, 620])('%s nm mixed with equal-energy white stays %s nm', (nm) => {
    const [X, Y, Z] = colourMatching(nm);
    for (const white of [0, 0.1, 1]) {
      const xyz = [X + white, Y + white, Z + white] as const;
      expect(dominantWavelength(chromaticityX(...xyz), chromaticityY(...xyz))).toBeCloseTo(nm, 6);
    }
  });

  test('white and purple have none', () => {
    expect(dominantWavelength(1 / 3, 1 / 3)).toBeNaN();
    // Half blue, half red.
    const [a, b] = [colourMatching(440), colourMatching(650)];
    const xyz = [a[0] + b[0], a[1] + b[1], a[2] + b[2]] as const;
    expect(dominantWavelength(chromaticityX(...xyz), chromaticityY(...xyz))).toBeNaN();
  });
});
