/** The headline figures of a run, each with its standard error. */
import type { Figure, FigureName } from '../record/run-record.js';
import type { TraceResult } from '../trace/trace-result.js';
import { MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W } from '../units/constants.js';
import { brightnessFigures } from './brightness-figures.js';
import { chromaticityX, chromaticityY, dominantWavelength } from './colour.js';
import { densityFigures } from './density-figures.js';
import { ErrorBars, oneEventAtLeast } from './error-bars.js';
import { evennessFigures } from './evenness-figures.js';
import { exitFigures } from './exit-figures.js';
import type { MapField } from './map-field.js';
import { photophysicsFigures } from './photophysics-figures.js';

/** @param fields maps of the run; those without area say nothing and may be left out. */
export function runFigures(result: TraceResult, fields: readonly MapField[]): Record<FigureName, Figure> {
  const { description, tallies } = result;
  const bars = new ErrorBars(tallies);
  const pumpWatts = description.pumps.reduce((sum, { power }) => sum + power, 0);
  const electrical = electricalPower(result);
  const exit = (f: (...means: number[]) => number, unit: string) => colourFigure(bars, f, unit);
  // One event carries a pump photon's energy at most (seen with ȳ at most 1).
  const share = (of: 'exitEnergy' | 'leakEnergy' | 'exitY', factor: number, unit: string): Figure => ({
    ...oneEventAtLeast(
      bars.propagate([of, 'launchedEnergy'], (part, all) => (factor * part) / all),
      factor / bars.histories,
    ),
    unit,
  });
  const mean = (of: 'pumpPath', unit: string): Figure => ({ ...bars.propagate([of], (value) => value), unit });
  const perHistory = (
    of: 'exitPhotons' | 'dyeAbsorptions' | 'reabsorptions' | 'pumpAbsorbed',
    unit: string,
  ): Figure => ({
    ...oneEventAtLeast(
      bars.propagate([of], (value) => value),
      1 / bars.histories,
    ),
    unit,
  });
  const lumens = MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W;
  const dark = bars.mean('exitPhotons') > 0 ? undefined : NO_OUTPUT;
  const outlet = exitFigures(result, bars, fields);
  const figures: Record<FigureName, Figure> = {
    exitPhotonFraction: perHistory('exitPhotons', 'photons per pump photon'),
    opticalEfficiency: share('exitEnergy', 1, 'W/W'),
    exitPower: share('exitEnergy', pumpWatts, 'W'),
    luminousFlux: share('exitY', lumens * pumpWatts, 'lm'),
    luminousEfficacyOptical: share('exitY', lumens, 'lm/W'),
    luminousEfficacyWallPlug:
      electrical.watts === null
        ? { value: null, standardError: null, unit: 'lm/W', note: electrical.note }
        : noted(share('exitY', (lumens * pumpWatts) / electrical.watts, 'lm/W'), electrical.note),
    chromaticityX: noted(exit(chromaticityX, ''), dark),
    chromaticityY: noted(exit(chromaticityY, ''), dark),
    dominantWavelength: dominant(bars, dark),
    meanExitWavelength: noted(
      { ...bars.propagate(['exitWavelength', 'exitPhotons'], (sum, n) => sum / n), unit: 'nm' },
      dark,
    ),
    blueLeak: share('leakEnergy', pumpWatts, 'W'),
    blueLeakFraction: share('leakEnergy', 1, 'W/W'),
    ...evennessFigures(fields, dark),
    ...densityFigures(result, fields),
    ...photophysicsFigures(result, fields),
    absorptionsPerHistory: perHistory('dyeAbsorptions', 'per pump photon'),
    reabsorptionsPerHistory: perHistory('reabsorptions', 'per pump photon'),
    meanPumpPath: mean('pumpPath', 'mm per pump photon'),
    meanEmittedPath: noted(
      { ...bars.propagate(['emittedPath', 'emissions'], (path, n) => path / n), unit: 'mm per emission' },
      bars.mean('emissions') > 0 ? undefined : 'no dye emitted',
    ),
    pumpAbsorbedFraction: perHistory('pumpAbsorbed', 'of pump photons'),
    pumpPower: { value: pumpWatts, standardError: null, unit: 'W' },
    ...outlet,
    ...brightnessFigures(result, bars, outlet),
  };
  return bars.tellErrors ? figures : withoutErrors(figures);
}

/** Given by the design, or exact. */
const GIVEN: ReadonlySet<string> = new Set(['pumpPower', 'exitEtendue', 'pumpEtendue'] satisfies FigureName[]);

const NO_OUTPUT = 'no light left by the exit';

function noted(figure: Figure, note: string | undefined): Figure {
  return note === undefined ? figure : { ...figure, note };
}

/** Says of every figure that has a value, but no error for want of histories, why it has none. */
function withoutErrors(figures: Record<FigureName, Figure>): Record<FigureName, Figure> {
  const why = 'too few histories to tell its error';
  const entries = Object.entries(figures).map(([name, figure]) => {
    const silent = figure.value !== null && figure.standardError === null && !GIVEN.has(name);
    return [name, silent ? noted(figure, figure.note === undefined ? why : `${figure.note}; ${why}`) : figure];
  });
  return Object.fromEntries(entries) as Record<FigureName, Figure>;
}

function dominant(bars: ErrorBars, dark: string | undefined): Figure {
  const figure = colourFigure(
    bars,
    (x, y, z) => dominantWavelength(chromaticityX(x, y, z), chromaticityY(x, y, z)),
    'nm',
  );
  if (dark !== undefined) return noted(figure, dark);
  if (figure.value === null) return noted(figure, 'white and purple light have none');
  const untold = bars.tellErrors && figure.standardError === null;
  return noted(figure, untold ? 'too near to white or purple to tell its error' : 'against equal-energy white');
}

function colourFigure(bars: ErrorBars, f: (...means: number[]) => number, unit: string): Figure {
  return { ...bars.propagate(['exitX', 'exitY', 'exitZ'], f), unit };
}

/** Electrical power of all diodes and drivers, W. */
function electricalPower({
  description,
}: TraceResult): { watts: number; note?: string } | { watts: null; note: string } {
  const silent = description.pumps.filter(({ wallPlug }) => wallPlug === null).map(({ name }) => name);
  if (silent.length > 0) return { watts: null, note: `no wall-plug efficiency given for ${silent.join(', ')}` };
  const watts = description.pumps.reduce((sum, p) => sum + p.power / ((p.wallPlug ?? 1) * (p.driver ?? 1)), 0);
  const loose = description.pumps.some(({ driver }) => driver === null);
  return loose ? { watts, note: 'drivers of no stated efficiency counted as lossless' } : { watts };
}
