/**
 * Plain arithmetic over numbers with units and named dials:
 *
 *   sum     = product { ('+' | '-') product }
 *   product = operand { ('*' | '/') operand }
 *   operand = number [unit] | dial | '(' sum ')' | '-' operand
 *
 * Dial names may hold hyphens, so a minus after a name needs a space before it.
 */

import { addQuantities, multiplyQuantities, plainNumber, type Quantity } from './quantity.js';
import { sameDimension } from './quantity-dimension.js';
import { QuantityError, type QuantityFault } from './quantity-fault.js';
import { describeDimension } from './quantity-kinds.js';
import { nearestUnit, readUnit } from './quantity-unit-expression.js';
import { UNITS } from './quantity-units.js';

export const LONGEST_QUANTITY = 500;
const DEEPEST_NESTING = 40;

export type QuantityReading =
  | { readonly ok: true; readonly quantity: Quantity }
  | { readonly ok: false; readonly fault: QuantityFault };

/** Looks up a dial. A fault of the dial itself is told by returning null: then nothing more is said about it here. */
export type DialLookup = (name: string) => Quantity | null | undefined;

const NUMBER = /(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?/y;
const NAME = /[\p{L}_](?:-?[\p{L}\p{N}_])*/uy;
const NOT_NUMBERS = /^[+-]?\.?(nan|inf|infinity)$/i;

/** A quantity from its text. Never throws; `null` is the quantity of an expression over a faulty dial. */
export function parseQuantity(
  text: string,
  dial: DialLookup = () => undefined,
): QuantityReading | { readonly ok: true; readonly quantity: null } {
  // The Greek letter, the true minus and the cross mean what they look like; each is one character, so places stay.
  const plain = text.replaceAll('μ', 'µ').replaceAll('−', '-').replaceAll('×', '*');
  try {
    return { ok: true, quantity: new Parser(plain, dial).parse() };
  } catch (error) {
    if (error instanceof DialFault) return { ok: true, quantity: null };
    if (error instanceof QuantityError) return { ok: false, fault: error.fault };
    throw error;
  }
}

class DialFault extends Error {}

class Parser {
  private at = 0;
  private depth = 0;

  constructor(
    private readonly text: string,
    private readonly dial: DialLookup,
  ) {}

  parse(): Quantity {
    if (this.text.length > LONGEST_QUANTITY) {
      this.refuse(`is longer than ${LONGEST_QUANTITY} characters`, 0, this.text.length);
    }
    if (this.text.trim() === '') this.refuse('is empty', 0, this.text.length);
    if (NOT_NUMBERS.test(this.text.trim())) this.refuse('is not a finite number', 0, this.text.length);
    const quantity = this.sum();
    this.skipSpaces();
    if (this.at < this.text.length) this.refuseRest();
    return quantity;
  }

  private sum(): Quantity {
    const start = this.nextStart();
    let left = this.product();
    for (;;) {
      const operator = this.operator('+-');
      if (operator === null) return left;
      const right = this.product();
      const sum = addQuantities(left, right, operator === '+' ? 1 : -1);
      if (sum === null) this.refuseSum(left, right, operator, start);
      left = this.finite(sum, start);
    }
  }

  private product(): Quantity {
    const start = this.nextStart();
    let left = this.operand();
    for (;;) {
      const operator = this.operator('*/');
      if (operator === null) return left;
      const rightStart = this.nextStart();
      const right = this.operand();
      if (left.celsius || right.celsius) this.refuseCelsius(start);
      if (operator === '/' && right.magnitude === 0) this.refuse('divides by zero', rightStart, this.at);
      left = this.finite(multiplyQuantities(left, right, operator === '*' ? 1 : -1), start);
    }
  }

  private operand(): Quantity {
    const start = this.nextStart();
    if (this.depth > DEEPEST_NESTING) this.refuse(`is nested deeper than ${DEEPEST_NESTING}`, start, start + 1);
    this.depth++;
    const quantity = this.nestedOperand(start);
    this.depth--;
    return quantity;
  }

  private nestedOperand(start: number): Quantity {
    if (this.text[start] === '-' || this.text[start] === '+') return this.signed(start);
    if (this.text[start] === '(') {
      this.at++;
      const inner = this.sum();
      this.skipSpaces();
      if (this.text[this.at] !== ')') {
        if (this.at < this.text.length) this.refuseRest();
        this.refuse('has a parenthesis that is not closed', start, start + 1, { expected: ')' });
      }
      this.at++;
      return inner;
    }
    const number = this.match(NUMBER);
    if (number !== null) return this.numberWithUnit(number, start);
    const name = this.match(NAME);
    if (name !== null) return this.named(name, start);
    return this.refuse('a number or the name of a dial is missing here', start, start + 1, {
      found: this.text[start] ?? 'nothing',
    });
  }

  private signed(start: number): Quantity {
    const negative = this.text[this.at++] === '-';
    if (!negative) return this.operand();
    // '-5 °C' is a reading below zero, not a reading turned round.
    this.skipSpaces();
    const number = this.match(NUMBER);
    if (number !== null) return this.numberWithUnit(`-${number}`, start);
    const operand = this.operand();
    if (operand.celsius) this.refuseCelsius(start);
    return { ...operand, magnitude: -operand.magnitude };
  }

  private numberWithUnit(number: string, start: number): Quantity {
    const magnitude = Number(number);
    if (!Number.isFinite(magnitude)) this.refuse('is too large for a number', start, this.at, { found: number });
    const afterNumber = this.at;
    this.skipSpaces();
    const unit = readUnit(this.text, this.at);
    if (unit === null) {
      this.refuseWordAfterNumber(number);
      this.at = afterNumber;
      return plainNumber(magnitude);
    }
    const unitStart = this.at;
    this.at = unit.end;
    this.refuseWordAfterUnit(unitStart);
    const { dimension, exponent, factor, zeroAtKelvin } = unit;
    const celsius = zeroAtKelvin !== null;
    return { magnitude: magnitude * factor + (zeroAtKelvin ?? 0), exponent, dimension, celsius };
  }

  /** '8 furlong', '8 depth': a word after a number has to be a unit. */
  private refuseWordAfterNumber(number: string): void {
    const start = this.at;
    const word = this.match(/[\p{L}_°%](?:-?[\p{L}\p{N}_°%])*/uy);
    if (word === null) return;
    if (this.dial(word) !== undefined) {
      this.refuse(`an operator is missing between ${number} and ${word}`, start, this.at, {
        suggestion: `write ${number} * ${word}`,
      });
    }
    const nearest = nearestUnit(word);
    this.refuse('is not a unit', start, this.at, { found: word, ...(nearest === null ? {} : { suggestion: nearest }) });
  }

  /** '8 mmm' was read as a whole word; here only what clings to a whole unit is left, as in '8 mm_wide'. */
  private refuseWordAfterUnit(start: number): void {
    if (/[\p{L}\p{N}_°%^]/u.test(this.text[this.at] ?? '')) {
      const end = this.at + 1;
      this.refuse('is not a unit', start, end, { found: this.text.slice(start, end).trim() });
    }
  }

  private named(name: string, start: number): Quantity {
    const value = this.dial(name);
    if (value === null) throw new DialFault();
    if (value !== undefined) return value;
    if (UNITS.has(name)) {
      this.refuse(`the unit ${name} has no number in front of it`, start, this.at, {
        suggestion: `write 1 ${name}, or join unit and slash without spaces as in 0.2 /cm`,
      });
    }
    if (NOT_NUMBERS.test(name)) this.refuse('is not a finite number', start, this.at, { found: name });
    throw new QuantityError({ problem: 'no dial has this name', start, end: this.at, found: name, unknownDial: true });
  }

  private operator(among: string): string | null {
    this.skipSpaces();
    const character = this.text[this.at];
    if (character === undefined || !among.includes(character)) return null;
    this.at++;
    return character;
  }

  private finite(quantity: Quantity, start: number): Quantity {
    if (!Number.isFinite(quantity.magnitude)) this.refuse('is too large for a number', start, this.at);
    return quantity;
  }

  private refuseSum(left: Quantity, right: Quantity, operator: string, start: number): never {
    if (sameDimension(left.dimension, right.dimension)) this.refuseCelsius(start);
    const verb = operator === '+' ? 'added to' : 'taken from';
    return this.refuse(
      `${describeDimension(right.dimension)} cannot be ${verb} ${describeDimension(left.dimension)}`,
      start,
      this.at,
    );
  }

  private refuseCelsius(start: number): never {
    return this.refuse('°C is a scale, not a difference, and cannot be added up or multiplied', start, this.at, {
      suggestion: 'write differences in K',
    });
  }

  private refuseRest(): never {
    const rest = this.text.slice(this.at);
    const word = rest.match(/^[^\s]+/u)?.[0] ?? rest;
    return this.refuse('an operator is missing, or something is left over', this.at, this.at + word.length, {
      found: word,
      expected: '+ - * / between quantities',
    });
  }

  private refuse(problem: string, start: number, end: number, more: Partial<QuantityFault> = {}): never {
    const found = this.text.slice(start, end).trim();
    throw new QuantityError({ problem, start, end, ...(found === '' ? {} : { found }), ...more });
  }

  private match(pattern: RegExp): string | null {
    pattern.lastIndex = this.at;
    const found = pattern.exec(this.text)?.[0] ?? null;
    if (found !== null) this.at += found.length;
    return found;
  }

  private nextStart(): number {
    this.skipSpaces();
    return this.at;
  }

  private skipSpaces(): void {
    while (/\s/.test(this.text[this.at] ?? '')) this.at++;
  }
}
