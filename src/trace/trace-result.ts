/** What a trace needs to know and what it gives back. The one contract between commands, studies, proofs and the tracer. */
import type { Description } from '../design/description.js';
import type { Fault } from '../design/fault.js';
import type { RunTallies } from '../tallies/run-tallies.js';

export type StopReason = 'histories' | 'precision' | 'time' | 'interrupted';

export interface TraceOptions {
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
  readonly onProgress?: (progress: TraceProgress) => void;
}

export interface TraceProgress {
  readonly histories: number;
  readonly ofHistories: number;
  readonly seconds: number;
  /** Relative standard error of the exit fraction so far, null before it is known. */
  readonly precision: number | null;
}

export interface TraceResult {
  readonly description: Description;
  readonly tallies: RunTallies;
  readonly stopReason: StopReason;
  readonly seed: string;
  readonly threads: number;
  readonly seconds: number;
  /** Warnings the scene compiler had (faults of severity 'warning'). */
  readonly warnings: readonly Fault[];
}

// trace/trace-design.ts exports
//   traceDescription(description: Description, options: TraceOptions): Promise<TraceResult>   — throws DesignFaults (faults: Fault[])
