import { describe, expect, test } from 'vitest';
import { foersterRadius, overlapIntegral } from '../../src/materials/foerster-radius.js';
import { dyeNames, dyeSolvents, readDye } from '../../src/materials/library.js';
import { mirrorImage } from '../../src/materials/mirror-image.js';
import { naturalLifetime } from '../../src/materials/natural-lifetime.js';
import { readTable } from '../../src/materials/read-table.js';
import { activationEnergy, yieldAtTemperature } from '../../src/materials/thermal-yield.js';

const DYES = dyeNames().flatMap((name) => dyeSolvents(name).map((solvent) => [name, solvent] as const));

describe.each(DYES)('%s in %s', (name, solvent) => {
  const dye = readDye(name, solvent);
  const emitted = [dye.emission.fromNm, dye.emission.toNm] as const;
  const index = { water: 1.333, ethanol: 1.3614, toluene: 1.4969 }[solvent] ?? Number.NaN;

  // Strickler & Berg, J. Chem. Phys. 37 814 (1962), worked out elsewhere from the same spectra with a band limit of its own: 10 %.
  test('lifetime after Strickler and Berg', () => {
    const natural =
      naturalLifetime(dye.extinction, dye.emission.photonsPerNm, emitted, dye.rangeNm, index) ?? Number.NaN;
    expect((natural * dye.quantumYield) / (dye.lifetimeNs ?? Number.NaN)).toBeGreaterThan(0.9);
    expect((natural * dye.quantumYield) / (dye.lifetimeNs ?? Number.NaN)).toBeLessThan(1.1);
  });

  // Levshin's rule (from memory): emission is the mirror image of the first band, to its red.
  test('emission mirrors absorption', () => {
    const image = mirrorImage(dye.extinction, dye.emission.photonsPerNm, emitted, dye.rangeNm);
    expect(image?.shiftPerCm).toBeGreaterThan(0);
    expect(image?.likeness).toBeGreaterThan(0.9);
  });

  // Förster radius of transfer to the same dye, worked out elsewhere from the same spectra.
  test('Förster radius', () => {
    const row = readTable('dyes/index.csv').rows.find(
      (each) => each.file.startsWith(name.replaceAll('-', '_')) && each.file.includes(solvent),
    );
    const radius = foersterRadius(
      overlapIntegral(dye.emission.photonsPerNm, dye.extinction, ...emitted),
      dye.quantumYield,
      index,
    );
    expect(Math.abs(radius - Number(row?.R0_self_nm_calc))).toBeLessThan(0.03);
  });
});

describe('Förster overlap, worked by hand', () => {
  // A donor that emits one narrow band at 520 nm over a flat acceptor of 80 000 L/(mol cm): J = ε λ⁴ = 5.849e15; with κ² = 2/3,
  // φ = 0.9, n = 1.4: R₀ = 0.02108 (0.6 · 5.849e15 / 3.8416)^(1/6) = 0.02108 · 311.7 = 6.57 nm (Lakowicz's form of Förster 1948).
  test('band on a plateau', () => {
    const band = (nm: number) => (Math.abs(nm - 520) < 0.6 ? 1 : 0);
    const overlap = overlapIntegral(band, () => 80_000, 510, 530, 0.5);
    expect(overlap / 5.849e15).toBeCloseTo(1, 3);
    expect(foersterRadius(overlap, 0.9, 1.4)).toBeCloseTo(6.57, 2);
  });

  // Published self-transfer radius of fluorescein in water: 4.4 to 4.6 nm (memory, moderate); ours, from model shapes, is 4.9.
  test('fluorescein in water lies within a tenth of the published radius', () => {
    const { emission, extinction, quantumYield } = readDye('fluorescein', 'water');
    const overlap = overlapIntegral(emission.photonsPerNm, extinction, emission.fromNm, emission.toNm);
    const radius = foersterRadius(overlap, quantumYield, 1.333);
    expect(radius).toBeGreaterThan(4.4);
    expect(radius).toBeLessThan(4.6 * 1.1);
  });
});

describe('yield against temperature', () => {
  // Rhodamine B loses 1.5 to 2 % of its yield a kelvin near 25 °C (memory, moderate).
  test('rhodamine B falls as published near 25 °C and rises when cooled', () => {
    const { quantumYield, temperature } = readDye('rhodamine-b', 'ethanol');
    const energy = activationEnergy(quantumYield, temperature?.fallPerKelvin ?? Number.NaN);
    const slope = 1 - yieldAtTemperature(quantumYield, energy, 26) / quantumYield;
    expect(slope).toBeGreaterThan(0.015);
    expect(slope).toBeLessThan(0.02);
    expect(yieldAtTemperature(quantumYield, energy, 25)).toBeCloseTo(quantumYield, 12);
    expect(yieldAtTemperature(quantumYield, energy, 0)).toBeLessThan(1);
    expect(yieldAtTemperature(quantumYield, energy, 0)).toBeGreaterThan(0.85);
  });
});
