/**
 * All distinct surfaces of a scene: families of parallel planes, and quadrics. Coincident surfaces of different parts
 * become one entry, so crossing both is one event and no ray can slip between them.
 */
import type { Vector3 } from '../design/description.js';
import type { BoundarySurface } from './convex-solid.js';
import { quadricCoefficients, sameCurve } from './quadric.js';
import { cross, dot, length } from './vector.js';

/** Sine of the angle below which two planes count as parallel: 1e-9 mm over 10 mm. */
const PARALLEL = 1e-10;

type Curved = Exclude<BoundarySurface, { kind: 'plane' | 'mesh' }>;

/** A surface and the side of it that is inside: −1 below the offset or inside the quadric, +1 above. */
export interface SurfaceSide {
  readonly handle: PlaneHandle | CurveHandle;
  readonly side: -1 | 1;
}
export interface PlaneHandle {
  readonly kind: 'plane';
  readonly family: number;
  readonly offset: number;
}
export interface CurveHandle {
  readonly kind: 'curve';
  readonly index: number;
}

export class SurfaceTable {
  readonly #normals: Vector3[] = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ];
  readonly #offsets: number[][] = [[], [], []];
  readonly #curves: Curved[] = [];

  /** @param tolerance mm below which two parallel planes or two curves are one surface. */
  constructor(readonly tolerance: number) {}

  /** Meshes have no place here: each is a surface of its own. */
  add(surface: Exclude<BoundarySurface, { kind: 'mesh' }>): SurfaceSide {
    return surface.kind === 'plane' ? this.#addPlane(surface.normal, surface.offset) : this.#addCurve(surface);
  }

  /** Whether no plane of the table lies there yet. */
  isFree(normal: Vector3, offset: number): boolean {
    const family = this.#normals.findIndex((other) => length(cross(other, normal)) <= PARALLEL);
    if (family < 0) return true;
    const wanted = Math.sign(dot(normal, this.#normals[family])) * offset;
    return this.#offsets[family].every((other) => Math.abs(other - wanted) > this.tolerance);
  }

  /** Whether no curve of the table coincides with this one. */
  isFreeCurve(curve: Curved): boolean {
    return this.#curves.every((other) => !sameCurve(other, curve, this.tolerance));
  }

  #addPlane(normal: Vector3, offset: number): SurfaceSide {
    const family = this.#familyOf(normal);
    const along = Math.sign(dot(normal, this.#normals[family])) as -1 | 1;
    const wanted = along * offset;
    const offsets = this.#offsets[family];
    const known = offsets.find((other) => Math.abs(other - wanted) <= this.tolerance);
    if (known === undefined) offsets.push(wanted);
    return { handle: { kind: 'plane', family, offset: known ?? wanted }, side: along === 1 ? -1 : 1 };
  }

  #familyOf(normal: Vector3): number {
    const parallel = (other: Vector3) => length(cross(other, normal)) <= PARALLEL;
    const found = this.#normals.findIndex(parallel);
    if (found >= 0) return found;
    this.#normals.push(normal);
    this.#offsets.push([]);
    return this.#normals.length - 1;
  }

  #addCurve(surface: Curved): SurfaceSide {
    const found = this.#curves.findIndex((other) => sameCurve(other, surface, this.tolerance));
    if (found < 0) this.#curves.push(surface);
    return { handle: { kind: 'curve', index: found < 0 ? this.#curves.length - 1 : found }, side: -1 };
  }

  /** The flat arrays, and the surface id of a handle: planes in order of family and offset, then curves. */
  finish(): {
    normals: Vector3[];
    starts: number[];
    offsets: number[];
    quadrics: number[];
    curves: number;
    idOf: (handle: PlaneHandle | CurveHandle) => number;
  } {
    const sorted = this.#offsets.map((list) => list.toSorted((a, b) => a - b));
    const starts = [0];
    for (const list of sorted) starts.push(starts[starts.length - 1] + list.length);
    const planes = starts[starts.length - 1];
    const idOf = (handle: PlaneHandle | CurveHandle) =>
      handle.kind === 'curve'
        ? planes + handle.index
        : starts[handle.family] + sorted[handle.family].indexOf(handle.offset);
    const quadrics = this.#curves.flatMap(quadricCoefficients);
    return { normals: this.#normals, starts, offsets: sorted.flat(), quadrics, curves: this.#curves.length, idOf };
  }
}
