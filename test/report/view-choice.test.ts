import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { hull } from '../../src/report/charts/hull.js';
import { lightStroke } from '../../src/report/charts/light-stroke.js';
import { choosePaths, fatesOfRows, isAt, type PathChoice } from '../../src/report/view/choose-paths.js';
import { LIGHTS } from '../../src/report/view/light-index.js';
import { ON_DARK, ON_LIGHT, type Rgb, shade } from '../../src/report/view/light-shade.js';
import { lightTable } from '../../src/report/view/light-table.js';
import { firstOutlook, outlookAxes } from '../../src/report/view/outlook.js';
import { packDrawing } from '../../src/report/view/pack-drawing.js';
import { pumpArrow } from '../../src/report/view/pump-arrow.js';
import { unpackDrawing } from '../../src/report/view/unpack-drawing.js';
import { boxDrawing } from './box-drawing.js';

const { paths, fates } = unpackDrawing(packDrawing(boxDrawing()));
const all: PathChoice = { fates: new Set(), place: null, reemitted: 'any', most: 1000 };
const ended = (choice: Partial<PathChoice>) =>
  choosePaths(paths, fates, { ...all, ...choice }).shown.map(({ fate }) => fates[fate].where);

describe('the choice of paths', () => {
  it('is all of them at first, and no more than asked for', () => {
    expect(ended({})).toHaveLength(40);
    expect(choosePaths(paths, fates, { ...all, most: 7 })).toMatchObject({ fitting: 40, shown: { length: 7 } });
  });

  it('is what a face or a part took', () => {
    expect(new Set(ended({ place: 'cell.left' }))).toEqual(new Set(['cell.left']));
    expect(new Set(ended({ place: 'cell' }))).toEqual(
      new Set(['cell', 'cell.left', 'cell.bottom', 'cell.front', 'cell.back']),
    );
    expect(isAt('cellar.left', 'cell')).toBe(false);
  });

  it('is that of the rows of the ledger', () => {
    const row = { fate: 'absorbed-by-finish', light: 'emitted', where: 'cell.left' };
    const chosen = fatesOfRows([row], fates);
    expect(new Set(ended(chosen))).toEqual(new Set(['cell.left']));
    expect(fatesOfRows([{ ...row, where: 'lid.left' }], fates).fates.size).toBe(0);
  });

  it('answers Stokes heat with the paths that were sent out anew', () => {
    const heat = fatesOfRows([{ fate: 'stokes-heat', light: 'pump', where: 'cell' }], fates);
    expect(heat.reemitted).toBe('once');
    const shown = choosePaths(paths, fates, { ...all, ...heat }).shown;
    expect(shown).toHaveLength(30);
    expect(shown.every(({ fate }) => fates[fate].light === 'emitted')).toBe(true);
    expect(fatesOfRows([{ fate: 'stokes-heat', light: 'emitted', where: 'cell' }], fates).reemitted).toBe('again');
    expect(ended({ reemitted: 'again' })).toEqual([]);
  });
});

describe('the first look', () => {
  it.each([
    ['long along x', [90, 6, 6]],
    ['long along y', [6, 90, 6]],
    ['flat', [60, 40, 2]],
    ['tall', [5, 5, 60]],
  ] as const)('shows the longest side of a %s design nearly at full length', (_, size) => {
    const { right, up, toward } = outlookAxes(firstOutlook(size));
    const axis = size.indexOf(Math.max(...size) as never);
    expect(Math.hypot(right[axis], up[axis])).toBeGreaterThan(0.85);
    // From the front, the right and above.
    expect([toward[0] > 0, toward[1] < 0, toward[2] > 0]).toEqual([true, true, true]);
  });

  it('has axes at right angles to one another', () => {
    const angle = fc.double({ min: -3, max: 3, noNaN: true });
    fc.assert(
      fc.property(angle, angle, (azimuth, elevation) => {
        const { right: r, up: u, toward: t } = outlookAxes({ azimuth, elevation });
        const cross = [r[1] * u[2] - r[2] * u[1], r[2] * u[0] - r[0] * u[2], r[0] * u[1] - r[1] * u[0]];
        for (const [i, value] of cross.entries()) expect(value).toBeCloseTo(t[i], 12);
        expect(Math.hypot(...r)).toBeCloseTo(1, 12);
      }),
    );
  });
});

describe('the arrow of a pump', () => {
  const solid = { low: [-1, -1, -1], high: [1, 1, 1] };

  it('ends just outside the parts, on the axis of the light', () => {
    const { tail, tip } = pumpArrow({ at: [0, -50, 0.5], direction: [0, 1, 0] }, solid);
    expect(tip[1]).toBeLessThan(-1);
    expect(tip[1]).toBeGreaterThan(-1.2);
    expect(tail[1]).toBeLessThan(tip[1]);
    expect([tail[0], tail[2], tip[0], tip[2]]).toEqual([0, 0.5, 0, 0.5]);
  });

  it('starts at a pump that looks past the parts or sits within them', () => {
    expect(pumpArrow({ at: [0, -50, 9], direction: [0, 1, 0] }, solid).tail).toEqual([0, -50, 9]);
    expect(pumpArrow({ at: [0, 0, 0], direction: [0, 0, 1] }, solid).tail).toEqual([0, 0, 0]);
  });
});

describe('colours of paths', () => {
  // WCAG 2.2, success criterion 1.4.11: graphics need 3 : 1 against what is beside them; the ratio is its own definition.
  const relative = ([r, g, b]: Rgb) => {
    const [x, y, z] = [r, g, b].map((v) => (v / 255 <= 0.04045 ? v / 255 / 12.92 : ((v / 255 + 0.055) / 1.055) ** 2.4));
    return 0.2126 * x + 0.7152 * y + 0.0722 * z;
  };
  const contrast = (a: Rgb, b: Rgb) => {
    const [low, high] = [relative(a), relative(b)].sort((x, y) => x - y);
    return (high + 0.05) / (low + 0.05);
  };
  const LIGHT: Rgb = [0xfa, 0xf8, 0xf3];
  const DARK: Rgb = [0x1a, 0x21, 0x25];
  const table = lightTable();

  it('stand out from the paper by 3 to 1 at every wavelength, light and dark', () => {
    for (let i = 0; i < LIGHTS; i++) {
      const light: Rgb = [table[3 * i], table[3 * i + 1], table[3 * i + 2]];
      expect(contrast(shade(light, ON_LIGHT), LIGHT)).toBeGreaterThan(3);
      expect(contrast(shade(light, ON_DARK), DARK)).toBeGreaterThan(3);
      const stroke = lightStroke(350 + 2 * i);
      const both = [1, 3, 5].map((at) => Number.parseInt(stroke.slice(at, at + 2), 16)) as [number, number, number];
      expect(contrast(both, LIGHT)).toBeGreaterThan(3);
      expect(contrast(both, DARK)).toBeGreaterThan(3);
    }
  });

  // Common knowledge, no source.
  it.each([
    [470, 2],
    [530, 1],
    [650, 0],
  ])('at %i nm channel %i is strongest', (nm, channel) => {
    const at = 3 * ((nm - 350) / 2);
    const rgb = [...table.subarray(at, at + 3)];
    expect(rgb.indexOf(Math.max(...rgb))).toBe(channel);
  });
});

describe('the outline of spots', () => {
  it('is convex and holds them all', () => {
    const spots = fc.array(fc.tuple(fc.integer({ min: -50, max: 50 }), fc.integer({ min: -50, max: 50 })), {
      minLength: 3,
    });
    fc.assert(
      fc.property(spots, (all) => {
        const outline = hull(all);
        if (outline.length < 3) return;
        outline.forEach(([x0, y0], i) => {
          const [x1, y1] = outline[(i + 1) % outline.length];
          for (const [x, y] of all) expect((x1 - x0) * (y - y0) - (y1 - y0) * (x - x0)).toBeGreaterThanOrEqual(0);
        });
      }),
    );
  });
});
