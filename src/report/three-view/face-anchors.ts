/** Where leader lines may meet a face in a view. */
import type { DrawnFace } from '../../record/drawing.js';
import type { OccluderGrid } from './occluder-grid.js';
import { isSeen } from './occluders.js';
import { type FlatPoint, type Seen, seen, type View } from './view.js';

export interface Anchor {
  readonly point: FlatPoint;
  /** Within the outline of the face, which gets a dot; else on its edge, which gets an arrow. */
  readonly within: boolean;
  /** The better seen, the greater; above 0. */
  readonly merit: number;
  /** Which way up on the sheet, −1 to 1, the face looks: a leader to an edge that lies should come from there. */
  readonly lean: number;
}

/** Places within the box of a face that are tried, the middle last: pumps that look at the face are marked there. */
const PLACES: readonly FlatPoint[] = [
  [-0.24, 0.2],
  [0.24, 0.2],
  [-0.24, -0.2],
  [0.24, -0.2],
  [0, 0.3],
  [0, 0],
];

/** Shares of the way along a face seen edge-on. */
const ALONG = [0.15, 0.85, 0.3, 0.7, 0.22, 0.78];

/**
 * None for a face that is cut away.
 * @param slack mm that count as nothing
 * @param turn where to begin trying, so that faces one over another differ
 */
export function faceAnchors(
  face: DrawnFace,
  view: View,
  occluders: OccluderGrid,
  slack: number,
  turn: number,
): Anchor[] {
  const triangles = Array.from({ length: face.triangles.length / 9 }, (_, i) => {
    const corners = [0, 3, 6].map((k) => seen(view, face.triangles, 9 * i + k));
    const facing = [0, 3, 6].reduce((sum, k) => sum + seen(view, face.normals, 9 * i + k)[2] / 3, 0);
    return { corners, facing };
  });
  if (triangles.length === 0) return [];
  const toward = triangles.filter(({ facing }) => facing > 0.25);
  const onFace = toward.length > 0 ? within(toward, occluders, slack, turn) : null;
  if (onFace !== null) return [onFace];
  const all = triangles.flatMap(({ corners }) => corners);
  const [low, high] = boxOf(all);
  const between = (share: number, axis: 0 | 1) => low[axis] + share * (high[axis] - low[axis]);
  const flat = triangles.every(({ facing }) => Math.abs(facing) < 0.02);
  if (!flat) return [{ point: [between(0.5, 0), between(0.5, 1)], within: true, merit: 0.15, lean: 0 }];
  const [normalAcross, normalUp] = seen(view, face.normals);
  // Seen edge-on the face is a line from one corner of its box to another.
  const falls = normalAcross * normalUp > 0;
  const near = Math.max(...all.map((corner) => corner[2]));
  return [0, 1].map((k) => {
    const share = ALONG[(turn * 2 + k) % ALONG.length];
    const point: FlatPoint = [between(share, 0), between(falls ? 1 - share : share, 1)];
    const shown = isSeen([...point, near], occluders, slack);
    return { point, within: false, merit: shown ? 1.5 : 0.4, lean: normalUp };
  });
}

function within(
  triangles: readonly { readonly corners: readonly Seen[]; readonly facing: number }[],
  occluders: OccluderGrid,
  slack: number,
  turn: number,
): Anchor | null {
  const [low, high] = boxOf(triangles.flatMap(({ corners }) => corners));
  const places = [...PLACES.slice(turn % 4, 4), ...PLACES.slice(0, turn % 4), ...PLACES.slice(4)].map(
    ([a, b]): FlatPoint => [
      (low[0] + high[0]) / 2 + a * (high[0] - low[0]),
      (low[1] + high[1]) / 2 + b * (high[1] - low[1]),
    ],
  );
  const step = Math.max(1, Math.floor(triangles.length / 40));
  const centres = triangles
    .filter((_, i) => i % step === 0)
    .map(({ corners: [a, b, c] }): FlatPoint => [(a[0] + b[0] + c[0]) / 3, (a[1] + b[1] + c[1]) / 3]);
  for (const point of [...places, ...centres]) {
    const under = triangles.find(({ corners }) => holds(corners, point));
    if (under === undefined) continue;
    const near = nearAt(under.corners, point);
    if (isSeen([...point, near], occluders, slack)) return { point, within: true, merit: 1 + under.facing, lean: 0 };
  }
  return null;
}

function holds(corners: readonly Seen[], [x, y]: FlatPoint): boolean {
  const signs = corners.map((p, i) => {
    const q = corners[(i + 1) % 3];
    return (q[0] - p[0]) * (y - p[1]) - (q[1] - p[1]) * (x - p[0]);
  });
  return signs.every((s) => s > 0) || signs.every((s) => s < 0);
}

function nearAt([a, b, c]: readonly Seen[], [x, y]: FlatPoint): number {
  const twice = (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);
  const s = ((x - a[0]) * (c[1] - a[1]) - (y - a[1]) * (c[0] - a[0])) / twice;
  const t = ((b[0] - a[0]) * (y - a[1]) - (b[1] - a[1]) * (x - a[0])) / twice;
  return a[2] + s * (b[2] - a[2]) + t * (c[2] - a[2]);
}

function boxOf(points: readonly Seen[]): readonly [FlatPoint, FlatPoint] {
  const [x, y] = [0, 1].map((axis) => points.map((point) => point[axis]));
  return [
    [Math.min(...x), Math.min(...y)],
    [Math.max(...x), Math.max(...y)],
  ];
}
