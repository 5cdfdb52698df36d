/**
 * Spheres, cylinders, cones and conicoids as one quadratic form q(p) = xx·x² + yy·y² + zz·z² + 2(xy·xy + xz·xz + yz·yz) + 2(x·x + y·y + z·z) + c,
 * negative inside. Coefficient order: xx yy zz xy xz yz x y z c.
 */
import type { Vector3 } from '../design/description.js';
import type { BoundarySurface } from './convex-solid.js';
import { dot } from './vector.js';

export const QUADRIC_STRIDE = 10;
type Curved = Exclude<BoundarySurface, { kind: 'plane' | 'mesh' }>;

export function quadricCoefficients(surface: Curved): number[] {
  switch (surface.kind) {
    case 'sphere':
      return centredForm(surface.centre, [0, 0, 1], 0, -(surface.radius ** 2));
    case 'cylinder':
      return centredForm(surface.point, surface.axis, 1, -(surface.radius ** 2));
    case 'cone':
      return centredForm(surface.apex, surface.axis, 1 + surface.slope ** 2, 0);
    case 'conic':
      return conicForm(surface);
  }
}

/** dᵀ(1 + conic·aaᵀ − rrᵀ)d + 2·radius·a·d with d = p − vertex: depth below the vertex is −a·d. */
function conicForm({ vertex: o, axis: a, radius, conic, ruled }: Extract<Curved, { kind: 'conic' }>): number[] {
  const r = ruled ?? [0, 0, 0];
  const m = (i: number, j: number) => (i === j ? 1 : 0) + conic * a[i] * a[j] - r[i] * r[j];
  const row = (i: number) => m(i, 0) * o[0] + m(i, 1) * o[1] + m(i, 2) * o[2];
  const linear = [0, 1, 2].map((i) => radius * a[i] - row(i));
  const free = dot(o, [row(0), row(1), row(2)]) - 2 * radius * dot(a, o);
  return [m(0, 0), m(1, 1), m(2, 2), m(0, 1), m(0, 2), m(1, 2), ...linear, free];
}

/** |p − o|² − k ((p − o)·a)² + constant. */
function centredForm(o: Vector3, a: Vector3, k: number, constant: number): number[] {
  const m = (i: number, j: number) => (i === j ? 1 : 0) - k * a[i] * a[j];
  const row = (i: number) => m(i, 0) * o[0] + m(i, 1) * o[1] + m(i, 2) * o[2];
  const linear = [-row(0), -row(1), -row(2)] as const;
  const free = dot(o, [row(0), row(1), row(2)]) + constant;
  return [m(0, 0), m(1, 1), m(2, 2), m(0, 1), m(0, 2), m(1, 2), ...linear, free];
}

/** q(p). */
export function quadricValue(q: ArrayLike<number>, at: number, x: number, y: number, z: number): number {
  return (
    q[at] * x * x +
    q[at + 1] * y * y +
    q[at + 2] * z * z +
    2 * (q[at + 3] * x * y + q[at + 4] * x * z + q[at + 5] * y * z + q[at + 6] * x + q[at + 7] * y + q[at + 8] * z) +
    q[at + 9]
  );
}

/** Same surface within `tolerance` mm: then both parts share one surface and their light crosses it once. */
export function sameCurve(a: Curved, b: Curved, tolerance: number): boolean {
  const near = (p: Vector3, r: Vector3) => p.every((c, i) => Math.abs(c - r[i]) <= tolerance);
  if (a.kind === 'sphere' && b.kind === 'sphere') {
    return near(a.centre, b.centre) && Math.abs(a.radius - b.radius) <= tolerance;
  }
  if (a.kind === 'cylinder' && b.kind === 'cylinder') {
    const parallel = Math.abs(Math.abs(dot(a.axis, b.axis)) - 1) <= 1e-12;
    return parallel && Math.abs(a.radius - b.radius) <= tolerance && offAxis(a.point, b.point, a.axis) <= tolerance;
  }
  if (a.kind === 'cone' && b.kind === 'cone') {
    const parallel = Math.abs(Math.abs(dot(a.axis, b.axis)) - 1) <= 1e-12;
    return parallel && near(a.apex, b.apex) && Math.abs(a.slope - b.slope) <= 1e-12;
  }
  if (a.kind === 'conic' && b.kind === 'conic') {
    const same = dot(a.axis, b.axis) >= 1 - 1e-12 && Math.abs(a.conic - b.conic) <= 1e-12;
    const ruled =
      a.ruled === null || b.ruled === null ? a.ruled === b.ruled : Math.abs(dot(a.ruled, b.ruled)) >= 1 - 1e-12;
    return (
      same && ruled && onRuling(a.vertex, b.vertex, a.ruled) <= tolerance && Math.abs(a.radius - b.radius) <= tolerance
    );
  }
  return false;
}

/** Distance of two vertices, not counting what runs along the ruling. */
const onRuling = (a: Vector3, b: Vector3, ruled: Vector3 | null): number =>
  ruled === null ? Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]) : offAxis(a, b, ruled);

function offAxis(a: Vector3, b: Vector3, axis: Vector3): number {
  const d: Vector3 = [b[0] - a[0], b[1] - a[1], b[2] - a[2]];
  const along = dot(d, axis);
  return Math.sqrt(Math.max(0, dot(d, d) - along * along));
}
