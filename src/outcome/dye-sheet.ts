/** What is known of a dye in a liquid before any tracing: numbers and curves. */
import type { DissolvedDye, GivenConstant, MediumDescription } from '../design/description.js';
import { doseToLose } from '../photophysics/bleaching.js';
import { crossSectionCm2 } from '../photophysics/cross-section.js';
import { type EmissionWeights, emissionWeights } from '../photophysics/emission-weights.js';
import { escapingYield, overlapProbability } from '../photophysics/overlap-probability.js';
import { saturationIrradiance } from '../photophysics/saturation-irradiance.js';
import { tripletRatio } from '../photophysics/steady-populations.js';

export interface DyeSheet {
  readonly dye: string;
  readonly medium: string;
  /** mol/L; null for a dye given by its absorption. */
  readonly concentration: number | null;
  readonly pathMm: number;
  readonly pumpNm: number;
  /** Decadic absorbance over the path at the pump, and the share of the pump light absorbed. */
  readonly absorbance: number;
  readonly absorbed: number;
  /** mm; Infinity where nothing absorbs. */
  readonly depthMm: number;
  readonly peakNm: number;
  readonly peakAbsorbance: number;
  readonly emissionNm: number;
  readonly quantumYield: number;
  readonly lifetimeNs: number | null;
  /** Overlap probability along the path, and what gets away of the absorbed photons after it. */
  readonly overlap: number;
  readonly escaping: number;
  /** W/cm²: two levels, and with the triplet; null without lifetime, strength or absorption. */
  readonly saturation: { readonly bare: number; readonly withTriplet: number | null } | null;
  readonly bleaching: (GivenConstant & { readonly dose: number }) | null;
  /** By wavelength: absorbance over the path, emission with its peak at 1. */
  readonly spectra: {
    readonly nm: readonly number[];
    readonly absorbance: readonly number[];
    readonly emission: readonly number[];
  };
  /** By length of path, mm: shares of the pump and of emitted light that the dye takes. */
  readonly paths: {
    readonly mm: readonly number[];
    readonly pump: readonly number[];
    readonly emitted: readonly number[];
  };
}

const PATH_STEPS_PER_DECADE = 20;

/** Of the dye alone: what bare liquid absorbs is left out. */
export function dyeSheet(medium: MediumDescription, dye: DissolvedDye, pumpNm: number, pathMm: number): DyeSheet {
  const mu = (nm: number) => Math.max(0, dye.absorption(nm));
  const weights = emissionWeights(dye.emission);
  const decadic = (nm: number) => (mu(nm) * pathMm) / Math.LN10;
  const range = wavelengths(dye, pumpNm);
  const emission = shape(weights, range);
  const peakNm = range.reduce((best, nm) => (mu(nm) > mu(best) ? nm : best), range[0]);
  const emissionNm = weights.nm.reduce(
    (best, nm, i) => (weights.weights[i] > best.w ? { nm, w: weights.weights[i] } : best),
    {
      nm: weights.nm[0],
      w: 0,
    },
  ).nm;
  const overlap = overlapProbability(weights, mu, pathMm);
  const mm = pathsAround(pathMm);
  return {
    dye: dye.name,
    medium: medium.name,
    concentration: dye.concentration,
    pathMm,
    pumpNm,
    absorbance: decadic(pumpNm),
    absorbed: -Math.expm1(-mu(pumpNm) * pathMm),
    depthMm: 1 / mu(pumpNm),
    peakNm,
    peakAbsorbance: decadic(peakNm),
    emissionNm,
    quantumYield: dye.quantumYield,
    lifetimeNs: dye.lifetimeNs,
    overlap,
    escaping: escapingYield(dye.quantumYield, overlap),
    saturation: saturationOf(dye, pumpNm),
    bleaching: dye.bleachYield ? { ...dye.bleachYield, dose: doseToLose(0.1, dye.bleachYield.value) } : null,
    spectra: { nm: range, absorbance: range.map(decadic), emission },
    paths: {
      mm,
      pump: mm.map((length) => -Math.expm1(-mu(pumpNm) * length)),
      emitted: mm.map((length) => overlapProbability(weights, mu, length)),
    },
  };
}

function saturationOf(dye: DissolvedDye, pumpNm: number): DyeSheet['saturation'] {
  const { lifetimeNs, triplet, concentration, absorption } = dye;
  if (lifetimeNs === null || concentration === null || !(concentration > 0) || !(absorption(pumpNm) > 0)) return null;
  const bare = saturationIrradiance(pumpNm, crossSectionCm2(absorption(pumpNm), concentration), lifetimeNs);
  if (!triplet) return { bare, withTriplet: null };
  const ratio = tripletRatio({
    lifetimeNs,
    triplet: { yield: triplet.yield.value, lifetimeNs: triplet.lifetimeNs.value },
  });
  return { bare, withTriplet: bare / (1 + ratio) };
}

/** From well below the pump to the red end of the emission, every nm. */
function wavelengths({ emission }: DissolvedDye, pumpNm: number): number[] {
  const end = emission.kind === 'line' ? emission.wavelengthNm + 30 : Math.min(emission.toNm, 800);
  const from = Math.max(300, Math.floor(Math.min(pumpNm - 45, end - 200) / 10) * 10);
  const to = Math.ceil(end / 10) * 10;
  return Array.from({ length: to - from + 1 }, (_, i) => from + i);
}

/** Photons per nm with the peak at 1. */
function shape({ nm, weights }: EmissionWeights, range: readonly number[]): number[] {
  const peak = weights.reduce((a, b) => Math.max(a, b), 0);
  const step = nm.length > 1 ? nm[1] - nm[0] : 1;
  return range.map((at) => {
    const cell = Math.round((at - nm[0]) / step);
    return peak > 0 ? (weights[cell] ?? 0) / peak : 0;
  });
}

/** A hundredth of the path to ten times the path. */
function pathsAround(pathMm: number): number[] {
  return Array.from(
    { length: 3 * PATH_STEPS_PER_DECADE + 1 },
    (_, i) => pathMm * 10 ** (i / PATH_STEPS_PER_DECADE - 2),
  );
}
