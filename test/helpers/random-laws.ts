/** Laws of chance for tests, from a seeded source of numbers in [0, 1). */
import seedrandom from 'seedrandom';

export type Source = () => number;

export const seeded = (seed: string): Source => seedrandom(seed);

/** A Poisson count by waiting times (Knuth, The Art of Computer Programming 2, §3.4.1); in steps of 100, so that exp stays in range. */
export function poisson(mean: number, source: Source): number {
  let count = 0;
  for (let left = mean; left > 0; left -= 100) {
    const limit = Math.exp(-Math.min(left, 100));
    for (let product = source(); product > limit; product *= source()) count++;
  }
  return count;
}

/** Successes in n tries. */
export function binomial(n: number, p: number, source: Source): number {
  let count = 0;
  for (let i = 0; i < n; i++) if (source() < p) count++;
  return count;
}

/** Mean of a sample, its standard deviation, and the standard error of its mean. */
export function sampleOf(values: readonly number[]): { mean: number; deviation: number; error: number } {
  const mean = values.reduce((a, b) => a + b, 0) / values.length;
  const deviation = Math.sqrt(values.reduce((a, b) => a + (b - mean) ** 2, 0) / (values.length - 1));
  return { mean, deviation, error: deviation / Math.sqrt(values.length) };
}
