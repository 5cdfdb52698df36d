/** Sums over batches, always in batch order: floating-point sums then have the same bits whatever the threads did. */
import { FIGURE, FIGURE_COUNT, GROUP_HISTORIES, type Moments } from '../tallies/run-tallies.js';
import type { BatchResult } from './messages.js';

interface RunningMoments {
  histories: number;
  batches: number;
  readonly sum: Float64Array;
  readonly sumSquares: Float64Array;
  readonly figureCross: Float64Array;
}

export class BatchFold {
  readonly #batch: RunningMoments;
  readonly #group: RunningMoments;
  readonly #first: number;
  #next = 0;

  /** @param slots number of fate slots. */
  constructor(slots: number) {
    this.#first = 2 * slots;
    this.#batch = emptyMoments(this.#first + FIGURE_COUNT);
    this.#group = emptyMoments(this.#first + FIGURE_COUNT);
  }

  get histories(): number {
    return this.#batch.histories;
  }

  get batches(): number {
    return this.#batch.batches;
  }

  /** Takes the batches of a round, which follow those already folded without a gap. */
  add(results: readonly BatchResult[]): void {
    for (const result of results.toSorted((a, b) => a.batch - b.batch)) {
      if (result.batch !== this.#next) throw new Error(`batch ${this.#next} is missing, ${result.batch} came instead`);
      this.#next++;
      this.#fold(result);
    }
  }

  #fold({ histories, vector, groupSquares, groupCross }: BatchResult): void {
    const batch = this.#batch;
    const group = this.#group;
    batch.batches++;
    batch.histories += histories;
    group.batches += Math.ceil(histories / GROUP_HISTORIES);
    group.histories += histories;
    for (let i = 0; i < vector.length; i++) {
      const x = vector[i];
      batch.sum[i] += x;
      group.sum[i] += x;
      batch.sumSquares[i] += (x * x) / histories;
      group.sumSquares[i] += groupSquares[i];
    }
    for (let i = 0; i < FIGURE_COUNT; i++) {
      const x = vector[this.#first + i] / histories;
      for (let j = 0; j < FIGURE_COUNT; j++) {
        batch.figureCross[i * FIGURE_COUNT + j] += x * vector[this.#first + j];
        group.figureCross[i * FIGURE_COUNT + j] += groupCross[i * FIGURE_COUNT + j];
      }
    }
  }

  /** Relative standard error of the exit fraction; null while too few batches or no light has come out. */
  exitPrecision(): number | null {
    const { batches, histories, sum, sumSquares } = this.#batch;
    const at = this.#first + FIGURE.exitPhotons;
    if (batches < 16 || sum[at] === 0) return null;
    const perHistory = Math.max(0, sumSquares[at] - (sum[at] * sum[at]) / histories) / (batches - 1);
    const precision = Math.sqrt(perHistory * histories) / sum[at];
    // Not a single difference between batches is no sign of exactness unless every photon came out.
    return precision > 0 || sum[at] === histories ? precision : null;
  }

  /** Moments with energies in eV. */
  moments(quantumEv: number): { batch: Moments; group: Moments } {
    return {
      batch: inElectronvolts(this.#batch, this.#first, quantumEv),
      group: inElectronvolts(this.#group, this.#first, quantumEv),
    };
  }
}

function emptyMoments(length: number): RunningMoments {
  return {
    histories: 0,
    batches: 0,
    sum: new Float64Array(length),
    sumSquares: new Float64Array(length),
    figureCross: new Float64Array(FIGURE_COUNT * FIGURE_COUNT),
  };
}

const ENERGY_FIGURES = new Set<number>([
  FIGURE.launchedEnergy,
  FIGURE.exitEnergy,
  FIGURE.exitX,
  FIGURE.exitY,
  FIGURE.exitZ,
  FIGURE.leakEnergy,
]);

function inElectronvolts(from: RunningMoments, first: number, quantumEv: number): Moments {
  const factor = (i: number) => {
    const energy = i < first ? i % 2 === 1 : ENERGY_FIGURES.has(i - first);
    return energy ? quantumEv : 1;
  };
  return {
    histories: from.histories,
    batches: from.batches,
    sum: from.sum.map((value, i) => value * factor(i)),
    sumSquares: from.sumSquares.map((value, i) => value * factor(i) ** 2),
    figureCross: from.figureCross.map((value, k) => {
      const i = first + Math.floor(k / FIGURE_COUNT);
      return value * factor(i) * factor(first + (k % FIGURE_COUNT));
    }),
  };
}
