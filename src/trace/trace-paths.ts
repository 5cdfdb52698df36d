/** Some histories with the ways they went, for pictures. */
import type { Description } from '../design/description.js';
import { witnessPaths } from '../engine/witness-paths.js';
import { compileScene } from '../scene/compile-scene.js';
import { designSize } from '../scene/compile-solids.js';
import type { Fate } from '../tallies/run-tallies.js';
import type { TracedPath } from './traced-path.js';

/** Paths of a picture. */
const WANTED = 400;
/** Light that gets away is drawn on for this share of the design's size. */
const BEYOND = 0.2;
const AWAY: ReadonlySet<Fate> = new Set(['missed', 'reflected-at-entry', 'left-by-exit', 'left-elsewhere']);

/**
 * Traces 2048 to 4096 histories in the calling thread and gives back some 400 of them, of every fate that occurred alike: not in proportion.
 * @throws DesignFaults when the design cannot be traced
 */
export function tracePaths(description: Description, seed: string): { paths: TracedPath[]; histories: number } {
  const { scene, legend } = compileScene(description);
  const reach = BEYOND * designSize(legend.parts);
  const { paths, histories } = witnessPaths(scene, seed, WANTED);
  return {
    histories,
    paths: paths.map(({ fate, points, wavelengths, pumpSegments, cutAfter, direction }) => {
      const end = legend.slots[fate];
      const away = AWAY.has(end.fate);
      const nm = wavelengths.map((wavelength) => legend.grid.nm[wavelength]);
      const beyond = points.slice(-3).map((at, axis) => at + reach * direction[axis]);
      return {
        end,
        points: away ? [...points, ...beyond] : points,
        wavelengthsNm: away ? [...nm, nm[nm.length - 1]] : nm,
        pumpSegments: pumpSegments + (away && end.light === 'pump' ? 1 : 0),
        cutAfter,
      };
    }),
  };
}
