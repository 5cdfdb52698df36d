/** Spheres in the open as detectors and as exit. */
import { describe, expect, test } from 'vitest';
import type { DetectorTarget, Vector2 } from '../../src/design/description.js';
import { beam, describeDesign, medium, part, plainDye } from '../helpers/describe.js';
import { binomialError, share, traceHere } from '../helpers/trace.js';

const sphere = (radius: number, polar: Vector2 = [0, Math.PI]): DetectorTarget => ({
  kind: 'sphere',
  centre: [0, 0, 0],
  radius,
  axis: [0, 0, 2],
  polar,
});
const HISTORIES = 8192;

function design(exit: string, detectors: readonly { name: string; target: DetectorTarget }[]) {
  return describeDesign({
    media: [medium('bath', 1.36, { dyes: [plainDye(2, 1, 540)] })],
    parts: [part('cell', { kind: 'box', size: [2, 2, 2] }, 'bath', { faces: { bottom: 'black' } })],
    pumps: [beam([0, -9, 0], [0, 1, 0])],
    detectors: detectors.map((one) => ({ ...one, path: ['detectors', one.name], pixels: null })),
    exit,
  });
}

const mapPower = (result: Awaited<ReturnType<typeof traceHere>>, where: string): number => {
  const map = result.tallies.maps.find((one) => one.where === where);
  return (map?.energy ?? []).reduce((sum, half) => sum + half.reduce((a, b) => a + b, 0), 0);
};

describe('a sphere as exit, seed 1', () => {
  test('takes all light that leaves, pump and emitted, and what it watches is not changed by it', async () => {
    const free = await traceHere(design('cell.top', []), HISTORIES);
    const all = await traceHere(design('ball', [{ name: 'ball', target: sphere(8) }]), HISTORIES);
    expect(share(all, { fate: 'left-elsewhere' })).toBe(0);
    const out =
      share(free, { fate: 'left-by-exit', light: 'emitted' }) +
      share(free, { fate: 'left-elsewhere', light: 'emitted' });
    const seen = share(all, { fate: 'left-by-exit', light: 'emitted' });
    expect(Math.abs(seen - out)).toBeLessThan(4 * Math.SQRT2 * binomialError(out, HISTORIES));
  });

  test('of a part of it, the rest lets light go, and two parts make the whole', async () => {
    const halves = await traceHere(
      design('upper', [
        { name: 'upper', target: sphere(8, [0, Math.PI / 2]) },
        { name: 'lower', target: sphere(8, [Math.PI / 2, Math.PI]) },
        { name: 'far', target: sphere(30) },
      ]),
      HISTORIES,
    );
    const up = share(halves, { fate: 'left-by-exit', light: 'emitted' });
    const elsewhere = share(halves, { fate: 'left-elsewhere', light: 'emitted' });
    expect(up).toBeGreaterThan(elsewhere);
    expect(elsewhere).toBeGreaterThan(0.05);
    // What the exit lets pass crosses the lower half and, further out, the far sphere.
    expect(mapPower(halves, 'lower')).toBeGreaterThan(0);
    expect(mapPower(halves, 'far') / mapPower(halves, 'lower')).toBeCloseTo(1, 9);
  });
});

test('light that goes inward is not recorded: a pump from outside leaves its mark only where it leaves, seed 1', async () => {
  const clear = describeDesign({
    media: [medium('glass', 1)],
    parts: [part('cell', { kind: 'box', size: [1, 1, 1] }, 'glass')],
    pumps: [beam([0, -9, 0], [0, 1, 0])],
    detectors: [{ name: 'ball', path: [], target: sphere(5), pixels: [4, 2] }],
    exit: 'cell.top',
  });
  const { tallies } = await traceHere(clear, 1024);
  const angles = tallies.angles.find(({ where }) => where === 'ball');
  const launched = tallies.moments.histories;
  const photonEv = (angles?.energy ?? new Float64Array()).reduce((a, b) => a + b, 0) / launched;
  expect(photonEv).toBeCloseTo(1239.84198 / 450, 5);
});

test('a sphere on the very surface of a ball stands just outside of it: light has left the ball first, seed 1', async () => {
  const ball = describeDesign({
    media: [medium('bath', 1.4, { dyes: [plainDye(2, 1, 540)] })],
    parts: [part('ball', { kind: 'sphere', radius: 3 }, 'bath')],
    pumps: [beam([0, -9, 0], [0, 1, 0])],
    detectors: [{ name: 'skin', path: [], target: sphere(3), pixels: null }],
    exit: 'skin',
  });
  const result = await traceHere(ball, 4096);
  expect(share(result, { fate: 'left-elsewhere' })).toBe(0);
  expect(share(result, { fate: 'left-by-exit', light: 'emitted' })).toBeGreaterThan(0.5);
});
