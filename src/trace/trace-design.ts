/** One run, all stages in order: the one function that every command, study and proof calls. */
import type { Description } from '../design/description.js';
import { DesignFaults } from '../design/design-faults.js';
import { collectTallies } from '../engine/collect-tallies.js';
import { MOST_HISTORIES, runBatches } from '../engine/run-batches.js';
import { checkScene } from '../scene/check-scene.js';
import { compileScene } from '../scene/compile-scene.js';
import { usedCurves } from '../scene/used-curves.js';
import type { TraceOptions, TraceResult } from './trace-result.js';

/** The trace was stopped before its first batch was done: there is nothing to keep. */
export class NothingTraced extends Error {
  constructor() {
    super('stopped before the first batch of histories was done');
    this.name = 'NothingTraced';
  }
}

/**
 * Traces a description.
 * @throws DesignFaults when the design cannot be traced; RangeError for histories below 1; NothingTraced when
 * stopped at once; LostHistories on a defect of the program.
 */
export async function traceDescription(description: Description, options: TraceOptions): Promise<TraceResult> {
  if (!(options.histories >= 1 && options.histories <= MOST_HISTORIES)) {
    throw new RangeError(`${options.histories} histories; between 1 and ${MOST_HISTORIES} can be traced`);
  }
  const { faults } = checkScene(description);
  if (faults.some(({ severity }) => severity === 'error')) throw new DesignFaults(faults);
  const compiled = compileScene(description);
  const outcome = await runBatches(compiled.scene, { ...options, histories: Math.floor(options.histories) });
  if (outcome.fold.histories === 0) throw new NothingTraced();
  return {
    description,
    tallies: collectTallies(compiled, outcome.fold, outcome.grown),
    curves: usedCurves(description, compiled),
    stopReason: outcome.stopReason,
    seed: options.seed,
    threads: options.threads,
    seconds: outcome.seconds,
    warnings: faults,
  };
}
