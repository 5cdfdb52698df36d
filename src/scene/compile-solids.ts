/** Parts -> surfaces, convex primitives, pieces and faces as flat arrays. */
import type { Description, Vector3 } from '../design/description.js';
import type { Fault } from '../design/fault.js';
import type { ConvexSolid, FacePatch } from './convex-solid.js';
import { patchRange } from './face-patch.js';
import type { PlacedMesh } from './mesh/placed-mesh.js';
import { findFace, type NamedSolid, type PlacedPart, partFaces } from './place-parts.js';
import { type CurveHandle, type PlaneHandle, type SurfaceSide, SurfaceTable } from './surface-table.js';
import { dot, normalise, snapDirection } from './vector.js';

/** One face of one part, in the numbering of the scene. */
export interface SceneFace {
  readonly index: number;
  /** 'part.face'. */
  readonly reference: string;
  readonly part: PlacedPart;
  readonly owner: number;
  readonly patch: FacePatch;
  /** The patch's normal looks into the material: the wall of a hole. */
  readonly hollow: boolean;
  /** The surfaces it lies on, each with its own patch; usually one. */
  readonly members: readonly FaceMember[];
}

export interface FaceMember {
  readonly patch: FacePatch;
  readonly surface: PlaneHandle | CurveHandle | MeshHandle;
}

/** Number of a mesh of the scene, and of a group of it. */
export interface MeshHandle {
  readonly kind: 'mesh';
  readonly index: number;
  readonly group: number;
}

export interface CompiledSolids {
  readonly faces: readonly SceneFace[];
  readonly normals: readonly Vector3[];
  readonly starts: readonly number[];
  readonly offsets: readonly number[];
  readonly quadrics: readonly number[];
  readonly curves: number;
  readonly meshes: readonly PlacedMesh[];
  readonly primitiveStart: number[];
  readonly constraintSurface: number[];
  readonly constraintSide: number[];
  readonly constraintFace: number[];
  readonly pieceStart: number[];
  readonly pieceMember: number[];
  readonly ownerPieceStart: number[];
  /** Plane of each free-plane detector by name, and the sign of its normal along the family's. */
  readonly detectorPlanes: ReadonlyMap<string, { readonly plane: number; readonly sign: 1 | -1 }>;
  /** Quadric of each sphere detector by name. */
  readonly detectorSpheres: ReadonlyMap<string, number>;
}

/** Surfaces closer than this share of the design's size are one. */
const RELATIVE_TOLERANCE = 1e-9;
/**
 * A free plane or sphere stands this far beyond where it was put, or a few times as far, so that it never coincides with a face or
 * another detector: its light has left the face first.
 */
const PLANE_CLEARANCE = 1e-6;

export function compileSolids(description: Description, parts: readonly PlacedPart[]): CompiledSolids {
  const size = designSize(parts);
  const table = new SurfaceTable(size * RELATIVE_TOLERANCE);
  const faces: SceneFace[] = [];
  const primitives: ({ sides: SurfaceSide[]; faces: number[] } | { mesh: number; face: number })[] = [];
  const meshes: PlacedMesh[] = [];
  const pieceStart = [0];
  const pieceMember: number[] = [];
  // Owner 0, the surroundings, has no pieces.
  const ownerPieceStart = [0, 0];

  const members: FaceMember[][] = [];
  const addPart = (part: PlacedPart, owner: number) => {
    const own = new Map<string, number>();
    for (const { name, patch, hollow } of partFaces(part)) {
      own.set(name, faces.length);
      members.push([]);
      const reference = `${part.description.name}.${name}`;
      faces.push({ index: faces.length, reference, part, owner, patch, hollow, members: members[faces.length] });
    }
    // A hole in a part of several pieces is one primitive, met in each of them.
    const known = new Map<ConvexSolid, number>();
    return ({ prefix, solid }: NamedSolid): number => {
      const before = known.get(solid);
      if (before !== undefined) return before;
      const sides: SurfaceSide[] = [];
      const numbers = solid.faces.map(({ name, surface, patch }) => {
        const face = own.get(prefix + name) ?? -1;
        let handle: FaceMember['surface'];
        if (surface.kind === 'mesh') {
          if (surface.group === 0) meshes.push(surface.mesh);
          handle = { kind: 'mesh', index: meshes.length - 1, group: surface.group };
        } else {
          const side = table.add(surface);
          sides.push(side);
          handle = side.handle;
        }
        if (patch !== null) members[face].push({ patch, surface: handle });
        return face;
      });
      // A mesh is one surface, whatever the number of its faces, which are numbered in the order of its groups.
      if (sides.length === 0) primitives.push({ mesh: meshes.length - 1, face: numbers[0] });
      else primitives.push({ sides, faces: numbers });
      known.set(solid, primitives.length - 1);
      return primitives.length - 1;
    };
  };

  parts.forEach((part, i) => {
    const addPrimitive = addPart(part, i + 1);
    for (const { body, minus } of part.pieces) {
      pieceMember.push(addPrimitive(body));
      for (const hole of minus) pieceMember.push(addPrimitive(hole));
      pieceStart.push(pieceMember.length);
    }
    ownerPieceStart.push(pieceStart.length - 1);
  });

  const planes = new Map<string, SurfaceSide>();
  const detectorSpheres = new Map<string, number>();
  const clearance = PLANE_CLEARANCE * Math.max(1, size / 100);
  for (const { name, target } of description.detectors) {
    if (target.kind === 'sphere') {
      let radius = target.radius + clearance;
      const sphere = () => ({ kind: 'sphere', centre: target.centre, radius }) as const;
      while (!table.isFreeCurve(sphere())) radius += clearance;
      const { handle } = table.add(sphere());
      if (handle.kind === 'curve') detectorSpheres.set(name, handle.index);
    }
    if (target.kind !== 'plane') continue;
    const normal = snapDirection(normalise(target.normal));
    let offset = dot(normal, target.at) + clearance;
    while (!table.isFree(normal, offset)) offset += clearance;
    planes.set(name, table.add({ kind: 'plane', normal, offset }));
  }

  const { normals, starts, offsets, quadrics, curves, idOf } = table.finish();
  const primitiveStart = [0];
  const constraintSurface: number[] = [];
  const constraintSide: number[] = [];
  const constraintFace: number[] = [];
  for (const primitive of primitives) {
    if ('mesh' in primitive) {
      constraintSurface.push(offsets.length + curves + primitive.mesh);
      constraintSide.push(-1);
      constraintFace.push(primitive.face);
    } else {
      primitive.sides.forEach(({ handle, side }, k) => {
        constraintSurface.push(idOf(handle));
        constraintSide.push(side);
        constraintFace.push(primitive.faces[k]);
      });
    }
    primitiveStart.push(constraintSurface.length);
  }
  const detectorPlanes = new Map<string, { plane: number; sign: 1 | -1 }>();
  for (const [name, { handle, side }] of planes)
    detectorPlanes.set(name, { plane: idOf(handle), sign: -side as 1 | -1 });
  return {
    faces,
    normals,
    starts,
    offsets,
    quadrics,
    curves,
    meshes,
    primitiveStart,
    constraintSurface,
    constraintSide,
    constraintFace,
    pieceStart,
    pieceMember,
    ownerPieceStart,
    detectorPlanes,
    detectorSpheres,
  };
}

/** Longest side of the box round all parts, mm. */
export function designSize(parts: readonly PlacedPart[]): number {
  const axes: Vector3[] = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ];
  const ranges = axes.map((axis) => {
    const all = parts.flatMap((part) => partFaces(part).map(({ patch }) => patchRange(patch, axis)));
    return all.length === 0 ? 1 : Math.max(...all.map(([, b]) => b)) - Math.min(...all.map(([a]) => a));
  });
  return Math.max(...ranges);
}

/** Faults of face names used by exit, detectors and pumps. */
export function checkFaceReference(parts: readonly PlacedPart[], reference: string, path: Fault['path']): Fault | null {
  if (findFace(parts, reference) !== null) return null;
  return { code: 'unknown-name', severity: 'error', path, problem: 'no part has this face', found: reference };
}
