/** Forms of what depends on wavelength: one value, or a table of [wavelength, value]. */
import { either, mapped } from './form-either.js';
import { listOf, tuple } from './form-lists.js';
import { quantity } from './form-quantities.js';

/** Light the tables of the library and of the CIE speak about, with room at both ends. */
export const WAVELENGTH_RANGE = { min: 200, max: 2000 };
const LONGEST_TABLE = 10_000;

/** A value that is the same at all wavelengths (one row, wavelength null) or a table of [wavelength, value]. */
export type SpectralRows = readonly (readonly [wavelengthNm: number | null, value: number])[];

const wavelength = quantity('wavelength', WAVELENGTH_RANGE);

export const rowsOf = (value: ReturnType<typeof quantity>, words: string) =>
  listOf(
    mapped(tuple<[number, number]>(`[wavelength, ${words}]`, wavelength, value), (row): SpectralRows[number] => row),
    `a list of [wavelength, ${words}] pairs`,
    2,
    LONGEST_TABLE,
  );

export const spectral = (value: ReturnType<typeof quantity>, words: string) =>
  either<SpectralRows>({
    scalar: mapped(value, (constant): SpectralRows => [[null, constant]]),
    list: rowsOf(value, words),
  });
