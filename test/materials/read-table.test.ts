import { describe, expect, test } from 'vitest';
import { numberIn, readTable } from '../../src/materials/read-table.js';

describe('readTable', () => {
  test('keeps the head lines apart, takes quotes off and fills what is missing with nothing', () => {
    const { notes, rows } = readTable('dispersion.csv');
    expect(notes[0]).toMatch(/^Refractive index dispersion/);
    const water = rows[0];
    expect(water.material).toBe('water');
    expect(water.source).toBe('Daimon & Masumura Appl. Opt. 46 3811 (2007)');
    expect(rows.find(({ material }) => material === 'ethanol')?.c4).toBe('');
    expect(Object.keys(water).slice(-3)).toEqual(['status', 'source', 'note']);
  });

  test('is read once', () => {
    expect(readTable('thermal.csv')).toBe(readTable('thermal.csv'));
  });

  test('numbers must be numbers', () => {
    expect(numberIn({ a: '1e-3' }, 'a')).toBe(0.001);
    for (const text of ['', 'x', '1 2', 'NaN', 'Infinity'])
      expect(() => numberIn({ a: text }, 'a')).toThrow('column a');
    expect(() => numberIn({}, 'a')).toThrow('column a');
  });
});

// The rows of emitters.csv that follow from others: photon energy ratio, and 683 lm/W times V(λ) of CIE 15:2004 table T.4.
describe('emitters.csv', () => {
  test.each([
    ['quantum-defect ceiling 450 to 540 nm (photon energy ratio)', 450 / 540, 5e-5],
    ['luminous efficacy of monochromatic 555 nm light', 683, 0],
    ['luminous efficacy of 450 nm light: 683 V(450)', 683 * 0.038, 0.005],
    ['luminous efficacy of 520 nm light: 683 V(520)', 683 * 0.71, 0.05],
  ])('%s', (quantity, value, within) => {
    const row = readTable('emitters.csv').rows.find((entry) => entry.quantity === quantity);
    expect(Math.abs(numberIn(row ?? {}, 'typical') - value)).toBeLessThanOrEqual(within);
  });
});
