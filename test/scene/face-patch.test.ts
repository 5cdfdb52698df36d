import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { ShapeDescription, Vector3 } from '../../src/design/description.js';
import { patchArea, patchCentre, patchPoint, patchRange } from '../../src/scene/face-patch.js';
import { makeSolid, moveSolid } from '../../src/scene/shapes/make-solid.js';
import { dot, rigidMatrix } from '../../src/scene/vector.js';
import { depthInside, shapeArbitrary } from '../helpers/random-pile.js';

const area = (shape: ShapeDescription): Record<string, number> =>
  Object.fromEntries(makeSolid(shape).faces.map(({ name, patch }) => [name, patchArea(patch)]));

describe('areas against the formulas of solid geometry', () => {
  test('box', () => {
    expect(area({ kind: 'box', size: [2, 3, 5] })).toEqual({
      front: 10,
      right: 15,
      back: 10,
      left: 15,
      bottom: 6,
      top: 6,
    });
  });
  test('cylinder: 2πrh and πr²', () => {
    const { side, top } = area({ kind: 'cylinder', radius: 2, height: 3 });
    expect(side).toBeCloseTo(12 * Math.PI, 12);
    expect(top).toBeCloseTo(4 * Math.PI, 12);
  });
  test('cone frustum: π(r₁ + r₂)·slant', () => {
    const { side } = area({ kind: 'cone', bottomRadius: 3, topRadius: 1, height: 4 });
    expect(side).toBeCloseTo(Math.PI * 4 * Math.sqrt(20), 12);
  });
  test('sphere: 4πr²; cap: 2πrh over a rim of radius √(h(2r − h))', () => {
    expect(area({ kind: 'sphere', radius: 1.5 }).surface).toBeCloseTo(9 * Math.PI, 12);
    const { dome, bottom } = area({ kind: 'cap', radius: 3, height: 2 });
    expect(dome).toBeCloseTo(12 * Math.PI, 12);
    expect(bottom).toBeCloseTo(8 * Math.PI, 12);
  });
});

const unit = fc.double({ min: 0, max: 1, noNaN: true });
const turn = fc.record({ axis: fc.constantFrom('x', 'y', 'z'), angle: fc.double({ min: -3, max: 3, noNaN: true }) });

describe('patches of any shape', () => {
  test('every sample point lies on the surface of the solid, and just outside along the normal', () => {
    fc.assert(
      fc.property(shapeArbitrary, unit, unit, (shape, s, t) => {
        for (const { patch } of makeSolid(shape).faces) {
          if (patchArea(patch) === 0) continue;
          const { point, normal } = patchPoint(patch, s, t);
          expect(Math.abs(depthInside(shape, point))).toBeLessThan(1e-9);
          const outside = point.map((c, i) => c + 1e-6 * normal[i]) as unknown as Vector3;
          expect(depthInside(shape, outside)).toBeLessThan(0);
        }
      }),
      { seed: 11 },
    );
  });

  test('the range along any direction holds every sample point of the moved patch', () => {
    fc.assert(
      fc.property(shapeArbitrary, fc.array(turn, { maxLength: 2 }), unit, unit, (shape, turns, s, t) => {
        const moved = moveSolid(makeSolid(shape), rigidMatrix([1, -2, 3], turns));
        const direction: Vector3 = [0.6, 0.64, 0.48];
        for (const { patch } of moved.faces) {
          const [low, high] = patchRange(patch, direction);
          const at = dot(patchPoint(patch, s, t).point, direction);
          expect(at).toBeGreaterThanOrEqual(low - 1e-9);
          expect(at).toBeLessThanOrEqual(high + 1e-9);
        }
      }),
      { seed: 12 },
    );
  });

  test('moving a patch keeps its area and moves its centre', () => {
    fc.assert(
      fc.property(shapeArbitrary, fc.array(turn, { maxLength: 2 }), (shape, turns) => {
        const still = makeSolid(shape).faces;
        const moved = moveSolid({ faces: still }, rigidMatrix([4, 5, 6], turns)).faces;
        still.forEach(({ patch }, i) => {
          expect(patchArea(moved[i].patch)).toBeCloseTo(patchArea(patch), 9);
          const before = Math.hypot(...patchCentre(patch));
          const after = patchCentre(moved[i].patch);
          expect(Math.hypot(after[0] - 4, after[1] - 5, after[2] - 6)).toBeCloseTo(before, 9);
        });
      }),
      { seed: 13 },
    );
  });
});
