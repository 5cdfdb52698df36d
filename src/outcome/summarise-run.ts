/** Trace result -> the record a run keeps, and the arrays of its maps and spectra. */
import { carriesPolarisation } from '../design/carries-polarisation.js';
import { cautionsFor } from '../materials/cautions.js';
import type { RunArrays } from '../record/run-arrays.js';
import { type MapRecord, RUN_FORMAT, type RunRecord, type SaturationRecord } from '../record/run-record.js';
import type { TraceResult } from '../trace/trace-result.js';
import type { SaturatedTrace } from '../trace/trace-saturated.js';
import { MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W } from '../units/constants.js';
import { ErrorBars } from './error-bars.js';
import { runFigures } from './figures.js';
import { photonLedger, wattLedger } from './ledger.js';
import { mapEvenness } from './map-evenness.js';
import { hasMeasure, type MapField, mapField, soundCells } from './map-field.js';
import { radianceArray, radianceRecord } from './radiance.js';

/** What only the caller knows of a run. */
export interface RunAbout {
  readonly version: string;
  readonly file: string;
  readonly text: string;
  /** SHA-256 of the text, hex. */
  readonly hash: string;
  /** Dials as used, name -> text. */
  readonly dials: Readonly<Record<string, string>>;
  readonly startedAt: Date;
  /** Command that repeats the run. */
  readonly repeat: string;
  /** How saturation was taken into account; left out where it was not. */
  readonly saturation?: SaturatedTrace | null;
}

/** File names in `record` are left empty: the run folder chooses them. @throws LedgerDefect */
export function summariseRun(result: TraceResult, about: RunAbout): { record: RunRecord; arrays: RunArrays } {
  const { tallies, description } = result;
  const bars = new ErrorBars(tallies);
  const pumpWatts = description.pumps.reduce((sum, { power }) => sum + power, 0);
  const all = tallies.maps.map((map) => mapField(map, tallies, pumpWatts, bars.mean('launchedEnergy')));
  const fields = all.filter(hasMeasure);
  const record: RunRecord = {
    format: RUN_FORMAT,
    tool: { name: 'stokeswell', version: about.version },
    design: {
      title: description.title,
      file: about.file,
      text: about.text,
      hash: about.hash,
      dials: about.dials,
    },
    run: {
      seed: result.seed,
      histories: tallies.moments.histories,
      batches: tallies.moments.batches,
      threads: result.threads,
      seconds: result.seconds,
      stopReason: result.stopReason,
      polarisation: carriesPolarisation(description) ? 'carried' : 'averaged',
      startedAt: about.startedAt.toISOString(),
      repeat: about.repeat,
    },
    pumps: description.pumps.map(({ name, power, wavelengthNm, linewidthNm, wallPlug, driver }) => ({
      name,
      power,
      wavelengthNm,
      linewidthNm,
      diodeEfficiency: wallPlug,
      driverEfficiency: driver,
    })),
    figures: runFigures(result, fields),
    saturation: about.saturation ? saturationRecord(about.saturation) : null,
    ledger: { photons: photonLedger(tallies), watts: wattLedger(tallies) },
    maps: fields.map(mapRecord),
    spectra: tallies.spectra.map(({ id, what, where, light, photons }) => ({
      id,
      what,
      where,
      light,
      file: '',
      photonFraction: total(photons) / tallies.moments.histories,
    })),
    curves: result.curves.map(({ id, what, name, where, unit }) => ({ id, what, name, where, unit, file: '' })),
    angles: tallies.angles.map(({ id, where, polarToDeg, luminous, opening }) => ({
      id,
      where,
      file: '',
      polarToDeg,
      lumens: total(luminous) * lumensPerEv(result),
      opening,
      photometricFile: '',
    })),
    radiance: tallies.radiance.map((one) => radianceRecord(one, wattsPerEv(result))),
    histograms: tallies.histograms.map(({ id, unit, from, width, counts }) => {
      const all = total(counts);
      return { id, unit, from, width, shares: Array.from(counts, (count) => (all > 0 ? count / all : 0)) };
    }),
    pictures: [],
    checks: [...result.warnings, ...all.filter((field) => !hasMeasure(field)).map(leftOut)],
    cautions: cautionsFor({
      pumpWatts,
      solvents: partMedia(result).flatMap(({ kind, base, mixture }) =>
        kind === 'liquid' ? (mixture?.map(({ solvent }) => solvent) ?? [base]) : [],
      ),
      dyes: partMedia(result).flatMap(({ dyes }) => dyes.map(({ name, formOf = name }) => formOf)),
    }),
  };
  return { record, arrays: runArrays(result, fields) };
}

function saturationRecord({ result, steps, settled }: SaturatedTrace): SaturationRecord {
  const shares = partMedia(result).flatMap(({ name, dyes }) =>
    dyes.map((dye) => ({ medium: name, dye: dye.name, share: dye.groundShare ?? 1 })),
  );
  return { settled, shares, steps };
}

function partMedia({ description }: TraceResult) {
  const names = new Set(description.parts.map(({ medium }) => medium));
  return [...names].map((name) => description.media.get(name)).filter((medium) => medium !== undefined);
}

const total = (values: Float64Array): number => values.reduce((a, b) => a + b, 0);

function leftOut({ map: { id } }: MapField): RunRecord['checks'][number] {
  return {
    code: 'caution',
    severity: 'warning',
    path: [],
    problem: `map ${id} is left out: none of its cells meets what it maps`,
    suggestion: 'ask for finer cells',
  };
}

function mapRecord(field: MapField): MapRecord {
  const { map, unit, values, power } = field;
  let minimum = Number.POSITIVE_INFINITY;
  let maximum = 0;
  const measure = map.measure.reduce((a, b) => a + b, 0);
  // Slivers of cells on a rim hold too few photons to be an extreme.
  for (const i of soundCells(field)) {
    minimum = Math.min(minimum, values[i]);
    maximum = Math.max(maximum, values[i]);
  }
  const evenness = mapEvenness(field);
  return {
    id: map.id,
    what: map.what,
    where: map.where,
    unit,
    shape: map.shape,
    extentMm: map.extent,
    axes: map.axes,
    ...(map.extentDeg === undefined ? {} : { extentDeg: map.extentDeg }),
    files: [],
    power,
    mean: power / (measure * (unit === 'W/cm³' ? 1e-3 : 1e-2)),
    minimum,
    maximum,
    variation: evenness?.variation?.value ?? null,
    variationError: evenness?.variation?.standardError ?? null,
    minOverMean: evenness?.minOverMean ?? null,
  };
}

/** W that one eV counted stands for, and lumens that one eV·ȳ does. */
function wattsPerEv({ description, tallies }: TraceResult): number {
  const pumpWatts = description.pumps.reduce((sum, { power }) => sum + power, 0);
  return pumpWatts / (tallies.moments.histories * new ErrorBars(tallies).mean('launchedEnergy'));
}
const lumensPerEv = (result: TraceResult): number => MAXIMUM_LUMINOUS_EFFICACY_LM_PER_W * wattsPerEv(result);

function runArrays(result: TraceResult, fields: readonly MapField[]): RunArrays {
  const { tallies, curves } = result;
  const { histories } = tallies.moments;
  const perEv = wattsPerEv(result);
  const widths = cellWidths(tallies.wavelengthsNm);
  return {
    maps: fields.map(({ map, unit, values }) => ({
      id: map.id,
      shape: map.shape,
      extentMm: map.extent,
      ...(map.extentDeg === undefined ? {} : { extentDeg: map.extentDeg }),
      axes: map.axes,
      unit,
      values,
      measure: map.measure,
    })),
    spectra: {
      wavelengthsNm: tallies.wavelengthsNm,
      columns: tallies.spectra.map(({ id, photons }) => ({
        id,
        values: photons.map((count, i) => count / histories / widths[i]),
      })),
    },
    curves: { wavelengthsNm: tallies.wavelengthsNm, columns: curves.map(({ id, values }) => ({ id, values })) },
    angles: tallies.angles.map(({ id, polarCells, azimuthCells, polarToDeg, energy, luminous }) => {
      const step = (polarToDeg * Math.PI) / 180 / polarCells;
      const solidAngle = (cell: number) => cellSolidAngle(Math.floor(cell / azimuthCells), step, azimuthCells);
      return {
        id,
        polarCells,
        azimuthCells,
        polarToDeg,
        wattsPerSr: energy.map((ev, i) => (ev * perEv) / solidAngle(i)),
        candela: luminous.map((ev, i) => (ev * lumensPerEv(result)) / solidAngle(i)),
      };
    }),
    radiance: tallies.radiance.map((one) => radianceArray(one, perEv)),
    drawing: null,
  };
}

function cellSolidAngle(polar: number, step: number, azimuthCells: number): number {
  return ((2 * Math.PI) / azimuthCells) * (Math.cos(polar * step) - Math.cos((polar + 1) * step));
}

/** Half way to either neighbour. */
function cellWidths(nm: Float64Array): Float64Array {
  const last = nm.length - 1;
  return nm.map((_, i) => {
    const below = i > 0 ? (nm[i] - nm[i - 1]) / 2 : (nm[1] - nm[0]) / 2;
    const above = i < last ? (nm[i + 1] - nm[i]) / 2 : below;
    return below + above;
  });
}
