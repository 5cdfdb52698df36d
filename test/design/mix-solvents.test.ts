import { describe, expect, test } from 'vitest';
import { mixSolvents } from '../../src/design/mix-solvents.js';
import { mixedIndex } from '../../src/materials/lorentz-lorenz.js';

/** Volume shares before mixing of so much ethanol by mass: densities at 20 °C 0.7893 and 0.9982 (handbook; memory, high). */
const byMass = (mass: number) => {
  const [ethanol, water] = [mass / 0.7893, (1 - mass) / 0.9982];
  return ethanol / (ethanol + water);
};

describe('ethanol and water', () => {
  // Index at 589 nm, 20 °C, of solutions by mass share of ethanol (handbook of chemistry and physics; memory, high). Lorentz and Lorenz's
  // rule with the true density misses them by up to 2e-3; with volumes that add up it would miss by 0.013.
  test.each([
    [0.1, 1.3395],
    [0.3, 1.3535],
    [0.5, 1.3616],
    [0.7, 1.3652],
    [0.9, 1.365],
  ])('%d by mass has index %d', (mass, index) => {
    const share = byMass(mass);
    const mixed = mixSolvents([
      { solvent: 'ethanol', share },
      { solvent: 'water', share: 1 - share },
    ]);
    expect(Math.abs(mixed.index(589.3) - index)).toBeLessThan(2.5e-3);
  });

  // Density at 25 °C of half by mass 909.9 kg/m³ (same handbook; memory, high).
  test('density by the tables, heat by mass, no boiling point', () => {
    const share = byMass(0.5);
    const { thermal, notes } = mixSolvents([
      { solvent: 'water', share: 1 - share },
      { solvent: 'ethanol', share },
    ]);
    expect(Math.abs((thermal?.densityKgPerM3 ?? 0) / 909.9 - 1)).toBeLessThan(3e-3);
    expect(thermal?.boilingPointC).toBeNull();
    expect(thermal?.conductivityWPerMK).toBeLessThan((0.6065 + 0.1635) / 2);
    expect(notes.join()).toContain('not modelled');
  });
});

test('a mixture of one and the same is that', () => {
  expect(mixedIndex([1.4, 1.4], [0.3, 0.7])).toBeCloseTo(1.4, 12);
});
