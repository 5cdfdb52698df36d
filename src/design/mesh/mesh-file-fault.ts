import type { FaultCode } from '../fault.js';

/** What is wrong with a mesh file, with its place there; of a binary file the byte is told in words. */
export interface MeshFileFault {
  readonly code: FaultCode;
  readonly problem: string;
  readonly found?: string;
  readonly expected?: string;
  readonly suggestion?: string;
  readonly line: number;
  readonly column: number;
}

/** Enough to see what is the matter. */
export const MOST_MESH_FAULTS = 20;
