/** Rows of a coating table, from the design or a CSV file beside it -> shares on a full grid. */
import { type CoatingPoint, readCoatingRows } from './coating-csv.js';
import type { FinishDescription } from './description.js';
import type { DesignPath } from './fault.js';
import type { CoatingTable } from './finish-fields.js';
import type { Complaint, Reading } from './reading.js';

type Grid = Omit<Extract<FinishDescription, { kind: 'table' }>, 'name' | 'path' | 'kind'>;

/** A point with how to complain about it. */
interface Row extends CoatingPoint {
  readonly complain: (complaint: Omit<Complaint, 'path'>) => void;
}

/** What shares may exceed 1 by: rounding of the user's percent values. */
export const ENERGY_SLACK = 1e-9;

const DEGREES_PER_RADIAN = 180 / Math.PI;

/** The grid, or null after reporting. Wavelengths in nm, angles in degrees, both rising; shares [wavelength][angle]. */
export function coatingGrid(table: CoatingTable, path: DesignPath, reading: Reading): Grid | null {
  const rows = table.kind === 'rows' ? rowsOfDesign(table, path, reading) : rowsOfFile(table.name, path, reading);
  if (rows === null || rows.some(hasBlank)) return null;
  return buildGrid(rows, path, reading);
}

const hasBlank = ({ wavelengthNm, angleDeg, reflectance, transmittance }: Row): boolean =>
  Number.isNaN(wavelengthNm + angleDeg + reflectance + transmittance);

function rowsOfDesign({ rows }: Extract<CoatingTable, { kind: 'rows' }>, path: DesignPath, reading: Reading): Row[] {
  return rows.map(([wavelengthNm, angle, reflectance, transmittance], i) => ({
    wavelengthNm,
    // To a billionth, so that 30 deg is the same column however it was written.
    angleDeg: Math.round(angle * DEGREES_PER_RADIAN * 1e9) / 1e9,
    reflectance,
    transmittance,
    complain: (complaint) => reading.report({ ...complaint, path: [...path, i] }),
  }));
}

function rowsOfFile(name: string, path: DesignPath, reading: Reading): Row[] | null {
  if (name === '') return null;
  const table = reading.readTable(name);
  if (!table.ok) {
    const { problem, expected = 'a CSV file in the folder of the design', suggestion } = table;
    const hint = suggestion === undefined ? {} : { suggestion };
    reading.report({ code: 'file', path, problem, found: name, expected, ...hint });
    return null;
  }
  const { points, faults } = readCoatingRows(table.text);
  for (const { line, column, ...fault } of faults)
    reading.report({ ...fault, path }, { file: table.file, line, column });
  if (faults.length > 0) return null;
  return points.map(({ line, ...point }) => ({
    ...point,
    complain: (complaint) => reading.report({ ...complaint, path }, { file: table.file, line, column: 1 }),
  }));
}

function buildGrid(rows: readonly Row[], path: DesignPath, reading: Reading): Grid | null {
  const wavelengthsNm = rising(rows.map(({ wavelengthNm }) => wavelengthNm));
  const anglesDeg = rising(rows.map(({ angleDeg }) => angleDeg));
  const key = (wavelength: number, angle: number) => `${wavelength} ${angle}`;
  const cells = new Map<string, Row>();
  let sound = true;
  for (const row of rows) {
    const at = key(row.wavelengthNm, row.angleDeg);
    const sum = row.reflectance + row.transmittance;
    if (sum > 1 + ENERGY_SLACK) {
      const found = `R + T = ${Number((sum * 100).toPrecision(6))} %`;
      row.complain({ code: 'energy', problem: 'the finish would create energy', found, expected: 'at most 100 %' });
      sound = false;
    }
    if (cells.has(at)) {
      const found = `${row.wavelengthNm} nm, ${row.angleDeg} deg`;
      row.complain({
        code: 'finish',
        problem: 'the table has this row twice',
        found,
        expected: 'one row for each pair',
      });
      sound = false;
    }
    cells.set(at, row);
  }
  const absent = wavelengthsNm.flatMap((nm) =>
    anglesDeg.filter((angle) => !cells.has(key(nm, angle))).map((angle) => [nm, angle]),
  );
  if (absent.length > 0) {
    reading.report({
      code: 'finish',
      path,
      problem: 'the table is not a full grid of wavelengths and angles',
      found: `${absent.length} of ${wavelengthsNm.length * anglesDeg.length} rows absent, first ${absent[0][0]} nm at ${absent[0][1]} deg`,
      expected: 'a row for each wavelength at each angle',
    });
    sound = false;
  }
  if (!sound) return null;
  const values = (pick: (row: Row) => number) =>
    wavelengthsNm.map((nm) => anglesDeg.map((angle) => pick(cells.get(key(nm, angle)) as Row)));
  const reflectance = values((row) => row.reflectance);
  return { wavelengthsNm, anglesDeg, reflectance, transmittance: values((row) => row.transmittance) };
}

const rising = (values: readonly number[]): number[] => [...new Set(values)].sort((a, b) => a - b);
