import type { LocatedFault } from '../design/fault.js';
import { formatFault } from '../design/format-fault.js';
import { safeText } from './safe-text.js';

/** A fault of a design as printable lines: what it quotes from the file cannot steer the terminal. */
export function faultLines(fault: LocatedFault): string[] {
  return formatFault(fault)
    .split('\n')
    .map((line) => safeText(line, 2000));
}

/** "2 faults, 1 warning". */
export function countFaults(faults: readonly LocatedFault[]): string {
  const errors = faults.filter((fault) => fault.severity === 'error').length;
  const warnings = faults.length - errors;
  const count = (n: number, word: string): string => `${n} ${word}${n === 1 ? '' : 's'}`;
  return warnings === 0 ? count(errors, 'fault') : `${count(errors, 'fault')}, ${count(warnings, 'warning')}`;
}
