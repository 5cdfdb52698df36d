import { describe, expect, test } from 'vitest';
import { readDyeQuenching } from '../../src/materials/library.js';
import {
  criticalConcentration,
  hoppingYield,
  selfQuenching,
  singleMolecules,
} from '../../src/materials/self-quenching.js';

// Bojarski's formula evaluated independently for two sets of constants (computed elsewhere: a check of the formula, no measurement).
const ROWS = [
  [1e-4, 0.999, 0.99997, 0.99996],
  [3e-4, 0.99702, 0.99976, 0.99966],
  [1e-3, 0.9902, 0.99702, 0.99567],
  [3e-3, 0.97168, 0.96568, 0.94632],
  [1e-2, 0.91608, 0.57413, 0.42894],
  [3e-2, 0.8054, 0.06985, 0.03874],
  [0.1, 0.61803, 0.00388, 0.00208],
] as const;

describe('transfer to dimers', () => {
  test.each(ROWS)('at %d mol/L', (c, alone, fluorescein, rhodamine) => {
    const singles = singleMolecules(5, c);
    expect(singles / c).toBeCloseTo(alone, 4);
    expect(hoppingYield(singles, (c - singles) / 2, 5.05, 5.05)).toBeCloseTo(fluorescein, 4);
    expect(hoppingYield(singles, (c - singles) / 2, 5.62, 5.6)).toBeCloseTo(rhodamine, 4);
  });

  // c₀ = 0.3964/(R₀/nm)³ mol/L; 3.08e-3 and 2.23e-3 mol/L from R₀ of 5.05 and 5.62 nm (computed elsewhere).
  test('critical concentration', () => {
    expect(criticalConcentration(5.05)).toBeCloseTo(3.08e-3, 5);
    expect(criticalConcentration(5.62)).toBeCloseTo(2.23e-3, 5);
  });

  // Monomer and dimer must hold all molecules, and the law of mass action.
  test('keeps molecules and the law of mass action', () => {
    const [K, c] = [1234, 3e-3];
    const m = singleMolecules(K, c);
    expect((c - m) / 2 / m ** 2 / K).toBeCloseTo(1, 12);
  });
});

describe('yield against strength of fluorescein in water', () => {
  const data = readDyeQuenching('fluorescein', 'water');
  if (data === null) throw new Error('no constants');
  const factor = (c: number) => selfQuenching({ kind: 'transfer-to-dimers', ...data }, c).factor;

  // Published points as remembered (memory, low): the shape is sure, the strengths only within a factor of two.
  // So the curve must come through each yield at a strength within that factor.
  test.each([
    [0.5, 8e-3],
    [0.1, 3e-2],
  ])('falls to %d at %d mol/L within a factor of two', (yieldLeft, c) => {
    expect(factor(c / 2)).toBeGreaterThan(yieldLeft);
    expect(factor(c * 2)).toBeLessThan(yieldLeft);
  });

  // The weak end of the same points, 0.95 at 1 mmol/L: the formula leaves 0.987 there, for it knows no other way of quenching.
  test('lies 0.04 above the published yield at 1 mmol/L', () => {
    expect(factor(1e-3) - 0.95).toBeGreaterThan(0.03);
    expect(factor(1e-3) - 0.95).toBeLessThan(0.04);
  });

  // Nothing seen up to about 1 mmol/L (Bojarski & Dudkiewicz 1972, memory, moderate); below 0.03 at 0.1 mol/L (memory, low).
  test('nothing to see at 1 mmol/L, dark at 100', () => {
    expect(factor(1e-3)).toBeGreaterThan(0.95);
    expect(factor(0.1)).toBeLessThan(0.03);
  });
});

describe('laws of two lines', () => {
  // By their definitions: half at c½; 1/2 at c = 1/K; 1/e at c₀ (Stern & Volmer 1919; Perrin 1924).
  test('meet their own constants', () => {
    expect(selfQuenching({ kind: 'half-strength', half: 8e-3 }, 8e-3).factor).toBe(0.5);
    expect(selfQuenching({ kind: 'stern-volmer', constant: 20 }, 0.05).factor).toBe(0.5);
    expect(selfQuenching({ kind: 'perrin', critical: 0.02 }, 0.02).factor).toBeCloseTo(Math.exp(-1), 12);
  });

  test('leave a dilute dye alone and refuse nonsense', () => {
    expect(selfQuenching({ kind: 'transfer-to-dimers', radiusNm: 5, dimerRadiusNm: 5, pairing: 5 }, 0)).toEqual({
      factor: 1,
      dimerShare: 0,
    });
    expect(() => selfQuenching({ kind: 'perrin', critical: 1 }, -1)).toThrow(RangeError);
  });
});
