/** Error bars against laws whose variance is known exactly. */
import { describe, expect, test } from 'vitest';
import { ErrorBars } from '../../src/outcome/error-bars.js';
import { binomial, sampleOf, seeded } from '../helpers/random-laws.js';
import { type SyntheticBatch, slot, syntheticTallies } from '../helpers/synthetic-tallies.js';

const SLOTS = [slot('left-by-exit', 'emitted'), slot('missed', 'pump')];

/** A batch in which `hits` of n histories came out. */
const batch = (n: number, hits: number): SyntheticBatch => ({
  histories: n,
  photons: [hits, n - hits],
  figures: { exitPhotons: hits, leakPhotons: n - hits, exitEnergy: hits },
});

const run = (batches: readonly SyntheticBatch[], groups = batches) =>
  new ErrorBars(syntheticTallies(SLOTS, batches, { groups }));

const error = ({ standardError }: { standardError: number | null }): number => standardError ?? Number.NaN;

describe('standard error of a mean', () => {
  test('a worked case: batches of 4 with 1 and 3 hits, eight times each', () => {
    // Batch means 1/4 and 3/4 about 1/2: the mean of 16 has the error √(16·(1/4)²/15/16) = 1/√(240).
    const bars = run(Array.from({ length: 16 }, (_, i) => batch(4, i % 2 === 0 ? 1 : 3)));
    expect(bars.slot(0, 0).value).toBe(0.5);
    expect(error(bars.slot(0, 0))).toBeCloseTo(1 / Math.sqrt(240), 14);
    expect(error(bars.propagate(['exitPhotons'], (mean) => mean))).toBeCloseTo(1 / Math.sqrt(240), 9);
  });

  test('weighs a short last batch by its histories', () => {
    // s² = Σ n_b (x_b/n_b − x̄)²/(B − 1), written out.
    const batches = [...Array.from({ length: 16 }, (_, i) => batch(8, i % 3)), batch(2, 2)];
    const histories = 130;
    const mean = batches.reduce((sum, { photons }) => sum + photons[0], 0) / histories;
    const s2 = batches.reduce((sum, b) => sum + b.histories * (b.photons[0] / b.histories - mean) ** 2, 0) / 16;
    expect(error(run(batches).slot(0, 0))).toBeCloseTo(Math.sqrt(s2 / histories), 14);
  });

  test('is that of the binomial law, p(1 − p)/N, and covers as Student says (seed error-bars-1)', () => {
    const source = seeded('error-bars-1');
    const [p, n, batches, repeats] = [0.3, 100, 32, 600];
    // Quantile 0.975 of Student's t with 31 degrees of freedom (printed tables): 2.0395.
    const quantile = 2.0395;
    const squares: number[] = [];
    let covered = 0;
    for (let r = 0; r < repeats; r++) {
      const { value, standardError } = run(
        Array.from({ length: batches }, () => batch(n, binomial(n, p, source))),
      ).slot(0, 0);
      squares.push((standardError ?? Number.NaN) ** 2);
      if (Math.abs(value - p) <= quantile * (standardError ?? Number.NaN)) covered++;
    }
    const { mean, error } = sampleOf(squares);
    const exact = (p * (1 - p)) / (n * batches);
    expect(Math.abs(mean - exact)).toBeLessThan(4 * error);
    expect(4 * error).toBeLessThan(0.1 * exact);
    expect(Math.abs(covered / repeats - 0.95)).toBeLessThan(4 * Math.sqrt((0.95 * 0.05) / repeats));
  });

  test('at the fewest batches, 16 of 1024, ±1.96 of it covers 90 to 99 % of 400 runs (seeds error-bars-3/0 to 399)', () => {
    // Binomial law; Student's t with 15 degrees of freedom has 93.1 % within ±1.96.
    const [p, n, repeats] = [0.3, 1024, 400];
    let covered = 0;
    for (let r = 0; r < repeats; r++) {
      const source = seeded(`error-bars-3/${r}`);
      const bars = run(Array.from({ length: 16 }, () => batch(n, binomial(n, p, source))));
      const { value, standardError } = bars.slot(0, 0);
      if (Math.abs(value - p) <= 1.96 * (standardError ?? Number.NaN)) covered++;
    }
    expect(covered / repeats).toBeGreaterThan(0.9);
    expect(covered / repeats).toBeLessThan(0.99);
  });

  test('counts histories that move together as one (clusters of equal fate: variance times cluster size; Kish, Survey Sampling, 1965, from memory)', () => {
    // All 50 histories of a batch share one fate: 20 independent events, not 1000.
    const bars = run(Array.from({ length: 20 }, (_, i) => batch(50, i % 2 === 0 ? 50 : 0)));
    expect(error(bars.slot(0, 0))).toBeCloseTo(Math.sqrt(0.25 / 19), 14);
  });
});

describe('what stands behind it', () => {
  const few = [batch(64, 10), batch(64, 20)];
  const groups = Array.from({ length: 32 }, (_, i) => batch(4, i % 4));

  test('groups of histories serve below 16 batches, batches from 16 on', () => {
    expect(run(few, groups).slot(0, 0)).toEqual(run(groups).slot(0, 0));
    const many = Array.from({ length: 16 }, (_, i) => batch(8, i % 5));
    expect(run(many, groups).slot(0, 0)).toEqual(run(many).slot(0, 0));
  });

  test('one group tells nothing of its error', () => {
    const bars = run([batch(64, 10)]);
    expect(bars.slot(0, 0)).toEqual({ value: 10 / 64, standardError: null });
    expect(bars.covariance('exitPhotons', 'leakPhotons')).toBeNull();
    expect(bars.propagate(['exitPhotons'], (mean) => mean).standardError).toBeNull();
  });
});

describe('events never seen, or always', () => {
  // One standard deviation of the Poisson law for a mean of one event; the 95 % bound would be 3/N
  // ("rule of three", Hanley & Lippman-Hand, JAMA 249 (1983) 1743; from memory).
  const batches = (hits: number) => Array.from({ length: 20 }, () => batch(50, hits));

  test.each([0, 50])('%i of 50 in every batch: one event in all histories', (hits) => {
    expect(run(batches(hits)).slot(0, 0)).toEqual({ value: hits / 50, standardError: 1 / 1000 });
    expect(run(batches(hits)).slot(1, 1)).toEqual({ value: 1 - hits / 50, standardError: 1 / 1000 });
  });

  test('rounding of large equal sums is no scatter', () => {
    const bars = run(Array.from({ length: 37 }, () => ({ ...batch(1024, 341), energy: [341 * 2.7551, 683 * 2.7551] })));
    expect(error(bars.slot(0, 1))).toBeCloseTo(2.7551 / (37 * 1024), 12);
  });

  test('a photon of 2.5 eV counts 2.5 eV', () => {
    const bars = run(Array.from({ length: 20 }, () => ({ ...batch(50, 25), energy: [62.5, 62.5] })));
    expect(error(bars.slot(0, 1))).toBeCloseTo(2.5 / 1000, 15);
  });
});

describe('functions of several means', () => {
  /** Each history comes out, leaks or does neither: multinomial law. */
  const draw = (n: number, source: () => number): SyntheticBatch => {
    let [out, leak] = [0, 0];
    for (let i = 0; i < n; i++) {
      const u = source();
      if (u < 0.3) out++;
      else if (u < 0.5) leak++;
    }
    return { histories: n, photons: [out, leak], figures: { exitPhotons: out, leakPhotons: leak } };
  };

  test('covariance −pq/N, and a ratio p/(p + q) as that of a binomial sample of N(p + q) (seed error-bars-2)', () => {
    const source = seeded('error-bars-2');
    const [n, batches, repeats] = [100, 32, 400];
    const covariances: number[] = [];
    const squares: number[] = [];
    for (let r = 0; r < repeats; r++) {
      const bars = run(Array.from({ length: batches }, () => draw(n, source)));
      covariances.push(bars.covariance('exitPhotons', 'leakPhotons') ?? Number.NaN);
      squares.push(error(bars.propagate(['exitPhotons', 'leakPhotons'], (a, b) => a / (a + b))) ** 2);
    }
    const histories = n * batches;
    const covariance = sampleOf(covariances);
    expect(Math.abs(covariance.mean + (0.3 * 0.2) / histories)).toBeLessThan(4 * covariance.error);
    const square = sampleOf(squares);
    // Delta method: q(1 − q)/(N·(p + q)), q = 0.3/0.5, good to the next order in 1/N.
    const expected = (0.6 * 0.4) / (histories * 0.5);
    expect(Math.abs(square.mean - expected)).toBeLessThan(4 * square.error + expected / (histories * 0.5));
  });

  test('parts that always sum to the whole have no error', () => {
    const bars = run(Array.from({ length: 20 }, (_, i) => batch(50, i)));
    const { value, standardError } = bars.propagate(['exitPhotons', 'leakPhotons'], (a, b) => a + b);
    expect(value).toBeCloseTo(1, 14);
    expect(standardError).toBeLessThan(1e-9);
  });

  test('a function without a value has neither value nor error', () => {
    const bars = run(Array.from({ length: 20 }, () => batch(50, 0)));
    const nothing = bars.propagate(['exitWavelength', 'exitPhotons'], (sum, n) => sum / n);
    expect(nothing).toEqual({ value: null, standardError: null });
  });
});
