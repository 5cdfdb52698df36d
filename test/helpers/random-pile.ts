/** Random piles of parts, touching, overlapping, hollow and turned, with an independent test of where a point lies. */
import fc from 'fast-check';
import type { ShapeDescription, Turn, Vector3 } from '../../src/design/description.js';
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
const turnArbitrary: fc.Arbitrary<Turn> = fc.record({
  axis: fc.constantFrom('x', 'y', 'z'),
  angle: fc.oneof(fc.constantFrom(Math.PI / 2, Math.PI, -Math.PI / 2), fc.double({ min: -3, max: 3, noNaN: true })),
});
export const pilePartArbitrary: fc.Arbitrary<PilePart> = fc.record({
  shape: shapeArbitrary,
  at: fc.tuple(place, place, place),
  turns: fc.oneof(fc.constant([]), fc.array(turnArbitrary, { minLength: 1, maxLength: 2 })),
  hole: fc.option(
    fc.record({
      shape: shapeArbitrary,
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
  }
}

/** A face that every shape of a pile has one of. */
export function someFace(shape: ShapeDescription): string {
  if (shape.kind === 'mesh') return shape.mesh.groups[shape.mesh.groups.length - 1];
  return shape.kind === 'sphere' ? 'surface' : shape.kind === 'cap' ? 'dome' : 'top';
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
