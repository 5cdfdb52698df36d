import { describe, expect, test } from 'vitest';
import type { Description } from '../../src/design/description.js';
import { checkScene } from '../../src/scene/check-scene.js';
import { beam, describeDesign, medium, part, plainDye } from '../helpers/describe.js';

/** A 10 mm cube whose default voxels are 10/24 mm. */
function cube(
  perMm: number,
  more: { strength?: number; voxels?: readonly [number, number, number]; radius?: number },
): Description {
  const design = describeDesign({
    media: [medium('bath', 1.36, { dyes: [{ ...plainDye(perMm, 0.9, 520), concentration: more.strength ?? null }] })],
    parts: [part('cell', { kind: 'box', size: [10, 10, 10] }, 'bath')],
    pumps: [
      beam(
        [0, 0, 20],
        [0, 0, -1],
        more.radius === undefined ? {} : { beam: { kind: 'gaussian', radius: more.radius, halfAngle: 0 } },
      ),
    ],
    exit: 'cell.left',
  });
  return { ...design, defaults: { ...design.defaults, voxels: more.voxels ?? null } };
}

const cautions = (design: Description) =>
  checkScene(design)
    .faults.map(({ problem }) => problem)
    .join('\n');

describe('what cannot be believed is said', () => {
  test('voxels of 0.42 mm blur a 1/e depth of 0.5 mm, not one of 1 mm', () => {
    expect(cautions(cube(2, {}))).toContain('voxels are too coarse');
    expect(cautions(cube(1, {}))).not.toContain('voxels');
    expect(cautions(cube(2, { voxels: [10, 10, 50] }))).not.toContain('voxels');
  });

  test('and a Gaussian beam of 0.5 mm radius, not one of 2 mm', () => {
    expect(cautions(cube(0.1, { radius: 0.5 }))).toContain('voxels are too coarse');
    expect(cautions(cube(0.1, { radius: 2 }))).not.toContain('voxels');
  });

  test('a dye of 5 mmol/L quenches itself; one of 0.5 is let be', () => {
    expect(cautions(cube(1, { strength: 5e-3 }))).toContain('quench themselves');
    expect(cautions(cube(1, { strength: 5e-4 }))).not.toContain('quench');
  });
});
