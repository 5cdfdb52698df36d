import type { RunRecord } from '../../run-folder/run-record.js';
import { safeText } from '../safe-text.js';
import type { TerminalStyle } from '../terminal-style.js';
import { withUnit } from './headline.js';
import { labelled } from './labelled.js';

/** The fourth question: will it survive. */
export function survival(record: RunRecord, style: TerminalStyle): string[] {
  const { peakAbsorbedPowerDensity, timeToBoiling } = record.figures;
  const density = withUnit(peakAbsorbedPowerDensity, peakAbsorbedPowerDensity.unit, style);
  const boiling = withUnit(timeToBoiling, timeToBoiling.unit, style);
  const lines: string[] = [];
  if (density !== null) lines.push(`peak absorbed power density ${density}`);
  if (boiling !== null) lines.push(`liquid standing still boils there after ${boiling} (no heat carried away)`);
  else if (timeToBoiling.note !== undefined) lines.push(`time to boiling: ${safeText(timeToBoiling.note)}`);
  return labelled('Survival', lines, style);
}
