/** Puts every part where the design says, in file order, so that a part may lean on an earlier one. */
import type { Against, PartDescription, PieceDescription, Vector3 } from '../design/description.js';
import type { Fault } from '../design/fault.js';
import type { ConvexSolid, FacePatch, SolidFace } from './convex-solid.js';
import { patchCentre } from './face-patch.js';
import { makeSolid, moveSolid } from './shapes/make-solid.js';
import { add, dot, type Matrix, multiply, rigidMatrix, scale, subtract } from './vector.js';

/** A convex body minus other convex solids, in design coordinates; names carry the prefix of the piece. */
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
  readonly face: SolidFace;
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
  const place = (piece: PieceDescription, outer: string, frame: Matrix): NamedSolid & { frame: Matrix } => {
    const own = multiply(frame, rigidMatrix(piece.at, piece.turns));
    const prefix = piece.name === null ? outer : `${outer}${piece.name}.`;
    return { prefix, solid: moveSolid(makeSolid(piece.shape), own), frame: own };
  };
  const pieces = description.pieces.map((piece): PlacedPiece => {
    const body = place(piece, '', matrix);
    // What is taken away is given in the frame of the piece it is taken from.
    return { body, minus: piece.minus.map((hole) => place(hole, body.prefix, body.frame)) };
  });
  return { description, pieces };
}

/** Every face of a part by its name, e.g. 'top', 'bore.side'. */
export function partFaces(part: PlacedPart): PlacedFace[] {
  return part.pieces.flatMap(({ body, minus }) => [
    ...namedFaces(body, false),
    ...minus.flatMap((hole) => namedFaces(hole, true)),
  ]);
}

function namedFaces({ prefix, solid }: NamedSolid, hollow: boolean): PlacedFace[] {
  return solid.faces.map((face) => ({ name: prefix + face.name, face, hollow }));
}

export function findFace(parts: readonly PlacedPart[], reference: string): PlacedFace | null {
  const dotAt = reference.indexOf('.');
  const part = parts.find(({ description }) => description.name === reference.slice(0, dotAt));
  return (part && partFaces(part).find(({ name }) => name === reference.slice(dotAt + 1))) ?? null;
}

/** Looking out of the material: a hole's wall looks into the hole. */
export function faceNormal({ face, hollow }: PlacedFace): Vector3 | null {
  const { patch, surface } = face;
  const normal =
    surface.kind === 'plane' ? surface.normal : patch.kind === 'facets' && patch.flat ? patch.normal : null;
  return normal !== null && hollow ? scale(normal, -1) : normal;
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
  const patch: FacePatch = target.face.patch;
  const goal = add(
    patchCentre(patch),
    add(scale(out, against.gap), add(scale(patch.u, against.shift[0]), scale(patch.v, against.shift[1]))),
  );
  return subtract(goal, patchCentre(own.face.patch));
}
