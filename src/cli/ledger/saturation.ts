import type { RunRecord } from '../../record/run-record.js';
import type { SaturationStep } from '../../trace/saturation-step.js';
import { formatWithError, significant } from '../number-format.js';
import { safeText } from '../safe-text.js';
import type { TerminalStyle } from '../terminal-style.js';
import { labelled } from './labelled.js';

/** How the strengths of a saturated run were found, a line a turn. */
export function saturation({ saturation: found }: RunRecord, style: TerminalStyle): string[] {
  if (found === null) return [];
  const shares = found.shares
    .map(({ medium, dye, share }) => `${significant(100 * share, 4)} % of ${safeText(dye)} in ${safeText(medium)}`)
    .join(', ');
  const end = found.settled ? 'at rest' : 'NOT AT REST: take the run as it is with care';
  return labelled(
    'Saturation',
    [
      `left to absorb: ${shares || 'no dye'}; ${end} after ${found.steps.length} ${found.steps.length === 1 ? 'turn' : 'turns'}`,
      ...found.steps.map((step, i) => `${i + 1}. ${stepWords(step)}`),
    ],
    style,
  );
}

/** One turn of the iteration. */
export function stepWords({ shares, exitPhotonFraction, standardError, off }: SaturationStep): string {
  const traced = shares.map(({ share }) => `${significant(100 * share, 4)} %`).join(', ');
  const exit = formatWithError(exitPhotonFraction, standardError, '', '±');
  return `traced with ${traced || 'no dye'} absorbing: exit photon fraction ${exit}, off by ${significant(100 * off, 2)} %`;
}
