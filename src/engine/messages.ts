/** What threads tell each other. */
import type { Scene } from '../scene/scene-layout.js';

/** Slots of the shared control words. */
export const CONTROL = { nextBatch: 0, endOfRound: 1, stop: 2, COUNT: 3 } as const;

/** One thread's part of a round: claim batches until none is left. */
export interface ShareTask {
  /** Tells a thread whether it still holds the region graph of this scene. */
  readonly runId: number;
  readonly scene: Scene;
  /** Maps and histograms of this share: they stay here over all rounds. */
  readonly grown: SharedArrayBuffer;
  readonly control: Int32Array;
  readonly seed: string;
  /** Histories of the whole run; the last batch may be a part of one. */
  readonly histories: number;
}

export interface ShareResult {
  readonly batches: readonly BatchResult[];
  /** Histories that ended in no fate: a defect of the program. */
  readonly defects: number;
}

export interface BatchResult {
  readonly batch: number;
  readonly histories: number;
  /** Layout of `BatchTally.vector`. */
  readonly vector: Float64Array;
  readonly groupSquares: Float64Array;
  readonly groupCross: Float64Array;
}
