/** Meshes made by formula: boxes, icospheres, bumpy balls. */
import { type ClosedMesh, closeMesh, type MeshFacets } from '../../src/numerics/mesh/close-mesh.js';

type Point = readonly [number, number, number];

export function facetsOf(
  points: readonly Point[],
  facets: readonly Point[],
  groups: readonly string[] = ['surface'],
  group?: readonly number[],
): MeshFacets {
  return {
    points: Float64Array.from(points.flat()),
    corners: Int32Array.from(facets.flat()),
    group: Int32Array.from(group ?? facets.map(() => 0)),
    groups,
  };
}

/** Two triangles a side, named as the faces of a box. */
export function boxFacets([sx, sy, sz]: Point, at: Point = [0, 0, 0]): MeshFacets {
  const points = Array.from(
    { length: 8 },
    (_, i): Point => [at[0] + (i & 1 ? sx : -sx) / 2, at[1] + (i & 2 ? sy : -sy) / 2, at[2] + (i & 4 ? sz : -sz) / 2],
  );
  const quads = {
    left: [0, 4, 6, 2],
    right: [1, 3, 7, 5],
    front: [0, 1, 5, 4],
    back: [2, 6, 7, 3],
    bottom: [0, 2, 3, 1],
    top: [4, 5, 7, 6],
  };
  const sides = Object.values(quads);
  const facets = sides.flatMap(([a, b, c, d]): Point[] => [
    [a, b, c],
    [a, c, d],
  ]);
  return facetsOf(
    points,
    facets,
    Object.keys(quads),
    facets.map((_, i) => Math.floor(i / 2)),
  );
}

/** Icosahedron, each facet parted in four `level` times, corners on the sphere. */
export function icosphereFacets(radius: number, level: number): MeshFacets {
  const t = (1 + Math.sqrt(5)) / 2;
  const points: Point[] = [
    [-1, t, 0],
    [1, t, 0],
    [-1, -t, 0],
    [1, -t, 0],
    [0, -1, t],
    [0, 1, t],
    [0, -1, -t],
    [0, 1, -t],
    [t, 0, -1],
    [t, 0, 1],
    [-t, 0, -1],
    [-t, 0, 1],
  ];
  let facets: Point[] = [
    [0, 11, 5],
    [0, 5, 1],
    [0, 1, 7],
    [0, 7, 10],
    [0, 10, 11],
    [1, 5, 9],
    [5, 11, 4],
    [11, 10, 2],
    [10, 7, 6],
    [7, 1, 8],
    [3, 9, 4],
    [3, 4, 2],
    [3, 2, 6],
    [3, 6, 8],
    [3, 8, 9],
    [4, 9, 5],
    [2, 4, 11],
    [6, 2, 10],
    [8, 6, 7],
    [9, 8, 1],
  ];
  for (let step = 0; step < level; step++) {
    const middles = new Map<string, number>();
    const middle = (a: number, b: number): number => {
      const key = a < b ? `${a} ${b}` : `${b} ${a}`;
      const known = middles.get(key);
      if (known !== undefined) return known;
      // On the sphere at once: the level after next starts from there.
      const [p, q] = [onSphere(points[a]), onSphere(points[b])];
      points.push([p[0] + q[0], p[1] + q[1], p[2] + q[2]]);
      middles.set(key, points.length - 1);
      return points.length - 1;
    };
    facets = facets.flatMap(([a, b, c]): Point[] => {
      const [ab, bc, ca] = [middle(a, b), middle(b, c), middle(c, a)];
      return [
        [a, ab, ca],
        [b, bc, ab],
        [c, ca, bc],
        [ab, bc, ca],
      ];
    });
  }
  return facetsOf(
    points.map((p) => onSphere(p).map((c) => c * radius) as unknown as Point),
    facets,
  );
}

function onSphere(p: Point): Point {
  const norm = Math.hypot(...p);
  return [p[0] / norm, p[1] / norm, p[2] / norm];
}

/** A ball with bumps and hollows: not convex, never cuts itself (its radius is a function of direction). */
export function bumpyFacets(radius: number, level: number, bumps = 0.3, pitch = 3): MeshFacets {
  const ball = icosphereFacets(1, level);
  const points = ball.points.slice();
  for (let i = 0; i < points.length; i += 3) {
    const [x, y, z] = points.subarray(i, i + 3);
    const stretch =
      radius * (1 + bumps * Math.sin(pitch * x + 1) * Math.sin(pitch * y - 0.5) * Math.sin(pitch * z + 2));
    for (let c = 0; c < 3; c++) points[i + c] *= stretch;
  }
  return { ...ball, points };
}

/** Several meshes as one, groups kept. */
export function joinFacets(...all: readonly MeshFacets[]): MeshFacets {
  const groups = [...new Set(all.flatMap((each) => each.groups))];
  const points: number[] = [];
  const corners: number[] = [];
  const group: number[] = [];
  for (const each of all) {
    const from = points.length / 3;
    for (const c of each.corners) corners.push(c + from);
    for (const g of each.group) group.push(groups.indexOf(each.groups[g]));
    for (const p of each.points) points.push(p);
  }
  return {
    points: Float64Array.from(points),
    corners: Int32Array.from(corners),
    group: Int32Array.from(group),
    groups,
  };
}

export function turned(facets: MeshFacets): MeshFacets {
  const corners = facets.corners.slice();
  for (let i = 0; i < corners.length; i += 3) [corners[i + 1], corners[i + 2]] = [corners[i + 2], corners[i + 1]];
  return { ...facets, corners };
}

export function mustClose(facets: MeshFacets, crease: number | null = null): ClosedMesh {
  const closing = closeMesh(facets, { turnInsideOut: false, crease });
  if (!closing.ok) throw new Error(JSON.stringify(closing.problems));
  return closing.mesh;
}
