import type { Description } from '../../src/design/description.js';
import type { Fate, Light } from '../../src/tallies/run-tallies.js';
import { FIGURE } from '../../src/tallies/run-tallies.js';
import { traceDescription } from '../../src/trace/trace-design.js';
import type { TraceResult } from '../../src/trace/trace-result.js';

/** Traces in the calling thread. */
export function traceHere(description: Description, histories: number, seed = '1'): Promise<TraceResult> {
  return traceDescription(description, { histories, precision: null, seconds: null, seed, threads: 0 });
}

/** Share of histories with a fate. */
export function share(
  { tallies }: TraceResult,
  want: { fate: Fate; light?: Light; where?: string; by?: string },
): number {
  const matches = tallies.slots.map(
    (slot) =>
      slot.fate === want.fate &&
      (want.light === undefined || slot.light === want.light) &&
      (want.where === undefined || slot.where === want.where) &&
      (want.by === undefined || slot.by === want.by),
  );
  const photons = matches.reduce((sum, yes, i) => sum + (yes ? tallies.moments.sum[2 * i] : 0), 0);
  return photons / tallies.moments.histories;
}

/** Mean per history of a figure sum. */
export function figure({ tallies }: TraceResult, name: keyof typeof FIGURE): number {
  return tallies.moments.sum[2 * tallies.slots.length + FIGURE[name]] / tallies.moments.histories;
}

/** Binomial standard error of a share. */
export const binomialError = (p: number, n: number): number => Math.sqrt(Math.max(p * (1 - p), 1 / n) / n);
