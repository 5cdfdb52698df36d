/** A closed mesh where a part has put it. */
import type { ClosedMesh } from '../../numerics/mesh/close-mesh.js';
import { largestCoordinate, REACH } from '../../numerics/mesh/close-mesh.js';
import type { Matrix } from '../vector.js';

export interface PlacedMesh {
  readonly source: ClosedMesh;
  /** [point · 3], mm, in design coordinates. */
  readonly points: Float64Array;
}

/** Within this of a facet, rounding decides on which side of it a point lies, mm. */
export const meshReach = ({ points }: PlacedMesh): number => REACH * Math.max(1, largestCoordinate(points));

/** Rounding of quarter turns leaves 6e-17 where a 0 belongs. */
const snap = (c: number): number => (Math.abs(c) < 1e-15 ? 0 : c);

export function moveMesh(mesh: PlacedMesh, matrix: Matrix): PlacedMesh {
  // gl-matrix stores columns.
  const m = Array.from({ length: 16 }, (_, i) => (i < 12 ? snap(matrix[i]) : matrix[i]));
  const identity = m.every((value, i) => value === (i % 5 === 0 ? 1 : 0));
  if (identity) return mesh;
  const from = mesh.points;
  const points = new Float64Array(from.length);
  for (let i = 0; i < from.length; i += 3) {
    const x = from[i];
    const y = from[i + 1];
    const z = from[i + 2];
    points[i] = m[0] * x + m[4] * y + m[8] * z + m[12];
    points[i + 1] = m[1] * x + m[5] * y + m[9] * z + m[13];
    points[i + 2] = m[2] * x + m[6] * y + m[10] * z + m[14];
  }
  return { source: mesh.source, points };
}
