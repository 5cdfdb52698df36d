/** A CSV file of a bidirectional scattering distribution function -> values on a full grid, energy checked. */
import { scatterShares } from '../numerics/hemisphere-cells.js';
import type { ScatterTable } from './description.js';
import type { DesignPath } from './fault.js';
import { type NumberColumn, type NumberRow, readNumberRows } from './number-csv.js';
import type { Complaint, Reading } from './reading.js';

type Field = 'incidence' | 'scatter' | 'azimuth' | 'reflected' | 'transmitted';
type Row = NumberRow<Field>;

const COLUMNS: readonly NumberColumn<Field>[] = [
  { name: 'incidence_deg', field: 'incidence', least: 0, most: 90 },
  { name: 'scatter_deg', field: 'scatter', least: 0, most: 90 },
  { name: 'azimuth_deg', field: 'azimuth', least: 0, most: 180, optional: true },
  { name: 'reflected_per_sr', field: 'reflected', least: 0, most: 1e9, optional: true },
  { name: 'transmitted_per_sr', field: 'transmitted', least: 0, most: 1e9, optional: true },
];
/** A measured table may exceed 1 by so much, by the width of its steps. */
const SLACK = 0.005;
/** Relative difference of f(a, b) and f(b, a) that is told. */
const UNEQUAL = 0.1;
const LARGEST_GRID = 100_000;

/** The table, or null after reporting what is wrong with it. */
export function readScatterTable(name: string, path: DesignPath, reading: Reading): ScatterTable | null {
  if (name === '') return null;
  const file = reading.readTable(name);
  if (!file.ok) {
    const { problem, expected = 'a CSV file in the folder of the design', suggestion } = file;
    const hint = suggestion === undefined ? {} : { suggestion };
    reading.report({ code: 'file', path, problem, found: name, expected, ...hint });
    return null;
  }
  const { rows, faults } = readNumberRows(file.text, COLUMNS);
  const complain = (complaint: Omit<Complaint, 'path'>, line = 1, column = 1) =>
    reading.report({ ...complaint, path }, { file: file.file, line, column });
  for (const { line, column, ...fault } of faults) complain(fault, line, column);
  if (faults.length > 0) return null;
  const table = buildTable(rows, complain);
  return table === null ? null : checkEnergy(table, complain);
}

type Complain = (complaint: Omit<Complaint, 'path'>, line?: number) => void;

function buildTable(rows: readonly Row[], complain: Complain): ScatterTable | null {
  const sides = { reflected: !Number.isNaN(rows[0].reflected), transmitted: !Number.isNaN(rows[0].transmitted) };
  if (!sides.reflected && !sides.transmitted) {
    const problem = 'the heading has neither reflected_per_sr nor transmitted_per_sr';
    complain({ code: 'finish', problem, expected: 'one of them or both' });
    return null;
  }
  const azimuthOf = ({ azimuth }: Row) => (Number.isNaN(azimuth) ? 0 : azimuth);
  const incidenceDeg = rising(rows.map(({ incidence }) => incidence));
  const scatterDeg = rising(rows.map(({ scatter }) => scatter));
  const azimuthDeg = rising(rows.map(azimuthOf));
  const size = incidenceDeg.length * scatterDeg.length * azimuthDeg.length;
  const key = (incidence: number, scatter: number, azimuth: number) => `${incidence} ${scatter} ${azimuth}`;
  const cells = new Map<string, Row>();
  for (const row of rows) {
    const at = key(row.incidence, row.scatter, azimuthOf(row));
    if (cells.has(at)) {
      const found = `incidence ${row.incidence}, scatter ${row.scatter}, azimuth ${azimuthOf(row)} deg`;
      const expected = 'one row for each set of angles';
      complain({ code: 'finish', problem: 'the table has this row twice', found, expected }, row.line);
      return null;
    }
    cells.set(at, row);
  }
  if (cells.size < size || size > LARGEST_GRID) {
    const missing = size > LARGEST_GRID ? '' : `, ${size - cells.size} absent`;
    complain({
      code: 'finish',
      problem: 'the table is not a full grid of angles',
      found: `${cells.size} rows for ${incidenceDeg.length} × ${scatterDeg.length} × ${azimuthDeg.length} angles${missing}`,
      expected: `a row for each incidence at each scatter angle and azimuth, at most ${LARGEST_GRID}`,
    });
    return null;
  }
  if (scatterDeg.length < 2) {
    const expected = 'two or more, from 0 to 90';
    complain({
      code: 'finish',
      problem: 'the table has one scatter angle only',
      found: `${scatterDeg[0]} deg`,
      expected,
    });
    return null;
  }
  const side = (field: 'reflected' | 'transmitted') =>
    incidenceDeg.map((incidence) =>
      scatterDeg.map((scatter) =>
        azimuthDeg.map((azimuth) => (sides[field] ? (cells.get(key(incidence, scatter, azimuth)) as Row)[field] : 0)),
      ),
    );
  return { incidenceDeg, scatterDeg, azimuthDeg, reflected: side('reflected'), transmitted: side('transmitted') };
}

/** Refuses what would create energy, scales to 1 what exceeds it by its steps only, and warns of what is not reciprocal. */
function checkEnergy(table: ScatterTable, complain: Complain): ScatterTable | null {
  const { reflected, transmitted } = scatterShares(table);
  const sums = table.incidenceDeg.map((_, i) => reflected[i] + transmitted[i]);
  const worst = sums.indexOf(Math.max(...sums));
  const percent = (share: number) => `${Number((100 * share).toPrecision(5))} %`;
  if (sums[worst] > 1 + SLACK) {
    complain({
      code: 'energy',
      problem: 'the finish would create energy',
      found: `the integral of value times cosine is ${percent(sums[worst])} at incidence ${table.incidenceDeg[worst]} deg`,
      expected: 'at most 100 %, reflected and transmitted together',
    });
    return null;
  }
  warnOfReciprocity(table, complain);
  const scaled = (side: ScatterTable['reflected']) =>
    side.map((plane, i) => plane.map((row) => row.map((value) => value / Math.max(1, sums[i]))));
  return { ...table, reflected: scaled(table.reflected), transmitted: scaled(table.transmitted) };
}

/** What is reflected from a to b is as much as from b to a (Helmholtz), at angles that stand in both columns. */
function warnOfReciprocity(
  { incidenceDeg, scatterDeg, azimuthDeg, reflected }: ScatterTable,
  complain: Complain,
): void {
  const pairs = incidenceDeg.flatMap((angle, i) => (scatterDeg.includes(angle) ? [{ angle, i }] : []));
  for (const a of pairs) {
    for (const b of pairs) {
      if (b.i <= a.i) continue;
      for (let k = 0; k < azimuthDeg.length; k++) {
        const there = reflected[a.i][scatterDeg.indexOf(b.angle)][k];
        const back = reflected[b.i][scatterDeg.indexOf(a.angle)][k];
        if (Math.abs(there - back) <= UNEQUAL * Math.max(there, back)) continue;
        complain({
          code: 'caution',
          severity: 'warning',
          problem: 'the reflected light is not reciprocal, as that of real surfaces is',
          found: `${there} /sr from ${a.angle} to ${b.angle} deg, ${back} /sr from ${b.angle} to ${a.angle} deg`,
          expected: 'the same both ways; it is traced as given',
        });
        return;
      }
    }
  }
}

const rising = (values: readonly number[]): number[] => [...new Set(values)].sort((a, b) => a - b);
