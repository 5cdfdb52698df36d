import { BATCH_HISTORIES } from '../tallies/run-tallies.js';

/** Histories in even and in odd batches: what stands behind the two halves of a map. */
export function halfHistories(histories: number): readonly [number, number] {
  const full = Math.floor(histories / BATCH_HISTORIES);
  const rest = histories - full * BATCH_HISTORIES;
  const even = Math.ceil(full / 2) * BATCH_HISTORIES + (full % 2 === 0 ? rest : 0);
  return [even, histories - even];
}
