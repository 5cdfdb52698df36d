/** Dyes: what can be computed from their spectra, against the same numbers computed elsewhere; molar masses against the formulas. */
import { describe, expect, test } from 'vitest';
import { dyeNames, dyeSolvents, readDye } from '../../src/materials/library.js';
import { AVOGADRO_PER_MOL } from '../../src/units/constants.js';

/** Abridged standard atomic weights, CIAAW 2021 (from memory, high). */
const WEIGHTS: Readonly<Record<string, number>> = {
  H: 1.008,
  C: 12.011,
  N: 14.007,
  O: 15.999,
  F: 18.998,
  S: 32.06,
  Cl: 35.45,
};

const massOf = (formula: string): number =>
  [...formula.matchAll(/([A-Z][a-z]?)(\d*)/g)].reduce(
    (sum, [, element, count]) => sum + WEIGHTS[element] * Number(count || 1),
    0,
  );

/** The grid of the spectra: 2 nm, 380 to 750 nm. */
const GRID = Array.from({ length: 186 }, (_, i) => 380 + 2 * i);
const over = (f: (nm: number) => number): number => GRID.reduce((sum, nm) => sum + f(nm) * 2, 0);
const peakOf = (f: (nm: number) => number): number => GRID.reduce((best, nm) => (f(nm) > f(best) ? nm : best));

/**
 * Computed elsewhere from the published spectra: absorption peak nm, extinction there and at 445 nm in L/(mol cm), emission peak and
 * mean photon wavelength nm, yield, lifetime ns by Strickler & Berg, J. Chem. Phys. 37 814 (1962), transfer radius nm after
 * Förster (κ² = 2/3), emission-weighted extinction. nD is that of the solvent; `band` is where the first absorption band begins, nm:
 * the minimum before it, the table's end for the coumarins, 420 for fluorescein whose trace lies on a floor below that.
 */
type Known = [
  dye: string,
  solvent: string,
  nD: number,
  band: number,
  peakNm: number,
  peak: number,
  at445: number,
  emissionNm: number,
  meanNm: number,
  quantumYield: number,
  lifetimeNs: number,
  radiusNm: number,
  weighted: number,
];
const KNOWN: Known[] = [
  ['fluorescein', 'ethanol', 1.3614, 420, 500, 91990, 7947, 522, 539.9, 0.97, 4.13, 5.05, 14827],
  ['rhodamine-6g', 'ethanol', 1.3614, 426, 530, 115950, 1998, 552, 573.3, 0.95, 3.76, 5.62, 23218],
  ['rhodamine-b', 'ethanol', 1.3614, 438, 543, 105790, 1114, 564, 581.9, 0.7, 2.96, 5.51, 25141],
  ['rhodamine-101', 'ethanol', 1.3614, 456, 565, 95000, 2595, 586, 603.5, 0.98, 5.07, 5.93, 23558],
  ['coumarin-6', 'ethanol', 1.3614, 380, 456, 53935, 52270, 500, 524.6, 0.78, 2.64, 3.81, 4221],
  ['perylene-diimide', 'toluene', 1.4969, 412, 528, 50000, 4494, 536, 564.8, 0.97, 6.4, 4.67, 11439],
  ['coumarin-343', 'ethanol', 1.3614, 380, 443, 44282, 44020, 462, 480.2, 0.63, 1.8, 4.47, 17851],
  ['fluorescein', 'water', 1.333, 420, 490, 76900, 15441, 515, 532.4, 0.93, 4.11, 4.88, 12161],
  ['coumarin-153', 'ethanol', 1.3614, 380, 423, 20000, 15997, 532, 550.9, 0.53, 4.84, 2.46, 405],
];

/** Top of the parabola through the highest point and its neighbours, with what a mean over ±1 nm takes off it (f″/6) put back. */
function topOf(f: (nm: number) => number): number {
  const nm = peakOf(f);
  const [before, top, after] = [f(nm - 2), f(nm), f(nm + 2)];
  const bend = before - 2 * top + after;
  return top - (after - before) ** 2 / (8 * bend) - bend / 24;
}

describe.each(KNOWN)('%s in %s', (dye, solvent, nD, band, ...known) => {
  const [peakNm, peak, at445, emissionNm, meanNm, knownYield, lifetime, radius, weighted] = known;
  const { extinction, emission, quantumYield, lifetimeNs } = readDye(dye, solvent);
  const photons = over(emission.photonsPerNm);

  test('absorption: peak, extinction there and at the pump', () => {
    // The true peak may lie between two points of the grid; its height was taken from the recorded trace, noise and all.
    expect(Math.abs(peakOf(extinction) - peakNm)).toBeLessThanOrEqual(2);
    expect(Math.abs(topOf(extinction) / peak - 1)).toBeLessThan(0.004);
    expect(Math.abs(extinction(445) / at445 - 1)).toBeLessThan(0.002);
  });

  test('emission: peak and mean photon', () => {
    expect(Math.abs(peakOf(emission.photonsPerNm) - emissionNm)).toBeLessThanOrEqual(2);
    expect(Math.abs(over((nm) => nm * emission.photonsPerNm(nm)) / photons - meanNm)).toBeLessThan(0.06);
  });

  test('reabsorption strength: extinction seen by the emission', () => {
    const seen = over((nm) => extinction(nm) * emission.photonsPerNm(nm)) / photons;
    expect(Math.abs(seen / weighted - 1)).toBeLessThan(0.002);
  });

  test('transfer radius', () => {
    const overlap = over((nm) => extinction(nm) * emission.photonsPerNm(nm) * nm ** 4) / photons;
    const factor = (9 * Math.LN10 * (2 / 3) * quantumYield) / (128 * Math.PI ** 5 * AVOGADRO_PER_MOL * nD ** 4);
    // L/(mol cm) nm⁴ to nm⁶ per molecule: 1 L/cm = 1e17 nm².
    expect(Math.abs((factor * overlap * 1e17) ** (1 / 6) - radius)).toBeLessThan(0.006);
  });

  test('yield and lifetime', () => {
    expect(quantumYield).toBe(knownYield);
    expect(lifetimeNs).toBe(lifetime);
    // Where the first band is taken to begin is a choice, worth up to 2 %.
    // k = 2.880e-9 n² ⟨ν⁻³⟩⁻¹ ∫ε dν/ν, ν in cm⁻¹; photons per nm need no conversion, and dν/ν = dλ/λ.
    const cubes = photons / over((nm) => emission.photonsPerNm(nm) * (nm * 1e-7) ** 3);
    const rate = 2.88e-9 * nD * nD * cubes * over((nm) => (nm < band ? 0 : extinction(nm) / nm));
    expect(Math.abs((quantumYield / rate) * 1e9 - lifetime) / lifetime).toBeLessThan(0.02);
  });

  test('the emission range holds all of the emission and nothing is negative', () => {
    const { photonsPerNm, fromNm, toNm } = emission;
    for (let nm = 300; nm <= 900; nm++) {
      expect(Math.min(extinction(nm), photonsPerNm(nm))).toBeGreaterThanOrEqual(0);
      if (nm < fromNm || nm > toNm) expect(photonsPerNm(nm)).toBe(0);
    }
  });
});

describe('dyes of the library', () => {
  // Formulas: the neutral acid, the chlorides of rhodamine 6G and B, the inner salt of rhodamine 101, and
  // N,N'-bis(2,5-di-tert-butylphenyl)-3,4,9,10-perylenedicarboximide (from memory, high).
  test.each([
    ['fluorescein', 'ethanol', 'C20H12O5'],
    ['rhodamine-6g', 'ethanol', 'C28H31ClN2O3'],
    ['rhodamine-b', 'ethanol', 'C28H31ClN2O3'],
    ['rhodamine-101', 'ethanol', 'C32H30N2O3'],
    ['coumarin-6', 'ethanol', 'C20H18N2O2S'],
    ['coumarin-343', 'ethanol', 'C16H15NO4'],
    ['coumarin-153', 'ethanol', 'C16H14F3NO2'],
    ['perylene-diimide', 'toluene', 'C52H50N2O4'],
  ])('molar mass of %s', (dye, solvent, formula) => {
    expect(Math.abs(readDye(dye, solvent).molarMassGPerMol - massOf(formula))).toBeLessThan(0.005);
  });

  test('every dye in each of its solvents names a source and a status', () => {
    const pairs = dyeNames().flatMap((dye) => dyeSolvents(dye).map((solvent) => [dye, solvent] as const));
    expect(pairs.toSorted()).toEqual(KNOWN.map(([dye, solvent]) => [dye, solvent] as const).toSorted());
    for (const [dye, solvent] of pairs) {
      const { source, status } = readDye(dye, solvent);
      expect(source).toMatch(/\(\d{4}\)/);
      expect(status).toMatch(/^(verified|model)/);
    }
  });

  test('a model is called one, and a doubtful scale is spoken of', () => {
    expect(readDye('fluorescein', 'ethanol').status).toBe('verified absorption; model emission');
    expect(readDye('coumarin-153', 'ethanol').status).toBe('model; peaks, yield and widths from memory');
    expect(readDye('perylene-diimide', 'toluene').status).toContain('1.6 times too small');
  });

  test('only fluorescein asks for a pH', () => {
    expect(readDye('fluorescein', 'water').pHRange).toEqual([9, 14]);
    expect(readDye('rhodamine-b', 'ethanol').pHRange).toBeNull();
  });

  test('extinction is held at the blue end and 0 beyond the red one; the noise floor of the recorded trace is gone', () => {
    const { extinction } = readDye('fluorescein', 'ethanol');
    expect(extinction(300)).toBe(extinction(380));
    // Rhodamine 101 still absorbs a trace at the last point.
    const red = readDye('rhodamine-101', 'ethanol').extinction;
    expect(red(750)).toBeGreaterThan(0);
    expect(red(750.1)).toBe(0);
    // The recorded trace stands at about 190 L/(mol cm) there.
    expect(extinction(640)).toBeLessThan(1);
  });

  test('unknown names are answered with those there are', () => {
    expect(() => readDye('fluorescine', 'ethanol')).toThrow(RangeError);
    expect(() => readDye('fluorescine', 'ethanol')).toThrow(/fluorescine.*fluorescein, rhodamine-6g/);
    expect(() => readDye('fluorescein', 'toluene')).toThrow(/toluene.*ethanol, water/);
    expect(() => dyeSolvents('constructor')).toThrow(RangeError);
  });
});
