/** The lines of a view: rims and contours, told apart into those seen and those hidden behind something. */
import type { Drawing, DrawnFace } from '../../record/drawing.js';
import { mergeLines } from './merge-lines.js';
import type { OccluderGrid } from './occluder-grid.js';
import { hiddenShare } from './occluders.js';
import { type FlatLine, type FlatPoint, type Seen, seen, type View } from './view.js';

export interface ViewLines {
  readonly visible: readonly FlatLine[];
  readonly hidden: readonly FlatLine[];
  /** Rims of the exit, seen or not. */
  readonly exit: readonly FlatLine[];
}

interface Line {
  readonly from: Seen;
  readonly to: Seen;
  /** A contour is no rim: its own face, which turns away there, cannot hide it. */
  readonly contourOf: string | null;
}

/** @param size of the design, mm */
export function viewLines(drawing: Drawing, view: View, occluders: OccluderGrid, size: number): ViewLines {
  const slack = 2e-4 * size;
  const faces = drawing.parts.flatMap((part) => part.faces);
  const lines = distinct(
    faces.flatMap((face) => [...rims(face, view), ...contours(face, view)]),
    size,
  );
  const visible: FlatLine[] = [];
  const hidden: FlatLine[] = [];
  for (const line of lines) {
    const { from, to, contourOf } = line;
    if (Math.hypot(to[0] - from[0], to[1] - from[1]) < 1e-6 * size) continue;
    const shares = occluders
      .within(
        [Math.min(from[0], to[0]), Math.min(from[1], to[1])],
        [Math.max(from[0], to[0]), Math.max(from[1], to[1])],
      )
      .filter(({ face }) => face !== contourOf)
      .flatMap((occluder) => hiddenShare(from, to, occluder, slack, 1e-5 * size) ?? []);
    for (const [start, end, isHidden] of cutUp(shares, (3e-3 * size) / Math.hypot(to[0] - from[0], to[1] - from[1]))) {
      const at = (share: number): FlatPoint => [
        from[0] + share * (to[0] - from[0]),
        from[1] + share * (to[1] - from[1]),
      ];
      (isHidden ? hidden : visible).push([at(start), at(end)]);
    }
  }
  const exit = faces
    .filter(({ isExit }) => isExit)
    .flatMap((face) => [...rims(face, view), ...contours(face, view)])
    .map(
      ({ from, to }): FlatLine => [
        [from[0], from[1]],
        [to[0], to[1]],
      ],
    );
  return { ...mergeLines(visible, hidden, size), exit: mergeLines(exit, [], size).visible };
}

function rims({ edges }: DrawnFace, view: View): Line[] {
  return Array.from({ length: edges.length / 6 }, (_, i) => ({
    from: seen(view, edges, 6 * i),
    to: seen(view, edges, 6 * i + 3),
    contourOf: null,
  }));
}

/** Where a curved face turns from toward the viewer to away: its normal, linear over each triangle, stands square to the line of sight. */
function contours({ name, triangles, normals }: DrawnFace, view: View): Line[] {
  const found: Line[] = [];
  for (let at = 0; at < triangles.length; at += 9) {
    const corners = [0, 3, 6].map((k) => seen(view, triangles, at + k));
    const facing = [0, 3, 6].map((k) => seen(view, normals, at + k)[2]);
    const ends: Seen[] = [];
    for (let i = 0; i < 3; i++) {
      const j = (i + 1) % 3;
      // Exactly one of two triangles that meet in the contour has it: 1e-4 is what a drawing is kept to.
      if (facing[i] > 2e-4 === facing[j] > 2e-4) continue;
      const share = Math.min(1, Math.max(0, facing[i] / (facing[i] - facing[j])));
      const mix = (axis: 0 | 1 | 2) => corners[i][axis] + share * (corners[j][axis] - corners[i][axis]);
      ends.push([mix(0), mix(1), mix(2)]);
    }
    if (ends.length === 2) found.push({ from: ends[0], to: ends[1], contourOf: name });
  }
  return found;
}

/** Rims belong to both faces that meet there; one is enough. */
function distinct(lines: readonly Line[], size: number): Line[] {
  const key = (point: Seen) => point.map((c) => Math.round(c / (1e-5 * size))).join(' ');
  const found = new Map<string, Line>();
  for (const line of lines) found.set([key(line.from), key(line.to)].sort().join('|'), line);
  return [...found.values()];
}

/** The line from 0 to 1 in pieces, hidden and not. @param gap beside what hides it that is no gap */
function cutUp(shares: readonly number[], gap: number): (readonly [number, number, boolean])[] {
  const pairs = Array.from({ length: shares.length / 2 }, (_, i) => [shares[2 * i], shares[2 * i + 1]] as const);
  pairs.sort(([a], [b]) => a - b);
  const pieces: (readonly [number, number, boolean])[] = [];
  let at = 0;
  for (const [start, end] of pairs) {
    const joins = start - at < gap;
    if (!joins) pieces.push([at, start, false]);
    if (end > at) pieces.push([joins ? at : start, end, true]);
    at = Math.max(at, end);
  }
  const last = pieces.at(-1);
  if (last?.[2] === true && 1 - at < gap) pieces[pieces.length - 1] = [last[0], 1, true];
  else if (at < 1) pieces.push([at, 1, false]);
  return pieces;
}
