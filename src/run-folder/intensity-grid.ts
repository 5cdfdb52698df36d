/** Cells of directions -> candela at the angles a photometric file has. */
import type { AnglesArray } from '../record/run-arrays.js';

export interface IntensityGrid {
  /** From 0 to 90 or 180, ends included. */
  readonly verticalDeg: readonly number[];
  /** From 0 to 360, both included. */
  readonly horizontalDeg: readonly number[];
  /** [horizontal][vertical]. */
  readonly candela: readonly (readonly number[])[];
  /** What the values were multiplied by, so that the table with straight lines between them holds the flux. */
  readonly scale: number;
  readonly photonsPerValue: number;
}

/** Cells joined along polar angle and azimuth, finest first. */
const JOINS = [
  [1, 1],
  [1, 3],
  [3, 3],
  [3, 9],
  [5, 9],
  [5, 18],
] as const;
const PHOTONS_PER_VALUE = 100;

/**
 * Cells are joined until about 100 photons stand behind a value, which then stands in the middle of its cells; values at the ends are
 * carried on from their neighbours. Then all are scaled to the flux, which straight lines between the values of a narrow beam would miss.
 * @param lumens flux of the record; photons about how many it holds
 */
export function intensityGrid(angles: AnglesArray, lumens: number, photons: number): IntensityGrid {
  const { polarCells, azimuthCells, polarToDeg } = angles;
  const values = ([polar, azimuth]: readonly [number, number]) => (polarCells * azimuthCells) / (polar * azimuth);
  const join = JOINS.find((one) => photons / values(one) >= PHOTONS_PER_VALUE) ?? JOINS[JOINS.length - 1];
  const rows = polarCells / join[0];
  const columns = azimuthCells / join[1];
  const cells = roundedOff(joined(angles, join), (polarToDeg / rows) * (Math.PI / 180));
  const ring = (row: number) => mean(cells.map((column) => column[row]));
  // At the poles all azimuths are one direction.
  const first = endValue(ring(0), ring(1));
  const last = endValue(ring(rows - 1), ring(rows - 2));
  const open = polarToDeg === 90;
  const column = (own: readonly number[]): number[] => {
    const end = open ? endValue(own[rows - 1], own[rows - 2]) : last;
    return [first, ...own, end];
  };
  const inner = cells.map(column);
  const seam = inner[0].map((value, i) => (value + inner[columns - 1][i]) / 2);
  const polarStep = polarToDeg / rows;
  const azimuthStep = 360 / columns;
  const verticalDeg = [0, ...Array.from({ length: rows }, (_, i) => (i + 0.5) * polarStep), polarToDeg];
  const horizontalDeg = [0, ...Array.from({ length: columns }, (_, i) => (i + 0.5) * azimuthStep), 360];
  const carried = [seam, ...inner, seam];
  const flux = fluxOf(verticalDeg, horizontalDeg, carried);
  const scale = flux > 0 ? lumens / flux : 1;
  return {
    verticalDeg,
    horizontalDeg,
    candela: carried.map((one) => one.map((value) => value * scale)),
    scale,
    photonsPerValue: photons / values(join),
  };
}

/** Half a step beyond the last value, straight on, never below zero nor above twice the last. */
function endValue(last: number, before: number): number {
  return Math.min(2 * last, Math.max(0, last + (last - before) / 2));
}

/** Means over joined cells, weighed by solid angle: [azimuth][polar]. */
function joined(
  { polarCells, azimuthCells, polarToDeg, candela }: AnglesArray,
  [along, round]: readonly [number, number],
) {
  const step = (polarToDeg * Math.PI) / 180 / polarCells;
  return Array.from({ length: azimuthCells / round }, (_, column) =>
    Array.from({ length: polarCells / along }, (_, row) => {
      let sum = 0;
      let weights = 0;
      for (let p = row * along; p < (row + 1) * along; p++) {
        const weight = Math.cos(p * step) - Math.cos((p + 1) * step);
        for (let a = column * round; a < (column + 1) * round; a++) {
          sum += weight * candela[p * azimuthCells + a];
          weights += weight;
        }
      }
      return sum / weights;
    }),
  );
}

/**
 * Cells near a pole are slivers with few photons: there each value is the mean over as many neighbours round the pole as make it about as wide
 * as it is long. Means of whole rings stay.
 */
function roundedOff(cells: readonly (readonly number[])[], step: number): readonly (readonly number[])[] {
  const columns = cells.length;
  const azimuth = (2 * Math.PI) / columns;
  return cells.map((own, column) =>
    own.map((_, row) => {
      const wide = step / (azimuth * Math.sin((row + 0.5) * step));
      const aside = Math.min(Math.floor((columns - 1) / 2), Math.floor(wide / 2));
      let sum = 0;
      for (let k = -aside; k <= aside; k++) sum += cells[(column + k + columns) % columns][row];
      return sum / (2 * aside + 1);
    }),
  );
}

const mean = (values: readonly number[]): number => values.reduce((a, b) => a + b, 0) / values.length;

/** ∫ I dΩ of intensities joined by straight lines in both angles; the sine is integrated exactly. */
function fluxOf(
  verticalDeg: readonly number[],
  horizontalDeg: readonly number[],
  candela: readonly (readonly number[])[],
): number {
  const rad = Math.PI / 180;
  const mean = verticalDeg.map((_, v) =>
    horizontalDeg.slice(1).reduce((sum, to, h) => {
      return sum + ((to - horizontalDeg[h]) * rad * (candela[h][v] + candela[h + 1][v])) / 2;
    }, 0),
  );
  let flux = 0;
  for (let v = 1; v < verticalDeg.length; v++) {
    const [a, b] = [verticalDeg[v - 1] * rad, verticalDeg[v] * rad];
    const slope = (mean[v] - mean[v - 1]) / (b - a);
    // ∫ (m + s (x − a)) sin x dx.
    flux += mean[v - 1] * Math.cos(a) - mean[v] * Math.cos(b) + slope * (Math.sin(b) - Math.sin(a));
  }
  return flux;
}
