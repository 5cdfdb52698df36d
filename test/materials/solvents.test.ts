/** Heat, absorption and flash points of the solvents against handbook values. */
import { describe, expect, test } from 'vitest';
import { readSolvent, solventNames } from '../../src/materials/library.js';
import type { ThermalData } from '../../src/materials/material-data.js';

function thermalOf(name: string): ThermalData {
  const { thermal } = readSolvent(name);
  if (thermal === null) throw new Error(`no heat data of ${name}`);
  return thermal;
}

const deviation = (value: number, expected: number): number => Math.abs(value / expected - 1);

describe('readSolvent', () => {
  // CRC Handbook of Chemistry and Physics, liquids at 25 °C: density kg/m³, specific heat J/(kg K), conductivity W/(m K), viscosity
  // mPa s, boiling point °C (from memory, high; conductivity and viscosity moderate). Glycerol decomposes near its boiling point.
  test.each([
    ['water', 997.05, 4181, 0.6065, 0.89, 99.97],
    ['ethanol', 785.1, 2438, 0.167, 1.074, 78.3],
    ['methanol', 786.4, 2531, 0.2, 0.544, 64.6],
    ['ethylene-glycol', 1110, 2410, 0.254, 16.1, 197.3],
    ['glycerol', 1258, 2376, 0.29, 934, 290],
  ] as const)('heat data of %s', (name, density, specificHeat, conductivity, viscosity, boiling) => {
    const thermal = thermalOf(name);
    expect(thermal.temperatureC).toBe(25);
    expect(deviation(thermal.densityKgPerM3, density)).toBeLessThan(0.001);
    expect(deviation(thermal.specificHeatJPerKgK, specificHeat)).toBeLessThan(0.01);
    expect(deviation(thermal.conductivityWPerMK, conductivity)).toBeLessThan(0.03);
    // Viscosity of polyols moves by 5 to 10 % with a trace of water.
    expect(deviation(thermal.viscosityMPaS, viscosity)).toBeLessThan(viscosity > 10 ? 0.1 : 0.02);
    expect(Math.abs((thermal.boilingPointC ?? Number.NaN) - boiling)).toBeLessThan(1.1);
    expect(thermal.source).not.toBe('');
  });

  // NIOSH Pocket Guide (ethanol 55 °F, methanol 52 °F); the glycols from memory, high. Water does not burn.
  test('flash points', () => {
    expect(thermalOf('ethanol').flashPointC).toBeCloseTo(((55 - 32) * 5) / 9, 0);
    expect(thermalOf('methanol').flashPointC).toBeCloseTo(((52 - 32) * 5) / 9, 0);
    expect(thermalOf('ethylene-glycol').flashPointC).toBe(111);
    expect(thermalOf('glycerol').flashPointC).toBe(160);
    expect(thermalOf('water').flashPointC).toBeNull();
  });

  // Pope & Fry, Appl. Opt. 36 8710 (1997), table 3: 0.00635, 0.0409, 0.2224 1/m (from memory, high).
  test('absorption of water is Napierian, in 1/mm', () => {
    const { absorption } = readSolvent('water');
    expect(absorption(440)).toBeCloseTo(6.35e-6, 12);
    expect(absorption(520)).toBeCloseTo(4.09e-5, 12);
    expect(absorption(600)).toBeCloseTo(2.224e-4, 12);
  });

  // Kedenburg et al., Opt. Mater. Express 2 1588 (2012); nothing is known below 500 nm, so the end value is held, and said to be.
  test('absorption of ethanol', () => {
    const { absorption, status } = readSolvent('ethanol');
    expect(absorption(520)).toBeCloseTo(8.65e-5, 12);
    expect(absorption(445)).toBe(absorption(500));
    expect(status).toContain('held outside 500 to 700 nm');
  });

  test('a solvent without absorption data says so', () => {
    expect(readSolvent('glycerol').absorption(520)).toBe(0);
    expect(readSolvent('glycerol').status).toContain('absorption: no data, taken as lossless');
  });

  test('every solvent has a source, heat data and a kind', () => {
    for (const name of solventNames()) {
      const solvent = readSolvent(name);
      expect(solvent).toMatchObject({ name, kind: 'liquid' });
      expect(solvent.source).toMatch(/\(\d{4}\)|supporting information/);
      expect(solvent.thermal).not.toBeNull();
    }
  });
});
