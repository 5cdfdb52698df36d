import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { LedgerDefect, photonLedger, wattLedger } from '../../src/outcome/ledger.js';
import { slot, syntheticTallies } from '../helpers/synthetic-tallies.js';

const SLOTS = [
  slot('missed', 'pump'),
  slot('left-by-exit', 'pump', 'lid.top'),
  slot('left-by-exit', 'emitted', 'lid.top'),
  slot('lost-in-dye', 'pump', 'cell', 'dye'),
  slot('stokes-heat', 'pump', 'cell', 'dye'),
];
const BATCH = 1000;

/** 20 batches alike: photons of each slot, and what each brings in eV; launched at 2.5 eV. */
function tallies(photons: readonly number[], energy: readonly number[]) {
  const batch = { histories: BATCH, photons, energy, figures: { launchedEnergy: 2.5 * BATCH } };
  return syntheticTallies(
    SLOTS,
    Array.from({ length: 20 }, () => batch),
  );
}

const sum = (rows: readonly { fraction: number }[]) => rows.reduce((total, { fraction }) => total + fraction, 0);

describe('ledgers', () => {
  // 600 photons out at 2.0 eV, from 600 absorbed at 2.5 eV: 300 eV of Stokes heat.
  const usual = tallies([0, 100, 600, 300, 0], [0, 250, 1200, 750, 300]);

  test('give every fate its share of photons and of watts, output first, then the largest; none of zero', () => {
    const shares = (rows: ReturnType<typeof photonLedger>) =>
      rows.map(({ fate, light, fraction }) => [fate, light, fraction]);
    expect(shares(photonLedger(usual))).toEqual([
      ['left-by-exit', 'emitted', 0.6],
      ['lost-in-dye', 'pump', 0.3],
      ['left-by-exit', 'pump', 0.1],
    ]);
    expect(shares(wattLedger(usual))).toEqual([
      ['left-by-exit', 'emitted', 0.48],
      ['lost-in-dye', 'pump', 0.3],
      ['stokes-heat', 'pump', 0.12],
      ['left-by-exit', 'pump', 0.1],
    ]);
  });

  test('output stays first when it is the smallest', () => {
    const [first] = photonLedger(tallies([900, 50, 10, 40, 0], [2250, 125, 20, 100, 5]));
    expect(first).toMatchObject({ fate: 'left-by-exit', light: 'emitted', fraction: 0.01 });
  });

  test('Stokes heat below zero, of light bluer than it was absorbed, still closes', () => {
    const rows = wattLedger(tallies([0, 0, 1000, 0, 0], [0, 0, 2600, 0, -100]));
    expect(rows.map(({ fraction }) => fraction)).toEqual([1.04, -0.04]);
    expect(sum(rows)).toBeCloseTo(1, 14);
  });

  test('close for every split of the histories (fast-check)', () => {
    const split = fc.array(fc.integer({ min: 0, max: BATCH }), { minLength: 3, maxLength: 3 }).map((cuts) => {
      const [a, b, c] = cuts.toSorted((x, y) => x - y);
      return [a, b - a, c - b, BATCH - c];
    });
    fc.assert(
      fc.property(split, fc.integer({ min: 1, max: 3000 }), (photons, emitted) => {
        const out = (photons[2] * emitted) / 1000;
        const energy = [photons[0] * 2.5, photons[1] * 2.5, out, photons[3] * 2.5, photons[2] * 2.5 - out];
        const run = tallies([...photons, 0], energy);
        expect(Math.abs(sum(photonLedger(run)) - 1)).toBeLessThanOrEqual(1e-12);
        expect(Math.abs(sum(wattLedger(run)) - 1)).toBeLessThanOrEqual(1e-12);
      }),
    );
  });
});

describe('a ledger that does not close', () => {
  test.each([
    ['a lost photon', [0, 100, 600, 299, 0], [0, 250, 1200, 750, 300], photonLedger],
    ['a photon booked twice', [1, 100, 600, 300, 0], [0, 250, 1200, 750, 300], photonLedger],
    ['lost energy', [0, 100, 600, 300, 0], [0, 250, 1200, 750, 299.999_99], wattLedger],
    ['no number', [0, 100, 600, Number.NaN, 0], [0, 250, 1200, 750, 300], photonLedger],
  ] as const)('%s is a defect of the program, and says so', (_, photons, energy, ledger) => {
    const make = () => ledger(tallies(photons, energy));
    expect(make).toThrow(LedgerDefect);
    expect(make).toThrow(/defect of stokeswell/);
    expect(make).not.toThrow(/your/i);
  });
});
