/** A run of the tracer itself, summarised, written and read back: separate tallies of the same light must agree. */
import { createHash } from 'node:crypto';
import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { summariseRun } from '../../src/outcome/summarise-run.js';
import { nameFiles } from '../../src/run-folder/file-names.js';
import { readRun } from '../../src/run-folder/read-run.js';
import { runRecordSchema } from '../../src/run-folder/run-schema.js';
import { writeRun } from '../../src/run-folder/write-run.js';
import { beam, describeDesign, medium, part, plainDye } from '../helpers/describe.js';
import { traceHere } from '../helpers/trace.js';

const HISTORIES = 20_000;

/** A box of dye pumped from the front; output through its top. */
async function summary() {
  const design = describeDesign({
    media: [medium('bath', 1.36, { dyes: [plainDye(0.3, 0.9, 530)] })],
    parts: [part('cell', { kind: 'box', size: [10, 6, 8] }, 'bath')],
    pumps: [
      beam([0, -20, 0], [0, 1, 0], {
        power: 5,
        wallPlug: 0.4,
        beam: { kind: 'patch', outline: { kind: 'rectangle', size: [4, 4] }, divergence: [0, 0] },
      }),
    ],
    exit: 'cell.top',
  });
  const text = 'design: test\n';
  return summariseRun(await traceHere(design, HISTORIES, 'summarise-trace'), {
    version: '0.0.0',
    file: 'test.yaml',
    text,
    hash: createHash('sha256').update(text).digest('hex'),
    dials: {},
    startedAt: new Date('2026-12-01T12:00:00Z'),
    repeat: 'stokeswell trace test.yaml',
  });
}

describe('a traced cell (seed summarise-trace)', () => {
  let folder = '';
  let run: Awaited<ReturnType<typeof summary>>;
  beforeAll(async () => {
    folder = await mkdtemp(join(tmpdir(), 'summarise-'));
    run = await summary();
  });
  afterAll(() => rm(folder, { recursive: true, force: true }));

  test('keeps to the schema of a record', () => {
    expect(runRecordSchema.safeParse(run.record).error).toBeUndefined();
  });

  test('both ledgers close, and begin with the output of the figures', () => {
    const { ledger, figures } = run.record;
    for (const rows of [ledger.photons, ledger.watts]) {
      expect(Math.abs(rows.reduce((sum, { fraction }) => sum + fraction, 0) - 1)).toBeLessThanOrEqual(1e-12);
      expect(rows[0]).toMatchObject({ fate: 'left-by-exit', light: 'emitted' });
    }
    expect(ledger.photons[0].fraction).toBeCloseTo(figures.exitPhotonFraction.value ?? 0, 12);
    expect(ledger.watts[0].fraction).toBeCloseTo(figures.opticalEfficiency.value ?? 0, 12);
    expect(ledger.photons[0].standardError).toBeCloseTo(figures.exitPhotonFraction.standardError ?? 0, 9);
  });

  test('map, spectrum and angles hold the light of the figures', () => {
    const { record, arrays } = run;
    const exitPower = record.figures.exitPower.value ?? 0;
    expect(record.maps.find(({ what }) => what === 'exit')?.power).toBeCloseTo(exitPower, 10);
    expect(record.spectra.find(({ what }) => what === 'exit')?.photonFraction).toBeCloseTo(
      record.figures.exitPhotonFraction.value ?? 0,
      12,
    );
    const [{ wattsPerSr, polarCells, azimuthCells }] = arrays.angles;
    const edge = (row: number) => Math.cos((row * Math.PI) / 2 / polarCells);
    const radiated = wattsPerSr.reduce((sum, intensity, i) => {
      const row = Math.floor(i / azimuthCells);
      return sum + (intensity * 2 * Math.PI * (edge(row) - edge(row + 1))) / azimuthCells;
    }, 0);
    expect(radiated).toBeCloseTo(exitPower, 10);
    const absorbed = record.maps.find(({ what }) => what === 'absorbed-pump')?.power ?? 0;
    expect(absorbed / 5).toBeCloseTo(record.figures.pumpAbsorbedFraction.value ?? 0, 9);
  });

  test('comes back from its folder as it was', async () => {
    const target = join(folder, 'run');
    const files = await writeRun(target, run.record, run.arrays);
    expect((await readdir(target)).toSorted()).toEqual([...files].toSorted());
    expect(await readRun(target)).toEqual(JSON.parse(JSON.stringify(nameFiles(run.record))));
  });
});
