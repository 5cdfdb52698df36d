/** What pictures of a design need: its faces as triangles and edges, its pumps, and the ways of some histories. Lengths in mm. */
import type { TracedPath } from '../trace/traced-path.js';

/** x, y, z, x, y, z, … */
export type Coordinates = readonly number[];

export interface DrawnFace {
  /** 'part.face', as the design file and the ledger say. */
  readonly name: string;
  /** Name of the finish the design gives it, 'clear' where it gives none. */
  readonly finish: string;
  /** What kind of finish that is: 'clear', 'mirror', 'dichroic', … */
  readonly finishKind: string;
  readonly isExit: boolean;
  /** 9 numbers a triangle; corners run counterclockwise seen from outside the material. */
  readonly triangles: Coordinates;
  /** One outward unit normal a corner, as many numbers as `triangles`; curved faces are smooth. */
  readonly normals: Coordinates;
  /** 6 numbers a segment: rims and creases a draughtsman would draw, not the mesh. */
  readonly edges: Coordinates;
}

export interface DrawnPart {
  readonly name: string;
  /** Name of its medium in the design file. */
  readonly medium: string;
  readonly mediumKind: 'gas' | 'liquid' | 'solid';
  /** Holds a dye. */
  readonly dyed: boolean;
  readonly faces: readonly DrawnFace[];
  /** Low and high corner of the part's bounding box. */
  readonly bounds: readonly [low: Coordinates, high: Coordinates];
}

export interface DrawnPump {
  readonly name: string;
  readonly watts: number;
  readonly wavelengthNm: number;
  /** Middle of where its light starts, and the unit vector it sends it along. */
  readonly at: Coordinates;
  readonly direction: Coordinates;
  /** Outline of what emits: 6 numbers a segment. */
  readonly edges: Coordinates;
}

/** A detector in the open: a bounded plane, or a sphere with its axis for a normal; one too large to draw has no edges. */
export interface DrawnPlane {
  readonly name: string;
  readonly isExit: boolean;
  readonly normal: Coordinates;
  readonly edges: Coordinates;
}

export interface Drawing {
  readonly parts: readonly DrawnPart[];
  readonly pumps: readonly DrawnPump[];
  readonly planes: readonly DrawnPlane[];
  /** A few of every fate, so not in proportion to the ledger; none before tracing. */
  readonly paths: readonly TracedPath[];
  /** Histories that were traced to find them. */
  readonly pathsFrom: number;
}
