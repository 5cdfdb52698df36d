/** Cylinders, cone frusta, spheres and caps in their own frames: origin at the centre of the bounding box, axis z. */
import type { ShapeDescription, Vector3 } from '../../design/description.js';
import type { ConvexSolid, FacePatch, SolidFace } from '../convex-solid.js';

type Shape<Kind extends ShapeDescription['kind']> = Extract<ShapeDescription, { kind: Kind }>;

const X: Vector3 = [1, 0, 0];
const Y: Vector3 = [0, 1, 0];
const Z: Vector3 = [0, 0, 1];
const DOWN: Vector3 = [0, 0, -1];

export function cylinderSolid({ radius, height }: Shape<'cylinder'>): ConvexSolid {
  const side: SolidFace = {
    name: 'side',
    surface: { kind: 'cylinder', point: [0, 0, 0], axis: Z, radius },
    patch: sidePatch(radius, radius, height),
  };
  return { faces: [side, disc('bottom', -height / 2, radius), disc('top', height / 2, radius)] };
}

export function coneSolid({ bottomRadius, topRadius, height }: Shape<'cone'>): ConvexSolid {
  if (bottomRadius === topRadius) return cylinderSolid({ kind: 'cylinder', radius: bottomRadius, height });
  const side = coneSide({ bottomRadius, topRadius, height }, 0);
  // A pointed end still needs its plane, which keeps the other nappe out.
  return { faces: [side, disc('bottom', -height / 2, bottomRadius), disc('top', height / 2, topRadius)] };
}

/** The side of a cone frustum (its radii must differ) whose middle lies at `z`. */
export function coneSide({ bottomRadius, topRadius, height }: Omit<Shape<'cone'>, 'kind'>, z: number): SolidFace {
  const slope = (topRadius - bottomRadius) / height;
  return {
    name: 'side',
    surface: { kind: 'cone', apex: [0, 0, z - height / 2 - bottomRadius / slope], axis: Z, slope: Math.abs(slope) },
    patch: { ...sidePatch(bottomRadius, topRadius, height), base: [0, 0, z - height / 2] },
  };
}

export function sphereSolid({ radius }: Shape<'sphere'>): ConvexSolid {
  const centre: Vector3 = [0, 0, 0];
  return {
    faces: [
      {
        name: 'surface',
        surface: { kind: 'sphere', centre, radius },
        patch: { kind: 'zone', centre, radius, axis: Z, from: -radius, u: X, v: Y },
      },
    ],
  };
}

export function capSolid({ radius, height }: Shape<'cap'>): ConvexSolid {
  const centre: Vector3 = [0, 0, height / 2 - radius];
  const from = radius - height;
  const rim = Math.sqrt(Math.max(0, radius * radius - from * from));
  return {
    faces: [
      {
        name: 'dome',
        surface: { kind: 'sphere', centre, radius },
        patch: { kind: 'zone', centre, radius, axis: Z, from, u: X, v: Y },
      },
      disc('bottom', -height / 2, rim),
    ],
  };
}

function sidePatch(bottomRadius: number, topRadius: number, height: number): Extract<FacePatch, { kind: 'side' }> {
  return { kind: 'side', base: [0, 0, -height / 2], axis: Z, bottomRadius, topRadius, height, u: X, v: Y };
}

/** Flat end at a height above the middle; `top` looks up. */
export function disc(name: 'bottom' | 'top', z: number, radius: number): SolidFace {
  const normal = name === 'top' ? Z : DOWN;
  return {
    name,
    surface: { kind: 'plane', normal, offset: z * normal[2] },
    patch: { kind: 'disc', centre: [0, 0, z], radius, normal, u: X, v: Y },
  };
}
