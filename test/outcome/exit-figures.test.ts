/** Étendue and luminance of an exit that shines after Lambert's law: π A and M/π (CIE S 017, from memory). */
import { describe, expect, test } from 'vitest';
import type { Description } from '../../src/design/description.js';
import { effectiveSize, projectedSolidAngle } from '../../src/outcome/effective-etendue.js';
import { pumpBandwidth, pumpEtendue } from '../../src/outcome/pump-brightness.js';
import { summariseRun } from '../../src/outcome/summarise-run.js';
import { beam, describeDesign, finish, medium, part, plainDye } from '../helpers/describe.js';
import { seeded } from '../helpers/random-laws.js';
import { traceHere } from '../helpers/trace.js';

const ABOUT = { version: '0', file: 'a.yaml', text: '', hash: '0', dials: {}, startedAt: new Date(0), repeat: '' };

/** A box whose lid lets everything through, spread after Lambert's law. */
function mattLid(more: Partial<Description['exit']> = {}, surroundings?: string): Description {
  const design = describeDesign({
    media: [medium('bath', 1.33, { dyes: [plainDye(1, 1, 540)] }), medium('oil', 1.5)],
    ...(surroundings === undefined ? {} : { surroundings }),
    finishes: [finish('matt', { kind: 'diffuser', reflects: 0, transmits: 1 })],
    parts: [part('cell', { kind: 'box', size: [4, 2, 1] }, 'bath', { faces: { top: 'matt' } })],
    pumps: [
      beam([0, -5, 0], [0, 1, 0], {
        beam: { kind: 'patch', outline: { kind: 'disc', radius: 0.4 }, divergence: [0, 0] },
      }),
    ],
    exit: 'cell.top',
  });
  return { ...design, exit: { ...design.exit, ...more } };
}

describe('a Lambertian exit, seed 1', () => {
  test('has étendue π A, fills it, and looks as bright along the normal as on average', async () => {
    const { record } = summariseRun(await traceHere(mattLid(), 30_000), ABOUT);
    const { exitEtendue, exitEffectiveEtendue, exitMeanLuminance, exitNormalLuminance, luminousFlux } = record.figures;
    expect(exitEtendue.value).toBeCloseTo(8 * Math.PI, 6);
    const effective = exitEffectiveEtendue;
    expect(Math.abs((effective.value ?? 0) - 8 * Math.PI)).toBeLessThan(4 * (effective.standardError ?? 0));
    expect(effective.standardError).toBeLessThan(0.03 * 8 * Math.PI);
    const expected = (luminousFlux.value ?? 0) / (Math.PI * 8e-6);
    expect(exitMeanLuminance.value).toBeCloseTo(expected, 0);
    const along = exitNormalLuminance;
    expect(Math.abs((along.value ?? 0) - expected)).toBeLessThan(4 * (along.standardError ?? 0));
    expect(along.standardError).toBeLessThan(0.1 * expected);
  });

  test('has n² times the étendue in a medium of index n, and its luminance is that of the light there', async () => {
    const { record } = summariseRun(await traceHere(mattLid({}, 'oil'), 4096), ABOUT);
    const { exitEtendue, exitMeanLuminance, luminousFlux } = record.figures;
    expect(exitEtendue.value).toBeCloseTo(8 * Math.PI * 1.5 ** 2, 6);
    expect(exitMeanLuminance.value).toBeCloseTo((luminousFlux.value ?? 0) / (Math.PI * 8e-6), 0);
  });

  test('says the effective étendue by place where radiance is recorded, and candela that hold its lumens', async () => {
    const { record, arrays } = summariseRun(await traceHere(mattLid({ radiance: [4, 2, 6, 4] }), 30_000), ABOUT);
    const { exitEffectiveEtendue: effective, luminousFlux, exitPower } = record.figures;
    // The lid is not evenly lit from a pump in its middle, so less than all of it counts.
    expect(effective.value).toBeLessThan(8 * Math.PI);
    expect(effective.value).toBeGreaterThan(0.5 * 8 * Math.PI);
    expect(effective.note).toMatch(/by place and direction/);
    const [radiance] = arrays.radiance;
    const watts = radiance.values.reduce((sum, value, cell) => {
      const row = Math.floor(cell / 4) % 6;
      return sum + value * 1e-6 * projectedSolidAngle((row * Math.PI) / 12, ((row + 1) * Math.PI) / 12, 4);
    }, 0);
    expect(watts).toBeCloseTo(exitPower.value ?? 0, 9);
    expect(record.radiance[0].mean).toBeCloseTo((exitPower.value ?? 0) / (Math.PI * 8e-6), 3);
    expect(record.angles[0].lumens / (luminousFlux.value ?? 1)).toBeCloseTo(1, 5);
  });
});

test('counting noise does not shrink an effective size: even light over 500 cells of 8 photons, seed warp', () => {
  const source = seeded('warp');
  const halves = [0, 1].map(() => {
    const half = new Float64Array(500);
    for (let i = 0; i < 4000; i++) half[Math.floor(source() * 500)]++;
    return half;
  });
  const found = effectiveSize([halves[0], halves[1]], () => 1);
  expect(Math.abs((found?.value ?? 0) - 500)).toBeLessThan(4 * (found?.standardError ?? 0));
  expect(found?.standardError).toBeLessThan(30);
  // Squares of one half alone: 1/8 a cell too much.
  const naive = halves[0].reduce((sum, n) => sum + (n / 4000) ** 2, 0);
  expect(1 / naive).toBeLessThan(460);
});

describe('étendue of pumps, closed forms', () => {
  test('a Lambertian square fills π A', () => {
    expect(pumpEtendue({ kind: 'lambertian', outline: { kind: 'rectangle', size: [2, 3] } })).toBeCloseTo(
      6 * Math.PI,
      12,
    );
  });
  test('a Gaussian beam fills π² w² θ², and (π w θ)² = λ² at the diffraction limit (w θ = λ/π; Siegman, Lasers, from memory)', () => {
    const lambda = 445e-6;
    expect(pumpEtendue({ kind: 'gaussian', radius: 0.5, halfAngle: lambda / Math.PI / 0.5 })).toBeCloseTo(
      lambda ** 2,
      15,
    );
  });
  test('a parallel beam has none, and a line no bandwidth', () => {
    expect(pumpEtendue({ kind: 'patch', outline: { kind: 'disc', radius: 1 }, divergence: [0, 0] })).toBe(0);
    expect(pumpBandwidth(beam([0, 0, 0], [0, 0, 1]))).toBe(0);
  });
  test('an even spectrum is as wide as it is', () => {
    const spectrum = { photonsPerNm: () => 3, fromNm: 440, toNm: 450, meanNm: 445 };
    expect(pumpBandwidth(beam([0, 0, 0], [0, 0, 1], { spectrum }))).toBeCloseTo(10, 9);
  });
});
