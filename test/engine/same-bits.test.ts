/** Promise protected: same design, seed and number of histories give the same bits, whatever the threads and wherever it was stopped. */
import { describe, expect, test } from 'vitest';
import type { Description } from '../../src/design/description.js';
import { traceDescription } from '../../src/trace/trace-design.js';
import type { TraceOptions, TraceResult } from '../../src/trace/trace-result.js';
import { beam, describeDesign, finish, medium, part, plainDye } from '../helpers/describe.js';

function cell(): Description {
  const design = describeDesign({
    media: [medium('bath', 1.36, { dyes: [plainDye(0.5, 0.9, 520)], absorption: 0.001 }), medium('glass', 1.5)],
    finishes: [finish('mirror', { kind: 'mirror', reflectance: 0.9 })],
    parts: [
      part('cell', { kind: 'box', size: [10, 6, 6] }, 'bath', { faces: { bottom: 'mirror', left: 'mirror' } }),
      part('dome', { kind: 'cap', radius: 3, height: 2 }, 'glass', { against: { face: 'cell.top' } }),
    ],
    pumps: [
      beam([0, -20, 0], [0, 1, 0], {
        linewidthNm: 2,
        beam: { kind: 'diodes', across: 3, along: 2, pitch: [2, 2], divergence: [0.02, 0.1], lens: null },
      }),
    ],
    exit: 'dome.dome',
  });
  return { ...design, exit: { ...design.exit, radiance: [3, 3, 6, 4] } };
}

const options = (more: Partial<TraceOptions>): TraceOptions => ({
  histories: 50_000,
  precision: null,
  seconds: null,
  seed: 'bits',
  threads: 1,
  ...more,
});

/** Everything a run counted, as text of exact values. */
function bits({ tallies }: TraceResult): string {
  return JSON.stringify([
    tallies.moments,
    tallies.groupMoments,
    tallies.maps.map(({ energy }) => energy),
    tallies.spectra,
    tallies.angles,
    tallies.radiance,
    tallies.histograms,
  ]);
}

describe('same bits', () => {
  test('for 0 (calling thread), 1, 2 and 7 threads', async () => {
    const runs = [];
    for (const threads of [0, 1, 2, 7]) runs.push(await traceDescription(cell(), options({ threads })));
    for (const run of runs) expect(run.tallies.moments.histories).toBe(50_000);
    for (const run of runs.slice(1)) expect(bits(run)).toBe(bits(runs[0]));
  });

  test('after stopping half way and for asking for as many histories', async () => {
    const controller = new AbortController();
    const stopped = await traceDescription(
      cell(),
      options({
        histories: 1e8,
        threads: 2,
        signal: controller.signal,
        onProgress: ({ histories }) => histories > 30_000 && controller.abort(),
      }),
    );
    expect(stopped.stopReason).toBe('interrupted');
    const histories = stopped.tallies.moments.histories;
    expect(histories).toBeLessThan(1e8);
    const whole = await traceDescription(cell(), options({ histories, threads: 1 }));
    expect(bits(stopped)).toBe(bits(whole));
  });

  test('another seed gives other bits', async () => {
    const a = await traceDescription(cell(), options({ threads: 0 }));
    const b = await traceDescription(cell(), options({ threads: 0, seed: 'other' }));
    expect(bits(a)).not.toBe(bits(b));
  });

  test('stopping on precision happens at the same history for any number of threads, and reaches it', async () => {
    const wish = { histories: 1e7, precision: 0.005 };
    const one = await traceDescription(cell(), options({ ...wish, threads: 1 }));
    const two = await traceDescription(cell(), options({ ...wish, threads: 2 }));
    expect(one.stopReason).toBe('precision');
    expect(bits(two)).toBe(bits(one));
  });

  test('a time limit keeps what is done', async () => {
    const run = await traceDescription(cell(), options({ histories: 1e9, seconds: 0.5 }));
    expect(run.stopReason).toBe('time');
    expect(run.tallies.moments.histories % 1024).toBe(0);
  });
});
