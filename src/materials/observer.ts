/** CIE 1931 standard colorimetric observer, 2° (CIE 15:2004 Table T.4; ISO/CIE 11664-1), 380–780 nm in steps of 5 nm. */
import { numberIn, readTable } from './read-table.js';

export interface ObserverRow {
  readonly nm: number;
  readonly xyz: readonly [number, number, number];
}

let rows: readonly ObserverRow[] | null = null;

/** The 81 rows of the table. */
export function observerTable(): readonly ObserverRow[] {
  rows ??= readTable('observer.csv').rows.map((row) => ({
    nm: numberIn(row, 'wavelength_nm'),
    xyz: [numberIn(row, 'xbar'), numberIn(row, 'ybar'), numberIn(row, 'zbar')],
  }));
  return rows;
}

/** x̄, ȳ = V(λ), z̄ at a wavelength: linear between rows, 0 outside 380–780 nm. */
export function colourMatching(wavelengthNm: number): readonly [number, number, number] {
  const table = observerTable();
  const step = table[1].nm - table[0].nm;
  const position = (wavelengthNm - table[0].nm) / step;
  if (!(position >= 0) || position > table.length - 1) return [0, 0, 0];
  const low = Math.min(table.length - 2, Math.floor(position));
  const share = position - low;
  const mix = (i: 0 | 1 | 2) => table[low].xyz[i] * (1 - share) + table[low + 1].xyz[i] * share;
  return [mix(0), mix(1), mix(2)];
}
