/** A trace result made by hand: a line at 450 nm into a dyed cell, one output line, everything else lost. */
import { colourMatching } from '../../src/materials/observer.js';
import type { RunTallies } from '../../src/tallies/run-tallies.js';
import type { TraceResult } from '../../src/trace/trace-result.js';
import { EV_NM } from '../../src/units/constants.js';
import { beam, describeDesign, medium, part, plainDye } from '../helpers/describe.js';
import { type SyntheticBatch, slot, syntheticTallies } from '../helpers/synthetic-tallies.js';

export const PUMP_NM = 450;
export const BATCH = 1024;
export const pumpEv = EV_NM / PUMP_NM;

export const SLOTS = [
  slot('missed', 'pump'),
  slot('left-by-exit', 'pump', 'cell.top'),
  slot('left-by-exit', 'emitted', 'cell.top'),
  slot('lost-in-dye', 'pump', 'cell', 'dye'),
  slot('stokes-heat', 'pump', 'cell', 'dye'),
];

/** A batch of which `out` photons left at `exitNm`, `leak` unabsorbed, and the rest was lost in the dye. */
export function exitBatch(out: number, leak: number, exitNm: number, histories = BATCH): SyntheticBatch {
  const exitEv = EV_NM / exitNm;
  const [x, y, z] = colourMatching(exitNm);
  const lost = histories - out - leak;
  return {
    histories,
    photons: [0, leak, out, lost, 0],
    energy: [0, leak * pumpEv, out * exitEv, lost * pumpEv, out * (pumpEv - exitEv)],
    figures: {
      launchedEnergy: histories * pumpEv,
      exitPhotons: out,
      exitEnergy: out * exitEv,
      exitX: out * exitEv * x,
      exitY: out * exitEv * y,
      exitZ: out * exitEv * z,
      exitWavelength: out * exitNm,
      leakPhotons: leak,
      leakEnergy: leak * pumpEv,
      dyeAbsorptions: histories - leak,
      pumpAbsorbed: histories - leak,
      emissions: out,
      pumpPath: 2 * histories,
      emittedPath: 3 * out,
    },
  };
}

export function syntheticResult(
  batches: readonly SyntheticBatch[],
  more: { pump?: Parameters<typeof beam>[2]; tallies?: Partial<RunTallies> } = {},
): TraceResult {
  const description = describeDesign({
    media: [medium('bath', 1.33, { dyes: [plainDye(1, 0.5, 520)] })],
    parts: [part('cell', { kind: 'box', size: [1, 1, 1] }, 'bath')],
    pumps: [beam([0, 0, -5], [0, 0, 1], more.pump)],
    exit: 'cell.top',
  });
  return {
    description,
    tallies: syntheticTallies(SLOTS, batches, more.tallies),
    curves: [],
    stopReason: 'histories',
    seed: '1',
    threads: 1,
    seconds: 1,
    warnings: [],
  };
}
