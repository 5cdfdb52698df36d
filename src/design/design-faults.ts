import type { Fault } from './fault.js';

/** Thrown by a stage after reading when a design cannot be traced; carries every fault found, not only the first. */
export class DesignFaults extends Error {
  constructor(readonly faults: readonly Fault[]) {
    super(faults.map((fault) => `${fault.path.join('.')}: ${fault.problem}`).join('\n'));
    this.name = 'DesignFaults';
  }
}
