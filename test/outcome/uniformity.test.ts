/**
 * Flatness, uniformity, steepness and widths against closed forms. Definitions of ISO 13694 and ISO 11146 from memory; each expected value is the
 * exact integral of its profile.
 */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  coarsen,
  edgeSteepness,
  isoUniformity,
  mapMean,
  type PlaneMap,
  secondMomentWidths,
  trueVariation,
} from '../../src/outcome/uniformity.js';
import { poisson, sampleOf, seeded } from '../helpers/random-laws.js';

const CELLS = 800;

/** Profile over the square −half…half. */
function square(half: number, profile: (x: number, y: number) => number, cells = CELLS): PlaneMap {
  const at = (i: number) => ((i + 0.5) / cells) * 2 * half - half;
  const values = new Float64Array(cells * cells);
  for (let i = 0; i < values.length; i++) values[i] = profile(at(i % cells), at(Math.floor(i / cells)));
  return { cellsU: cells, cellsV: cells, values, weights: new Float64Array(values.length).fill(1) };
}

const disc = square(1.5, (x, y) => (Math.hypot(x, y) < 1 ? 1 : 0));
/** 1/e² radius 1. */
const gaussian = square(2.5, (x, y) => Math.exp(-2 * (x * x + y * y)));
const cone = square(1.1, (x, y) => Math.max(0, 1 - Math.hypot(x, y)));
const ramp: PlaneMap = {
  cellsU: 100_000,
  cellsV: 1,
  values: Float64Array.from({ length: 100_000 }, (_, i) => (i + 0.5) / 100_000),
  weights: new Float64Array(100_000).fill(1),
};

describe('ISO 13694', () => {
  test('an even disc: F = 1, U = 0, s = 0, at any threshold', () => {
    for (const threshold of [0, 0.1, 0.5, 0.9]) {
      expect(isoUniformity(disc, threshold)).toEqual({ flatness: 1, uniformity: 0 });
    }
    expect(edgeSteepness(disc)).toBe(0);
  });

  test.each([0.1, 0.5, 0.8])(
    'a Gaussian above η = %d: F = (1 − η)/ln(1/η), U = √((1 + η) ln(1/η)/(2(1 − η)) − 1)',
    (eta) => {
      const { flatness, uniformity } = isoUniformity(gaussian, eta);
      // Cells on the rim of the footprint limit the sum to about 1e-3.
      expect(Math.abs(flatness - (1 - eta) / Math.log(1 / eta))).toBeLessThan(1e-3);
      expect(Math.abs(uniformity - Math.sqrt(((1 + eta) * Math.log(1 / eta)) / (2 * (1 - eta)) - 1))).toBeLessThan(
        1e-3,
      );
    },
  );

  test('the Gaussian in numbers: F = 0.721348 and U = 0.199301 at η = 0.5, s = 0.954242', () => {
    const { flatness, uniformity } = isoUniformity(gaussian, 0.5);
    expect(Math.abs(flatness - 0.721348)).toBeLessThan(1e-3);
    expect(Math.abs(uniformity - 0.199301)).toBeLessThan(1e-3);
    expect(Math.abs(edgeSteepness(gaussian) - 0.954242)).toBeLessThan(1e-3);
  });

  test('a ramp from 0 to 1 without threshold: F = 1/2, U = 1/√3', () => {
    const { flatness, uniformity } = isoUniformity(ramp, 0);
    expect(flatness).toBeCloseTo(0.5, 4);
    expect(uniformity).toBeCloseTo(1 / Math.sqrt(3), 8);
  });

  test('a cone: s = 1 − (0.1/0.9)² = 0.987654', () => {
    expect(Math.abs(edgeSteepness(cone) - 0.987654)).toBeLessThan(1e-3);
  });

  test('cells weigh by their area, and those off the face do not count', () => {
    const map: PlaneMap = {
      cellsU: 2,
      cellsV: 2,
      values: Float64Array.of(1, 3, Number.NaN, 3),
      weights: Float64Array.of(1, 0.5, 0, 0.5),
    };
    expect(mapMean(map)).toBe(2);
    expect(isoUniformity(map, 0)).toEqual({ flatness: 2 / 3, uniformity: 0.5 });
  });
});

describe('ISO 11146 widths', () => {
  const step = (half: number) => (2 * half) / CELLS;

  test('a Gaussian of 1/e² radius w: 2w', () => {
    const { u, v } = secondMomentWidths(gaussian, step(2.5), step(2.5));
    expect(u).toBeCloseTo(2, 3);
    expect(v).toBeCloseTo(2, 3);
  });

  test('a rectangle a × b: 4a/√12 and 4b/√12; a disc: its diameter', () => {
    const full = square(1, () => 1);
    const { u, v } = secondMomentWidths(full, step(1.5), step(1));
    expect(u).toBeCloseTo(1.154701 * 3, 4);
    expect(v).toBeCloseTo(1.154701 * 2, 4);
    expect(secondMomentWidths(disc, step(1.5), step(1.5)).u).toBeCloseTo(2, 3);
  });
});

describe('variation with the noise taken out', () => {
  const size = 40;
  /** Two halves of a map whose cells are Poisson counts about `mean` × profile. */
  function halves(mean: number, profile: (u: number) => number, source: () => number): [PlaneMap, PlaneMap] {
    const half = () => square(0.5, (x) => poisson(mean * profile(x), source), size);
    return [half(), half()];
  }
  const sine = (x: number) => 1 + 0.2 * Math.sin(4 * Math.PI * x);
  const truth = 0.2 / Math.SQRT2;

  test('pure noise of 20 % reads as none (seed uniformity-1)', () => {
    const source = seeded('uniformity-1');
    const readings = Array.from({ length: 60 }, () => trueVariation(...halves(25, () => 1, source)));
    expect(readings.filter(({ resolved }) => resolved)).toEqual([]);
    // Raw, each half would read 1/√25.
    expect(sampleOf(readings.map(({ value }) => value)).mean).toBeLessThan(0.03);
    // The square is within one standard error of zero, or below it, as often as a normal variable is below 1: 84.13 %.
    const within = readings.filter(({ value, standardError }) => value <= standardError).length / readings.length;
    expect(Math.abs(within - 0.8413)).toBeLessThan(4 * Math.sqrt((0.8413 * 0.1587) / readings.length));
  });

  test('a sine of 20 % reads 20 %/√2 under noise of 20 %, with an honest error (seed uniformity-2)', () => {
    const source = seeded('uniformity-2');
    const readings = Array.from({ length: 200 }, () => trueVariation(...halves(25, sine, source)));
    const { mean, deviation, error } = sampleOf(readings.map(({ value }) => value));
    expect(readings.every(({ resolved }) => resolved)).toBe(true);
    expect(Math.abs(mean - truth)).toBeLessThan(4 * error);
    // The deviation of 200 readings is itself known to 1/√400.
    const stated = sampleOf(readings.map(({ standardError }) => standardError)).mean;
    expect(Math.abs(deviation / stated - 1)).toBeLessThan(4 / Math.sqrt(400));
  });

  test('without noise it is the plain coefficient of variation', () => {
    const map = square(0.5, sine, size);
    expect(trueVariation(map, map).value).toBeCloseTo(truth, 12);
    expect(trueVariation(map, map).standardError).toBe(0);
  });
});

describe('joining cells', () => {
  test.each([
    [1, 7, 5],
    [2, 7, 5],
    [3, 40, 40],
    [4, 10, 9],
  ])('by %i keeps power, area and mean of %i × %i cells', (factor, cellsU, cellsV) => {
    const values = Float64Array.from({ length: cellsU * cellsV }, (_, i) => (i * 7) % 11);
    const weights = values.map((_, i) => (i % 5 === 0 ? 0 : 1 + (i % 3)));
    const map = { cellsU, cellsV, values, weights };
    const joined = coarsen(map, factor);
    const area = (m: PlaneMap) => m.weights.reduce((a, b) => a + b, 0);
    expect(area(joined)).toBeCloseTo(area(map), 9);
    expect(mapMean(joined)).toBeCloseTo(mapMean(map), 12);
  });

  test('keeps power and area of any map (fast-check)', () => {
    const cell = fc.record({ value: fc.double({ min: 0, max: 1e3, noNaN: true }), weight: fc.constantFrom(0, 0.3, 1) });
    const map = fc.tuple(fc.integer({ min: 1, max: 9 }), fc.integer({ min: 1, max: 9 })).chain(([cellsU, cellsV]) =>
      fc.array(cell, { minLength: cellsU * cellsV, maxLength: cellsU * cellsV }).map((cells) => ({
        cellsU,
        cellsV,
        // Off the face there is no irradiance.
        values: Float64Array.from(cells, ({ value, weight }) => (weight > 0 ? value : Number.NaN)),
        weights: Float64Array.from(cells, ({ weight }) => weight),
      })),
    );
    const power = ({ values, weights }: PlaneMap) =>
      values.reduce((sum, value, i) => (weights[i] > 0 ? sum + value * weights[i] : sum), 0);
    const area = ({ weights }: PlaneMap) => weights.reduce((a, b) => a + b, 0);
    fc.assert(
      fc.property(map, fc.integer({ min: 1, max: 6 }), (whole, factor) => {
        const joined = coarsen(whole, factor);
        expect(Math.abs(power(joined) - power(whole))).toBeLessThanOrEqual(1e-12 * power(whole) + Number.MIN_VALUE);
        expect(Math.abs(area(joined) - area(whole))).toBeLessThanOrEqual(1e-12 * area(whole));
        expect(joined.joined.reduce((a, b) => a + b, 0)).toBe(whole.cellsU * whole.cellsV);
      }),
    );
  });

  test('leaves no thin rim of left-over cells, which would be dropped as slivers', () => {
    const even = square(1, () => 1, 40);
    const { cellsU, cellsV, weights, joined } = coarsen(even, 3);
    expect([cellsU, cellsV]).toEqual([13, 13]);
    expect(Math.min(...weights)).toBe(9);
    expect(joined).toEqual(weights);
  });
});
