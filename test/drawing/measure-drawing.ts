/** What a skin of triangles measures, by textbook sums over its corners. */
import type { DrawnFace, DrawnPart } from '../../src/record/drawing.js';

export type Point = readonly [number, number, number];

export function trianglesOf({ triangles }: Pick<DrawnFace, 'triangles'>): (readonly [Point, Point, Point])[] {
  const corner = (at: number): Point => [triangles[at], triangles[at + 1], triangles[at + 2]];
  return Array.from({ length: triangles.length / 9 }, (_, i) => [corner(9 * i), corner(9 * i + 3), corner(9 * i + 6)]);
}

/** Half the cross product of two sides. */
export function areaVector([a, b, c]: readonly [Point, Point, Point]): Point {
  const [p, q] = [
    [b[0] - a[0], b[1] - a[1], b[2] - a[2]],
    [c[0] - a[0], c[1] - a[1], c[2] - a[2]],
  ];
  return [(p[1] * q[2] - p[2] * q[1]) / 2, (p[2] * q[0] - p[0] * q[2]) / 2, (p[0] * q[1] - p[1] * q[0]) / 2];
}

export function faceArea(face: Pick<DrawnFace, 'triangles'>): number {
  return trianglesOf(face).reduce((sum, triangle) => sum + Math.hypot(...areaVector(triangle)), 0);
}

/** Zero for a closed skin, by the divergence theorem for constant fields. */
export function vectorAreaOf({ faces }: DrawnPart): Point {
  return faces.flatMap(trianglesOf).reduce<Point>(
    (sum, triangle) => {
      const area = areaVector(triangle);
      return [sum[0] + area[0], sum[1] + area[1], sum[2] + area[2]];
    },
    [0, 0, 0],
  );
}

/** Volume inside a closed skin: a sixth of the sum of a · (b × c), the divergence theorem for the field r/3. */
export function volumeOf({ faces }: DrawnPart): number {
  return faces.flatMap(trianglesOf).reduce((sum, triangle) => {
    const [a] = triangle;
    const area = areaVector(triangle);
    return sum + (a[0] * area[0] + a[1] * area[1] + a[2] * area[2]) / 3;
  }, 0);
}
