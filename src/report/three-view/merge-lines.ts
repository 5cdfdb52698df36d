/** Lines that lie on one another on the sheet, drawn once: what is seen wins over what is hidden. */
import type { FlatLine, FlatPoint } from './view.js';

type Span = readonly [number, number];

interface Carrier {
  /** Unit direction, and the place of its foot from the origin. */
  readonly direction: FlatPoint;
  readonly foot: FlatPoint;
  readonly visible: Span[];
  readonly hidden: Span[];
}

/** @param size of the design, mm: what is nearer than a hundred-thousandth of it is one */
export function mergeLines(
  visible: readonly FlatLine[],
  hidden: readonly FlatLine[],
  size: number,
): { visible: FlatLine[]; hidden: FlatLine[] } {
  const near = 1e-5 * size;
  const carriers = new Map<string, Carrier>();
  for (const line of visible) carry(line, 'visible', carriers, near);
  for (const line of hidden) carry(line, 'hidden', carriers, near);
  const all = { visible: [] as FlatLine[], hidden: [] as FlatLine[] };
  for (const { direction, foot, ...spans } of carriers.values()) {
    const at = (along: number): FlatPoint => [foot[0] + along * direction[0], foot[1] + along * direction[1]];
    const shown = joined(spans.visible, near);
    const behind = without(joined(spans.hidden, near), shown);
    for (const [from, to] of shown) if (to - from > near) all.visible.push([at(from), at(to)]);
    for (const [from, to] of behind) if (to - from > 3 * near) all.hidden.push([at(from), at(to)]);
  }
  return all;
}

function carry([a, b]: FlatLine, kind: 'visible' | 'hidden', carriers: Map<string, Carrier>, near: number): void {
  const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
  if (length < near) return;
  let direction: FlatPoint = [(b[0] - a[0]) / length, (b[1] - a[1]) / length];
  if (direction[0] < -1e-9 || (Math.abs(direction[0]) <= 1e-9 && direction[1] < 0)) {
    direction = [-direction[0], -direction[1]];
  }
  const off = a[0] * direction[1] - a[1] * direction[0];
  const key = `${Math.round(Math.atan2(direction[1], direction[0]) * 1e4)} ${Math.round(off / (20 * near))}`;
  const known = carriers.get(key);
  const carrier = known ?? {
    direction,
    foot: [off * direction[1], -off * direction[0]] as const,
    visible: [],
    hidden: [],
  };
  if (known === undefined) carriers.set(key, carrier);
  const along = [a, b].map((p) => p[0] * carrier.direction[0] + p[1] * carrier.direction[1]);
  carrier[kind].push([Math.min(...along), Math.max(...along)]);
}

function joined(spans: readonly Span[], near: number): Span[] {
  const sorted = spans.toSorted(([a], [b]) => a - b);
  const result: [number, number][] = [];
  for (const [from, to] of sorted) {
    const last = result.at(-1);
    if (last !== undefined && from <= last[1] + near) last[1] = Math.max(last[1], to);
    else result.push([from, to]);
  }
  return result;
}

function without(spans: readonly Span[], taken: readonly Span[]): Span[] {
  return taken.reduce<Span[]>(
    (left, [from, to]) =>
      left.flatMap(([a, b]): Span[] => {
        if (to <= a || from >= b) return [[a, b]];
        return [[a, Math.min(b, from)] as const, [Math.max(a, to), b] as const].filter(([low, high]) => high > low);
      }),
    [...spans],
  );
}
