/** A polygon in space -> triangles, by cutting off ears (Meisters, Am. Math. Monthly 82 648, 1975). */

type Triple = readonly [number, number, number];

/** @param points [point · 3]; @param polygon numbers of its corners, in order round it */
export function partPolygon(points: Float64Array, polygon: Int32Array): Triple[] {
  const rest = [...polygon];
  // Seen along its mean normal (Newell), a sensible polygon does not cross itself.
  const normal = [0, 0, 0];
  rest.forEach((corner, i) => {
    const [p, q] = [3 * corner, 3 * rest[(i + 1) % rest.length]];
    for (let c = 0; c < 3; c++) {
      const [u, v] = [(c + 1) % 3, (c + 2) % 3];
      normal[c] += (points[p + u] - points[q + u]) * (points[p + v] + points[q + v]);
    }
  });
  const largest = normal.map(Math.abs).reduce((best, value, c, all) => (value > all[best] ? c : best), 0);
  const sign = Math.sign(normal[largest]);
  const [u, v] = [(largest + 1) % 3, (largest + 2) % 3];
  const turn = (a: number, b: number, c: number): number => {
    const [p, q, r] = [3 * a, 3 * b, 3 * c];
    const along = (points[q + u] - points[p + u]) * (points[r + v] - points[p + v]);
    const across = (points[q + v] - points[p + v]) * (points[r + u] - points[p + u]);
    return sign * (along - across);
  };
  const triangles: Triple[] = [];
  let tries = 0;
  for (let i = 0; rest.length > 3; ) {
    const n = rest.length;
    const [a, b, c] = [rest[i % n], rest[(i + 1) % n], rest[(i + 2) % n]];
    const isEar =
      turn(a, b, c) > 0 &&
      rest.every((p) => p === a || p === b || p === c || turn(a, b, p) < 0 || turn(b, c, p) < 0 || turn(c, a, p) < 0);
    // A polygon without ears is crossed or flat: it is cut anyhow, and the test for self-cuts will tell.
    if (isEar || tries > n) {
      triangles.push([a, b, c]);
      rest.splice((i + 1) % n, 1);
      tries = 0;
      i %= rest.length;
    } else {
      i++;
      tries++;
    }
  }
  triangles.push([rest[0], rest[1], rest[2]]);
  return triangles;
}
