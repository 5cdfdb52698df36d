import { type Markup, markup } from '../markup.js';
import type { Spot } from './hull.js';

const PITCH = 22;
/** Between a name and the drawing. */
const GUTTER = 12;
const AWAY = 8;

export interface SideLabel {
  readonly text: string;
  readonly at: Spot;
}

/** Names in two columns beside a drawing, the nearer side for each, with a thin line to what they name; none covers another. */
export function spreadLabels(
  labels: readonly SideLabel[],
  { width, height, side }: { readonly width: number; readonly height: number; readonly side: number },
): readonly Markup[] {
  const most = Math.max(1, Math.floor((height - 2 * AWAY) / PITCH));
  const columns: SideLabel[][] = [[], []];
  for (const label of labels.toSorted((a, b) => a.at[0] - b.at[0])) {
    const left = label.at[0] < width / 2 - 1;
    const own = columns[left ? 0 : 1];
    (own.length < most ? own : columns[left ? 1 : 0]).push(label);
  }
  // Where all stand to one side, half of them fit better on the other.
  for (const [from, to] of [
    [columns[0], columns[1]],
    [columns[1], columns[0]],
  ]) {
    while (from.length > to.length + 1)
      to.push(from === columns[0] ? (from.pop() as SideLabel) : (from.shift() as SideLabel));
  }
  return columns.flatMap((column, i) => {
    const sorted = column.slice(0, most).toSorted((a, b) => a.at[1] - b.at[1]);
    const places = spread(
      sorted.map(({ at }) => at[1]),
      height,
    );
    return sorted.map(({ text, at }, j) => {
      const x = i === 0 ? side - GUTTER : width - side + GUTTER;
      const y = places[j];
      return markup`<path class="iso-leader" d="M${x} ${Math.round(y)}L${Math.round(at[0])} ${Math.round(at[1])}"/><circle class="iso-anchor" cx="${Math.round(at[0])}" cy="${Math.round(at[1])}" r="2.5"/><text class="iso-name" x="${x + (i === 0 ? -5 : 5)}" y="${Math.round(y) + 4}" text-anchor="${i === 0 ? 'end' : 'start'}">${text}</text>`;
    });
  });
}

/** Heights in order, moved apart to the pitch and kept on the picture. */
function spread(wanted: readonly number[], height: number): readonly number[] {
  const places: number[] = [];
  wanted.forEach((y, i) => {
    places.push(Math.max(y, i === 0 ? AWAY : places[i - 1] + PITCH));
  });
  for (let i = places.length - 1, most = height - AWAY; i >= 0; i--, most -= PITCH)
    places[i] = Math.min(places[i], most);
  return places;
}
