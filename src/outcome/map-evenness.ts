/** Evenness figures of a recorded face map, on cells coarse enough that counting noise does not speak. */
import { cellSize, cellSizes, type MapField, soundness } from './map-field.js';
import {
  coarsen,
  isoUniformity,
  mapExtremes,
  mapMean,
  type PlaneMap,
  trueVariation,
  type Variation,
} from './uniformity.js';

/** Wanted photons per cell for minimum and maximum: 5 % noise. */
const PHOTONS_PER_CELL = 400;
/** A map is not joined to fewer cells than this along its shorter side. */
const FEWEST_CELLS = 4;

export interface Evenness {
  readonly variation: Variation | null;
  readonly minOverMean: number;
  readonly flatness: number;
  readonly uniformity: number;
  /** On which cells the last three were taken. */
  readonly note: string;
}

/** null for voxels, and for a map without light on sound cells. */
export function mapEvenness(field: MapField): Evenness | null {
  if (field.map.shape.length !== 2 || !(field.power > 0)) return null;
  const whole = planeMap(field, field.values);
  const factor = joinFactor(field, whole);
  const joined = coarsen(whole, factor);
  const onSphere = field.map.extentDeg !== undefined;
  const size = onSphere ? null : cellSize(field.map);
  const coarse = dropSlivers(joined, (cell) => (size === null ? joined.weights[cell] : joined.joined[cell] * size));
  const mean = mapMean(coarse);
  if (!(mean > 0)) return null;
  const [even, odd] = field.halves;
  const halfMap = (values: Float64Array) => dropSlivers(planeMap(field, values), cellSizes(field.map));
  const halves = even === null || odd === null ? [] : [halfMap(even), halfMap(odd)];
  return {
    variation: halves.length === 2 && halves.every(isLit) ? trueVariation(halves[0], halves[1]) : null,
    minOverMean: mapExtremes(coarse).minimum / mean,
    flatness: isoUniformity(coarse).flatness,
    uniformity: isoUniformity(coarse).uniformity,
    note: evennessNote(coarse, field),
  };
}

const isLit = (map: PlaneMap): boolean => mapMean(map) > 0;

function planeMap({ map }: MapField, values: Float64Array): PlaneMap {
  return { cellsU: map.shape[0], cellsV: map.shape[1], values, weights: map.measure };
}

/** Cells of which less than half lies on the face do not count. */
function dropSlivers(map: PlaneMap, size: (cell: number) => number): PlaneMap {
  const sound = soundness(map.weights, size);
  return { ...map, weights: map.weights.map((weight, i) => (sound(i) ? weight : 0)) };
}

function joinFactor({ counts }: MapField, { cellsU, cellsV, weights }: PlaneMap): number {
  const photons = counts.reduce((a, b) => a + b, 0);
  const cells = weights.reduce((n, weight) => n + (weight > 0 ? 1 : 0), 0);
  const wanted = Math.ceil(Math.sqrt((PHOTONS_PER_CELL * cells) / Math.max(photons, 1)));
  const most = Math.max(1, Math.floor(Math.min(cellsU, cellsV) / FEWEST_CELLS));
  return Math.min(Math.max(1, wanted), most);
}

function evennessNote(coarse: PlaneMap, { counts }: MapField): string {
  const cells = coarse.weights.reduce((n, weight) => n + (weight > 0 ? 1 : 0), 0);
  const noise = 100 / Math.sqrt(Math.max(1, counts.reduce((a, b) => a + b, 0) / cells));
  return `on ${coarse.cellsU} × ${coarse.cellsV} cells of ${noise.toPrecision(2)} % counting noise`;
}
