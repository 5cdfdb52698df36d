import { describe, expect, test } from 'vitest';
import { mapEvenness } from '../../src/outcome/map-evenness.js';
import { mapField } from '../../src/outcome/map-field.js';
import { BATCH_HISTORIES } from '../../src/tallies/run-tallies.js';
import { poisson, seeded } from '../helpers/random-laws.js';
import { syntheticMap, syntheticTallies } from '../helpers/synthetic-tallies.js';

/** Photons of 1 eV, in 40 batches that launched as many. */
const TALLIES = syntheticTallies(
  [],
  Array.from({ length: 40 }, () => ({ histories: BATCH_HISTORIES, photons: [] })),
);

function evenness(
  cells: readonly [number, number],
  counts: (u: number, v: number) => number,
  measure?: readonly number[],
) {
  const half = () =>
    Array.from({ length: cells[0] * cells[1] }, (_, i) => counts(i % cells[0], Math.floor(i / cells[0])));
  return mapEvenness(mapField(syntheticMap('exit', cells, [half(), half()], measure), TALLIES, 1, 1));
}

describe('evenness of a face', () => {
  test('plenty of light: cells stay as they are, a dark corner shows', () => {
    const result = evenness([10, 10], (u, v) => (u === 0 && v === 0 ? 250 : 1000));
    expect(result?.minOverMean).toBeCloseTo(250 / 992.5, 12);
    expect(result?.flatness).toBeCloseTo(0.9925, 12);
    expect(result?.note).toContain('10 × 10 cells');
  });

  test('few photons in an even map do not read as a bad homogeniser (seed map-evenness-1)', () => {
    const source = seeded('map-evenness-1');
    const result = evenness([40, 40], () => poisson(5, source));
    // As they are, some of 1600 cells of 10 photons would hold one or two: a minimum of 0.2 and a flatness of 0.5.
    expect(result?.minOverMean).toBeGreaterThan(0.8);
    expect(result?.flatness).toBeGreaterThan(0.85);
    expect(result?.variation?.resolved).toBe(false);
    expect(result?.note).not.toContain('40 × 40');
  });

  test('a dark rim shows however cells are joined', () => {
    // 100 photons a cell: joined by 3, which does not divide 40.
    const dark = evenness([40, 40], (u) => (u === 39 ? 0 : 30));
    expect(dark?.note).not.toContain('40 × 40');
    expect(dark?.minOverMean).toBeLessThan(0.8);
  });

  test('cells mostly off the face count neither as dark nor as bright', () => {
    const measure = Array.from({ length: 100 }, (_, i) => (i % 10 === 0 ? 0.1 : 1));
    const result = evenness([10, 10], (u) => (u === 0 ? 0 : 1000), measure);
    expect(result?.minOverMean).toBeCloseTo(1, 12);
    expect(result?.variation?.value).toBe(0);
  });

  test('the flat top of a dome counts, though its steep rim has many times the area a cell', () => {
    // Hemisphere seen along its axis: area per map area 1/√(1 − r²). A dark spot round the axis.
    const at = (i: number) => (i + 0.5) / 10 - 1;
    const radius = (i: number) => Math.hypot(at(i % 20), at(Math.floor(i / 20)));
    const measure = Array.from({ length: 400 }, (_, i) => (radius(i) < 1 ? 1 / Math.sqrt(1 - radius(i) ** 2) : 0));
    const area = (u: number, v: number) => measure[u + 20 * v];
    const result = evenness([20, 20], (u, v) => (radius(u + 20 * v) < 0.3 ? 250 : 1000) * area(u, v), measure);
    expect(result?.minOverMean).toBeLessThan(0.3);
  });

  test('a face thinner than its cells is judged by what it fills of them', () => {
    const result = evenness([10, 10], (u) => (u === 0 ? 125 : 250), new Array(100).fill(0.25));
    expect(result?.minOverMean).toBeCloseTo(125 / 237.5, 12);
  });

  test('nothing to say of a face without light, or of voxels', () => {
    expect(evenness([4, 4], () => 0)).toBeNull();
    const voxels = syntheticMap('absorbed-pump', [2, 2, 2], [new Float64Array(8).fill(1), new Float64Array(8).fill(1)]);
    expect(mapEvenness(mapField(voxels, TALLIES, 1, 1))).toBeNull();
  });

  test('a map of a million cells is no trouble', () => {
    expect(evenness([1000, 1000], () => 1)?.minOverMean).toBeCloseTo(1, 9);
  });
});
