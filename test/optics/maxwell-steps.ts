/** Plane waves in layers by stepping through the field equations: no matrices, no closed form of a layer. */
import type { FilmLayer } from '../../src/optics/thin-films.js';

type Complex = readonly [number, number];
const add = ([a, b]: Complex, [x, y]: Complex): Complex => [a + x, b + y];
const sub = ([a, b]: Complex, [x, y]: Complex): Complex => [a - x, b - y];
const mul = ([a, b]: Complex, [x, y]: Complex): Complex => [a * x - b * y, a * y + b * x];
const times = ([a, b]: Complex, f: number): Complex => [a * f, b * f];
const power = ([a, b]: Complex) => a * a + b * b;
const div = (p: Complex, q: Complex): Complex => times(mul(p, [q[0], -q[1]]), 1 / power(q));
const unit = (p: Complex): Complex => times(p, 1 / Math.sqrt(power(p)));
export const complex = { sub, power, unit };

const STEPS = 600;

/**
 * s: dE/dz = −ikH, dH/dz = −ik(N² − β²)E; p: dE/dz = −ik(1 − β²/N²)H, dH/dz = −ikN²E, with E and H tangential, N = n − ik (Born & Wolf §1.6.1).
 * Fourth-order Runge–Kutta from the far side; what is absorbed is the integral of the losses.
 */
export function throughLayers(layers: readonly FilmLayer[], n1: number, n2: number, cos: number, nm: number) {
  const beta2 = n1 * n1 * (1 - cos * cos);
  const out2 = n2 * n2 - beta2;
  const uOut: Complex = out2 > 0 ? [Math.sqrt(out2), 0] : [0, -Math.sqrt(-out2)];
  const uIn: Complex = [n1 * cos, 0];
  const one = (polarisation: 's' | 'p') => {
    const admittance = (u: Complex, n: number): Complex => (polarisation === 's' ? u : div([n * n, 0], u));
    const eIn = admittance(uIn, n1);
    const eOut = admittance(uOut, n2);
    let e: Complex = [1, 0];
    let h: Complex = eOut;
    let lost = 0;
    for (const { n, k, thicknessNm } of layers.toReversed()) {
      const square: Complex = [n * n - k * k, -2 * n * k];
      const inverse = div([1, 0], square);
      const a: Complex = polarisation === 's' ? [1, 0] : sub([1, 0], times(inverse, beta2));
      const b: Complex = polarisation === 's' ? sub(square, [beta2, 0]) : square;
      const step = (2 * Math.PI * thicknessNm) / nm / STEPS;
      // Towards the light: +ik instead of −ik.
      const slope = (x: Complex, y: Complex): readonly [Complex, Complex] => [
        mul([0, 1], mul(a, y)),
        mul([0, 1], mul(b, x)),
      ];
      // d(Re EH*)/dz = k (Im a |H|² + Im b |E|²), both negative signs of a loss.
      const loss = (x: Complex, y: Complex) => -(b[1] * power(x) + a[1] * power(y));
      for (let i = 0; i < STEPS; i++) {
        const [e1, h1] = slope(e, h);
        const middle1: Complex = add(e, times(e1, step / 2));
        const [e2, h2] = slope(middle1, add(h, times(h1, step / 2)));
        const middle2: Complex = add(e, times(e2, step / 2));
        const middleH: Complex = add(h, times(h2, step / 2));
        const [e3, h3] = slope(middle2, middleH);
        const [e4, h4] = slope(add(e, times(e3, step)), add(h, times(h3, step)));
        const before = loss(e, h);
        const between = loss(middle2, middleH);
        e = add(e, times(add(add(e1, times(e2, 2)), add(times(e3, 2), e4)), step / 6));
        h = add(h, times(add(add(h1, times(h2, 2)), add(times(h3, 2), h4)), step / 6));
        lost += ((before + 4 * between + loss(e, h)) * step) / 6;
      }
    }
    const up = mul(eIn, e);
    const incident = times(add(up, h), 0.5);
    const r = div(sub(up, h), add(up, h));
    const scale = eIn[0] / power(incident);
    // Powers over that of the wave that arrives, which is |(ηE + H)/2|²/η.
    // The tangential electric field is 1 behind the layers.
    const t = div(eIn, incident);
    return { r, t, reflectance: power(r), transmittance: out2 > 0 ? eOut[0] * scale : 0, absorbed: lost * scale };
  };
  return { s: one('s'), p: one('p') };
}
