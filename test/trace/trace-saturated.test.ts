import { describe, expect, test } from 'vitest';
import { readDesignText, type SoundDesign } from '../../src/design/read-design.js';
import { runFigures } from '../../src/outcome/figures.js';
import { mapField } from '../../src/outcome/map-field.js';
import { FIGURE } from '../../src/tallies/run-tallies.js';
import { dyeExcitations, meanGroundShare } from '../../src/trace/dye-excitation.js';
import { traceDescription } from '../../src/trace/trace-design.js';
import { traceSaturated } from '../../src/trace/trace-saturated.js';

const DESIGN = (watts: string, more = '') => `
design: cell
dyes:
  plain: { extinction: [[400 nm, 20000 L/mol/cm], [500 nm, 20000 L/mol/cm], [560 nm, 0 L/mol/cm]], emission: [[600 nm, 0], [610 nm, 1], [620 nm, 0]], yield: 80 %, lifetime: 4 ns, molar-mass: 400 g/mol, bleach-yield: 1e-6 }
media:
  bath: { index: 1.3, dyes: { plain: 0.2 mmol/L }${more} }
parts: { cell: { box: [4 mm, 4 mm, 4 mm], medium: bath } }
pumps: { p: { patch: { rectangle: [3 mm, 3 mm] }, power: ${watts}, wavelength: 445 nm, toward: cell.bottom, distance: 5 mm } }
exit: cell.top
trace: { voxels: [4, 4, 8] }
`;
const read = (text: string) => (readDesignText(text, 'cell.yaml') as SoundDesign).description;
const plan = { histories: 6144, precision: null, seconds: null, seed: 'saturated', threads: 0 };

describe('excitation by voxel, seed "saturated"', () => {
  test('photons by voxel add up to those counted, and excited = rate × lifetime', async () => {
    const result = await traceDescription(read(DESIGN('30 W')), plan);
    const [one] = dyeExcitations(result.description, result.tallies);
    const { moments, slots } = result.tallies;
    const perHistory = moments.sum[2 * slots.length + FIGURE.dyeAbsorptions] / moments.histories;
    const photons = (30 * 445e-9) / (6.62607015e-34 * 299792458);
    expect(one.perSecond / (perHistory * photons)).toBeCloseTo(1, 9);
    expect(one.volumeCm3).toBeCloseTo(0.064, 9);
    const figures = runFigures(result, []);
    expect((figures.excitedMolecules.value ?? 0) / (perHistory * photons * 4e-9)).toBeCloseTo(1, 9);
    // Thin pump: depletion is the excited fraction itself, to first order.
    expect(meanGroundShare(one)).toBeGreaterThan(0.999);
  });

  test('a weak pump settles at once and comes out as a plain trace', async () => {
    const description = read(DESIGN('1 mW'));
    const { result, steps, settled } = await traceSaturated(description, plan);
    const bare = await traceDescription(description, plan);
    expect(settled).toBe(true);
    expect(steps).toHaveLength(1);
    const exit = 2 * bare.tallies.slots.length + FIGURE.exitPhotons;
    expect(result.tallies.moments.sum[exit] / bare.tallies.moments.sum[exit]).toBeCloseTo(1, 2);
  });

  test('a strong pump is let through more, and every turn is nearer than the last', async () => {
    const { result, steps, settled } = await traceSaturated(read(DESIGN('200 kW')), plan);
    const share = result.description.media.get('bath')?.dyes[0].groundShare ?? 1;
    expect(settled).toBe(true);
    expect(share).toBeGreaterThan(0.1);
    expect(share).toBeLessThan(0.9);
    for (let i = 1; i < steps.length; i++) expect(steps[i].off).toBeLessThan(steps[i - 1].off);
    // At the fixed point the share traced with is the one its own light asks for.
    const [one] = dyeExcitations(result.description, result.tallies);
    expect(meanGroundShare(one)).toBeCloseTo(share, 2);
  });

  test('parts that share a medium get a strength each', async () => {
    const text = DESIGN('200 kW')
      .replace(
        'parts: { cell:',
        'parts: { far: { box: [4 mm, 4 mm, 4 mm], medium: bath, at: [0 mm, 0 mm, 4 mm] }, cell:',
      )
      .replace('exit: cell.top', 'exit: far.top');
    const { result } = await traceSaturated(read(text), plan);
    const shares = ['bath of cell', 'bath of far'].map(
      (name) => result.description.media.get(name)?.dyes[0].groundShare ?? 1,
    );
    expect(shares[0]).toBeLessThan(shares[1]);
  });
});

describe('figures of bleaching and saturation', () => {
  test('a reservoir stretches the time by the volumes', async () => {
    const result = await traceDescription(read(DESIGN('30 W', ', reservoir: 640 mm³')), plan);
    const { timeToBleach, timeToBleachWithReservoir } = runFigures(result, []);
    expect((timeToBleachWithReservoir.value ?? 0) / (timeToBleach.value ?? 1)).toBeCloseTo(704 / 64, 9);
  });

  test('what is not known says why', async () => {
    const text = DESIGN('30 W').replace(', lifetime: 4 ns, molar-mass: 400 g/mol, bleach-yield: 1e-6', '');
    const result = await traceDescription(read(text), plan);
    const figures = runFigures(result, []);
    expect(figures.excitedMolecules).toMatchObject({ value: null, note: 'no lifetime known of plain' });
    expect(figures.timeToBleach).toMatchObject({ value: null, note: 'no bleach yield known of plain' });
    expect(figures.peakExcitedFraction.value).toBeNull();
  });

  test('gain appears where a third and more of the molecules are excited', async () => {
    const { result } = await traceSaturated(read(DESIGN('200 kW')), plan);
    const { moments, slots, maps } = result.tallies;
    const launched = moments.sum[2 * slots.length + FIGURE.launchedEnergy] / moments.histories;
    const fields = maps.map((map) => mapField(map, result.tallies, 200_000, launched));
    const { peakGain, gainOverLongestPath, peakExcitedFraction } = runFigures(result, fields);
    expect(peakExcitedFraction.value).toBeGreaterThan(0.3);
    expect(peakGain.value).toBeGreaterThan(0);
    // Diagonal of the cube of 4 mm.
    expect((gainOverLongestPath.value ?? 0) / (peakGain.value ?? 1)).toBeCloseTo(0.4 * Math.sqrt(3), 9);
  });
});
