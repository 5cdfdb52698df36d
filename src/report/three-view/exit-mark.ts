/** The exit in a view: its rims in a colour of their own, and a hollow arrow the way light leaves where that can be told. */
import type { Drawing } from '../../record/drawing.js';
import { round } from '../charts/picture.js';
import { type Markup, markup } from '../markup.js';
import { linePath } from './line-paths.js';
import type { ViewPlace } from './sheet-layout.js';
import { type FlatLine, type FlatPoint, seen } from './view.js';
import type { ViewLines } from './view-lines.js';

const STANDING_OFF = 6;

export function exitMark({ parts, planes }: Drawing, lines: ViewLines, place: ViewPlace): Markup {
  const face = parts.flatMap((part) => part.faces).find(({ isExit }) => isExit);
  const plane = planes.find(({ isExit }) => isExit);
  const outline = markup`<path class="exit-line" d="${linePath(lines.exit, place.place)}"/>`;
  const points = face?.triangles ?? plane?.edges ?? [];
  const normals = face?.normals ?? points.flatMap((_, i) => (i % 3 === 0 ? (plane?.normal ?? []) : []));
  return markup`${outline}${arrow(points, normals, place)}`;
}

/** Outlines of detectors in the open. */
export function planeLines({ planes }: Drawing, place: ViewPlace): Markup {
  return markup`${planes.map(({ edges, isExit }) => {
    const lines = Array.from({ length: edges.length / 6 }, (_, i): FlatLine => {
      const [a, b] = [0, 3].map((k) => seen(place.view, edges, 6 * i + k));
      return [
        [a[0], a[1]],
        [b[0], b[1]],
      ];
    });
    return markup`<path class="${isExit ? 'plane-line exit-plane' : 'plane-line'}" d="${linePath(lines, place.place)}"/>`;
  })}`;
}

/** From the middle of the points, beyond the last of them along the mean normal. */
function arrow(points: readonly number[], normals: readonly number[], place: ViewPlace): Markup | null {
  const count = points.length / 3;
  if (count === 0) return null;
  let [x, y, da, du, near] = [0, 0, 0, 0, 0];
  const placed: FlatPoint[] = [];
  for (let i = 0; i < count; i++) {
    const [a, u] = seen(place.view, points, 3 * i);
    const normal = seen(place.view, normals, 3 * i);
    placed.push(place.place([a, u]));
    x += placed[i][0] / count;
    y += placed[i][1] / count;
    da += normal[0] / count;
    du += normal[1] / count;
    near += normal[2] / count;
  }
  const lean = Math.hypot(da, du);
  if (lean < 0.2 || Math.abs(near) > 2 * lean) return null;
  const [dx, dy] = [da / lean, -du / lean];
  const reach = Math.max(...placed.map(([px, py]) => (px - x) * dx + (py - y) * dy)) + STANDING_OFF;
  const at = (along: number, aside: number) =>
    `${round(x + (reach + along) * dx - aside * dy)} ${round(y + (reach + along) * dy + aside * dx)}`;
  const path = `M${at(0, -5)}L${at(18, -5)}L${at(18, -11)}L${at(34, 0)}L${at(18, 11)}L${at(18, 5)}L${at(0, 5)}Z`;
  return markup`<path class="exit-arrow" d="${path}"/>`;
}
