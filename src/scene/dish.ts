/** Pieces of conicoids as seen along their axis: points, areas, samples, ranges, and where a ray meets them. */
import type { Vector2, Vector3 } from '../design/description.js';
import { surfaceSag } from '../design/lens-sag.js';
import type { FacePatch } from './convex-solid.js';
import { add, dot, normalise, scale, subtract } from './vector.js';

export type Dish = Extract<FacePatch, { kind: 'dish' }>;
/** Steps of the tables of area: Simpson's rule on them errs by less than 10⁻⁶ on any lens that can be made. */
const STEPS = 64;

/** Point of the dish over (a, b), and the outward normal there. */
export function dishPoint(dish: Dish, a: number, b: number): { point: Vector3; normal: Vector3 } {
  const [x, y] = bent(dish, a, b);
  const rise = scale(dish.axis, -surfaceSag({ ...dish, kind: 'bulges' }, Math.hypot(x, y)));
  const point = add(add(dish.vertex, rise), add(scale(dish.u, a), scale(dish.v, b)));
  // The gradient of ρ² + (1 + conic)·w² − 2·radius·w, without the division that fails at an equator.
  const lean = Math.sqrt(Math.max(0, dish.radius ** 2 - (1 + dish.conic) * (x * x + y * y)));
  return { point, normal: normalise(add(scale(dish.axis, lean), add(scale(dish.u, x), scale(dish.v, y)))) };
}

/** (a, b) without what runs along the ruling. */
function bent({ ruled }: Dish, a: number, b: number): Vector2 {
  return [ruled === 'u' ? 0 : a, ruled === 'v' ? 0 : b];
}

/** True area per area seen along the axis at (a, b); 0 outside the outline. */
export function dishStretch(dish: Dish, a: number, b: number): number {
  return inOutline(dish, a, b) ? stretch(dish, a, b) : 0;
}

function stretch(dish: Dish, a: number, b: number): number {
  const [x, y] = bent(dish, a, b);
  const r2 = x * x + y * y;
  const rest = dish.radius ** 2 - (1 + dish.conic) * r2;
  return rest <= 0 ? 0 : Math.sqrt(1 + r2 / rest);
}

function inOutline({ outline }: Dish, a: number, b: number): boolean {
  if (outline.kind === 'disc') return a * a + b * b <= outline.radius ** 2;
  return a >= outline.from && a <= outline.to && Math.abs(b) <= outline.halfWidth(a);
}

/** Ends of the outline along a, and its half width at a. */
function strip({ outline }: Dish): { from: number; to: number; halfWidth: (a: number) => number } {
  if (outline.kind === 'strip') return outline;
  const { radius } = outline;
  return { from: -radius, to: radius, halfWidth: (a) => Math.sqrt(Math.max(0, radius ** 2 - a * a)) };
}

/** Middle of the outline. */
export function dishMiddle(dish: Dish): Vector3 {
  const { from, to } = strip(dish);
  return dishPoint(dish, (from + to) / 2, 0).point;
}

/** Areas up to each step of the first coordinate: turn of the rim angle for round dishes, a for strips. */
interface AreaTable {
  readonly upTo: readonly number[];
  readonly place: (step: number) => number;
}
const tables = new WeakMap<Dish, AreaTable>();

function areaTable(dish: Dish): AreaTable {
  const known = tables.get(dish);
  if (known !== undefined) return known;
  const { outline } = dish;
  const round = outline.kind === 'disc' && dish.ruled === null;
  const { from, to, halfWidth } = strip(dish);
  const middle = (from + to) / 2;
  const half = (to - from) / 2;
  // A sine keeps the integrand smooth where a rim stands upright or an outline closes to a point.
  const place = (step: number) =>
    round ? half * Math.sin((Math.PI / 2) * step) : middle - half * Math.cos(Math.PI * step);
  const density = (step: number): number => {
    const at = place(step);
    if (round) {
      const turn = (Math.PI / 2) * step;
      return ringDensity(dish, outline.radius, turn);
    }
    const width = halfWidth(at);
    return rowIntegral(dish, at, width) * half * Math.PI * Math.sin(Math.PI * step);
  };
  const upTo = [0];
  for (let i = 0; i < STEPS; i++) {
    const [low, mid, high] = [i, i + 0.5, i + 1].map((step) => density(step / STEPS));
    upTo.push(upTo[i] + (low + 4 * mid + high) / 6 / STEPS);
  }
  const table = { upTo, place };
  tables.set(dish, table);
  return table;
}

/** d(area)/d(step) of a round dish at the distance rim·sin(turn) from its axis. */
function ringDensity({ radius, conic }: Dish, rim: number, turn: number): number {
  const distance = rim * Math.sin(turn);
  const r2 = distance * distance;
  const rest = radius ** 2 - (1 + conic) * r2;
  // cos/√rest stays finite where both vanish, at the equator of an ellipsoid.
  const atRim = Math.abs(radius ** 2 - (1 + conic) * rim * rim) < 1e-9 * radius ** 2;
  const ratio = atRim ? 1 / radius : Math.cos(turn) / Math.sqrt(rest);
  return 2 * Math.PI * distance * Math.sqrt(Math.max(0, rest + r2)) * ratio * rim * (Math.PI / 2);
}

/** ∫ stretch db across the strip at a. */
function rowIntegral(dish: Dish, a: number, width: number): number {
  if (dish.ruled === 'v') return 2 * width * stretch(dish, a, 0);
  const steps = 16;
  let sum = 0;
  for (let i = 0; i <= steps; i++) {
    const weight = i === 0 || i === steps ? 1 : i % 2 === 1 ? 4 : 2;
    sum += weight * stretch(dish, a, width * ((2 * i) / steps - 1));
  }
  return (sum * 2 * width) / (3 * steps);
}

export function dishArea(dish: Dish): number {
  return areaTable(dish).upTo[STEPS];
}

/** A point uniform in area for (s, t) uniform in the unit square. */
export function dishSample(dish: Dish, s: number, t: number): { point: Vector3; normal: Vector3 } {
  const { upTo, place } = areaTable(dish);
  const wanted = s * upTo[STEPS];
  let i = 0;
  while (i < STEPS - 1 && upTo[i + 1] < wanted) i++;
  const at = place((i + (wanted - upTo[i]) / (upTo[i + 1] - upTo[i])) / STEPS);
  if (dish.outline.kind === 'disc' && dish.ruled === null) {
    return dishPoint(dish, at * Math.cos(2 * Math.PI * t), at * Math.sin(2 * Math.PI * t));
  }
  return dishPoint(dish, at, acrossAt(dish, at, strip(dish).halfWidth(at), t));
}

/** b below which the share t of a row lies. */
function acrossAt(dish: Dish, a: number, width: number, t: number): number {
  if (dish.ruled === 'v' || width === 0) return width * (2 * t - 1);
  const sums = [0];
  for (let i = 0; i < STEPS; i++) sums.push(sums[i] + stretch(dish, a, width * ((2 * i + 1) / STEPS - 1)));
  const wanted = t * sums[STEPS];
  let i = 0;
  while (i < STEPS - 1 && sums[i + 1] < wanted) i++;
  return width * ((2 * (i + (wanted - sums[i]) / (sums[i + 1] - sums[i]))) / STEPS - 1);
}

/** Low and high along a unit direction. */
export function dishRange(dish: Dish, direction: Vector3): readonly [number, number] {
  const values: number[] = [];
  const see = (a: number, b: number) => values.push(dot(dishPoint(dish, a, b).point, direction));
  const { outline } = dish;
  if (outline.kind === 'disc' && dish.ruled === null) {
    const side: Vector2 = [dot(direction, dish.u), dot(direction, dish.v)];
    const flat = Math.hypot(...side);
    const [c, s] = flat > 0 ? [side[0] / flat, side[1] / flat] : [1, 0];
    see(outline.radius * c, outline.radius * s);
    see(-outline.radius * c, -outline.radius * s);
    // Where the normal looks along the direction, or against it.
    const lean = flat / Math.abs(dot(direction, dish.axis));
    const distance = (lean * dish.radius) / Math.sqrt(1 + (1 + dish.conic) * lean * lean);
    const turn = dot(direction, dish.axis) < 0 ? -1 : 1;
    if (distance <= outline.radius) see(turn * distance * c, turn * distance * s);
  } else {
    const { from, to, halfWidth } = strip(dish);
    // Along a ruling the ends are the extremes.
    const rows = dish.ruled === 'v' ? STEPS : 16;
    const columns = dish.ruled === 'v' ? 1 : 16;
    for (let i = 0; i <= rows; i++) {
      const a = from + ((to - from) * i) / rows;
      for (let k = 0; k <= columns; k++) see(a, halfWidth(a) * ((2 * k) / columns - 1));
    }
  }
  return [Math.min(...values), Math.max(...values)];
}

/** Distances at which a ray meets the dish, with the outward normals there. */
export function dishMeetings(dish: Dish, origin: Vector3, direction: Vector3): { distance: number; normal: Vector3 }[] {
  const from = subtract(origin, dish.vertex);
  const [a0, b0, w0] = [dot(from, dish.u), dot(from, dish.v), -dot(from, dish.axis)];
  const [da, db, dw] = [dot(direction, dish.u), dot(direction, dish.v), -dot(direction, dish.axis)];
  const [x, y] = bent(dish, a0, b0);
  const [dx, dy] = bent(dish, da, db);
  const k = 1 + dish.conic;
  const quadratic = dx * dx + dy * dy + k * dw * dw;
  const linear = x * dx + y * dy + k * w0 * dw - dish.radius * dw;
  const free = x * x + y * y + k * w0 * w0 - 2 * dish.radius * w0;
  return roots(quadratic, linear, free).flatMap((distance) => {
    const [a, b, w] = [a0 + distance * da, b0 + distance * db, w0 + distance * dw];
    // Beyond the equator, or on the other sheet of a hyperboloid.
    const near = dish.radius - k * w >= 0 && (dish.conic >= -1 || w >= 0);
    return near && inOutline(dish, a, b) ? [{ distance, normal: dishPoint(dish, a, b).normal }] : [];
  });
}

/** Real roots of a t² + 2 b t + c. */
export function roots(a: number, b: number, c: number): number[] {
  if (Math.abs(a) < 1e-12) return b === 0 ? [] : [-c / (2 * b)];
  const discriminant = b * b - a * c;
  if (discriminant < 0) return [];
  const root = Math.sqrt(discriminant);
  return [(-b - root) / a, (-b + root) / a];
}

/** Unit vector along the ruling, null for a dish bent both ways. */
export const rulingOf = ({ ruled, u, v }: Pick<Dish, 'ruled' | 'u' | 'v'>): Vector3 | null =>
  ruled === null ? null : ruled === 'u' ? u : v;
