/** Reads the arrays of a run back from the files beside its run.json. */
import { join } from 'node:path';
import type { AnglesArray, MapArray, RadianceArray, RunArrays, SpectraArray } from '../record/run-arrays.js';
import type { RunRecord } from '../record/run-record.js';
import { columnOf, readNumberTable, unreadable } from './read-csv.js';
import { readDrawing } from './read-drawing.js';

type MapRecord = RunRecord['maps'][number];

/** @param record as read from the folder's run.json. @throws RunFolderError when a table is missing, damaged or of another run, or the drawing is damaged */
export async function readArrays(folder: string, record: RunRecord): Promise<RunArrays> {
  const maps: MapArray[] = [];
  for (const map of record.maps) maps.push(await readMap(folder, map));
  const angles: AnglesArray[] = [];
  for (const one of record.angles) angles.push(await readAngles(folder, one));
  const radiance: RadianceArray[] = [];
  for (const one of record.radiance) radiance.push(await readRadiance(folder, one));
  return {
    maps,
    spectra: await readColumns(folder, record.spectra),
    curves: await readColumns(folder, record.curves),
    angles,
    radiance,
    drawing: await readDrawing(folder),
  };
}

async function readMap(folder: string, record: MapRecord): Promise<MapArray> {
  const { id, shape, extentMm, extentDeg, axes, unit, files } = record;
  const name = files.find((file) => file.endsWith('.csv'));
  if (name === undefined) throw unreadable(folder, `run.json names no table of the map ${id}`);
  const table = await readNumberTable(folder, name, shape.length + 2);
  const values = columnOf(table, shape.length);
  const cells = shape.reduce((product, n) => product * n, 1);
  if (values.length !== cells) {
    throw unreadable(join(folder, name), `it has ${values.length} cells, and run.json says ${cells}`);
  }
  const measure = columnOf(table, shape.length + 1);
  return { id, shape, extentMm, ...(extentDeg === undefined ? {} : { extentDeg }), axes, unit, values, measure };
}

/** A column for each entry of the record, beside the wavelengths. */
async function readColumns(
  folder: string,
  entries: readonly { readonly id: string; readonly file: string }[],
): Promise<SpectraArray> {
  const [first] = entries;
  if (first === undefined) return { wavelengthsNm: new Float64Array(0), columns: [] };
  const table = await readNumberTable(folder, first.file, entries.length + 1);
  return {
    wavelengthsNm: columnOf(table, 0),
    columns: entries.map(({ id }, i) => ({ id, values: columnOf(table, i + 1) })),
  };
}

async function readAngles(folder: string, { id, file, polarToDeg }: RunRecord['angles'][number]): Promise<AnglesArray> {
  const table = await readNumberTable(folder, file, 4);
  const polar = columnOf(table, 0);
  const next = polar.findIndex((angle) => angle !== polar[0]);
  const azimuthCells = next < 0 ? polar.length : next;
  const polarCells = polar.length / Math.max(1, azimuthCells);
  if (azimuthCells === 0 || !Number.isInteger(polarCells)) {
    throw unreadable(join(folder, file), 'its rows make no whole rings of directions');
  }
  return {
    id,
    polarCells,
    azimuthCells,
    polarToDeg,
    wattsPerSr: columnOf(table, 2),
    candela: columnOf(table, 3),
  };
}

async function readRadiance(
  folder: string,
  { id, shape, extentMm, extentDeg, axes, files }: RunRecord['radiance'][number],
): Promise<RadianceArray> {
  const name = files.find((file) => file.endsWith('.csv'));
  if (name === undefined) throw unreadable(folder, `run.json names no table of the radiance ${id}`);
  const values = columnOf(await readNumberTable(folder, name, 5), 4);
  const [u, v, polar, azimuth] = shape;
  if (values.length !== u * v * polar * azimuth) {
    throw unreadable(join(folder, name), `it has ${values.length} cells, and run.json says ${u * v * polar * azimuth}`);
  }
  const deg = extentDeg === undefined ? {} : { extentDeg };
  return { id, shape: [u, v, polar, azimuth], extentMm, ...deg, axes, values };
}
