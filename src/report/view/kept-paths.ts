import type { Drawing } from '../../record/drawing.js';
import { groupOf, placedWords } from '../ledger-words.js';
import type { Bounds } from './bounds.js';
import type { PackedFate } from './packed-drawing.js';

type Path = Drawing['paths'][number];

export interface KeptPath {
  readonly fate: number;
  readonly points: readonly number[];
  readonly wavelengthsNm: readonly number[];
  readonly pumpSegments: number;
  readonly cutAfter: number;
}

/**
 * Paths that fit a picture, the fates taking turns from the start, so that the first n are a choice of all of them; ways
 * into the distance end at the sides of `rooms`, each of which counts once light has been in it.
 */
export function keptPaths(
  paths: readonly Path[],
  rooms: readonly Bounds[],
  mostPoints: number,
): { readonly fates: readonly PackedFate[]; readonly paths: readonly KeptPath[] } {
  const groups = new Map<string, Path[]>();
  for (const path of paths) {
    const { fate, light, where, by } = path.end;
    const key = JSON.stringify([fate, light, where, by]);
    const group = groups.get(key);
    if (group === undefined) groups.set(key, [path]);
    else group.push(path);
  }
  const lists = [...groups.values()];
  const kept: KeptPath[] = [];
  const counts = lists.map(() => 0);
  let points = 0;
  for (let round = 0; lists.some((list) => round < list.length); round++) {
    lists.forEach((list, fate) => {
      const given = list[round];
      if (given === undefined) return;
      const { wavelengthsNm, pumpSegments, cutAfter } = given;
      const whole: KeptPath = { fate, points: given.points, wavelengthsNm, pumpSegments, cutAfter };
      const path = rooms.reduce(endAt, whole);
      if (points + path.points.length / 3 > mostPoints) return;
      points += path.points.length / 3;
      counts[fate]++;
      kept.push(path);
    });
  }
  const fates = lists.map(([{ end }], i) => ({
    fate: end.fate,
    light: end.light,
    where: end.where,
    group: groupOf(end),
    words: placedWords(end),
    paths: counts[i],
  }));
  return { fates, paths: kept };
}

/** Light out of a box around everything it can meet never comes back: the path ends at the box's side. */
function endAt(path: KeptPath, { low, high }: Bounds): KeptPath {
  const { points, wavelengthsNm, pumpSegments, cutAfter } = path;
  let met = false;
  for (let i = 0; i < points.length; i += 3) {
    const at = points.slice(i, i + 3);
    const inside = at.every((value, axis) => value >= low[axis] && value <= high[axis]);
    if (met && !inside) {
      const from = points.slice(i - 3, i);
      const shares = at.map((value, axis) => {
        const wall = value > high[axis] ? high[axis] : low[axis];
        return value >= low[axis] && value <= high[axis] ? 1 : (wall - from[axis]) / (value - from[axis]);
      });
      const share = Math.min(1, ...shares);
      const segments = i / 3;
      return {
        ...path,
        points: [...points.slice(0, i), ...at.map((value, axis) => from[axis] + share * (value - from[axis]))],
        wavelengthsNm: wavelengthsNm.slice(0, segments),
        pumpSegments: Math.min(pumpSegments, segments),
        cutAfter: cutAfter < segments - 1 ? cutAfter : -1,
      };
    }
    met ||= inside;
  }
  return path;
}
