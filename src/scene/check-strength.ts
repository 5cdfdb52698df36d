/** Whether a design can be believed where a dye is strong or the voxels are coarse. */
import type { Description } from '../design/description.js';
import type { Fault } from '../design/fault.js';
import type { BeamFrame } from './compile-pumps.js';
import type { VoxelPlan } from './compile-recorders.js';
import { absorptionAt } from './scattering-at.js';

/** Dyes without constants of quenching begin to quench themselves at about this strength (common practice, no source); mol/L. */
const STRONG = 1e-3;
/** Voxels longer than this share of the 1/e depth, or of a Gaussian beam's 1/e² radius, blur the peak. */
const COARSE = 0.5;

/** Dyes beyond the strengths that their constants of quenching, if there are any, were meant for. */
export function strengthFaults({ media, parts }: Description): Fault[] {
  const used = new Set(parts.map(({ medium }) => medium));
  return [...media.values()].flatMap((medium): Fault[] => {
    if (!used.has(medium.name) || medium.quenching === 'off') return [];
    const told = new Set<string>();
    return medium.dyes.flatMap((dye): Fault[] => {
      const { quenching } = dye;
      const name = dye.formOf ?? dye.name;
      const concentration = quenching?.strength ?? dye.concentration;
      if (concentration === null || concentration <= (quenching?.most ?? STRONG) || told.has(name)) return [];
      told.add(name);
      return [
        {
          code: 'caution',
          severity: 'warning',
          path: medium.path,
          problem:
            quenching === undefined
              ? 'at this strength dyes quench themselves and form dimers; no constants are held for this one, so output will read high'
              : 'at this strength dyes quench themselves beyond what the constants in use were meant for',
          found: `${millimoles(concentration)} of ${name}`,
          expected: `${quenching === undefined ? 'about ' : ''}${millimoles(quenching?.most ?? STRONG)} or less`,
        },
      ];
    });
  });
}

const millimoles = (concentration: number): string => `${Number((1000 * concentration).toPrecision(3))} mmol/L`;

/** Absorbed power falls off faster than the voxels can show. */
export function voxelFaults(description: Description, voxels: VoxelPlan, beams: readonly BeamFrame[]): Fault[] {
  const step = voxels.size.map((size, axis) => size / voxels.cells[axis]);
  // Root mean square extent of a voxel along a direction.
  const along = (d: readonly number[]) => Math.hypot(...d.map((c, axis) => c * step[axis]));
  const used = new Set(description.parts.map(({ medium }) => medium));
  const dyed = [...description.media.values()].filter(({ name, dyes }) => used.has(name) && dyes.length > 0);
  return description.pumps.flatMap(({ name, path, wavelengthNm, beam }, i): Fault[] => {
    const depths = dyed.map((medium) => {
      const mu = absorptionAt(medium, wavelengthNm);
      return mu > 0 ? 1 / mu : Number.POSITIVE_INFINITY;
    });
    const depth = Math.min(...depths);
    const { u, v, w } = beams[i];
    const across = Math.max(along(u), along(v));
    const limits: (readonly [string, number, number])[] = [[`1/e depth ${mm(depth)}`, along(w), depth]];
    if (beam.kind === 'gaussian') limits.push([`beam radius ${mm(beam.radius)}`, across, beam.radius]);
    return limits.flatMap(([what, size, scale]): Fault[] =>
      size <= COARSE * scale
        ? []
        : [
            {
              code: 'caution',
              severity: 'warning',
              path,
              problem:
                'voxels are too coarse for this pump: the peak power density will read low and the time to boiling long',
              found: `${mm(size)} a voxel, ${what} of the light of ${name}`,
              expected: `${mm(COARSE * scale)} or less`,
              suggestion: 'give finer cells in trace: { voxels: [x, y, z] } and more histories',
            },
          ],
    );
  });
}

const mm = (length: number): string => `${Number(length.toPrecision(2))} mm`;
