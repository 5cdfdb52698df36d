/** The headline figures of a run, each with its standard error. */
import type { Figure, FigureName } from '../run-folder/run-record.js';
import type { TraceResult } from '../trace/trace-result.js';
import { MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W } from '../units/constants.js';
import { chromaticityX, chromaticityY, dominantWavelength } from './colour.js';
import { ErrorBars } from './error-bars.js';
import { mapEvenness } from './map-evenness.js';
import type { MapField } from './map-field.js';
import { peakDensity, timeToBoiling } from './peak-density.js';

/** @param fields all maps of the run. */
export function runFigures(result: TraceResult, fields: readonly MapField[]): Record<FigureName, Figure> {
  const { description, tallies } = result;
  const bars = new ErrorBars(tallies);
  const pumpWatts = description.pumps.reduce((sum, { power }) => sum + power, 0);
  const electrical = electricalPower(result);
  const exit = (f: (...means: number[]) => number, unit: string) => colourFigure(bars, f, unit);
  const share = (of: 'exitEnergy' | 'leakEnergy' | 'exitY', factor: number, unit: string): Figure => ({
    ...bars.propagate([of, 'launchedEnergy'], (part, all) => (factor * part) / all),
    unit,
  });
  const perHistory = (of: 'exitPhotons' | 'dyeAbsorptions' | 'reabsorptions' | 'pumpPath' | 'pumpAbsorbed', unit: string) => ({
    ...bars.propagate([of], (mean) => mean),
    unit,
  });
  const lumens = MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W;
  return {
    exitPhotonFraction: perHistory('exitPhotons', 'photons per pump photon'),
    opticalEfficiency: share('exitEnergy', 1, 'W/W'),
    exitPower: share('exitEnergy', pumpWatts, 'W'),
    luminousFlux: share('exitY', lumens * pumpWatts, 'lm'),
    luminousEfficacyOptical: share('exitY', lumens, 'lm/W'),
    luminousEfficacyWallPlug:
      electrical.watts === null
        ? { value: null, standardError: null, unit: 'lm/W', note: electrical.note }
        : { ...share('exitY', (lumens * pumpWatts) / electrical.watts, 'lm/W'), note: electrical.note },
    chromaticityX: exit(chromaticityX, ''),
    chromaticityY: exit(chromaticityY, ''),
    dominantWavelength: exit((x, y, z) => dominantWavelength(chromaticityX(x, y, z), chromaticityY(x, y, z)), 'nm'),
    meanExitWavelength: { ...bars.propagate(['exitWavelength', 'exitPhotons'], (sum, n) => sum / n), unit: 'nm' },
    blueLeak: share('leakEnergy', pumpWatts, 'W'),
    blueLeakFraction: share('leakEnergy', 1, 'W/W'),
    ...evennessFigures(fields),
    ...densityFigures(result, fields),
    absorptionsPerHistory: perHistory('dyeAbsorptions', 'per pump photon'),
    reabsorptionsPerHistory: perHistory('reabsorptions', 'per pump photon'),
    meanPumpPath: perHistory('pumpPath', 'mm per pump photon'),
    meanEmittedPath: {
      ...bars.propagate(['emittedPath', 'emissions'], (path, n) => path / n),
      unit: 'mm per emission',
    },
    pumpAbsorbedFraction: perHistory('pumpAbsorbed', 'of pump photons'),
    pumpPower: { value: pumpWatts, standardError: null, unit: 'W' },
  };
}

function colourFigure(bars: ErrorBars, f: (...means: number[]) => number, unit: string): Figure {
  return { ...bars.propagate(['exitX', 'exitY', 'exitZ'], f), unit };
}

/** Electrical power of all diodes and drivers, W. */
function electricalPower({ description }: TraceResult): { watts: number | null; note: string } {
  const silent = description.pumps.filter(({ wallPlug }) => wallPlug === null).map(({ name }) => name);
  if (silent.length > 0) return { watts: null, note: `no wall-plug efficiency given for ${silent.join(', ')}` };
  const watts = description.pumps.reduce((sum, p) => sum + p.power / ((p.wallPlug ?? 1) * (p.driver ?? 1)), 0);
  const loose = description.pumps.some(({ driver }) => driver === null);
  return { watts, note: loose ? 'driver losses not counted where no driver efficiency is given' : '' };
}

function evennessFigures(fields: readonly MapField[]) {
  const exit = fields.find(({ map }) => map.what === 'exit');
  const evenness = exit === undefined ? null : mapEvenness(exit);
  const figure = (value: number | null, standardError: number | null, unit: string, note: string): Figure => ({
    value,
    standardError,
    unit,
    note,
  });
  const nothing = figure(null, null, '', 'no light left by the exit');
  return {
    exitUniformityVariation:
      evenness?.variation == null
        ? nothing
        : figure(evenness.variation.value, evenness.variation.standardError, '', 'coefficient of variation, noise taken out'),
    exitUniformityMinOverMean: evenness === null ? nothing : figure(evenness.minOverMean, null, '', evenness.note),
    exitFlatness: evenness === null ? nothing : figure(evenness.flatness, null, '', `ISO 13694, threshold 10 %, ${evenness.note}`),
    exitBeamUniformity:
      evenness === null ? nothing : figure(evenness.uniformity, null, '', `ISO 13694, threshold 10 %, ${evenness.note}`),
  };
}

function densityFigures({ description, tallies }: TraceResult, fields: readonly MapField[]) {
  const field = fields.find(({ map }) => map.what === 'absorbed-pump');
  if (field === undefined || !(field.power > 0)) {
    const note = 'no pump light was absorbed';
    return {
      peakAbsorbedPowerDensity: { value: null, standardError: null, unit: 'W/cm³', note },
      timeToBoiling: { value: null, standardError: null, unit: 's', note },
    };
  }
  const peak = peakDensity(field);
  const absorbedEv = field.map.energy.reduce((sum, half) => sum + half.reduce((a, b) => a + b, 0), 0);
  return {
    peakAbsorbedPowerDensity: { ...peak, unit: 'W/cm³' },
    timeToBoiling: { ...timeToBoiling(peak, description, tallies, absorbedEv), unit: 's' },
  };
}
