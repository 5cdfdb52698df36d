/** Peak absorbed power density and time to boiling, as headline figures. */
import type { Figure } from '../record/run-record.js';
import type { TraceResult } from '../trace/trace-result.js';
import { hasMeasure, type MapField } from './map-field.js';
import { peakDensity, timeToBoiling } from './peak-density.js';

function voxelSize({ map: { shape, extent } }: MapField): string {
  const sides = extent.map(([low, high], axis) => Number(((high - low) / shape[axis]).toPrecision(2)));
  return `${sides.join(' × ')} mm`;
}

type DensityFigureName = 'peakAbsorbedPowerDensity' | 'timeToBoiling';

export function densityFigures(
  { description, tallies }: TraceResult,
  fields: readonly MapField[],
): Record<DensityFigureName, Figure> {
  const nothing = (note: string): Record<DensityFigureName, Figure> => ({
    peakAbsorbedPowerDensity: { value: null, standardError: null, unit: 'W/cm³', note },
    timeToBoiling: { value: null, standardError: null, unit: 's', note },
  });
  const field = fields.find((one) => one.map.what === 'absorbed-pump' && hasMeasure(one));
  if (field === undefined) return nothing('no voxel meets the dyed parts');
  if (!(field.power > 0)) return nothing('no pump light was absorbed');
  const { note, ...peak } = peakDensity(field);
  // Too little light in any voxel to be seen by the half that did not choose it.
  if (!(peak.value > 0)) return nothing('too few photons a voxel');
  const absorbedEv = field.map.energy.reduce((sum, half) => sum + half.reduce((a, b) => a + b, 0), 0);
  const time = timeToBoiling(peak, description, tallies, absorbedEv);
  // A mean over a voxel hides what is finer: the truth boils no later than this.
  const size = voxelSize(field);
  const bound = `mean over a voxel of ${size}, so at least this${note === undefined ? '' : `; ${note}`}`;
  const soon = `at the peak voxel of ${size}; a finer hot spot boils sooner`;
  return {
    peakAbsorbedPowerDensity: { ...peak, unit: 'W/cm³', note: bound },
    timeToBoiling: { ...time, unit: 's', note: time.value === null ? time.note : `${time.note}; ${soon}` },
  };
}
