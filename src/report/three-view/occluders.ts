/** What hides what in a view: triangles in front of a line or a point. */
import type { Drawing } from '../../record/drawing.js';
import { OccluderGrid } from './occluder-grid.js';
import { type Seen, seen, type View } from './view.js';

export interface Occluder {
  readonly face: string;
  /** Corners counterclockwise on the sheet. */
  readonly corners: readonly [Seen, Seen, Seen];
  /** Nearness over the sheet: near = c + gx · across + gy · up. */
  readonly c: number;
  readonly gx: number;
  readonly gy: number;
  readonly low: readonly [number, number];
  readonly high: readonly [number, number];
}

/** Triangles that look at the viewer: of closed solids they hide all there is to hide. @param size of the design, mm */
export function occludersOf({ parts }: Drawing, view: View, size: number): OccluderGrid {
  const found: Occluder[] = [];
  for (const { faces } of parts) {
    for (const { name, triangles } of faces) {
      for (let at = 0; at < triangles.length; at += 9) {
        const [a, b, c] = [0, 3, 6].map((k) => seen(view, triangles, at + k));
        const twice = (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);
        if (twice < 1e-9 * size * size) continue;
        const gx = ((b[2] - a[2]) * (c[1] - a[1]) - (c[2] - a[2]) * (b[1] - a[1])) / twice;
        const gy = ((c[2] - a[2]) * (b[0] - a[0]) - (b[2] - a[2]) * (c[0] - a[0])) / twice;
        found.push({
          face: name,
          corners: [a, b, c],
          c: a[2] - gx * a[0] - gy * a[1],
          gx,
          gy,
          low: [Math.min(a[0], b[0], c[0]), Math.min(a[1], b[1], c[1])],
          high: [Math.max(a[0], b[0], c[0]), Math.max(a[1], b[1], c[1])],
        });
      }
    }
  }
  return new OccluderGrid(found);
}

/** Shares of a line, from 0 to 1, that a triangle hides; null where it hides nothing. @param slack mm that count as nothing toward the viewer, @param aside on the sheet */
export function hiddenShare(
  from: Seen,
  to: Seen,
  triangle: Occluder,
  slack: number,
  aside: number,
): readonly [number, number] | null {
  if (
    Math.max(from[0], to[0]) < triangle.low[0] + aside ||
    Math.min(from[0], to[0]) > triangle.high[0] - aside ||
    Math.max(from[1], to[1]) < triangle.low[1] + aside ||
    Math.min(from[1], to[1]) > triangle.high[1] - aside
  ) {
    return null;
  }
  let [low, high] = [0, 1];
  /** Keeps what lies where the value, linear along the line, is positive. */
  const keep = (start: number, end: number): boolean => {
    if (start <= 0 && end <= 0) return false;
    if (start < 0) low = Math.max(low, start / (start - end));
    if (end < 0) high = Math.min(high, start / (start - end));
    return low < high;
  };
  const { corners, c, gx, gy } = triangle;
  for (let i = 0; i < 3; i++) {
    const [p, q] = [corners[i], corners[(i + 1) % 3]];
    const length = Math.hypot(q[0] - p[0], q[1] - p[1]);
    const left = (at: Seen) => ((q[0] - p[0]) * (at[1] - p[1]) - (q[1] - p[1]) * (at[0] - p[0])) / length - aside;
    if (!keep(left(from), left(to))) return null;
  }
  const before = (at: Seen) => c + gx * at[0] + gy * at[1] - at[2] - slack;
  return keep(before(from), before(to)) ? [low, high] : null;
}

/** Whether nothing stands between a point and the viewer. */
export function isSeen(point: Seen, occluders: OccluderGrid, slack: number): boolean {
  const flat = [point[0], point[1]] as const;
  return occluders.within(flat, flat).every(
    ({ low, high, corners, c, gx, gy }) =>
      point[0] < low[0] ||
      point[0] > high[0] ||
      point[1] < low[1] ||
      point[1] > high[1] ||
      c + gx * point[0] + gy * point[1] <= point[2] + slack ||
      !corners.every((p, i) => {
        const q = corners[(i + 1) % 3];
        const length = Math.hypot(q[0] - p[0], q[1] - p[1]);
        return (q[0] - p[0]) * (point[1] - p[1]) - (q[1] - p[1]) * (point[0] - p[0]) > -1e-9 * length;
      }),
  );
}
