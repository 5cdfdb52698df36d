/** Measured pumps from tables beside the design: far field, spectrum, rays. */
import { linearCurve } from '../numerics/interpolate.js';
import type { FarField, PumpSpectrum, RayTable } from './description.js';
import type { DesignPath } from './fault.js';
import type { NumberRow } from './number-csv.js';
import { type NumberTable, readNumberTable } from './number-table.js';
import type { Reading } from './reading.js';

const RADIANS = Math.PI / 180;
const MOST_RAYS = 200_000;
const ANY = { least: -1e6, most: 1e6 } as const;

const FAR_FIELD = [
  { name: 'angle_deg', field: 'angle_deg', least: -89, most: 89 },
  { name: 'fast', field: 'fast', least: 0, most: 1e12 },
  { name: 'slow', field: 'slow', least: 0, most: 1e12 },
] as const;

/** Two cuts through the far field, `angle_deg,fast,slow`. null after reporting. @param fastAcross the fast axis lies along u */
export function farFieldTable(file: string, fastAcross: boolean, path: DesignPath, reading: Reading): FarField | null {
  const table = readNumberTable(file, FAR_FIELD, path, reading);
  if (table === null || !rises(table, 'angle_deg', 2)) return null;
  const { rows, complain } = table;
  for (const name of ['fast', 'slow'] as const) {
    if (rows.some((row) => row[name] > 0)) continue;
    complain(rows[0].line, { code: 'range', problem: `${name} is 0 everywhere`, found: '0', expected: 'some light' });
    return null;
  }
  const anglesRad = rows.map(({ angle_deg }) => angle_deg * RADIANS);
  const fast = rows.map(({ fast }) => fast);
  const slow = rows.map(({ slow }) => slow);
  return fastAcross ? { anglesRad, u: fast, v: slow } : { anglesRad, u: slow, v: fast };
}

const SPECTRUM = [
  { name: 'wavelength_nm', field: 'wavelength_nm', least: 200, most: 2000 },
  { name: 'watts_per_nm', field: 'watts_per_nm', least: 0, most: 1e12, optional: true },
  { name: 'photons_per_nm', field: 'photons_per_nm', least: 0, most: 1e12, optional: true },
] as const;

/** A spectrum, relative: `wavelength_nm` and one of `watts_per_nm`, `photons_per_nm`. null after reporting. */
export function spectrumTable(file: string, path: DesignPath, reading: Reading): PumpSpectrum | null {
  const table = readNumberTable(file, SPECTRUM, path, reading);
  if (table === null || !rises(table, 'wavelength_nm', 2)) return null;
  const { rows, complain } = table;
  const watts = rows.map(({ watts_per_nm }) => watts_per_nm);
  const photons = rows.map(({ photons_per_nm }) => photons_per_nm);
  const given = [watts, photons].filter((column) => !column.some(Number.isNaN));
  if (given.length !== 1) {
    const problem = 'it must be said what the spectrum counts';
    const expected = 'one of the columns watts_per_nm, photons_per_nm';
    complain(1, { code: 'file', problem, found: given.length === 0 ? 'neither' : 'both', expected });
    return null;
  }
  const nm = rows.map(({ wavelength_nm }) => wavelength_nm);
  const perNm = given[0] === watts ? watts.map((watt, i) => watt * nm[i]) : photons;
  if (perNm.every((value) => value === 0)) {
    complain(rows[0].line, {
      code: 'range',
      problem: 'the spectrum is 0 everywhere',
      found: '0',
      expected: 'some light',
    });
    return null;
  }
  const photonsPerNm = linearCurve(nm, perNm, { below: 'zero', above: 'zero' });
  return { photonsPerNm, fromNm: nm[0], toNm: nm[nm.length - 1], meanNm: meanWavelength(nm, perNm) };
}

/** Mean over photons of a curve that is linear between its points. */
function meanWavelength(nm: readonly number[], photons: readonly number[]): number {
  let sum = 0;
  let first = 0;
  for (let i = 1; i < nm.length; i++) {
    const step = nm[i] - nm[i - 1];
    const [a, b] = [photons[i - 1], photons[i]];
    sum += ((a + b) / 2) * step;
    first += ((nm[i - 1] * (2 * a + b) + nm[i] * (a + 2 * b)) / 6) * step;
  }
  return first / sum;
}

const RAYS = [
  { name: 'u_mm', field: 'u_mm', ...ANY },
  { name: 'v_mm', field: 'v_mm', ...ANY },
  { name: 'w_mm', field: 'w_mm', ...ANY },
  { name: 'direction_u', field: 'direction_u', least: -1e6, most: 1e6 },
  { name: 'direction_v', field: 'direction_v', least: -1e6, most: 1e6 },
  { name: 'direction_w', field: 'direction_w', least: -1e6, most: 1e6 },
  { name: 'watts', field: 'watts', least: 0, most: 1e12 },
  { name: 'wavelength_nm', field: 'wavelength_nm', least: 200, most: 2000, optional: true },
] as const;

/** Rays in the pump's own axes. null after reporting. */
export function rayTable(file: string, path: DesignPath, reading: Reading): RayTable | null {
  const table = readNumberTable(file, RAYS, path, reading);
  if (table === null) return null;
  const { rows, complain } = table;
  if (rows.length > MOST_RAYS) {
    const found = `${rows.length} rays`;
    complain(rows[0].line, { code: 'file', problem: 'too many rays', found, expected: `at most ${MOST_RAYS}` });
    return null;
  }
  const still = rows.find(({ direction_u: u, direction_v: v, direction_w: w }) => Math.hypot(u, v, w) === 0);
  if (still !== undefined) {
    const problem = 'a direction of length zero looks nowhere';
    complain(still.line, { code: 'range', problem, found: '0, 0, 0', expected: 'a direction' });
    return null;
  }
  if (rows.every(({ watts }) => watts === 0)) {
    complain(rows[0].line, { code: 'range', problem: 'no ray carries power', found: '0', expected: 'watts above 0' });
    return null;
  }
  return {
    position: rows.flatMap(({ u_mm, v_mm, w_mm }) => [u_mm, v_mm, w_mm]),
    direction: rows.flatMap(({ direction_u: u, direction_v: v, direction_w: w }) => {
      const length = Math.hypot(u, v, w);
      return [u / length, v / length, w / length];
    }),
    watts: rows.map(({ watts }) => watts),
    wavelengthNm: Number.isNaN(rows[0].wavelength_nm) ? null : rows.map(({ wavelength_nm }) => wavelength_nm),
  };
}

/** Whether a column rises from row to row and has enough of them; says so where not. */
function rises<Name extends string>({ rows, complain }: NumberTable<Name>, name: Name, fewest: number): boolean {
  if (rows.length < fewest) {
    const problem = 'the table is too short';
    complain(rows[0]?.line ?? 1, {
      code: 'file',
      problem,
      found: `${rows.length} rows`,
      expected: `${fewest} or more`,
    });
    return false;
  }
  const at = (row: NumberRow<Name>): number => row[name];
  const wrong = rows.findIndex((row, i) => i > 0 && at(row) <= at(rows[i - 1]));
  if (wrong < 0) return true;
  const found = `${at(rows[wrong])} after ${at(rows[wrong - 1])}`;
  complain(rows[wrong].line, {
    code: 'range',
    problem: `${name} must rise from row to row`,
    found,
    expected: 'rising',
  });
  return false;
}
