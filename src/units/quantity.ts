/** A quantity: a number with a dimension, and the arithmetic on it. */
import { type Dimension, PLAIN, sameDimension, timesPower } from './quantity-dimension.js';
import { kindOf, QUANTITY_KINDS, type QuantityKindName } from './quantity-kinds.js';

/** `magnitude` × 10^`exponent` coherent SI units. */
export interface Quantity {
  readonly magnitude: number;
  readonly exponent: number;
  readonly dimension: Dimension;
  /** A reading of the Celsius scale, not a difference: it may not be doubled or added to another one. */
  readonly celsius: boolean;
}

export const plainNumber = (magnitude: number): Quantity => ({
  magnitude,
  exponent: 0,
  dimension: PLAIN,
  celsius: false,
});

/** × 10^power with a single rounding: powers of ten up to 10²² are exact doubles. */
const scaleByTen = (value: number, power: number): number => (power < 0 ? value / 10 ** -power : value * 10 ** power);

/** The number of base units of `kind`, or null when the quantity is of another dimension. */
export function quantityIn(quantity: Quantity, kind: QuantityKindName): number | null {
  const { dimension, exponent } = QUANTITY_KINDS[kind];
  if (!sameDimension(quantity.dimension, dimension)) return null;
  return scaleByTen(quantity.magnitude, quantity.exponent - exponent);
}

/** The number of base units of the quantity's own dimension (mm, rad, W, …); coherent SI units where it has no name. */
export function inOwnUnit(quantity: Quantity): number {
  const kind = kindOf(quantity.dimension);
  const value = kind === null ? null : quantityIn(quantity, kind);
  return value ?? scaleByTen(quantity.magnitude, quantity.exponent);
}

/** a + sign·b, or null when their dimensions or scales do not allow it. */
export function addQuantities(a: Quantity, b: Quantity, sign: 1 | -1): Quantity | null {
  if (!sameDimension(a.dimension, b.dimension)) return null;
  if (b.celsius && !(a.celsius && sign === -1)) return null;
  const magnitude = a.magnitude + sign * scaleByTen(b.magnitude, b.exponent - a.exponent);
  return { ...a, magnitude, celsius: a.celsius && !b.celsius };
}

/** a·b for power 1, a/b for power −1. */
export const multiplyQuantities = (a: Quantity, b: Quantity, power: 1 | -1): Quantity => ({
  magnitude: power === 1 ? a.magnitude * b.magnitude : a.magnitude / b.magnitude,
  exponent: a.exponent + power * b.exponent,
  dimension: timesPower(a.dimension, b.dimension, power),
  celsius: false,
});
