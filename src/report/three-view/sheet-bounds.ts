/** What the views must show: all parts and planes, and those pumps that stand near enough. */
import type { Coordinates, Drawing, DrawnPump } from '../../record/drawing.js';

export interface Box {
  readonly low: Coordinates;
  readonly high: Coordinates;
}

export interface SheetBounds {
  /** Round all parts. */
  readonly parts: Box;
  /** Round all that is drawn to scale. */
  readonly shown: Box;
  /** Pumps that stand too far off to be drawn where they are. */
  readonly far: ReadonlySet<DrawnPump>;
}

/** A pump may take this much of the scale away, and no more. */
const GROWTH = 1.3;

export function sheetBounds({ parts, pumps, planes }: Drawing): SheetBounds {
  const solid = boxOf(parts.flatMap(({ bounds }) => bounds).flat());
  let shown = boxOf([...solid.low, ...solid.high, ...planes.flatMap(({ edges }) => edges)]);
  const [across, upright] = spans(shown);
  const far = new Set<DrawnPump>();
  for (const pump of pumps) {
    const wider = boxOf([...shown.low, ...shown.high, ...pump.at, ...pump.edges]);
    const [a, b] = spans(wider);
    if (a <= GROWTH * across && b <= GROWTH * upright) shown = wider;
    else far.add(pump);
  }
  return { parts: solid, shown, far };
}

/** What the views take up side by side and one above the other, mm. */
function spans({ low, high }: Box): readonly [number, number] {
  const [x, y, z] = high.map((c, i) => c - low[i]);
  return [x + y, y + z];
}

function boxOf(coordinates: Coordinates): Box {
  const low = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  const high = low.map((c) => -c);
  coordinates.forEach((c, i) => {
    low[i % 3] = Math.min(low[i % 3], c);
    high[i % 3] = Math.max(high[i % 3], c);
  });
  return coordinates.length === 0 ? { low: [0, 0, 0], high: [1, 1, 1] } : { low, high };
}
