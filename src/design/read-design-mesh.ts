/** Meshes beside a design. */
import { type CompanionFile, readCompanionFile } from './read-companion-file.js';

/** How a reading gets at the bytes of a mesh; the file system stays behind it. */
export type MeshFileReader = (name: string) => CompanionFile;

/** 20 million facets as binary STL. */
const RULES = { what: 'mesh', largestBytes: 1_000_000_000, pattern: /\.(stl|obj)$/i } as const;

/** Reader of the meshes of the design in `designFile`. */
export const meshReader =
  (designFile: string): MeshFileReader =>
  (name) =>
    readCompanionFile(designFile, name, RULES);
