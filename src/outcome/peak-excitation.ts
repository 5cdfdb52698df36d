/** The densest voxel of one dye. */
import { steadyPopulations, tripletRatio } from '../photophysics/steady-populations.js';
import type { DyeExcitation } from '../trace/dye-excitation.js';
import type { Estimate } from './error-bars.js';
import type { MapField } from './map-field.js';
import { peakDensity } from './peak-density.js';

/** A dye at its densest voxel. */
export interface PeakExcitation {
  readonly of: DyeExcitation;
  /** Wτ of a ground-state molecule. */
  readonly excitations: Estimate;
  readonly excited: number;
  readonly excitedError: number | null;
  /** Share of the molecules not in the ground state. */
  readonly away: number;
  /** Photons absorbed per s and cm³. */
  readonly density: number;
  readonly note: string | null;
}

/** @param field a map over the same voxels. null without lifetime or strength. */
export function peakOf(of: DyeExcitation, field: MapField): PeakExcitation | null {
  const { kinetics, excitationsPerDensity: factor } = of;
  if (kinetics === null || factor === null) return null;
  const { note, ...density } = peakDensity(densityField(of, field));
  const ratio = tripletRatio(kinetics);
  const excitations = scaled(density, factor);
  const { ground, excited } = steadyPopulations(excitations.value, ratio);
  // d n₁/dx = n₀².
  const excitedError = excitations.standardError === null ? null : excitations.standardError * ground ** 2;
  return { of, excitations, excited, excitedError, away: 1 - ground, density: density.value, note: note ?? null };
}

/** The map of one dye's excitations, for the choice of the densest voxel. */
function densityField({ cells, density, halves }: DyeExcitation, field: MapField): MapField {
  const spread = (values: Float64Array): Float64Array => {
    const whole = new Float64Array(field.values.length).fill(Number.NaN);
    cells.forEach((cell, i) => {
      whole[cell] = values[i];
    });
    return whole;
  };
  const measure = new Float64Array(field.map.measure.length);
  for (const cell of cells) measure[cell] = field.map.measure[cell];
  const [even, odd] = halves;
  return {
    ...field,
    map: { ...field.map, measure },
    values: spread(density),
    halves: [even && spread(even), odd && spread(odd)],
  };
}

const scaled = ({ value, standardError }: Estimate, factor: number): Estimate => ({
  value: value * factor,
  standardError: standardError === null ? null : standardError * factor,
});
