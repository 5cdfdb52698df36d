import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { LensDescription, LensSurface, ShapeDescription, Vector3 } from '../../src/design/description.js';
import type { FacePatch } from '../../src/scene/convex-solid.js';
import { patchArea, patchCentre, patchPoint, patchRange } from '../../src/scene/face-patch.js';
import { makePieces, moveSolid } from '../../src/scene/shapes/make-solid.js';
import { dot, rigidMatrix } from '../../src/scene/vector.js';
import { anyShapeArbitrary, depthInside } from '../helpers/random-pile.js';

interface Shown {
  readonly name: string;
  readonly patch: FacePatch;
  readonly hollow: boolean;
}

/** Patches of every solid of a shape, placed by a matrix. */
const patches = (shape: ShapeDescription, matrix = rigidMatrix([0, 0, 0], [])): Shown[] =>
  makePieces(shape).flatMap(({ body, minus }) =>
    [body, ...minus].flatMap((solid, i) =>
      moveSolid(solid, matrix).faces.flatMap(({ name, patch, whole }) =>
        [patch, whole ?? null].flatMap((each) => (each === null ? [] : [{ name, patch: each, hollow: i > 0 }])),
      ),
    ),
  );

const area = (shape: ShapeDescription): Record<string, number> =>
  Object.fromEntries(patches(shape).map(({ name, patch }) => [name, patchArea(patch)]));

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
  // Gradshteyn & Ryzhik-type integrals of revolution, worked out by hand.
  test('paraboloid: π r((r² + 4h²)^(3/2) − r³)/6h²', () => {
    const { bowl } = area({ kind: 'paraboloid', focalLength: 5, height: 5 });
    expect(bowl).toBeCloseTo((Math.PI * 10 * (200 ** 1.5 - 1000)) / (6 * 25), 5);
  });
  const lens = (front: LensSurface, more: Partial<LensDescription> = {}): LensDescription => ({
    kind: 'lens',
    outline: { kind: 'disc', radius: 3 },
    thickness: 6,
    profile: 'round',
    front,
    back: { kind: 'flat' },
    ...more,
  });
  test('half a ball: 2πr²; half an oblate spheroid of c/a = 1/√2: πa²(1 + (1 − e²)/e · artanh e)', () => {
    expect(area(lens({ kind: 'bulges', radius: 3, conic: 0 })).front).toBeCloseTo(18 * Math.PI, 5);
    // (1 + k) = 2, R = 3√2: semi-axes a = R/√(1 + k) = 3 and c = R/(1 + k) = 3/√2; e² = 1/2.
    const e = Math.SQRT1_2;
    const half = Math.PI * 9 * (1 + ((1 - e * e) / e) * Math.atanh(e));
    expect(area(lens({ kind: 'bulges', radius: 3 * Math.SQRT2, conic: 1 })).front).toBeCloseTo(half, 5);
  });
  test('cylinder lens: length times arc', () => {
    const cut = { outline: { kind: 'rectangle', size: [4, 10] }, profile: 'upright' } as const;
    expect(area(lens({ kind: 'hollow', radius: 4, conic: 0 }, cut)).front).toBeCloseTo(80 * Math.asin(0.5), 6);
  });
});

const unit = fc.double({ min: 0, max: 1, noNaN: true });
const turn = fc.record({ axis: fc.constantFrom('x', 'y', 'z'), angle: fc.double({ min: -3, max: 3, noNaN: true }) });

describe('patches of any shape', () => {
  test('every sample point lies on the surface of the solid, and just outside along the normal', () => {
    fc.assert(
      fc.property(anyShapeArbitrary, unit, unit, (shape, s, t) => {
        for (const { name, patch, hollow } of patches(shape)) {
          if (patchArea(patch) === 0) continue;
          const { point, normal } = patchPoint(patch, s, t);
          const out = hollow ? -1 : 1;
          const outside = point.map((c, i) => c + 1e-6 * out * normal[i]) as unknown as Vector3;
          // The flat walls of rectangular lenses reach from rim to rim, and the ends of a tube over its bore.
          const bounds =
            (shape.kind === 'tube' && ['bottom', 'top'].includes(name)) ||
            (shape.kind === 'lens' && ['left', 'right', 'bottom', 'top', 'edge'].includes(name));
          if (bounds) {
            expect(depthInside(shape, point)).toBeLessThan(1e-9);
            continue;
          }
          expect(Math.abs(depthInside(shape, point))).toBeLessThan(1e-9);
          // From the end of a bore one comes to its open end.
          expect(depthInside(shape, outside)).toBeLessThan(shape.kind === 'tube' ? 1e-6 : 0);
        }
      }),
      { seed: 11 },
    );
  });

  test('the range along any direction holds every sample point of the moved patch', () => {
    fc.assert(
      fc.property(anyShapeArbitrary, fc.array(turn, { maxLength: 2 }), unit, unit, (shape, turns, s, t) => {
        const moved = patches(shape, rigidMatrix([1, -2, 3], turns));
        const direction: Vector3 = [0.6, 0.64, 0.48];
        for (const { patch } of moved) {
          const [low, high] = patchRange(patch, direction);
          const at = dot(patchPoint(patch, s, t).point, direction);
          // Of dishes cut to a rectangle the range is that of a grid of points.
          const slack = patch.kind === 'dish' && patch.outline.kind === 'strip' ? 0.02 : 1e-9;
          expect(at).toBeGreaterThanOrEqual(low - slack);
          expect(at).toBeLessThanOrEqual(high + slack);
        }
      }),
      { seed: 12 },
    );
  });

  test('moving a patch keeps its area and moves its centre', () => {
    fc.assert(
      fc.property(anyShapeArbitrary, fc.array(turn, { maxLength: 2 }), (shape, turns) => {
        const moved = patches(shape, rigidMatrix([4, 5, 6], turns));
        patches(shape).forEach(({ patch }, i) => {
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
