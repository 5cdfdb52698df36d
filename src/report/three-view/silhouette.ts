import type { DrawnPart } from '../../record/drawing.js';
import { round } from '../charts/picture.js';
import type { ViewPlace } from './sheet-layout.js';
import { seen } from './view.js';

/** The outline of all of a part that looks at the viewer, as the `d` of a path to fill: sides that two triangles share drop out. */
export function silhouette({ faces }: DrawnPart, { view, place }: ViewPlace): string {
  const sides = new Map<string, string[]>();
  for (const { triangles } of faces) {
    for (let at = 0; at < triangles.length; at += 9) {
      const [a, b, c] = [0, 3, 6].map((k) => seen(view, triangles, at + k));
      if ((b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]) <= 0) continue;
      const corners = [a, b, c].map(([across, up]) => place([across, up]).map(round).join(' '));
      corners.forEach((from, i) => {
        const to = corners[(i + 1) % 3];
        if (from !== to) take(sides, from, to);
      });
    }
  }
  let path = '';
  for (const start of sides.keys()) {
    for (let next = sides.get(start)?.pop(); next !== undefined; next = sides.get(next)?.pop()) {
      path += path.endsWith('Z') || path === '' ? `M${start}L${next}` : `L${next}`;
      if (next === start) path += 'Z';
    }
  }
  return path;
}

/** Puts a side in, or takes its opposite out. */
function take(sides: Map<string, string[]>, from: string, to: string): void {
  const back = sides.get(to);
  const opposite = back?.indexOf(from) ?? -1;
  if (back !== undefined && opposite >= 0) back.splice(opposite, 1);
  else sides.set(from, [...(sides.get(from) ?? []), to]);
}
