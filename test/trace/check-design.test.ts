/** What a short trial tells of a design. Expectations follow from plain geometry. */
import { describe, expect, test } from 'vitest';
import type { Description, PumpDescription, Vector3 } from '../../src/design/description.js';
import { checkDesign } from '../../src/trace/check-design.js';
import { beam, describeDesign, finish, medium, part, plainDye } from '../helpers/describe.js';

const UP: Vector3 = [0, 0, 1];

function cell(pumps: readonly PumpDescription[], more: { exit?: string; detectors?: Description['detectors'] } = {}) {
  return describeDesign({
    media: [medium('bath', 1.36, { dyes: [plainDye(0.1, 0.9, 520)] })],
    finishes: [finish('silver', { kind: 'mirror', reflectance: 0.95 })],
    parts: [
      part('cell', { kind: 'box', size: [10, 10, 10] }, 'bath'),
      part('plate', { kind: 'box', size: [10, 10, 1] }, 'bath', {
        against: { face: 'cell.top', gap: 20 },
        faces: { bottom: 'silver', left: 'silver', right: 'silver', front: 'silver', back: 'silver' },
      }),
    ],
    pumps,
    exit: more.exit ?? 'cell.top',
    detectors: more.detectors ?? [],
  });
}

const faultsOf = async (design: Description) =>
  (await checkDesign(design)).faults.map(({ code, severity, path, found }) => ({ code, severity, path, found }));

const wide = (size: number): PumpDescription['beam'] => ({
  kind: 'patch',
  outline: { kind: 'rectangle', size: [size, size] },
  divergence: [0, 0],
});

describe('a short trial of a design', () => {
  test('says nothing of pumps that all hit and an exit that is lit', async () => {
    expect(await faultsOf(cell([beam([0, 0, -20], UP), beam([2, 0, -20], UP, { name: 'second' })]))).toEqual([]);
  });

  test('refuses a pump that misses everything, though another one hits', async () => {
    const away = beam([0, 0, -20], [0, 0, -1], { name: 'away', path: ['pumps', 'away'] });
    expect(await faultsOf(cell([beam([0, 0, -20], UP), away]))).toEqual([
      {
        code: 'unreachable',
        severity: 'error',
        path: ['pumps', 'away'],
        found: 'none of 16384 trial photons of away met a part or a detector',
      },
    ]);
  });

  test('warns of a pump of which three quarters pass by the cell', async () => {
    const [fault, ...rest] = await faultsOf(cell([beam([0, 0, -20], UP, { beam: wide(20) })]));
    expect(rest).toEqual([]);
    expect(fault).toMatchObject({ code: 'caution', severity: 'warning', path: ['pumps', 'beam'] });
    expect(fault.found).toMatch(/^7[45](\.\d)? % of 2048 trial photons/);
  });

  test('lets a pump miss up to a twentieth', async () => {
    // 1 − (10/10.2)² = 3.9 % pass by.
    expect(await faultsOf(cell([beam([0, 0, -20], UP, { beam: wide(10.2) })]))).toEqual([]);
  });

  test('sees a target of a thousandth of the beam', async () => {
    const [fault] = await faultsOf(cell([beam([0, 0, -20], UP, { beam: wide(316) })]));
    expect(fault).toMatchObject({ code: 'caution', severity: 'warning' });
  });

  test('warns of an exit in the dark', async () => {
    expect(await faultsOf(cell([beam([0, 0, -20], UP)], { exit: 'plate.top' }))).toEqual([
      { code: 'unreachable', severity: 'warning', path: ['exit'], found: 'none of 2048 photons left by plate.top' },
    ]);
  });

  test('takes light on a detector in the open for a hit', async () => {
    const target = { kind: 'plane', at: [50, 0, 0], normal: UP, outline: { kind: 'disc', radius: 2 } } as const;
    const faults = await faultsOf(
      cell([beam([0, 0, -20], UP), beam([50, 0, -20], UP, { name: 'aside' })], {
        detectors: [{ name: 'open', path: [], target, pixels: null }],
      }),
    );
    expect(faults.map(({ severity }) => severity)).toEqual(['warning']);
  });

  test('tries nothing while the geometry is at fault', async () => {
    const design = cell([beam([0, 0, -20], [0, 0, -1])], { exit: 'plate.left' });
    const faults = await faultsOf(design);
    expect(faults).toHaveLength(1);
    expect(faults[0]).toMatchObject({ severity: 'error', path: ['exit'] });
  });
});
