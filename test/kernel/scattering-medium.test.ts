/** Light in media that scatter. */
import { describe, expect, test } from 'vitest';
import type { ScattererDescription } from '../../src/design/description.js';
import { beadScattering } from '../../src/optics/bead-scattering.js';
import { beads, beam, describeDesign, haze, medium, part, plainDye } from '../helpers/describe.js';
import { figure, share, traceHere } from '../helpers/trace.js';

const INDEX = 1.4;
const NM = 450;
const HISTORIES = 8192;

/** A box of a turbid medium in a clear one of the same index. */
function block(scatterers: readonly ScattererDescription[], absorption: number, size = 100) {
  const design = describeDesign({
    media: [medium('turbid', INDEX, { absorption, scatterers }), medium('matched', INDEX)],
    parts: [part('block', { kind: 'box', size: [size, size, size] }, 'turbid')],
    pumps: [beam([0, 0, 0], [0, 0, 1])],
    surroundings: 'matched',
    exit: 'block.top',
  });
  return { ...design, defaults: { ...design.defaults, voxels: [1, 1, 1000] as const } };
}

/** Mean of z where light was absorbed and its standard error, mm. */
async function meanDepth(scatterers: readonly ScattererDescription[], absorption: number, seed: string) {
  const { tallies } = await traceHere(block(scatterers, absorption), HISTORIES, seed);
  const map = tallies.maps.find(({ what }) => what === 'absorbed-pump');
  if (map === undefined) throw new Error('no map of absorbed light');
  let sum = 0;
  let first = 0;
  let second = 0;
  for (let i = 0; i < 1000; i++) {
    const z = (i + 0.5) / 10 - 50;
    const energy = map.energy[0][i] + map.energy[1][i];
    sum += energy;
    first += energy * z;
    second += energy * z * z;
  }
  const mean = first / sum;
  return { mean, error: Math.sqrt((second / sum - mean ** 2) / HISTORIES) };
}

describe('mean depth of absorption in an endless medium is 1/(µa + µs(1 − g)), the transport mean free path; seed depth', () => {
  test.each([-0.6, 0, 1e-7, 0.5, 0.9])('Henyey and Greenstein, g = %f', async (g) => {
    const { mean, error } = await meanDepth([haze(0.8, g)], 0.2, 'depth');
    expect(Math.abs(mean - 1 / (0.2 + 0.8 * (1 - g)))).toBeLessThan(4 * error + 1e-3);
  });

  test.each([
    [0.0001, 1.59],
    [0.001, 1.59],
    [0.004, 1.45],
  ])('beads of radius %f mm and index %f', async (radius, n) => {
    const { scattering, anisotropy } = beadScattering(radius, n, 0, INDEX, NM);
    const volume = (4 / 3) * Math.PI * radius ** 3;
    const { mean, error } = await meanDepth([beads(radius, n, (0.8 / scattering) * volume)], 0.2, 'depth');
    expect(Math.abs(mean - 1 / (0.2 + 0.8 * (1 - anisotropy)))).toBeLessThan(4 * error + 1e-3);
  });

  test('two scatterers add up', async () => {
    const { mean, error } = await meanDepth([haze(0.3, 0.9), haze(0.5, -0.4)], 0.2, 'depth');
    expect(Math.abs(mean - 1 / (0.2 + 0.3 * 0.1 + 0.5 * 1.4))).toBeLessThan(4 * error + 1e-3);
  });
});

test('scattering takes nothing, and counts as no absorption; seed 1', async () => {
  const run = await traceHere(block([haze(5, 0.3)], 0, 1), 4096);
  expect(share(run, { fate: 'left-elsewhere' }) + share(run, { fate: 'left-by-exit' })).toBe(1);
  const map = run.tallies.maps.find(({ what }) => what === 'absorbed-pump');
  expect(map?.energy[0].every((value) => value === 0)).toBe(true);
  expect(figure(run, 'dyeAbsorptions')).toBe(0);
});

test('paths in a sphere that scatters, lit from everywhere, are 4/3 radius on average whatever scatters (Bardsley & Dubi 1981; Blanco & Fournier 2003); seed chord', async () => {
  for (const scatterers of [[], [haze(2, 0.8)], [beads(0.0008, 1.6, 1e-3)]]) {
    const design = describeDesign({
      media: [medium('turbid', INDEX, { scatterers }), medium('matched', INDEX)],
      parts: [part('ball', { kind: 'sphere', radius: 1.5 }, 'turbid')],
      pumps: [
        beam([0, 0, 1.5 - 1e-7], [0, 0, -1], { beam: { kind: 'lambertian', outline: { kind: 'disc', radius: 1e-6 } } }),
      ],
      surroundings: 'matched',
      exit: 'ball.surface',
    });
    const run = await traceHere(design, HISTORIES, 'chord');
    // Paths scatter about as widely as they are long.
    expect(Math.abs(figure(run, 'pumpPath') / 2 - 1)).toBeLessThan((4 * 1.5) / Math.sqrt(HISTORIES));
  }
});

test('dye, absorbing solvent and scatterers share the light by their coefficients; seed 1', async () => {
  const dye = { ...plainDye(0.3, 0, 520) };
  const design = block([haze(0.5, 0.2)], 0.2);
  const turbid = medium('turbid', INDEX, { absorption: 0.2, scatterers: [haze(0.5, 0.2)], dyes: [dye] });
  const run = await traceHere({ ...design, media: new Map([...design.media, ['turbid', turbid]]) }, HISTORIES);
  const lost = share(run, { fate: 'lost-in-dye', light: 'pump' });
  expect(Math.abs(lost - 0.6)).toBeLessThan(4 * Math.sqrt((0.6 * 0.4) / HISTORIES));
  expect(share(run, { fate: 'absorbed-by-solvent', light: 'pump' })).toBeCloseTo(1 - lost, 12);
});

test('beads that absorb are booked with what they are in; seed 1', async () => {
  const radius = 0.0005;
  const bead = beadScattering(radius, 1.6, 0.05, INDEX, NM);
  const run = await traceHere(block([beads(radius, 1.6, 1e-3, 0.05)], 0), 4096);
  expect(share(run, { fate: 'absorbed-by-solvent', light: 'pump' })).toBeCloseTo(1, 3);
  expect(bead.absorption).toBeGreaterThan(0);
});

test('scattered light that nothing can end is trapped', async () => {
  const design = describeDesign({
    media: [medium('turbid', INDEX, { scatterers: [haze(1, 0)] })],
    finishes: [{ name: 'perfect', path: [], kind: 'mirror', reflectance: 1 }],
    parts: [part('block', { kind: 'cylinder', radius: 2, height: 4 }, 'turbid', { faces: { '*': 'perfect' } })],
    pumps: [beam([0, 0, 0], [0, 0, 1])],
    detectors: [
      {
        name: 'far',
        path: [],
        pixels: null,
        target: { kind: 'plane', at: [0, 0, 50], normal: [0, 0, 1], outline: { kind: 'disc', radius: 5 } },
      },
    ],
    exit: 'far',
  });
  const run = await traceHere(design, 1);
  expect(share(run, { fate: 'trapped', where: 'block' })).toBe(1);
});
