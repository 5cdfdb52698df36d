/** Triangles of a face brought onto a grid, equal corners joined and what has shrunk to nothing left out. */

export interface Welded {
  /** Cells of the grid, 3 a vertex. */
  readonly vertices: readonly number[];
  /** −127 to 127, 3 a vertex. */
  readonly normals: readonly number[];
  /** 3 a triangle. */
  readonly corners: readonly number[];
}

/**
 * @param cellsOf cell of a coordinate along an axis
 * @param coarse cells joined along each axis: 1 keeps the shape, more makes it coarser with fewer triangles
 */
export function weld(
  triangles: readonly number[],
  normals: readonly number[],
  cellOf: (value: number, axis: number) => number,
  coarse: number,
): Welded {
  const known = new Map<string, number>();
  const welded: { vertices: number[]; normals: number[]; corners: number[] } = {
    vertices: [],
    normals: [],
    corners: [],
  };
  const place = (value: number, axis: number) => Math.round(cellOf(value, axis) / coarse) * coarse;
  for (let i = 0; i + 9 <= triangles.length; i += 9) {
    const corners = [0, 3, 6].map((c) => [0, 1, 2].map((axis) => place(triangles[i + c + axis], axis)));
    const [a, b, c] = corners.map(String);
    if (a === b || b === c || c === a) continue;
    corners.forEach((at, corner) => {
      const n = [0, 1, 2].map((axis) => Math.round(127 * (normals[i + 3 * corner + axis] ?? 0)));
      // A coarse face has no fine normals either: corners are joined by place alone.
      const key = coarse === 1 ? `${at},${n}` : String(at);
      let index = known.get(key);
      if (index === undefined) {
        index = known.size;
        known.set(key, index);
        welded.vertices.push(...at);
        welded.normals.push(...n);
      }
      welded.corners.push(index);
    });
  }
  return welded;
}
