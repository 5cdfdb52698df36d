import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Vector3 } from '../../src/design/description.js';
import { quadricCoefficients, quadricValue } from '../../src/scene/quadric.js';
import { quadricMeetsBox } from '../../src/scene/quadric-in-box.js';
import { normalise } from '../../src/scene/vector.js';

const INF = Number.POSITIVE_INFINITY;
const coordinate = fc.double({ min: -6, max: 6, noNaN: true });
const point = fc.tuple(coordinate, coordinate, coordinate);
const direction = fc.oneof(
  fc.constantFrom<Vector3>([1, 0, 0], [0, -1, 0], [0, 0, 1]),
  point.filter((d) => Math.hypot(...d) > 0.1).map((d) => normalise(d)),
);
const radius = fc.double({ min: 0.1, max: 5, noNaN: true });
const surface = fc.oneof(
  fc.record({ kind: fc.constant('sphere' as const), centre: point, radius }),
  fc.record({ kind: fc.constant('cylinder' as const), point, axis: direction, radius }),
  fc.record({ kind: fc.constant('cone' as const), apex: point, axis: direction, slope: radius }),
  fc.record({
    kind: fc.constant('conic' as const),
    vertex: point,
    axis: direction,
    radius,
    conic: fc.constantFrom(-3, -1, -0.5, 0, 2),
    ruled: fc.constant(null),
  }),
);

describe('a quadric and a box', () => {
  test('they meet wherever the form has both signs at points of the box', () => {
    fc.assert(
      fc.property(surface, point, point, fc.array(point, { minLength: 30, maxLength: 30 }), (form, a, b, spots) => {
        const q = quadricCoefficients(form);
        const low = a.map((c, i) => Math.min(c, b[i]));
        const high = a.map((c, i) => Math.max(c, b[i]));
        const signs = spots.map((spot) => {
          const [x, y, z] = spot.map((c, i) => low[i] + ((c + 6) / 12) * (high[i] - low[i]));
          return Math.sign(quadricValue(q, 0, x, y, z));
        });
        if (new Set(signs).size > 1) {
          expect(quadricMeetsBox(q, 0, low, high)).toBe(true);
          // Larger boxes meet it too, open ones among them.
          expect(quadricMeetsBox(q, 0, [low[0], -INF, low[2]], [high[0], high[1], INF])).toBe(true);
        }
      }),
      { numRuns: 2000, seed: 5 },
    );
  });

  test('a sphere and a cylinder along an axis meet a box as their distances from it say', () => {
    const ball = quadricCoefficients({ kind: 'sphere', centre: [1, 2, 3], radius: 2 });
    const meets = (low: number[], high: number[]) => quadricMeetsBox(ball, 0, low, high);
    // 2 from the centre along x, and a micrometre more or less than the margin beyond.
    expect(meets([3, 2, 3], [4, 3, 4])).toBe(true);
    expect(meets([3.00001, 2, 3], [4, 3, 4])).toBe(false);
    expect(meets([3.00001, -INF, -INF], [INF, INF, INF])).toBe(false);
    expect(meets([2.9, -INF, -INF], [INF, INF, INF])).toBe(true);
    // All of it inside, and it all inside.
    expect(meets([0.9, 1.9, 2.9], [1.1, 2.1, 3.1])).toBe(false);
    expect(meets([-9, -9, -9], [9, 9, 9])).toBe(true);
    // Corner to corner: 1.9·√3 from the centre.
    expect(meets([2.9, 3.9, 4.9], [9, 9, 9])).toBe(false);
    const rod = quadricCoefficients({ kind: 'cylinder', point: [0, 0, 0], axis: [0, 0, 1], radius: 1 });
    expect(quadricMeetsBox(rod, 0, [0.8, 0.8, -INF], [2, 2, INF])).toBe(false);
    expect(quadricMeetsBox(rod, 0, [0.6, 0.6, 100], [2, 2, INF])).toBe(true);
  });
});
