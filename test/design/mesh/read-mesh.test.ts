import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { parseNumber } from '../../../src/design/mesh/byte-text.js';
import { groupName } from '../../../src/design/mesh/mesh-builder.js';
import { readObj } from '../../../src/design/mesh/read-obj.js';
import { readStl } from '../../../src/design/mesh/read-stl.js';
import { closeMesh, type MeshFacets } from '../../../src/numerics/mesh/close-mesh.js';
import { boxFacets, bumpyFacets, icosphereFacets, mustClose } from '../../helpers/mesh-bodies.js';
import { binaryStl, objText, textStl } from '../../helpers/write-mesh.js';

const bytes = (text: string) => new TextEncoder().encode(text);
const stl = (data: Uint8Array, unit = 1) => readStl(data, unit, 0);
const obj = (text: string, names: 'group' | 'material' = 'group') => readObj(bytes(text), 1, 0, names);

/** Corners of each facet with the name of its group: independent of how points are numbered. */
function plain({ points, corners, group, groups }: MeshFacets): string[] {
  return [...group.keys()].map((facet) => {
    const at = [0, 1, 2].map((k) => [...points.subarray(3 * corners[3 * facet + k], 3 * corners[3 * facet + k] + 3)]);
    return `${groups[group[facet]]} ${at
      .flat()
      .map((value) => Math.fround(value))
      .join(' ')}`;
  });
}

describe('round trips', () => {
  test.each([
    ['box', boxFacets([2, 3, 5], [0.1, -7, 1e-3])],
    ['ball', icosphereFacets(1.7, 2)],
    ['bumpy ball', bumpyFacets(3, 3)],
  ])('a %s is the same after binary STL, text STL and OBJ', (_, mesh) => {
    const points = mesh.points.map((value) => Math.fround(value) + 0);
    const single = { ...mesh, points };
    const nameless = { ...single, group: single.group.map(() => 0), groups: ['surface'] };
    for (const [read, expected] of [
      [stl(binaryStl(single)), nameless],
      // Some binary files begin like texts.
      [stl(binaryStl(single, 'solid body')), nameless],
      [stl(bytes(textStl(single))), single],
      [
        stl(bytes(textStl(single).toUpperCase().replaceAll('\n', '\r\n'))),
        { ...single, groups: single.groups.map((g) => g.toUpperCase()) },
      ],
      [obj(objText(single)), single],
      [obj(objText(single, true)), single],
    ] as const) {
      expect(read.faults).toEqual([]);
      const facets = read.mesh.finish();
      expect(plain(facets)).toEqual(plain(expected));
      expect(facets.points.length).toBe(single.points.length);
      expect(mustClose(facets).volume).toBeCloseTo(mustClose(single).volume, 12);
    }
  });

  test('units', () => {
    const { mesh } = stl(binaryStl(boxFacets([2, 2, 2])), 25.4);
    expect(mustClose(mesh.finish()).volume).toBeCloseTo((2 * 25.4) ** 3, 6);
  });

  test('numbers are those of the library to the last bit', () => {
    const read = (text: string) => parseNumber(bytes(text), 0, text.length);
    fc.assert(
      fc.property(
        fc.oneof(
          fc.double({ noNaN: true, noDefaultInfinity: true }),
          fc.integer(),
          fc.float({ noNaN: true, noDefaultInfinity: true }),
        ),
        (value) => {
          expect(read(String(value))).toBe(value + 0 === 0 ? read(String(value)) : value);
          expect(read(value.toExponential(8))).toBe(Number(value.toExponential(8)));
          expect(read(value.toFixed(6))).toBe(Number(value.toFixed(6)));
        },
      ),
    );
    for (const text of ['', '.', '-', '1e', 'e5', 'nan', 'inf', '1.2.3', '0x10', '1_0', '1,5'])
      expect(read(text)).toBeNaN();
    expect(read('+.5e-1')).toBe(0.05);
  });
});

describe('OBJ', () => {
  const CUBE = `v 0 0 0\nv 1 0 0\nv 1 1 0\nv 0 1 0\nv 0 0 1\nv 1 0 1\nv 1 1 1\nv 0 1 1\n`;
  const QUADS = ['4 3 2 1', '5 6 7 8', '1 2 6 5', '2 3 7 6', '3 4 8 7', '4 1 5 8'];

  test('polygons, objects, groups, materials and continued lines', () => {
    const text = `${CUBE}o cube\n${QUADS.slice(0, 2)
      .map((q) => `f ${q}\n`)
      .join('')}g the side walls\nusemtl Glass.01\nf 1 2 \\\n 6 5\nf 2 3 7 6\nusemtl others\nf 3 4 8 7\nf 4 1 5 8`;
    const read = obj(text);
    expect(read.faults).toEqual([]);
    const facets = read.mesh.finish();
    expect(facets.groups).toEqual(['cube', 'the-side-walls']);
    expect(mustClose(facets).volume).toBeCloseTo(1, 12);
    expect(obj(text, 'material').mesh.finish().groups).toEqual(['surface', 'Glass-01', 'group-others']);
  });

  test('a polygon that is not convex keeps its area', () => {
    // An L of area 3, as both ends of a prism of height 2.
    const outline = [
      [0, 0],
      [2, 0],
      [2, 1],
      [1, 1],
      [1, 2],
      [0, 2],
    ];
    const vertices = [0, 2].flatMap((z) => outline.map(([x, y]) => `v ${x} ${y} ${z}\n`)).join('');
    const sides = outline.map((_, i) => `f ${i + 1} ${((i + 1) % 6) + 1} ${((i + 1) % 6) + 7} ${i + 7}\n`).join('');
    const { mesh } = obj(`${vertices}f 6 5 4 3 2 1\nf 7 8 9 10 11 12\n${sides}`);
    const closed = mustClose(mesh.finish());
    expect(closed.volume).toBeCloseTo(6, 12);
    expect(closed.area).toBeCloseTo(6 + 8 * 2, 12);
  });

  test.each([
    ['f 1 2 9', 'no vertex of this number', 9, 7],
    ['f 1 2 -9', 'no vertex of this number', 9, 7],
    ['f 1 2 x', 'no vertex of this number', 9, 7],
    ['f 1 2 0', 'no vertex of this number', 9, 7],
    ['f 1 2', 'three corners', 9, 6],
    ['v 1 2', 'not a number', 9, 6],
    ['v 1 nan 3', 'not a number', 9, 5],
    ['v 1e308 1e308 0', 'not a place', 9, 3],
    ['surf 0 1 0 1 1 2', 'free-form', 9, 1],
    ['', 'no polygon', 9, 1],
  ])('%j is told with its place', (line, problem, atLine, column) => {
    const { faults } = obj(`${CUBE}${line}`);
    expect(faults[0]).toMatchObject({ problem: expect.stringContaining(problem), line: atLine, column });
  });
});

describe('STL', () => {
  const box = boxFacets([1, 2, 3]);

  test('a binary file cut in half, too long, with a huge count, or of a few bytes', () => {
    const whole = binaryStl(box);
    const huge = whole.slice();
    new DataView(huge.buffer).setUint32(80, 0xffffffff, true);
    for (const [data, problem] of [
      [whole.subarray(0, whole.length / 2), 'cut off'],
      [huge, 'cut off'],
      [new Uint8Array(whole.length + 1), 'longer'],
      [whole.subarray(0, 50), 'ends within the heading'],
      [new Uint8Array(0), 'ends within the heading'],
    ] as const) {
      const { faults } = stl(data);
      expect(faults).toHaveLength(1);
      expect(faults[0].problem).toContain(problem);
    }
  });

  test('a text cut in half at any place is refused', () => {
    const text = textStl(box).trimEnd();
    // Past the last "endsolid" nothing is missing but the name.
    for (let length = 6; length < text.lastIndexOf('endsolid') + 7; length += 13) {
      const { mesh, faults } = stl(bytes(text.slice(0, length)));
      if (faults.length > 0) continue;
      // Cut between two solids: what is left is whole, but open.
      const closing = closeMesh(mesh.finish(), { turnInsideOut: false, crease: null });
      expect(closing.ok, `${length}`).toBe(false);
    }
  });

  test('NaN, infinity and 1e308', () => {
    for (const value of [Number.NaN, Number.POSITIVE_INFINITY, 1e38]) {
      const data = binaryStl(box);
      new DataView(data.buffer).setFloat32(84 + 50 * 3 + 12, value, true);
      expect(stl(data).faults[0]).toMatchObject({
        code: 'range',
        problem: 'corner 1 of facet 4, at byte 246, is not a place',
      });
    }
    expect(stl(bytes(textStl(box).replace('vertex', 'vertex 1e308'))).faults[0].problem).toBe('this is not a place');
    expect(stl(bytes(textStl(box).replace('vertex', 'vertex nan'))).faults[0]).toMatchObject({ line: 4, column: 14 });
  });

  test('any bytes at all give a mesh or a fault, never an error', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          fc.uint8Array({ maxLength: 400 }),
          fc.string({ maxLength: 200 }).map((s) => bytes(`solid ${s}`)),
        ),
        (data) => {
          for (const { mesh, faults } of [stl(data), readObj(data, 1, 0, 'group')]) {
            if (faults.length === 0) expect(mesh.finish().corners.length).toBe(3 * mesh.facets);
          }
        },
      ),
      { numRuns: 300 },
    );
  });

  test('names of groups become names of faces', () => {
    expect(['', ' ', '--', 'Oberseite links', '7up', 'a.b', 'others', 'été'].map(groupName)).toEqual([
      'surface',
      'surface',
      'surface',
      'Oberseite-links',
      'group-7up',
      'a-b',
      'group-others',
      'été',
    ]);
  });
});
