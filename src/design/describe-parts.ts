/** Parts as written -> parts of the description: pieces, placement, finishes of faces. */

import { isHollow } from './describe-optics.js';
import { describeShape } from './describe-shapes.js';
import type { Against, FaceFinish, PartDescription, PieceDescription, Placement, Repeat, Turn } from './description.js';
import type { DesignRecord } from './design-fields.js';
import type { DesignPath } from './fault.js';
import { checkName, type Named } from './form-record.js';
import type { Reference } from './form-scalars.js';
import { checkReference, reportRepeatedNames } from './names.js';
import type { HoleRecord, PartRecord, PieceRecord, TurnRecord } from './part-fields.js';
import type { Reading } from './reading.js';
import { pieceFaces } from './shape-faces.js';

/** Faces of each part by name of the part; null for a part whose shape could not be read. */
export type FaceIndex = Map<string, readonly string[] | null>;

export const OTHERS = 'others';

export function describeParts(
  design: DesignRecord,
  finishNames: readonly string[],
  reading: Reading,
): { parts: PartDescription[]; faces: FaceIndex } {
  const faces: FaceIndex = new Map();
  const parts: PartDescription[] = [];
  const later = new Set(design.parts.map(({ name }) => name));
  if (design.parts.length === 0) reportNone('parts', reading);
  for (const entry of design.parts) {
    later.delete(entry.name);
    const pieces = describePieces(entry, reading);
    const own = pieces === null ? null : pieces.flatMap((piece) => pieceFaces(piece));
    const { value, name, path } = entry;
    const against = describeAgainst(value, path, own, faces, later, reading);
    if (against !== null && value.at !== null) {
      const problem = 'at and against both say where the part goes';
      reading.report({ code: 'geometry', path: [...path, 'at'], problem, expected: 'one of them' });
    }
    const placement: Placement = { at: value.at ?? [0, 0, 0], turns: value.turn.map(describeTurn), against };
    const finished = describeFaces(value, own, finishNames, reading);
    faces.set(name, own);
    if (pieces !== null) parts.push({ name, path, medium: value.medium.name, pieces, placement, faces: finished });
  }
  return { parts, faces };
}

export function reportNone(section: 'parts' | 'pumps', reading: Reading): void {
  // An absent or mistyped section has been told already.
  if (reading.hasFaultAt([section]) || reading.hasFaultAt([])) return;
  reading.report({ code: 'missing', path: [section], problem: `a design needs at least one of its ${section}` });
}

function describePieces({ path, value }: Named<PartRecord>, reading: Reading): PieceDescription[] | null {
  if (value.union === null) {
    const shape = describeShape(value, path, reading);
    const minus = value.minus.map((hole, i) => describeHole(hole, [...path, 'minus', i], reading));
    reportRepeatedNames(nameReferences(value.minus), reading);
    if (shape === null || minus.includes(null)) return null;
    const holes = minus.filter((hole) => hole !== null);
    return [{ name: null, path, shape, at: [0, 0, 0], turns: [], minus: holes }];
  }
  if (value.minus.length > 0) {
    const problem = 'in a union, what is taken away belongs to a piece';
    reading.report({
      code: 'geometry',
      path: [...path, 'minus'],
      problem,
      expected: '`minus` inside one of the pieces',
    });
  }
  const pieces = value.union.map((piece, i) => describePiece(piece, [...path, 'union', i], reading));
  reportRepeatedNames(nameReferences(value.union), reading);
  return pieces.includes(null) || pieces.length === 0 ? null : pieces.filter((piece) => piece !== null);
}

const nameReferences = (records: readonly HoleRecord[]): Reference[] =>
  records.map(({ name, path }) => ({ name, path: [...path, 'name'] }));

function describeHole(record: HoleRecord, path: DesignPath, reading: Reading): PieceDescription | null {
  const hole = describePiece(record, path, reading);
  if (hole !== null) checkHole(hole, reading);
  return hole;
}

function describePiece(record: HoleRecord | PieceRecord, path: DesignPath, reading: Reading): PieceDescription | null {
  const { name, at, turn } = record;
  if (name !== '') checkName(name, [...path, 'name'], null, new Map(), reading);
  const shape = describeShape(record, path, reading);
  const holes = 'minus' in record ? record.minus : [];
  reportRepeatedNames(nameReferences(holes), reading);
  const minus = holes.map((hole, i) => describeHole(hole, [...path, 'minus', i], reading));
  if (shape === null || minus.includes(null)) return null;
  const repeat = describeRepeat(record, path, reading);
  return {
    name,
    path,
    shape,
    at,
    turns: turn.map(describeTurn),
    minus: minus.filter((hole) => hole !== null),
    ...(repeat === null ? {} : { repeat }),
  };
}

/** Copies are cheap to write and dear to trace: each curved face of each is tested at every step of the light. */
const MOST_COPIES = 400;

function describeRepeat({ repeat, pitch }: HoleRecord, path: DesignPath, reading: Reading): Repeat | null {
  if (repeat === null) {
    if (pitch === null) return null;
    const problem = 'pitch has no meaning without repeat';
    reading.report({ code: 'geometry', path: [...path, 'pitch'], problem, expected: '`repeat: [x, y, z]`' });
    return null;
  }
  const total = repeat[0] * repeat[1] * repeat[2];
  if (total > MOST_COPIES) {
    const problem = 'these are more copies than can be traced in a sensible time';
    const expected = `at most ${MOST_COPIES}`;
    reading.report({ code: 'range', path: [...path, 'repeat'], problem, found: `${total} copies`, expected });
    return null;
  }
  const still = repeat.findIndex((count, axis) => count > 1 && !((pitch?.[axis] ?? 0) > 0));
  // A pitch that could not be read has been told.
  if (still >= 0 && !(pitch?.some(Number.isNaN) ?? false)) {
    const problem = 'the copies would all stand in one place';
    const expected = `a pitch above 0 mm along ${'xyz'[still]}`;
    const field = pitch === null ? 'repeat' : 'pitch';
    reading.report({ code: 'geometry', path: [...path, field], problem, expected });
  }
  return { counts: repeat, pitch: pitch ?? [0, 0, 0] };
}

/** Nothing convex is left over when something hollow is taken away. */
function checkHole({ shape, path }: PieceDescription, reading: Reading): void {
  if (!isHollow(shape)) return;
  reading.report({
    code: 'geometry',
    path,
    problem: 'a hollow shape cannot be taken away',
    found: shape.kind === 'tube' ? 'a tunnel' : 'a lens with a hollow surface',
    suggestion: 'take its outer shape away and add what is left of it as a piece of a union',
  });
}

const describeTurn = ({ axis, by }: TurnRecord): Turn => ({ axis, angle: by });

function describeAgainst(
  { against, with: own, shift, gap }: PartRecord,
  path: DesignPath,
  ownFaces: readonly string[] | null,
  earlier: FaceIndex,
  later: ReadonlySet<string>,
  reading: Reading,
): Against | null {
  if (against === null) {
    for (const [field, given] of Object.entries({ with: own, shift, gap })) {
      if (given === null) continue;
      const problem = `${field} has no meaning without against`;
      reading.report({ code: 'geometry', path: [...path, field], problem, expected: '`against: part.face`' });
    }
    return null;
  }
  const partName = against.name.split('.')[0];
  if (later.has(partName)) {
    const problem = 'a part can lean only on a part above it in the file';
    const suggestion = `move ${partName} up`;
    reading.report({ code: 'geometry', path: against.path, problem, found: against.name, suggestion });
  } else {
    checkFace(against, earlier, 'no earlier part has this face', reading);
  }
  if (own !== null && ownFaces !== null) checkReference(own, ownFaces, 'the part has no face of this name', reading);
  return { face: against.name, with: own?.name ?? null, shift: shift ?? [0, 0], gap: gap ?? 0, path: against.path };
}

/** Checks 'part.face'. */
export function checkFace(reference: Reference, index: FaceIndex, problem: string, reading: Reading): void {
  const { name } = reference;
  const dot = name.indexOf('.');
  const part = dot < 0 ? name : name.slice(0, dot);
  const faces = index.get(part);
  if (faces === null) return;
  if (faces === undefined || dot < 0) {
    const all = [...index].flatMap(([each, own]) => (own ?? []).map((face) => `${each}.${face}`));
    // When only the part is wrong, the same face of another part is the likeliest; else list the parts' faces.
    checkReference(reference, faces ? faces.map((face) => `${part}.${face}`) : all, problem, reading);
    return;
  }
  checkReference(
    reference,
    faces.map((face) => `${part}.${face}`),
    problem,
    reading,
  );
}

function describeFaces(
  { faces }: PartRecord,
  own: readonly string[] | null,
  finishNames: readonly string[],
  reading: Reading,
): FaceFinish[] {
  return faces.map(({ name, path, value: finish }) => {
    checkReference(finish, finishNames, 'no finish has this name', reading);
    if (own !== null && name !== OTHERS && !own.includes(name)) {
      checkReference({ name, path }, [...own, OTHERS], 'the part has no face of this name', reading, 'key');
    }
    return { face: name === OTHERS ? '*' : name, finish: finish.name, path };
  });
}
