/** The units a design may use, by symbol. */
import { type Dimension, PLAIN } from './quantity-dimension.js';

/**
 * One unit is `factor` × 10^`exponent` of the coherent SI unit (m, kg, s, mol, K, rad, lm, W). The power of ten is
 * kept apart so that 0.29 mm stays 0.29 mm: no digit is lost on the way to a decimal multiple of the same unit.
 */
export interface Unit {
  readonly dimension: Dimension;
  readonly factor: number;
  readonly exponent: number;
  /** °C: its zero is not that of the kelvin, SI Brochure (2019) section 2.3.1. */
  readonly zeroAtKelvin?: number;
}

const LENGTH: Dimension = [1, 0, 0, 0, 0, 0, 0];
const VOLUME: Dimension = [3, 0, 0, 0, 0, 0, 0];
const MASS: Dimension = [0, 1, 0, 0, 0, 0, 0];
const TIME: Dimension = [0, 0, 1, 0, 0, 0, 0];
const AMOUNT: Dimension = [0, 0, 0, 1, 0, 0, 0];
const TEMPERATURE: Dimension = [0, 0, 0, 0, 1, 0, 0];
const ANGLE: Dimension = [0, 0, 0, 0, 0, 1, 0];
const LUMINOUS_FLUX: Dimension = [0, 0, 0, 0, 0, 0, 1];
const POWER: Dimension = [2, 1, -3, 0, 0, 0, 0];
const ENERGY: Dimension = [2, 1, -2, 0, 0, 0, 0];

const unit = (dimension: Dimension, exponent: number, factor = 1): Unit => ({ dimension, exponent, factor });

const DEGREE = unit(ANGLE, 0, Math.PI / 180);

export const UNITS: ReadonlyMap<string, Unit> = new Map([
  ['nm', unit(LENGTH, -9)],
  ['µm', unit(LENGTH, -6)],
  ['um', unit(LENGTH, -6)],
  ['mm', unit(LENGTH, -3)],
  ['cm', unit(LENGTH, -2)],
  ['m', unit(LENGTH, 0)],
  ['L', unit(VOLUME, -3)],
  ['mL', unit(VOLUME, -6)],
  ['µL', unit(VOLUME, -9)],
  ['uL', unit(VOLUME, -9)],
  ['kg', unit(MASS, 0)],
  ['g', unit(MASS, -3)],
  ['mg', unit(MASS, -6)],
  ['µg', unit(MASS, -9)],
  ['ug', unit(MASS, -9)],
  ['s', unit(TIME, 0)],
  ['ms', unit(TIME, -3)],
  ['µs', unit(TIME, -6)],
  ['us', unit(TIME, -6)],
  ['ns', unit(TIME, -9)],
  ['min', unit(TIME, 0, 60)],
  ['h', unit(TIME, 0, 3600)],
  ['mol', unit(AMOUNT, 0)],
  ['mmol', unit(AMOUNT, -3)],
  ['µmol', unit(AMOUNT, -6)],
  ['umol', unit(AMOUNT, -6)],
  ['nmol', unit(AMOUNT, -9)],
  ['W', unit(POWER, 0)],
  ['mW', unit(POWER, -3)],
  ['kW', unit(POWER, 3)],
  ['J', unit(ENERGY, 0)],
  ['mJ', unit(ENERGY, -3)],
  ['rad', unit(ANGLE, 0)],
  ['mrad', unit(ANGLE, -3)],
  ['deg', DEGREE],
  ['°', DEGREE],
  ['%', unit(PLAIN, -2)],
  ['K', unit(TEMPERATURE, 0)],
  ['°C', { ...unit(TEMPERATURE, 0), zeroAtKelvin: 273.15 }],
  ['degC', { ...unit(TEMPERATURE, 0), zeroAtKelvin: 273.15 }],
  ['lm', unit(LUMINOUS_FLUX, 0)],
]);
