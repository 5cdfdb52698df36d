/** Powers of the base dimensions: length, mass, time, amount, temperature, angle, luminous flux. */
export type Dimension = readonly [
  length: number,
  mass: number,
  time: number,
  amount: number,
  temperature: number,
  angle: number,
  luminousFlux: number,
];

export const PLAIN: Dimension = [0, 0, 0, 0, 0, 0, 0];

/** The dimension of a·bᵖᵒʷᵉʳ. */
export const timesPower = (a: Dimension, b: Dimension, power: number): Dimension =>
  a.map((exponent, i) => exponent + power * b[i]) as unknown as Dimension;

export const sameDimension = (a: Dimension, b: Dimension): boolean => a.every((exponent, i) => exponent === b[i]);

const SI_SYMBOLS = ['m', 'kg', 's', 'mol', 'K', 'rad', 'lm'];

/** A dimension written in SI units, for what has no name of its own: 'kg m⁻¹ s⁻²'. */
export function writeDimension(dimension: Dimension): string {
  const written = dimension.flatMap((exponent, i) => {
    if (exponent === 0) return [];
    return exponent === 1 ? SI_SYMBOLS[i] : `${SI_SYMBOLS[i]}^${exponent}`;
  });
  return written.length === 0 ? 'a plain number' : written.join(' ');
}
