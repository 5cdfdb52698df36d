/** How long to trace, with what seed, on how many threads. */
export interface BatchPlan {
  /** Upper bound of histories. */
  readonly histories: number;
  /** Stop once the relative standard error of the exit fraction is at or below this; null: never. */
  readonly precision: number | null;
  /** Stop after this many seconds of tracing; null: never. */
  readonly seconds: number | null;
  readonly seed: string;
  /** Worker threads; 0 traces in the calling thread (small runs, tests). */
  readonly threads: number;
  /** Aborting stops handing out batches; what is finished is kept. */
  readonly signal?: AbortSignal;
  readonly onProgress?: (progress: BatchProgress) => void;
}

export interface BatchProgress {
  readonly histories: number;
  readonly ofHistories: number;
  readonly seconds: number;
  /** Relative standard error of the exit fraction so far, null before it is known. */
  readonly precision: number | null;
}

export type StopReason = 'histories' | 'precision' | 'time' | 'interrupted';
