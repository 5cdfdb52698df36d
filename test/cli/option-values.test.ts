import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  collectDial,
  parseDuration,
  parseHistories,
  parsePrecision,
  parseSeed,
  parseThreads,
} from '../../src/cli/option-values.js';

describe('option values', () => {
  it.each([
    ['200000', 200_000],
    ['2e6', 2_000_000],
    ['2.5E+6', 2_500_000],
    ['1', 1],
  ])('histories %s', (text, value) => expect(parseHistories(text)).toBe(value));

  it.each(['0', '-5', 'NaN', 'Infinity', '1.5', '1e-3', '500k', '', '0x10', '2000000001', '1e999', '2 000'])(
    'refuses histories "%s"',
    (text) => expect(() => parseHistories(text)).toThrow(/[.]$/),
  );

  it.each([
    ['0.2%', 0.002],
    ['5 %', 0.05],
    ['.5%', 0.005],
    ['1e-1%', 0.001],
  ])('precision %s', (text, value) => expect(parsePrecision(text)).toBeCloseTo(value, 12));

  it.each(['0.2', '0%', '100%', '-1%', 'NaN%', '%', ''])('refuses precision "%s"', (text) =>
    expect(() => parsePrecision(text)).toThrow(/[.]$/),
  );

  it.each([
    ['30s', 30],
    ['500 ms', 0.5],
    ['2min', 120],
    ['1.5h', 5400],
  ])('time %s', (text, value) => expect(parseDuration(text)).toBeCloseTo(value, 12));

  it.each(['30', '0s', '-1s', '10 m', '1e3s', '721h', 's', ''])('refuses time "%s"', (text) =>
    expect(() => parseDuration(text)).toThrow(/[.]$/),
  );

  it.each(['0', '-1', '1.5', '1025', 'all', ''])('refuses threads "%s"', (text) =>
    expect(() => parseThreads(text)).toThrow(/[.]$/),
  );
  it('takes a number of threads', () => expect(parseThreads('7')).toBe(7));

  it('refuses seeds that cannot be printed or are too long', () => {
    for (const text of ['', 'a\nb', '\u001b[31m', 'x'.repeat(101)]) expect(() => parseSeed(text)).toThrow(/[.]$/);
    expect(parseSeed('loom 7')).toBe('loom 7');
  });

  it('collects dials by name', () => {
    const once = collectDial('depth = 10 mm', {});
    expect(collectDial('formula=a=b', once)).toEqual({ depth: '10 mm', formula: 'a=b' });
    for (const text of ['depth', '=1', 'depth=', ' = ']) expect(() => collectDial(text, {})).toThrow(/[.]$/);
    expect(() => collectDial('depth=2 mm', once)).toThrow(/twice/);
  });

  it('keeps a dial whose name is that of an object property', () => {
    expect(Object.keys(collectDial('__proto__=1', {}))).toEqual(['__proto__']);
    expect(collectDial('toString=1', {})).toEqual({ toString: '1' });
  });

  it('never gives a number out of range, whatever the text', () => {
    fc.assert(
      fc.property(fc.oneof(fc.string({ maxLength: 12 }), fc.double().map(String)), (text) => {
        for (const parse of [parseHistories, parsePrecision, parseDuration, parseThreads]) {
          try {
            const value = parse(text);
            expect(Number.isFinite(value) && value > 0).toBe(true);
          } catch (error) {
            expect(error).toHaveProperty('code', 'commander.invalidArgument');
          }
        }
      }),
      { seed: 20261201 },
    );
  });
});
