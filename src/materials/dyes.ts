import { linearCurve } from '../numerics/interpolate.js';
import { readDyeForms } from './dye-forms.js';
import { readYieldTemperature } from './dye-temperature.js';
import { type DyeData, unknownName } from './material-data.js';
import { numberIn, type Row, readTable } from './read-table.js';

interface DyeEntry {
  /** g/mol, from the formula and the abridged standard atomic weights (CIAAW 2021; from memory, high). */
  readonly molarMassGPerMol: number;
  readonly files: Readonly<Record<string, string | undefined>>;
  readonly pHRange: readonly [number, number] | null;
}

const DYES: Readonly<Record<string, DyeEntry | undefined>> = {
  // The spectra are those of the dianion, which is the form above pH 9 (pKa near 6.4: Sjöback et al. 1995).
  fluorescein: {
    molarMassGPerMol: 332.31,
    files: { ethanol: 'fluorescein_ethanol_basic', water: 'fluorescein_water_ph9' },
    pHRange: [9, 14],
  },
  'rhodamine-6g': { molarMassGPerMol: 479.02, files: { ethanol: 'rhodamine_6g_ethanol' }, pHRange: null },
  'rhodamine-b': { molarMassGPerMol: 479.02, files: { ethanol: 'rhodamine_b_ethanol' }, pHRange: null },
  'rhodamine-101': { molarMassGPerMol: 490.6, files: { ethanol: 'rhodamine_101_ethanol' }, pHRange: null },
  'coumarin-6': { molarMassGPerMol: 350.44, files: { ethanol: 'coumarin_6_ethanol' }, pHRange: null },
  'coumarin-343': { molarMassGPerMol: 285.3, files: { ethanol: 'coumarin_343_ethanol' }, pHRange: null },
  'coumarin-153': { molarMassGPerMol: 309.29, files: { ethanol: 'coumarin_153_ethanol' }, pHRange: null },
  'perylene-diimide': { molarMassGPerMol: 766.98, files: { toluene: 'perylene_diimide_toluene' }, pHRange: null },
};

export const dyeNames = (): readonly string[] => Object.keys(DYES);

/** Solvents in which the library has spectra of a dye. @throws RangeError for an unknown dye. */
export function dyeSolvents(dye: string): readonly string[] {
  return Object.keys(entryOf(dye).files);
}

function entryOf(dye: string): DyeEntry {
  const entry = Object.hasOwn(DYES, dye) ? DYES[dye] : undefined;
  if (entry === undefined) throw unknownName('dye', dye, dyeNames());
  return entry;
}

/** @throws RangeError for an unknown dye or a solvent without spectra of it. */
export function readDye(dye: string, solvent: string): DyeData {
  const { molarMassGPerMol, files, pHRange } = entryOf(dye);
  const file = Object.hasOwn(files, solvent) ? files[solvent] : undefined;
  if (file === undefined) throw unknownName(`spectra of ${dye} in`, solvent, Object.keys(files));
  const { rows, notes } = readTable(`dyes/${file}.csv`);
  const summary = readTable('dyes/index.csv').rows.find((row) => row.file === file);
  if (summary === undefined) throw new Error(`dyes/index.csv has no line for ${file}`);
  const nm = rows.map((row) => numberIn(row, 'wavelength_nm'));
  const column = (name: string) => rows.map((row) => numberIn(row, name));
  const emission = column('emission_photons_per_nm_rel');
  const extinction = linearCurve(nm, column('epsilon_L_per_mol_cm'), { below: 'hold', above: 'zero' });
  return {
    name: dye,
    solvent,
    molarMassGPerMol,
    extinction,
    emission: {
      photonsPerNm: linearCurve(nm, emission, { below: 'zero', above: 'zero' }),
      ...litRange(nm, emission),
    },
    quantumYield: numberIn(summary, 'quantum_yield'),
    lifetimeNs: lifetimeOf(summary),
    source: sourceOf(notes, file),
    status: summary.caution === '' ? summary.spectra_status : `${summary.spectra_status}; ${summary.caution}`,
    pHRange,
    rangeNm: [nm[0], nm[nm.length - 1]],
    forms: readDyeForms(dye, solvent, extinction),
    temperature: readYieldTemperature(dye),
  };
}

function lifetimeOf(summary: Row): number | null {
  return summary.lifetime_ns_calc === '' ? null : numberIn(summary, 'lifetime_ns_calc');
}

/** What follows the colon of the head line that starts with 'source'. */
function sourceOf(notes: readonly string[], file: string): string {
  const line = notes.find((note) => note.startsWith('source'));
  if (line === undefined) throw new Error(`dyes/${file}.csv names no source`);
  return line.slice(line.indexOf(':') + 1).trim();
}

/** Wavelengths between which a spectrum is not zero. */
function litRange(nm: readonly number[], values: readonly number[]): { fromNm: number; toNm: number } {
  const first = values.findIndex((value) => value > 0);
  const last = values.findLastIndex((value) => value > 0);
  return { fromNm: nm[Math.max(0, first - 1)], toNm: nm[Math.min(nm.length - 1, last + 1)] };
}
