import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Drawing } from '../../src/record/drawing.js';
import { lightNm } from '../../src/report/view/light-index.js';
import { packDrawing } from '../../src/report/view/pack-drawing.js';
import { unpackDrawing } from '../../src/report/view/unpack-drawing.js';
import { boxDrawing } from './box-drawing.js';

/** Through text and back, as the page carries it. */
const opened = (drawing: Drawing) => unpackDrawing(JSON.parse(JSON.stringify(packDrawing(drawing))));

describe('a drawing packed for the page', () => {
  it('opens to the same faces, edges and paths within half a cell of its grid', () => {
    const length = fc.double({ min: 0.01, max: 500, noNaN: true });
    fc.assert(
      fc.property(fc.tuple(length, length, length), fc.integer({ min: 0, max: 20 }), (size, paths) => {
        const drawing = boxDrawing(size, paths);
        const { step } = packDrawing(drawing);
        const open = opened(drawing);
        const near = (a: number, b: number) =>
          expect(Math.abs(a - b)).toBeLessThanOrEqual(0.51 * step + 1e-4 * Math.abs(b));
        drawing.parts.forEach((part, i) => {
          part.faces.forEach((face, j) => {
            const back = open.parts[i].faces[j];
            expect(back).toMatchObject({ name: face.name, finish: face.finish, isExit: face.isExit });
            for (const [k, value] of face.edges.entries()) near(back.outline[k], value);
            // Thinner than the grid: nothing is left of it.
            if (back.corners.length < face.triangles.length / 3) return;
            expect(back.corners.length).toBe(face.triangles.length / 3);
            back.corners.forEach((corner, k) => {
              for (let axis = 0; axis < 3; axis++) {
                near(back.positions[3 * corner + axis], face.triangles[3 * k + axis]);
                expect(back.normals[3 * corner + axis]).toBeCloseTo(face.normals[3 * k + axis], 2);
              }
            });
          });
        });
        expect(open.paths.length).toBe(drawing.paths.length);
      }),
      { numRuns: 30 },
    );
  });

  it('keeps corners counterclockwise seen from outside', () => {
    for (const { positions, normals, corners } of opened(boxDrawing()).parts.flatMap(({ faces }) => faces)) {
      for (let t = 0; t < corners.length; t += 3) {
        const [a, b, c] = [0, 1, 2].map((k) => positions.subarray(3 * corners[t + k], 3 * corners[t + k] + 3));
        const [u, v] = [b.map((value, i) => value - a[i]), c.map((value, i) => value - a[i])];
        const n = [u[1] * v[2] - u[2] * v[1], u[2] * v[0] - u[0] * v[2], u[0] * v[1] - u[1] * v[0]];
        expect(n[0] * normals[0] + n[1] * normals[1] + n[2] * normals[2]).toBeGreaterThan(0);
      }
    }
  });

  it('keeps how each path ended, its light within 1 nm and where the pump light stops', () => {
    const drawing = boxDrawing();
    const open = opened(drawing);
    const told = open.paths.map(({ fate, lights, pumpSegments }) => ({
      end: [open.fates[fate].fate, open.fates[fate].light, open.fates[fate].where].join(),
      pumpSegments,
      nm: lightNm(lights[lights.length - 1]),
    }));
    const wanted = drawing.paths.map(({ end, wavelengthsNm, pumpSegments }) => ({
      end: [end.fate, end.light, end.where].join(),
      pumpSegments,
      nm: wavelengthsNm[wavelengthsNm.length - 1],
    }));
    const byEnd = (a: { end: string; nm: number }, b: { end: string; nm: number }) =>
      a.end.localeCompare(b.end) || a.nm - b.nm;
    told.sort(byEnd);
    wanted.sort(byEnd);
    told.forEach(({ end, nm, pumpSegments }, i) => {
      expect([end, pumpSegments]).toEqual([wanted[i].end, wanted[i].pumpSegments]);
      expect(Math.abs(nm - wanted[i].nm)).toBeLessThanOrEqual(1);
    });
  });

  it('lets the fates take turns, so that the first paths hold one of each', () => {
    const { fates, paths } = opened(boxDrawing());
    expect(new Set(paths.slice(0, fates.length).map(({ fate }) => fate)).size).toBe(fates.length);
    fates.forEach((fate, i) => {
      expect(fate.paths).toBe(paths.filter((path) => path.fate === i).length);
    });
  });

  it('ends light that leaves close by, on its own straight line', () => {
    const drawing = boxDrawing([20, 8, 8], 8);
    const far = drawing.paths[0];
    const out = opened(drawing).paths.find(({ fate, points }) => fate === 0 && 3 * points === far.points.length);
    const n = far.points.length;
    const given = far.points.slice(n - 3).map((value, i) => value - far.points[n - 6 + i]);
    const kept = [0, 1, 2].map((i) => (out?.way[n - 3 + i] ?? 0) - (out?.way[n - 6 + i] ?? 0));
    const share = kept[2] / given[2];
    expect(share).toBeGreaterThan(0);
    expect(share).toBeLessThan(0.05);
    expect(kept[2]).toBeLessThan(10);
    expect(kept[0]).toBeCloseTo(share * given[0], 2);
    expect(kept[1]).toBeCloseTo(share * given[1], 2);
  });

  it('keeps a fine grid though a path runs off to the horizon by way of a turn there', () => {
    const drawing = boxDrawing([20, 8, 8], 8);
    const paths = drawing.paths.map((path) => ({
      ...path,
      points: [...path.points, 3e5, 2e5, 1e5, 3.1e5, 2e5, 1e5],
      wavelengthsNm: [...path.wavelengthsNm, 500, 500],
    }));
    const { step } = packDrawing({ ...drawing, paths });
    expect(step).toBeLessThan(0.002);
    const open = opened({ ...drawing, paths });
    for (const { way, lights, points } of open.paths) {
      expect(lights.length).toBe(points - 1);
      expect(Math.max(...way.map(Math.abs))).toBeLessThan(60);
    }
  });

  it('makes a mesh that is too fine coarser, and holds its size', () => {
    const fine = ball(10, 300);
    const base = boxDrawing([20, 20, 20], 0);
    const [cell] = base.parts;
    const drawing = { ...base, parts: [{ ...cell, faces: [{ ...cell.faces[0], ...fine }] }] };
    expect(fine.triangles.length / 9).toBeGreaterThan(100_000);
    const packed = packDrawing(drawing);
    const triangles = packed.parts[0].faces[0].triangles;
    expect(triangles).toBeGreaterThan(1000);
    expect(triangles).toBeLessThanOrEqual(16_000);
    const { positions } = unpackDrawing(packed).parts[0].faces[0];
    for (let i = 0; i < positions.length; i += 3) {
      expect(Math.abs(Math.hypot(...positions.subarray(i, i + 3)) - 10)).toBeLessThan(0.6);
    }
    expect(JSON.stringify(packed).length).toBeLessThan(600_000);
  });
});

/** A ball of 2·n² triangles with its own normals. */
function ball(radius: number, n: number): { triangles: number[]; normals: number[]; edges: number[] } {
  const at = (i: number, j: number) => {
    const [theta, phi] = [(Math.PI * i) / n, (2 * Math.PI * j) / n];
    return [Math.sin(theta) * Math.cos(phi), Math.sin(theta) * Math.sin(phi), Math.cos(theta)];
  };
  const normals: number[] = [];
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      for (const [a, b] of [
        [0, 0],
        [1, 0],
        [1, 1],
        [0, 0],
        [1, 1],
        [0, 1],
      ])
        normals.push(...at(i + a, j + b));
    }
  }
  return { triangles: normals.map((value) => radius * value), normals, edges: [] };
}
