/** Holes, unions and overlaps against closed forms. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { PartDescription, PieceDescription, ShapeDescription, Vector3 } from '../../src/design/description.js';
import { drawDescription } from '../../src/drawing/draw-description.js';
import { FACETS_ROUND } from '../../src/drawing/facet-patch.js';
import type { DrawnPart } from '../../src/record/drawing.js';
import { beam, describeDesign, medium, part } from '../helpers/describe.js';
import { depthInside, shapeArbitrary } from '../helpers/random-pile.js';
import { areaVector, faceArea, trianglesOf, vectorAreaOf, volumeOf } from './measure-drawing.js';

const drawn = (...parts: PartDescription[]): readonly DrawnPart[] =>
  drawDescription(
    describeDesign({ media: [medium('glass', 1.5)], parts, pumps: [beam([0, 0, -50], [0, 0, 1])], exit: 'a.top' }),
  ).parts;
const faceOf = ({ faces }: DrawnPart, name: string) => {
  const face = faces.find((one) => one.name === name);
  if (face === undefined) throw new Error(`no face ${name}`);
  return face;
};
const piece = (
  name: string,
  shape: ShapeDescription,
  at: Vector3,
  minus: PieceDescription[] = [],
): PieceDescription => ({
  name,
  path: [],
  shape,
  at,
  turns: [],
  minus,
});
const union = (...pieces: PieceDescription[]): PartDescription => ({ ...part('a', pieces[0].shape, 'glass'), pieces });
const closed = (solid: DrawnPart) => expect(Math.hypot(...vectorAreaOf(solid))).toBeLessThan(1e-9);
/** A regular polygon of as many corners in a circle of radius 1. */
const POLYGON = (FACETS_ROUND / 2) * Math.sin((2 * Math.PI) / FACETS_ROUND);

// Meshes are drawn as they are and cut nothing.
const solid = shapeArbitrary.filter(({ kind }) => kind !== 'mesh');

describe('a body with a hole', () => {
  const box: ShapeDescription = { kind: 'box', size: [10, 10, 6] };

  it('box minus a cylinder right through: volume, open ends, walls that look in, rims', () => {
    const bore = { name: 'bore', shape: { kind: 'cylinder', radius: 2, height: 6 } as const };
    const [solid] = drawn(part('a', box, 'glass', { minus: [bore] }));
    closed(solid);
    expect(volumeOf(solid)).toBeCloseTo(600 - POLYGON * 4 * 6, 8);
    // The exact volume, 600 − π·2²·6, is missed by the shortfall of the polygon, 0.3 % of the hole.
    expect(Math.abs(volumeOf(solid) - (600 - 24 * Math.PI))).toBeLessThan(0.003 * 24 * Math.PI);
    expect(faceArea(faceOf(solid, 'a.top'))).toBeCloseTo(100 - 4 * POLYGON, 9);
    expect(faceArea(faceOf(solid, 'a.bore.top'))).toBe(0);
    for (const triangle of trianglesOf(faceOf(solid, 'a.bore.side'))) {
      const [x, y] = triangle[0];
      const [outX, outY] = areaVector(triangle);
      expect(outX * x + outY * y).toBeLessThan(0);
    }
    // Both rims of the hole belong to the wall and to the flat faces; the box keeps its own twelve edges.
    expect(faceOf(solid, 'a.top').edges.length / 6).toBe(4 + FACETS_ROUND);
    expect(faceOf(solid, 'a.bore.side').edges.length / 6).toBe(2 * FACETS_ROUND);
  });

  it('a blind hole keeps its floor; one within is a bubble; one outside takes nothing away', () => {
    const hole = (at: Vector3) => [{ name: 'hole', shape: { kind: 'box', size: [2, 2, 2] } as const, at }];
    const [blind] = drawn(part('a', box, 'glass', { minus: hole([0, 0, 2.5]) }));
    closed(blind);
    expect(volumeOf(blind)).toBeCloseTo(600 - 6, 9);
    expect(faceArea(faceOf(blind, 'a.hole.bottom'))).toBeCloseTo(4, 9);
    expect(faceArea(faceOf(blind, 'a.hole.front'))).toBeCloseTo(3, 9);
    const [bubble] = drawn(part('a', box, 'glass', { minus: hole([0, 0, 0]) }));
    expect(volumeOf(bubble)).toBeCloseTo(592, 9);
    const [away] = drawn(part('a', box, 'glass', { minus: hole([6, 0, 0]) }));
    expect(volumeOf(away)).toBeCloseTo(600, 9);
    expect(away.bounds[1][0]).toBe(5);
    expect(faceOf(away, 'a.right').triangles.length / 9).toBe(2);
  });

  it('a hole that takes an end away shortens the bounding box', () => {
    const end = [{ name: 'end', shape: { kind: 'box', size: [4, 20, 20] } as const, at: [5, 0, 0] as Vector3 }];
    const [solid] = drawn(part('a', box, 'glass', { minus: end }));
    closed(solid);
    expect(solid.bounds).toEqual([
      [-5, -5, -3],
      [3, 5, 3],
    ]);
    expect(faceOf(solid, 'a.right').triangles).toEqual([]);
  });

  it('two holes that meet open into each other', () => {
    const hole = (name: string, at: Vector3) => ({ name, shape: { kind: 'box', size: [2, 2, 6] } as const, at });
    for (const gap of [2, 1]) {
      const [solid] = drawn(part('a', box, 'glass', { minus: [hole('one', [0, 0, 0]), hole('two', [gap, 0, 0])] }));
      closed(solid);
      expect(volumeOf(solid)).toBeCloseTo(600 - 6 * 2 * (2 + gap), 9);
    }
  });

  it('random holes: closed, and the volume that points of a net (Halton 1960) find by what the shapes are', () => {
    const place = fc.integer({ min: -8, max: 8 }).map((c) => c / 4);
    fc.assert(
      fc.property(solid, solid, fc.tuple(place, place, place), (body, shape, at) => {
        const [solid] = drawn(part('a', body, 'glass', { minus: [{ name: 'hole', shape, at }] }));
        const [whole] = drawn(part('a', body, 'glass'));
        expect(Math.hypot(...vectorAreaOf(solid))).toBeLessThan(1e-6);
        // Halton's points of bases 2, 3, 5 in the bounding box; their error is below that of independent ones.
        const [low, high] = whole.bounds;
        const samples = 2000;
        let inside = 0;
        for (let k = 1; k <= samples; k++) {
          const p: Vector3 = [0, 1, 2].map(
            (axis) => low[axis] + halton(k, [2, 3, 5][axis]) * (high[axis] - low[axis]),
          ) as unknown as Vector3;
          const q: Vector3 = [p[0] - at[0], p[1] - at[1], p[2] - at[2]];
          if (depthInside(body, p) > 0 && depthInside(shape, q) < 0) inside++;
        }
        const boxVolume = low.reduce((product, from, axis) => product * (high[axis] - from), 1);
        const share = inside / samples;
        const error = boxVolume * (4 * Math.sqrt(Math.max(share * (1 - share), 1 / samples) / samples) + 0.012);
        expect(Math.abs(volumeOf(solid) - share * boxVolume)).toBeLessThan(error);
      }),
      { numRuns: 20 },
    );
  });
});

function halton(index: number, base: number): number {
  let [value, weight, rest] = [0, 1 / base, index];
  while (rest > 0) {
    value += weight * (rest % base);
    rest = Math.floor(rest / base);
    weight /= base;
  }
  return value;
}

describe('a union', () => {
  it('of a rim and a dome has no skin where they meet', () => {
    const [solid] = drawn(
      union(
        piece('rim', { kind: 'cylinder', radius: 13, height: 2 }, [0, 0, 0]),
        piece('crown', { kind: 'cap', radius: 13, height: 13 }, [0, 0, 7.5]),
      ),
    );
    closed(solid);
    expect(faceOf(solid, 'a.rim.top').triangles).toEqual([]);
    expect(faceOf(solid, 'a.crown.bottom').triangles).toEqual([]);
    const exact = Math.PI * 13 ** 2 * 2 + (2 / 3) * Math.PI * 13 ** 3;
    expect(volumeOf(solid) / exact).toBeGreaterThan(0.99);
    expect(volumeOf(solid) / exact).toBeLessThan(1);
  });

  it('of overlapping boxes, one with a hole the other fills in part', () => {
    const hole = piece('hole', { kind: 'box', size: [2, 2, 4] }, [0, 0, 0]);
    const [solid] = drawn(
      union(
        piece('plate', { kind: 'box', size: [8, 8, 4] }, [0, 0, 0], [hole]),
        piece('pin', { kind: 'box', size: [1, 1, 6] }, [0, 0, 0]),
        piece('arm', { kind: 'box', size: [4, 2, 2] }, [5, 0, 0]),
      ),
    );
    closed(solid);
    // Plate with its hole, the pin that stands free in it, the arm as far as it stands out of the plate.
    expect(volumeOf(solid)).toBeCloseTo(256 - 16 + 6 + 3 * 2 * 2, 9);
    expect(faceArea(faceOf(solid, 'a.plate.right'))).toBeCloseTo(32 - 4, 9);
  });
});

describe('parts that overlap', () => {
  it('the later one is drawn where both are; touching faces are both drawn', () => {
    const [tube, liquid, lid] = drawn(
      part('a', { kind: 'cylinder', radius: 5, height: 10 }, 'glass'),
      part('b', { kind: 'cylinder', radius: 4, height: 10 }, 'glass'),
      part('c', { kind: 'cylinder', radius: 5, height: 1 }, 'glass', { against: { face: 'a.top' } }),
    );
    expect(faceArea(faceOf(tube, 'a.top'))).toBeCloseTo(POLYGON * (25 - 16), 9);
    expect(faceArea(faceOf(liquid, 'b.top'))).toBeCloseTo(POLYGON * 16, 9);
    expect(faceArea(faceOf(lid, 'c.bottom'))).toBeCloseTo(POLYGON * 25, 9);
    expect(faceOf(tube, 'a.top').edges.length / 6).toBe(2 * FACETS_ROUND);
  });
});
