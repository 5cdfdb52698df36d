/**
 * Standard errors from moments over batches. Batches are independent (each has its own random stream and its own randomised Sobol net),
 * histories inside one are not, so errors come from batch sums: s² = Σ_b n_b (x_b/n_b − x̄)²/(B − 1) per history, se(x̄) = √(s²/N).
 */
import { FIGURE, FIGURE_COUNT, type Moments, type RunTallies } from '../tallies/run-tallies.js';

/** Below this many batches, groups of histories inside batches serve instead; the nets then make errors too large, never too small. */
const FEWEST_BATCHES = 16;

export interface Estimate {
  readonly value: number;
  /** null when fewer than two groups were traced. */
  readonly standardError: number | null;
}

export class ErrorBars {
  readonly #moments: Moments;
  readonly #first: number;

  constructor({ moments, groupMoments, slots }: RunTallies) {
    this.#moments = moments.batches >= FEWEST_BATCHES ? moments : groupMoments;
    this.#first = 2 * slots.length;
  }

  get histories(): number {
    return this.#moments.histories;
  }

  /** Whether there are groups enough for errors at all. */
  get tellErrors(): boolean {
    return this.#moments.batches >= 2;
  }

  /** Mean per history of the photons (`part` 0) or eV (1) of a slot. */
  slot(slot: number, part: 0 | 1): Estimate {
    const { histories, batches, sum, sumSquares } = this.#moments;
    const at = 2 * slot + part;
    const value = sum[at] / histories;
    if (batches < 2) return { value, standardError: null };
    const scatter = clampedVariance(sumSquares[at], sum[at] ** 2 / histories, batches);
    if (scatter > 0) return { value, standardError: Math.sqrt(scatter / histories) };
    // No batch differed from another (never seen, or every time): see oneEventAtLeast.
    const perEvent = sum[2 * slot] > 0 ? sum[at] / sum[2 * slot] : 1;
    return { value, standardError: Math.abs(perEvent) / histories };
  }

  mean(figure: keyof typeof FIGURE): number {
    return this.#moments.sum[this.#first + FIGURE[figure]] / this.#moments.histories;
  }

  /** Covariance of the means of two figure sums; null with fewer than two groups. */
  covariance(a: keyof typeof FIGURE, b: keyof typeof FIGURE): number | null {
    const { histories, batches, figureCross } = this.#moments;
    if (batches < 2) return null;
    const product = this.mean(a) * this.mean(b) * histories;
    return (figureCross[FIGURE[a] * FIGURE_COUNT + FIGURE[b]] - product) / (batches - 1) / histories;
  }

  /**
   * A function of figure means with its error by first-order propagation (delta method), gradient by central differences.
   * @returns value null where the function is not finite.
   */
  propagate(
    names: readonly (keyof typeof FIGURE)[],
    f: (...means: number[]) => number,
  ): { value: number | null; standardError: number | null } {
    const means = names.map((name) => this.mean(name));
    const value = f(...means);
    if (!Number.isFinite(value)) return { value: null, standardError: null };
    const gradient = means.map((mean, i) => {
      const h = Math.max(Math.abs(mean), 1e-30) * 1e-5;
      const at = (shift: number) => f(...means.map((m, j) => (i === j ? m + shift : m)));
      return (at(h) - at(-h)) / (2 * h);
    });
    let variance = 0;
    for (let i = 0; i < names.length; i++) {
      for (let j = 0; j < names.length; j++) {
        const covariance = this.covariance(names[i], names[j]);
        if (covariance === null) return { value, standardError: null };
        variance += gradient[i] * gradient[j] * covariance;
      }
    }
    const error = Math.sqrt(Math.max(0, variance));
    return { value, standardError: Number.isFinite(error) ? error : null };
  }
}

/** Scatter below this share of a value is rounding of its sums, not chance. */
const ROUNDING = 1e-7;

/**
 * Where no batch differed from another, mostly because a thing was never seen or always, the variance of the batches is zero but certainty is not:
 * one event more or less among all histories would not have surprised. So the error is that of a Poisson count of one. (After N histories without an event,
 * its probability is below 3/N with 95 % confidence: "rule of three", Hanley & Lippman-Hand, JAMA 249 (1983) 1743; from memory.)
 * @param oneEvent what one event in the whole run would add to the value, at most
 */
export function oneEventAtLeast<E extends { readonly value: number | null; readonly standardError: number | null }>(
  estimate: E,
  oneEvent: number,
): E {
  const { value, standardError } = estimate;
  if (value === null || standardError === null || standardError > ROUNDING * Math.abs(value)) return estimate;
  return { ...estimate, standardError: oneEvent };
}

/** Differences of near equal sums may come out a rounding below zero. */
function clampedVariance(sumSquares: number, squaredSum: number, batches: number): number {
  const difference = sumSquares - squaredSum;
  return difference > 1e-12 * sumSquares ? difference / (batches - 1) : 0;
}
