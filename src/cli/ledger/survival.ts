import type { Figure, RunRecord } from '../../record/run-record.js';
import { survivalVerdicts } from '../../terms/survival-words.js';
import { safeText } from '../safe-text.js';
import type { TerminalStyle } from '../terminal-style.js';
import { withUnit } from './headline.js';
import { labelled } from './labelled.js';

/** The fourth question: will it survive. A figure that is not known says why. */
export function survival(record: RunRecord, style: TerminalStyle): string[] {
  const { peakAbsorbedPowerDensity, timeToBoiling, excitedMolecules, excitedMass, peakExcitedFraction } =
    record.figures;
  const lines = [
    figureLine('peak absorbed power density', peakAbsorbedPowerDensity, style),
    figureLine('time to boiling', timeToBoiling, style),
    excitedLine(excitedMolecules, excitedMass, style),
    figureLine('peak excited fraction', peakExcitedFraction, style, 100, '%'),
    ...survivalVerdicts(record.figures).map(({ figure, words }) => `${words}${noteOf(record.figures[figure])}`),
    ...unknownLines(record),
  ].filter((line) => line !== null);
  return labelled('Survival', lines, style);
}

/** Bleaching is asked of every design: where it cannot be told, it says why. */
function unknownLines({ figures: { timeToBleach } }: RunRecord): string[] {
  return timeToBleach.value === null && timeToBleach.note !== undefined
    ? [`time to bleach not known${noteOf(timeToBleach)}`]
    : [];
}

function excitedLine(molecules: Figure, mass: Figure, style: TerminalStyle): string | null {
  const count = withUnit(molecules, molecules.unit, style);
  if (count === null) return null;
  const weight = withUnit(mass, mass.unit, style);
  return `excited at any time ${count}${weight === null ? '' : `, ${weight}`}${noteOf(molecules)}`;
}

const noteOf = ({ note }: Figure): string => (note ? ` (${safeText(note, 400)})` : '');

function figureLine(name: string, figure: Figure, style: TerminalStyle, factor = 1, unit = figure.unit): string | null {
  const { value, standardError } = figure;
  const scaled: Figure = {
    ...figure,
    value: value === null ? null : value * factor,
    standardError: standardError === null ? null : standardError * factor,
  };
  const text = withUnit(scaled, unit, style);
  if (text === null) return figure.note ? `${name} not known: ${safeText(figure.note)}` : null;
  return `${name} ${text}${noteOf(figure)}`;
}
