/** Which media a stack gets tables for: all that meet it when light is traced, and few more. */
import { expect, test } from 'vitest';
import type { LayerDescription, PartDescription } from '../../src/design/description.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { stackNeighbours } from '../../src/scene/stack-neighbours.js';
import { beam, describeDesign, finish, flat, medium, part } from '../helpers/describe.js';
import { traceHere } from '../helpers/trace.js';

const layers: LayerDescription[] = [
  { material: 'own', n: flat(2), k: flat(0), rangeNm: null, thicknessNm: 60, path: [] },
];
const box = (x: number, y: number, z: number) => ({ kind: 'box', size: [x, y, z] }) as const;
/** Or light goes round for ever. */
const grey = { absorption: 0.1 };
const coated = { faces: { back: 'films' } };

function design(parts: readonly PartDescription[]) {
  return describeDesign({
    media: [medium('glass', 1.52, grey), medium('liquid', 1.36, grey), medium('oil', 1.46, grey)],
    finishes: [finish('films', { kind: 'stack', layers, extrapolates: false })],
    parts,
    pumps: [
      beam([0.1, -9, 0.2], [0.1, 1, 0.05], {
        beam: { kind: 'lambertian', outline: { kind: 'rectangle', size: [6, 6] } },
      }),
    ],
    exit: 'plate.front',
  });
}

function outsides(parts: readonly PartDescription[]): string[] {
  const { legend, scene } = compileScene(design(parts));
  const faces = legend.faces.filter(({ index }) => scene.faceFinish[index] > 0);
  return stackNeighbours(faces, legend.parts, 'air')
    .map(({ outside }) => outside)
    .sort();
}

const plate = part('plate', box(4, 1, 4), 'glass', coated);

test.each<[string, readonly PartDescription[], string[]]>([
  ['nothing but air', [plate], ['air']],
  ['a block on all of the face', [plate, part('b', box(4, 3, 4), 'liquid', { at: [0, 2, 0] })], ['liquid']],
  ['a larger one', [plate, part('b', box(9, 3, 5), 'liquid', { at: [0, 2, 0] })], ['liquid']],
  ['one that covers half', [plate, part('b', box(4, 3, 2), 'liquid', { at: [0, 2, 1] })], ['air', 'liquid']],
  [
    'a ball that touches',
    [plate, part('b', { kind: 'sphere', radius: 2 }, 'liquid', { at: [0, 2.4, 0] })],
    ['air', 'liquid'],
  ],
  ['one that only shares an edge', [plate, part('b', box(4, 1, 4), 'liquid', { at: [4, 1, 0] })], ['air']],
  ['one behind the plate', [plate, part('b', box(4, 1, 4), 'liquid', { at: [0, -1, 0] })], ['air']],
  [
    'one that ends where the plate ends',
    [part('b', box(4, 3, 4), 'liquid', { at: [0, -1, 0] }), plate],
    ['air', 'liquid'],
  ],
  ['a gap', [plate, part('b', box(4, 1, 4), 'liquid', { at: [0, 1.1, 0] })], ['air']],
  [
    'a block with a later bubble of oil on the face',
    [plate, part('b', box(4, 3, 4), 'liquid', { at: [0, 2, 0] }), part('o', box(1, 1, 1), 'oil', { at: [0, 1, 0] })],
    ['liquid', 'oil'],
  ],
])('%s', async (_, parts, expected) => {
  expect(outsides(parts)).toEqual(expected);
  // A pair without a table would stop the trace.
  await traceHere(design(parts), 2048, 'pairs');
});
