/** One thread's work in a round. The same function runs in worker threads and, for small runs, in the calling thread. */
import seedrandom from 'seedrandom';
import { type BatchTally, clearBatch, createBatchTally, grownTally } from '../kernel/batch-tally.js';
import { traceBatch } from '../kernel/trace-batch.js';
import { seedStream } from '../numerics/random-stream.js';
import { RegionGraph } from '../scene/region-graph.js';
import { BATCH_HISTORIES } from '../tallies/run-tallies.js';
import { type BatchResult, CONTROL, type ShareResult, type ShareTask } from './messages.js';

let held: { runId: number; graph: RegionGraph } | null = null;

export function traceShare(task: ShareTask): ShareResult {
  if (held?.runId !== task.runId) held = { runId: task.runId, graph: new RegionGraph(task.scene) };
  const { graph } = held;
  const tally = createBatchTally(task.scene, grownTally(task.scene, task.grown));
  const batches: BatchResult[] = [];
  let defects = 0;
  while (Atomics.load(task.control, CONTROL.stop) === 0) {
    const batch = claimBatch(task.control);
    if (batch < 0) break;
    const histories = Math.min(BATCH_HISTORIES, task.histories - batch * BATCH_HISTORIES);
    clearBatch(tally);
    defects += traceBatch(task.scene, graph, tally, batchStream(task.seed, batch), batch & 1, histories);
    batches.push(copyBatch(tally, batch, histories));
  }
  return { batches, defects };
}

/** Next batch of the round, −1 when all are taken. Batches are claimed without gaps, so that a stopped run is a prefix of a longer one. */
function claimBatch(control: Int32Array): number {
  for (;;) {
    const next = Atomics.load(control, CONTROL.nextBatch);
    if (next >= Atomics.load(control, CONTROL.endOfRound)) return -1;
    if (Atomics.compareExchange(control, CONTROL.nextBatch, next, next + 1) === next) return next;
  }
}

/** The random stream of a batch depends on the run's seed and the batch's number only: not on threads, not on order. */
export function batchStream(seed: string, batch: number): Int32Array {
  const source = seedrandom.xor4096(`stokeswell ${seed} ${batch}`);
  const state = new Int32Array(4);
  seedStream(
    state,
    Int32Array.from({ length: 4 }, () => source.int32()),
  );
  return state;
}

function copyBatch(tally: BatchTally, batch: number, histories: number): BatchResult {
  return {
    batch,
    histories,
    vector: tally.vector.slice(),
    groupSquares: tally.groupSquares.slice(),
    groupCross: tally.groupCross.slice(),
  };
}
