import type { Drawing } from '../../src/record/drawing.js';
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
    angles: [
      {
        id: 'exit-lid.top',
        where: 'lid.top',
        file: '',
        polarToDeg: 90,
        lumens: 2,
        opening: { shape: 'rectangle', sizeMm: [6, 8, 0] },
        photometricFile: '',
      },
    ],
    radiance: [
      {
        id: 'exit-lid.top',
        where: 'lid.top',
        unit: 'W/(m² sr)',
        shape: [2, 1, 2, 1],
        extentMm: [
          [0, 6],
          [-4, 4],
        ],
        axes: ['u', 'v'],
        files: [],
        mean: 2,
        maximum: 3,
      },
    ],
    histograms: [{ id: 'absorptions-per-history', unit: '', from: 0, width: 1, shares: [0.25, 0.5, 0.25] }],
    checks: [{ code: 'caution', severity: 'warning', path: ['parts', 'cell', 0], problem: 'thin wall', found: '1 µm' }],
  };
  const arrays: RunArrays = {
    drawing: sampleDrawing(),
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
    angles: [
      {
        id: 'exit-lid.top',
        polarCells: 3,
        azimuthCells: 2,
        polarToDeg: 90,
        wattsPerSr: Float64Array.of(1, 2, 3, 4, 5, 6),
        candela: Float64Array.of(6, 5, 4, 3, 2, 1),
      },
    ],
    radiance: [
      {
        id: 'exit-lid.top',
        shape: [2, 1, 2, 1],
        extentMm: [
          [0, 6],
          [-4, 4],
        ],
        axes: ['u', 'v'],
        values: Float64Array.of(1, 2, 3, Number.NaN),
      },
    ],
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

/** One wedge of a face, a pump, a plane and a path, with names a design could hold to do harm. */
export function sampleDrawing(): Drawing {
  return {
    parts: [
      {
        name: 'cell <b>',
        medium: 'bath',
        mediumKind: 'liquid',
        dyed: true,
        bounds: [
          [0, 0, 0],
          [10.0625, 8, 0.0001],
        ],
        faces: [
          {
            name: 'cell <b>.top',
            finish: 'clear',
            finishKind: 'clear',
            isExit: true,
            triangles: [0, 0, 0.0001, 10.0625, 0, 0.0001, 10.0625, 8, 0.0001],
            normals: [0, 0, 1, 0, 0, 1, 0, 0, 1],
            edges: [0, 0, 0.0001, 10.0625, 0, 0.0001],
          },
          {
            name: 'cell <b>.dome',
            finish: '../../etc',
            finishKind: 'mirror',
            isExit: false,
            triangles: [0, 0, 0, 1, 0, 0, 1, 1, 0],
            normals: [0.6, 0, 0.8, 0, 0.6, 0.8, 0, 0, 1],
            edges: [],
          },
        ],
      },
    ],
    pumps: [
      {
        name: 'bank',
        watts: 1 / 3,
        wavelengthNm: 445.123456,
        at: [0, -40, 0],
        direction: [0, 1, 0],
        edges: [0, 0, 0, 1, 0, 0],
      },
    ],
    planes: [{ name: 'aperture', isExit: false, normal: [0, 0, 1], edges: [] }],
    paths: [
      {
        end: { fate: 'left-by-exit', light: 'emitted', where: 'cell <b>.top', by: null },
        points: [0, -40, 0, 0, 0, 0, 1.5, 0, 8],
        wavelengthsNm: [445.123456, 530.25],
        pumpSegments: 1,
        cutAfter: -1,
      },
    ],
    pathsFrom: 1000,
  };
}
