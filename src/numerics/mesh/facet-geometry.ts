/** Normals, areas and volumes of facets. */

/** Vector area of a facet (half the cross product of its edges), into `out` [0..2]. */
export function facetVector(points: Float64Array, corners: Int32Array, facet: number, out: Float64Array): void {
  const a = 3 * corners[3 * facet];
  const b = 3 * corners[3 * facet + 1];
  const c = 3 * corners[3 * facet + 2];
  const ux = points[b] - points[a];
  const uy = points[b + 1] - points[a + 1];
  const uz = points[b + 2] - points[a + 2];
  const vx = points[c] - points[a];
  const vy = points[c + 1] - points[a + 1];
  const vz = points[c + 2] - points[a + 2];
  out[0] = 0.5 * (uy * vz - uz * vy);
  out[1] = 0.5 * (uz * vx - ux * vz);
  out[2] = 0.5 * (ux * vy - uy * vx);
}

/** Volume between a facet and the point `from`, positive when the facet looks away from it. */
export function facetVolume(points: Float64Array, corners: Int32Array, facet: number, from: ArrayLike<number>): number {
  const vector = scratch;
  facetVector(points, corners, facet, vector);
  const a = 3 * corners[3 * facet];
  return (
    ((points[a] - from[0]) * vector[0] +
      (points[a + 1] - from[1]) * vector[1] +
      (points[a + 2] - from[2]) * vector[2]) /
    3
  );
}

const scratch = new Float64Array(3);

/** Square of the distance from the point p [0..2] to a facet (Ericson, Real-Time Collision Detection, 5.1.5). */
export function facetDistance2(points: Float64Array, corners: Int32Array, facet: number, p: Float64Array): number {
  const at = (k: number): [number, number, number] => {
    const i = 3 * corners[3 * facet + k];
    return [points[i], points[i + 1], points[i + 2]];
  };
  const minus = (u: readonly number[], v: readonly number[]) => [u[0] - v[0], u[1] - v[1], u[2] - v[2]];
  const dot = (u: readonly number[], v: readonly number[]) => u[0] * v[0] + u[1] * v[1] + u[2] * v[2];
  const [a, b, c] = [at(0), at(1), at(2)];
  const point = [p[0], p[1], p[2]];
  const [ab, ac, bc] = [minus(b, a), minus(c, a), minus(c, b)];
  const toEdge = (from: readonly number[], along: readonly number[]): number => {
    const square = dot(along, along);
    const share = square > 0 ? Math.max(0, Math.min(1, dot(minus(point, from), along) / square)) : 0;
    const gap = minus(
      point,
      from.map((value, i) => value + share * along[i]),
    );
    return dot(gap, gap);
  };
  const edges = Math.min(toEdge(a, ab), toEdge(a, ac), toEdge(b, bc));
  const n = [ab[1] * ac[2] - ab[2] * ac[1], ab[2] * ac[0] - ab[0] * ac[2], ab[0] * ac[1] - ab[1] * ac[0]];
  const n2 = dot(n, n);
  if (n2 === 0) return edges;
  const cross = (u: readonly number[], v: readonly number[]) => [
    u[1] * v[2] - u[2] * v[1],
    u[2] * v[0] - u[0] * v[2],
    u[0] * v[1] - u[1] * v[0],
  ];
  const ca = minus(a, c);
  const over =
    dot(cross(ab, minus(point, a)), n) >= 0 &&
    dot(cross(bc, minus(point, b)), n) >= 0 &&
    dot(cross(ca, minus(point, c)), n) >= 0;
  return over ? dot(minus(point, a), n) ** 2 / n2 : edges;
}
