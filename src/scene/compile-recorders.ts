/** What records light where: the exit, detectors, pumped faces; and the voxels of the dyed liquid. */
import type { Description, Outline, RadianceCells, Vector2, Vector3 } from '../design/description.js';
import { aimedFace } from './aimed-face.js';
import type { BeamFrame } from './compile-pumps.js';
import type { CompiledSolids, SceneFace } from './compile-solids.js';
import type { FacePatch } from './convex-solid.js';
import { patchCentre, patchNormal, patchRange } from './face-patch.js';
import { type PlacedPart, partFaces } from './place-parts.js';
import { girthOf, heightOf, isRevolved } from './revolved.js';
import { add, dot, frameAbout, normalise, scale, snapDirection, subtract } from './vector.js';

export interface RecorderPlan {
  readonly what: 'exit' | 'detector' | 'pumped-face';
  readonly where: string;
  readonly face: SceneFace | null;
  /** For free planes. */
  readonly outline: Outline | null;
  readonly plane: { readonly plane: number; readonly sign: 1 | -1 } | null;
  /** Quadric of a sphere detector. */
  readonly curve: number | null;
  readonly sphere: { readonly radius: number; readonly polar: Vector2 } | null;
  readonly isExit: boolean;
  readonly wrapped: boolean;
  readonly cells: readonly [number, number];
  /** Corner of the map (flat), bottom centre of the axis (wrapped) or centre of the sphere. */
  readonly origin: Vector3;
  readonly u: Vector3;
  readonly v: Vector3;
  readonly normal: Vector3;
  /**
   * Own coordinates of the map's edges, mm; the origin of u, v is the centre of the face. On a sphere arcs: along the equator, and along
   * a meridian from the axis.
   */
  readonly extent: readonly [readonly [number, number], readonly [number, number]];
  /** Maps count these lights. */
  readonly countsPump: boolean;
  readonly countsEmitted: boolean;
  readonly spectrum: boolean;
  readonly angles: boolean;
  /** Largest angle from the normal that the angular record tells apart, degrees: curved faces send light backwards of their axis. */
  readonly polarToDeg: 90 | 180;
  readonly radiance: RadianceCells | null;
}

const LONG_SIDE_CELLS = 40;
/** Voxels are fewer: each shares the histories with all others, and the peak is only as sure as one of them. */
const LONG_SIDE_VOXELS = 24;

/** @param beams frames of the pumps, in order */
export function planRecorders(
  description: Description,
  solids: CompiledSolids,
  beams: readonly BeamFrame[],
): RecorderPlan[] {
  const plans: RecorderPlan[] = [];
  const faceNamed = (reference: string) => solids.faces.find((face) => face.reference === reference) ?? null;
  const exitDetector = description.detectors.find(({ name }) => name === description.exit.name);
  const exitFace =
    exitDetector === undefined
      ? description.exit.name
      : exitDetector.target.kind === 'face'
        ? exitDetector.target.face
        : null;

  const exitRest = { what: 'exit', where: description.exit.name, isExit: true, countsPump: false } as const;
  const everything = { countsEmitted: true, spectrum: true, angles: true } as const;
  if (exitFace !== null) {
    const face = faceNamed(exitFace);
    if (face !== null) {
      const pixels = description.exit.pixels ?? exitDetector?.pixels ?? null;
      const radiance = description.exit.radiance ?? exitDetector?.radiance ?? null;
      plans.push({ ...exitRest, ...everything, ...faceMap(face, pixels), radiance });
    }
  }
  for (const detector of description.detectors) {
    const isExit = detector === exitDetector;
    const common = {
      what: isExit ? 'exit' : 'detector',
      where: detector.name,
      isExit,
      countsPump: !isExit,
      radiance: detector.radiance ?? null,
    } as const;
    if (detector.target.kind === 'plane') {
      const plane = solids.detectorPlanes.get(detector.name) ?? null;
      plans.push({ ...common, ...everything, ...planeMap(detector.target, detector.pixels), plane });
      continue;
    }
    if (detector.target.kind === 'sphere') {
      const curve = solids.detectorSpheres.get(detector.name) ?? null;
      plans.push({ ...common, ...everything, ...sphereMap(detector.target, detector.pixels), curve });
      continue;
    }
    const face = faceNamed(detector.target.face);
    if (face === null || isExit) continue;
    plans.push({ ...common, ...everything, ...faceMap(face, detector.pixels) });
  }
  const aimed = description.pumps.map(({ aim }, i) =>
    aim.kind === 'toward' ? faceNamed(aim.face) : aimedFace(beams[i], solids.faces),
  );
  for (const face of new Set(aimed)) {
    if (face === null) continue;
    plans.push({
      what: 'pumped-face',
      where: face.reference,
      isExit: false,
      countsPump: true,
      countsEmitted: false,
      spectrum: false,
      angles: false,
      ...faceMap(face, null),
      radiance: null,
    });
  }
  return plans;
}

type MapGeometry = Pick<
  RecorderPlan,
  | 'face'
  | 'outline'
  | 'plane'
  | 'curve'
  | 'sphere'
  | 'wrapped'
  | 'cells'
  | 'origin'
  | 'u'
  | 'v'
  | 'normal'
  | 'extent'
  | 'polarToDeg'
>;

function faceMap(face: SceneFace, pixels: Vector2 | null): MapGeometry {
  const { patch } = face;
  const polarToDeg = patch.kind === 'zone' ? 180 : 90;
  const base = { face, outline: null, plane: null, curve: null, sphere: null, polarToDeg } as const;
  if (isRevolved(patch)) {
    const girth = girthOf(patch);
    const height = heightOf(patch);
    return {
      ...base,
      wrapped: true,
      cells: cellCounts(girth, height, pixels),
      origin: patch.base,
      u: patch.u,
      v: patch.v,
      normal: patch.axis,
      extent: [
        [-girth / 2, girth / 2],
        [0, height],
      ],
    };
  }
  const normal = face.hollow ? scale(patchNormal(patch), -1) : patchNormal(patch);
  return { ...base, ...flatMap(patch, pixels), normal };
}

function flatMap(patch: FacePatch, pixels: Vector2 | null) {
  const centre = patchCentre(patch);
  const [uLow, uHigh] = patchRange(patch, patch.u).map((value) => value - dot(centre, patch.u));
  const [vLow, vHigh] = patchRange(patch, patch.v).map((value) => value - dot(centre, patch.v));
  return {
    wrapped: false,
    cells: cellCounts(uHigh - uLow, vHigh - vLow, pixels),
    origin: add(centre, add(scale(patch.u, uLow), scale(patch.v, vLow))),
    u: patch.u,
    v: patch.v,
    extent: [
      [uLow, uHigh],
      [vLow, vHigh],
    ],
  } as const;
}

function planeMap(
  target: { readonly at: Vector3; readonly normal: Vector3; readonly outline: Outline },
  pixels: Vector2 | null,
): MapGeometry {
  const normal = snapDirection(normalise(target.normal));
  const { u, v } = frameAbout(normal);
  const [a, b] =
    target.outline.kind === 'disc'
      ? [target.outline.radius, target.outline.radius]
      : [target.outline.size[0] / 2, target.outline.size[1] / 2];
  return {
    face: null,
    outline: target.outline,
    plane: null,
    curve: null,
    sphere: null,
    polarToDeg: 90,
    wrapped: false,
    cells: cellCounts(2 * a, 2 * b, pixels),
    origin: subtract(target.at, add(scale(u, a), scale(v, b))),
    u,
    v,
    normal,
    extent: [
      [-a, a],
      [-b, b],
    ],
  };
}

/** Cells along azimuth and polar angle; by themselves as fine round the sphere as along a meridian. */
function sphereMap(
  { centre, radius, axis, polar }: { centre: Vector3; radius: number; axis: Vector3; polar: Vector2 },
  pixels: Vector2 | null,
): MapGeometry {
  const normal = snapDirection(normalise(axis));
  const share = (polar[1] - polar[0]) / (2 * Math.PI);
  return {
    face: null,
    outline: null,
    plane: null,
    curve: null,
    sphere: { radius, polar },
    wrapped: false,
    cells: pixels ?? [LONG_SIDE_CELLS, Math.max(8, Math.round(LONG_SIDE_CELLS * share))],
    origin: centre,
    ...frameAbout(normal),
    normal,
    extent: [
      [0, 2 * Math.PI * radius],
      [radius * polar[0], radius * polar[1]],
    ],
    polarToDeg: 180,
  };
}

function cellCounts(sizeU: number, sizeV: number, pixels: Vector2 | null): readonly [number, number] {
  if (pixels !== null) return [pixels[0], pixels[1]];
  const long = Math.max(sizeU, sizeV);
  const count = (size: number) => Math.max(8, Math.round((LONG_SIDE_CELLS * size) / long));
  return [count(sizeU), count(sizeV)];
}

export interface VoxelPlan {
  readonly origin: Vector3;
  readonly size: Vector3;
  readonly cells: Vector3;
}

/** Box round everything that holds dye (or, without any dye, round all parts), divided into nearly cubic cells. */
export function planVoxels(description: Description, parts: readonly PlacedPart[]): VoxelPlan {
  const dyed = parts.filter(({ description: { medium } }) => (description.media.get(medium)?.dyes.length ?? 0) > 0);
  const within = dyed.length > 0 ? dyed : parts;
  const ranges = (
    [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ] as Vector3[]
  ).map((axis) => {
    const bodies = within.flatMap((part) => partFaces(part).filter(({ hollow }) => !hollow));
    const all = bodies.map(({ patch }) => patchRange(patch, axis));
    return [Math.min(...all.map(([a]) => a)), Math.max(...all.map(([, b]) => b))] as const;
  });
  const size = ranges.map(([a, b]) => b - a) as unknown as Vector3;
  const long = Math.max(...size);
  const wanted = size.map((s) => Math.max(8, Math.round((LONG_SIDE_VOXELS * s) / long))) as unknown as Vector3;
  return { origin: ranges.map(([a]) => a) as unknown as Vector3, size, cells: description.defaults.voxels ?? wanted };
}
