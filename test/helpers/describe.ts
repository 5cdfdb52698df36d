/** Short hand for descriptions in tests: constant media, simple parts. */
import type {
  Description,
  DissolvedDye,
  FinishDescription,
  MediumDescription,
  PartDescription,
  Placement,
  PumpDescription,
  ScattererDescription,
  ShapeDescription,
  Turn,
  Vector3,
} from '../../src/design/description.js';

export const flat = (value: number) => () => value;

export function medium(
  name: string,
  index: number,
  more: {
    absorption?: number;
    dyes?: readonly DissolvedDye[];
    scatterers?: readonly ScattererDescription[];
    kind?: MediumDescription['kind'];
  } = {},
): MediumDescription {
  return {
    name,
    path: ['media', name],
    kind: more.kind ?? 'liquid',
    base: name,
    index: flat(index),
    absorption: flat(more.absorption ?? 0),
    dyes: more.dyes ?? [],
    scatterers: more.scatterers ?? [],
    thermal: null,
  };
}

/** A dye that absorbs the same everywhere and emits one line. */
export function plainDye(absorption: number, quantumYield: number, emissionNm: number): DissolvedDye {
  return {
    name: 'dye',
    concentration: null,
    absorption: flat(absorption),
    quantumYield,
    emission: { kind: 'line', wavelengthNm: emissionNm },
    lifetimeNs: null,
  };
}

/** Henyey and Greenstein's law, the same everywhere; 1/mm. */
export function haze(coefficient: number, anisotropy: number): ScattererDescription {
  const curves = { coefficient: flat(coefficient), anisotropy: flat(anisotropy) };
  return { name: 'haze', path: ['scatterers', 'haze'], kind: 'henyey-greenstein', ...curves };
}

/** Spheres of a radius in mm and of complex index n − ik. */
export function beads(radius: number, n: number, volumeFraction: number, k = 0): ScattererDescription {
  const curves = { index: flat(n), extinction: flat(k) };
  return { name: 'beads', path: ['scatterers', 'beads'], kind: 'beads', radius, volumeFraction, ...curves };
}

type Finish = FinishDescription extends infer F ? (F extends unknown ? Omit<F, 'name' | 'path'> : never) : never;

export function finish(name: string, what: Finish): FinishDescription {
  return { name, path: ['finishes', name], ...what } as FinishDescription;
}

export function part(
  name: string,
  shape: ShapeDescription,
  mediumName: string,
  more: {
    at?: Vector3;
    turns?: readonly Turn[];
    against?: Partial<NonNullable<Placement['against']>> & { face: string };
    faces?: Readonly<Record<string, string>>;
    minus?: readonly { name: string; shape: ShapeDescription; at?: Vector3; turns?: readonly Turn[] }[];
  } = {},
): PartDescription {
  const path = ['parts', name];
  return {
    name,
    path,
    medium: mediumName,
    pieces: [
      {
        name: null,
        path,
        shape,
        at: [0, 0, 0],
        turns: [],
        minus: (more.minus ?? []).map((hole) => ({
          name: hole.name,
          path,
          shape: hole.shape,
          at: hole.at ?? [0, 0, 0],
          turns: hole.turns ?? [],
          minus: [],
        })),
      },
    ],
    placement: {
      at: more.at ?? [0, 0, 0],
      turns: more.turns ?? [],
      against: more.against === undefined ? null : { with: null, shift: [0, 0], gap: 0, path, ...more.against },
    },
    faces: Object.entries(more.faces ?? {}).map(([face, name]) => ({
      face,
      finish: name,
      path: [...path, 'faces', face],
    })),
  };
}

export function beam(at: Vector3, direction: Vector3, more: Partial<PumpDescription> = {}): PumpDescription {
  return {
    name: 'beam',
    path: ['pumps', 'beam'],
    power: 1,
    wavelengthNm: 450,
    linewidthNm: 0,
    wallPlug: null,
    driver: null,
    polarised: null,
    aim: { kind: 'along', at, direction, roll: 0 },
    beam: { kind: 'patch', outline: { kind: 'disc', radius: 0 }, divergence: [0, 0] },
    ...more,
  };
}

export function describeDesign(what: {
  media: readonly MediumDescription[];
  parts: readonly PartDescription[];
  pumps: readonly PumpDescription[];
  exit: string;
  finishes?: readonly FinishDescription[];
  detectors?: Description['detectors'];
  surroundings?: string;
}): Description {
  const named = <T extends { name: string }>(list: readonly T[]) => new Map(list.map((entry) => [entry.name, entry]));
  const surroundings = what.surroundings ?? 'air';
  const media = what.media.some(({ name }) => name === surroundings)
    ? what.media
    : [...what.media, medium(surroundings, 1, { kind: 'gas' })];
  return {
    title: 'test',
    about: null,
    dials: [],
    media: named(media),
    surroundings,
    finishes: named([finish('clear', { kind: 'clear' }), finish('black', { kind: 'black' }), ...(what.finishes ?? [])]),
    parts: what.parts,
    pumps: what.pumps,
    detectors: what.detectors ?? [],
    exit: { name: what.exit, path: ['exit'], pixels: null },
    defaults: { histories: null, precision: null, seed: null, voxels: null, polarisation: null },
  };
}
