import { round } from '../charts/picture.js';
import type { FlatLine, FlatPoint } from './view.js';

/** Lines as the `d` of one path, end to end where they meet, so that dashes run on round a curve. @param place from view to sheet */
export function linePath(lines: readonly FlatLine[], place: (point: FlatPoint) => FlatPoint): string {
  const placed = lines.map(([a, b]): readonly [string, string] => [text(place(a)), text(place(b))]);
  const meeting = new Map<string, number[]>();
  placed.forEach((ends, i) => {
    for (const end of ends) meeting.set(end, [...(meeting.get(end) ?? []), i]);
  });
  const used = new Set<number>();
  const follow = (from: string, first: number): string => {
    let [at, next]: [string, number | undefined] = [from, first];
    let path = `M${from}`;
    while (next !== undefined) {
      used.add(next);
      const [a, b] = placed[next];
      at = a === at ? b : a;
      path += `L${at}`;
      next = (meeting.get(at) ?? []).find((i) => !used.has(i));
    }
    return path;
  };
  let path = '';
  // Open ends first, so that a chain is not begun in its middle.
  for (const [end, here] of meeting) if (here.length === 1 && !used.has(here[0])) path += follow(end, here[0]);
  placed.forEach(([a], i) => {
    if (!used.has(i)) path += follow(a, i);
  });
  return path;
}

const text = ([x, y]: FlatPoint): string => `${round(x)} ${round(y)}`;
