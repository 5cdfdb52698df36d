/** Pumps in a view: the outline of what emits, and an arrow the way it looks. One far away has its arrow at the edge of the view. */
import type { DrawnPump } from '../../record/drawing.js';
import { round } from '../charts/picture.js';
import { type Markup, markup } from '../markup.js';
import { head } from './face-labels.js';
import { linePath } from './line-paths.js';
import { mergeLines } from './merge-lines.js';
import type { ViewPlace } from './sheet-layout.js';
import { type FlatLine, type FlatPoint, type Seen, seen } from './view.js';

const ARROW = 32;
/** Clear of the view. */
const CLEAR = 9;
/** Steeper than this toward the viewer or away, an arrow would be too short to tell. */
const STEEP = 0.3;

interface Mark {
  readonly numbers: string[];
  tip: FlatPoint;
  /** On the sheet; null: along the line of sight. */
  readonly direction: FlatPoint | null;
  readonly toViewer: boolean;
}

export function pumpMarks(pumps: readonly DrawnPump[], far: ReadonlySet<DrawnPump>, place: ViewPlace): Markup {
  const marks = new Map<string, Mark>();
  const outlines: FlatLine[] = [];
  pumps.forEach((pump, i) => {
    const points = Array.from({ length: pump.edges.length / 3 }, (_, k) => flat(seen(place.view, pump.edges, 3 * k)));
    if (points.every((point) => isBeside(place.place(point), place))) {
      for (let k = 0; k + 1 < points.length; k += 2) outlines.push([points[k], points[k + 1]]);
    }
    const mark = markOf(pump, far.has(pump), place);
    if (mark === null) return;
    while (mark.direction === null && [...marks.values()].some((other) => isOn(other, mark)))
      mark.tip = below(mark.tip);
    const key = [...mark.tip, ...(mark.direction ?? [mark.toViewer ? 9 : -9])]
      .map((c) => Math.round(c * 0.5))
      .join(' ');
    const known = marks.get(key);
    if (known === undefined) marks.set(key, { ...mark, numbers: [`P${i + 1}`] });
    else known.numbers.push(`P${i + 1}`);
  });
  const outline = markup`<path class="pump-line" d="${linePath(mergeLines(outlines, [], 100).visible, place.place)}"/>`;
  return markup`<g class="pumps">${outline}${[...marks.values()].map(drawMark)}</g>`;
}

/** Another pump's sign at the same spot, which looks the other way. */
function isOn(other: Mark, mark: Omit<Mark, 'numbers'>): boolean {
  const near = Math.hypot(other.tip[0] - mark.tip[0], other.tip[1] - mark.tip[1]) < 14;
  return other.direction === null && other.toViewer !== mark.toViewer && near;
}

const below = ([x, y]: FlatPoint): FlatPoint => [x, y + 18];

const flat = ([a, u]: Seen): FlatPoint => [a, u];

function isBeside([x, y]: FlatPoint, { left, right, top, bottom }: ViewPlace): boolean {
  return x > left - ARROW && x < right + ARROW && y > top - ARROW && y < bottom + ARROW;
}

function markOf(pump: DrawnPump, isFar: boolean, place: ViewPlace): Omit<Mark, 'numbers'> | null {
  const [da, du, near] = seen(place.view, pump.direction);
  const steepness = Math.hypot(da, du);
  const at = place.place(flat(seen(place.view, pump.at)));
  const toViewer = near > 0;
  if (steepness < STEEP) return isBeside(at, place) ? { tip: at, direction: null, toViewer } : null;
  const direction: FlatPoint = [da / steepness, -du / steepness];
  const tip: FlatPoint = isFar
    ? entry(at, direction, place)
    : [at[0] + ARROW * direction[0], at[1] + ARROW * direction[1]];
  return { tip, direction, toViewer };
}

/** Where the way of a far pump comes to the view; the nearest point of it where it passes by. */
function entry(from: FlatPoint, direction: FlatPoint, { left, right, top, bottom }: ViewPlace): FlatPoint {
  const ranges = [
    [left - CLEAR, right + CLEAR],
    [top - CLEAR, bottom + CLEAR],
  ] as const;
  let [enter, leave] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
  ranges.forEach(([low, high], axis) => {
    const d = direction[axis];
    if (Math.abs(d) < 1e-9) {
      if (from[axis] < low || from[axis] > high) leave = Number.NEGATIVE_INFINITY;
      return;
    }
    const shares = [(low - from[axis]) / d, (high - from[axis]) / d];
    enter = Math.max(enter, Math.min(...shares));
    leave = Math.min(leave, Math.max(...shares));
  });
  if (enter < leave && Number.isFinite(enter)) return [from[0] + enter * direction[0], from[1] + enter * direction[1]];
  const clamp = (value: number, [low, high]: readonly [number, number]) => Math.min(high, Math.max(low, value));
  return [clamp(from[0], ranges[0]), clamp(from[1], ranges[1])];
}

function drawMark({ numbers, tip, direction, toViewer }: Mark): Markup {
  const text = numbers.length > 4 ? `${numbers.slice(0, 3).join(' ')} …` : numbers.join(' ');
  const [x, y] = tip;
  if (direction === null) {
    const inner = toViewer
      ? markup`<circle class="pump-fill" cx="${round(x)}" cy="${round(y)}" r="2.2"/>`
      : markup`<path class="pump-strong" d="M${round(x - 4.2)} ${round(y - 4.2)}L${round(x + 4.2)} ${round(y + 4.2)}M${round(x - 4.2)} ${round(y + 4.2)}L${round(x + 4.2)} ${round(y - 4.2)}"/>`;
    return markup`<circle class="pump-ring" cx="${round(x)}" cy="${round(y)}" r="6"/>${inner}<text class="pump-text" x="${round(x + 9)}" y="${round(y - 7)}">${text}</text>`;
  }
  const [dx, dy] = direction;
  const tail: FlatPoint = [x - ARROW * dx, y - ARROW * dy];
  const neck: FlatPoint = [x - 8 * dx, y - 8 * dy];
  const upright = Math.abs(dx) < 0.5;
  // Beside an upright arrow, above one that lies.
  const label: FlatPoint = upright
    ? [tail[0] + 5, (tail[1] + neck[1]) / 2 + 4]
    : [(tail[0] + neck[0]) / 2, tail[1] - 5];
  return markup`<path class="pump-strong" d="M${round(tail[0])} ${round(tail[1])}L${round(neck[0])} ${round(neck[1])}"/><path class="pump-fill" d="${head(tail, tip, 11, 4)}"/><text class="pump-text" x="${round(label[0])}" y="${round(label[1])}" text-anchor="${upright ? 'start' : 'middle'}">${text}</text>`;
}
