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
 * into the distance end at `room`.
 */
export function keptPaths(
  paths: readonly Path[],
  room: Bounds,
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
      const path = list[round];
      if (path === undefined || points + path.points.length / 3 > mostPoints) return;
      points += path.points.length / 3;
      counts[fate]++;
      const { wavelengthsNm, pumpSegments, cutAfter } = path;
      kept.push({ fate, points: endInRoom(path.points, room), wavelengthsNm, pumpSegments, cutAfter });
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

/** Shortens the last segment to where it leaves the room. */
function endInRoom(points: readonly number[], { low, high }: Bounds): readonly number[] {
  const n = points.length;
  const from = points.slice(n - 6, n - 3);
  const to = points.slice(n - 3);
  const shares = to.map((value, i) => {
    const way = value - from[i];
    const wall = way > 0 ? high[i] : low[i];
    return way === 0 || (value - wall) * way <= 0 ? 1 : (wall - from[i]) / way;
  });
  const share = Math.max(0, Math.min(1, ...shares));
  return share === 1
    ? points
    : [...points.slice(0, n - 3), ...to.map((value, i) => from[i] + share * (value - from[i]))];
}
