/** Tallies -> the two ledgers: every fate with its share of the launched photons, and of the launched watts. */
import type { LedgerRow } from '../record/run-record.js';
import type { RunTallies } from '../tallies/run-tallies.js';
import { ErrorBars } from './error-bars.js';

/** A ledger that does not close is a defect of the program, never of the design. */
export class LedgerDefect extends Error {
  constructor(ledger: string, total: number) {
    super(`the ${ledger} ledger sums to ${total}, not 1; this is a defect of stokeswell, please report it`);
    this.name = 'LedgerDefect';
  }
}

const CLOSURE = 1e-12;

/** Shares of launched photons. @throws LedgerDefect */
export function photonLedger(tallies: RunTallies): LedgerRow[] {
  return ledger(tallies, 0, 'photon', 1);
}

/** Shares of launched power; the rows `stokes-heat` exist only here and may be negative where a dye emits bluer than it absorbs. @throws LedgerDefect */
export function wattLedger(tallies: RunTallies): LedgerRow[] {
  return ledger(tallies, 1, 'watt', new ErrorBars(tallies).mean('launchedEnergy'));
}

function ledger(tallies: RunTallies, part: 0 | 1, name: string, launched: number): LedgerRow[] {
  const bars = new ErrorBars(tallies);
  const rows = tallies.slots.map(({ fate, light, where, by }, slot): LedgerRow => {
    const { value, standardError } = bars.slot(slot, part);
    return {
      fate,
      light,
      where,
      by,
      fraction: value / launched,
      standardError: standardError === null ? null : standardError / launched,
    };
  });
  const total = rows.reduce((sum, { fraction }) => sum + fraction, 0);
  if (!(Math.abs(total - 1) <= CLOSURE)) throw new LedgerDefect(name, total);
  const output = ({ fate, light }: LedgerRow) => fate === 'left-by-exit' && light === 'emitted';
  return rows
    .filter(({ fraction }) => fraction !== 0)
    .sort((a, b) => Number(output(b)) - Number(output(a)) || b.fraction - a.fraction);
}
