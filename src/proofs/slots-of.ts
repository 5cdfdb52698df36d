import type { FateSlot } from '../tallies/run-tallies.js';

/** A test for slots that agree with every stated field. */
export const slotsOf =
  (wanted: Partial<FateSlot>) =>
  (slot: FateSlot): boolean =>
    (Object.keys(wanted) as (keyof FateSlot)[]).every((field) => slot[field] === wanted[field]);
