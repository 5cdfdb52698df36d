/** Recorded energies -> irradiance or absorbed power density, per half and together. */

import type { RecordedMap, RunTallies } from '../tallies/run-tallies.js';
import { halfHistories } from '../trace/half-histories.js';

/** A map in W/cm² (faces) or W/cm³ (voxels). */
export interface MapField {
  readonly map: RecordedMap;
  readonly unit: 'W/cm²' | 'W/cm³';
  /** NaN where the map has no face or liquid. */
  readonly values: Float64Array;
  /** The same from even and from odd batches alone; a half without histories is null. */
  readonly halves: readonly [Float64Array | null, Float64Array | null];
  /** Photons behind each cell, about (energy over the mean photon energy). */
  readonly counts: Float64Array;
  /** W in the whole map. */
  readonly power: number;
}

/**
 * @param pumpWatts total pump power
 * @param launchedEv mean eV launched per history
 */
export function mapField(map: RecordedMap, tallies: RunTallies, pumpWatts: number, launchedEv: number): MapField {
  const histories = tallies.moments.histories;
  const voxels = map.shape.length === 3;
  // mm² -> cm², mm³ -> cm³
  const toCm = voxels ? 1e-3 : 1e-2;
  const [even, odd] = map.energy;
  const field = (energy: Float64Array, n: number) => {
    const wattsPerEv = pumpWatts / (n * launchedEv);
    return energy.map((ev, i) => (map.measure[i] > 0 ? (ev * wattsPerEv) / (map.measure[i] * toCm) : Number.NaN));
  };
  const both = even.map((ev, i) => ev + odd[i]);
  const [evenHistories, oddHistories] = halfHistories(histories);
  const energy = both.reduce((a, b) => a + b, 0);
  return {
    map,
    unit: voxels ? 'W/cm³' : 'W/cm²',
    values: field(both, histories),
    halves: [evenHistories > 0 ? field(even, evenHistories) : null, oddHistories > 0 ? field(odd, oddHistories) : null],
    counts: both.map((ev) => ev / launchedEv),
    power: (energy * pumpWatts) / (histories * launchedEv),
  };
}

/** false for a map whose every cell missed its face or liquid (a sliver between the sample points): nothing can be said of it. */
export const hasMeasure = ({ map }: MapField): boolean => map.measure.some((measure) => measure > 0);

/** Cells of which at least half belongs to the face or the liquid; others are too thin to judge evenness by. */
export function soundCells({ map }: MapField): number[] {
  const sound = soundness(map.measure, cellSizes(map));
  const cells: number[] = [];
  for (let i = 0; i < map.measure.length; i++) if (sound(i)) cells.push(i);
  return cells;
}

/** Size of each whole cell, as `cellSize`; on a sphere, where cells shrink towards the poles, all are whole. */
export function cellSizes(map: RecordedMap): (cell: number) => number {
  if (map.extentDeg !== undefined) return (cell) => map.measure[cell];
  const size = cellSize(map);
  return () => size;
}

/** Size of a whole cell, mm² or mm³, on the map. The face itself may have more in it: the rim of a dome is steep. */
export function cellSize({ shape, extent }: RecordedMap): number {
  return extent.reduce((product, [low, high], axis) => (product * (high - low)) / shape[axis], 1);
}

/**
 * Tells the cells whose measure is at least half of their size; where no cell is full (a thin plate in wide voxels), half of what the
 * fullest has.
 */
export function soundness(measure: Float64Array, size: (cell: number) => number): (cell: number) => boolean {
  let fullest = 0;
  for (let i = 0; i < measure.length; i++) fullest = Math.max(fullest, measure[i] / size(i));
  // A hair less, for cells that are half on the face but for rounding.
  const least = (Math.min(fullest, 1) / 2) * (1 - 1e-9);
  return (cell) => measure[cell] > 0 && measure[cell] / size(cell) >= least;
}
