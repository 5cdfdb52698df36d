/** The dial of a design that holds the strength of its dye. */
import type { Description } from '../../design/description.js';
import { readDesignText, type SoundDesign } from '../../design/read-design.js';
import { CommandFault } from '../command-fault.js';
import { designFault } from '../design-fault.js';
import { EXIT } from '../exit-codes.js';
import { safeText } from '../safe-text.js';
import { unknownNameFault } from './unknown-name.js';

export interface StrengthDial {
  readonly name: string;
  /** Text of the dial as it is. */
  readonly text: string;
  /** Medium and dye whose strength it turns; the first of several. */
  readonly medium: string;
  readonly dye: string;
}

type Dials = Readonly<Record<string, string>>;

/** A turn that no rounding hides. */
const PROBE = 1.5;

/**
 * @param wanted the user's choice
 * @throws CommandFault where there is none, or more than one
 */
export function strengthDial(reading: SoundDesign, turned: Dials, wanted: string | undefined): StrengthDial {
  const { dials } = reading.description;
  if (wanted !== undefined && !dials.some(({ name }) => name === wanted)) {
    throw unknownNameFault(
      'dial',
      wanted,
      dials.map(({ name }) => name),
    );
  }
  const found = dials
    .filter(({ name }) => wanted === undefined || name === wanted)
    .flatMap((dial) => strengthOf(reading, turned, dial.name, dial.text) ?? []);
  if (found.length === 1) return found[0];
  const place = `${safeText(reading.file)}: `;
  if (found.length > 1) {
    const names = found.map(({ name }) => safeText(name)).join(', ');
    throw new CommandFault(
      EXIT.fault,
      `${place}several dials change a dye's strength: ${names}. Choose one with --turn.`,
    );
  }
  const text =
    wanted === undefined
      ? 'no dial changes the strength of a dye. Give the strength a dial, such as strength: 0.2 mmol/L, and use it in media.'
      : `the dial ${safeText(wanted)} does not change the strength of a dye.`;
  throw new CommandFault(EXIT.fault, `${place}${text}`);
}

function strengthOf(reading: SoundDesign, turned: Dials, name: string, text: string): StrengthDial | null {
  const other = readDesignText(reading.text, reading.file, { dials: { ...turned, [name]: times(text, PROBE) } });
  if (!other.ok) return null;
  const changed = dyesOf(reading.description).find(({ medium, dye }) => {
    const [before, after] = [reading.description, other.description].map((description) =>
      strengthIn(description, medium, dye),
    );
    return before > 0 && Math.abs(after / before - PROBE) < 1e-6;
  });
  return changed === undefined ? null : { name, text, ...changed };
}

/** The text of a quantity so many times as large. */
export const times = (text: string, factor: number): string => `(${text}) * ${factor}`;

/** The design with the strength so many times as large. @throws CommandFault */
export function atStrength(reading: SoundDesign, turned: Dials, dial: StrengthDial, factor: number): SoundDesign {
  const dials = { ...turned, [dial.name]: times(dial.text, factor) };
  const other = readDesignText(reading.text, reading.file, { dials });
  if (!other.ok) throw designFault(other.faults);
  return other;
}

const dyesOf = ({ media, parts }: Description): { medium: string; dye: string }[] =>
  [...new Set(parts.map(({ medium }) => medium))].flatMap((medium) =>
    (media.get(medium)?.dyes ?? []).map(({ name: dye }) => ({ medium, dye })),
  );

/** mol/L; of a dye given by its absorption, that at 445 nm or its largest thereabouts. */
export function strengthIn({ media }: Description, medium: string, dye: string): number {
  const found = media.get(medium)?.dyes.find(({ name }) => name === dye);
  if (found === undefined) return 0;
  if (found.concentration !== null) return found.concentration;
  return Math.max(...Array.from({ length: 60 }, (_, i) => found.absorption(300 + 10 * i)));
}
