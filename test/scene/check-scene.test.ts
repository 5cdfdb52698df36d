/** Faults of geometry and finishes that no reader of the file can see. */
import { describe, expect, test } from 'vitest';
import type { Description, PumpDescription } from '../../src/design/description.js';
import { checkScene } from '../../src/scene/check-scene.js';
import { beam, describeDesign, finish, medium, part, plainDye } from '../helpers/describe.js';

const box = (size: number) => ({ kind: 'box', size: [size, size, size] }) as const;
const bath = medium('bath', 1.36, { dyes: [plainDye(0.5, 0.9, 520)] });
const silver = finish('silver', { kind: 'mirror', reflectance: 0.95 });

const errorsOf = (design: Description) =>
  checkScene(design).faults.flatMap(({ severity, path, problem }) => (severity === 'error' ? [{ path, problem }] : []));

function stack(low: Readonly<Record<string, string>>, high: Readonly<Record<string, string>>): Description {
  return describeDesign({
    media: [bath],
    finishes: [silver],
    parts: [
      part('low', box(10), 'bath', { faces: low }),
      part('high', box(10), 'bath', { faces: high, against: { face: 'low.top' } }),
    ],
    pumps: [beam([0, -20, 0], [0, 1, 0])],
    exit: 'high.top',
  });
}

describe('two finishes on one spot', () => {
  const clash = (face: string) => [
    { path: ['parts', 'high', 'faces', face], problem: 'two finishes on one spot: high.bottom lies on low.top' },
  ];
  test.each([
    ['both named', { top: 'silver' }, { bottom: 'black' }, clash('bottom')],
    ['the first for all faces', { '*': 'silver' }, { bottom: 'black' }, clash('bottom')],
    ['the second for all faces', { top: 'silver' }, { '*': 'black', top: 'clear' }, clash('*')],
    ['both for all faces', { '*': 'silver' }, { '*': 'black', top: 'clear' }, clash('*')],
    ['the same twice', { top: 'silver' }, { bottom: 'silver' }, []],
    ['one of them', { top: 'silver' }, {}, []],
  ])('%s', (_, low, high, expected) => {
    expect(errorsOf(stack(low, high))).toEqual(expected);
  });
});

describe('unions', () => {
  const union = (faces: Readonly<Record<string, string>>, shift: number) => {
    const whole = part('pair', box(10), 'bath', { faces });
    const [piece] = whole.pieces;
    return {
      ...whole,
      pieces: [
        { ...piece, name: 'a' },
        { ...piece, name: 'b', at: [shift, 0, 0] as const },
      ],
    };
  };
  const design = (faces: Readonly<Record<string, string>>, shift: number, lid: Readonly<Record<string, string>>) =>
    describeDesign({
      media: [bath],
      finishes: [silver],
      // Over the second piece only.
      parts: [union(faces, shift), part('lid', box(8), 'bath', { at: [10, 0, 9], faces: lid })],
      pumps: [beam([0, -20, 0], [0, 1, 0])],
      exit: 'lid.top',
    });

  test('two finishes on the shared part of two tops are told', () => {
    expect(errorsOf(design({ 'a.top': 'black', 'b.top': 'silver' }, 5, {}))).toEqual([
      { path: ['parts', 'pair', 'faces', 'b.top'], problem: 'two finishes on one spot: pair.b.top lies on pair.a.top' },
    ]);
  });

  test('side by side they are not one spot, and what lies on one does not lie on the other', () => {
    expect(errorsOf(design({ 'a.top': 'black', 'b.top': 'silver' }, 10, { bottom: 'silver' }))).toEqual([]);
    expect(errorsOf(design({ 'a.top': 'black', 'b.top': 'silver' }, 10, { bottom: 'black' }))).toHaveLength(1);
    const { faces } = checkScene(design({}, 10, {}));
    expect(faces.find(({ part: name, face }) => name === 'lid' && face === 'bottom')?.touches).toEqual(['pair.b.top']);
  });
});

test('a finish for all faces may reach a buried one, a named one may not', () => {
  const design = (faces: Readonly<Record<string, string>>) =>
    describeDesign({
      media: [bath],
      finishes: [silver],
      parts: [part('cell', box(10), 'bath', { faces }), part('lid', box(10), 'bath', { at: [0, 0, 6] })],
      pumps: [beam([0, -20, 0], [0, 1, 0])],
      exit: 'lid.top',
    });
  expect(errorsOf(design({ '*': 'silver' }))).toEqual([]);
  expect(errorsOf(design({ top: 'silver' }))).toEqual([
    {
      path: ['parts', 'cell', 'faces', 'top'],
      problem: 'this face is buried in another part or cut away, so its finish never meets light',
    },
  ]);
});

test('the surroundings may absorb but hold no dye', () => {
  const design = (sea: typeof bath) =>
    describeDesign({
      media: [bath, sea],
      parts: [part('cell', box(10), 'bath')],
      pumps: [beam([0, -20, 0], [0, 1, 0])],
      exit: 'cell.top',
      surroundings: 'sea',
    });
  expect(errorsOf(design(medium('sea', 1.33, { absorption: 0.01 })))).toEqual([]);
  expect(errorsOf(design({ ...bath, name: 'sea' }))).toEqual([
    { path: ['surroundings'], problem: 'the surroundings may hold no dye' },
  ]);
});

test('a lens stands between its bank and the face', () => {
  const bank = (distance: number): PumpDescription =>
    beam([0, 0, 0], [0, 0, 1], {
      aim: { kind: 'toward', face: 'cell.front', distance: 20, shift: [0, 0], tilt: [0, 0] },
      beam: {
        kind: 'diodes',
        across: 2,
        along: 2,
        pitch: [1, 1],
        divergence: [0.1, 0.1],
        lens: { focalLength: 10, distance },
      },
    });
  const design = (distance: number) =>
    describeDesign({
      media: [bath],
      parts: [part('cell', box(10), 'bath')],
      pumps: [bank(distance)],
      exit: 'cell.top',
    });
  expect(errorsOf(design(19))).toEqual([]);
  expect(errorsOf(design(20))).toHaveLength(1);
});
