/** Raw counters + legend -> run tallies: names, units (eV, mm) and the measure of every map cell. */

import type { GrownTally } from '../kernel/batch-tally.js';
import type { RecorderPlan } from '../scene/compile-recorders.js';
import type { CompiledScene } from '../scene/compile-scene.js';
import { luminousOpening, middleOf } from '../scene/luminous-opening.js';
import { mapMeasure, voxelMeasure } from '../scene/map-measure.js';
import { RegionGraph } from '../scene/region-graph.js';
import { CELLS } from '../scene/scene-layout.js';
import { add, scale } from '../scene/vector.js';
import type {
  Histogram,
  RecordedAngles,
  RecordedMap,
  RecordedRadiance,
  RecordedSpectrum,
  RunTallies,
} from '../tallies/run-tallies.js';
import type { BatchFold } from './fold-batches.js';

export function collectTallies(compiled: CompiledScene, fold: BatchFold, grown: GrownTally): RunTallies {
  const { batch, group } = fold.moments(compiled.legend.quantumEv);
  return {
    slots: compiled.legend.slots,
    moments: batch,
    groupMoments: group,
    maps: [...recorderMaps(compiled, grown), ...voxelMaps(compiled, grown)],
    spectra: spectra(compiled, grown),
    angles: angles(compiled, grown),
    radiance: radiance(compiled, grown),
    histograms: histograms(compiled, grown),
    wavelengthsNm: compiled.legend.grid.nm,
  };
}

function halves({ scene, legend }: CompiledScene, grown: GrownTally, offset: number, cells: number) {
  const half = (h: number) => {
    const start = h * scene.mapCells + offset;
    return grown.maps.slice(start, start + cells).map((quanta) => quanta * legend.quantumEv);
  };
  return [half(0), half(1)] as const;
}

function recorderMaps(compiled: CompiledScene, grown: GrownTally): RecordedMap[] {
  const graph = new RegionGraph(compiled.scene);
  return compiled.legend.recorders.map((plan, i): RecordedMap => {
    const [u, v] = plan.cells;
    return {
      id: `${plan.what}-${plan.where}`,
      what: plan.what,
      where: plan.where,
      shape: [u, v],
      extent: plan.extent,
      axes: axesOf(plan),
      energy: halves(compiled, grown, compiled.scene.recorderMap[i], u * v),
      measure: mapMeasure(plan, graph),
      frame: plan.wrapped || plan.sphere !== null ? null : { origin: plan.origin, u: plan.u, v: plan.v },
      ...extentDeg(plan),
      ...(plan.isExit ? { mediumBeyond: mediumBeyond(compiled, plan, graph) } : {}),
    };
  });
}

function axesOf({ wrapped, sphere }: RecorderPlan): readonly string[] {
  if (sphere !== null) return ['azimuth', 'polar angle'];
  return wrapped ? ['round the side', 'along the axis'] : ['u', 'v'];
}

function extentDeg({ sphere }: RecorderPlan): { extentDeg?: RecordedMap['extent'] } {
  if (sphere === null) return {};
  const [from, to] = sphere.polar.map((angle) => Number(((angle * 180) / Math.PI).toPrecision(12)));
  return {
    extentDeg: [
      [0, 360],
      [from, to],
    ],
  };
}

/** How far beyond the exit the medium is looked up, mm: further than free planes and spheres are moved off faces. */
const BEYOND = 1e-4;

function mediumBeyond({ scene, legend }: CompiledScene, plan: RecorderPlan, graph: RegionGraph): string {
  const { point, normal } = middleOf(plan);
  const [x, y, z] = add(point, scale(normal, BEYOND));
  if (graph.crowded) graph.forget();
  return legend.mediaNames[scene.ownerMedium[graph.owner[graph.locate(x, y, z, ...normal)]]];
}

function voxelMaps(compiled: CompiledScene, grown: GrownTally): RecordedMap[] {
  const { scene, legend } = compiled;
  const { origin, size, cells } = legend.voxels;
  const count = cells[0] * cells[1] * cells[2];
  const { measure, part } = voxelMeasure(compiled);
  const common = {
    where: 'dyed parts',
    shape: cells,
    extent: origin.map((low, axis) => [low, low + size[axis]] as const),
    axes: ['x', 'y', 'z'],
    measure,
    part,
    frame: { origin, u: [1, 0, 0], v: [0, 1, 0] },
  } as const;
  const pump = halves(compiled, grown, scene.voxelPumpMap, count);
  const emitted = halves(compiled, grown, scene.voxelEmittedMap, count);
  const sum = (h: 0 | 1) => pump[h].map((energy, i) => energy + emitted[h][i]);
  const all = [sum(0), sum(1)] as const;
  return [
    { id: 'absorbed-pump', what: 'absorbed-pump', energy: pump, ...common },
    { id: 'absorbed-all', what: 'absorbed-all', energy: all, ...common },
  ];
}

function spectra({ scene, legend }: CompiledScene, grown: GrownTally): RecordedSpectrum[] {
  const cut = (offset: number) => grown.spectra.slice(offset, offset + scene.wavelengths);
  const everywhere: RecordedSpectrum[] = [
    { id: 'launched', what: 'launched', where: null, light: 'pump', photons: cut(scene.spectrumLaunched) },
    {
      id: 'absorbed-pump',
      what: 'absorbed-pump',
      where: null,
      light: 'pump',
      photons: cut(scene.spectrumAbsorbedPump),
    },
    {
      id: 'emitted-in-dye',
      what: 'emitted-in-dye',
      where: null,
      light: 'emitted',
      photons: cut(scene.spectrumEmitted),
    },
  ];
  const recorded = legend.recorders.flatMap(({ what, where }, i): RecordedSpectrum[] => {
    const offset = scene.recorderSpectrum[i];
    if (offset < 0 || what === 'pumped-face') return [];
    const pump = cut(offset);
    const emitted = cut(offset + scene.wavelengths);
    return what === 'exit'
      ? [
          { id: 'exit', what, where, light: 'emitted', photons: emitted },
          { id: 'leak', what: 'leak', where, light: 'pump', photons: pump },
        ]
      : [
          { id: `detector-${where}-emitted`, what, where, light: 'emitted', photons: emitted },
          { id: `detector-${where}-pump`, what, where, light: 'pump', photons: pump },
        ];
  });
  return [...everywhere, ...recorded];
}

function angles({ scene, legend }: CompiledScene, grown: GrownTally): RecordedAngles[] {
  const toEv = (quanta: number) => quanta * legend.quantumEv;
  return legend.recorders.flatMap((plan, i): RecordedAngles[] => {
    const { what, where } = plan;
    const offset = scene.recorderAngles[i];
    if (offset < 0) return [];
    const rows = scene.recorderPolar[i];
    const cells = rows * CELLS.azimuth;
    const part = (k: number) =>
      grown.angles.slice(k * scene.angleCells + offset, k * scene.angleCells + offset + cells).map(toEv);
    const [even, odd] = [part(0), part(1)];
    return [
      {
        id: `${what}-${where}`,
        where,
        polarCells: rows,
        azimuthCells: CELLS.azimuth,
        polarToDeg: plan.polarToDeg,
        energy: even.map((energy, cell) => energy + odd[cell]),
        halves: [even, odd],
        luminous: part(2),
        opening: luminousOpening(plan),
      },
    ];
  });
}

function radiance({ scene, legend }: CompiledScene, grown: GrownTally): RecordedRadiance[] {
  const graph = new RegionGraph(scene);
  return legend.recorders.flatMap((plan, i): RecordedRadiance[] => {
    const { what, where, radiance: shape, extent } = plan;
    if (shape === null || what === 'pumped-face') return [];
    const offset = scene.recorderRadiance[i];
    const cells = shape.reduce((a, b) => a * b);
    const half = (h: number) => {
      const start = h * scene.radianceCells + offset;
      return grown.radiance.slice(start, start + cells).map((quanta) => quanta * legend.quantumEv);
    };
    const measure = mapMeasure({ ...plan, cells: [shape[0], shape[1]] }, graph);
    const id = `${what}-${where}`;
    return [
      { id, what, where, shape, extent, axes: axesOf(plan), energy: [half(0), half(1)], measure, ...extentDeg(plan) },
    ];
  });
}

function histograms({ scene }: CompiledScene, grown: GrownTally): Histogram[] {
  const count = { from: 0, width: 1, unit: '' };
  return [
    { id: 'absorptions-per-history', ...count, counts: grown.absorptions.slice() },
    { id: 'reabsorptions-of-exit-photons', ...count, counts: grown.exitReabsorptions.slice() },
    { id: 'path-of-exit-photons', from: 0, width: scene.pathHistogramStep, unit: 'mm', counts: grown.exitPath.slice() },
  ];
}
