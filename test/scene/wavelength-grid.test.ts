/** The grid of wavelengths, and the photons of lines on it. */
import { describe, expect, test } from 'vitest';
import { linePhotons, nearestIndex, wavelengthGrid } from '../../src/scene/wavelength-grid.js';
import { beam, describeDesign, medium, part, plainDye } from '../helpers/describe.js';

function gridOf(pumps: readonly (readonly [nm: number, width: number])[], emissionNm = 520) {
  return wavelengthGrid(
    describeDesign({
      media: [medium('bath', 1.36, { dyes: [plainDye(0.5, 0.9, emissionNm)] })],
      parts: [part('cell', { kind: 'box', size: [1, 1, 1] }, 'bath')],
      pumps: pumps.map(([wavelengthNm, linewidthNm], i) =>
        beam([0, 0, -9], [0, 0, 1], { name: `p${i}`, wavelengthNm, linewidthNm }),
      ),
      exit: 'cell.top',
    }),
  );
}

describe('grid of wavelengths', () => {
  test('holds every sharp line exactly, however close they lie', () => {
    const lines = [450, 450.1, 449.8, 450.3, 450.45, 450.05, 532.27];
    const { nm, widthNm } = gridOf(
      lines.map((line) => [line, 0] as const),
      520.13,
    );
    for (const line of [...lines, 520.13]) expect(nm).toContain(line);
    for (let i = 1; i < nm.length; i++) expect(nm[i]).toBeGreaterThan(nm[i - 1]);
    // The cells cover the axis without gap or overlap.
    const covered = widthNm.reduce((a, b) => a + b, 0);
    expect(covered).toBeCloseTo(nm[nm.length - 1] - nm[0] + (widthNm[0] + widthNm[nm.length - 1]) / 2, 9);
  });

  test.each([
    [445, 190],
    [210, 30],
    [1990, 100],
    [200, 0],
  ])('a line at %s nm of %s nm width reaches no wavelength without data', (line, width) => {
    const { nm } = gridOf([[line, width]]);
    expect(nm[0]).toBeGreaterThanOrEqual(200);
    expect(nm[nm.length - 1]).toBeLessThanOrEqual(2000);
  });

  test('a Gaussian line has the width asked for, also between the points of the grid', () => {
    for (const [line, width] of [
      [445.2, 1],
      [445.2, 2],
      [450, 20],
    ] as const) {
      const grid = gridOf([[line, width]]);
      const photons = linePhotons(grid, line, width);
      const total = photons.reduce((a, b) => a + b, 0);
      const mean = photons.reduce((sum, n, i) => sum + n * grid.nm[i], 0) / total;
      const variance = photons.reduce((sum, n, i) => sum + n * (grid.nm[i] - mean) ** 2, 0) / total;
      expect(mean).toBeCloseTo(line, 2);
      // FWHM = √(8 ln 2) σ; a cell of width h adds h²/12 (Sheppard's correction).
      expect(Math.sqrt((variance - 0.25 / 12) * 8 * Math.LN2)).toBeCloseTo(width, 1);
    }
  });

  test('a sharp line is one cell', () => {
    const grid = gridOf([[450.1, 0]]);
    const photons = linePhotons(grid, 450.1, 0);
    expect(photons.reduce((a, b) => a + b, 0)).toBe(1);
    expect(grid.nm[nearestIndex(grid.nm, 450.1)]).toBe(450.1);
  });
});
