/** Stacks whose materials are used where there are no data for them, or whose curves are too fine for their tables. */
import type { Description, LayerDescription } from '../design/description.js';
import type { Fault } from '../design/fault.js';
import type { SceneLegend } from './compile-scene.js';
import { cellPhotons, linePhotons, type WavelengthGrid } from './wavelength-grid.js';

/** Share of a source's photons at either end that need no data: tails of a line or a spectrum. */
const TAIL = 1e-3;

export function filmFaults(description: Description, { grid, coarseFilms, finishNames }: SceneLegend): Fault[] {
  const [low, high] = litRange(description, grid);
  const faults: Fault[] = [];
  for (const name of finishNames) {
    const finish = description.finishes.get(name);
    if (finish?.kind !== 'stack') continue;
    const told = new Set<string>();
    for (const layer of finish.layers) {
      if (told.has(layer.material) || covers(layer, low, high)) continue;
      told.add(layer.material);
      faults.push(rangeFault(layer, finish.extrapolates, low, high));
    }
  }
  for (const { finish, error } of coarseFilms) {
    faults.push({
      code: 'caution',
      severity: 'warning',
      path: description.finishes.get(finish)?.path ?? [],
      problem: 'the curves of the stack are finer in angle than its table',
      found: `shares up to ${error.toPrecision(1)} out at single angles`,
      suggestion: 'fewer or thinner layers; averages over angles are much nearer the truth',
    });
  }
  return faults;
}

const covers = ({ rangeNm }: LayerDescription, low: number, high: number): boolean =>
  rangeNm === null || (rangeNm[0] <= low && rangeNm[1] >= high);

function rangeFault({ material, rangeNm, path }: LayerDescription, allowed: boolean, low: number, high: number): Fault {
  const light = `light from ${low} to ${high} nm`;
  const found = `${material}, data from ${rangeNm?.[0]} to ${rangeNm?.[1]} nm, ${light}`;
  if (allowed) {
    return {
      code: 'caution',
      severity: 'warning',
      path,
      problem: 'the layer material is extrapolated: the nearest value is held beyond its data',
      found,
    };
  }
  return {
    code: 'range',
    severity: 'error',
    path,
    problem: 'the layer material has no data at some wavelengths of the light',
    found,
    expected: 'data for all of the light',
    suggestion: 'another material, one of your own under `layer-materials`, or `extrapolate: yes` in the stack',
  };
}

/** Wavelengths of all pumps and dyes but for their tails, nm. */
export function litRange(description: Description, grid: WavelengthGrid): readonly [number, number] {
  const used = new Set(description.parts.map(({ medium }) => medium));
  const sources = description.pumps.map(({ wavelengthNm, linewidthNm }) =>
    linePhotons(grid, wavelengthNm, linewidthNm),
  );
  for (const name of used) {
    for (const { emission } of description.media.get(name)?.dyes ?? []) {
      sources.push(
        emission.kind === 'line'
          ? linePhotons(grid, emission.wavelengthNm, 0)
          : cellPhotons(grid, emission.photonsPerNm, emission.fromNm, emission.toNm),
      );
    }
  }
  const ranges = sources.map((photons) => bulk(photons, grid));
  return [Math.min(...ranges.map(([low]) => low)), Math.max(...ranges.map(([, high]) => high))];
}

function bulk(photons: Float64Array, { nm }: WavelengthGrid): readonly [number, number] {
  const tail = TAIL * photons.reduce((sum, value) => sum + value, 0);
  let first = 0;
  let last = photons.length - 1;
  for (let below = photons[0]; first < last && below <= tail; below += photons[first]) first++;
  for (let above = photons[last]; last > first && above <= tail; above += photons[last]) last--;
  return [nm[first], nm[last]];
}
