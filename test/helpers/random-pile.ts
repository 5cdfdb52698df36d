/** Random piles of parts, touching, overlapping, hollow and turned, with an independent test of where a point lies. */
import fc from 'fast-check';
import { fullHeight } from '../../src/design/concentrator-wall.js';
import type {
  ConcentratorDescription,
  LensDescription,
  LensSurface,
  ShapeDescription,
  Turn,
  Vector2,
  Vector3,
} from '../../src/design/description.js';
import { leastThickness, lensReach } from '../../src/design/lens-sag.js';
import type { ClosedMesh } from '../../src/numerics/mesh/close-mesh.js';
import { boxFacets, icosphereFacets, mustClose } from './mesh-bodies.js';

export interface PilePart {
  readonly shape: ShapeDescription;
  readonly at: Vector3;
  readonly turns: readonly Turn[];
  readonly hole: { readonly shape: ShapeDescription; readonly at: Vector3 } | null;
}

// Sizes and places on a coarse grid, so that faces of different parts often coincide.
const size = fc.integer({ min: 1, max: 6 });
const place = fc.integer({ min: -4, max: 4 });
export const shapeArbitrary: fc.Arbitrary<ShapeDescription> = fc.oneof(
  fc.tuple(size, size, size).map(([a, b, c]): ShapeDescription => ({ kind: 'box', size: [a, b, c] })),
  fc.tuple(size, size).map(([r, h]): ShapeDescription => ({ kind: 'cylinder', radius: r / 2, height: h })),
  fc
    .tuple(size, size, size)
    .map(([a, b, h]): ShapeDescription => ({ kind: 'cone', bottomRadius: a / 2, topRadius: b / 4, height: h })),
  size.map((r): ShapeDescription => ({ kind: 'sphere', radius: r / 2 })),
  fc
    .tuple(size, fc.integer({ min: 1, max: 3 }))
    .map(([r, h]): ShapeDescription => ({ kind: 'cap', radius: r / 2, height: (r * h) / 4 })),
  fc.tuple(size, size, size).map(
    ([a, b, h]): ShapeDescription => ({
      kind: 'prism',
      outline: [
        [-a / 2, -b / 2],
        [a / 2, -b / 2],
        [0, b / 2],
      ],
      height: h,
      sides: null,
    }),
  ),
  // Convex, so that the textbook definition is at hand: below the plane of every facet.
  fc
    .tuple(size, size, size)
    .map(([a, b, c]): ShapeDescription => ({ kind: 'mesh', mesh: mustClose(boxFacets([a, b, c])) })),
  fc
    .tuple(size, fc.integer({ min: 0, max: 1 }))
    .map(([r, level]): ShapeDescription => ({ kind: 'mesh', mesh: mustClose(icosphereFacets(r / 2, level)) })),
);
const lensSurface: fc.Arbitrary<LensSurface> = fc.oneof(
  fc.constant<LensSurface>({ kind: 'flat' }),
  fc.record({
    kind: fc.constantFrom('bulges' as const, 'hollow' as const),
    radius: fc.integer({ min: 3, max: 9 }),
    conic: fc.constantFrom(0, -1, -0.5, -2.25, 0.5),
  }),
);
export const lensArbitrary: fc.Arbitrary<LensDescription> = fc
  .record({
    kind: fc.constant('lens' as const),
    outline: fc.oneof(
      fc.record({ kind: fc.constant('disc' as const), radius: fc.constantFrom(0.5, 1, 1.5, 2) }),
      fc.record({ kind: fc.constant('rectangle' as const), size: fc.constantFrom<Vector2>([1, 2], [2, 2], [3, 2]) }),
    ),
    thickness: fc.constantFrom(0.5, 1, 2, 4, 7),
    profile: fc.constantFrom('round' as const, 'upright' as const, 'lying' as const),
    front: lensSurface,
    back: lensSurface,
  })
  .filter((lens) => lensReach(lens) * Math.SQRT2 <= 2.6 && leastThickness(lens) > 0.05);

const rectangle = (a: number, b: number): Vector2[] => [
  [-a / 2, -b / 2],
  [a / 2, -b / 2],
  [a / 2, b / 2],
  [-a / 2, b / 2],
];
const frustum = (bottom: Vector2[], top: Vector2[], height: number) => ({
  kind: 'frustum' as const,
  bottom,
  top,
  height,
  sides: ['front', 'right', 'back', 'left'],
});
const concentratorArbitrary: fc.Arbitrary<ConcentratorDescription> = fc
  .record({
    form: fc.constantFrom('round' as const, 'square' as const, 'trough' as const),
    halfAngle: fc.constantFrom(0.3, 0.6, 1),
    smallEnd: fc.constantFrom(0.5, 1),
    share: fc.constantFrom(0.3, 0.7, 1),
  })
  .map(({ form, halfAngle, smallEnd, share }) => ({
    kind: 'concentrator',
    form,
    halfAngle,
    smallEnd,
    height: share * fullHeight(smallEnd, halfAngle),
    length: form === 'trough' ? 3 : null,
    slices: 6,
  }));

/** Shapes of lenses, reflectors, tapers and tunnels; those that are not convex cannot be holes. */
const convexOptics: fc.Arbitrary<ShapeDescription> = fc.oneof(
  lensArbitrary.filter(({ front, back }) => front.kind !== 'hollow' && back.kind !== 'hollow'),
  fc.tuple(size, size).map(([f, h]): ShapeDescription => ({ kind: 'paraboloid', focalLength: f / 4, height: h / 2 })),
  fc
    .tuple(size, size, size, size, size)
    .map(([a, b, c, d, h]): ShapeDescription => frustum(rectangle(a, b), rectangle(c, d), h)),
  concentratorArbitrary,
);
const tubeArbitrary: fc.Arbitrary<ShapeDescription> = fc.oneof(
  fc.tuple(size, size, size).map(
    ([a, b, height]): ShapeDescription => ({
      kind: 'tube',
      bore: frustum(rectangle(a / 2, b / 2), rectangle(b / 2, a / 2), height),
      outer: frustum(rectangle(a / 2 + 1, b / 2 + 1), rectangle(b / 2 + 1, a / 2 + 1), height),
    }),
  ),
  fc.tuple(size, size, size).map(
    ([a, b, height]): ShapeDescription => ({
      kind: 'tube',
      bore: { kind: 'cone', bottomRadius: a / 4, topRadius: b / 4, height },
      outer: { kind: 'cone', bottomRadius: a / 4 + 0.5, topRadius: b / 4 + 0.5, height },
    }),
  ),
);
export const anyShapeArbitrary = fc.oneof(shapeArbitrary, convexOptics, lensArbitrary, tubeArbitrary);
export const convexShapeArbitrary = fc.oneof(shapeArbitrary, convexOptics);

const turnArbitrary: fc.Arbitrary<Turn> = fc.record({
  axis: fc.constantFrom('x', 'y', 'z'),
  angle: fc.oneof(fc.constantFrom(Math.PI / 2, Math.PI, -Math.PI / 2), fc.double({ min: -3, max: 3, noNaN: true })),
});
export const pilePartArbitrary: fc.Arbitrary<PilePart> = fc.record({
  shape: anyShapeArbitrary,
  at: fc.tuple(place, place, place),
  turns: fc.oneof(fc.constant([]), fc.array(turnArbitrary, { minLength: 1, maxLength: 2 })),
  hole: fc.option(
    fc.record({
      shape: convexShapeArbitrary,
      at: fc.tuple(place, place, place).map((p): Vector3 => [p[0] / 4, p[1] / 4, p[2] / 4]),
    }),
    { nil: null },
  ),
});
export const pileArbitrary = fc.array(pilePartArbitrary, { minLength: 1, maxLength: 5 });

/** Undoes the turns by hand: no matrix of the code under test. */
function toOwnFrame(p: Vector3, at: Vector3, turns: readonly Turn[]): Vector3 {
  let [x, y, z] = [p[0] - at[0], p[1] - at[1], p[2] - at[2]];
  for (const { axis, angle } of turns.toReversed()) {
    const c = Math.cos(-angle);
    const s = Math.sin(-angle);
    if (axis === 'x') [y, z] = [c * y - s * z, s * y + c * z];
    else if (axis === 'y') [x, z] = [c * x + s * z, -s * x + c * z];
    else [x, y] = [c * x - s * y, s * x + c * y];
  }
  return [x, y, z];
}

/** How far inside a shape a point is, mm (negative outside); by its textbook definition. */
export function depthInside(shape: ShapeDescription, [x, y, z]: Vector3): number {
  switch (shape.kind) {
    case 'box':
      return Math.min(...[x, y, z].map((c, i) => shape.size[i] / 2 - Math.abs(c)));
    case 'cylinder':
      return Math.min(shape.radius - Math.hypot(x, y), shape.height / 2 - Math.abs(z));
    case 'cone': {
      const share = z / shape.height + 0.5;
      const radius = shape.bottomRadius + (shape.topRadius - shape.bottomRadius) * share;
      return Math.min(radius - Math.hypot(x, y), shape.height / 2 - Math.abs(z));
    }
    case 'sphere':
      return shape.radius - Math.hypot(x, y, z);
    case 'cap':
      return Math.min(shape.radius - Math.hypot(x, y, z - (shape.height / 2 - shape.radius)), z + shape.height / 2);
    case 'prism': {
      const edges = shape.outline.map(([ax, ay], i) => {
        const [bx, by] = shape.outline[(i + 1) % shape.outline.length];
        return ((bx - ax) * (y - ay) - (by - ay) * (x - ax)) / Math.hypot(bx - ax, by - ay);
      });
      return Math.min(...edges, shape.height / 2 - Math.abs(z));
    }
    case 'mesh': {
      const planes = facetPlanes(shape.mesh);
      let depth = Number.POSITIVE_INFINITY;
      for (let i = 0; i < planes.length; i += 4) {
        const below = planes[i + 3] - planes[i] * x - planes[i + 1] * y - planes[i + 2] * z;
        // Well outside: how far does not matter.
        if (below < -0.1) return below;
        if (below < depth) depth = below;
      }
      return depth;
    }
    case 'frustum': {
      const share = z / shape.height + 0.5;
      const at = shape.bottom.map((corner, i) => corner.map((c, k) => c + (shape.top[i][k] - c) * share));
      const edges = at.map(([ax, ay], i) => {
        const [bx, by] = at[(i + 1) % at.length];
        return ((bx - ax) * (y - ay) - (by - ay) * (x - ax)) / Math.hypot(bx - ax, by - ay);
      });
      return Math.min(...edges, shape.height / 2 - Math.abs(z));
    }
    case 'tube':
      return Math.min(depthInside(shape.outer, [x, y, z]), -depthInside(shape.bore, [x, y, z]));
    case 'lens':
      return lensDepth(shape, [x, y, z]);
    case 'paraboloid': {
      const { focalLength, height } = shape;
      const up = z + height / 2;
      return Math.min(up - (x * x + y * y) / (4 * focalLength), height / 2 - z);
    }
    case 'concentrator': {
      const { form, halfAngle, smallEnd, height, length, slices } = shape;
      const up = z + height / 2;
      const half = form === 'round' ? slicedHalf(shape, up) : wallHalf(smallEnd, halfAngle, up);
      const across =
        form === 'round'
          ? half - Math.hypot(x, y)
          : Math.min(half - Math.abs(x), (form === 'square' ? half : (length ?? 0) / 2) - Math.abs(y));
      return Number.isNaN(across) || slices < 1 ? -1 : Math.min(across, up, height - up);
    }
  }
}

const planesOf = new WeakMap<ClosedMesh, Float64Array>();

/** [facet · 4]: unit outward normal and offset. */
function facetPlanes(mesh: ClosedMesh): Float64Array {
  const known = planesOf.get(mesh);
  if (known !== undefined) return known;
  const { facetPoint, facetCorner } = mesh.tree;
  const planes = new Float64Array((facetCorner.length / 3) * 4);
  for (let i = 0; i < facetCorner.length; i += 3) {
    const [a, b, c] = [0, 1, 2].map((k) => [
      ...facetPoint.subarray(3 * facetCorner[i + k], 3 * facetCorner[i + k] + 3),
    ]);
    const [e, f] = [b.map((v, k) => v - a[k]), c.map((v, k) => v - a[k])];
    const n = [e[1] * f[2] - e[2] * f[1], e[2] * f[0] - e[0] * f[2], e[0] * f[1] - e[1] * f[0]];
    const unit = n.map((v) => v / Math.hypot(...n));
    planes.set([...unit, unit.reduce((sum, v, k) => sum + v * a[k], 0)], (i / 3) * 4);
  }
  planesOf.set(mesh, planes);
  return planes;
}

/** y of the two surfaces from the sag formula, the middle of the bounding box at 0. */
function lensDepth({ outline, thickness, profile, front, back }: LensDescription, [x, y, z]: Vector3): number {
  const sag = (surface: LensSurface, r: number) => {
    if (surface.kind === 'flat') return 0;
    const { radius: R, conic: k } = surface;
    const depth = (r * r) / (R * (1 + Math.sqrt(1 - ((1 + k) * r * r) / (R * R))));
    return surface.kind === 'bulges' ? depth : -depth;
  };
  const [a, b] =
    outline.kind === 'disc' ? [outline.radius, outline.radius] : [outline.size[0] / 2, outline.size[1] / 2];
  const corner = outline.kind === 'disc' ? outline.radius : Math.hypot(a, b);
  const reach = profile === 'round' ? corner : profile === 'upright' ? a : b;
  const low = Math.min(0, sag(front, reach));
  const high = Math.max(thickness, thickness - sag(back, reach));
  const edge = outline.kind === 'disc' ? a - Math.hypot(x, z) : Math.min(a - Math.abs(x), b - Math.abs(z));
  if (edge < 0) return edge;
  const r = profile === 'round' ? Math.hypot(x, z) : profile === 'upright' ? x : z;
  const at = y + (low + high) / 2;
  return Math.min(edge, at - sag(front, r), thickness - sag(back, r) - at);
}

/**
 * Half width of a compound parabolic concentrator at a height above its small end: the implicit equation of Welford & Winston
 * (1989), (x cos θ + z sin θ)² + 2a(1 + sin θ)²x − 2a cos θ(2 + sin θ)z − a²(1 + sin θ)(3 + sin θ) = 0, solved for x; from memory.
 */
export function wallHalf(a: number, angle: number, z: number): number {
  const [s, c] = [Math.sin(angle), Math.cos(angle)];
  const quadratic = c * c;
  const linear = 2 * z * s * c + 2 * a * (1 + s) ** 2;
  const free = z * z * s * s - 2 * a * c * (2 + s) * z - a * a * (1 + s) * (3 + s);
  return (-linear + Math.sqrt(linear * linear - 4 * quadratic * free)) / (2 * quadratic);
}

/** The same between the chords over equal steps of x cos θ + z sin θ, which grows evenly along the tangent of the vertex. */
function slicedHalf(shape: ConcentratorDescription, z: number): number {
  const { smallEnd: a, halfAngle, height, slices } = shape;
  const levels = levelsOf.get(shape) ?? sliceLevels(shape);
  levelsOf.set(shape, levels);
  const i = Math.min(slices - 1, Math.max(0, levels.findIndex((level) => level >= z) - 1));
  const [z0, z1] = [levels[i], levels[i + 1]];
  const [r0, r1] = [wallHalf(a, halfAngle, z0), wallHalf(a, halfAngle, z1)];
  return z > height ? Number.NaN : r0 + ((r1 - r0) * (z - z0)) / (z1 - z0);
}

const levelsOf = new WeakMap<ConcentratorDescription, readonly number[]>();

function sliceLevels({ smallEnd: a, halfAngle, height, slices }: ConcentratorDescription): readonly number[] {
  const [s, c] = [Math.sin(halfAngle), Math.cos(halfAngle)];
  const along = (up: number) => wallHalf(a, halfAngle, up) * c + up * s;
  const heightAt = (goal: number): number => {
    let [low, high] = [0, height];
    for (let i = 0; i < 60; i++)
      [low, high] = along((low + high) / 2) < goal ? [(low + high) / 2, high] : [low, (low + high) / 2];
    return (low + high) / 2;
  };
  return Array.from({ length: slices + 1 }, (_, i) => heightAt(along(0) + ((along(height) - along(0)) * i) / slices));
}

/** Number of the last part that holds the point (1-based), 0 for none; null too close to a surface to say. */
export function ownerByHand(pile: readonly PilePart[], p: Vector3, clearance: number): number | null {
  let owner = 0;
  for (const [i, { shape, at, turns, hole }] of pile.entries()) {
    const own = toOwnFrame(p, at, turns);
    const depth = depthInside(shape, own);
    if (Math.abs(depth) < clearance) return null;
    let inside = depth > 0;
    if (hole !== null) {
      const q: Vector3 = [own[0] - hole.at[0], own[1] - hole.at[1], own[2] - hole.at[2]];
      const inHole = depthInside(hole.shape, q);
      if (Math.abs(inHole) < clearance) return null;
      inside = inside && inHole < 0;
    }
    if (inside) owner = i + 1;
  }
  return owner;
}
