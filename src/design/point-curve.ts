/** Curves from tables of the design. */
import type { Curve } from '../units/curve.js';
import type { DesignPath } from './fault.js';
import type { SpectralRows } from './media-fields.js';
import type { Reading } from './reading.js';

/** Linear between the rows, held at the ends or zero outside them; constant for a single value. */
export function pointCurve(rows: SpectralRows, outside: 'held' | 'zero'): Curve {
  if (rows.length === 0) return () => Number.NaN;
  const [[first, constant]] = rows;
  if (first === null) return () => constant;
  const wavelengths = rows.map(([wavelength]) => wavelength ?? Number.NaN);
  const last = wavelengths.length - 1;
  return (wavelengthNm) => {
    if (wavelengthNm < wavelengths[0]) return outside === 'held' ? rows[0][1] : 0;
    if (wavelengthNm >= wavelengths[last])
      return outside === 'held' || wavelengthNm === wavelengths[last] ? rows[last][1] : 0;
    let low = 0;
    let high = last;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (wavelengths[middle] <= wavelengthNm) low = middle;
      else high = middle;
    }
    const share = (wavelengthNm - wavelengths[low]) / (wavelengths[high] - wavelengths[low]);
    return rows[low][1] + share * (rows[high][1] - rows[low][1]);
  };
}

/** Reports the first row whose wavelength is not above the one before it. */
export function checkAscending(rows: SpectralRows, path: DesignPath, reading: Reading): void {
  const wrong = rows.findIndex(([wavelength], i) => i > 0 && (wavelength ?? 0) <= (rows[i - 1][0] ?? 0));
  if (wrong < 0) return;
  const found = `${rows[wrong][0]} nm after ${rows[wrong - 1][0]} nm`;
  const problem = 'the wavelengths of a table must rise';
  reading.report({
    code: 'range',
    path: [...path, wrong],
    problem,
    found,
    expected: 'each wavelength above the one before',
  });
}
