/** Evenness by CIE 1976 L* (CIE 15:2004, 8.2.1) of the sRGB colours (IEC 61966-2-1). */
import { describe, expect, it } from 'vitest';
import { PALETTE, paletteColour, paletteIndex } from '../../src/report/charts/palette.js';

const lightness = (i: number): number => {
  const [r, g, b] = [...PALETTE.subarray(3 * i, 3 * i + 3)].map((byte) => {
    const c = byte / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  });
  const y = 0.2126 * r + 0.7152 * g + 0.0722 * b;
  return y > 216 / 24389 ? 116 * Math.cbrt(y) - 16 : (24389 / 27) * y;
};

describe('palette', () => {
  it('grows lighter from end to end, evenly', () => {
    const steps = Array.from({ length: 16 }, (_, i) => lightness(17 * i)).map((l, i, all) => l - (all[i - 1] ?? l));
    const inner = steps.slice(1);
    const mean = inner.reduce((a, b) => a + b, 0) / inner.length;
    for (const step of inner) {
      expect(step).toBeGreaterThan(0.5 * mean);
      expect(step).toBeLessThan(1.5 * mean);
    }
  });

  it('has an index and a colour for every share, and for those outside', () => {
    expect([-1, 0, 0.5, 1, 2].map(paletteIndex)).toEqual([0, 0, 128, 255, 255]);
    expect(paletteColour(0.5)).toMatch(/^#[0-9a-f]{6}$/);
  });
});
