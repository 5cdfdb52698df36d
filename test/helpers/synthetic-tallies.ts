/** Run tallies made by hand, so that what is summed from them can be known beforehand. */
import {
  type FateSlot,
  FIGURE,
  FIGURE_COUNT,
  type Moments,
  type RecordedMap,
  type RunTallies,
} from '../../src/tallies/run-tallies.js';

export type FigureSums = Partial<Record<keyof typeof FIGURE, number>>;

/** What one batch (or group) of histories has added up. */
export interface SyntheticBatch {
  readonly histories: number;
  /** Per slot. */
  readonly photons: readonly number[];
  /** eV per slot; 1 eV a photon when left out. */
  readonly energy?: readonly number[];
  readonly figures?: FigureSums;
}

export const slot = (
  fate: FateSlot['fate'],
  light: FateSlot['light'],
  where: string | null = null,
  by: string | null = null,
): FateSlot => ({ fate, light, where, by });

/** Moments as their contract defines them, straight from the batches. */
export function momentsOf(slots: number, batches: readonly SyntheticBatch[]): Moments {
  const length = 2 * slots + FIGURE_COUNT;
  const sum = new Float64Array(length);
  const sumSquares = new Float64Array(length);
  const figureCross = new Float64Array(FIGURE_COUNT ** 2);
  let histories = 0;
  for (const batch of batches) {
    const n = batch.histories;
    histories += n;
    const vector = vectorOf(slots, batch);
    vector.forEach((x, i) => {
      sum[i] += x;
      sumSquares[i] += (x * x) / n;
    });
    const figures = vector.subarray(2 * slots);
    figures.forEach((a, i) => {
      figures.forEach((b, j) => {
        figureCross[i * FIGURE_COUNT + j] += (a * b) / n;
      });
    });
  }
  return { histories, batches: batches.length, sum, sumSquares, figureCross };
}

function vectorOf(slots: number, { histories, photons, energy = photons, figures = {} }: SyntheticBatch): Float64Array {
  const vector = new Float64Array(2 * slots + FIGURE_COUNT);
  for (let i = 0; i < slots; i++) {
    vector[2 * i] = photons[i];
    vector[2 * i + 1] = energy[i];
  }
  const all: FigureSums = { launchedPhotons: histories, launchedEnergy: histories, ...figures };
  for (const [name, value] of Object.entries(all)) vector[2 * slots + FIGURE[name as keyof typeof FIGURE]] = value;
  return vector;
}

/** @param more maps, spectra and the rest, none unless given; `groups` stand in for batches where these are few. */
export function syntheticTallies(
  slots: readonly FateSlot[],
  batches: readonly SyntheticBatch[],
  { groups = batches, ...more }: Partial<RunTallies> & { readonly groups?: readonly SyntheticBatch[] } = {},
): RunTallies {
  return {
    slots,
    moments: momentsOf(slots.length, batches),
    groupMoments: momentsOf(slots.length, groups),
    maps: [],
    spectra: [],
    angles: [],
    radiance: [],
    histograms: [],
    wavelengthsNm: new Float64Array(),
    ...more,
  };
}

/** A map of square cells of 1 mm (1 mm³), all of them whole unless `measure` says otherwise. */
export function syntheticMap(
  what: RecordedMap['what'],
  shape: readonly number[],
  [even, odd]: readonly [ArrayLike<number>, ArrayLike<number>],
  measure: ArrayLike<number> = new Float64Array(even.length).fill(1),
): RecordedMap {
  return {
    id: what,
    what,
    where: 'cell.top',
    shape,
    extent: shape.map((cells) => [0, cells] as const),
    axes: ['u', 'v', 'w'].slice(0, shape.length),
    energy: [Float64Array.from(even), Float64Array.from(odd)],
    measure: Float64Array.from(measure),
    frame: null,
  };
}
