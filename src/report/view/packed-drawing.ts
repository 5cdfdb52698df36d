/** A drawing as the page carries it to its 3D view: names and counts as JSON, numbers as base64. Shared by page and browser. */
import type { Group } from '../ledger-words.js';

export interface PackedFace {
  readonly name: string;
  readonly finish: string;
  readonly finishKind: string;
  readonly isExit: boolean;
  /** How many vertices, triangles and edges of the common arrays are this face's. */
  readonly vertices: number;
  readonly triangles: number;
  readonly edges: number;
}

export interface PackedPart {
  readonly name: string;
  readonly medium: string;
  readonly dyed: boolean;
  readonly low: readonly number[];
  readonly high: readonly number[];
  readonly faces: readonly PackedFace[];
}

export interface PackedPump {
  readonly name: string;
  readonly watts: number;
  readonly wavelengthNm: number;
  /** Where its arrow ends and begins, mm; see pump-arrow.ts. */
  readonly tip: readonly number[];
  readonly tail: readonly number[];
  readonly at: readonly number[];
  readonly edges: number;
}

export interface PackedPlane {
  readonly name: string;
  readonly isExit: boolean;
  readonly edges: number;
}

/** One way to end, of the paths at hand. */
export interface PackedFate {
  readonly fate: string;
  readonly light: string;
  readonly where: string | null;
  readonly group: Group;
  readonly words: string;
  readonly paths: number;
}

export interface PackedPath {
  /** Index into `fates`. */
  readonly fate: number;
  readonly points: number;
  readonly pumpSegments: number;
  /** −1 when whole. */
  readonly cutAfter: number;
}

export interface PackedDrawing {
  /** Corner and side of the grid on which all coordinates lie, mm. */
  readonly low: readonly number[];
  readonly step: number;
  readonly parts: readonly PackedPart[];
  readonly pumps: readonly PackedPump[];
  readonly planes: readonly PackedPlane[];
  readonly fates: readonly PackedFate[];
  /** [fate, points, pumpSegments, cutAfter], the fates taking turns, so that the first n of them are a fair choice. */
  readonly paths: readonly (readonly [number, number, number, number])[];
  /** Uint16, 3 a vertex. */
  readonly vertices: string;
  /** Int8, 3 a vertex, of 127. */
  readonly normals: string;
  /** Uint16, 3 a triangle, counted from the first vertex of the face. */
  readonly corners: string;
  /** Uint16, 6 an edge: of all faces, then pumps, then planes. */
  readonly edges: string;
  /** Uint16, 3 a point. */
  readonly points: string;
  /** Uint8, one a segment: see light-index.ts. */
  readonly lights: string;
  /** Uint8, 3 an index: red, green, blue of the light. */
  readonly colours: string;
}
