import type { Vector3 } from '../design/description.js';
import { cross, dot, length, normalise, subtract } from '../scene/vector.js';
import type { Segment } from './facet.js';

/** Ends nearer than this, mm, are one. */
const NEAR = 1e-7;
/** Sine of the angle below which two segments run on straight. */
const STRAIGHT = 1e-7;

/** Segments of which those that run on straight, where just two meet, are one: cuts leave a rim in pieces. */
export function joinSegments(segments: readonly Segment[]): Segment[] {
  const joined = segments.map((ends): [Vector3, Vector3] => [ends[0], ends[1]]);
  const meeting = new Map<string, Set<number>>();
  const at = (point: Vector3): Set<number> => {
    const key = point.map((c) => Math.round(c / NEAR)).join(' ');
    const found = meeting.get(key) ?? new Set<number>();
    meeting.set(key, found);
    return found;
  };
  joined.forEach((ends, i) => {
    for (const end of ends) at(end).add(i);
  });
  const gone = new Set<number>();
  for (const here of meeting.values()) {
    const [i, j] = here;
    if (here.size !== 2 || !runOn(joined[i], joined[j])) continue;
    const far = farEnds(joined[i], joined[j]);
    if (far === null) continue;
    const end = at(far[1]);
    end.delete(j);
    end.add(i);
    joined[i] = far;
    gone.add(j);
  }
  return joined.filter((_, i) => !gone.has(i));
}

function runOn([a, b]: Segment, [c, d]: Segment): boolean {
  const [p, q] = [subtract(b, a), subtract(d, c)];
  if (length(p) < NEAR || length(q) < NEAR) return false;
  return length(cross(normalise(p), normalise(q))) < STRAIGHT;
}

/** The ends of a first and of a second segment where they do not meet; null where one lies on the other. */
function farEnds(first: Segment, second: Segment): [Vector3, Vector3] | null {
  const [a, b] = first;
  const gap = (p: Vector3, q: Vector3) => length(subtract(p, q));
  const shared =
    Math.min(gap(a, second[0]), gap(a, second[1])) < Math.min(gap(b, second[0]), gap(b, second[1])) ? a : b;
  const near = shared === a ? b : a;
  const far = gap(shared, second[0]) < gap(shared, second[1]) ? second[1] : second[0];
  return dot(subtract(near, shared), subtract(far, shared)) < 0 ? [near, far] : null;
}
