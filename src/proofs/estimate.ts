/** What the proofs measure: shares and figures of a run with their standard errors, from the moments of its batches. */
import { ErrorBars } from '../outcome/error-bars.js';
import type { FateSlot, FIGURE, RunTallies } from '../tallies/run-tallies.js';

export interface Estimate {
  readonly value: number;
  readonly standardError: number;
}

type FigureName = keyof typeof FIGURE;
/** A sum of figures, each with its factor. */
export type FigureWeights = Partial<Record<FigureName, number>>;

/** Photons per history in all slots that `pick` takes. */
export function fateShare(tallies: RunTallies, pick: (slot: FateSlot) => boolean): Estimate {
  return slotSum(tallies, pick, 0);
}

/** Photon energy, eV per history, in all slots that `pick` takes. */
export function fateEnergy(tallies: RunTallies, pick: (slot: FateSlot) => boolean): Estimate {
  return slotSum(tallies, pick, 1);
}

/**
 * One slot has its own batch variance. A sum of slots gets the root of the summed variances: a photon in one slot is in no
 * other, so covariances do not add to it.
 */
function slotSum(tallies: RunTallies, pick: (slot: FateSlot) => boolean, part: 0 | 1): Estimate {
  const bars = new ErrorBars(tallies);
  const parts = tallies.slots.flatMap((slot, index) => (pick(slot) ? [bars.slot(index, part)] : []));
  return {
    value: parts.reduce((sum, { value }) => sum + value, 0),
    standardError: Math.hypot(...parts.map(({ standardError }) => known(standardError))),
  };
}

/** Weighted sum of figures per history, with all covariances. */
export function figureMean(tallies: RunTallies, weights: FigureWeights): Estimate {
  return figureRatio(tallies, weights, null);
}

/** Ratio of two weighted sums of figures, covariances included; the denominator null is one. */
export function figureRatio(
  tallies: RunTallies,
  numerator: FigureWeights,
  denominator: FigureWeights | null,
): Estimate {
  const names = [...new Set([...Object.keys(numerator), ...Object.keys(denominator ?? {})])] as FigureName[];
  const { value, standardError } = new ErrorBars(tallies).propagate(names, (...means) => {
    const total = (weights: FigureWeights): number =>
      names.reduce((sum, name, index) => sum + (weights[name] ?? 0) * means[index], 0);
    return total(numerator) / (denominator === null ? 1 : total(denominator));
  });
  return { value: known(value), standardError: known(standardError) };
}

/** What a run of so many histories always has; NaN, which no band holds, if it has not. */
const known = (value: number | null): number => value ?? Number.NaN;
