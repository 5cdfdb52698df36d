import {
  ABSORPTION_HISTOGRAM_CELLS,
  EXIT_EMITTED_SLOT,
  EXIT_PUMP_SLOT,
  PATH_HISTOGRAM_CELLS,
  type Scene,
} from '../scene/scene-layout.js';
import type { BatchTally } from '../tallies/batch-tally.js';
import { FIGURE } from '../tallies/run-tallies.js';

/** Books the fate of a history and, for output, what people see of it. Path lengths in mm inside parts. */
export function closeHistory(
  scene: Scene,
  tally: BatchTally,
  fate: number,
  wavelength: number,
  absorptions: number,
  pumpPath: number,
  emittedPath: number,
): void {
  const { vector, grown } = tally;
  const figures = 2 * scene.slots;
  const quanta = scene.energyQuanta[wavelength];
  vector[2 * fate]++;
  vector[2 * fate + 1] += quanta;
  vector[figures + FIGURE.dyeAbsorptions] += absorptions;
  if (absorptions > 1) vector[figures + FIGURE.reabsorptions] += absorptions - 1;
  vector[figures + FIGURE.pumpPath] += pumpPath;
  vector[figures + FIGURE.emittedPath] += emittedPath;
  grown.absorptions[Math.min(absorptions, ABSORPTION_HISTOGRAM_CELLS - 1)]++;
  if (fate === EXIT_EMITTED_SLOT) {
    vector[figures + FIGURE.exitPhotons]++;
    vector[figures + FIGURE.exitEnergy] += quanta;
    vector[figures + FIGURE.exitX] += quanta * scene.observerX[wavelength];
    vector[figures + FIGURE.exitY] += quanta * scene.observerY[wavelength];
    vector[figures + FIGURE.exitZ] += quanta * scene.observerZ[wavelength];
    vector[figures + FIGURE.exitWavelength] += scene.wavelengthNm[wavelength];
    grown.exitReabsorptions[Math.min(absorptions - 1, ABSORPTION_HISTOGRAM_CELLS - 1)]++;
    const cell = Math.floor((pumpPath + emittedPath) / scene.pathHistogramStep);
    grown.exitPath[Math.min(cell, PATH_HISTOGRAM_CELLS - 1)]++;
  } else if (fate === EXIT_PUMP_SLOT) {
    vector[figures + FIGURE.leakPhotons]++;
    vector[figures + FIGURE.leakEnergy] += quanta;
  }
}
