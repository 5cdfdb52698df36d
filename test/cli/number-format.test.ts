/**
 * Rounding after the usual practice for measured values (two significant digits of the uncertainty, value to the same
 * place): JCGM 100:2008 (GUM) clause 7.2.6, from memory. Examples below are worked by hand.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  formatSeconds,
  formatWithError,
  groupedCount,
  roundToError,
  significant,
} from '../../src/cli/number-format.js';

describe('roundToError', () => {
  it.each([
    [0.41234, 0.00123, '0.4123', '0.0012'],
    [10.0, 0.0996, '10.00', '0.10'],
    [12345, 678, '12350', '680'],
    [24.126, 1.94, '24.1', '1.9'],
    [24.126, 9.96, '24', '10'],
    [-0.004, 0.3, '0.00', '0.30'],
    [99.99996, 0.000123, '99.99996', '0.00012'],
    [0, 0.05, '0.000', '0.050'],
  ])('%d ± %d is %s ± %s', (value, error, valueText, errorText) => {
    expect(roundToError(value, error)).toEqual({ value: valueText, error: errorText, exponent: 0 });
  });

  it('shows four digits of a value without error, and an exact error as 0', () => {
    expect(roundToError(0.331271, null)).toEqual({ value: '0.3313', error: null, exponent: 0 });
    expect(roundToError(60, 0)).toEqual({ value: '60', error: '0', exponent: 0 });
  });

  it('says so when there is no number', () => {
    expect(roundToError(Number.NaN, 1).value).toBe('unknown');
    expect(roundToError(Number.POSITIVE_INFINITY, 1).value).toBe('unbounded');
  });

  const positive = fc.double({ min: 1e-12, max: 1e12, noNaN: true });
  const value = fc.double({ min: -1e12, max: 1e12, noNaN: true });

  it('keeps the error within 5 % and the value within half of its last place', () => {
    fc.assert(
      fc.property(value, positive, (v, e) => {
        const pair = roundToError(v, e);
        const scale = 10 ** pair.exponent;
        const errorShown = Number(pair.error) * scale;
        expect(Math.abs(errorShown - e)).toBeLessThanOrEqual(0.0501 * e);
        // The last place of the value is that of the error's second digit: at most a tenth of the error.
        expect(Math.abs(Number(pair.value) * scale - v)).toBeLessThanOrEqual(0.0501 * errorShown + 1e-12 * Math.abs(v));
      }),
      { seed: 20261201 },
    );
  });

  it('gives value and error the same number of decimals, never an exponent of their own, never minus nought', () => {
    fc.assert(
      fc.property(value, positive, (v, e) => {
        const pair = roundToError(v, e);
        const decimals = (text: string): number => text.split('.')[1]?.length ?? 0;
        expect(decimals(pair.value)).toBe(decimals(pair.error ?? ''));
        expect(pair.value).toMatch(/^-?\d+(\.\d+)?$/);
        expect(pair.value).not.toMatch(/^-0*\.?0*$/);
        const digits = (pair.error ?? '').replace('.', '').replace(/^0+/, '');
        expect(digits.length).toBeGreaterThanOrEqual(2);
        expect(digits.slice(2)).toMatch(/^0*$/);
      }),
      { seed: 20261201 },
    );
  });

  it('never uses an exponent in a table', () => {
    fc.assert(
      fc.property(value, positive, (v, e) => {
        expect(roundToError(v, e, true).exponent).toBe(0);
      }),
      { seed: 20261201 },
    );
  });
});

describe('formatWithError', () => {
  it('joins value, error and unit', () => {
    expect(formatWithError(24.126, 0.213, 'W', '±')).toBe('24.13 ± 0.21 W');
    expect(formatWithError(24.126, 0.213, 'W', '+-')).toBe('24.13 +- 0.21 W');
    expect(formatWithError(1.2345e-7, 1.2e-9, 'W', '±')).toBe('(1.234 ± 0.012)e-7 W');
    expect(formatWithError(60, 0, 'W', '±')).toBe('60 W');
    expect(formatWithError(0.52, null, '', '±')).toBe('0.52');
  });
});

describe('other numbers', () => {
  it('drops zeros that say nothing', () => {
    expect(significant(60.0001, 3)).toBe('60');
    expect(significant(0.33127, 4)).toBe('0.3313');
  });
  it('groups thousands', () => {
    expect([999, 9999, 10_000, 1_234_567].map(groupedCount)).toEqual(['999', '9999', '10 000', '1 234 567']);
  });
  it('writes times in the unit a person would take', () => {
    expect([0.3412, 9.99, 12.4, 119, 125, 3599, 12_000].map(formatSeconds)).toEqual([
      '0.34 s',
      '10 s',
      '12 s',
      '119 s',
      '2 min 05 s',
      '59 min 59 s',
      '3 h 20 min',
    ]);
  });
});
