import { CELLS, type Scene, SLOT } from '../scene/scene-layout.js';
import { FIGURE_PLACE } from '../tallies/run-tallies.js';
import type { BatchTally } from './batch-tally.js';
import { NOW, RAY } from './photon.js';

/** Books the fate of a history and, for output, what people see of it.  */
export function closeHistory(scene: Scene, tally: BatchTally, fate: number, ray: Float64Array, now: Int32Array): void {
  const wavelength = now[NOW.wavelength];
  const absorptions = now[NOW.absorptions];
  const pumpPath = now[NOW.light] === 0 ? ray[RAY.path] : ray[RAY.pumpPath];
  const emittedPath = now[NOW.light] === 0 ? 0 : ray[RAY.path];
  const { vector, grown } = tally;
  const figures = 2 * scene.slots;
  const quanta = scene.energyQuanta[wavelength];
  vector[2 * fate]++;
  vector[2 * fate + 1] += quanta;
  vector[figures + FIGURE_PLACE.dyeAbsorptions] += absorptions;
  if (absorptions > 1) vector[figures + FIGURE_PLACE.reabsorptions] += absorptions - 1;
  vector[figures + FIGURE_PLACE.pumpPath] += pumpPath;
  vector[figures + FIGURE_PLACE.emittedPath] += emittedPath;
  grown.absorptions[Math.min(absorptions, CELLS.absorptions - 1)]++;
  if (fate === SLOT.exitEmitted) {
    vector[figures + FIGURE_PLACE.exitPhotons]++;
    vector[figures + FIGURE_PLACE.exitEnergy] += quanta;
    vector[figures + FIGURE_PLACE.exitX] += quanta * scene.observerX[wavelength];
    vector[figures + FIGURE_PLACE.exitY] += quanta * scene.observerY[wavelength];
    vector[figures + FIGURE_PLACE.exitZ] += quanta * scene.observerZ[wavelength];
    vector[figures + FIGURE_PLACE.exitWavelength] += scene.wavelengthNm[wavelength];
    grown.exitReabsorptions[Math.min(absorptions - 1, CELLS.absorptions - 1)]++;
    const cell = Math.floor((pumpPath + emittedPath) / scene.pathHistogramStep);
    grown.exitPath[Math.min(cell, CELLS.path - 1)]++;
  } else if (fate === SLOT.exitPump) {
    vector[figures + FIGURE_PLACE.leakPhotons]++;
    vector[figures + FIGURE_PLACE.leakEnergy] += quanta;
  }
}
