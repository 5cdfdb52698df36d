import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { CROSS, crossFacets, facetAt, SENSE } from '../../../src/numerics/mesh/cross-facets.js';
import type { FacetTree } from '../../../src/numerics/mesh/facet-tree.js';
import { refitBoxes } from '../../../src/numerics/mesh/facet-tree.js';
import { bumpyFacets, icosphereFacets, mustClose } from '../../helpers/mesh-bodies.js';

const cross = new Float64Array(CROSS.COUNT);
function nearest(tree: FacetTree, ray: ArrayLike<number>, sense: number, limit = Infinity, last = -1) {
  cross[CROSS.limit] = limit;
  cross[CROSS.reach] = 1e-10;
  const facet = crossFacets(tree, 0, Float64Array.from(ray), sense, last, cross);
  return { facet, t: facet < 0 ? Infinity : cross[CROSS.distance], wrong: cross[CROSS.wrong] };
}

/** Every crossing by Cramer's rule on o + t d = a + u (b − a) + v (c − a): another method, no tree. */
function allCrossings({ facetPoint, facetCorner }: FacetTree, ray: readonly number[]) {
  const found: { t: number; leaving: boolean; inset: number }[] = [];
  const o = ray.slice(0, 3);
  const d = ray.slice(3, 6);
  const point = (i: number) => [...facetPoint.subarray(3 * i, 3 * i + 3)];
  const minus = (p: number[], q: number[]) => p.map((c, i) => c - q[i]);
  const det = (p: number[], q: number[], r: number[]) =>
    p[0] * (q[1] * r[2] - q[2] * r[1]) - p[1] * (q[0] * r[2] - q[2] * r[0]) + p[2] * (q[0] * r[1] - q[1] * r[0]);
  for (let i = 0; i < facetCorner.length; i += 3) {
    const [a, b, c] = [point(facetCorner[i]), point(facetCorner[i + 1]), point(facetCorner[i + 2])];
    const [e, f, s] = [minus(b, a), minus(c, a), minus(o, a)];
    const back = d.map((x) => -x);
    const whole = det(back, e, f);
    const [t, u, v] = [det(s, e, f) / whole, det(back, s, f) / whole, det(back, e, s) / whole];
    if (u < -1e-9 || v < -1e-9 || u + v > 1 + 1e-9) continue;
    found.push({ t, leaving: det(e, f, d) > 0, inset: Math.min(u, v, 1 - u - v) });
  }
  return found.sort((a, b) => a.t - b.t);
}

const unit = fc
  .tuple(...Array.from({ length: 3 }, () => fc.double({ min: -1, max: 1, noNaN: true })))
  .filter((d) => Math.hypot(...d) > 0.01)
  .map((d) => d.map((c) => c / Math.hypot(...d)));

describe('crossFacets', () => {
  test.each([
    ['ball of 20 facets', mustClose(icosphereFacets(2, 0)).tree, 400],
    ['bumpy ball of 320', mustClose(bumpyFacets(2, 2, 0.5, 4)).tree, 100],
    ['bumpy ball of 1280', mustClose(bumpyFacets(2, 3, 0.6, 5)).tree, 40],
  ] as const)('%s: the nearest crossing of either kind is that of a search through all facets', (_, tree, numRuns) => {
    const place = fc.tuple(...Array.from({ length: 3 }, () => fc.double({ min: -3, max: 3, noNaN: true })));
    fc.assert(
      fc.property(place, unit, (o, d) => {
        const all = allCrossings(tree, [...o, ...d]);
        // Rays within rounding of an edge are for the test below.
        fc.pre(all.every(({ inset, t }) => Math.abs(inset) > 1e-8 && Math.abs(t) > 1e-8));
        for (const [sense, leaving] of [
          [SENSE.leaving, true],
          [SENSE.entering, false],
        ] as const) {
          const expected = all.find((one) => one.t >= 0 && one.leaving === leaving)?.t ?? Infinity;
          const { t, wrong } = nearest(tree, [...o, ...d], sense);
          if (expected === Infinity) expect(t).toBe(Infinity);
          else expect(t).toBeCloseTo(expected, 10);
          const other = all.find((one) => one.t >= 0 && one.leaving !== leaving)?.t ?? Infinity;
          if (other < expected) expect(wrong).toBeCloseTo(other, 10);
          else expect(wrong).toBe(Infinity);
        }
      }),
      { numRuns },
    );
  });

  test('of 300 000 rays from inside aimed exactly at corners and edges none gets through a gap', () => {
    const { tree } = mustClose(icosphereFacets(2, 3));
    const { facetPoint: p, facetCorner: c } = tree;
    let state = 7;
    const random = () => {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      return state / 2 ** 32;
    };
    let lost = 0;
    const ray = new Float64Array(6);
    for (let i = 0; i < 300_000; i++) {
      const e = Math.floor(random() * c.length);
      const f = e % 3 === 2 ? e - 2 : e + 1;
      const share = i % 3 === 0 ? 0 : i % 3 === 1 ? 0.5 : random();
      const o = i % 5 === 0 ? [0, 0, 0] : [random() - 0.5, random() - 0.5, random() - 0.5];
      const to = [0, 1, 2].map((k) => p[3 * c[e] + k] * (1 - share) + p[3 * c[f] + k] * share - o[k]);
      const norm = Math.hypot(...to);
      ray.set([...o, ...to.map((x) => x / norm)]);
      cross[CROSS.limit] = Infinity;
      cross[CROSS.reach] = 1e-10;
      const facet = crossFacets(tree, 0, ray, SENSE.leaving, -1, cross);
      if (facet < 0 || Math.abs(cross[CROSS.distance] - norm) > 1e-9 || cross[CROSS.wrong] < Infinity) lost++;
    }
    expect(lost).toBe(0);
  });

  test('a limit cuts the search, and the facet just met is left out', () => {
    const { tree } = mustClose(icosphereFacets(2, 2));
    const ray = [0.1, 0.2, 0.3, 0.6, 0, 0.8];
    const { t, facet } = nearest(tree, ray, SENSE.leaving);
    expect(nearest(tree, ray, SENSE.leaving, t * 0.99).facet).toBe(-1);
    expect(nearest(tree, ray, SENSE.leaving, t * 1.01).facet).toBe(facet);
    expect(nearest(tree, ray, SENSE.leaving, Infinity, facet).facet).toBe(-1);
  });

  test('facetAt finds what light stands on, by the way it goes', () => {
    const { tree } = mustClose(icosphereFacets(2, 2));
    const { facetPoint: p, facetCorner: c } = tree;
    for (let facet = 0; facet < c.length / 3; facet += 7) {
      const middle = [0, 1, 2].map((k) => [0, 1, 2].reduce((sum, j) => sum + p[3 * c[3 * facet + j] + k] / 3, 0));
      const out = middle.map((x) => x / Math.hypot(...middle));
      expect(facetAt(tree, 0, Float64Array.from([...middle, ...out]), SENSE.leaving, 1e-9)).toBe(facet);
      expect(facetAt(tree, 0, Float64Array.from([...middle, ...out]), SENSE.entering, 1e-9)).toBe(-1);
      expect(facetAt(tree, 0, Float64Array.from([...middle.map((x) => 0.9 * x), ...out]), SENSE.leaving, 1e-9)).toBe(
        -1,
      );
    }
  });

  test('a tree whose points have moved finds the same after its boxes were fitted anew', () => {
    const { tree } = mustClose(bumpyFacets(2, 3));
    const [cos, sin] = [Math.cos(0.7), Math.sin(0.7)];
    const facetPoint = tree.facetPoint.slice();
    for (let i = 0; i < facetPoint.length; i += 3) {
      const [x, y] = [facetPoint[i], facetPoint[i + 1]];
      facetPoint[i] = cos * x - sin * y + 5;
      facetPoint[i + 1] = sin * x + cos * y;
    }
    const moved = { ...tree, facetPoint, nodeBox: refitBoxes(facetPoint, tree.facetCorner, tree.nodeChild) };
    fc.assert(
      fc.property(unit, (d) => {
        const before = nearest(tree, [0, 0, 0, ...d], SENSE.leaving);
        const turned = [cos * d[0] - sin * d[1], sin * d[0] + cos * d[1], d[2]];
        const after = nearest(moved, [5, 0, 0, ...turned], SENSE.leaving);
        expect(after.t).toBeCloseTo(before.t, 11);
      }),
      { numRuns: 200 },
    );
  });
});
