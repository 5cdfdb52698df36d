import { Piscina } from 'piscina';
import type { ShareResult, ShareTask } from './messages.js';
import { traceShare } from './trace-share.js';

/** Runs shares side by side: on worker threads, or in the calling thread when `threads` is 0. */
export interface ThreadPool {
  readonly shares: number;
  run(tasks: readonly ShareTask[]): Promise<readonly ShareResult[]>;
  close(): Promise<void>;
}

export function openPool(threads: number): ThreadPool {
  if (threads === 0) {
    return { shares: 1, run: async (tasks) => tasks.map(traceShare), close: async () => {} };
  }
  const pool = new Piscina({
    filename: workerUrl().href,
    minThreads: threads,
    maxThreads: threads,
    concurrentTasksPerWorker: 1,
    idleTimeout: Number.POSITIVE_INFINITY,
  });
  return {
    shares: threads,
    run: (tasks) => Promise.all(tasks.map((task) => pool.run(task) as Promise<ShareResult>)),
    close: () => pool.destroy(),
  };
}

/** Threads start from built JavaScript, also when the caller runs from source under a test runner. */
function workerUrl(): URL {
  return import.meta.url.endsWith('.ts')
    ? new URL('../../dist/engine/batch-worker.js', import.meta.url)
    : new URL('./batch-worker.js', import.meta.url);
}
