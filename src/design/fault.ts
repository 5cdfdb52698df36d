/** Where in the design document something stands: keys and list indices from the root, e.g. ['parts','cell','box',0]. */
export type DesignPath = readonly (string | number)[];

/** Closed list of what can be wrong with a design. Documented in DEVELOPERS.md; tests pin each one. */
export type FaultCode =
  | 'file' // cannot be read, too large, binary, empty
  | 'yaml' // not well-formed YAML, duplicate key, alias bomb
  | 'missing' // a required field is absent
  | 'unknown-key'
  | 'unknown-name' // refers to a medium, finish, part, face, dye, … that does not exist
  | 'type' // a list where a number should be, …
  | 'quantity' // not a quantity, wrong unit, wrong dimension, bad arithmetic
  | 'range' // a number outside the physical range
  | 'geometry' // a shape or placement that makes no sense
  | 'finish' // a finish that cannot act or contradicts another one
  | 'unreachable' // an exit or pump that nothing reaches
  | 'energy' // R + T above 1
  | 'caution'; // suspicious, but traceable

/** One thing wrong with a design. `path` points at it; the reader of the file turns that into line and column. */
export interface Fault {
  readonly code: FaultCode;
  readonly severity: 'error' | 'warning';
  readonly path: DesignPath;
  /** What is wrong, one sentence without a full stop. */
  readonly problem: string;
  readonly found?: string;
  readonly expected?: string;
  /** The nearest right name, or the next step. */
  readonly suggestion?: string;
}

/** A fault with its place in the file (1-based). */
export interface LocatedFault extends Fault {
  readonly file: string;
  readonly line: number;
  readonly column: number;
}
