import { describe, expect, it } from 'vitest';
import { largestLosses } from '../../../src/cli/ledger/largest-losses.js';
import type { LedgerRow } from '../../../src/record/run-record.js';

const row = (fate: LedgerRow['fate'], where: string, by: string | null, fraction: number): LedgerRow => ({
  fate,
  light: 'emitted',
  where,
  by,
  fraction,
  standardError: null,
});

describe('largestLosses', () => {
  it('adds up what one change would mend, leaves output and Stokes heat out, and names three', () => {
    const rows = [
      row('left-by-exit', 'lid.top', null, 0.3),
      row('stokes-heat', 'cell', 'fluorescein', 0.3),
      row('absorbed-by-finish', 'cell.left', 'silvered', 0.07),
      row('absorbed-by-finish', 'cell.right', 'silvered', 0.08),
      row('left-elsewhere', 'lid.left', null, 0.1),
      row('left-elsewhere', 'lid.right', null, 0.09),
      row('lost-in-dye', 'cell', 'fluorescein', 0.06),
    ];
    expect(largestLosses(rows)).toEqual([
      '15 % absorbed by silvered',
      '10 % left elsewhere, lid.left',
      '9 % left elsewhere, lid.right',
    ]);
  });
  it('has nothing to say when nothing is lost', () => {
    expect(largestLosses([row('left-by-exit', 'lid.top', null, 1)])).toEqual([]);
  });
});
