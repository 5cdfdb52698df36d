import type { Description } from '../design/description.js';
import { FIGURE, type RunTallies } from '../tallies/run-tallies.js';
import { traceDescription } from '../trace/trace-design.js';
import type { ProofContext } from './proof.js';

/** Starting threads for fewer histories than this takes longer than tracing them; the results are the same bits. */
const WORTH_THREADS = 150_000;

/** What both ledgers of every run must close to. */
const CLOSURE = 1e-12;

/**
 * Traces a cell with `share` of the context's histories (at least 640, ten groups) and a seed of its own.
 * @throws Error when either ledger of the run does not close: then no number of it is worth comparing.
 */
export async function traceCell(context: ProofContext, cell: Description, share = 1): Promise<RunTallies> {
  const histories = Math.max(640, Math.round(context.histories * share));
  const { tallies } = await traceDescription(cell, {
    histories,
    precision: null,
    seconds: null,
    seed: `${context.seed}/${cell.title}`,
    threads: histories < WORTH_THREADS ? 0 : context.threads,
  });
  const gap = closureGap(tallies);
  if (!(gap <= CLOSURE)) throw new Error(`the ledgers of "${cell.title}" miss one by ${gap}`);
  return tallies;
}

/** Largest distance from 1 of the sums of both ledgers. */
export function closureGap(tallies: RunTallies): number {
  const { slots, moments } = tallies;
  let photons = 0;
  let energy = 0;
  slots.forEach((_, index) => {
    photons += moments.sum[2 * index];
    energy += moments.sum[2 * index + 1];
  });
  const launched = (figure: number): number => moments.sum[2 * slots.length + figure];
  return Math.max(
    Math.abs(photons / launched(FIGURE.launchedPhotons) - 1),
    Math.abs(energy / launched(FIGURE.launchedEnergy) - 1),
  );
}
