/** A dye of the library in a cuvette, described by the same reader as any design. */

import type { DissolvedDye, MediumDescription } from '../../design/description.js';
import type { LocatedFault } from '../../design/fault.js';
import { formatFault } from '../../design/format-fault.js';
import { readDesignText } from '../../design/read-design.js';
import { dyeNames, dyeSolvents, solventNames } from '../../materials/library.js';
import { CommandFault } from '../command-fault.js';
import { EXIT } from '../exit-codes.js';
import { faultLines } from '../fault-lines.js';
import { unknownNameFault } from './unknown-name.js';

export interface CuvetteOptions {
  readonly dye: string;
  readonly solvent: string | undefined;
  readonly strength: string;
  readonly pH: string | undefined;
  readonly pathMm: number;
  readonly pumpNm: number;
}

export interface Cuvette {
  readonly medium: MediumDescription;
  readonly dye: DissolvedDye;
  /** Warnings as lines. */
  readonly warnings: readonly string[];
}

/** @throws CommandFault with every fault, each named by the option it belongs to */
export function readCuvette({ dye, solvent, strength, pH, pathMm, pumpNm }: CuvetteOptions): Cuvette {
  if (!dyeNames().includes(dye)) throw unknownNameFault('dye', dye, dyeNames());
  const base = solvent ?? defaultSolvent(dye);
  if (!solventNames().includes(base)) throw unknownNameFault('solvent', base, solventNames());
  // JSON is YAML, and quotes whatever is in these texts.
  const text = JSON.stringify({
    design: 'Cuvette',
    media: { liquid: { solvent: base, ...(pH === undefined ? {} : { pH }), dyes: { [dye]: strength } } },
    parts: { cuvette: { box: ['10 mm', '10 mm', `${pathMm} mm`], medium: 'liquid' } },
    pumps: {
      lamp: {
        patch: { rectangle: ['1 mm', '1 mm'] },
        power: '1 W',
        wavelength: `${pumpNm} nm`,
        toward: 'cuvette.bottom',
        distance: '10 mm',
      },
    },
    exit: 'cuvette.top',
  });
  const reading = readDesignText(text, 'cuvette');
  if (!reading.ok) throw new CommandFault(EXIT.fault, reading.faults.map(optionFault).join('\n'));
  const medium = reading.description.media.get('liquid');
  if (medium === undefined) throw new Error('the cuvette has no liquid');
  return { medium: { ...medium, name: base }, dye: medium.dyes[0], warnings: reading.warnings.map(optionFault) };
}

/** The first solvent with spectra of the dye that is also a solvent of the library, else ethanol. */
const defaultSolvent = (dye: string): string =>
  dyeSolvents(dye).find((solvent) => solventNames().includes(solvent)) ?? 'ethanol';

/** There is no file to point into: the option is the place. */
function optionFault(fault: LocatedFault): string {
  const [line] = faultLines(fault);
  const place = `${fault.file}:${fault.line}:${fault.column}: `;
  const told = (line ?? formatFault(fault)).slice(place.length).replace(/^(warning: )?[^—]*— /, '$1');
  return fault.code === 'caution' ? told.replace(/^warning: /, '') : `${optionOf(fault.path)}: ${told}`;
}

function optionOf(path: readonly (string | number)[]): string {
  if (path.includes('dyes')) return '--strength';
  if (path.includes('pH')) return '--ph';
  if (path.includes('box')) return '--path';
  return path.includes('wavelength') ? '--pump' : 'medium';
}
