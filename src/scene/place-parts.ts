/** Puts every part where the design says, in file order, so that a part may lean on an earlier one. */
import type { Against, PartDescription, PieceDescription, Vector3 } from '../design/description.js';
import type { Fault } from '../design/fault.js';
import type { ConvexSolid, FacePatch, SolidFace } from './convex-solid.js';
import { patchCentre, patchNormal } from './face-patch.js';
import { makePieces, moveSolid } from './shapes/make-solid.js';
import { add, dot, type Matrix, multiply, rigidMatrix, scale, subtract } from './vector.js';

/**
 * A convex body minus other convex solids, in design coordinates; names carry the prefix of the piece. A shape that is not convex, or is
 * repeated, makes several; faces of one name are one face.
 */
export interface PlacedPiece {
  readonly body: NamedSolid;
  readonly minus: readonly NamedSolid[];
}

export interface NamedSolid {
  /** '' for the only piece of a simple part, else 'piece.' or 'piece.hole.'. */
  readonly prefix: string;
  readonly solid: ConvexSolid;
}

export interface PlacedPart {
  readonly description: PartDescription;
  readonly pieces: readonly PlacedPiece[];
}

export interface PlacedFace {
  readonly name: string;
  readonly patch: FacePatch;
  /** Outward normal of the solid where the whole face lies in one plane, else null. */
  readonly plane: Vector3 | null;
  /** The face of a solid that was taken away: its outward normal looks into the part. */
  readonly hollow: boolean;
}

export function placeParts(parts: readonly PartDescription[]): { parts: PlacedPart[]; faults: Fault[] } {
  const placed: PlacedPart[] = [];
  const faults: Fault[] = [];
  for (const description of parts) {
    const turned = placePieces(description, rigidMatrix([0, 0, 0], description.placement.turns));
    const { against, at } = description.placement;
    const shift = against === null ? at : leanOn(turned, against, placed, faults);
    placed.push(placePieces(description, multiply(rigidMatrix(shift, []), turnMatrix(description))));
  }
  return { parts: placed, faults };
}

const turnMatrix = (part: PartDescription): Matrix => rigidMatrix([0, 0, 0], part.placement.turns);

function placePieces(description: PartDescription, matrix: Matrix): PlacedPart {
  const prefixOf = ({ name }: PieceDescription, outer: string) => (name === null ? outer : `${outer}${name}.`);
  const pieces = description.pieces.flatMap((piece) => {
    const prefix = prefixOf(piece, '');
    return framesOf(piece, matrix).flatMap((frame) => {
      // What is taken away is given in the frame of the piece it is taken from.
      const holes = piece.minus.flatMap((hole) =>
        framesOf(hole, frame).flatMap((own) =>
          makePieces(hole.shape).map(({ body }) => ({ prefix: prefixOf(hole, prefix), solid: moveSolid(body, own) })),
        ),
      );
      const shape = makePieces(piece.shape).map(({ body, minus }) => ({
        body,
        minus: minus.map((solid) => ({ prefix, solid: moveSolid(solid, frame) })),
      }));
      return shape.map(
        ({ body, minus }): PlacedPiece => ({
          body: { prefix, solid: moveSolid(body, frame) },
          minus: [...minus, ...holes],
        }),
      );
    });
  });
  return { description, pieces };
}

/** Frame of each copy of a piece, rows along x first. */
function framesOf({ at, turns, repeat }: PieceDescription, outer: Matrix): Matrix[] {
  if (repeat === undefined) return [multiply(outer, rigidMatrix(at, turns))];
  const { counts, pitch } = repeat;
  return Array.from({ length: counts[0] * counts[1] * counts[2] }, (_, i) => {
    const cell = [i % counts[0], Math.floor(i / counts[0]) % counts[1], Math.floor(i / (counts[0] * counts[1]))];
    const [x, y, z] = cell.map((k, axis) => at[axis] + (k - (counts[axis] - 1) / 2) * pitch[axis]);
    return multiply(outer, rigidMatrix([x, y, z], turns));
  });
}

interface Member {
  readonly face: SolidFace;
  readonly hollow: boolean;
}

/** Every face of a part by its name, e.g. 'top', 'bore.side'. */
export function partFaces(part: PlacedPart): PlacedFace[] {
  const members = new Map<string, Member[]>();
  const solids = part.pieces.flatMap(({ body, minus }) => [
    { ...body, hollow: false },
    ...minus.map((hole) => ({ ...hole, hollow: true })),
  ]);
  const seen = new Set<ConvexSolid>();
  for (const { prefix, solid, hollow } of solids) {
    // A hole in a part of several pieces is listed with each.
    if (seen.has(solid)) continue;
    seen.add(solid);
    for (const face of solid.faces) {
      const name = prefix + face.name;
      const known = members.get(name);
      if (known === undefined) members.set(name, [{ face, hollow }]);
      else known.push({ face, hollow });
    }
  }
  return [...members].flatMap(([name, all]) => joinFaces(name, all));
}

/** Nothing for a name that no patch bears. */
function joinFaces(name: string, members: readonly Member[]): PlacedFace[] {
  const shown = members.filter(({ face }) => face.patch !== null || face.whole !== undefined);
  if (shown.length === 0) return [];
  const wholes = shown.flatMap(({ face }) => (face.whole === undefined ? [] : [face.whole]));
  const patches = wholes.length > 0 ? wholes : shown.flatMap(({ face }) => (face.patch === null ? [] : [face.patch]));
  const [first] = patches;
  const patch: FacePatch =
    patches.length === 1
      ? first
      : { kind: 'group', members: patches, normal: patchNormal(first), u: first.u, v: first.v };
  const plane = planeOf(shown[0].face);
  const flat = shown.every(({ face }) => {
    const own = planeOf(face);
    return (
      own !== null &&
      plane !== null &&
      dot(own.normal, plane.normal) > 1 - 1e-12 &&
      Math.abs(own.offset - plane.offset) < 1e-9
    );
  });
  return [{ name, patch, plane: flat && plane !== null ? plane.normal : null, hollow: shown[0].hollow }];
}

function planeOf({ surface, patch }: SolidFace): { readonly normal: Vector3; readonly offset: number } | null {
  if (surface.kind === 'plane') return surface;
  if (patch?.kind !== 'facets' || !patch.flat) return null;
  return { normal: patch.normal, offset: dot(patch.normal, patch.centre) };
}

export function findFace(parts: readonly PlacedPart[], reference: string): PlacedFace | null {
  const dotAt = reference.indexOf('.');
  const part = parts.find(({ description }) => description.name === reference.slice(0, dotAt));
  return (part && partFaces(part).find(({ name }) => name === reference.slice(dotAt + 1))) ?? null;
}

/** Looking out of the material: a hole's wall looks into the hole. */
export function faceNormal({ plane, hollow }: PlacedFace): Vector3 | null {
  return plane !== null && hollow ? scale(plane, -1) : plane;
}

function leanOn(part: PlacedPart, against: Against, earlier: readonly PlacedPart[], faults: Fault[]): Vector3 {
  const refuse = (problem: string, more: Partial<Fault> = {}): Vector3 => {
    faults.push({ code: 'geometry', severity: 'error', path: against.path, problem, ...more });
    return [0, 0, 0];
  };
  const target = findFace(earlier, against.face);
  if (target === null) {
    return refuse('no earlier part has this face', { found: against.face, expected: 'part.face of a part above it' });
  }
  const out = faceNormal(target);
  if (out === null) return refuse('only a flat face can be leaned on', { found: `${against.face}, which is curved` });
  const flat = partFaces(part).filter((face) => faceNormal(face) !== null);
  const facing = (face: PlacedFace) => dot(faceNormal(face) as Vector3, out);
  const own =
    against.with === null
      ? flat.toSorted((a, b) => facing(a) - facing(b))[0]
      : flat.find(({ name }) => name === against.with);
  if (own === undefined) {
    return refuse('the part has no such flat face to lean with', {
      found: against.with ?? 'none',
      expected: flat.map(({ name }) => name).join(', '),
    });
  }
  if (facing(own) > -1 + 1e-9) {
    return refuse(`${own.name} does not look the opposite way of ${against.face}`, {
      suggestion: 'turn the part, or name another face in "with"',
    });
  }
  const patch: FacePatch = target.patch;
  const goal = add(
    patchCentre(patch),
    add(scale(out, against.gap), add(scale(patch.u, against.shift[0]), scale(patch.v, against.shift[1]))),
  );
  return subtract(goal, patchCentre(own.patch));
}
