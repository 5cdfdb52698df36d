/** Étendue and luminance of the exit, as headline figures. */
import type { Figure } from '../record/run-record.js';
import type { RecordedAngles, RecordedRadiance } from '../tallies/run-tallies.js';
import type { TraceResult } from '../trace/trace-result.js';
import { MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W } from '../units/constants.js';
import { effectiveSize, projectedSolidAngle } from './effective-etendue.js';
import { type ErrorBars, type Estimate, oneEventAtLeast } from './error-bars.js';
import type { MapField } from './map-field.js';

export type ExitFigureName = 'exitEtendue' | 'exitEffectiveEtendue' | 'exitMeanLuminance' | 'exitNormalLuminance';

const ETENDUE = 'mm² sr';
const LUMINANCE = 'cd/m²';
/** Light this near to the normal stands for that along it. */
const NORMAL_CONE_DEG = 10;
/** Cells of azimuth taken as one for the effective étendue: fewer photons a cell would only add noise. */
const AZIMUTHS_JOINED = 6;
const MM2_PER_M2 = 1e6;

export function exitFigures(
  result: TraceResult,
  bars: ErrorBars,
  fields: readonly MapField[],
): Record<ExitFigureName, Figure> {
  const { tallies } = result;
  const map = fields.find((field) => field.map.what === 'exit')?.map;
  if (map === undefined) return nothing('no map of the exit');
  const area = map.measure.reduce((a, b) => a + b, 0);
  const index = indexBeyond(result, bars, map.mediumBeyond);
  const spread = index ** 2 * area;
  const full: Figure = {
    value: Math.PI * spread,
    standardError: null,
    unit: ETENDUE,
    note: `whole exit of ${Number(area.toPrecision(4))} mm² into a half space${index === 1 ? '' : ` of index ${Number(index.toPrecision(4))}`}`,
  };
  if (!(bars.mean('exitPhotons') > 0)) {
    return { ...nothing('no light left by the exit'), exitEtendue: full };
  }
  const lumens = pumpWatts(result) * MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W;
  const flux = oneEventAtLeast(
    bars.propagate(['exitY', 'launchedEnergy'], (part, all) => (lumens * part) / all),
    lumens / bars.histories,
  );
  const perArea = MM2_PER_M2 / (Math.PI * area);
  const angles = tallies.angles.find(({ id }) => id === map.id);
  const radiance = tallies.radiance.find(({ id }) => id === map.id);
  return {
    exitEtendue: full,
    exitEffectiveEtendue: effective(angles, radiance, area, index ** 2),
    exitMeanLuminance: {
      value: flux.value === null ? null : flux.value * perArea,
      standardError: flux.standardError === null ? null : flux.standardError * perArea,
      unit: LUMINANCE,
      note: 'luminous flux over the whole étendue of the exit, times n²',
    },
    exitNormalLuminance: alongNormal(angles, area, bars, lumens / bars.mean('launchedEnergy')),
  };
}

/** Index, at the mean exit wavelength, of what the exit's light goes out into. */
function indexBeyond({ description }: TraceResult, bars: ErrorBars, beyond: string | undefined): number {
  const medium = description.media.get(beyond ?? description.surroundings);
  const mean = bars.mean('exitWavelength') / bars.mean('exitPhotons');
  const nm = Number.isFinite(mean) ? mean : description.pumps[0].wavelengthNm;
  return medium === undefined ? 1 : medium.index(nm);
}

const pumpWatts = ({ description }: TraceResult): number =>
  description.pumps.reduce((sum, { power }) => sum + power, 0);

/** Directions are told from the normal where the light leaves: not on domes and spheres, whose record refers to their axis. */
const fromNormal = ({ opening }: RecordedAngles): boolean =>
  opening === null || opening.shape === 'rectangle' || opening.shape === 'disc';

function effective(
  angles: RecordedAngles | undefined,
  radiance: RecordedRadiance | undefined,
  area: number,
  index2: number,
): Figure {
  const figure = (size: Estimate | null, factor: number, note: string): Figure =>
    size === null
      ? { value: null, standardError: null, unit: ETENDUE, note: 'too few photons by the exit' }
      : { value: size.value * factor, standardError: (size.standardError ?? 0) * factor, unit: ETENDUE, note };
  const words = 'flux² over the integral of radiance², squares taken between halves of the run';
  if (radiance !== undefined) {
    const [, , polar, azimuth] = radiance.shape;
    const step = Math.PI / 2 / polar;
    const size = (cell: number) => {
      const row = Math.floor(cell / azimuth) % polar;
      const place = Math.floor(cell / (polar * azimuth));
      return radiance.measure[place] * projectedSolidAngle(row * step, (row + 1) * step, azimuth);
    };
    return figure(effectiveSize(radiance.energy, size), index2, `${words}; by place and direction`);
  }
  if (angles === undefined || !fromNormal(angles)) {
    const note = 'directions are told from the axis here; ask for `radiance` at the exit';
    return { value: null, standardError: null, unit: ETENDUE, note };
  }
  const step = (angles.polarToDeg * Math.PI) / 180 / angles.polarCells;
  const columns = angles.azimuthCells / AZIMUTHS_JOINED;
  const size = (cell: number) => {
    const row = Math.floor(cell / columns);
    return projectedSolidAngle(row * step, (row + 1) * step, columns);
  };
  const [even, odd] = angles.halves.map(joinAzimuths);
  const note = `${words}; by direction alone, as if even over the exit`;
  return figure(effectiveSize([even, odd], size), index2 * area, note);
}

function joinAzimuths(cells: Float64Array): Float64Array {
  const joined = new Float64Array(cells.length / AZIMUTHS_JOINED);
  cells.forEach((value, cell) => {
    joined[Math.floor(cell / AZIMUTHS_JOINED)] += value;
  });
  return joined;
}

/** @param lumensPerEv lumens that one eV·ȳ a history stands for */
function alongNormal(angles: RecordedAngles | undefined, area: number, bars: ErrorBars, lumensPerEv: number): Figure {
  const undefinedHere = (note: string): Figure => ({ value: null, standardError: null, unit: LUMINANCE, note });
  if (angles === undefined || !fromNormal(angles)) {
    return undefinedHere('the exit is round: its normal is another at every spot');
  }
  const rows = Math.round((NORMAL_CONE_DEG * angles.polarCells) / angles.polarToDeg);
  const cells = rows * angles.azimuthCells;
  const sum = (values: Float64Array) => values.subarray(0, cells).reduce((a, b) => a + b, 0);
  const photons = (sum(angles.energy) * bars.mean('exitPhotons')) / bars.mean('exitEnergy');
  const lumens = (sum(angles.luminous) / bars.histories) * lumensPerEv;
  const projected = Math.PI * Math.sin((NORMAL_CONE_DEG * Math.PI) / 180) ** 2;
  const toLuminance = MM2_PER_M2 / (area * projected);
  if (!(photons > 0)) return undefinedHere(`no photon within ${NORMAL_CONE_DEG}° of the normal`);
  return {
    value: lumens * toLuminance,
    // Each history sends at most one photon out, so their number is one of independent events.
    standardError: (lumens * toLuminance) / Math.sqrt(photons),
    unit: LUMINANCE,
    note: `mean over the exit, within ${NORMAL_CONE_DEG}° of the normal`,
  };
}

function nothing(note: string): Record<ExitFigureName, Figure> {
  const figure = (unit: string): Figure => ({ value: null, standardError: null, unit, note });
  return {
    exitEtendue: figure(ETENDUE),
    exitEffectiveEtendue: figure(ETENDUE),
    exitMeanLuminance: figure(LUMINANCE),
    exitNormalLuminance: figure(LUMINANCE),
  };
}
