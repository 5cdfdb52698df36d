/** Maps as the page shows them: joined to cells the page can carry, and packed for its script. */
import type { MapArray, RunArrays } from '../record/run-arrays.js';
import type { MapRecord, RunRecord } from '../record/run-record.js';
import type { Plane } from './charts/raster.js';

export interface ShownMap {
  readonly record: MapRecord;
  /** Always three axes; a face has one cell along the third. */
  readonly cells: readonly [number, number, number];
  readonly values: Float64Array;
  /** Largest of the values. Above the record's maximum where a sliver of a cell got more light than any sound one. */
  readonly top: number;
  /** Cells of the run joined into fewer. */
  readonly joined: boolean;
  /** Cells of the run with face or liquid in them. */
  readonly lit: number;
}

/** More maps than this would make the page slow to read; the folder has them all. */
const MOST_MAPS = 40;
/** Cells of all faces together, and of all volumes together, that fit a page of 3 MB. */
const FACE_CELLS = 240_000;
const VOLUME_CELLS = 220_000;
const MOST_ALONG_FACE = 128;
const MOST_ALONG_VOLUME = 60;
const FEWEST_ALONG = 12;

/** Maps of the run whose values are at hand, in order. */
export function shownMaps(record: RunRecord, arrays: RunArrays): readonly ShownMap[] {
  const pairs = record.maps
    .flatMap((map) => {
      const array = arrays.maps.find(({ id }) => id === map.id);
      return array === undefined ? [] : [{ map, array }];
    })
    .slice(0, MOST_MAPS);
  const volumes = pairs.filter(({ map }) => map.shape.length === 3).length;
  const faces = pairs.length - volumes;
  const along = (cells: number, count: number, power: number, most: number) =>
    Math.min(most, Math.max(FEWEST_ALONG, Math.floor((cells / Math.max(1, count)) ** power)));
  const faceLimit = along(FACE_CELLS, faces, 1 / 2, MOST_ALONG_FACE);
  const volumeLimit = along(VOLUME_CELLS, volumes, 1 / 3, MOST_ALONG_VOLUME);
  return pairs.map(({ map, array }) => joinCells(map, array, map.shape.length === 3 ? volumeLimit : faceLimit));
}

function joinCells(record: MapRecord, { shape, values, measure }: MapArray, limit: number): ShownMap {
  const fine = [0, 1, 2].map((axis) => shape[axis] ?? 1);
  const [nu, nv, nw] = fine.map((n) => Math.min(n, limit));
  const sum = new Float64Array(nu * nv * nw);
  const weight = new Float64Array(nu * nv * nw);
  let lit = 0;
  for (let i = 0; i < values.length; i++) {
    if (!(measure[i] > 0) || !Number.isFinite(values[i])) continue;
    lit++;
    const u = i % fine[0];
    const v = Math.floor(i / fine[0]) % fine[1];
    const w = Math.floor(i / (fine[0] * fine[1]));
    const to =
      Math.floor((u * nu) / fine[0]) + nu * (Math.floor((v * nv) / fine[1]) + nv * Math.floor((w * nw) / fine[2]));
    sum[to] += values[i] * measure[i];
    weight[to] += measure[i];
  }
  const joined = nu * nv * nw < values.length;
  const means = sum.map((total, i) => total / weight[i]);
  const top = means.filter(Number.isFinite).reduce((most, value) => Math.max(most, value), 0);
  return { record, cells: [nu, nv, nw], values: means, top, joined, lit };
}

/** A cut through a map across two axes, at a cell of the third. */
export function cutOf(
  { cells, values }: ShownMap,
  [a, b]: readonly [number, number],
  along: number,
  at: number,
): Plane {
  const stride = [1, cells[0], cells[0] * cells[1]];
  const plane = new Float64Array(cells[a] * cells[b]);
  for (let i = 0; i < plane.length; i++) {
    const u = i % cells[a];
    plane[i] = values[u * stride[a] + ((i - u) / cells[a]) * stride[b] + at * stride[along]];
  }
  return { cellsU: cells[a], cellsV: cells[b], values: plane };
}

/** Cell of the largest value but for slivers; the middle where nothing is above zero. */
export function peakCell({ cells, values, record }: ShownMap): readonly [number, number, number] {
  let at = -1;
  const most = record.maximum * (1 + 1e-9);
  for (let i = 0; i < values.length; i++) if (values[i] <= most && values[i] > (at < 0 ? 0 : values[at])) at = i;
  if (at < 0) return [cells[0] >> 1, cells[1] >> 1, cells[2] >> 1];
  return [at % cells[0], Math.floor(at / cells[0]) % cells[1], Math.floor(at / (cells[0] * cells[1]))];
}

/** One number of 16 bits a cell, low byte first, of `top` / PACKED_FULL; PACKED_NOTHING where there is nothing. Base64. */
export const PACKED_FULL = 65_534;
export const PACKED_NOTHING = 65_535;

export function packValues({ values, top }: ShownMap): string {
  const bytes = Buffer.alloc(2 * values.length);
  values.forEach((value, i) => {
    const share = top > 0 ? Math.min(1, Math.max(0, value / top)) : 0;
    bytes.writeUInt16LE(Number.isFinite(value) ? Math.round(share * PACKED_FULL) : PACKED_NOTHING, 2 * i);
  });
  return bytes.toString('base64');
}
