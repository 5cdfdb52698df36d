import { expect, test } from 'vitest';
import { compileScene } from '../../src/scene/compile-scene.js';
import { beam, describeDesign, medium, part } from '../helpers/describe.js';

function pumpedFace(pump: ReturnType<typeof beam>): string[] {
  const { legend } = compileScene(
    describeDesign({
      media: [medium('glass', 1.5)],
      parts: [
        part('cell', { kind: 'box', size: [10, 6, 6] }, 'glass', {
          minus: [{ name: 'bore', shape: { kind: 'cylinder', radius: 1, height: 8 } }],
        }),
        part('cone', { kind: 'cone', bottomRadius: 3, topRadius: 1, height: 4 }, 'glass', { at: [20, 0, 0] }),
        part('dome', { kind: 'cap', radius: 3, height: 3 }, 'glass', { at: [0, 0, 20] }),
      ],
      pumps: [pump],
      exit: 'cell.left',
    }),
  );
  return legend.recorders.filter(({ what }) => what === 'pumped-face').map(({ where }) => where);
}

test.each([
  ['flat', [0.5, -20, 2] as const, [0, 1, 0] as const, ['cell.front']],
  ['from within a bore', [0, 0, 0] as const, [1, 0.1, 0] as const, ['cell.bore.side']],
  ['cone', [40, 0, 0] as const, [-1, 0, 0] as const, ['cone.side']],
  ['dome', [0, 0, 40] as const, [0, 0, -1] as const, ['dome.dome']],
  ['past everything', [0, 0, 40] as const, [0, 1, 0] as const, []],
])('the face a free beam meets first: %s', (_, at, direction, faces) => {
  expect(pumpedFace(beam([...at], [...direction]))).toEqual(faces);
});
