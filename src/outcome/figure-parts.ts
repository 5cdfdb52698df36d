/** What figures of the dyes are made of. */
import type { DissolvedDye } from '../design/description.js';
import type { Figure } from '../record/run-record.js';

export const unknown = (unit: string, note: string): Figure => ({ value: null, standardError: null, unit, note });
/** A value whose relative error is known. */
export const withSpread = (value: number, spread: number | null, unit: string, note?: string): Figure => ({
  value,
  standardError: spread === null ? null : value * spread,
  unit,
  ...(note === undefined ? {} : { note }),
});

export const NOT_PUMPED = 'no dye absorbed light';
export const names = (dyes: readonly DissolvedDye[]): string => [...new Set(dyes.map(({ name }) => name))].join(', ');

/** Two digits; with a power of ten where zeros would have to be counted. */
export const short = (value: number): string =>
  value !== 0 && (Math.abs(value) < 1e-3 || Math.abs(value) >= 1e6)
    ? value.toExponential(1).replace('.0e', 'e')
    : String(Number(value.toPrecision(2)));
