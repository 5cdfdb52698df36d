/**
 * What a run has counted when tracing is over: sums over histories, their moments over batches, and maps.
 * The engine fills it; the outcome stage turns it into ledger, figures and maps. All energies are photon energies
 * in eV; W = eV/launched eV × pump power.
 */

/** Histories of one random stream, and the unit of the error bars. A power of two: a whole Sobol net. */
export const BATCH_HISTORIES = 1024;
/** Histories of one group: errors of runs too short for batches. */
export const GROUP_HISTORIES = 64;

/** Fates a history, or a bundle of its energy, can have. Exhaustive and exclusive. */
export type Fate =
  | 'missed' // pump light that met no part at all
  | 'reflected-at-entry' // pump light that never got inside a part; where: face that sent it away
  | 'left-by-exit' // crossed the exit outward: output when emitted, blue leak when pump
  | 'left-elsewhere' // reached the surroundings for good; where: the face it crossed last
  | 'absorbed-by-finish' // where: face
  | 'absorbed-by-solid' // where: part
  | 'absorbed-by-solvent' // where: part
  | 'lost-in-dye' // absorbed by a dye and not re-emitted, as in a dilute solution; where: part, by: dye
  | 'quenched' // absorbed by a dye, not re-emitted because its own kind is too near; where: part, by: dye
  | 'stokes-heat' // energy only: absorbed minus re-emitted photon energy; where: part, by: dye
  | 'trapped'; // goes round for ever between boundaries that absorb nothing; where: part

/** `pump` until the first re-emission, `emitted` after it. */
export type Light = 'pump' | 'emitted';

/** One row the kernel counts into. */
export interface FateSlot {
  readonly fate: Fate;
  readonly light: Light;
  /** 'part.face', 'part', a detector's name, or null. */
  readonly where: string | null;
  /** Name of the dye or finish that did it, or null. */
  readonly by: string | null;
}

/**
 * Per-batch sums of a vector of scalars, folded in batch order. Layout of the vector, length 2·slots + FIGURE_COUNT:
 * [photons of slot 0, eV of slot 0, photons of slot 1, …, figure sums].
 */
export interface Moments {
  /** Histories in all batches together. */
  readonly histories: number;
  readonly batches: number;
  /** Σ over batches of x. */
  readonly sum: Float64Array;
  /** Σ over batches of x²/n, n the histories of that batch. */
  readonly sumSquares: Float64Array;
  /** Σ over batches of x_i·x_j/n for the figure sums only, row-major FIGURE_COUNT². */
  readonly figureCross: Float64Array;
}

/** Place of each figure sum inside the figure part of the vector. Emitted light through the exit unless said otherwise. */
export const enum FIGURE_PLACE {
  launchedPhotons = 0,
  launchedEnergy = 1,
  exitPhotons = 2,
  exitEnergy = 3,
  /** Σ eV·x̄(λ), CIE 1931 2°. */
  exitX = 4,
  /** Σ eV·ȳ(λ): 683.002 lm/W × this × W/eV are the lumens. */
  exitY = 5,
  exitZ = 6,
  /** Σ wavelength, nm, over exit photons. */
  exitWavelength = 7,
  /** Pump light through the exit. */
  leakPhotons = 8,
  leakEnergy = 9,
  /** Absorptions of any kind by dyes. */
  dyeAbsorptions = 10,
  /** Of these, absorptions of light that a dye had emitted. */
  reabsorptions = 11,
  /** Σ path length, mm, inside parts. */
  pumpPath = 12,
  emittedPath = 13,
  /** Pump photons absorbed by a dye. */
  pumpAbsorbed = 14,
  emissions = 15,
}
export const FIGURE_COUNT = 16;

/** The same by name. */
export const FIGURE = {
  launchedPhotons: FIGURE_PLACE.launchedPhotons,
  launchedEnergy: FIGURE_PLACE.launchedEnergy,
  exitPhotons: FIGURE_PLACE.exitPhotons,
  exitEnergy: FIGURE_PLACE.exitEnergy,
  exitX: FIGURE_PLACE.exitX,
  exitY: FIGURE_PLACE.exitY,
  exitZ: FIGURE_PLACE.exitZ,
  exitWavelength: FIGURE_PLACE.exitWavelength,
  leakPhotons: FIGURE_PLACE.leakPhotons,
  leakEnergy: FIGURE_PLACE.leakEnergy,
  dyeAbsorptions: FIGURE_PLACE.dyeAbsorptions,
  reabsorptions: FIGURE_PLACE.reabsorptions,
  pumpPath: FIGURE_PLACE.pumpPath,
  emittedPath: FIGURE_PLACE.emittedPath,
  pumpAbsorbed: FIGURE_PLACE.pumpAbsorbed,
  emissions: FIGURE_PLACE.emissions,
} as const;

/** A map over a face, a plane or the liquid, in two halves (even and odd batches) whose difference is pure noise. */
export interface RecordedMap {
  readonly id: string;
  readonly what: 'exit' | 'pumped-face' | 'detector' | 'absorbed-pump' | 'absorbed-all';
  /** 'part.face', detector name, or 'dyed parts' for voxels. */
  readonly where: string;
  /** Cells along u, v (and w for voxels); value index = iu + nu·(iv + nv·iw). */
  readonly shape: readonly number[];
  /** Extent along each axis, mm, low and high: from the centre of a flat face or plane, in design coordinates for voxels. */
  readonly extent: readonly (readonly [number, number])[];
  readonly axes: readonly string[];
  /** Sum of photon energies, eV, per cell, by half. */
  readonly energy: readonly [Float64Array, Float64Array];
  /** Area (mm²) or volume (mm³) of each cell that belongs to the face or dyed part; 0 outside it. */
  readonly measure: Float64Array;
  /** Part that each cell lies in, by its place in the design, −1 outside all that is mapped; of voxels only. */
  readonly part?: Int16Array;
  /** Of a sphere: the extent as azimuth and polar angle, degrees; `extent` then is arcs. */
  readonly extentDeg?: readonly (readonly [number, number])[];
  /** Of the exit: name of the medium its light goes out into, at its middle. */
  readonly mediumBeyond?: string;
  /** Corner of the map (its first cell's outer corner) and its unit axes in design coordinates; null for maps round cylinders and spheres. */
  readonly frame: {
    readonly origin: readonly [number, number, number];
    readonly u: readonly [number, number, number];
    readonly v: readonly [number, number, number];
  } | null;
}

export interface RecordedSpectrum {
  readonly id: string;
  readonly what: 'exit' | 'detector' | 'launched' | 'absorbed-pump' | 'emitted-in-dye' | 'leak';
  readonly where: string | null;
  readonly light: Light;
  /** Photons per wavelength cell. */
  readonly photons: Float64Array;
}

export interface RecordedAngles {
  readonly id: string;
  readonly where: string;
  /** Polar cells of equal width from 0 to `polarToDeg` off the normal or axis, azimuth cells of equal width from 0 to 360°. */
  readonly polarCells: number;
  readonly azimuthCells: number;
  readonly polarToDeg: 90 | 180;
  /** Photon energy, eV, index polar·azimuthCells + azimuth. */
  readonly energy: Float64Array;
  /** The same from even and from odd batches alone. */
  readonly halves: readonly [Float64Array, Float64Array];
  /** Σ eV·ȳ(λ). */
  readonly luminous: Float64Array;
  /** What the light comes out of, as photometry wants it; null where directions are those from a round side, which is no far field. */
  readonly opening: LuminousOpening | null;
}

/** Outline of what shines, mm: along azimuth 0, along azimuth 90°, and along the normal. A round one has its diameter for the first two. */
export interface LuminousOpening {
  readonly shape: 'rectangle' | 'disc' | 'dome' | 'sphere';
  readonly sizeMm: readonly [number, number, number];
}

/** Light by place and by direction from the outward normal there. */
export interface RecordedRadiance {
  readonly id: string;
  readonly what: 'exit' | 'detector';
  readonly where: string;
  /** Cells along u, v, polar angle (0 to 90°) and azimuth; index ((iv·nu + iu)·polar + ip)·azimuth + ia. */
  readonly shape: readonly [number, number, number, number];
  readonly extent: RecordedMap['extent'];
  readonly extentDeg?: RecordedMap['extent'];
  readonly axes: readonly string[];
  /** Photon energy, eV, by half. */
  readonly energy: readonly [Float64Array, Float64Array];
  /** Area of each place, mm², index iv·nu + iu. */
  readonly measure: Float64Array;
}

export interface Histogram {
  readonly id: 'absorptions-per-history' | 'reabsorptions-of-exit-photons' | 'path-of-exit-photons';
  /** Lower edge of the first cell, width of a cell; the last cell holds everything above. */
  readonly from: number;
  readonly width: number;
  readonly unit: string;
  readonly counts: Float64Array;
}

export interface RunTallies {
  readonly slots: readonly FateSlot[];
  readonly moments: Moments;
  /** The same sums over groups of histories finer than a batch: errors of last resort for runs of few batches. */
  readonly groupMoments: Moments;
  readonly maps: readonly RecordedMap[];
  readonly spectra: readonly RecordedSpectrum[];
  readonly angles: readonly RecordedAngles[];
  readonly radiance: readonly RecordedRadiance[];
  readonly histograms: readonly Histogram[];
  /** Wavelength of each cell of every spectrum, nm. */
  readonly wavelengthsNm: Float64Array;
}
