/** Lenses in their own frame: a pane in the plane of x and z, the front looking along −y. */
import type { LensDescription, LensSurface, Outline, Vector2, Vector3 } from '../../design/description.js';
import { lensSags } from '../../design/lens-sag.js';
import type { BoundarySurface, ConvexSolid, FacePatch, SolidFace } from '../convex-solid.js';
import { dot } from '../vector.js';
import { flatFace } from './flat-shapes.js';
import type { ShapePiece } from './make-solid.js';

const X: Vector3 = [1, 0, 0];
const Z: Vector3 = [0, 0, 1];
const BACK: Vector3 = [0, 1, 0];
const FRONT: Vector3 = [0, -1, 0];
const opposite = ([x, y, z]: Vector3): Vector3 => [-x, -y, -z];

/** One side of the lens: what bounds the body there, what is taken away, and where its rim lies. */
interface Side {
  readonly name: 'front' | 'back';
  readonly out: Vector3;
  readonly surface: LensSurface;
  /** y of the vertex and of the rim, mm. */
  readonly vertex: number;
  readonly rim: number;
}

export function lensPieces(lens: LensDescription): readonly ShapePiece[] {
  const { thickness, front, back } = lens;
  const sags = lensSags(lens);
  // Middle of the bounding box at the origin.
  const low = Math.min(0, sags.front.rim);
  const high = Math.max(thickness, thickness - sags.back.rim);
  const middle = (low + high) / 2;
  const sides: readonly Side[] = [
    { name: 'front', out: FRONT, surface: front, vertex: -middle, rim: sags.front.rim - middle },
    { name: 'back', out: BACK, surface: back, vertex: thickness - middle, rim: thickness - sags.back.rim - middle },
  ];
  const minus = sides.flatMap((side) => hollowOf(lens, side));
  const [first, second] = sides;
  const ends = { low: low - middle, high: high - middle };
  // The far half of a strongly bent surface may cut through a thick lens; it then gets a body of its own behind a plane at its rim.
  const split = sides.filter((side) => side.surface.kind === 'bulges' && !clears(side, ends));
  const body = sides.flatMap((side) => (split.includes(side) ? [rimPlane(side)] : boundsOf(lens, side)));
  const core: ConvexSolid = { faces: [...wallsOf(lens, first, second, ends), ...body] };
  const bare = wallsOf(lens, first, second, ends).map(
    (face): SolidFace => ({
      name: face.name,
      surface: face.surface,
      patch: null,
      ...(face.patch === null ? {} : { wall: face.patch }),
    }),
  );
  const caps = split.map((side): ConvexSolid => ({ faces: [...bare, ...boundsOf(lens, side), capPlane(side)] }));
  return [core, ...caps].map((each) => ({ body: each, minus }));
}

/** Whether the conicoid of a bulging surface holds all of the lens that lies behind the surface's rim. */
function clears({ surface, vertex, rim }: Side, ends: { low: number; high: number }): boolean {
  if (surface.kind === 'flat' || surface.conic <= -1) return true;
  const depth = (2 * surface.radius) / (1 + surface.conic);
  const back = rim > vertex ? ends.high - vertex : vertex - ends.low;
  return depth - Math.abs(rim - vertex) >= back;
}

const conicOf = (lens: LensDescription, { surface, vertex }: Side, axis: Vector3) => {
  if (surface.kind === 'flat') throw new Error('a flat surface has no conicoid');
  const { radius, conic } = surface;
  const ruled = lens.profile === 'round' ? null : lens.profile === 'upright' ? Z : X;
  return { vertex: [0, vertex, 0] as Vector3, axis, radius, conic, ruled };
};

/** Of one kind for all round shapes, so that a lens fits a ball and a cylinder fits a rod. */
function surfaceOf(form: ReturnType<typeof conicOf>): BoundarySurface {
  const { vertex, axis, radius, conic, ruled } = form;
  if (conic !== 0) return { kind: 'conic', ...form };
  const centre: Vector3 = [0, vertex[1] - radius * axis[1], 0];
  return ruled === null ? { kind: 'sphere', centre, radius } : { kind: 'cylinder', point: centre, axis: ruled, radius };
}

function patchOf(lens: LensDescription, form: ReturnType<typeof conicOf>): FacePatch {
  const { outline, profile } = lens;
  const cut =
    outline.kind === 'disc'
      ? ({ kind: 'disc', radius: outline.radius } as const)
      : ({
          kind: 'strip',
          from: -outline.size[0] / 2,
          to: outline.size[0] / 2,
          halfWidth: () => outline.size[1] / 2,
        } as const);
  const ruled = profile === 'round' ? null : profile === 'upright' ? 'v' : 'u';
  return { kind: 'dish', ...form, ruled, outline: cut, u: X, v: Z };
}

/** Keeps the second sheet of a hyperboloid out: a plane half way between the sheets. */
function sheetPlane(name: string, form: ReturnType<typeof conicOf>): SolidFace[] {
  if (form.conic >= -1) return [];
  const y = form.vertex[1] + (form.axis[1] * form.radius) / Math.abs(1 + form.conic);
  return [{ name, surface: plane(form.axis, y), patch: null }];
}

const plane = (normal: Vector3, y: number): BoundarySurface => ({
  kind: 'plane',
  normal,
  offset: dot(normal, [0, y, 0]),
});
const rimPlane = ({ name, out, rim }: Side): SolidFace => ({ name, surface: plane(out, rim), patch: null });
const capPlane = ({ name, out, rim }: Side): SolidFace => ({ name, surface: plane(opposite(out), rim), patch: null });

function boundsOf(lens: LensDescription, side: Side): SolidFace[] {
  const { name, out, surface, vertex } = side;
  if (surface.kind === 'flat') return [flatOf(lens.outline, name, out, vertex)];
  // What is hollow is taken away from a body that reaches as far as the rim.
  if (surface.kind === 'hollow') return [rimPlane(side)];
  const form = conicOf(lens, side, out);
  return [{ name, surface: surfaceOf(form), patch: patchOf(lens, form) }, ...sheetPlane(name, form)];
}

function hollowOf(lens: LensDescription, side: Side): ConvexSolid[] {
  if (side.surface.kind !== 'hollow') return [];
  const form = conicOf(lens, side, opposite(side.out));
  const face: SolidFace = { name: side.name, surface: surfaceOf(form), patch: patchOf(lens, form) };
  return [{ faces: [face, ...sheetPlane(side.name, form)] }];
}

function flatOf(outline: Outline, name: string, out: Vector3, y: number): SolidFace {
  if (outline.kind === 'rectangle') {
    const [a, b] = [outline.size[0] / 2, outline.size[1] / 2];
    const corners: Vector3[] = [
      [-a, y, -b],
      [a, y, -b],
      [a, y, b],
      [-a, y, b],
    ];
    return flatFace(name, out, corners, X, Z);
  }
  const { radius } = outline;
  return { name, surface: plane(out, y), patch: { kind: 'disc', centre: [0, y, 0], radius, normal: out, u: X, v: Z } };
}

/** The cylinder of the edge, or four planes. Their patches reach from rim to rim; at rectangles and cylinders the corners are cut off. */
function wallsOf(
  { outline }: LensDescription,
  front: Side,
  back: Side,
  ends: { readonly low: number; readonly high: number },
): SolidFace[] {
  if (outline.kind === 'disc') {
    const { radius } = outline;
    const height = back.rim - front.rim;
    return [
      {
        name: 'edge',
        surface: { kind: 'cylinder', point: [0, 0, 0], axis: BACK, radius },
        patch: {
          kind: 'side',
          base: [0, front.rim, 0],
          axis: BACK,
          bottomRadius: radius,
          topRadius: radius,
          height,
          u: X,
          v: Z,
        },
      },
    ];
  }
  const [a, b] = [outline.size[0] / 2, outline.size[1] / 2];
  const wall = (name: string, normal: Vector3, corner: (t: number, y: number) => Vector3, u: Vector3, v: Vector3) => {
    const around: readonly Vector2[] = [
      [-1, ends.low],
      [1, ends.low],
      [1, ends.high],
      [-1, ends.high],
    ];
    return flatFace(
      name,
      normal,
      around.map(([t, y]) => corner(t, y)),
      u,
      v,
    );
  };
  return [
    wall('left', [-1, 0, 0], (t, y) => [-a, y, t * b], BACK, Z),
    wall('right', X, (t, y) => [a, y, t * b], BACK, Z),
    wall('bottom', [0, 0, -1], (t, y) => [t * a, y, -b], X, BACK),
    wall('top', Z, (t, y) => [t * a, y, b], X, BACK),
  ];
}
