import { describe, expect, test } from 'vitest';
import { mapField } from '../../src/outcome/map-field.js';
import { peakDensity, timeToBoiling } from '../../src/outcome/peak-density.js';
import { BATCH_HISTORIES } from '../../src/tallies/run-tallies.js';
import { beam, describeDesign, medium, part, plainDye } from '../helpers/describe.js';
import { poisson, sampleOf, seeded } from '../helpers/random-laws.js';
import { slot, syntheticMap, syntheticTallies } from '../helpers/synthetic-tallies.js';

const BATCHES = 40;
const LAUNCHED = BATCHES * BATCH_HISTORIES;
const batch = { histories: BATCH_HISTORIES, photons: [] };
const TALLIES = syntheticTallies([], new Array(BATCHES).fill(batch));

/** A 10 × 10 × 10 map of 1 mm³ voxels that hold Poisson counts of photons of 1 eV; 1 W launched. */
function field(mean: (voxel: number) => number, source: () => number) {
  const half = () => Array.from({ length: 1000 }, (_, i) => poisson(mean(i) / 2, source));
  return mapField(syntheticMap('absorbed-pump', [10, 10, 10], [half(), half()]), TALLIES, 1, 1);
}
/** W/cm³ of a voxel with so many photons. */
const density = (photons: number) => (photons / LAUNCHED) * 1000;

describe('peak density', () => {
  test('of an even liquid is its density, not that of the luckiest voxel (seed peak-density-1)', () => {
    const source = seeded('peak-density-1');
    const fields = Array.from({ length: 200 }, () => field(() => 50, source));
    const { mean, error } = sampleOf(fields.map((one) => peakDensity(one).value));
    expect(Math.abs(mean - density(50))).toBeLessThan(4 * error);
    // The luckiest voxel of 1000 would read more than a third too high (expected maximum of normal variables: 3.24 deviations).
    expect(sampleOf(fields.map(({ values }) => Math.max(...values))).mean).toBeGreaterThan(1.33 * density(50));
  });

  test('of one hot voxel, with the error of its counts (seed peak-density-2)', () => {
    const source = seeded('peak-density-2');
    const peaks = Array.from({ length: 200 }, () => peakDensity(field((i) => (i === 555 ? 400 : 50), source)));
    const { mean, deviation, error } = sampleOf(peaks.map(({ value }) => value));
    expect(Math.abs(mean - density(400))).toBeLessThan(4 * error);
    expect(Math.abs(deviation / (density(400) / 20) - 1)).toBeLessThan(4 / Math.sqrt(400));
    const stated = sampleOf(peaks.map(({ standardError }) => standardError ?? Number.NaN)).mean;
    expect(Math.abs(stated / (density(400) / 20) - 1)).toBeLessThan(0.02);
  });

  test('of a voxel the other half saw nothing in: not 0 ± 0 but ± one photon', () => {
    // Nine photons in the even half choose voxel 0, where the odd half has none; three odd ones choose voxel 1, likewise.
    const halves = [Float64Array.of(9, 0), Float64Array.of(0, 3)] as const;
    const { value, standardError, note } = peakDensity(
      mapField(syntheticMap('absorbed-pump', [2, 1, 1], halves), TALLIES, 1, 1),
    );
    expect(value).toBe(0);
    // One photon of a half is density(2); both halves' errors, averaged.
    expect(standardError).toBeCloseTo((density(2) * Math.SQRT2) / 2, 12);
    expect(note).toMatch(/photons/);
  });

  test('says so when voxels hold few photons, or when there is only one half (seed peak-density-3)', () => {
    const source = seeded('peak-density-3');
    expect(peakDensity(field(() => 20, source)).note).toMatch(/photons/);
    expect(peakDensity(field((i) => (i === 0 ? 4000 : 20), source)).note).toBeUndefined();
    const short = syntheticTallies([], [batch]);
    const lone = mapField(syntheticMap('absorbed-pump', [1, 1, 1], [[9], [0]]), short, 1, 1);
    const { value, standardError, note } = peakDensity(lone);
    expect(value).toBeCloseTo((9 / BATCH_HISTORIES) * 1000, 12);
    expect(standardError).toBeCloseTo(value / 3, 12);
    expect(note).toMatch(/too few histories/);
  });
});

describe('time to boiling of still liquid', () => {
  // ρ, c and boiling point at 25 °C from reference equations: water, Wagner & Pruss 2002; ethanol, Schroeder et al. 2014.
  const water = { densityKgPerM3: 997.048, specificHeatJPerKgK: 4181.3, boilingPointC: 99.97 };
  const ethanol = { densityKgPerM3: 785.133, specificHeatJPerKgK: 2434.5, boilingPointC: 78.42 };
  type Liquid = typeof water;

  const design = (liquid: Liquid | null) => {
    const thermal = liquid && { ...liquid, conductivityWPerMK: 1, temperatureC: 25, source: 'test' };
    const bath = { ...medium('bath', 1.33, { dyes: [plainDye(1, 0.5, 520)] }), thermal };
    return describeDesign({
      media: [bath],
      parts: [part('cell', { kind: 'box', size: [1, 1, 1] }, 'bath')],
      pumps: [beam([0, 0, -5], [0, 0, 1])],
      exit: 'cell.top',
    });
  };
  const SLOTS = [
    slot('left-by-exit', 'emitted', 'cell.top'),
    slot('lost-in-dye', 'pump', 'cell', 'dye'),
    slot('stokes-heat', 'pump', 'cell', 'dye'),
    slot('absorbed-by-solvent', 'emitted', 'cell', 'water'),
    slot('absorbed-by-finish', 'emitted', 'cell.back', 'mirror'),
  ];
  /** Of 100 eV absorbed, `heat` eV stay in the liquid, 2 eV in a mirror and the rest leaves. */
  const tallies = (heat: number) =>
    syntheticTallies(SLOTS, [
      { histories: 100, photons: [0, 0, 0, 0, 0], energy: [98 - heat, heat / 2, heat / 4, heat / 4, 2] },
    ]);

  test.each([
    // Rates q/(ρ c) at 5 W/cm³, Carslaw & Jaeger's adiabatic case: 1.1993 K/s and 2.6159 K/s.
    ['water', water, (99.97 - 25) / 1.1993],
    ['ethanol', ethanol, (78.42 - 25) / 2.6159],
  ] as const)('%s at 5 W/cm³, all of it heat', (_, liquid, seconds) => {
    const { value, standardError } = timeToBoiling({ value: 5, standardError: 0.1 }, design(liquid), tallies(98), 98);
    expect(Math.abs((value ?? 0) / seconds - 1)).toBeLessThan(1e-4);
    expect(standardError).toBeCloseTo((value ?? 0) * 0.02, 9);
  });

  test('counts what stays in the liquid, not what leaves or heats a mirror', () => {
    const all = timeToBoiling({ value: 5, standardError: null }, design(water), tallies(98), 98).value ?? 0;
    const some = timeToBoiling({ value: 5, standardError: null }, design(water), tallies(24.5), 98);
    expect(some.value).toBeCloseTo(4 * all, 9);
    expect(some.note).toContain('25.0 % of absorbed pump power is heat');
  });

  test('light that heats a clear jacket does not heat the dyed liquid', () => {
    const jacket = [...SLOTS, slot('absorbed-by-solvent', 'pump', 'jacket', 'water')];
    const run = syntheticTallies(jacket, [
      { histories: 100, photons: [0, 0, 0, 0, 0, 0], energy: [0, 49, 24.5, 24.5, 2, 500] },
    ]);
    const alone = timeToBoiling({ value: 5, standardError: null }, design(water), tallies(98), 98);
    expect(timeToBoiling({ value: 5, standardError: null }, design(water), run, 98)).toEqual(alone);
  });

  test('of two dyed liquids, the one that boils sooner', () => {
    const one = design(water);
    const other = design(ethanol);
    const spirit = [...other.media.values()].find(({ dyes }) => dyes.length > 0);
    if (spirit === undefined) throw new Error('no dyed liquid');
    const both = {
      ...one,
      media: new Map([...one.media, ['spirit', { ...spirit, name: 'spirit', base: 'spirit' }]]),
      parts: [...one.parts, part('core', { kind: 'box', size: [0.5, 0.5, 0.5] }, 'spirit')],
    };
    const { value, note } = timeToBoiling({ value: 5, standardError: null }, both, tallies(98), 98);
    expect(Math.abs((value ?? 0) / ((78.42 - 25) / 2.6159) - 1)).toBeLessThan(1e-4);
    expect(note).toMatch(/^spirit at rest/);
  });

  test('unknown without heat data or heat', () => {
    expect(timeToBoiling({ value: 5, standardError: 0 }, design(null), tallies(50), 98).value).toBeNull();
    expect(timeToBoiling({ value: 5, standardError: 0 }, design(water), tallies(0), 98).value).toBeNull();
    expect(timeToBoiling({ value: 0, standardError: null }, design(water), tallies(50), 98).value).toBeNull();
  });
});
