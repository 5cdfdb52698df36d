/**
 * The record of a run: what run.json holds. Every number shown anywhere (terminal, page, picture) is in it.
 * `format` counts up whenever a reader of older records would go wrong.
 */
import type { Fault } from '../design/fault.js';
import type { Fate, Light, LuminousOpening } from '../tallies/run-tallies.js';
import type { GroundShare, SaturationStep } from '../trace/saturation-step.js';
import type { CurveKind, StopReason, UsedCurve } from '../trace/trace-result.js';

export const RUN_FORMAT = 3;

export interface Figure {
  /** null: undefined for this run (no light left by the exit, wall-plug efficiency not given, …). */
  readonly value: number | null;
  /** null: exact, or too few batches to tell (then `note` says so). */
  readonly standardError: number | null;
  readonly unit: string;
  readonly note?: string;
}

/** Names of the headline figures, in the order a person reads them. */
export type FigureName =
  | 'exitPhotonFraction' // exit photons per pump photon
  | 'opticalEfficiency' // exit W per pump W
  | 'exitPower' // W
  | 'luminousFlux' // lm
  | 'luminousEfficacyOptical' // lm per pump optical W
  | 'luminousEfficacyWallPlug' // lm per electrical W
  | 'chromaticityX'
  | 'chromaticityY'
  | 'dominantWavelength' // nm
  | 'meanExitWavelength' // nm, photon mean
  | 'blueLeak' // W of pump light through the exit
  | 'blueLeakFraction' // of pump W
  | 'exitUniformityVariation' // coefficient of variation of exit irradiance, noise taken out
  | 'exitUniformityMinOverMean'
  | 'exitFlatness' // ISO 13694 flatness factor
  | 'exitBeamUniformity' // ISO 13694 beam uniformity
  | 'peakAbsorbedPowerDensity' // W/cm³
  | 'timeToBoiling' // s, adiabatic, still liquid, at the peak
  | 'excitedMolecules' // at any time, in steady light
  | 'excitedMass' // ng
  | 'peakExcitedFraction' // of the molecules in the densest voxel
  | 'depletedAbsorption' // of the absorption, lost because molecules are not in the ground state
  | 'saturationIrradiance' // W/cm², hν/(σ τ) at the pump
  | 'peakGain' // 1/cm, small signal, densest voxel
  | 'gainOverLongestPath' // peak gain times the longest path
  | 'absorptionsPerMolecule' // 1/s, mean over the liquid in the light
  | 'timeToBleach' // s until 10 % of the dye in the parts is destroyed
  | 'timeToBleachWithReservoir' // s, with the circulating volume
  | 'absorptionsPerHistory'
  | 'reabsorptionsPerHistory'
  | 'meanPumpPath' // mm per history
  | 'meanEmittedPath' // mm per emission
  | 'pumpAbsorbedFraction' // pump photons absorbed by a dye
  | 'pumpPower' // W
  | 'exitEtendue' // mm² sr, n² π A
  | 'exitEffectiveEtendue' // mm² sr, from the measured directions
  | 'exitMeanLuminance' // cd/m²
  | 'exitNormalLuminance' // cd/m²
  | 'pumpEtendue' // mm² sr, of the brightest pump
  | 'brightnessRatio' // exit over pump, photons per étendue and bandwidth
  | 'brightnessBound' // thermodynamic bound of that ratio
  | 'brightnessBoundShare'; // ratio over bound

export interface LedgerRow {
  readonly fate: Fate;
  readonly light: Light;
  readonly where: string | null;
  readonly by: string | null;
  readonly fraction: number;
  readonly standardError: number | null;
}

export interface MapRecord {
  readonly id: string;
  readonly what: string;
  readonly where: string;
  readonly unit: 'W/cm²' | 'W/cm³';
  readonly shape: readonly number[];
  readonly extentMm: readonly (readonly [number, number])[];
  readonly axes: readonly string[];
  /** Of a sphere: azimuth and polar angle, degrees, of which `extentMm` are the arcs. */
  readonly extentDeg?: readonly (readonly [number, number])[];
  /** Files beside run.json. */
  readonly files: readonly string[];
  readonly power: number;
  readonly mean: number;
  readonly minimum: number;
  readonly maximum: number;
  /** Coefficient of variation with the shot noise taken out, and its standard error: below twice that it is noise. */
  readonly variation: number | null;
  readonly variationError: number | null;
  readonly minOverMean: number | null;
}

export interface RadianceRecord {
  readonly id: string;
  readonly where: string;
  readonly unit: 'W/(m² sr)';
  /** Cells along u, v, polar angle from the normal (0 to 90°) and azimuth (0 to 360°). */
  readonly shape: readonly number[];
  /** Of the first two axes, mm. */
  readonly extentMm: readonly (readonly [number, number])[];
  readonly extentDeg?: readonly (readonly [number, number])[];
  readonly axes: readonly string[];
  readonly files: readonly string[];
  /** Power over area and π: the radiance of even light. */
  readonly mean: number;
  readonly maximum: number;
}

export interface AnglesRecord {
  readonly id: string;
  readonly where: string;
  readonly file: string;
  readonly polarToDeg: 90 | 180;
  /** Luminous flux, lm. */
  readonly lumens: number;
  /** Of the far field for photometry; null where there is none. */
  readonly opening: LuminousOpening | null;
  /** Photometric file beside run.json; blank where there is none. */
  readonly photometricFile: string;
}

export interface PumpRecord {
  readonly name: string;
  /** Optical, W. */
  readonly power: number;
  readonly wavelengthNm: number;
  /** Full width at half maximum; 0 is a line. */
  readonly linewidthNm: number;
  /** Optical per electrical power of the diodes; null: not given. */
  readonly diodeEfficiency: number | null;
  /** Power to the diodes per power from the wall; null: not given. */
  readonly driverEfficiency: number | null;
}

export interface PictureRecord {
  readonly id: string;
  readonly title: string;
  /** Files beside run.json. */
  readonly files: readonly string[];
}

/** How the strengths of a saturated run were found. */
export interface SaturationRecord {
  /** Whether shares and exit fraction had come to rest. */
  readonly settled: boolean;
  /** Share of each dye's molecules that absorbed in the run. */
  readonly shares: readonly GroundShare[];
  /** Turns of the iteration, each with the shares it was traced with. */
  readonly steps: readonly SaturationStep[];
}

export interface RunRecord {
  readonly format: typeof RUN_FORMAT;
  readonly tool: { readonly name: 'stokeswell'; readonly version: string };
  readonly design: {
    readonly title: string;
    readonly file: string;
    readonly text: string;
    /** SHA-256 of the text, hex. */
    readonly hash: string;
    readonly dials: Readonly<Record<string, string>>;
  };
  readonly run: {
    readonly seed: string;
    readonly histories: number;
    readonly batches: number;
    readonly threads: number;
    readonly seconds: number;
    readonly stopReason: StopReason;
    /** Whether photons kept their polarisation, or faces treated all light as unpolarised. */
    readonly polarisation: 'carried' | 'averaged';
    readonly startedAt: string;
    /** Command that repeats this run to the same bits. */
    readonly repeat: string;
  };
  readonly pumps: readonly PumpRecord[];
  readonly figures: Readonly<Record<FigureName, Figure>>;
  /** null: dyes absorbed as if never saturated. */
  readonly saturation: SaturationRecord | null;
  readonly ledger: { readonly photons: readonly LedgerRow[]; readonly watts: readonly LedgerRow[] };
  readonly maps: readonly MapRecord[];
  readonly spectra: readonly {
    readonly id: string;
    readonly what: string;
    readonly where: string | null;
    readonly light: Light;
    readonly file: string;
    readonly photonFraction: number;
  }[];
  /** Curves of dyes, finishes and media the trace went by. */
  readonly curves: readonly {
    readonly id: string;
    readonly what: CurveKind;
    readonly name: string;
    readonly where: string | null;
    readonly unit: UsedCurve['unit'];
    readonly file: string;
  }[];
  readonly angles: readonly AnglesRecord[];
  readonly radiance: readonly RadianceRecord[];
  readonly histograms: readonly {
    readonly id: string;
    readonly unit: string;
    readonly from: number;
    readonly width: number;
    /** Share of its histories or photons per cell; the last cell holds everything above. */
    readonly shares: readonly number[];
  }[];
  readonly pictures: readonly PictureRecord[];
  readonly checks: readonly Fault[];
  readonly cautions: readonly string[];
}
