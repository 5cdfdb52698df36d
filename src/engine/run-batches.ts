/** Batches in rounds over all threads, until enough histories, precision or time, or until told to stop. */

import { type GrownTally, grownBytes, grownTally } from '../kernel/batch-tally.js';
import type { Scene } from '../scene/scene-layout.js';
import { BATCH_HISTORIES } from '../tallies/run-tallies.js';
import type { BatchPlan, StopReason } from './batch-plan.js';
import { BatchFold } from './fold-batches.js';
import { CONTROL, type ShareTask } from './messages.js';
import { openPool } from './thread-pool.js';

export interface BatchOutcome {
  readonly fold: BatchFold;
  readonly grown: GrownTally;
  readonly stopReason: StopReason;
  readonly seconds: number;
}

/** Thrown when histories ended in no fate. The fault is the program's, never the design's. */
export class LostHistories extends Error {
  constructor(readonly count: number) {
    super(`${count} histories ended in no fate; this is a defect of stokeswell, not of the design`);
    this.name = 'LostHistories';
  }
}

/** Photon energies sum exactly in a double up to this many histories. */
export const MOST_HISTORIES = 2 ** 31 - BATCH_HISTORIES;

const FIRST_ROUND = 16;
const LARGEST_ROUND = 1024;
/** Below this many batches the error itself is too uncertain to stop on. */
const FEWEST_TO_STOP = 32;
const PROGRESS_MS = 200;

let runs = 0;

export async function runBatches(scene: Scene, plan: BatchPlan): Promise<BatchOutcome> {
  const started = performance.now();
  const elapsed = () => (performance.now() - started) / 1000;
  const pool = openPool(plan.threads);
  const control = new Int32Array(new SharedArrayBuffer(4 * CONTROL.COUNT));
  const runId = ++runs;
  const buffers = Array.from({ length: pool.shares }, () => new SharedArrayBuffer(grownBytes(scene)));
  const tasks = buffers.map(
    (grown): ShareTask => ({ runId, scene, grown, control, seed: plan.seed, histories: plan.histories }),
  );
  const fold = new BatchFold(scene.slots);
  const total = Math.ceil(plan.histories / BATCH_HISTORIES);
  const stopped: { reason: StopReason } = { reason: 'histories' };
  let precision: number | null = null;
  const stop = (reason: StopReason) => {
    if (Atomics.exchange(control, CONTROL.stop, 1) === 0) stopped.reason = reason;
  };
  const interrupt = () => stop('interrupted');
  const report = () => {
    const claimed = Math.min(plan.histories, Atomics.load(control, CONTROL.nextBatch) * BATCH_HISTORIES);
    plan.onProgress?.({ histories: claimed, ofHistories: plan.histories, seconds: elapsed(), precision });
  };
  if (plan.signal?.aborted) interrupt();
  plan.signal?.addEventListener('abort', interrupt);
  const timer = setInterval(report, PROGRESS_MS);
  const deadline = plan.seconds === null ? undefined : setTimeout(() => stop('time'), plan.seconds * 1000);
  try {
    while (Atomics.load(control, CONTROL.stop) === 0 && fold.batches < total) {
      Atomics.store(control, CONTROL.endOfRound, Math.min(total, nextCheckpoint(fold.batches, precision, plan)));
      const results = await pool.run(tasks);
      const lost = results.reduce((sum, { defects }) => sum + defects, 0);
      if (lost > 0) throw new LostHistories(lost);
      fold.add(results.flatMap(({ batches }) => batches));
      precision = fold.exitPrecision();
      report();
      if (plan.seconds !== null && elapsed() >= plan.seconds) stop('time');
      if (plan.precision !== null && precision !== null && fold.batches >= FEWEST_TO_STOP) {
        if (precision <= plan.precision) stop('precision');
      }
      // Without threads, this is where timers and signals get their turn.
      if (plan.threads === 0) await new Promise((resolve) => setImmediate(resolve));
    }
    const complete = fold.batches === total && stopped.reason !== 'precision';
    const stopReason = complete ? 'histories' : stopped.reason;
    return { fold, grown: mergeGrown(scene, buffers), stopReason, seconds: elapsed() };
  } finally {
    clearInterval(timer);
    clearTimeout(deadline);
    plan.signal?.removeEventListener('abort', interrupt);
  }
}

/** Rounds grow, and aim at the wanted precision once it can be foretold. Depends on results alone, so a run stops at the same history on any machine. */
function nextCheckpoint(done: number, precision: number | null, plan: BatchPlan): number {
  const usual = done + Math.min(LARGEST_ROUND, Math.max(FIRST_ROUND, done >> 1));
  if (plan.precision === null || precision === null) return usual;
  const needed = Math.ceil(done * (precision / plan.precision) ** 2 * 1.01) + 1;
  return needed <= done ? usual : Math.min(usual, Math.max(needed, FEWEST_TO_STOP));
}

/** Whole numbers: exact in any order. */
function mergeGrown(scene: Scene, buffers: readonly SharedArrayBuffer[]): GrownTally {
  const all = new Float64Array(grownBytes(scene) / 8);
  for (const buffer of buffers) {
    const part = new Float64Array(buffer);
    for (let i = 0; i < all.length; i++) all[i] += part[i];
  }
  return grownTally(scene, all.buffer);
}
