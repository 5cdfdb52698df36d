/** Primaries and white of sRGB: x, y after IEC 61966-2-1 (Rec. ITU-R BT.709). */
import { describe, expect, it } from 'vitest';
import { screenColour } from '../../src/report/light-colour.js';

describe('screenColour', () => {
  it.each([
    ['red', 0.64, 0.33, [255, 0, 0]],
    ['green', 0.3, 0.6, [0, 255, 0]],
    ['blue', 0.15, 0.06, [0, 0, 255]],
    ['D65 white', 0.3127, 0.329, [255, 255, 255]],
  ] as const)('%s', (_, x, y, bytes) => {
    // The matrix is published with four digits: a byte of slack at the bright end, more where gamma is steep near 0.
    screenColour(x, y).forEach((byte, i) => {
      if (bytes[i] === 255) expect(byte).toBeGreaterThanOrEqual(254);
      else expect(byte).toBeLessThanOrEqual(12);
    });
  });

  it('stays within the bytes for light no screen can show', () => {
    for (const [x, y] of [
      [0.0743, 0.8338],
      [0.1741, 0.005],
      [0.7347, 0.2653],
      [0.3, 0],
    ]) {
      for (const byte of screenColour(x, y)) {
        expect(Number.isInteger(byte)).toBe(true);
        expect(byte).toBeGreaterThanOrEqual(0);
        expect(byte).toBeLessThanOrEqual(255);
      }
    }
  });
});
