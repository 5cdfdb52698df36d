import { describe, expect, test } from 'vitest';
import { runFigures } from '../../src/outcome/figures.js';
import { mapField } from '../../src/outcome/map-field.js';
import type { RecordedMap } from '../../src/tallies/run-tallies.js';
import { syntheticMap } from '../helpers/synthetic-tallies.js';
import { BATCH, exitBatch, PUMP_NM, pumpEv, syntheticResult } from './synthetic-result.js';

/** 20 batches that differ a little. */
const batches = (out: number, leak: number, nm: number) =>
  Array.from({ length: 20 }, (_, i) => exitBatch(out + (i % 2 === 0 ? 1 : -1), leak, nm));
const HISTORIES = 20 * BATCH;

const figuresOf = (...result: Parameters<typeof syntheticResult>) => runFigures(syntheticResult(...result), []);

describe('light as people see it', () => {
  test.each([
    // 683.002 lm/W at the peak of V(λ), CIE 018:2019; V(450 nm) = 0.0380, V(520 nm) = 0.7100, V(600 nm) = 0.6310, CIE 15:2004 Table T.4.
    [555, 683.002],
    [520, 683.002 * 0.71],
    [450, 25.954],
    [600, 683.002 * 0.631],
  ])('each watt out at %i nm is %d lm', (nm, lumensPerWatt) => {
    const { luminousFlux, exitPower, luminousEfficacyOptical, pumpPower } = figuresOf(batches(500, 10, nm), {
      pump: { power: 60 },
    });
    expect((luminousFlux.value ?? 0) / (exitPower.value ?? 0)).toBeCloseTo(lumensPerWatt, 3);
    expect((luminousEfficacyOptical.value ?? 0) * 60).toBeCloseTo(luminousFlux.value ?? 0, 9);
    expect(pumpPower).toMatchObject({ value: 60, standardError: null });
  });

  test('a line has its own colour, without error, however much of it comes out', () => {
    const { chromaticityX, chromaticityY, dominantWavelength, meanExitWavelength } = figuresOf(batches(500, 10, 520));
    // Spectral locus at 520 nm, CIE 15:2004 (from memory).
    expect(chromaticityX.value).toBeCloseTo(0.0743, 4);
    expect(chromaticityY.value).toBeCloseTo(0.8338, 4);
    expect(dominantWavelength.value).toBeCloseTo(520, 6);
    expect(meanExitWavelength.value).toBeCloseTo(520, 9);
    for (const { standardError } of [chromaticityX, chromaticityY, dominantWavelength, meanExitWavelength]) {
      expect(standardError).toBeLessThan(1e-4);
    }
  });
});

describe('watts', () => {
  test('are the share of launched energy: a photon out at λ carries λ_pump/λ of a pump photon', () => {
    const figures = figuresOf(batches(512, 64, 600), { pump: { power: 60 } });
    expect(figures.exitPhotonFraction.value).toBeCloseTo(0.5, 12);
    expect(figures.opticalEfficiency.value).toBeCloseTo((0.5 * PUMP_NM) / 600, 12);
    expect(figures.exitPower.value).toBeCloseTo((60 * 0.5 * PUMP_NM) / 600, 10);
    expect(figures.blueLeakFraction.value).toBeCloseTo(1 / 16, 12);
    expect(figures.blueLeak.value).toBeCloseTo(60 / 16, 10);
    expect(figures.meanPumpPath.value).toBeCloseTo(2, 12);
    expect(figures.meanEmittedPath.value).toBeCloseTo(3, 12);
    // Batch counts 513 and 511 in turn: s² = Σ n_b (±1/n_b)²/(B − 1) per history.
    expect(figures.exitPhotonFraction.standardError).toBeCloseTo(Math.sqrt(20 / BATCH / 19 / HISTORIES), 9);
  });

  test('from the wall: 60 W from 40 % diodes on 90 % drivers take 166.7 W', () => {
    const result = (pump: object) => figuresOf(batches(500, 0, 555), { pump: { power: 60, ...pump } });
    const both = result({ wallPlug: 0.4, driver: 0.9 });
    expect((both.luminousFlux.value ?? 0) / (both.luminousEfficacyWallPlug.value ?? 0)).toBeCloseTo(60 / 0.36, 6);
    expect(both.luminousEfficacyWallPlug.note).toBeUndefined();
    const bare = result({ wallPlug: 0.4 });
    expect((bare.luminousFlux.value ?? 0) / (bare.luminousEfficacyWallPlug.value ?? 0)).toBeCloseTo(60 / 0.4, 6);
    expect(bare.luminousEfficacyWallPlug.note).toMatch(/driver/);
    const silent = result({});
    expect(silent.luminousEfficacyWallPlug).toMatchObject({ value: null, standardError: null });
    expect(silent.luminousEfficacyWallPlug.note).toMatch(/wall-plug.*beam/);
  });
});

describe('never sure of nothing', () => {
  // Eyes depend on the leak: that none was seen in N histories bounds it at some 1/N (3/N at 95 %, "rule of three",
  // Hanley & Lippman-Hand, JAMA 249 (1983) 1743; from memory), not at zero.
  test('no leak seen is no leak of 0 ± 0', () => {
    const { blueLeak, blueLeakFraction } = figuresOf(batches(500, 0, 520), { pump: { power: 60 } });
    expect(blueLeakFraction).toMatchObject({ value: 0, standardError: 1 / HISTORIES });
    expect(blueLeak).toMatchObject({ value: 0, standardError: 60 / HISTORIES });
  });

  test('no output seen, and all absorbed', () => {
    const nothing = Array.from({ length: 20 }, () => exitBatch(0, 0, 520));
    const figures = figuresOf(nothing, { pump: { power: 60 } });
    expect(figures.exitPhotonFraction).toMatchObject({ value: 0, standardError: 1 / HISTORIES });
    expect(figures.exitPower).toMatchObject({ value: 0, standardError: 60 / HISTORIES });
    expect(figures.luminousFlux).toMatchObject({ value: 0, standardError: (683.002 * 60) / HISTORIES });
    expect(figures.pumpAbsorbedFraction).toMatchObject({ value: 1, standardError: 1 / HISTORIES });
    expect(figures.reabsorptionsPerHistory).toMatchObject({ value: 0, standardError: 1 / HISTORIES });
  });
});

describe('figures that are not known say why', () => {
  test('every figure without a value has a note', () => {
    const dark = Array.from({ length: 20 }, () => exitBatch(0, 0, 520));
    for (const [name, figure] of Object.entries(figuresOf(dark))) {
      if (figure.value === null) expect.soft(figure.note, name).toMatch(/\w/);
    }
  });

  describe('of maps that cannot be judged', () => {
    const judged = (map: RecordedMap, out = 500) => {
      const result = syntheticResult(batches(out, 0, 520));
      return runFigures(result, [mapField(map, result.tallies, 1, pumpEv)]);
    };
    const EVENNESS = [
      'exitUniformityVariation',
      'exitUniformityMinOverMean',
      'exitFlatness',
      'exitBeamUniformity',
    ] as const;
    const dark = [0, 0, 0, 0];
    const lit = [900, 0, 0, 0];

    test.each([
      ['no light', syntheticMap('exit', [2, 2], [dark, dark]), 1, /no light on whole cells/],
      ['no area', syntheticMap('exit', [2, 2], [lit, lit], dark), 500, /no map of the exit/],
      ['light on slivers only', syntheticMap('exit', [2, 2], [lit, lit], [0.1, 1, 1, 1]), 500, /whole cells/],
    ] as const)('exit with %s', (_, map, out, why) => {
      const figures = judged(map, out);
      for (const name of EVENNESS) {
        expect.soft(figures[name], name).toMatchObject({ value: null, standardError: null });
        expect.soft(figures[name].note, name).toMatch(why);
      }
    });

    test('nothing out at all is said to be so, map or none', () => {
      const result = syntheticResult(Array.from({ length: 20 }, () => exitBatch(0, 0, 520)));
      const map = syntheticMap('exit', [2, 2], [dark, dark]);
      for (const fields of [[], [mapField(map, result.tallies, 1, pumpEv)]]) {
        const figures = runFigures(result, fields);
        for (const name of [...EVENNESS, 'chromaticityX', 'dominantWavelength', 'meanExitWavelength'] as const) {
          expect.soft(figures[name], name).toMatchObject({ value: null, note: 'no light left by the exit' });
        }
      }
    });

    test('a half without light on whole cells leaves the noise in, and no variation', () => {
      const sliver = syntheticMap('exit', [2, 2], [[9, 9, 9, 9], lit], [0.1, 1, 1, 1]);
      const figures = judged(sliver);
      expect(figures.exitUniformityVariation).toMatchObject({ value: null, note: expect.stringMatching(/too few/) });
      expect(figures.exitUniformityMinOverMean.value).toBeCloseTo(1, 12);
    });

    test.each([
      ['no area', [lit, lit], dark, /no voxel/],
      ['no light', [dark, dark], [1, 1, 1, 1], /no pump light/],
      // Each half chooses a voxel in which the other saw nothing.
      [
        'one photon in either half',
        [
          [2.7, 0, 0, 0],
          [0, 2.7, 0, 0],
        ],
        [1, 1, 1, 1],
        /too few photons/,
      ],
    ] as const)('voxels with %s', (_, halves, measure, why) => {
      const figures = judged(syntheticMap('absorbed-pump', [2, 2, 1], halves, measure));
      for (const { value, standardError, note } of [figures.peakAbsorbedPowerDensity, figures.timeToBoiling]) {
        expect.soft([value, standardError]).toEqual([null, null]);
        expect.soft(note).toMatch(why);
      }
    });
  });

  test('purple has no dominant wavelength', () => {
    const blue = exitBatch(500, 0, 440);
    const red = exitBatch(500, 0, 650);
    const mixed = Array.from({ length: 20 }, (_, i) => (i % 2 === 0 ? blue : red));
    const { dominantWavelength, chromaticityX } = figuresOf(mixed);
    expect(chromaticityX.value).toBeGreaterThan(0);
    expect(dominantWavelength.value).toBeNull();
    expect(dominantWavelength.note).toMatch(/purple/);
  });

  test('a dominant wavelength so near to white that a step away has none: no error, and why', () => {
    // X short of equal-energy white by 1e-5: greenish blue; the step of the propagation lands on white.
    const figures = { ...exitBatch(500, 0, 520).figures, exitX: 1 - 1e-5, exitY: 1, exitZ: 1 };
    const near = { ...exitBatch(500, 0, 520), figures };
    const { dominantWavelength } = figuresOf(Array.from({ length: 20 }, () => near));
    expect(dominantWavelength.value).toBeGreaterThan(480);
    expect(dominantWavelength).toMatchObject({ standardError: null, note: expect.stringMatching(/too near to white/) });
  });

  test('one group of histories: values, and a note in place of each error', () => {
    const figures = figuresOf([exitBatch(500, 10, 520)]);
    for (const name of [
      'exitPhotonFraction',
      'exitPower',
      'luminousFlux',
      'chromaticityX',
      'meanEmittedPath',
    ] as const) {
      expect.soft(figures[name].value, name).toBeGreaterThan(0);
      expect.soft(figures[name].standardError, name).toBeNull();
      expect.soft(figures[name].note, name).toMatch(/too few histories/);
    }
    expect(figures.pumpPower.note).toBeUndefined();
  });
});
