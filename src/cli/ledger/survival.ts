import type { Figure, RunRecord } from '../../record/run-record.js';
import { safeText } from '../safe-text.js';
import type { TerminalStyle } from '../terminal-style.js';
import { withUnit } from './headline.js';
import { labelled } from './labelled.js';

/** The fourth question: will it survive. A figure that is not known says why. */
export function survival(record: RunRecord, style: TerminalStyle): string[] {
  const { peakAbsorbedPowerDensity, timeToBoiling } = record.figures;
  const lines = [
    figureLine('peak absorbed power density', peakAbsorbedPowerDensity, style),
    figureLine('time to boiling', timeToBoiling, style),
  ].filter((line) => line !== null);
  return labelled('Survival', lines, style);
}

function figureLine(name: string, figure: Figure, style: TerminalStyle): string | null {
  const value = withUnit(figure, figure.unit, style);
  if (value === null) return figure.note ? `${name} not known: ${safeText(figure.note)}` : null;
  return `${name} ${value}${figure.note ? ` (${safeText(figure.note)})` : ''}`;
}
