/**
 * The wavelengths a scene knows. A photon carries an index into this grid, so every optical property is one table
 * look-up and every tally by wavelength is a whole number. Sharp lines are on the grid exactly.
 */
import type { Description } from '../design/description.js';
import type { Curve } from '../units/curve.js';

const STEP_NM = 0.5;
/** A Gaussian line is cut where it has fallen to 3e-7 of its peak. */
const LINE_REACH_SIGMA = 5.5;
/** A broad line is cut where no medium has data any more and an index would be made up, nm. */
const SHORTEST_NM = 200;
const LONGEST_NM = 2000;
export const FWHM_PER_SIGMA = 2 * Math.sqrt(2 * Math.LN2);

export interface WavelengthGrid {
  readonly nm: Float64Array;
  /** Width of each cell, nm: what a photon stands for in a spectrum per nm. */
  readonly widthNm: Float64Array;
}

export function wavelengthGrid(description: Description): WavelengthGrid {
  const lines: number[] = [];
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  const cover = (from: number, to: number) => {
    low = Math.min(low, from);
    high = Math.max(high, to);
  };
  for (const { wavelengthNm, linewidthNm, spectrum = null, beam } of description.pumps) {
    const ownColours = beam.kind === 'rays' ? beam.rays.wavelengthNm : null;
    if (spectrum !== null) {
      cover(spectrum.fromNm, spectrum.toNm);
      continue;
    }
    if (ownColours !== null) {
      cover(
        ownColours.reduce((a, b) => Math.min(a, b)),
        ownColours.reduce((a, b) => Math.max(a, b)),
      );
      continue;
    }
    const reach = (LINE_REACH_SIGMA * linewidthNm) / FWHM_PER_SIGMA;
    cover(
      Math.min(wavelengthNm, Math.max(SHORTEST_NM, wavelengthNm - reach)),
      Math.max(wavelengthNm, Math.min(LONGEST_NM, wavelengthNm + reach)),
    );
    if (linewidthNm === 0) lines.push(wavelengthNm);
  }
  for (const medium of description.media.values()) {
    for (const { emission } of medium.dyes) {
      if (emission.kind === 'line') {
        cover(emission.wavelengthNm, emission.wavelengthNm);
        lines.push(emission.wavelengthNm);
      } else cover(emission.fromNm, emission.toNm);
    }
  }
  const first = Math.floor(low / STEP_NM);
  const last = Math.max(first + 1, Math.ceil(high / STEP_NM));
  const nm = Float64Array.from({ length: last - first + 1 }, (_, i) => (first + i) * STEP_NM);
  const grid = insertLines(nm, lines);
  return { nm: grid, widthNm: cellWidths(grid) };
}

/** Moves the nearest grid wavelength onto each line, or adds one where that place is taken by another line. */
function insertLines(nm: Float64Array, lines: readonly number[]): Float64Array {
  const values = Array.from(nm);
  const taken = new Set<number>();
  for (const line of new Set(lines)) {
    const nearest = nearestIndex(values, line);
    if (values[nearest] !== line && taken.has(values[nearest])) values.push(line);
    else values[nearest] = line;
    taken.add(line);
    values.sort((a, b) => a - b);
  }
  return Float64Array.from(values);
}

export function nearestIndex(values: ArrayLike<number>, wanted: number): number {
  let best = 0;
  for (let i = 1; i < values.length; i++) {
    if (Math.abs(values[i] - wanted) < Math.abs(values[best] - wanted)) best = i;
  }
  return best;
}

function cellWidths(nm: Float64Array): Float64Array {
  return nm.map((_, i) => {
    const below = i > 0 ? (nm[i] - nm[i - 1]) / 2 : (nm[1] - nm[0]) / 2;
    const above = i + 1 < nm.length ? (nm[i + 1] - nm[i]) / 2 : below;
    return below + above;
  });
}

/** Photons per cell, relative, of a spectrum in photons per nm. */
export function cellPhotons(grid: WavelengthGrid, photonsPerNm: Curve, fromNm: number, toNm: number): Float64Array {
  return grid.nm.map((nm, i) => (nm >= fromNm && nm <= toNm ? Math.max(0, photonsPerNm(nm)) * grid.widthNm[i] : 0));
}

/** Photons per cell of a line, Gaussian of the given FWHM or sharp. */
export function linePhotons(grid: WavelengthGrid, wavelengthNm: number, fwhmNm: number): Float64Array {
  const weights = new Float64Array(grid.nm.length);
  if (fwhmNm === 0) {
    weights[nearestIndex(grid.nm, wavelengthNm)] = 1;
    return weights;
  }
  const sigma = fwhmNm / FWHM_PER_SIGMA;
  const gaussian = (nm: number) => Math.exp(-0.5 * ((nm - wavelengthNm) / sigma) ** 2);
  for (let i = 0; i < weights.length; i++) weights[i] = cellMean(grid, i, gaussian) * grid.widthNm[i];
  return weights;
}

/** Mean over a cell: lines may be narrower than the grid. */
function cellMean(grid: WavelengthGrid, i: number, shape: Curve): number {
  const SAMPLES = 21;
  let sum = 0;
  for (let k = 0; k < SAMPLES; k++) sum += shape(grid.nm[i] + grid.widthNm[i] * ((k + 0.5) / SAMPLES - 0.5));
  return sum / SAMPLES;
}
