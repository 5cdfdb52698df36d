/** What a trace needs to know and what it gives back. The one contract between commands, studies, proofs and the tracer. */
import type { Description } from '../design/description.js';
import type { Fault } from '../design/fault.js';
import type { BatchPlan, BatchProgress, StopReason } from '../engine/batch-plan.js';
import type { CurveKind, UsedCurve } from '../scene/used-curve.js';
import type { RunTallies } from '../tallies/run-tallies.js';

export type TraceOptions = BatchPlan;
export type TraceProgress = BatchProgress;
export type { CurveKind, StopReason, UsedCurve };

export interface TraceResult {
  readonly description: Description;
  readonly tallies: RunTallies;
  /** Over the wavelengths of the tallies. */
  readonly curves: readonly UsedCurve[];
  readonly stopReason: StopReason;
  readonly seed: string;
  readonly threads: number;
  readonly seconds: number;
  /** Warnings of the scene's check. */
  readonly warnings: readonly Fault[];
}
