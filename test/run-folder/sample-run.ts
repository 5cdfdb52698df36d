import type { MapArray, RunArrays } from '../../src/record/run-arrays.js';
import type { RunRecord } from '../../src/record/run-record.js';
import { sampleRecord } from '../cli/sample-record.js';

/** A small run made by hand (invented numbers), with names a design could hold to do harm. */
export function sampleRun(): { record: RunRecord; arrays: RunArrays } {
  const maps = [planeMap('exit-lid.top'), planeMap('detector-../../etc'), planeMap('detector-.. .. etc'), voxels()];
  const base = sampleRecord();
  const record: RunRecord = {
    ...base,
    maps: maps.map(({ id, shape, extentMm, axes, unit }) => ({
      ...base.maps[0],
      id,
      shape,
      extentMm,
      axes,
      unit,
      files: [],
    })),
    spectra: [{ id: 'exit', what: 'exit', where: 'lid.top', light: 'emitted', file: '', photonFraction: 0.5 }],
    curves: [
      { id: 'dye-absorption dye in bath', what: 'dye-absorption', name: 'dye', where: 'bath', unit: '1/mm', file: '' },
      { id: 'finish-transmittance pass', what: 'finish-transmittance', name: 'pass', where: null, unit: '1', file: '' },
    ],
    angles: [{ id: 'exit-lid.top', where: 'lid.top', file: '' }],
    histograms: [{ id: 'absorptions-per-history', unit: '', from: 0, width: 1, shares: [0.25, 0.5, 0.25] }],
    checks: [{ code: 'caution', severity: 'warning', path: ['parts', 'cell', 0], problem: 'thin wall', found: '1 µm' }],
  };
  const arrays: RunArrays = {
    drawing: null,
    maps,
    spectra: {
      wavelengthsNm: Float64Array.of(500, 550),
      columns: [
        { id: 'exit', values: Float64Array.of(0.001, 1 / 3) },
        { id: 'detector-=a,"b"\n-pump', values: Float64Array.of(0, 1e-300) },
      ],
    },
    curves: {
      wavelengthsNm: Float64Array.of(500, 550),
      columns: [
        { id: 'dye-absorption dye in bath', values: Float64Array.of(1.25, 1 / 7) },
        { id: 'finish-transmittance pass', values: Float64Array.of(0.95, 0.02) },
      ],
    },
    angles: [{ id: 'exit-lid.top', polarCells: 3, azimuthCells: 2, wattsPerSr: Float64Array.of(1, 2, 3, 4, 5, 6) }],
  };
  return { record, arrays };
}

/** 3 × 2 cells over 6 mm × 8 mm, the last one off the face. */
export function planeMap(id: string): MapArray {
  return {
    id,
    shape: [3, 2],
    extentMm: [
      [0, 6],
      [-4, 4],
    ],
    axes: ['u', 'v'],
    unit: 'W/cm²',
    values: Float64Array.of(0, 1, 2, 3, 4, Number.NaN),
    measure: Float64Array.of(8, 8, 8, 8, 8, 0),
  };
}

function voxels(): MapArray {
  return {
    id: 'absorbed-pump',
    shape: [2, 1, 2],
    extentMm: [
      [0, 2],
      [0, 1],
      [10, 14],
    ],
    axes: ['x', 'y', 'z'],
    unit: 'W/cm³',
    values: Float64Array.of(1, 2, 3, 4),
    measure: Float64Array.of(2, 2, 2, 2),
  };
}
