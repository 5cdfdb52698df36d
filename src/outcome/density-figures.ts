/** Peak absorbed power density and time to boiling, as headline figures. */
import type { Figure } from '../record/run-record.js';
import type { TraceResult } from '../trace/trace-result.js';
import { hasMeasure, type MapField } from './map-field.js';
import { peakDensity, timeToBoiling } from './peak-density.js';

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
  const inherited =
    time.value === null || note === undefined ? time : { ...time, note: `${time.note}; peak from ${note}` };
  return {
    peakAbsorbedPowerDensity: { ...peak, unit: 'W/cm³', ...(note === undefined ? {} : { note }) },
    timeToBoiling: { ...inherited, unit: 's' },
  };
}
