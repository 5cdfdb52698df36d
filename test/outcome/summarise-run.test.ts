import { createHash } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { summariseRun } from '../../src/outcome/summarise-run.js';
import { runJson } from '../../src/run-folder/run-json.js';
import { runRecordSchema } from '../../src/run-folder/run-schema.js';
import type { RecordedMap } from '../../src/tallies/run-tallies.js';
import { EV_NM } from '../../src/units/constants.js';
import { syntheticMap } from '../helpers/synthetic-tallies.js';
import { BATCH, exitBatch, pumpEv, syntheticResult } from './synthetic-result.js';

const TEXT = 'design: test\n';
const ABOUT = {
  version: '0.0.0',
  file: 'geometries/test.yaml',
  text: TEXT,
  hash: createHash('sha256').update(TEXT).digest('hex'),
  dials: {},
  startedAt: new Date('2026-12-01T12:00:00Z'),
  repeat: 'stokeswell trace geometries/test.yaml',
};

const BATCHES = 20;
const OUT = 500;
const EXIT_NM = 530;
/** Energy out of all even, or all odd, batches, eV. */
const half = (BATCHES / 2) * OUT * (EV_NM / EXIT_NM);
const wavelengthsNm = Float64Array.of(500, 510, 530, 560);

/** All light at 530 nm, through one of 4 exit cells, into one of 18 × 36 directions. */
function run(more: readonly RecordedMap[] = []) {
  const exit = syntheticMap(
    'exit',
    [2, 2],
    [
      [half, 0, 0, 0],
      [half, 0, 0, 0],
    ],
  );
  const absorbed = (BATCHES / 2) * BATCH * pumpEv;
  const voxels = syntheticMap(
    'absorbed-pump',
    [1, 1, 2],
    [
      [absorbed, 0],
      [absorbed, 0],
    ],
  );
  const energy = new Float64Array(18 * 36);
  energy[5 * 36 + 7] = 2 * half;
  const result = syntheticResult(
    Array.from({ length: BATCHES }, () => exitBatch(OUT, 0, EXIT_NM)),
    {
      pump: { power: 60 },
      tallies: {
        maps: [exit, ...more, voxels],
        wavelengthsNm,
        spectra: [
          {
            id: 'exit',
            what: 'exit',
            where: 'cell.top',
            light: 'emitted',
            photons: Float64Array.of(0, 0, BATCHES * OUT, 0),
          },
        ],
        angles: [
          {
            id: 'exit-cell.top',
            where: 'cell.top',
            polarCells: 18,
            azimuthCells: 36,
            polarToDeg: 90,
            energy,
            halves: [energy, energy],
            luminous: energy,
            opening: null,
          },
        ],
        histograms: [
          {
            id: 'absorptions-per-history',
            from: 0,
            width: 1,
            unit: '',
            counts: Float64Array.of(0, BATCHES * BATCH, 0),
          },
          { id: 'path-of-exit-photons', from: 0, width: 1, unit: 'mm', counts: new Float64Array(3) },
        ],
      },
    },
  );
  return summariseRun(result, ABOUT);
}

describe('the record of a run', () => {
  const { record, arrays } = run();
  const exitPower = record.figures.exitPower.value ?? Number.NaN;

  test('keeps to the schema, on paper too', () => {
    expect(runRecordSchema.safeParse(record).error).toBeUndefined();
    expect(runRecordSchema.parse(JSON.parse(runJson(record)))).toEqual(record);
  });

  test('map, spectrum and angles each add up to the same output', () => {
    const [exit] = arrays.maps;
    // W/cm² × mm² × 0.01.
    const mapped = exit.values.reduce((sum, value, i) => sum + value * exit.measure[i] * 0.01, 0);
    expect(mapped).toBeCloseTo(exitPower, 10);
    expect(record.maps[0]).toMatchObject({
      power: expect.closeTo(exitPower, 10),
      mean: expect.closeTo(exitPower * 25, 8),
    });

    const [spectrum] = arrays.spectra.columns;
    // Cells of the uneven grid: the one at 530 nm reaches half way to both neighbours, 520 to 545 nm.
    expect(spectrum.values[2] * 25).toBeCloseTo(OUT / BATCH, 12);
    expect(record.spectra[0].photonFraction).toBeCloseTo(OUT / BATCH, 12);

    const [angles] = arrays.angles;
    // Solid angle of the cell 25°–30°, 10° round: Δφ (cos 25° − cos 30°).
    const deg = Math.PI / 180;
    const solidAngle = 10 * deg * (Math.cos(25 * deg) - Math.cos(30 * deg));
    expect(angles.wattsPerSr[5 * 36 + 7] * solidAngle).toBeCloseTo(exitPower, 10);
  });

  test('statistics of a map are those of its cells', () => {
    expect(record.maps[0]).toMatchObject({ minimum: 0, maximum: expect.closeTo(exitPower * 100, 8), unit: 'W/cm²' });
    expect(record.maps[1]).toMatchObject({ unit: 'W/cm³', variation: null, minOverMean: null });
    // All 60 W in one of two voxels of 1 mm³.
    expect(record.maps[1].power).toBeCloseTo(60, 10);
    expect(record.figures.peakAbsorbedPowerDensity.value).toBeCloseTo(60_000, 6);
  });

  test('a map none of whose cells has area is left out, its array too, and a check says so', () => {
    const lost = {
      ...syntheticMap(
        'detector',
        [2, 1],
        [
          [1, 0],
          [0, 0],
        ],
        [0, 0],
      ),
      id: 'detector-sliver',
    };
    const { record: besides, arrays: kept } = run([lost]);
    expect(besides.maps).toEqual(record.maps);
    expect(kept.maps.map(({ id }) => id)).toEqual(record.maps.map(({ id }) => id));
    expect(besides.checks).toHaveLength(record.checks.length + 1);
    expect(besides.checks.at(-1)?.problem).toContain('detector-sliver');
    expect(runRecordSchema.parse(JSON.parse(runJson(besides)))).toEqual(besides);
  });

  test('shares of a histogram add up to one, or to nothing when nothing was counted', () => {
    expect(record.histograms.map(({ shares }) => shares)).toEqual([
      [0, 1, 0],
      [0, 0, 0],
    ]);
  });

  test('has the cautions of a 60 W laser, and no file names, which are the folder’s to choose', () => {
    expect(record.cautions.join(' ')).toMatch(/class 4/);
    expect(record.maps.every(({ files }) => files.length === 0)).toBe(true);
  });
});
