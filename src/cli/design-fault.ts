import type { LocatedFault } from '../design/fault.js';
import { CommandFault } from './command-fault.js';
import { EXIT } from './exit-codes.js';
import { countFaults, faultLines } from './fault-lines.js';

/** All faults of a design as the sentences that end the command. */
export function designFault(faults: readonly LocatedFault[]): CommandFault {
  return new CommandFault(EXIT.fault, [...faults.flatMap(faultLines), countFaults(faults)].join('\n'));
}
