/** Layer materials of the design and of the library -> complex indices with the range they hold in. */
import { linearCurve } from '../numerics/interpolate.js';
import type { Curve } from '../units/curve.js';
import type { DesignPath } from './fault.js';
import type { Named } from './form-record.js';
import { type NumberColumn, readNumberRows } from './number-csv.js';
import { checkAscending, pointCurve } from './point-curve.js';
import type { Reading } from './reading.js';
import type { SpectralRows } from './spectral-form.js';
import type { LayerMaterialRecord } from './stack-fields.js';

export interface LayerMaterial {
  readonly name: string;
  readonly n: Curve;
  readonly k: Curve;
  /** Wavelengths there are data for, nm; null for a constant. */
  readonly rangeNm: readonly [number, number] | null;
}

const COLUMNS: readonly NumberColumn<'nm' | 'n' | 'k'>[] = [
  { name: 'wavelength_nm', field: 'nm', least: 200, most: 2000 },
  { name: 'n', field: 'n', least: 0.01, most: 10 },
  { name: 'k', field: 'k', least: 0, most: 20 },
];

/** A layer material of the design, or null after reporting what is wrong with it. */
export function describeLayerMaterial(
  { name, path, value }: Named<LayerMaterialRecord>,
  reading: Reading,
): LayerMaterial | null {
  const { n, k, table } = value;
  if (table !== null) {
    if (k !== null) {
      const problem = 'a table brings its own k';
      reading.report({ code: 'type', path: [...path, 'k'], problem, expected: 'n and k, or a table' });
    }
    return fromTable(name, table, [...path, 'table'], reading);
  }
  if (n === null) return null;
  checkAscending(n, [...path, 'n'], reading);
  checkAscending(k ?? [], [...path, 'k'], reading);
  const rangeNm = common([rangeOf(n), k === null ? null : rangeOf(k)]);
  return { name, n: pointCurve(n, 'hold'), k: k === null ? () => 0 : pointCurve(k, 'hold'), rangeNm };
}

function fromTable(name: string, file: string, path: DesignPath, reading: Reading): LayerMaterial | null {
  if (file === '') return null;
  const table = reading.readTable(file);
  if (!table.ok) {
    const { problem, expected = 'a CSV file in the folder of the design', suggestion } = table;
    const hint = suggestion === undefined ? {} : { suggestion };
    reading.report({ code: 'file', path, problem, found: file, expected, ...hint });
    return null;
  }
  const { rows: points, faults } = readNumberRows(table.text, COLUMNS);
  for (const { line, column, ...fault } of faults)
    reading.report({ ...fault, path }, { file: table.file, line, column });
  if (faults.length > 0) return null;
  const wrong = points.findIndex(({ nm }, i) => i > 0 && nm <= points[i - 1].nm);
  if (wrong > 0) {
    const found = `${points[wrong].nm} nm after ${points[wrong - 1].nm} nm`;
    const problem = 'the wavelengths of a table must rise';
    const place = { file: table.file, line: points[wrong].line, column: 1 };
    reading.report({ code: 'range', path, problem, found, expected: 'each wavelength above the one before' }, place);
    return null;
  }
  const nm = points.map((point) => point.nm);
  const curve = (column: 'n' | 'k') =>
    linearCurve(
      nm,
      points.map((point) => point[column]),
      { below: 'hold', above: 'hold' },
    );
  return { name, n: curve('n'), k: curve('k'), rangeNm: [nm[0], nm[nm.length - 1]] };
}

function rangeOf(rows: SpectralRows): readonly [number, number] | null {
  const first = rows[0]?.[0] ?? null;
  const last = rows[rows.length - 1]?.[0] ?? null;
  return first === null || last === null ? null : [first, last];
}

function common(ranges: readonly (readonly [number, number] | null)[]): readonly [number, number] | null {
  const given = ranges.filter((range) => range !== null);
  if (given.length === 0) return null;
  return [Math.max(...given.map(([low]) => low)), Math.min(...given.map(([, high]) => high))];
}
