import { round } from '../charts/picture.js';
import type { FlatLine, FlatPoint } from './view.js';

/**
 * Lines as the `d` of one path, end to end where they meet, so that dashes run on round a curve; gentle turns, which stand for
 * curves, are rounded through their corners. @param place from view to sheet
 */
export function linePath(lines: readonly FlatLine[], place: (point: FlatPoint) => FlatPoint): string {
  const placed = lines.map(([a, b]): FlatLine => [place(a), place(b)]);
  const meeting = new Map<string, number[]>();
  placed.forEach((ends, i) => {
    for (const end of ends) meeting.set(text(end), [...(meeting.get(text(end)) ?? []), i]);
  });
  const used = new Set<number>();
  const follow = (from: FlatPoint, first: number): string => {
    const chain = [from];
    let next: number | undefined = first;
    while (next !== undefined) {
      used.add(next);
      const [a, b] = placed[next];
      const end: FlatPoint = text(a) === text(chain[chain.length - 1]) ? b : a;
      chain.push(end);
      next = (meeting.get(text(end)) ?? []).find((i) => !used.has(i));
    }
    return chainPath(chain);
  };
  let path = '';
  // Open ends first, so that a chain is not begun in its middle.
  placed.forEach((ends, i) => {
    for (const end of ends) if (!used.has(i) && meeting.get(text(end))?.length === 1) path += follow(end, i);
  });
  placed.forEach(([a], i) => {
    if (!used.has(i)) path += follow(a, i);
  });
  return path;
}

const text = ([x, y]: FlatPoint): string => `${round(x)} ${round(y)}`;

/** Cosine of the sharpest turn that stands for a curve: facets of round faces turn by 7.5°. */
const GENTLE = Math.cos((16 * Math.PI) / 180);

function chainPath(chain: readonly FlatPoint[]): string {
  const last = chain.length - 1;
  const closed = last > 2 && text(chain[0]) === text(chain[last]);
  const before = (i: number): FlatPoint | undefined => (i === 0 && closed ? chain[last - 1] : chain[i - 1]);
  const after = (i: number): FlatPoint | undefined => (i === last && closed ? chain[1] : chain[i + 1]);
  /** A sixth of the way from the neighbour before to the one after, where the line turns gently (Catmull–Rom). */
  const tangent = (i: number): FlatPoint | null => {
    const [p, q, r] = [before(i), chain[i], after(i)];
    if (p === undefined || r === undefined) return null;
    const [ax, ay, bx, by] = [q[0] - p[0], q[1] - p[1], r[0] - q[0], r[1] - q[1]];
    const cosine = (ax * bx + ay * by) / (Math.hypot(ax, ay) * Math.hypot(bx, by) || 1);
    return cosine > GENTLE && cosine < 0.99999 ? [(r[0] - p[0]) / 6, (r[1] - p[1]) / 6] : null;
  };
  let path = `M${text(chain[0])}`;
  for (let i = 0; i < last; i++) {
    const [from, to] = [chain[i], chain[i + 1]];
    const [start, end] = [tangent(i), tangent(i + 1)];
    if (start === null && end === null) {
      path += `L${text(to)}`;
      continue;
    }
    // An end of the curve bends as its other end does.
    const third: FlatPoint = [(to[0] - from[0]) / 3, (to[1] - from[1]) / 3];
    const mirrored = ([dx, dy]: FlatPoint): FlatPoint => [2 * third[0] - dx, 2 * third[1] - dy];
    const a = start ?? mirrored(end ?? third);
    const b = end ?? mirrored(start ?? third);
    path += `C${text([from[0] + a[0], from[1] + a[1]])} ${text([to[0] - b[0], to[1] - b[1]])} ${text(to)}`;
  }
  return path;
}
