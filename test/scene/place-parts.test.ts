import { describe, expect, test } from 'vitest';
import type { PartDescription } from '../../src/design/description.js';
import { patchCentre } from '../../src/scene/face-patch.js';
import { faceNormal, findFace, placeParts } from '../../src/scene/place-parts.js';
import { part } from '../helpers/describe.js';

const cell = part('cell', { kind: 'box', size: [20, 8, 6] }, 'bath', { at: [1, 2, 3] });

function placed(...parts: PartDescription[]) {
  const result = placeParts(parts);
  const centre = (face: string) => {
    const found = findFace(result.parts, face);
    if (found === null) throw new Error(`no ${face}`);
    return patchCentre(found.patch);
  };
  return { ...result, centre };
}

describe('against', () => {
  test('puts the facing side on the middle of the face', () => {
    const { centre, faults } = placed(
      cell,
      part('lid', { kind: 'box', size: [4, 4, 1] }, 'glass', { against: { face: 'cell.top' } }),
    );
    expect(faults).toEqual([]);
    for (const face of ['cell.top', 'lid.bottom']) {
      for (const [i, c] of [1, 2, 6].entries()) expect(centre(face)[i]).toBeCloseTo(c, 12);
    }
  });

  test('shift runs along the u and v of the face, gap along its normal', () => {
    const lean = { face: 'cell.front', shift: [3, 0.5] as const, gap: 2 };
    const { centre } = placed(cell, part('wall', { kind: 'box', size: [2, 1, 2] }, 'glass', { against: lean }));
    // The front looks along −y; its u is x, its v is z.
    expect(centre('wall.back')).toEqual([4, -4, 3.5]);
  });

  test('a turned part leans with the face that then looks the other way', () => {
    const turned = part('wedge', { kind: 'cylinder', radius: 2, height: 5 }, 'glass', {
      turns: [{ axis: 'y', angle: Math.PI / 2 }],
      against: { face: 'cell.right' },
    });
    const { centre, faults } = placed(cell, turned);
    expect(faults).toEqual([]);
    const at = centre('wedge.bottom');
    expect(at[0]).toBeCloseTo(11, 12);
    expect(at[1]).toBeCloseTo(2, 12);
    expect(at[2]).toBeCloseTo(3, 12);
  });

  test('a chain of parts holds together', () => {
    const lid = part('lid', { kind: 'box', size: [20, 8, 1] }, 'glass', { against: { face: 'cell.top' } });
    const dome = part('dome', { kind: 'cap', radius: 3, height: 2 }, 'glass', { against: { face: 'lid.top' } });
    expect(placed(cell, lid, dome).centre('dome.bottom')[2]).toBeCloseTo(7, 12);
  });

  test.each([
    [
      'an unknown face',
      part('lid', { kind: 'box', size: [1, 1, 1] }, 'glass', { against: { face: 'cell.lid' } }),
      'no earlier part has this face',
    ],
    [
      'a curved face',
      part('lid', { kind: 'sphere', radius: 1 }, 'glass', { against: { face: 'cell.top' } }),
      'no such flat face',
    ],
    [
      'a face that looks aside',
      part('lid', { kind: 'box', size: [1, 1, 1] }, 'glass', { against: { face: 'cell.top', with: 'left' } }),
      'does not look the opposite way',
    ],
  ])('%s is told', (_, leaning, problem) => {
    const { faults } = placed(cell, leaning);
    expect(faults.map((fault) => fault.problem).join()).toContain(problem);
  });
});

test('the wall of a hole looks into the hole, and is named after it', () => {
  const block = part('block', { kind: 'box', size: [6, 6, 6] }, 'glass', {
    minus: [{ name: 'slot', shape: { kind: 'box', size: [2, 2, 8] } }],
  });
  const found = findFace(placed(block).parts, 'block.slot.left');
  expect(found === null ? null : faceNormal(found)).toEqual([1, -0, -0]);
});
