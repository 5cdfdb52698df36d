/** Materials of thin films: each with source, range and status, and near the values others give for them. */
import { describe, expect, test } from 'vitest';
import { layerMaterialNames, readLayerMaterial, readMetal, readSolid } from '../../src/materials/library.js';
import { numberIn, readTable } from '../../src/materials/read-table.js';

describe('layer materials', () => {
  test.each(layerMaterialNames())('%s has an index over a range, a source and a status', (name) => {
    const { n, k, rangeNm, source, status } = readLayerMaterial(name);
    expect(rangeNm[0]).toBeLessThan(rangeNm[1]);
    for (const nm of [rangeNm[0], 550, rangeNm[1]]) {
      expect(n(nm)).toBeGreaterThan(0);
      expect(k(nm)).toBeGreaterThanOrEqual(0);
    }
    expect(source).toMatch(/\d{2}|data sheet/);
    expect(status).not.toBe('');
  });

  test.each([
    'titanium-dioxide-film-ald',
    'titanium-dioxide-film-200nm',
    'tantalum-pentoxide-film',
    'silicon-dioxide-film',
    'magnesium-fluoride-film',
  ])('%s agrees with the Cauchy fit of the dispersion table', (name) => {
    const row = readTable('dispersion.csv').rows.find(({ material }) => material === name);
    if (row === undefined) throw new Error(`no row ${name}`);
    const { n } = readLayerMaterial(name);
    for (const [nm, column] of [
      [445, 'n_445nm'],
      [520, 'n_520nm'],
      [589.3, 'n_589.3nm'],
    ] as const) {
      expect(Math.abs(n(nm) - numberIn(row, column))).toBeLessThan(0.004);
    }
  });

  test('metals and solids are those of the library; an unknown name is answered with the names there are', () => {
    expect(readLayerMaterial('silver').k(500)).toBe(readMetal('silver').k(500));
    expect(readLayerMaterial('magnesium-fluoride').n(500)).toBe(readSolid('magnesium-fluoride').index(500));
    expect(() => readLayerMaterial('zinc')).toThrow(/no layer material called zinc; it has titanium/);
  });
});
