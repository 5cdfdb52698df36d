/** Pieces of conicoids as flat facets: rings about the axis, or strips along the ruling. */
import type { Vector3 } from '../design/description.js';
import { type Dish, dishPoint } from '../scene/dish.js';
import { cross, dot, scale } from '../scene/vector.js';
import { type Facet, type HalfSpace, type SideMark, settleFacet, splitFacet } from './facet.js';
import { belt, evenAngles, handed, type Ring } from './rings.js';

/** Within the outline. Facets of a round dish under a rectangle are cut at its sides. @param round facets of a full turn */
export function dishFacets(dish: Dish, round: number): Facet[] {
  const whole = wholeDishFacets(dish, round);
  const { outline } = dish;
  if (dish.ruled !== null || outline.kind === 'disc') return whole;
  const { from, to } = outline;
  const width = outline.halfWidth((from + to) / 2);
  const bounds = [
    below(dish, dish.u, to),
    below(dish, scale(dish.u, -1), -from),
    below(dish, dish.v, width),
    below(dish, scale(dish.v, -1), width),
  ];
  return whole.flatMap((facet) => {
    const kept = bounds.reduce<Facet | null>(
      (so, bound) => so && splitFacet(so, bound, 1e-9 * (to - from)).inside,
      facet,
    );
    return kept === null ? [] : [settleFacet(kept)];
  });
}

const below = ({ vertex }: Dish, normal: Vector3, offset: number): HalfSpace => ({
  normal,
  offset: offset + dot(vertex, normal),
});

/** As far as its whole facets reach, at least to the outline: their planes are those of a convex polyhedron. */
export function wholeDishFacets(dish: Dish, round: number): Facet[] {
  return dish.ruled === null ? ringed(dish, round) : striped(dish, round);
}

function ringed(dish: Dish, round: number): Facet[] {
  const { outline, axis, u, v, vertex } = dish;
  const angles = evenAngles(round);
  let reach = 0;
  if (outline.kind === 'disc') reach = outline.radius;
  else {
    for (const a of [outline.from, outline.to]) {
      const b = outline.halfWidth(a);
      reach = Math.max(reach, Math.hypot(a, b));
      // The corners are corners of the facets too.
      for (const angle of [Math.atan2(b, a), Math.atan2(-b, a)]) angles.push((angle + 2 * Math.PI) % (2 * Math.PI));
    }
  }
  const sorted = angles.sort((a, b) => a - b).filter((angle, i) => i === 0 || angle - angles[i - 1] > 1e-9);
  const radii = steps(dish, 0, reach, Math.max(2, Math.ceil(belts(dish, 0, reach, round))));
  const turn = dot(handed(u, v, axis), v) < 0 ? -1 : 1;
  const rings = radii.map((radius): Ring => {
    const points = sorted.map((angle) => dishPoint(dish, radius * Math.cos(angle), turn * radius * Math.sin(angle)));
    return {
      ring: radius === 0 ? points.map(() => vertex) : points.map(({ point }) => point),
      normals: points.map(({ normal }) => normal),
      pointed: radius === 0,
    };
  });
  return rings.slice(1).flatMap((ring, i) => belt(ring, rings[i], i + 2 === rings.length ? 'rim' : 'mesh', 'mesh'));
}

function striped(dish: Dish, round: number): Facet[] {
  const { outline, ruled } = dish;
  const along = ruled === 'v';
  const spread = (bend: number): readonly [number, number] => {
    if (outline.kind === 'disc') {
      const half = Math.sqrt(Math.max(0, outline.radius ** 2 - bend ** 2));
      return [-half, half];
    }
    // Across the ruling of u the outline is as wide everywhere.
    return along ? [-outline.halfWidth(bend), outline.halfWidth(bend)] : [outline.from, outline.to];
  };
  const rows = rowsOf(dish, round);
  const at = (bend: number, across: number) => (along ? dishPoint(dish, bend, across) : dishPoint(dish, across, bend));
  const forward = dot(cross(dish.u, dish.v), dish.axis) > 0 === along;
  return rows.slice(1).map((row, i): Facet => {
    const [first, second] = forward ? [rows[i], row] : [row, rows[i]];
    const corners: Vector3[] = [];
    const normals: Vector3[] = [];
    const sides: SideMark[] = [];
    const put = (bend: number, across: number, side: SideMark) => {
      const { point, normal } = at(bend, across);
      corners.push(point);
      normals.push(normal);
      sides.push(side);
    };
    const markAt = (bend: number): SideMark => (bend === rows[0] || bend === rows[rows.length - 1] ? 'rim' : 'mesh');
    const [low1, high1] = spread(first);
    const [low2, high2] = spread(second);
    put(first, low1, 'rim');
    put(second, low2, high2 > low2 ? markAt(second) : 'rim');
    if (high2 > low2) put(second, high2, 'rim');
    if (high1 > low1) put(first, high1, markAt(first));
    return { corners, normals, sides };
  });
}

/** Where the strips of a ruled dish meet, along the direction in which it is bent. */
function rowsOf(dish: Dish, round: number): number[] {
  const { outline, ruled } = dish;
  if (outline.kind === 'disc') {
    // Those of the polygon that stands for the rim.
    const half = round / 2;
    return Array.from({ length: half + 1 }, (_, i) => {
      if (i === 0 || i === half) return i === 0 ? -outline.radius : outline.radius;
      return -outline.radius * Math.cos((Math.PI * i) / half);
    });
  }
  const half = outline.halfWidth((outline.from + outline.to) / 2);
  const [from, to] = ruled === 'v' ? [outline.from, outline.to] : [-half, half];
  return steps(dish, from, to, 2 * Math.max(1, Math.ceil(belts(dish, from, to, round) / 2)));
}

/** Angle between the normal and the axis at a distance from it. */
const leanAt = ({ radius, conic }: Dish, distance: number): number =>
  Math.atan2(distance, Math.sqrt(Math.max(0, radius ** 2 - (1 + conic) * distance ** 2)));

/** A little finer than the facets round a circle, for conicoids bend more at their vertex. */
const belts = (dish: Dish, from: number, to: number, round: number): number =>
  ((leanAt(dish, to) - leanAt(dish, from)) * round) / 5;

/** Distances from the axis between which both the turn of the normal and the distance grow alike. */
function steps(dish: Dish, from: number, to: number, count: number): number[] {
  const whole = leanAt(dish, to) - leanAt(dish, from);
  const share = (at: number) => ((leanAt(dish, at) - leanAt(dish, from)) / whole + (at - from) / (to - from)) / 2;
  return Array.from({ length: count + 1 }, (_, i) => {
    if (i === 0 || i === count) return i === 0 ? from : to;
    // The axis itself where the steps are even about it.
    if (from === -to && 2 * i === count) return 0;
    let [low, high] = [from, to];
    for (let k = 0; k < 50; k++)
      [low, high] = share((low + high) / 2) < i / count ? [(low + high) / 2, high] : [low, (low + high) / 2];
    return (low + high) / 2;
  });
}
