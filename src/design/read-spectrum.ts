/** A spectrum in a file beside the design, with its units as the file states them. */
import type { DesignPath } from './fault.js';
import { readJcampDx } from './jcamp-dx.js';
import { type NumberColumn, readNumberRows } from './number-csv.js';
import type { Complaint, Reading } from './reading.js';

/** What the values of a spectrum can be stated to be. */
export type SpectrumValues =
  | 'extinction'
  | 'absorbance'
  | 'transmittance'
  | 'photons-per-nm'
  | 'energy-per-nm'
  | 'photons-per-wavenumber'
  | 'energy-per-wavenumber';

export interface FileSpectrum {
  /** Ascending. */
  readonly nm: readonly number[];
  readonly values: readonly number[];
  /** Line of each point. */
  readonly lines: readonly number[];
  /** Null where the file does not say what its values are. */
  readonly what: SpectrumValues | null;
  /** How the file words it. */
  readonly stated: string;
  readonly complain: (line: number, complaint: Omit<Complaint, 'path'>) => void;
}

type Field = SpectrumValues | 'nm' | 'wavenumber' | 'unstated';

const ANY = 1e12;
const anyValue = (name: string, field: Field): NumberColumn<Field> => ({
  name,
  field,
  least: -ANY,
  most: ANY,
  optional: true,
});
const COLUMNS: readonly NumberColumn<Field>[] = [
  { name: 'wavelength_nm', field: 'nm', least: 150, most: 3000, optional: true },
  { name: 'wavenumber_per_cm', field: 'wavenumber', least: 3000, most: 70_000, optional: true },
  anyValue('extinction_L_per_mol_cm', 'extinction'),
  anyValue('absorbance', 'absorbance'),
  anyValue('transmittance', 'transmittance'),
  anyValue('photons_per_nm', 'photons-per-nm'),
  anyValue('energy_per_nm', 'energy-per-nm'),
  anyValue('photons_per_wavenumber', 'photons-per-wavenumber'),
  anyValue('energy_per_wavenumber', 'energy-per-wavenumber'),
  anyValue('emission', 'unstated'),
  anyValue('intensity', 'unstated'),
];

/** The spectrum, or null after reporting what is wrong with the file. @param path of the field that names it */
export function readSpectrum(file: string, path: DesignPath, reading: Reading): FileSpectrum | null {
  if (file === '') return null;
  const table = reading.readTable(file);
  if (!table.ok) {
    const { problem, expected = 'a CSV or JCAMP-DX file in the folder of the design', suggestion } = table;
    reading.report({
      code: 'file',
      path,
      problem,
      found: file,
      expected,
      ...(suggestion === undefined ? {} : { suggestion }),
    });
    return null;
  }
  const complain = (line: number, complaint: Omit<Complaint, 'path'>, column = 1) =>
    reading.report({ ...complaint, path }, { file: table.file, line, column });
  const packed = /\.(jdx|dx|jcamp)$/i.test(file) || table.text.trimStart().startsWith('##');
  const spectrum = packed ? fromJcamp(table.text, complain) : fromCsv(table.text, complain);
  return spectrum && sorted({ ...spectrum, complain });
}

type Complain = (line: number, complaint: Omit<Complaint, 'path'>, column?: number) => void;
type Unsorted = Omit<FileSpectrum, 'complain'>;

function fromJcamp(text: string, complain: Complain): Unsorted | null {
  const read = readJcampDx(text);
  if (!read.ok) {
    const { line, column, ...fault } = read.fault;
    complain(line, fault, column);
    return null;
  }
  const { x, y, lines, xUnits, yUnits } = read.spectrum;
  const nm = xUnits.startsWith('NANOMET') ? x : xUnits === '1/CM' ? x.map((perCm) => 1e7 / perCm) : null;
  if (nm === null) {
    const problem = 'the wavelengths are in a unit that is not read';
    complain(lines[0] ?? 1, { code: 'quantity', problem, found: xUnits, expected: 'NANOMETERS or 1/CM' });
    return null;
  }
  const what = yUnits === 'ABSORBANCE' ? 'absorbance' : yUnits === 'TRANSMITTANCE' ? 'transmittance' : null;
  return { nm, values: y, lines, what, stated: yUnits };
}

function fromCsv(text: string, complain: Complain): Unsorted | null {
  const { rows, faults } = readNumberRows(text, COLUMNS);
  for (const { line, column, code, ...fault } of faults)
    complain(line, { ...fault, code: code === 'finish' ? 'file' : code }, column);
  if (faults.length > 0) return null;
  const line =
    text.split(/\r\n|\n|\r/).findIndex((content) => content.trim() !== '' && !content.trimStart().startsWith('#')) + 1;
  const given = (field: Field) => rows.some((row) => !Number.isNaN(row[field]));
  const axes = (['nm', 'wavenumber'] as const).filter(given);
  const ordinates = COLUMNS.map(({ field }) => field).filter(
    (field, i, all): field is Exclude<Field, 'nm' | 'wavenumber'> =>
      field !== 'nm' && field !== 'wavenumber' && all.indexOf(field) === i && given(field),
  );
  if (axes.length !== 1 || ordinates.length !== 1) {
    const problem =
      axes.length === 1 ? 'one column must say what the values are' : 'one column must give wavelengths or wavenumbers';
    const expected =
      axes.length === 1
        ? COLUMNS.slice(2)
            .map(({ name }) => name)
            .join(', ')
        : 'wavelength_nm or wavenumber_per_cm';
    const found =
      ordinates.length === 0 && axes.length === 1
        ? 'no such column'
        : `${axes.length === 1 ? ordinates.length : axes.length} such columns`;
    complain(line, { code: 'quantity', problem, found, expected });
    return null;
  }
  const nm = rows.map((row) => (axes[0] === 'nm' ? row.nm : 1e7 / row.wavenumber));
  const field = ordinates[0];
  const name = COLUMNS.find((column) => column.field === field)?.name ?? field;
  return {
    nm,
    values: rows.map((row) => row[field]),
    lines: rows.map((row) => row.line),
    what: field === 'unstated' ? null : field,
    stated: name,
  };
}

function sorted(spectrum: FileSpectrum): FileSpectrum | null {
  const { nm, values, lines, complain } = spectrum;
  const order = nm.map((_, i) => i).sort((a, b) => nm[a] - nm[b]);
  const twice = order.findIndex((at, i) => i > 0 && nm[at] === nm[order[i - 1]]);
  if (twice >= 0) {
    const found = `${nm[order[twice]]} nm, also in line ${lines[order[twice - 1]]}`;
    complain(lines[order[twice]], { code: 'range', problem: 'a wavelength stands here a second time', found });
    return null;
  }
  if (order.length < 3) {
    complain(lines[0] ?? 1, {
      code: 'range',
      problem: 'a spectrum needs three points or more',
      found: `${order.length}`,
    });
    return null;
  }
  return {
    ...spectrum,
    nm: order.map((i) => nm[i]),
    values: order.map((i) => values[i]),
    lines: order.map((i) => lines[i]),
  };
}
