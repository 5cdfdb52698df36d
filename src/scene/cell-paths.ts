/** How far light goes in the dyed parts of a design, estimated before any tracing. */
import type { Description, MediumDescription } from '../design/description.js';
import { checkScene } from './check-scene.js';
import { compileScene } from './compile-scene.js';
import { finishResponse } from './finish-response.js';
import { voxelMeasure } from './map-measure.js';

export interface CellPaths {
  /** One pump after the other: its share of the power, wavelength and the way straight through the dyed parts, mm. */
  readonly pumps: readonly { readonly share: number; readonly wavelengthNm: number; readonly pathMm: number }[];
  /** 4 V/S of the dyed parts, mm: the mean way between two meetings with a wall. */
  readonly meanChordMm: number;
  /** Chance that emitted light is let through or taken when it meets a wall. */
  readonly lostAtWall: number;
  /** Mean way of emitted light until a wall lets it through or takes it, mm. */
  readonly emittedPathMm: number;
}

const ANGLES = 90;

/**
 * Rough: pumps go straight through the middle of the box around the parts; emitted light meets all walls alike, from all directions, and
 * what lies beyond a wall is taken for the surroundings. Mean chord 4V/S: Dirac (1943), Case & Zweifel (from memory).
 * @param medium of the dyed parts
 * @param emittedNm wavelength at which the finishes are asked
 */
export function cellPaths(description: Description, medium: MediumDescription, emittedNm: number): CellPaths {
  const compiled = compileScene(description);
  const { voxels, beams } = compiled.legend;
  const own = new Set(description.parts.filter((part) => part.medium === medium.name).map(({ name }) => name));
  const { measure, part } = voxelMeasure(compiled);
  const volume = measure.reduce(
    (sum, v, cell) => (own.has(description.parts[part[cell]]?.name ?? '') ? sum + v : sum),
    0,
  );
  const beyond = description.media.get(description.surroundings)?.index(emittedNm) ?? 1;
  const faces = checkScene(description).faces.filter((face) => own.has(face.part));
  const surface = faces.reduce((sum, { areaMm2 }) => sum + areaMm2, 0);
  const lost = faces.reduce((sum, { areaMm2, finish: name }) => {
    const finish = description.finishes.get(name);
    const kept = finish === undefined ? 0 : diffuseReflectance(finish, medium.index(emittedNm), beyond, emittedNm);
    return sum + areaMm2 * (1 - kept);
  }, 0);
  const power = description.pumps.reduce((sum, pump) => sum + pump.power, 0);
  const meanChordMm = (4 * volume) / surface;
  const lostAtWall = lost / surface;
  return {
    pumps: description.pumps.map((pump, i) => ({
      share: pump.power / power,
      wavelengthNm: pump.wavelengthNm,
      pathMm: Math.min(...beams[i].w.map((c, axis) => voxels.size[axis] / Math.abs(c))),
    })),
    meanChordMm,
    lostAtWall,
    // A wall that keeps everything would give a path without end.
    emittedPathMm: meanChordMm / Math.max(lostAtWall, 1e-3),
  };
}

/** Mean over all directions of light that is alike from everywhere: ∫ R sin 2θ dθ. */
function diffuseReflectance(
  finish: Parameters<typeof finishResponse>[0],
  indexHere: number,
  indexBeyond: number,
  wavelengthNm: number,
): number {
  let sum = 0;
  let weights = 0;
  for (let i = 0; i < ANGLES; i++) {
    const angle = ((i + 0.5) / ANGLES) * (Math.PI / 2);
    const weight = Math.sin(2 * angle);
    const { s, p } = finishResponse(finish, {
      indexHere,
      indexBeyond,
      cosine: Math.cos(angle),
      wavelengthNm,
      inward: false,
    });
    sum += (weight * (s.reflectance + p.reflectance)) / 2;
    weights += weight;
  }
  return sum / weights;
}
