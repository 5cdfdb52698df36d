/**
 * Nothing traced is brighter than thermodynamics allows (E. Yablonovitch, J. Opt. Soc. Am. 70 1362 (1980), from memory): shipped designs,
 * random cells, and a cell built to come as near to the bound as it can.
 */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Description, DissolvedDye, PumpSpectrum } from '../../src/design/description.js';
import { readDesign } from '../../src/design/read-design.js';
import { ErrorBars } from '../../src/outcome/error-bars.js';
import { runFigures } from '../../src/outcome/figures.js';
import { hasMeasure, mapField } from '../../src/outcome/map-field.js';
import type { TraceResult } from '../../src/trace/trace-result.js';
import { FOLDER, shippedNames } from '../geometries/shipped.js';
import { beam, describeDesign, finish, medium, part } from '../helpers/describe.js';
import { traceHere } from '../helpers/trace.js';
import '../helpers/fixed-seeds.js';

function figuresOf(result: TraceResult) {
  const watts = result.description.pumps.reduce((sum, { power }) => sum + power, 0);
  const launched = new ErrorBars(result.tallies).mean('launchedEnergy');
  const fields = result.tallies.maps.map((map) => mapField(map, result.tallies, watts, launched)).filter(hasMeasure);
  return runFigures(result, fields);
}

/** Sharp lines and parallel beams have no finite bound: pumps get the least width that diodes have. */
function widened(description: Description): Description {
  return {
    ...description,
    pumps: description.pumps.map((pump) => {
      const { beam } = pump;
      const divergence = [0.01, 0.01] as const;
      return {
        ...pump,
        linewidthNm: pump.spectrum || pump.linewidthNm > 0 ? pump.linewidthNm : 1,
        beam:
          (beam.kind === 'patch' || beam.kind === 'diodes') && !beam.farField && beam.divergence.includes(0)
            ? { ...beam, divergence }
            : beam,
      };
    }),
  };
}

describe('shipped designs stay below the bound', () => {
  test.each(shippedNames())('%s, seed 1', async (name) => {
    const reading = await readDesign(`${FOLDER}/${name}.yaml`);
    if (!reading.ok) throw new Error('faulty design');
    const { brightnessBoundShare: share, brightnessRatio: ratio } = figuresOf(
      await traceHere(widened(reading.description), 2048),
    );
    expect(share.value).toBeGreaterThan(0);
    expect((share.value ?? Number.NaN) - 4 * (share.standardError ?? 0)).toBeLessThan(1);
    expect(ratio.note).toMatch(/photons .* not power/);
  });
});

const PUMP_FROM = 447.9;
const PUMP_TO = 452.1;
const HC_OVER_KT = 48_256.8; // nm: hc/(kT) at 298.15 K, CODATA h, c, k

/** Photons per nm that a dye in thermal balance emits: absorption · λ⁻⁴ · exp(−hc/λkT) (Kennard 1918, Stepanov 1957; from memory). */
function thermalDye(peakNm: number, widthNm: number, strength: number): DissolvedDye {
  // Nothing beyond the blue end of the pump, where light would only be lost by the front.
  const absorption = (nm: number) => (nm < PUMP_FROM ? 0 : strength * Math.exp(-(((nm - peakNm) / widthNm) ** 2) / 2));
  return {
    name: 'dye',
    concentration: null,
    absorption,
    quantumYield: 1,
    emission: {
      kind: 'spectrum',
      photonsPerNm: (nm) => absorption(nm) * (peakNm / nm) ** 4 * Math.exp(HC_OVER_KT * (1 / peakNm - 1 / nm)),
      fromNm: peakNm - 5 * widthNm,
      toNm: peakNm + 8 * widthNm,
    },
    lifetimeNs: null,
  };
}

/**
 * A box of perfect mirrors, its front let in only what the pump has and let out the same, a small hole in its lid. Index 1 everywhere,
 * so that light in it is only held by mirrors. The pump fills all directions of the front.
 */
function cavity(dye: DissolvedDye, options: { hole?: number; side?: number } = {}): Description {
  const { hole = 0.15, side = 2 } = options;
  const spectrum: PumpSpectrum = { photonsPerNm: () => 1, fromNm: PUMP_FROM, toNm: PUMP_TO, meanNm: 450 };
  const mirrors = { 'body.left': 'perfect', 'body.right': 'perfect', 'body.back': 'perfect', 'body.bottom': 'perfect' };
  const path = ['parts', 'cell'];
  const box = (name: string, size: readonly [number, number, number], z: number) => ({
    name,
    path,
    shape: { kind: 'box' as const, size },
    at: [0, 0, z] as const,
    turns: [],
    minus: [],
  });
  const faces = {
    ...mirrors,
    'body.top': 'perfect',
    'body.front': 'gate',
    'neck.left': 'perfect',
    'neck.right': 'perfect',
    'neck.front': 'perfect',
    'neck.back': 'perfect',
  };
  const neck = 0.02;
  return describeDesign({
    media: [medium('bath', 1, { dyes: [dye] })],
    finishes: [
      finish('perfect', { kind: 'mirror', reflectance: 1 }),
      finish('gate', {
        kind: 'dichroic',
        edgeNm: PUMP_TO,
        widthNm: 0,
        passes: 'below',
        transmits: 1,
        reflects: 1,
        absorbs: 0,
      }),
    ],
    parts: [
      {
        name: 'cell',
        path,
        medium: 'bath',
        pieces: [box('body', [side, side, side], 0), box('neck', [hole, hole, neck], side / 2 + neck / 2)],
        placement: { at: [0, 0, 0], turns: [], against: null },
        faces: Object.entries(faces).map(([face, name]) => ({ face, finish: name, path })),
      },
    ],
    pumps: [
      beam([0, -side / 2 - 1e-6, 0], [0, 1, 0], {
        spectrum,
        beam: { kind: 'lambertian', outline: { kind: 'rectangle', size: [side, side] } },
      }),
    ],
    exit: 'cell.neck.top',
  });
}

test('a cavity whose dye obeys Kennard and Stepanov comes near the bound and not above it, seed 1', async () => {
  const { brightnessBoundShare: share, exitPhotonFraction } = figuresOf(
    await traceHere(cavity(thermalDye(450, 4, 20)), 8000),
  );
  expect((share.value ?? Number.NaN) - 4 * (share.standardError ?? 0)).toBeLessThan(1);
  // What does not leave by the hole leaves by the front, where it would be the pump's own light in balance: about 1 − the exit's part.
  expect(share.value).toBeGreaterThan(0.6);
  expect((share.value ?? 0) - 4 * (share.standardError ?? 0)).toBeLessThan(1 - (exitPhotonFraction.value ?? 1));
}, 60_000);

test('a dye that emits where it does not absorb, just beside where it does, is told to be none, seed 1', async () => {
  const unreal: DissolvedDye = {
    ...thermalDye(450, 4, 20),
    absorption: (nm) => (nm < PUMP_TO ? 20 : 0),
    emission: { kind: 'line', wavelengthNm: 453 },
  };
  const { brightnessBoundShare: share } = figuresOf(await traceHere(cavity(unreal), 2000));
  expect(share.value).toBeGreaterThan(2);
  expect(share.note).toMatch(/above the bound: no real dye/);
}, 60_000);

test('random boxes of dyes in thermal balance stay below the bound, seed 1', async () => {
  const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
  await fc.assert(
    fc.asyncProperty(
      fc.tuple(number(1, 10), number(1, 10), number(1, 10)),
      fc.record({ peak: number(450, 480), width: number(4, 25), strength: number(0.5, 10), index: number(1, 1.6) }),
      fc.record({ mirror: number(0.5, 1), linewidth: number(0.5, 8), divergence: number(0.02, 0.5) }),
      async (size, { peak, width, strength, index }, { mirror, linewidth, divergence }) => {
        const dye = thermalDye(peak, width, strength);
        const design = describeDesign({
          media: [medium('bath', index, { dyes: [dye] })],
          finishes: [finish('dull', { kind: 'mirror', reflectance: mirror })],
          parts: [
            part('cell', { kind: 'box', size }, 'bath', { faces: { left: 'dull', right: 'dull', bottom: 'dull' } }),
          ],
          pumps: [
            beam([0, -20, 0], [0, 1, 0], {
              linewidthNm: linewidth,
              beam: {
                kind: 'patch',
                outline: { kind: 'rectangle', size: [size[0] / 2, size[2] / 2] },
                divergence: [divergence, divergence],
              },
            }),
          ],
          exit: 'cell.top',
        });
        const { brightnessBoundShare: share } = figuresOf(await traceHere(design, 2048));
        if (share.value !== null) expect(share.value - 4 * (share.standardError ?? 0)).toBeLessThan(1);
      },
    ),
    { numRuns: 8 },
  );
}, 60_000);
