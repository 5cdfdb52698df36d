import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { arrangeLedger } from '../../../src/cli/ledger/arrange-ledger.js';
import type { LedgerRow } from '../../../src/record/run-record.js';

const FATES = [
  'missed',
  'reflected-at-entry',
  'left-by-exit',
  'left-elsewhere',
  'absorbed-by-finish',
  'absorbed-by-solid',
  'absorbed-by-solvent',
  'lost-in-dye',
  'stokes-heat',
  'trapped',
] as const;

const row: fc.Arbitrary<LedgerRow> = fc.record({
  fate: fc.constantFrom(...FATES),
  light: fc.constantFrom('pump' as const, 'emitted' as const),
  where: fc.constantFrom('cell', 'cell.top', null),
  by: fc.constant(null),
  fraction: fc.oneof(
    fc.constant(0),
    fc.double({ min: 0, max: 0.002, noNaN: true }),
    fc.double({ min: 0, max: 1, noNaN: true }),
  ),
  standardError: fc.constant(null),
});

describe('arrangeLedger', () => {
  it('loses nothing: rows and folds add up to each group, groups to the total', () => {
    fc.assert(
      fc.property(fc.array(row, { maxLength: 40 }), (ledger) => {
        const arranged = arrangeLedger(ledger);
        const whole = ledger.reduce((sum, one) => sum + one.fraction, 0);
        expect(arranged.total).toBeCloseTo(whole, 12);
        expect(arranged.groups.reduce((sum, group) => sum + group.fraction, 0)).toBeCloseTo(whole, 12);
        let lines = 0;
        for (const group of arranged.groups) {
          const shown = group.rows.reduce((sum, one) => sum + one.fraction, 0);
          expect(shown + group.folded.fraction).toBeCloseTo(group.fraction, 12);
          lines += group.rows.length + group.folded.rows;
        }
        expect(lines).toBe(ledger.filter((one) => one.fraction !== 0).length);
      }),
      { seed: 20261201 },
    );
  });

  it('sorts each group from large to small and shows no loss below 0.1 %', () => {
    fc.assert(
      fc.property(fc.array(row, { maxLength: 40 }), (ledger) => {
        for (const { name, rows } of arrangeLedger(ledger).groups) {
          const fractions = rows.map((one) => one.fraction);
          expect(fractions).toEqual(fractions.toSorted((a, b) => b - a));
          if (name !== 'output') expect(Math.min(1, ...fractions)).toBeGreaterThanOrEqual(0.001);
        }
      }),
      { seed: 20261201 },
    );
  });
});
