import { describe, expect, test } from 'vitest';
import { dyeNames, dyeSolvents, readPhotostability } from '../../src/materials/library.js';

describe('photostability', () => {
  // Eggeling et al. 1998, abstract: rhodamines in water lose 1e-7 to 1e-6 molecules per absorption below 1 kW/cm².
  test('rhodamine 6G in water lies in the published range', () => {
    const { bleachYield } = readPhotostability('rhodamine-6g', 'water');
    expect(bleachYield?.value).toBeGreaterThanOrEqual(1e-7);
    expect(bleachYield?.value).toBeLessThanOrEqual(1e-6);
  });

  test('every dye of the library has a bleach yield within its range, with its status', () => {
    for (const dye of dyeNames()) {
      for (const solvent of [...dyeSolvents(dye), 'glycerol']) {
        const { bleachYield, triplet } = readPhotostability(dye, solvent);
        for (const one of [bleachYield, triplet?.yield, triplet?.lifetimeNs]) {
          if (!one) continue;
          expect(one.low).toBeLessThanOrEqual(one.value);
          expect(one.high).toBeGreaterThanOrEqual(one.value);
          expect(one.status).not.toBe('');
        }
        expect(bleachYield).not.toBeNull();
      }
    }
  });

  test('of a dye it does not know it says nothing', () => {
    expect(readPhotostability('ink', 'water')).toEqual({ bleachYield: null, triplet: null });
  });

  // Oxygen: 1/(1.5e9 · 2.1e-3) s, both from memory.
  test('the triplet of fluorescein in ethanol is what oxygen leaves of it', () => {
    expect(readPhotostability('fluorescein', 'ethanol').triplet?.lifetimeNs.value).toBeCloseTo(
      1e9 / (1.5e9 * 2.1e-3),
      -1,
    );
  });
});
