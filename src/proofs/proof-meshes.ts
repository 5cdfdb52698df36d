/** Triangle meshes by formula, for proofs. */
import type { ShapeDescription, Vector3 } from '../design/description.js';
import { closeMesh } from '../numerics/mesh/close-mesh.js';

/** An octahedron along the axes, its facets parted in four `level` times; corners moved out to where `place` puts them. */
export function partedOctahedron(level: number, place: (corner: Vector3) => Vector3): ShapeDescription {
  const steps = 2 ** level;
  const points: Vector3[] = [];
  const known = new Map<string, number>();
  const point = (x: number, y: number, z: number): number => {
    const key = `${x} ${y} ${z}`;
    const number = known.get(key) ?? points.length;
    if (number === points.length) {
      known.set(key, number);
      points.push(place([x / steps, y / steps, z / steps]));
    }
    return number;
  };
  const facets: Vector3[] = [];
  for (const sx of [1, -1]) {
    for (const sy of [1, -1]) {
      for (const sz of [1, -1]) {
        const at = (i: number, j: number) => point(sx * i, sy * j, sz * (steps - i - j));
        // An odd number of mirrors turns a facet over.
        const add = (a: number, b: number, c: number) => facets.push(sx * sy * sz > 0 ? [a, b, c] : [a, c, b]);
        for (let i = 0; i < steps; i++) {
          for (let j = 0; i + j < steps; j++) {
            add(at(i, j), at(i + 1, j), at(i, j + 1));
            if (i + j + 1 < steps) add(at(i + 1, j), at(i + 1, j + 1), at(i, j + 1));
          }
        }
      }
    }
  }
  return closed(points, facets);
}

/** Cubes one in the other, given by their sides; every other one is hollow. The faces are named surface, shell-2, … */
export function nestedCubes(sides: readonly number[]): ShapeDescription {
  const quads = [
    [0, 4, 6, 2],
    [1, 3, 7, 5],
    [0, 1, 5, 4],
    [2, 6, 7, 3],
    [0, 2, 3, 1],
    [4, 5, 7, 6],
  ];
  const points = sides.flatMap((side) =>
    Array.from({ length: 8 }, (_, i): Vector3 => {
      const half = side / 2;
      return [i & 1 ? half : -half, i & 2 ? half : -half, i & 4 ? half : -half];
    }),
  );
  const facets = sides.flatMap((_, k) =>
    quads.flatMap(([a, b, c, d]): Vector3[] => {
      const n = 8 * k;
      return k % 2 === 0
        ? [
            [n + a, n + b, n + c],
            [n + a, n + c, n + d],
          ]
        : [
            [n + a, n + c, n + b],
            [n + a, n + d, n + c],
          ];
    }),
  );
  const names = sides.map((_, k) => (k === 0 ? 'surface' : `shell-${k + 1}`));
  return closed(
    points,
    facets,
    names,
    facets.map((_, i) => Math.floor(i / 12)),
  );
}

function closed(
  points: readonly Vector3[],
  facets: readonly Vector3[],
  groups: readonly string[] = ['surface'],
  group: readonly number[] = facets.map(() => 0),
): ShapeDescription {
  const closing = closeMesh(
    {
      points: Float64Array.from(points.flat()),
      corners: Int32Array.from(facets.flat()),
      group: Int32Array.from(group),
      groups,
    },
    { turnInsideOut: false, crease: null },
  );
  if (!closing.ok) throw new Error('a mesh of a proof is not closed');
  return { kind: 'mesh', mesh: closing.mesh };
}
