/**
 * Lambert's W, the real solution w ≥ 0 of w eʷ = x for x ≥ 0, by Halley's iteration.
 * Corless, Gonnet, Hare, Jeffrey & Knuth, Adv. Comput. Math. 5 (1996) 329 (from memory).
 */
export function lambertW(x: number): number {
  let w = Math.log1p(x);
  for (let i = 0; i < 50; i++) {
    const e = Math.exp(w);
    const f = w * e - x;
    const step = f / (e * (w + 1) - ((w + 2) * f) / (2 * w + 2));
    w -= step;
    if (Math.abs(step) <= 1e-15 * Math.max(1, Math.abs(w))) break;
  }
  return w;
}
