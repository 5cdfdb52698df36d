/**
 * A table of a bidirectional scattering distribution function cut into cells of the outward hemisphere. Within a cell the function counts
 * as constant, so that light leaves it in proportion to cosine times solid angle, exactly.
 */

/** Angles in degrees, rising; values in 1/sr as [incidence][scatter][azimuth]. Azimuth 0 is the side light heads for. */
export interface ScatterRows {
  readonly incidenceDeg: readonly number[];
  readonly scatterDeg: readonly number[];
  readonly azimuthDeg: readonly number[];
  readonly reflected: readonly Plane[];
  readonly transmitted: readonly Plane[];
}

type Plane = readonly (readonly number[])[];

/** Longest side of a cell, degrees: a table is cut finer where its own rows are finer. */
const POLAR_STEP = 1;
const AZIMUTH_STEP = 3;

export interface HemisphereCells {
  /** Edges, rad. Azimuth runs from 0 to π; the other half mirrors it. */
  readonly polar: readonly number[];
  readonly azimuth: readonly number[];
}

export function hemisphereCells({
  scatterDeg,
  azimuthDeg,
}: Pick<ScatterRows, 'scatterDeg' | 'azimuthDeg'>): HemisphereCells {
  const azimuth = azimuthDeg.length < 2 ? [0, 180] : edges([0, ...azimuthDeg, 180], AZIMUTH_STEP);
  return { polar: edges([0, ...scatterDeg], POLAR_STEP).map(radians), azimuth: azimuth.map(radians) };
}

/** Share of the light that goes into each cell and its mirror image, [polar · azimuth cells + azimuth], at one incidence of the table. */
export function cellShares(rows: ScatterRows, plane: Plane, { polar, azimuth }: HemisphereCells): Float64Array {
  const columns = azimuth.length - 1;
  const shares = new Float64Array((polar.length - 1) * columns);
  for (let i = 0; i + 1 < polar.length; i++) {
    const projected = (Math.sin(polar[i + 1]) ** 2 - Math.sin(polar[i]) ** 2) / 2;
    const [low, high, share] = bracket(rows.scatterDeg, degrees((polar[i] + polar[i + 1]) / 2));
    for (let k = 0; k < columns; k++) {
      const [left, right, turn] = bracket(rows.azimuthDeg, degrees((azimuth[k] + azimuth[k + 1]) / 2));
      const below = plane[low][left] * (1 - turn) + plane[low][right] * turn;
      const above = plane[high][left] * (1 - turn) + plane[high][right] * turn;
      const value = below * (1 - share) + above * share;
      shares[i * columns + k] = 2 * value * projected * (azimuth[k + 1] - azimuth[k]);
    }
  }
  return shares;
}

/** Directional-hemispherical reflectance and transmittance at each incidence of the table. */
export function scatterShares(rows: ScatterRows): {
  readonly incidenceDeg: readonly number[];
  readonly reflected: readonly number[];
  readonly transmitted: readonly number[];
} {
  const cells = hemisphereCells(rows);
  const total = (plane: Plane) => cellShares(rows, plane, cells).reduce((sum, share) => sum + share, 0);
  return {
    incidenceDeg: rows.incidenceDeg,
    reflected: rows.reflected.map(total),
    transmitted: rows.transmitted.map(total),
  };
}

/** The knots and what must lie between them so that no step is longer than `longest`. */
function edges(knots: readonly number[], longest: number): number[] {
  const found = [knots[0]];
  for (const knot of knots.slice(1)) {
    const from = found[found.length - 1];
    const steps = Math.ceil((knot - from) / longest - 1e-9);
    for (let step = 1; step <= steps; step++) found.push(from + ((knot - from) * step) / steps);
  }
  return found;
}

/** Rows about a place and the share of the upper; the end rows beyond them. */
function bracket(axis: readonly number[], at: number): readonly [low: number, high: number, share: number] {
  const high = axis.findIndex((value) => value >= at);
  if (high === 0) return [0, 0, 0];
  if (high < 0) return [axis.length - 1, axis.length - 1, 0];
  return [high - 1, high, (at - axis[high - 1]) / (axis[high] - axis[high - 1])];
}

const radians = (angle: number): number => (angle * Math.PI) / 180;
const degrees = (angle: number): number => (angle * 180) / Math.PI;
