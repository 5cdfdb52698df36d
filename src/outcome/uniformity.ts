/**
 * How even a map is. Flatness factor and beam uniformity after ISO 13694 (formulas from memory, high confidence); coefficient of variation with
 * the shot noise of the Monte Carlo taken out, so that few photons do not read as a bad homogeniser.
 */

/** A plane map of irradiance: cell (iu, iv) at iu + cellsU · iv; cells with weight 0 are off the face. */
export interface PlaneMap {
  readonly cellsU: number;
  readonly cellsV: number;
  readonly values: Float64Array;
  readonly weights: Float64Array;
}

/** Threshold of ISO 13694 quantities as a share of the maximum: low, so that dark corners of a face count against it. */
export const ISO_THRESHOLD = 0.1;

/** Area-weighted mean. */
export function mapMean({ values, weights }: PlaneMap): number {
  let sum = 0;
  let area = 0;
  for (let i = 0; i < values.length; i++) {
    if (weights[i] > 0) {
      sum += values[i] * weights[i];
      area += weights[i];
    }
  }
  return sum / area;
}

export function mapExtremes({ values, weights }: PlaneMap): { minimum: number; maximum: number } {
  let minimum = Number.POSITIVE_INFINITY;
  let maximum = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < values.length; i++) {
    if (weights[i] > 0) {
      minimum = Math.min(minimum, values[i]);
      maximum = Math.max(maximum, values[i]);
    }
  }
  return { minimum, maximum };
}

/** ISO 13694 flatness factor F and beam uniformity U over cells above `threshold` × maximum. */
export function isoUniformity(map: PlaneMap, threshold = ISO_THRESHOLD): { flatness: number; uniformity: number } {
  const { maximum } = mapExtremes(map);
  const lit: PlaneMap = {
    ...map,
    weights: map.weights.map((weight, i) => (weight > 0 && map.values[i] > threshold * maximum ? weight : 0)),
  };
  const mean = mapMean(lit);
  let squares = 0;
  let area = 0;
  lit.weights.forEach((weight, i) => {
    if (weight > 0) {
      squares += weight * (lit.values[i] - mean) ** 2;
      area += weight;
    }
  });
  return { flatness: mean / maximum, uniformity: Math.sqrt(squares / area) / mean };
}

/** ISO 13694 edge steepness (A₀.₁ − A₀.₉)/A₀.₁. */
export function edgeSteepness(map: PlaneMap): number {
  const { maximum } = mapExtremes(map);
  const area = (share: number) => {
    let sum = 0;
    map.weights.forEach((weight, i) => {
      if (weight > 0 && map.values[i] >= share * maximum) sum += weight;
    });
    return sum;
  };
  return (area(0.1) - area(0.9)) / area(0.1);
}

/** ISO 11146 second-moment widths 4σ along u and v, in the units of the steps. */
export function secondMomentWidths(map: PlaneMap, stepU: number, stepV: number): { u: number; v: number } {
  let power = 0;
  const first = [0, 0];
  const second = [0, 0];
  map.values.forEach((value, i) => {
    if (!(map.weights[i] > 0)) return;
    const p = value * map.weights[i];
    const at = [((i % map.cellsU) + 0.5) * stepU, (Math.floor(i / map.cellsU) + 0.5) * stepV];
    power += p;
    at.forEach((x, axis) => {
      first[axis] += p * x;
      second[axis] += p * x * x;
    });
  });
  const width = (axis: number) => 4 * Math.sqrt(Math.max(0, second[axis] / power - (first[axis] / power) ** 2));
  return { u: width(0), v: width(1) };
}

export interface Variation {
  readonly value: number;
  readonly standardError: number;
  /** false: a perfectly even map would often read as much. */
  readonly resolved: boolean;
}

/** The square of a variation must be this many of its standard errors above zero to be told from none. */
const RESOLVED = 4;

/**
 * Coefficient of variation of the true irradiance: covariance of two independent halves over the product of their means. Noise of one
 * half knows nothing of the other, so it drops out without any assumption about its law.
 *
 * What is near normal is the square. The error is the longer side of the square's interval of one standard error, so that it does not shrink where
 * the square is small and the root steep; many errors away from zero it is that of the delta method.
 */
export function trueVariation(even: PlaneMap, odd: PlaneMap): Variation {
  const meanA = mapMean(even);
  const meanB = mapMean(odd);
  let covariance = 0;
  let noise = 0;
  let area = 0;
  let areaSquares = 0;
  for (let i = 0; i < even.values.length; i++) {
    const weight = even.weights[i];
    if (!(weight > 0)) continue;
    const a = even.values[i] / meanA - 1;
    const b = odd.values[i] / meanB - 1;
    covariance += weight * a * b;
    noise += (weight * (a - b) ** 2) / 2;
    area += weight;
    areaSquares += weight * weight;
  }
  covariance /= area;
  // Relative variance of one cell of one half.
  noise /= area;
  const cells = (area * area) / areaSquares;
  const spread = Math.max(0, covariance);
  const errorOfSquare = Math.sqrt((noise * noise + 2 * noise * spread) / cells);
  const value = Math.sqrt(spread);
  const standardError = spread > errorOfSquare ? value - Math.sqrt(spread - errorOfSquare) : Math.sqrt(errorOfSquare);
  return { value, standardError, resolved: spread > RESOLVED * errorOfSquare };
}

/**
 * Joins cells into blocks of at least `factor` a side; where that does not divide, some blocks are one cell wider, so that no thin rim is left over.
 * @returns the map, and how many cells (on the face or off it) each block has joined
 */
export function coarsen(map: PlaneMap, factor: number): PlaneMap & { readonly joined: Float64Array } {
  const cellsU = Math.max(1, Math.floor(map.cellsU / factor));
  const cellsV = Math.max(1, Math.floor(map.cellsV / factor));
  const power = new Float64Array(cellsU * cellsV);
  const weights = new Float64Array(cellsU * cellsV);
  const joined = new Float64Array(cellsU * cellsV);
  map.values.forEach((value, i) => {
    const u = i % map.cellsU;
    const v = (i - u) / map.cellsU;
    const at = Math.floor((u * cellsU) / map.cellsU) + cellsU * Math.floor((v * cellsV) / map.cellsV);
    joined[at]++;
    if (!(map.weights[i] > 0)) return;
    power[at] += value * map.weights[i];
    weights[at] += map.weights[i];
  });
  const values = power.map((p, i) => (weights[i] > 0 ? p / weights[i] : Number.NaN));
  return { cellsU, cellsV, values, weights, joined };
}
