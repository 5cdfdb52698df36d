/** Thin films by summing echoes, film by film (Airy 1833; Rouard 1937; Born & Wolf §1.6.4 eqs (55), (56)): no matrices, unlike the tracer. */

/** n − ik and thickness, in the order light meets them. */
export type Film = readonly [n: number, k: number, thicknessNm: number];
export type Complex = readonly [number, number];

const add = ([a, b]: Complex, [x, y]: Complex): Complex => [a + x, b + y];
const subtract = ([a, b]: Complex, [x, y]: Complex): Complex => [a - x, b - y];
const times = ([a, b]: Complex, [x, y]: Complex): Complex => [a * x - b * y, a * y + b * x];
const over = (p: Complex, [x, y]: Complex): Complex => times(p, [x / (x * x + y * y), -y / (x * x + y * y)]);
const size2 = ([a, b]: Complex): number => a * a + b * b;
/** The root that decays into the film. */
function decaying([a, b]: Complex): Complex {
  const size = Math.hypot(a, b);
  return [Math.sqrt(Math.max(0, (size + a) / 2)), -Math.sqrt(Math.max(0, (size - a) / 2))];
}

/** Shares of one polarisation, and amplitudes of the electric field along the films. */
export interface FilmResponse {
  readonly reflectance: number;
  readonly transmittance: number;
  readonly r: Complex;
  readonly t: Complex;
}

/** Unpolarised reflectance and transmittance of films between transparent media. @param angle in the first medium, rad */
export function filmShares(
  films: readonly Film[],
  n0: number,
  n1: number,
  angle: number,
  wavelengthNm: number,
): { reflectance: number; transmittance: number } {
  const s = filmResponse(films, n0, n1, angle, wavelengthNm, 's');
  const p = filmResponse(films, n0, n1, angle, wavelengthNm, 'p');
  return {
    reflectance: (s.reflectance + p.reflectance) / 2,
    transmittance: (s.transmittance + p.transmittance) / 2,
  };
}

/** One polarisation of `filmShares`. */
export function filmResponse(
  films: readonly Film[],
  n0: number,
  n1: number,
  angle: number,
  wavelengthNm: number,
  polarisation: 's' | 'p',
): FilmResponse {
  const beta2 = (n0 * Math.sin(angle)) ** 2;
  const layers: Film[] = [[n0, 0, 0], ...films, [n1, 0, 0]];
  const squares = layers.map(([n, k]): Complex => [n * n - k * k, -2 * n * k]);
  const normals = squares.map((square) => decaying(subtract(square, [beta2, 0])));
  const admittance = normals.map((normal, i) => (polarisation === 's' ? normal : over(squares[i], normal)));
  let r: Complex = [0, 0];
  let t: Complex = [1, 0];
  for (let i = layers.length - 2; i >= 0; i--) {
    const sum = add(admittance[i], admittance[i + 1]);
    const bare = over(subtract(admittance[i], admittance[i + 1]), sum);
    const into = over(times([2, 0], admittance[i]), sum);
    const [u, w] = normals[i + 1];
    const turn = (2 * Math.PI * layers[i + 1][2]) / wavelengthNm;
    // exp(−iδ) once through the film beyond; the echo goes through it twice.
    const fade = Math.exp(w * turn);
    const once: Complex = [fade * Math.cos(u * turn), -fade * Math.sin(u * turn)];
    const echo = times(times(once, once), r);
    const all = add([1, 0], times(bare, echo));
    t = over(times(times(into, once), t), all);
    r = over(add(bare, echo), all);
  }
  const last = admittance[admittance.length - 1][0];
  return { reflectance: size2(r), transmittance: (size2(t) * last) / admittance[0][0], r, t };
}
