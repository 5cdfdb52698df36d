import { describe, expect, it } from 'vitest';
import type { Description } from '../../src/design/description.js';
import { readDesign } from '../../src/design/read-design.js';
import { readMetal } from '../../src/materials/library.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import type { UsedCurve } from '../../src/scene/used-curve.js';
import { usedCurves } from '../../src/scene/used-curves.js';
import { nearestIndex } from '../../src/scene/wavelength-grid.js';
import { beam, describeDesign, finish, medium, part } from '../helpers/describe.js';

function curvesOf(description: Description) {
  const compiled = compileScene(description);
  const { grid } = compiled.legend;
  const list = usedCurves(description, compiled);
  const at = (what: UsedCurve['what'], nm: number) =>
    list.find((curve) => curve.what === what)?.values[nearestIndex(grid.nm, nm)] ?? Number.NaN;
  return { list, grid, at };
}

async function twoBank() {
  const reading = await readDesign('geometries/two-bank-box-cell.yaml');
  if (!reading.ok) throw new Error('the design has faults');
  return curvesOf(reading.description);
}

describe('the curves of a shipped design', () => {
  it('lists what has a spectral law, each once', async () => {
    const { list, grid } = await twoBank();
    expect(list.map(({ id }) => id)).toEqual([
      'dye-absorption fluorescein in bath',
      'dye-extinction fluorescein in bath',
      'dye-emission fluorescein in bath',
      'medium-absorption ethanol in bath',
      'finish-transmittance blue-pass',
      'finish-reflectance blue-pass',
    ]);
    expect(list.every(({ values }) => values.length === grid.nm.length)).toBe(true);
  });

  // 92 300 L/(mol cm) at 500 nm: Seybold, Gouterman, Callis, Photochem. Photobiol. 9, 229 (1969). The table, a mean over ±1 nm less its
  // baseline, lies 0.6 % lower.
  it('gives fluorescein its published molar extinction, and Beer–Lambert at 0.2 mmol/L', async () => {
    const { at } = await twoBank();
    expect(Math.abs(at('dye-extinction', 500) / 92_300 - 1)).toBeLessThan(0.01);
    expect(at('dye-absorption', 500)).toBeCloseTo((Math.LN10 * 0.2e-3 * at('dye-extinction', 500)) / 10, 10);
  });

  it('brings the emission to area 1', async () => {
    const { list, grid } = await twoBank();
    const emission = list.find(({ what }) => what === 'dye-emission')?.values ?? new Float64Array();
    expect(emission.reduce((sum, value, i) => sum + value * grid.widthNm[i], 0)).toBeCloseTo(1, 12);
  });

  it('gives the dichroic the shares its design states: 95 % through below 490 nm, 98 % back above', async () => {
    const { at } = await twoBank();
    expect(at('finish-transmittance', 445)).toBeCloseTo(0.95, 6);
    expect(at('finish-reflectance', 520)).toBeCloseTo(0.98, 6);
    expect(at('finish-transmittance', 490)).toBeCloseTo((0.95 + 0.02) / 2, 6);
  });
});

describe('finishes and bare media', () => {
  const { n, k } = readMetal('aluminium');
  const { list, at } = curvesOf(
    describeDesign({
      media: [medium('bath', 1.36, { absorption: 0.002 })],
      finishes: [
        finish('coated', { kind: 'metal', metal: 'aluminium', n, k }),
        finish('dull', { kind: 'mirror', reflectance: 0.9 }),
        finish('measured', {
          kind: 'table',
          wavelengthsNm: [400, 500],
          anglesDeg: [0, 90],
          reflectance: [
            [0.1, 1],
            [0.3, 1],
          ],
          transmittance: [
            [0.8, 0],
            [0.4, 0],
          ],
        }),
      ],
      parts: [
        part('cell', { kind: 'box', size: [1, 1, 1] }, 'bath', {
          faces: { left: 'coated', right: 'dull', front: 'measured' },
        }),
      ],
      pumps: [beam([0, 0, -5], [0, 0, 1], { linewidthNm: 20 })],
      exit: 'cell.top',
    }),
  );

  // 0.8978 at 450 nm in n = 1.36: |(n0 − n + ik)/(n0 + n − ik)|² of the index of Rakić, Appl. Opt. 34, 4755 (1995).
  it('a metal reflects as in the liquid that touches it', () => {
    expect(list.find(({ name }) => name === 'coated')?.where).toBe('bath');
    expect(list.find(({ name }) => name === 'coated')?.values.length).toBeGreaterThan(10);
    const expected = ((1.36 - n(450)) ** 2 + k(450) ** 2) / ((1.36 + n(450)) ** 2 + k(450) ** 2);
    expect(at('finish-reflectance', 450)).toBeCloseTo(expected, 12);
    expect(Math.abs(expected - 0.8978)).toBeLessThan(1e-4);
  });

  it('a table is read at normal incidence, linear between its rows', () => {
    expect(at('finish-transmittance', 450)).toBeCloseTo(0.6, 12);
  });

  it('a mirror that is the same everywhere has no curve, an absorbing liquid has one', () => {
    expect(list.some(({ name }) => name === 'dull')).toBe(false);
    expect(at('medium-absorption', 450)).toBe(0.002);
  });
});
