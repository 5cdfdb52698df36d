/** Lenses, reflectors, tapers and tunnels as written -> shapes of the description; checks that each can be made. */

import { concentratorSlices } from './concentrator-slices.js';
import { fullHeight } from './concentrator-wall.js';
import type { LensDescription, LensSurface, Outline, ShapeDescription, TubeWall, Vector2 } from './description.js';
import type { DesignPath } from './fault.js';
import { leastThickness, lensReach, surfaceSag } from './lens-sag.js';
import type { LensSurfaceRecord, ShapeFields } from './part-fields.js';
import type { Reading } from './reading.js';

type Given<Key extends keyof ShapeFields> = NonNullable<ShapeFields[Key]>;

export function describeOptics(fields: ShapeFields, path: DesignPath, reading: Reading): ShapeDescription | null {
  const { lens, paraboloid, concentrator, taper, polygon, tunnel } = fields;
  if (lens !== null) return describeLens(lens, [...path, 'lens'], reading);
  if (paraboloid !== null) return describeParaboloid(paraboloid);
  if (concentrator !== null) return describeConcentrator(concentrator, [...path, 'concentrator'], reading);
  if (taper !== null) return rectangularFrustum(taper.bottom, taper.top, taper.height);
  if (polygon !== null) {
    const { sides, width, height } = polygon;
    return Number.isInteger(sides) ? regularFrustum(sides, width, polygon['top-width'] ?? width, height) : null;
  }
  return tunnel && describeTunnel(tunnel, [...path, 'tunnel'], reading);
}

/** Not convex, so it cannot be taken away. */
export const isHollow = (shape: ShapeDescription): boolean =>
  shape.kind === 'tube' || (shape.kind === 'lens' && [shape.front, shape.back].some(({ kind }) => kind === 'hollow'));

const mm = (value: number): string => `${Number(value.toPrecision(6))} mm`;

// ------------------------------------------------------------------------------------------------ lenses

const PROFILES = { round: 'round', 'upright-cylinder': 'upright', 'lying-cylinder': 'lying' } as const;

function describeLens(given: Given<'lens'>, path: DesignPath, reading: Reading): ShapeDescription | null {
  const outline: Outline | null =
    given.diameter !== null
      ? { kind: 'disc', radius: given.diameter / 2 }
      : given.size && { kind: 'rectangle', size: given.size };
  if (outline === null) return null;
  const lens: LensDescription = {
    kind: 'lens',
    outline,
    thickness: given.thickness,
    profile: PROFILES[given.profile],
    front: surfaceOf(given.front),
    back: surfaceOf(given.back),
  };
  const reach = lensReach(lens);
  let sound = true;
  for (const side of ['front', 'back'] as const) {
    const surface = lens[side];
    if (surface.kind === 'flat' || !Number.isNaN(surfaceSag(surface, reach))) continue;
    if (Number.isNaN(surface.radius + surface.conic + reach)) continue;
    sound = false;
    reading.report({
      code: 'geometry',
      path: [...path, side],
      problem: 'the surface ends before it reaches the rim of the lens',
      found: `${mm(surface.radius)} of curvature, the rim ${mm(reach)} from the axis`,
      expected: `at least ${mm(reach * Math.sqrt(1 + surface.conic))} of curvature`,
    });
  }
  const least = leastThickness(lens);
  if (sound && least <= 1e-9) {
    reading.report({
      code: 'geometry',
      path: [...path, 'thickness'],
      problem: 'the two surfaces cross, so the lens is thinner than nothing somewhere',
      found: mm(lens.thickness),
      expected: `more than ${mm(lens.thickness - least)}, which leaves an edge`,
    });
  }
  return lens;
}

function surfaceOf({ bulges, hollow, conic }: LensSurfaceRecord): LensSurface {
  if (bulges !== null) return { kind: 'bulges', radius: bulges, conic };
  return hollow === null ? { kind: 'flat' } : { kind: 'hollow', radius: hollow, conic };
}

// -------------------------------------------------------------------------------------------- reflectors

function describeParaboloid(given: Given<'paraboloid'>): ShapeDescription {
  const focalLength = given['focal-length'];
  const height = given.height ?? (given.diameter ?? Number.NaN) ** 2 / (16 * focalLength);
  return { kind: 'paraboloid', focalLength, height };
}

const MOST_SLICES = 200;

function describeConcentrator(given: Given<'concentrator'>, path: DesignPath, reading: Reading): ShapeDescription {
  const { form, length, tolerance } = given;
  const halfAngle = given['half-angle'];
  const smallEnd = given['small-end'] / 2;
  const full = fullHeight(smallEnd, halfAngle);
  const height = given.height ?? full;
  if (height > full * (1 + 1e-9)) {
    reading.report({
      code: 'geometry',
      path: [...path, 'height'],
      problem: 'above its full height the walls of a concentrator would lean inwards',
      found: mm(height),
      expected: `at most ${mm(full)}`,
    });
  }
  if ((form === 'trough') !== (length !== null)) {
    const problem = length === null ? 'a trough needs a length' : 'only a trough has a length';
    const expected = length === null ? 'a length such as 20 mm' : '`form: trough`, or no length';
    reading.report({ code: length === null ? 'missing' : 'geometry', path: [...path, 'length'], problem, expected });
  }
  const slices = form === 'round' ? concentratorSlices({ smallEnd, halfAngle, height }, tolerance) : 1;
  if (slices > MOST_SLICES) {
    reading.report({
      code: 'range',
      path: [...path, 'tolerance'],
      problem: 'so fine a wall needs more cone frusta than can be traced in a sensible time',
      found: `${slices} of them`,
      expected: `a tolerance that needs at most ${MOST_SLICES}`,
    });
  }
  return { kind: 'concentrator', form, halfAngle, smallEnd, height: Math.min(height, full), length, slices };
}

// ------------------------------------------------------------------------------------- tapers and tunnels

const SIDES = ['front', 'right', 'back', 'left'] as const;

const rectangle = ([width, depth]: Vector2): Vector2[] => [
  [-width / 2, -depth / 2],
  [width / 2, -depth / 2],
  [width / 2, depth / 2],
  [-width / 2, depth / 2],
];

type Frustum = Extract<TubeWall, { kind: 'frustum' }>;

const rectangularFrustum = (bottom: Vector2, top: Vector2, height: number): Frustum => ({
  kind: 'frustum',
  bottom: rectangle(bottom),
  top: rectangle(top),
  height,
  sides: SIDES,
});

/** Side 1 looks along −y; the next ones follow counter-clockwise. */
function regularFrustum(sides: number, width: number, topWidth: number, height: number): Frustum {
  const outline = (across: number) =>
    Array.from({ length: sides }, (_, i): Vector2 => {
      const turn = -Math.PI / 2 + ((2 * i - 1) * Math.PI) / sides;
      const radius = across / 2 / Math.cos(Math.PI / sides);
      return [radius * Math.cos(turn), radius * Math.sin(turn)];
    });
  const names = Array.from({ length: sides }, (_, i) => `side-${i + 1}`);
  return { kind: 'frustum', bottom: outline(width), top: outline(topWidth), height, sides: names };
}

function describeTunnel(given: Given<'tunnel'>, path: DesignPath, reading: Reading): ShapeDescription | null {
  const { bore, diameter, sides, width, wall, height } = given;
  const needs = { 'top-bore': 'bore', 'top-diameter': 'diameter', 'top-width': 'sides', width: 'sides' } as const;
  for (const [field, owner] of Object.entries(needs)) {
    if (given[field as keyof typeof needs] === null || given[owner] !== null) continue;
    const problem = `${field} has no meaning without ${owner}`;
    reading.report({ code: 'geometry', path: [...path, field], problem, expected: `\`${owner}\` too, or no ${field}` });
  }
  const wider = ([a, b]: Vector2): Vector2 => [a + 2 * wall, b + 2 * wall];
  if (bore !== null) {
    const top = given['top-bore'] ?? bore;
    return {
      kind: 'tube',
      bore: rectangularFrustum(bore, top, height),
      outer: rectangularFrustum(wider(bore), wider(top), height),
    };
  }
  if (diameter !== null) {
    const top = given['top-diameter'] ?? diameter;
    const cone = (grow: number): TubeWall => ({
      kind: 'cone',
      bottomRadius: diameter / 2 + grow,
      topRadius: top / 2 + grow,
      height,
    });
    return { kind: 'tube', bore: cone(0), outer: cone(wall) };
  }
  if (sides === null || !Number.isInteger(sides)) return null;
  if (width === null) {
    const problem = 'a required field is missing';
    reading.report({ code: 'missing', path: [...path, 'width'], problem, expected: 'a length such as 8 mm' });
    return null;
  }
  const top = given['top-width'] ?? width;
  return {
    kind: 'tube',
    bore: regularFrustum(sides, width, top, height),
    outer: regularFrustum(sides, width + 2 * wall, top + 2 * wall, height),
  };
}
