import { describe, expect, test } from 'vitest';
import { closeMesh, type MeshFacets } from '../../../src/numerics/mesh/close-mesh.js';
import {
  boxFacets,
  bumpyFacets,
  facetsOf,
  icosphereFacets,
  joinFacets,
  mustClose,
  turned,
} from '../../helpers/mesh-bodies.js';

const PLAIN = { turnInsideOut: false, crease: null };
const kinds = (facets: MeshFacets, options = PLAIN) => {
  const closing = closeMesh(facets, options);
  return closing.ok ? [] : closing.problems.map(({ kind, count }) => [kind, count]);
};
const without = (facets: MeshFacets, ...left: number[]): MeshFacets => {
  const keep = [...facets.group.keys()].filter((i) => !left.includes(i));
  return {
    ...facets,
    corners: Int32Array.from(keep.flatMap((i) => [...facets.corners.subarray(3 * i, 3 * i + 3)])),
    group: Int32Array.from(keep, (i) => facets.group[i]),
  };
};

describe('closeMesh', () => {
  test('volume and surface of a box mesh are those of the box', () => {
    const mesh = mustClose(boxFacets([2, 3, 5], [1, 1, 1]));
    expect(mesh.volume).toBeCloseTo(30, 12);
    expect(mesh.area).toBeCloseTo(62, 12);
    expect(mesh.low).toEqual([0, -0.5, -1.5]);
    expect(mesh.high).toEqual([2, 2.5, 3.5]);
  });

  test('the volume of icospheres nears 4πr³/3 four times with every level (second order in the edge)', () => {
    const misses = [1, 2, 3, 4].map((level) => (4 * Math.PI * 8) / 3 - mustClose(icosphereFacets(2, level)).volume);
    for (let i = 1; i < misses.length; i++) expect(misses[i - 1] / misses[i]).toBeCloseTo(4, 0);
    expect(Math.abs(misses[2] / misses[3] - 4)).toBeLessThan(0.05);
  });

  test('a missing facet leaves three open edges, and the places are those of the edges', () => {
    const closing = closeMesh(without(boxFacets([2, 2, 2]), 11), PLAIN);
    expect(closing.ok).toBe(false);
    if (closing.ok) return;
    expect(closing.problems).toHaveLength(1);
    expect(closing.problems[0]).toMatchObject({ kind: 'open', count: 3 });
    // The facet that is gone is half of the top: all its edges lie at z = 1.
    for (const [, , z] of closing.problems[0].places) expect(z).toBe(1);
  });

  test('one facet turned over, an edge of four facets, no facet at all', () => {
    const box = boxFacets([2, 2, 2]);
    const corners = box.corners.slice();
    [corners[1], corners[2]] = [corners[2], corners[1]];
    expect(kinds({ ...box, corners })).toEqual([['twisted', 3]]);
    // Two tetrahedra that share one edge.
    const points = [
      [0, 0, 0],
      [0, 0, 1],
      [1, 0, 0],
      [1, 1, 0],
      [-1, 0, 0],
      [-1, -1, 0],
    ] as const;
    const tetrahedron = (a: number, b: number, c: number, d: number) =>
      [
        [a, c, b],
        [a, b, d],
        [b, c, d],
        [a, d, c],
      ] as const;
    expect(kinds(facetsOf(points, [...tetrahedron(0, 1, 2, 3), ...tetrahedron(0, 1, 4, 5)]))).toEqual([['crowded', 1]]);
    expect(kinds(facetsOf([[0, 0, 0]], [[0, 0, 0]]))).toEqual([['empty', 0]]);
  });

  test('facets with two equal corners are dropped and counted', () => {
    const box = boxFacets([1, 1, 1]);
    const more = {
      ...box,
      corners: Int32Array.from([...box.corners, 0, 0, 1]),
      group: Int32Array.from([...box.group, 0]),
    };
    const closing = closeMesh(more, PLAIN);
    expect(closing.ok && closing.notes).toEqual({ dropped: 1, turned: 0 });
  });

  test('inside out is told, and turned on request', () => {
    expect(kinds(turned(icosphereFacets(1, 1)))).toEqual([['inside-out', 1]]);
    const closing = closeMesh(turned(icosphereFacets(1, 1)), { ...PLAIN, turnInsideOut: true });
    expect(closing.ok && closing.notes.turned).toBe(1);
    expect(closing.ok && closing.mesh.volume).toBeCloseTo(mustClose(icosphereFacets(1, 1)).volume, 12);
  });

  test('an inner shell that looks inwards is a cavity, one that looks outwards is inside out', () => {
    const [outer, inner] = [boxFacets([4, 4, 4]), boxFacets([1, 1, 1], [0.2, 0.3, 0.1])];
    const hollow = mustClose(joinFacets(outer, turned(inner)));
    expect(hollow.volume).toBeCloseTo(63, 12);
    expect(hollow.shells).toBe(2);
    expect(kinds(joinFacets(outer, inner))).toEqual([['inside-out', 1]]);
    // A bead in the cavity is solid again; two bodies side by side are both solid.
    const bead = boxFacets([0.25, 0.25, 0.25], [0.2, 0.3, 0.1]);
    expect(mustClose(joinFacets(outer, turned(inner), bead)).volume).toBeCloseTo(63 + 1 / 64, 12);
    expect(mustClose(joinFacets(inner, boxFacets([1, 1, 1], [5, 0, 0]))).volume).toBeCloseTo(2, 12);
  });

  test.each([
    ['boxes that overlap askew', boxFacets([2, 2, 2]), boxFacets([2, 2, 2], [0.71, 0.33, 0.45])],
    ['boxes whose edges cross the diagonals of faces', boxFacets([2, 2, 2]), boxFacets([2, 2, 2], [1, 1, 1])],
    ['boxes that share planes', boxFacets([2, 2, 2]), boxFacets([2, 2, 2], [1, 0, 0])],
    ['boxes that touch face to face', boxFacets([2, 2, 2]), boxFacets([2, 2, 2], [2, 0, 0])],
    ['a ball through another', icosphereFacets(2, 2), bumpyFacets(2.05, 2)],
  ])('%s cut each other', (_, a, b) => {
    expect(kinds(joinFacets(a, b))[0][0]).toBe('self-cutting');
  });

  test('bodies that touch in a point or along a line do not cut', () => {
    expect(kinds(joinFacets(boxFacets([2, 2, 2]), boxFacets([2, 2, 2], [2, 2, 2])))).toEqual([]);
    expect(kinds(bumpyFacets(3, 4))).toEqual([]);
  });

  test('patches end at creases, are named by size, and add up', () => {
    expect(mustClose(boxFacets([2, 3, 5]), 0.5).groups).toHaveLength(6);
    expect(mustClose(icosphereFacets(1, 3), 0.5).groups).toEqual(['patch-1']);
    const facets = mustClose(icosphereFacets(1, 0), 0.5);
    expect(facets.groups).toHaveLength(20);
    const many = mustClose(icosphereFacets(1, 3), 1e-6);
    expect(many.groups).toHaveLength(500);
    expect(many.groups[499]).toBe('rest');
  });
});
