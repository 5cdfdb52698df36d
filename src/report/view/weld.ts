/** Triangles of a face brought onto a grid, equal corners joined and what has shrunk to nothing left out. */

export interface Welded {
  /** Cells of the grid, 3 a vertex. */
  readonly vertices: readonly number[];
  /** −127 to 127, 3 a vertex. */
  readonly normals: readonly number[];
  /** 3 a triangle. */
  readonly corners: readonly number[];
}

/** Cells along an axis. */
const CELLS = 65_535;

/**
 * @param cellOf cell of a coordinate along an axis, 0 to 65 535
 * @param coarse cells joined along each axis: 1 keeps the shape, more makes it coarser with fewer triangles
 */
export function weld(
  triangles: readonly number[],
  normals: readonly number[],
  cellOf: (value: number, axis: number) => number,
  coarse: number,
): Welded {
  const known = new Map<number | string, number>();
  const vertices: number[] = [];
  const directions: number[] = [];
  const corners: number[] = [];
  const at = new Float64Array(9);
  const place = (value: number, axis: number) =>
    Math.min(CELLS, Math.round(Math.round(cellOf(value, axis) / coarse) * coarse));
  const spot = (corner: number) => (at[corner] * (CELLS + 1) + at[corner + 1]) * (CELLS + 1) + at[corner + 2];
  for (let i = 0; i + 9 <= triangles.length; i += 9) {
    for (let k = 0; k < 9; k++) at[k] = place(triangles[i + k], k % 3);
    const [a, b, c] = [spot(0), spot(3), spot(6)];
    if (a === b || b === c || c === a) continue;
    for (let corner = 0; corner < 9; corner += 3) {
      const n = [0, 1, 2].map((axis) => Math.round(127 * (normals[i + corner + axis] ?? 0)));
      // A coarse face has no fine normals either: corners are joined by place alone.
      const key = coarse === 1 ? `${spot(corner)},${n}` : spot(corner);
      let index = known.get(key);
      if (index === undefined) {
        index = known.size;
        known.set(key, index);
        vertices.push(at[corner], at[corner + 1], at[corner + 2]);
        directions.push(...n);
      }
      corners.push(index);
    }
  }
  return { vertices, normals: directions, corners };
}
