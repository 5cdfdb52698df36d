import { describe, expect, test } from 'vitest';
import { mapField, soundCells } from '../../src/outcome/map-field.js';
import { BATCH_HISTORIES } from '../../src/tallies/run-tallies.js';
import { halfHistories } from '../../src/trace/half-histories.js';
import { syntheticMap, syntheticTallies } from '../helpers/synthetic-tallies.js';

/** Batches of a run of so many histories, of 2.5 eV each. */
function tallies(histories: number) {
  const batches = Array.from({ length: Math.ceil(histories / BATCH_HISTORIES) }, (_, b) => {
    const n = Math.min(BATCH_HISTORIES, histories - b * BATCH_HISTORIES);
    return { histories: n, photons: [], figures: { launchedEnergy: 2.5 * n } };
  });
  return syntheticTallies([], batches);
}

describe('halves', () => {
  test.each([1, 1023, 1024, 1025, 2048, 3000, 3072, 5000])(
    'of %i histories are those of even and odd batches',
    (histories) => {
      const counted = [0, 0];
      for (let i = 0; i < histories; i++) counted[Math.floor(i / BATCH_HISTORIES) % 2]++;
      expect(halfHistories(histories)).toEqual(counted);
    },
  );
});

describe('a map in watts', () => {
  const histories = 3 * BATCH_HISTORIES;

  test('irradiance: 1 mm² that takes a tenth of 20 W has 200 W/cm²', () => {
    const launched = 2.5 * histories;
    const map = syntheticMap(
      'exit',
      [2, 1],
      [
        [launched / 15, 0],
        [launched / 30, 0],
      ],
    );
    const field = mapField(map, tallies(histories), 20, 2.5);
    expect(field.unit).toBe('W/cm²');
    expect(field.power).toBeCloseTo(2, 12);
    expect(field.values[0]).toBeCloseTo(200, 10);
    // Two of three batches are even, and got two thirds of the light: both halves read the same irradiance.
    expect(field.halves[0]?.[0]).toBeCloseTo(200, 10);
    expect(field.halves[1]?.[0]).toBeCloseTo(200, 10);
  });

  test('density: 1 mm³ that takes 2 W has 2000 W/cm³; half a voxel of liquid twice as much', () => {
    const two = (2.5 * histories) / 10;
    const map = syntheticMap('absorbed-pump', [3, 1, 1], [[two, two, 0], new Float64Array(3)], [1, 0.5, 0]);
    const field = mapField(map, tallies(histories), 20, 2.5);
    expect(field.unit).toBe('W/cm³');
    expect(field.values[0]).toBeCloseTo(2000, 9);
    expect(field.values[1]).toBeCloseTo(4000, 9);
    expect(field.values[2]).toBeNaN();
  });

  test('one batch has no odd half', () => {
    const field = mapField(syntheticMap('exit', [1, 1], [[1], [0]]), tallies(100), 1, 2.5);
    expect(field.halves[1]).toBeNull();
  });

  test('cells less than half on the face are no sound ones; a map may have a million cells', () => {
    const cells = 1_000_000;
    const measure = new Float64Array(cells).fill(1);
    measure[0] = 0.4;
    measure[1] = 0.5;
    measure[2] = 0;
    const none = new Float64Array(cells);
    const field = mapField(syntheticMap('exit', [1000, 1000], [none, none], measure), tallies(100), 1, 2.5);
    const sound = soundCells(field);
    expect(sound.length).toBe(cells - 2);
    expect(sound[0]).toBe(1);
  });
});
