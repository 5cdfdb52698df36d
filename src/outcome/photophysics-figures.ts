/** Saturation, gain and bleaching as headline figures. */
import { crossSectionCm2 } from '../photophysics/cross-section.js';
import { saturationIrradiance } from '../photophysics/saturation-irradiance.js';
import { tripletRatio } from '../photophysics/steady-populations.js';
import type { Figure } from '../record/run-record.js';
import { type DyeExcitation, dyeExcitations, meanGroundShare } from '../trace/dye-excitation.js';
import type { TraceResult } from '../trace/trace-result.js';
import { AVOGADRO_PER_MOL } from '../units/constants.js';
import { bleachingFigures } from './bleaching-figures.js';
import { ErrorBars } from './error-bars.js';
import { NOT_PUMPED, names, unknown, withSpread } from './figure-parts.js';
import { hasMeasure, type MapField } from './map-field.js';
import { type PeakExcitation, peakOf } from './peak-excitation.js';
import { peakGain } from './peak-gain.js';

export type PhotophysicsFigureName =
  | 'excitedMolecules'
  | 'excitedMass'
  | 'peakExcitedFraction'
  | 'depletedAbsorption'
  | 'saturationIrradiance'
  | 'peakGain'
  | 'gainOverLongestPath'
  | 'absorptionsPerMolecule'
  | 'timeToBleach'
  | 'timeToBleachWithReservoir';

export function photophysicsFigures(
  result: TraceResult,
  fields: readonly MapField[],
): Record<PhotophysicsFigureName, Figure> {
  const { description, tallies } = result;
  const all = dyeExcitations(description, tallies);
  const bars = new ErrorBars(tallies);
  const field = fields.find((one) => one.map.what === 'absorbed-pump' && hasMeasure(one));
  const spread = relativeError(bars);
  const excited = all.filter(({ perSecond }) => perSecond > 0);
  const peaks = field === undefined ? [] : excited.flatMap((one) => peakOf(one, field) ?? []);
  const worst = peaks.toSorted((a, b) => b.away - a.away)[0] ?? null;
  return {
    ...excitedFigures(excited, spread),
    ...saturationFigures(excited, peaks, worst, description.pumps),
    ...gainFigures(peaks, worst, field),
    ...bleachingFigures(excited, peaks, spread),
  };
}

/** Of the photons absorbed by dyes, which all totals follow. */
function relativeError(bars: ErrorBars): number | null {
  const { value, standardError } = bars.propagate(
    ['dyeAbsorptions', 'launchedEnergy'],
    (absorbed, energy) => absorbed / energy,
  );
  return value === null || standardError === null || value === 0 ? null : standardError / value;
}

function excitedFigures(
  excited: readonly DyeExcitation[],
  spread: number | null,
): Pick<Record<PhotophysicsFigureName, Figure>, 'excitedMolecules' | 'excitedMass'> {
  const timeless = excited.filter(({ dye }) => dye.lifetimeNs === null).map(({ dye }) => dye);
  const note = excited.length === 0 ? NOT_PUMPED : `no lifetime known of ${names(timeless)}`;
  if (excited.length === 0 || timeless.length > 0) {
    return { excitedMolecules: unknown('molecules', note), excitedMass: unknown('ng', note) };
  }
  const molecules = excited.map(({ perSecond, dye }) => perSecond * (dye.lifetimeNs ?? 0) * 1e-9);
  const total = molecules.reduce((a, b) => a + b, 0);
  const massless = excited.filter(({ dye }) => !dye.molarMassGPerMol).map(({ dye }) => dye);
  const grams = excited.reduce(
    (sum, { dye }, i) => sum + (molecules[i] * (dye.molarMassGPerMol ?? 0)) / AVOGADRO_PER_MOL,
    0,
  );
  const lifetimes = excited.map(({ dye }) => `${dye.name} ${Number((dye.lifetimeNs ?? 0).toPrecision(3))} ns`);
  const text = `steady light; lifetime of ${[...new Set(lifetimes)].join(', ')}`;
  return {
    excitedMolecules: withSpread(total, spread, 'molecules', text),
    excitedMass:
      massless.length > 0
        ? unknown('ng', `no molar mass known of ${names(massless)}`)
        : withSpread(grams * 1e9, spread, 'ng'),
  };
}

function saturationFigures(
  excited: readonly DyeExcitation[],
  peaks: readonly PeakExcitation[],
  worst: PeakExcitation | null,
  pumps: TraceResult['description']['pumps'],
): Pick<Record<PhotophysicsFigureName, Figure>, 'peakExcitedFraction' | 'depletedAbsorption' | 'saturationIrradiance'> {
  if (worst === null) {
    const note = excited.length === 0 ? NOT_PUMPED : 'no dye with lifetime and strength in mol/L';
    return {
      peakExcitedFraction: unknown('of molecules', note),
      depletedAbsorption: unknown('of absorption', note),
      saturationIrradiance: unknown('W/cm²', note),
    };
  }
  const { dye, kinetics } = worst.of;
  const ratio = kinetics === null ? 0 : tripletRatio(kinetics);
  const many = peaks.length > 1 ? `${dye.name}; ` : '';
  const aside =
    kinetics?.triplet == null
      ? 'two levels, for no triplet data of it are known: truly more may be out of the ground state'
      : `${percent(worst.away)} out of the ground state, ${Number(ratio.toPrecision(2))} in the triplet for each excited one`;
  const absorbed = peaks.reduce((sum, { of }) => sum + of.perSecond, 0);
  // First order: the light is that of unsaturated molecules, and each dye absorbs the less.
  const depleted = peaks.reduce((sum, { of }) => sum + of.perSecond * (1 - (meanGroundShare(of) ?? 1)), 0) / absorbed;
  const traced = peaks.some(({ of }) => of.dye.groundShare !== undefined);
  return {
    peakExcitedFraction: {
      value: worst.excited,
      standardError: worst.excitedError,
      unit: 'of molecules',
      note: `${many}${aside}; mean over a voxel${worst.note === null ? '' : `, ${worst.note}`}`,
    },
    depletedAbsorption: {
      value: depleted,
      standardError: null,
      unit: 'of absorption',
      note: traced
        ? 'taken into account in this run, as one strength for each part'
        : 'first order, not traced; --saturation takes it into account',
    },
    saturationIrradiance: irradianceFigure(worst, ratio, pumps),
  };
}

function irradianceFigure(worst: PeakExcitation, ratio: number, pumps: TraceResult['description']['pumps']): Figure {
  const { dye } = worst.of;
  // Of several pumps the one whose light the dye takes best.
  const [best] = pumps
    .map(({ wavelengthNm }) => ({
      nm: wavelengthNm,
      sigma: crossSectionCm2(dye.absorption(wavelengthNm) / (dye.groundShare ?? 1), dye.concentration ?? 0),
    }))
    .toSorted((a, b) => b.sigma - a.sigma);
  const value = saturationIrradiance(best.nm, best.sigma, dye.lifetimeNs ?? 0);
  if (!Number.isFinite(value)) return unknown('W/cm²', `${dye.name} does not absorb the pump light`);
  const half = value / (1 + ratio);
  const triplet =
    ratio > 0 ? `; with the triplet half the molecules are out already at ${Number(half.toPrecision(3))} W/cm²` : '';
  return { value, standardError: null, unit: 'W/cm²', note: `${dye.name} at ${best.nm} nm${triplet}` };
}

function gainFigures(
  peaks: readonly PeakExcitation[],
  worst: PeakExcitation | null,
  field: MapField | undefined,
): Pick<Record<PhotophysicsFigureName, Figure>, 'peakGain' | 'gainOverLongestPath'> {
  const nothing = (note: string) => ({
    peakGain: unknown('1/cm', note),
    gainOverLongestPath: unknown('', note),
  });
  if (worst === null || field === undefined) return nothing('no dye with lifetime and strength in mol/L');
  const { medium } = worst.of;
  const gain = peakGain(peaks.filter(({ of }) => of.medium === medium));
  if (gain === null) return nothing(`the emission of ${worst.of.dye.name} is a line without width`);
  const error = gain.standardError;
  const longestCm = Math.hypot(...field.map.extent.map(([low, high]) => high - low)) / 10;
  const at = `at ${gain.wavelengthNm} nm in the densest voxel; absorption by excited molecules left out`;
  const along = `straight along ${Number((10 * longestCm).toPrecision(3))} mm, the diagonal of the dyed parts, all as pumped as the densest voxel: no less than the truth, but for light that mirrors send back and forth`;
  if (gain.perCm <= 0) {
    const none = 'the liquid absorbs more than it amplifies at every wavelength the dye emits';
    return {
      peakGain: { value: 0, standardError: null, unit: '1/cm', note: none },
      gainOverLongestPath: { value: 0, standardError: null, unit: '', note: none },
    };
  }
  return {
    peakGain: { value: gain.perCm, standardError: error, unit: '1/cm', note: at },
    gainOverLongestPath: {
      value: gain.perCm * longestCm,
      standardError: error === null ? null : error * longestCm,
      unit: '',
      note: along,
    },
  };
}

const percent = (share: number): string => `${Number((100 * share).toPrecision(2))} %`;
