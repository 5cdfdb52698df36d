import type { PackedDrawing, PackedFace, PackedPart, PackedPath, PackedPlane, PackedPump } from './packed-drawing.js';

export interface OpenFace extends PackedFace {
  /** mm, 3 a vertex. */
  readonly positions: Float32Array;
  readonly normals: Float32Array;
  readonly corners: Uint16Array;
  /** mm, 6 an edge. */
  readonly outline: Float32Array;
}

export interface OpenPath extends PackedPath {
  /** mm, 3 a point. */
  readonly way: Float32Array;
  /** Light index of each segment. */
  readonly lights: Uint8Array;
}

export interface OpenDrawing {
  readonly parts: readonly (Omit<PackedPart, 'faces'> & { readonly faces: readonly OpenFace[] })[];
  readonly pumps: readonly (PackedPump & { readonly outline: Float32Array })[];
  readonly planes: readonly (PackedPlane & { readonly outline: Float32Array })[];
  readonly fates: PackedDrawing['fates'];
  readonly paths: readonly OpenPath[];
  /** Red, green, blue of each light index. */
  readonly colours: Uint8Array;
}

/** The packed drawing opened again, in mm. */
export function unpackDrawing(packed: PackedDrawing): OpenDrawing {
  const { low, step } = packed;
  const millimetres = (cells: Uint16Array): Float32Array =>
    Float32Array.from(cells, (cell, i) => low[i % 3] + step * cell);
  const vertices = reader(words16(packed.vertices));
  const normals = reader(new Int8Array(bytesOf(packed.normals).buffer));
  const corners = reader(words16(packed.corners));
  const edges = reader(words16(packed.edges));
  const points = reader(words16(packed.points));
  const lights = reader(bytesOf(packed.lights));
  const outline = (count: number) => millimetres(edges(6 * count));
  const parts = packed.parts.map((part) => ({
    ...part,
    faces: part.faces.map((face) => ({
      ...face,
      positions: millimetres(vertices(3 * face.vertices)),
      normals: Float32Array.from(normals(3 * face.vertices), (value) => value / 127),
      corners: corners(3 * face.triangles).slice(),
      outline: outline(face.edges),
    })),
  }));
  return {
    parts,
    pumps: packed.pumps.map((pump) => ({ ...pump, outline: outline(pump.edges) })),
    planes: packed.planes.map((plane) => ({ ...plane, outline: outline(plane.edges) })),
    fates: packed.fates,
    paths: packed.paths.map(([fate, count, pumpSegments, cutAfter]) => ({
      fate,
      points: count,
      pumpSegments,
      cutAfter,
      way: millimetres(points(3 * count)),
      lights: lights(count - 1).slice(),
    })),
    colours: bytesOf(packed.colours),
  };
}

/** Takes the next so many numbers each time it is asked. */
function reader<T extends Uint8Array | Int8Array | Uint16Array>(all: T): (count: number) => T {
  let at = 0;
  return (count) => {
    const taken = all.subarray(at, at + count) as T;
    at += count;
    return taken;
  };
}

const words16 = (text: string): Uint16Array => new Uint16Array(bytesOf(text).buffer);
const bytesOf = (text: string): Uint8Array<ArrayBuffer> => Uint8Array.from(atob(text), (c) => c.charCodeAt(0));
