export interface BestStrength {
  /** Top of the parabola, in the logarithm of strength, through the best point and its neighbours. */
  readonly at: number;
  /** Strengths traced that cannot be told from the best one. */
  readonly from: number;
  readonly to: number;
  /** The best point is the first or the last. */
  readonly edge: boolean;
}

interface Point {
  readonly strength: number;
  readonly exit: number;
  readonly exitError: number | null;
}

/** Errors of a difference that do not count. */
const ERRORS = 2;

/**
 * The best of a scan. Errors of two points are taken as independent; with common seeds the error of their difference is rather smaller, so
 * the range is rather too wide.
 * @param points rising in strength, at least one
 */
export function bestStrength(points: readonly Point[]): BestStrength {
  const best = points.reduce((top, point, i) => (point.exit > points[top].exit ? i : top), 0);
  const told = (i: number) =>
    points[best].exit - points[i].exit > ERRORS * Math.hypot(points[best].exitError ?? 0, points[i].exitError ?? 0);
  let [first, last] = [best, best];
  while (first > 0 && !told(first - 1)) first--;
  while (last < points.length - 1 && !told(last + 1)) last++;
  const edge = best === 0 || best === points.length - 1;
  const at = edge ? points[best].strength : topOf(points[best - 1], points[best], points[best + 1]);
  return { at, from: points[first].strength, to: points[last].strength, edge };
}

function topOf(a: Point, b: Point, c: Point): number {
  const [x, y] = [Math.log(a.strength / b.strength), Math.log(c.strength / b.strength)];
  const [left, right] = [(b.exit - a.exit) / x, (c.exit - b.exit) / y];
  // Slopes of the chords: left = −p − q x, right = p + q y for b + p t + q t².
  const q = (right + left) / (y - x);
  const p = right - q * y;
  return q < 0 ? b.strength * Math.exp(-p / (2 * q)) : b.strength;
}
