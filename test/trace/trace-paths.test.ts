/** Paths for pictures are true histories: they obey the laws of reflection and refraction, end where their fate says, and are shared out as the ledger is. */
import { join } from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';
import { type DesignReading, readDesign } from '../../src/design/read-design.js';
import { batchStream } from '../../src/engine/trace-share.js';
import { createBatchTally, grownBytes, grownTally } from '../../src/kernel/batch-tally.js';
import { traceWitnessed } from '../../src/kernel/trace-batch.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { RegionGraph } from '../../src/scene/region-graph.js';
import { traceDescription } from '../../src/trace/trace-design.js';
import { tracePaths } from '../../src/trace/trace-paths.js';
import type { TracedPath } from '../../src/trace/traced-path.js';

const file = (name: string) => join(import.meta.dirname, '../../geometries', name);

type Sound = Extract<DesignReading, { ok: true }>;

async function sound(name: string): Promise<Sound['description']> {
  const reading = await readDesign(file(name));
  if (!reading.ok) throw new Error(`${name} has faults`);
  return reading.description;
}

const point = ({ points }: TracedPath, i: number) => points.slice(3 * i, 3 * i + 3);
const last = (path: TracedPath) => path.points.slice(-3);

describe('paths in the two-bank box cell, seed paths', () => {
  let traced: ReturnType<typeof tracePaths>;
  beforeAll(async () => {
    traced = tracePaths(await sound('two-bank-box-cell.yaml'), 'paths');
  });

  test('are whole: a wavelength a segment, finite points, no more than a picture bears', () => {
    expect(traced.paths.length).toBeGreaterThan(300);
    expect(traced.histories).toBeGreaterThanOrEqual(2048);
    for (const { points, wavelengthsNm, pumpSegments } of traced.paths) {
      expect(points.length).toBe(3 * (wavelengthsNm.length + 1));
      expect(points.every(Number.isFinite)).toBe(true);
      expect(pumpSegments).toBeGreaterThanOrEqual(1);
      expect(pumpSegments).toBeLessThanOrEqual(wavelengthsNm.length);
      expect(points.length).toBeLessThan(3 * 130);
    }
  });

  test('start as pump light in front of a bank and lengthen their wave, but for the width of the line', () => {
    for (const { points, wavelengthsNm, pumpSegments } of traced.paths) {
      expect(Math.abs(Math.abs(points[1]) - 44)).toBeLessThan(1);
      expect(wavelengthsNm.slice(0, pumpSegments).every((nm) => nm > 435 && nm < 455)).toBe(true);
      expect(wavelengthsNm.slice(pumpSegments).every((nm) => nm > 470)).toBe(true);
    }
  });

  test('end on the face that took them, within 1e-9 mm', () => {
    const planes = { left: [0, -10], right: [0, 10], front: [1, -4], back: [1, 4] } as const;
    const ended = traced.paths.filter(({ end }) => end.fate === 'absorbed-by-finish');
    expect(new Set(ended.map(({ end }) => end.where)).size).toBe(3);
    for (const path of ended) {
      const face = (path.end.where ?? '').replace('cell.', '');
      if (face in planes) {
        const [axis, at] = planes[face as keyof typeof planes];
        expect(Math.abs(last(path)[axis] - at)).toBeLessThan(1e-9);
      }
    }
  });

  test('turn at the mirrors by the law of reflection', () => {
    let seen = 0;
    for (const path of traced.paths) {
      for (let i = 1; i + 1 < path.wavelengthsNm.length && (path.cutAfter < 0 || i < path.cutAfter); i++) {
        const [a, b, c] = [i - 1, i, i + 1].map((at) => point(path, at));
        if (Math.abs(Math.abs(b[0]) - 10) > 1e-9 || b[2] > 3.999) continue;
        const [before, after] = [unit(b.map((x, k) => x - a[k])), unit(c.map((x, k) => x - b[k]))];
        expect(Math.abs(before[0] + after[0])).toBeLessThan(1e-9);
        expect(Math.abs(before[1] - after[1])).toBeLessThan(1e-9);
        seen++;
      }
    }
    expect(seen).toBeGreaterThan(100);
  });
});

const unit = (v: readonly number[]) => v.map((x) => x / Math.hypot(...v));

test('flown from boundary to boundary, histories end as those of a run: every fate within 4 standard errors, seed stepwise', async () => {
  const description = await sound('two-bank-box-cell.yaml');
  const { scene } = compileScene(description);
  const tally = createBatchTally(scene, grownTally(scene, new ArrayBuffer(grownBytes(scene))));
  const seen = new Float64Array(scene.slots);
  const witness = { see: () => undefined, close: (fate: number) => void seen[fate]++ };
  const graph = new RegionGraph(scene, true);
  const batches = 24;
  const n = batches * 1024;
  for (let i = 0; i < batches; i++) {
    expect(traceWitnessed(scene, graph, tally, batchStream('stepwise', i), 1024, witness)).toBe(0);
  }
  const run = await traceDescription(description, {
    histories: n,
    precision: null,
    seconds: null,
    seed: 'run',
    threads: 0,
  });
  for (let slot = 0; slot < scene.slots; slot++) {
    const other = run.tallies.moments.sum[2 * slot];
    // Counts scatter no more than Poisson's law; the net of launches makes them scatter less.
    const error = Math.sqrt(seen[slot] + other + 1);
    expect(Math.abs(seen[slot] - other)).toBeLessThan(4 * error);
  }
}, 20_000);

test('the same for the same seed, and of every fate of a curved design too', async () => {
  const description = await sound('box-with-bonded-dome.yaml');
  const once = tracePaths(description, 'again');
  expect(tracePaths(description, 'again')).toEqual(once);
  expect(new Set(once.paths.map(({ end }) => end.fate)).size).toBeGreaterThan(5);
  const out = once.paths.filter(({ end }) => end.fate === 'left-by-exit');
  for (const path of out) expect(last(path)[2]).toBeGreaterThan(0);
});
