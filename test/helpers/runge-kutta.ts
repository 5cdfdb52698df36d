/** Classical Runge–Kutta of order 4 with fixed steps, for tests: y' = f(y). */
export function rungeKutta(
  f: (y: readonly number[]) => readonly number[],
  start: readonly number[],
  until: number,
  steps: number,
): number[] {
  const h = until / steps;
  let y = [...start];
  const along = (k: readonly number[], part: number) => y.map((value, i) => value + part * h * k[i]);
  for (let step = 0; step < steps; step++) {
    const k1 = f(y);
    const k2 = f(along(k1, 0.5));
    const k3 = f(along(k2, 0.5));
    const k4 = f(along(k3, 1));
    y = y.map((value, i) => value + (h / 6) * (k1[i] + 2 * k2[i] + 2 * k3[i] + k4[i]));
  }
  return y;
}
