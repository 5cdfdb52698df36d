/** Counters a thread writes while it traces. One batch's vector is handed on; maps and histograms stay and grow. */
import { CELLS, type Scene } from '../scene/scene-layout.js';
import { FIGURE_COUNT } from '../tallies/run-tallies.js';

export interface BatchTally {
  /** [2·slots + FIGURE_COUNT]: photons and quanta of each slot, then the figure sums, of the batch in hand. */
  readonly vector: Float64Array;
  readonly before: Float64Array;
  /** Σ over groups of x²/n of the batch in hand. */
  readonly groupSquares: Float64Array;
  readonly groupCross: Float64Array;
  readonly grown: GrownTally;
}

/** What only grows: whole numbers, so that threads may be added up in any order. */
export interface GrownTally {
  /** [half · mapCells + cell], energy quanta. */
  readonly maps: Float64Array;
  readonly spectra: Float64Array;
  /** [half · angleCells + cell], energy quanta; in the third part, from 2 · angleCells, quanta as the eye weighs them. */
  readonly angles: Float64Array;
  /** [half · radianceCells + cell], energy quanta. */
  readonly radiance: Float64Array;
  readonly absorptions: Float64Array;
  readonly exitReabsorptions: Float64Array;
  readonly exitPath: Float64Array;
}

const lengths = (scene: Scene): readonly number[] => [
  2 * scene.mapCells,
  scene.spectrumCells,
  3 * scene.angleCells,
  2 * scene.radianceCells,
  CELLS.absorptions,
  CELLS.absorptions,
  CELLS.path,
];

/** Memory for one thread's growing tallies, bytes. */
export function grownBytes(scene: Scene): number {
  return 8 * lengths(scene).reduce((a, b) => a + b, 0);
}

export function grownTally(scene: Scene, buffer: ArrayBuffer | SharedArrayBuffer): GrownTally {
  let offset = 0;
  const [maps, spectra, angles, radiance, absorptions, exitReabsorptions, exitPath] = lengths(scene).map((length) => {
    const view = new Float64Array(buffer, offset, length);
    offset += 8 * length;
    return view;
  });
  return { maps, spectra, angles, radiance, absorptions, exitReabsorptions, exitPath };
}

export function createBatchTally(scene: Scene, grown: GrownTally): BatchTally {
  const length = 2 * scene.slots + FIGURE_COUNT;
  return {
    vector: new Float64Array(length),
    before: new Float64Array(length),
    groupSquares: new Float64Array(length),
    groupCross: new Float64Array(FIGURE_COUNT * FIGURE_COUNT),
    grown,
  };
}

export function clearBatch(tally: BatchTally): void {
  tally.vector.fill(0);
  tally.before.fill(0);
  tally.groupSquares.fill(0);
  tally.groupCross.fill(0);
}

/** Adds the squares of what `histories` histories have added since the last call. */
export function closeGroup(tally: BatchTally, histories: number): void {
  const { vector, before, groupSquares, groupCross } = tally;
  const length = vector.length;
  const first = length - FIGURE_COUNT;
  for (let i = 0; i < length; i++) {
    const x = vector[i] - before[i];
    groupSquares[i] += (x * x) / histories;
    before[i] = x;
  }
  for (let i = 0; i < FIGURE_COUNT; i++) {
    const x = before[first + i] / histories;
    for (let j = 0; j < FIGURE_COUNT; j++) groupCross[i * FIGURE_COUNT + j] += x * before[first + j];
  }
  before.set(vector);
}
