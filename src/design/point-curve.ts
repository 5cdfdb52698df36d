/** Curves from tables of the design. */
import { linearCurve } from '../numerics/interpolate.js';
import type { Curve } from '../units/curve.js';
import type { DesignPath } from './fault.js';
import type { Reading } from './reading.js';
import type { SpectralRows } from './spectral-form.js';

/** Linear between the rows, held or zero beyond the ends; constant for a single value; NaN for rows that were faulty. */
export function pointCurve(rows: SpectralRows, outside: 'hold' | 'zero'): Curve {
  const wavelengths = rows.map(([wavelength]) => wavelength);
  const values = rows.map(([, value]) => value);
  if (wavelengths.length === 1 && wavelengths[0] === null) return () => values[0];
  const nm = wavelengths.map((wavelength) => wavelength ?? Number.NaN);
  if (rows.length === 0 || nm.some((wavelength, i) => !(i === 0 || wavelength > nm[i - 1]))) return () => Number.NaN;
  return linearCurve(nm, values, { below: outside, above: outside });
}

/** Reports the first row whose wavelength is not above the one before it. */
export function checkAscending(rows: SpectralRows, path: DesignPath, reading: Reading): void {
  const wrong = rows.findIndex(([wavelength], i) => i > 0 && (wavelength ?? 0) <= (rows[i - 1][0] ?? 0));
  if (wrong < 0) return;
  const found = `${rows[wrong][0]} nm after ${rows[wrong - 1][0]} nm`;
  const expected = 'each wavelength above the one before';
  const problem = 'the wavelengths of a table must rise';
  reading.report({ code: 'range', path: [...path, wrong], problem, found, expected });
}
