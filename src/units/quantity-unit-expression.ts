/**
 * Reads what follows a number: a unit written without spaces ('mm', 'W/cm²', '/cm', 'L/mol/cm', 'L/(mol cm)').
 * Inside parentheses a space multiplies. A slash or star that is not followed by a unit is left for the arithmetic.
 */

import { nearestName } from './nearest-name.js';
import { type Dimension, PLAIN, timesPower } from './quantity-dimension.js';
import { QuantityError } from './quantity-fault.js';
import { UNITS } from './quantity-units.js';

export interface UnitExpression {
  readonly dimension: Dimension;
  readonly factor: number;
  readonly exponent: number;
  /** 273.15 for a lone °C, else null. */
  readonly zeroAtKelvin: number | null;
  /** Index of the first character after the unit. */
  readonly end: number;
}

const SYMBOL = /[\p{L}°%]+/uy;
const POWER = /\^(-?\d)|(⁻?[¹²³])/y;
const DIGIT = /\d/;
const SUPERSCRIPT: Readonly<Record<string, number>> = { '¹': 1, '²': 2, '³': 3, '⁻¹': -1, '⁻²': -2, '⁻³': -3 };
const MULTIPLIERS = '·*';
const LEAST: UnitExpression = { dimension: PLAIN, factor: 1, exponent: 0, zeroAtKelvin: null, end: 0 };

/** The unit at `start`, or null when no unit begins there. Throws QuantityError for a unit that is not known. */
export function readUnit(text: string, start: number): UnitExpression | null {
  let unit: UnitExpression;
  // '1/cm' after a number, as in '0.2 1/cm', and '/cm'.
  const slash = text.startsWith('1/', start) ? start + 1 : start;
  if (text[slash] === '/') {
    const below = readFactor(text, slash + 1);
    if (below === null) return null;
    unit = combine({ ...LEAST, end: slash }, below, -1);
  } else {
    const first = readFactor(text, start);
    if (first === null) return null;
    unit = first;
  }
  return readMore(text, unit);
}

function readMore(text: string, first: UnitExpression): UnitExpression {
  let unit = first;
  for (;;) {
    const operator = text[unit.end];
    if (operator === undefined || !`/${MULTIPLIERS}`.includes(operator)) return unit;
    const next = readFactor(text, unit.end + 1);
    if (next === null) return unit;
    unit = combine(unit, next, operator === '/' ? -1 : 1);
  }
}

/** A symbol with its power, or a product in parentheses; null when it is neither. */
function readFactor(text: string, start: number): UnitExpression | null {
  if (text[start] === '(') return readGroup(text, start);
  const symbol = symbolAt(text, start);
  if (symbol === null) return null;
  const unit = UNITS.get(symbol);
  if (unit === undefined) return null;
  let end = start + symbol.length;
  POWER.lastIndex = end;
  const raised = POWER.exec(text);
  if (raised === null) {
    if (DIGIT.test(text[end] ?? '')) {
      const suggestion = `write ${symbol}^${text[end]}`;
      throw new QuantityError({ problem: 'a power of a unit needs a caret', start, end: end + 1, suggestion });
    }
    return { ...LEAST, ...unit, zeroAtKelvin: unit.zeroAtKelvin ?? null, end };
  }
  end += raised[0].length;
  const power = raised[1] === undefined ? SUPERSCRIPT[raised[2]] : Number(raised[1]);
  return combine({ ...LEAST, end }, { ...LEAST, ...unit, end }, power);
}

function readGroup(text: string, start: number): UnitExpression | null {
  let unit = readFactor(text, start + 1);
  while (unit !== null) {
    const separator = text[unit.end];
    if (separator === ')') return { ...unit, zeroAtKelvin: null, end: unit.end + 1 };
    if (separator === undefined || !` /${MULTIPLIERS}`.includes(separator)) return null;
    const next = readFactor(text, unit.end + 1);
    unit = next === null ? null : combine(unit, next, separator === '/' ? -1 : 1);
  }
  return null;
}

function combine(a: UnitExpression, b: UnitExpression, power: number): UnitExpression {
  return {
    dimension: timesPower(a.dimension, b.dimension, power),
    factor: a.factor * b.factor ** power,
    exponent: a.exponent + power * b.exponent,
    zeroAtKelvin: null,
    end: b.end,
  };
}

function symbolAt(text: string, start: number): string | null {
  SYMBOL.lastIndex = start;
  return SYMBOL.exec(text)?.[0] ?? null;
}

/** The unit symbol nearest to what was written, for a suggestion. */
export const nearestUnit = (written: string): string | null => nearestName(written, UNITS.keys());
