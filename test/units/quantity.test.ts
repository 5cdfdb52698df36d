import fc from 'fast-check';
import unit from 'unitmath';
import { describe, expect, test } from 'vitest';
import { inOwnUnit, plainNumber, type Quantity, quantityIn } from '../../src/units/quantity.js';
import { QUANTITY_KINDS, type QuantityKindName } from '../../src/units/quantity-kinds.js';
import { LONGEST_QUANTITY, parseQuantity } from '../../src/units/quantity-parse.js';
import { UNITS } from '../../src/units/quantity-units.js';

function valueIn(text: string, kind: QuantityKindName, dials: Readonly<Record<string, Quantity>> = {}): number | null {
  const reading = parseQuantity(text, (name) => (Object.hasOwn(dials, name) ? dials[name] : undefined));
  if (!reading.ok) throw new Error(`${text}: ${reading.fault.problem}`);
  return reading.quantity && quantityIn(reading.quantity, kind);
}

function faultOf(text: string) {
  const reading = parseQuantity(text);
  if (reading.ok) throw new Error(`${text} was accepted`);
  return reading.fault;
}

const millimetres = (value: number): Quantity => ({
  magnitude: value,
  exponent: -3,
  dimension: QUANTITY_KINDS.length.dimension,
  celsius: false,
});

describe('conversions agree with unitmath 0.8.8', () => {
  // Ours, then the same in its spelling, and the unit both are compared in.
  const cases: readonly (readonly [string, string, QuantityKindName, string])[] = [
    ['450 nm', '450 nm', 'length', 'mm'],
    ['12 µm', '12 um', 'length', 'mm'],
    ['12 μm', '12 um', 'length', 'mm'],
    ['3 cm', '3 cm', 'wavelength', 'nm'],
    ['2 m', '2 m', 'length', 'mm'],
    ['4 cm²', '4 cm^2', 'area', 'mm^2'],
    ['4 cm^2', '4 cm^2', 'area', 'mm^2'],
    ['3 L', '3 L', 'volume', 'mm^3'],
    ['2.5 mL', '2.5 mL', 'volume', 'mm^3'],
    ['7 cm³', '7 cm^3', 'volume', 'mm^3'],
    ['90 min', '90 min', 'time', 's'],
    ['2 h', '2 hour', 'time', 's'],
    ['4 ns', '4 ns', 'time', 's'],
    ['4 µs', '4 us', 'lifetime', 'ns'],
    ['60 W', '60 W', 'power', 'W'],
    ['150 mW', '150 mW', 'power', 'W'],
    ['2 kW', '2 kW', 'power', 'W'],
    ['9 J/ms', '9 J / ms', 'power', 'W'],
    ['100 W/cm²', '100 W / cm^2', 'irradiance', 'W / mm^2'],
    ['3 W/mm^2', '3 W / mm^2', 'irradiance', 'W / mm^2'],
    ['0.2 mmol/L', '0.2 mmol / L', 'concentration', 'mol / L'],
    ['15 µmol/L', '15 umol / L', 'concentration', 'mol / L'],
    ['15 umol/L', '15 umol / L', 'concentration', 'mol / L'],
    ['7 mol/m³', '7 mol / m^3', 'concentration', 'mol / L'],
    ['60 mg/L', '60 mg / L', 'massConcentration', 'g / L'],
    ['2 kg/m^3', '2 kg / m^3', 'massConcentration', 'g / L'],
    ['50000 L/mol/cm', '50000 L / mol cm', 'extinction', 'L / mol cm'],
    ['50000 L/(mol cm)', '50000 L / mol cm', 'extinction', 'L / mol cm'],
    ['50000 L·mol⁻¹·cm⁻¹', '50000 L / mol cm', 'extinction', 'L / mol cm'],
    ['7 m²/mol', '7 m^2 / mol', 'extinction', 'L / mol cm'],
    ['0.2 /cm', '0.2 cm^-1', 'absorption', 'mm^-1'],
    ['0.2 1/cm', '0.2 cm^-1', 'absorption', 'mm^-1'],
    ['3 /m', '3 m^-1', 'absorption', 'mm^-1'],
    ['5 deg', '5 deg', 'angle', 'rad'],
    ['5°', '5 deg', 'angle', 'rad'],
    ['332 g/mol', '332 g / mol', 'molarMass', 'g / mol'],
    ['900 lm', '900 lm', 'luminousFlux', 'lm'],
    ['25 °C', '25 degC', 'temperature', 'K'],
    ['300 K', '300 K', 'temperature', 'K'],
  ];
  test.each(cases)('%s', (ours, theirs, kind, base) => {
    const expected = unit(theirs).to(base).getValue();
    expect(Math.abs((valueIn(ours, kind) ?? Number.NaN) / expected - 1)).toBeLessThan(1e-14);
  });

  test('sums of lengths and products with numbers', () => {
    const length = fc.tuple(fc.integer({ min: 1, max: 9999 }), fc.constantFrom('nm', 'um', 'mm', 'cm', 'm'));
    fc.assert(
      fc.property(length, length, fc.integer({ min: 1, max: 50 }), ([a, p], [b, q], k) => {
        const expected = unit(a, p).add(unit(b, q)).mul(k).to('mm').getValue();
        expect(Math.abs((valueIn(`(${a} ${p} + ${b} ${q}) * ${k}`, 'length') ?? 0) / expected - 1)).toBeLessThan(1e-12);
      }),
    );
  });
});

test('a quantity in its own decimal unit keeps its digits exactly', () => {
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 99_999 }), (digits) => {
      const decimal = `${Math.floor(digits / 1000)}.${String(digits % 1000).padStart(3, '0')}`;
      expect(valueIn(`${decimal} mm`, 'length')).toBe(Number(decimal));
      expect(valueIn(`${decimal} nm`, 'wavelength')).toBe(Number(decimal));
      expect(valueIn(`${decimal} mol/L`, 'concentration')).toBe(Number(decimal));
    }),
  );
});

describe('arithmetic', () => {
  const node = fc.letrec<{ sum: string }>((tie) => ({
    sum: fc.oneof(
      { maxDepth: 5, depthSize: 'small' },
      fc.integer({ min: 0, max: 999 }).map(String),
      fc.constantFrom('wall-plug', 'depth', 'b2'),
      fc.tuple(tie('sum'), fc.constantFrom('+', '-', '*', '/'), tie('sum')).map(([a, o, b]) => `${a} ${o} ${b}`),
      tie('sum').map((inner) => `(${inner})`),
      tie('sum').map((inner) => `-(${inner})`),
    ),
  }));
  test('means what the same text means to JavaScript', () => {
    const dials: Readonly<Record<string, number>> = { 'wall-plug': 0.32, depth: 8, b2: 1.75 };
    fc.assert(
      fc.property(node.sum, (text) => {
        fc.pre(text.length <= LONGEST_QUANTITY);
        const script = text.replace(/wall-plug|depth|b2/g, (name) => String(dials[name]));
        const expected: unknown = Function(`'use strict'; return (${script});`)();
        const reading = parseQuantity(text, (name) => plainNumber(dials[name]));
        // JavaScript goes on with Infinity where a quantity is refused at once.
        if (reading.ok) expect(reading.quantity?.magnitude === expected).toBe(true);
        else expect(text).toContain('/');
      }),
      { numRuns: 400 },
    );
  });

  test('names may hold hyphens; a minus stands apart', () => {
    const dials = { 'wall-plug': plainNumber(0.5), depth: millimetres(8) };
    expect(valueIn('wall-plug * 2', 'number', dials)).toBe(1);
    expect(valueIn('depth - 1 mm', 'length', dials)).toBe(7);
    expect(valueIn('depth -1 mm', 'length', dials)).toBe(7);
    expect(valueIn('depth/2 + 1 mm', 'length', dials)).toBe(5);
    expect(valueIn('1/depth', 'absorption', dials)).toBe(0.125);
    expect(faultOf('depth-1').found).toBe('depth-1');
  });

  test('°C is a scale (SI Brochure 2019, 2.3.1: t/°C = T/K − 273.15)', () => {
    expect(valueIn('-5 °C', 'temperature')).toBeCloseTo(268.15, 10);
    expect(valueIn('20 °C + 5 K', 'temperature')).toBeCloseTo(298.15, 10);
    expect(valueIn('30 °C - 20 °C', 'temperature')).toBeCloseTo(10, 10);
    expect(faultOf('20 °C + 5 °C').problem).toContain('scale');
    expect(faultOf('20 °C * 2').problem).toContain('scale');
    expect(faultOf('-(20 °C)').problem).toContain('scale');
  });

  test('values of dials come in the base unit of their own dimension', () => {
    const reading = parseQuantity('3 cm * 2');
    expect(reading.ok && reading.quantity && inOwnUnit(reading.quantity)).toBe(60);
  });
});

describe('refusals point at the characters to blame', () => {
  test.each([
    ['', 0, 0, 'is empty'],
    ['  ', 0, 2, 'is empty'],
    ['NaN', 0, 3, 'is not a finite number'],
    ['.nan', 0, 4, 'is not a finite number'],
    ['Infinity', 0, 8, 'is not a finite number'],
    ['-.inf', 0, 5, 'is not a finite number'],
    ['3 mm + NaN', 7, 10, 'is not a finite number'],
    ['1e999 mm', 0, 5, 'is too large for a number'],
    ['1e300 * 1e300', 0, 13, 'is too large for a number'],
    ['4 / 0', 4, 5, 'divides by zero'],
    ['4 / (2 - 2)', 4, 11, 'divides by zero'],
    ['8 furlong', 2, 9, 'is not a unit'],
    ['8 mm_wide', 2, 5, 'is not a unit'],
    ['1_000', 1, 5, 'is not a unit'],
    ['0x10', 1, 4, 'is not a unit'],
    ['8 mm2', 2, 5, 'a power of a unit needs a caret'],
    ['mm', 0, 2, 'the unit mm has no number in front of it'],
    ['depth', 0, 5, 'no dial has this name'],
    ['2 * (3 mm', 4, 5, 'has a parenthesis that is not closed'],
    ['3 mm)', 4, 5, 'an operator is missing, or something is left over'],
    ['3 mm 4 mm', 5, 6, 'an operator is missing, or something is left over'],
    ['3 mm +', 6, 7, 'a number or the name of a dial is missing here'],
    ['3 mm + 2 s', 0, 10, 'a time cannot be added to a length'],
    ['3 W - 2 mm', 0, 10, 'a length cannot be taken from a power'],
  ])('%j', (text, start, end, problem) => {
    expect(faultOf(text)).toMatchObject({ start, end, problem });
  });

  test('near misses of units are answered with the unit', () => {
    expect(faultOf('3 mmm').suggestion).toBe('mm');
    expect(faultOf('0.2 mmoll').suggestion).toBe('mmol');
  });

  test('a number before a dial lacks its operator', () => {
    const reading = parseQuantity('2 depth', (name) => (name === 'depth' ? millimetres(8) : undefined));
    expect(reading.ok ? null : reading.fault.suggestion).toBe('write 2 * depth');
  });

  test('length and nesting are bounded', () => {
    expect(faultOf(`1${' + 1'.repeat(200)}`).problem).toContain('longer than 500');
    expect(faultOf(`${'('.repeat(100)}1${')'.repeat(100)}`).problem).toContain('nested deeper');
    expect(faultOf(`${'-'.repeat(100)}1`).problem).toContain('nested deeper');
  });

  test('whatever the text, the answer is a finite quantity or a fault inside the text', () => {
    const scrap = fc.constantFrom(
      ...UNITS.keys(),
      '1',
      '2.5',
      'e9',
      '+',
      '-',
      '*',
      '/',
      '(',
      ')',
      ' ',
      '^',
      '²',
      'depth',
      '·',
      '.',
    );
    const text = fc.oneof(
      fc.string({ unit: 'binary', maxLength: 40 }),
      fc.array(scrap, { maxLength: 14 }).map((words) => words.join('')),
    );
    fc.assert(
      fc.property(text, (written) => {
        const reading = parseQuantity(written);
        if (reading.ok) expect(Number.isFinite(reading.quantity?.magnitude)).toBe(true);
        else {
          expect(reading.fault.start).toBeGreaterThanOrEqual(0);
          expect(reading.fault.start).toBeLessThanOrEqual(written.length);
          expect(reading.fault.end).toBeGreaterThanOrEqual(reading.fault.start);
        }
      }),
      { numRuns: 800 },
    );
  });
});
