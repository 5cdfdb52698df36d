/** A mean with its standard error, from the per-batch moments of a run. */
import { type FateSlot, FIGURE, FIGURE_COUNT, type Moments, type RunTallies } from '../tallies/run-tallies.js';

export interface Estimate {
  readonly value: number;
  readonly standardError: number;
}

export type FigureWeights = Partial<Record<keyof typeof FIGURE, number>>;

/** Below this many batches their scatter is itself too uncertain, and the finer groups are used. */
const FEWEST_BATCHES = 16;

const momentsOf = ({ moments, groupMoments }: RunTallies): Moments =>
  moments.batches >= FEWEST_BATCHES ? moments : groupMoments;

/**
 * Photons per history in all slots that `pick` takes. One slot has its own batch variance. A sum of slots gets the root of
 * the summed variances: a photon in one slot is in no other, so covariances do not add to it.
 */
export function fateShare(tallies: RunTallies, pick: (slot: FateSlot) => boolean): Estimate {
  return shareOf(tallies, pick, 0);
}

/** Photon energy, eV per history, in all slots that `pick` takes. */
export function fateEnergy(tallies: RunTallies, pick: (slot: FateSlot) => boolean): Estimate {
  return shareOf(tallies, pick, 1);
}

function shareOf(tallies: RunTallies, pick: (slot: FateSlot) => boolean, quantity: 0 | 1): Estimate {
  const moments = momentsOf(tallies);
  const { histories: n, batches, sum, sumSquares } = moments;
  let value = 0;
  let variance = 0;
  tallies.slots.forEach((slot, index) => {
    if (!pick(slot)) return;
    const at = 2 * index + quantity;
    const mean = sum[at] / n;
    value += mean;
    variance += Math.max(0, sumSquares[at] / n - mean * mean);
  });
  return { value, standardError: Math.sqrt(variance / (batches - 1)) };
}

/** Weighted sum of figure sums per history, with all covariances. */
export function figureMean(tallies: RunTallies, weights: FigureWeights): Estimate {
  const moments = momentsOf(tallies);
  const entries = indexed(weights);
  return {
    value: entries.reduce((total, [index, weight]) => total + weight * meanOf(moments, tallies, index), 0),
    standardError: Math.sqrt(varianceOf(moments, tallies, entries)),
  };
}

/** Ratio of two weighted sums of figures; standard error by the ratio's linear expansion, covariances included. */
export function figureRatio(tallies: RunTallies, numerator: FigureWeights, denominator: FigureWeights): Estimate {
  const moments = momentsOf(tallies);
  const top = indexed(numerator);
  const bottom = indexed(denominator);
  const total = (entries: Indexed): number =>
    entries.reduce((sum, [index, weight]) => sum + weight * meanOf(moments, tallies, index), 0);
  const below = total(bottom);
  const value = total(top) / below;
  const expansion = new Map(top);
  for (const [index, weight] of bottom) expansion.set(index, (expansion.get(index) ?? 0) - value * weight);
  return { value, standardError: Math.sqrt(varianceOf(moments, tallies, [...expansion])) / Math.abs(below) };
}

type Indexed = readonly (readonly [number, number])[];

function indexed(weights: FigureWeights): Indexed {
  return (Object.keys(FIGURE) as (keyof typeof FIGURE)[])
    .filter((name) => weights[name] !== undefined)
    .map((name) => [FIGURE[name], weights[name] ?? 0] as const);
}

const meanOf = (moments: Moments, tallies: RunTallies, index: number): number =>
  moments.sum[2 * tallies.slots.length + index] / moments.histories;

/** Variance of a weighted sum of figure means. */
function varianceOf(moments: Moments, tallies: RunTallies, weights: Indexed): number {
  const { histories: n, batches, figureCross } = moments;
  let spread = 0;
  for (const [i, a] of weights) {
    for (const [j, b] of weights) {
      const product = figureCross[i * FIGURE_COUNT + j] / n;
      spread += a * b * (product - meanOf(moments, tallies, i) * meanOf(moments, tallies, j));
    }
  }
  return Math.max(0, spread) / (batches - 1);
}
