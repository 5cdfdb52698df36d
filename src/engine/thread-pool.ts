import { Piscina } from 'piscina';
import type { ShareResult, ShareTask } from './messages.js';
import { traceShare } from './trace-share.js';

/** Runs shares side by side: on worker threads, or in the calling thread when `threads` is 0. */
export interface ThreadPool {
  readonly shares: number;
  run(tasks: readonly ShareTask[]): Promise<readonly ShareResult[]>;
}

/**
 * Threads stay for the next run of the process and do not keep it alive. Ending them while their optimiser still compiles can bring
 * Node 20 down (seen in 1 of 60 short runs), and starting them anew costs each run of a study a fifth of a second.
 */
const pools = new Map<number, Piscina>();

export function openPool(threads: number): ThreadPool {
  if (threads === 0) return { shares: 1, run: async (tasks) => tasks.map(traceShare) };
  const pool = poolOf(threads);
  return {
    shares: threads,
    run: (tasks) => Promise.all(tasks.map((task) => pool.run(task) as Promise<ShareResult>)),
  };
}

function poolOf(threads: number): Piscina {
  const known = pools.get(threads);
  if (known !== undefined) return known;
  const pool = new Piscina({
    filename: workerUrl().href,
    minThreads: threads,
    maxThreads: threads,
    concurrentTasksPerWorker: 1,
    idleTimeout: Number.POSITIVE_INFINITY,
  });
  pools.set(threads, pool);
  return pool;
}

/** Threads start from built JavaScript, also when the caller runs from source under a test runner. */
function workerUrl(): URL {
  return import.meta.url.endsWith('.ts')
    ? new URL('../../dist/engine/batch-worker.js', import.meta.url)
    : new URL('./batch-worker.js', import.meta.url);
}
