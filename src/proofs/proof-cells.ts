/** Small builders for the cells of the proofs: descriptions written in code, all media of constant index. */
import type {
  BeamDescription,
  Description,
  DetectorDescription,
  DetectorTarget,
  DissolvedDye,
  EmissionDescription,
  FaceFinish,
  FinishDescription,
  MediumDescription,
  PartDescription,
  PieceDescription,
  PumpDescription,
  ScattererDescription,
  ScatterTable,
  ShapeDescription,
  Turn,
  Vector3,
} from '../design/description.js';
import type { Curve } from '../units/curve.js';

/** Wavelengths of the proofs, nm. The step between pump and emission lies in the middle. */
export const PUMP_NM = 450;
export const EMISSION_NM = 650;

/** `atPump` below 550 nm, `atEmission` above. */
export const twoColour =
  (atPump: number, atEmission: number): Curve =>
  (nm) =>
    nm < 550 ? atPump : atEmission;

const constant =
  (value: number): Curve =>
  () =>
    value;

export const air: MediumDescription = {
  name: 'air',
  path: ['media', 'air'],
  kind: 'gas',
  base: 'air',
  index: constant(1),
  absorption: constant(0),
  dyes: [],
  scatterers: [],
  thermal: null,
};

/** A medium of constant index; `absorption` is Napierian, 1/mm. */
export function medium(
  name: string,
  index: number,
  options: {
    absorption?: number | Curve;
    dyes?: readonly DissolvedDye[];
    scatterers?: readonly ScattererDescription[];
  } = {},
): MediumDescription {
  const { absorption = 0, dyes = [], scatterers = [] } = options;
  return {
    name,
    path: ['media', name],
    kind: 'liquid',
    base: 'custom',
    index: constant(index),
    absorption: typeof absorption === 'number' ? constant(absorption) : absorption,
    dyes,
    scatterers,
    thermal: null,
  };
}

/** A dye given by its absorption, 1/mm, and one emission line (or a spectrum). */
export function dye(
  name: string,
  absorption: number | Curve,
  quantumYield: number,
  emission: number | EmissionDescription = EMISSION_NM,
): DissolvedDye {
  return {
    name,
    concentration: null,
    absorption: typeof absorption === 'number' ? constant(absorption) : absorption,
    quantumYield,
    emission: typeof emission === 'number' ? { kind: 'line', wavelengthNm: emission } : emission,
    lifetimeNs: null,
  };
}

/** Scatters by Henyey and Greenstein's law, `coefficient` 1/mm, mean cosine `anisotropy`. */
export function haze(coefficient: number, anisotropy: number): ScattererDescription {
  return {
    name: 'haze',
    path: ['scatterers', 'haze'],
    kind: 'henyey-greenstein',
    coefficient: constant(coefficient),
    anisotropy: constant(anisotropy),
  };
}
/** Spheres of a radius in mm, whose complex index is n − ik. */
export function beads(radius: number, n: number, k: number, volumeFraction: number): ScattererDescription {
  const path = ['scatterers', 'beads'];
  return { name: 'beads', path, kind: 'beads', radius, index: constant(n), extinction: constant(k), volumeFraction };
}

const finish = <Kind extends object>(name: string, kind: Kind) => ({ name, path: ['finishes', name], ...kind });
export const CLEAR: FinishDescription = finish('clear', { kind: 'clear' as const });
export const BLACK: FinishDescription = finish('black', { kind: 'black' as const });
/** Loses nothing: a mirrored side wall continues a slab for ever. */
export const PERFECT: FinishDescription = mirror('perfect', 1);

export function mirror(name: string, reflectance: number): FinishDescription {
  return finish(name, { kind: 'mirror' as const, reflectance });
}
export function diffuser(name: string, reflects: number, transmits = 0): FinishDescription {
  return finish(name, { kind: 'diffuser' as const, reflects, transmits });
}
/** A sheet that passes everything, spread about the straight way by `fwhm`, rad; a pair along u and v. */
export function spreadingSheet(
  name: string,
  shape: 'gaussian' | 'top-hat',
  fwhm: number | readonly [number, number],
): FinishDescription {
  const widths = typeof fwhm === 'number' ? ([fwhm, fwhm] as const) : fwhm;
  return finish(name, { kind: 'scatter' as const, shape, fwhm: widths, split: { reflects: 0, transmits: 1 } });
}
export function scatterTable(name: string, table: ScatterTable): FinishDescription {
  return finish(name, { kind: 'bsdf' as const, ...table });
}
export function metal(name: string, n: number, k: number): FinishDescription {
  return finish(name, { kind: 'metal' as const, metal: name, n: constant(n), k: constant(k) });
}

/** Thin films of constant index, [n, k, thickness in nm], outermost first. */
export function stack(
  name: string,
  films: readonly (readonly [n: number, k: number, thicknessNm: number])[],
): FinishDescription {
  const layers = films.map(([n, k, thicknessNm], i) => ({
    material: 'film',
    n: constant(n),
    k: constant(k),
    rangeNm: null,
    thicknessNm,
    path: ['finishes', name, i],
  }));
  return finish(name, { kind: 'stack' as const, layers, extrapolates: false });
}

/** A convex piece in its part's frame. */
export function piece(
  shape: ShapeDescription,
  options: { name?: string; at?: Vector3; turns?: readonly Turn[]; minus?: readonly PieceDescription[] } = {},
): PieceDescription {
  const { name = null, at = [0, 0, 0], turns = [], minus = [] } = options;
  return { name, path: ['parts', name ?? shape.kind], shape, at, turns, minus };
}

/** A part of one shape or several pieces; `faces` maps face names (or '*') to finish names. */
export function part(
  name: string,
  mediumName: string,
  shape: ShapeDescription | readonly PieceDescription[],
  options: { faces?: Readonly<Record<string, string>>; at?: Vector3; turns?: readonly Turn[] } = {},
): PartDescription {
  const { faces = {}, at = [0, 0, 0], turns = [] } = options;
  const path = ['parts', name];
  return {
    name,
    path,
    medium: mediumName,
    pieces: 'kind' in shape ? [piece(shape)] : shape,
    placement: { at, turns, against: null },
    faces: Object.entries(faces).map(
      ([face, finishName]): FaceFinish => ({ face, finish: finishName, path: [...path, 'faces', face] }),
    ),
  };
}

/** Side walls of a box as perfect mirrors: a slab without end across x and y. */
export const ENDLESS = { left: 'perfect', right: 'perfect', front: 'perfect', back: 'perfect' } as const;

/** A pump from a point along a direction; 1 W at the pump wavelength unless said otherwise. */
export function pump(
  at: Vector3,
  direction: Vector3,
  beam: BeamDescription,
  options: { name?: string; power?: number; wavelengthNm?: number } = {},
): PumpDescription {
  const { name = 'pump', power = 1, wavelengthNm = PUMP_NM } = options;
  return {
    name,
    path: ['pumps', name],
    power,
    wavelengthNm,
    linewidthNm: 0,
    wallPlug: null,
    driver: null,
    polarised: null,
    aim: { kind: 'along', at, direction, roll: 0 },
    beam,
  };
}

export const thinBeam = (radius = 0.001): BeamDescription => ({
  kind: 'patch',
  outline: { kind: 'disc', radius },
  divergence: [0, 0],
});
export const lambertianDisc = (radius: number): BeamDescription => ({
  kind: 'lambertian',
  outline: { kind: 'disc', radius },
});
export const lambertianSquare = (side: number): BeamDescription => ({
  kind: 'lambertian',
  outline: { kind: 'rectangle', size: [side, side] },
});

export function detector(
  name: string,
  target: DetectorTarget,
  pixels: readonly [number, number] | null = null,
): DetectorDescription {
  return { name, path: ['detectors', name], target, pixels };
}

/** The whole cell. `title` names the run and seeds it. */
export function cell(
  title: string,
  contents: {
    media: readonly MediumDescription[];
    /** Name of the surrounding medium; air when left out. */
    around?: string;
    finishes?: readonly FinishDescription[];
    parts: readonly PartDescription[];
    pumps: readonly PumpDescription[];
    detectors?: readonly DetectorDescription[];
    exit: string;
    /** Carried where a pump is polarised when left out. */
    polarisation?: 'carried' | 'averaged';
  },
): Description {
  const { media, around = 'air', finishes = [], parts, pumps, detectors = [], exit, polarisation = null } = contents;
  return {
    title,
    about: null,
    dials: [],
    media: new Map([air, ...media].map((one) => [one.name, one])),
    surroundings: around,
    finishes: new Map([CLEAR, BLACK, PERFECT, ...finishes].map((one) => [one.name, one])),
    parts,
    pumps,
    detectors,
    // No proof reads the maps of the exit or of the absorbed power: a single cell costs nothing.
    exit: { name: exit, path: ['exit'], pixels: [1, 1] },
    defaults: { histories: null, precision: null, seed: null, voxels: [1, 1, 1], polarisation },
  };
}
