/** Closed view factors, Siegel & Howell, Thermal Radiation Heat Transfer, appendix; numbers of Howell's public catalogue. */

/** Coaxial parallel discs, radii over distance (C-41). */
export function coaxialDiscs(r1: number, r2: number): number {
  const x = 1 + (1 + r2 * r2) / (r1 * r1);
  return (x - Math.sqrt(x * x - 4 * (r2 / r1) ** 2)) / 2;
}

/** Equal aligned parallel rectangles, sides over distance (C-11). */
export function parallelRectangles(x: number, y: number): number {
  const [a, b] = [1 + x * x, 1 + y * y];
  const sum =
    Math.log(Math.sqrt((a * b) / (a + y * y))) +
    x * Math.sqrt(b) * Math.atan(x / Math.sqrt(b)) +
    y * Math.sqrt(a) * Math.atan(y / Math.sqrt(a)) -
    x * Math.atan(x) -
    y * Math.atan(y);
  return (2 * sum) / (Math.PI * x * y);
}

/** From a rectangle w × l to one of height h at right angles that shares the edge l; h and w over l (C-14). */
export function perpendicularRectangles(h: number, w: number): number {
  const [h2, w2] = [h * h, w * w];
  const all = 1 + h2 + w2;
  const product =
    (((1 + w2) * (1 + h2)) / all) *
    ((w2 * all) / ((1 + w2) * (w2 + h2))) ** w2 *
    ((h2 * all) / ((1 + h2) * (h2 + w2))) ** h2;
  const root = Math.sqrt(h2 + w2);
  return (
    (w * Math.atan(1 / w) + h * Math.atan(1 / h) - root * Math.atan(1 / root) + Math.log(product) / 4) / (Math.PI * w)
  );
}
