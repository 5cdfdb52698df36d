import type { Vector3 } from '../design/description.js';
import type { FaceReport } from '../scene/check-scene.js';
import { significant } from './number-format.js';
import { safeText } from './safe-text.js';
import type { TerminalStyle } from './terminal-style.js';

const HEADINGS = ['face', 'shape', 'centre, mm', 'normal', 'mm²', 'finish', 'touches'];
/** Samples on an edge count for neither side: nearly whole is whole. */
const WHOLE = 0.99;
/** Columns of numbers stand to the right. */
const AREA_COLUMN = 4;

/** The faces of a design, one a line, in columns as wide as they need to be. */
export function faceTable(faces: readonly FaceReport[], style: TerminalStyle): string[] {
  const rows = faces.map((face) => [
    safeText(`${face.part}.${face.face}`),
    face.shape,
    vectorText(face.centre, 5),
    vectorText(face.normal, 3),
    significant(face.areaMm2, 5),
    safeText(face.finish),
    touchText(face),
  ]);
  const table = [HEADINGS, ...rows];
  const widths = HEADINGS.map((_, column) => Math.max(...table.map((row) => [...(row[column] ?? '')].length)));
  return table.map((row, index) => {
    const text = row
      .map((cell, column) => {
        const gap = ' '.repeat((widths[column] ?? 0) - [...cell].length);
        return column === AREA_COLUMN ? gap + cell : cell + gap;
      })
      .join('  ')
      .trimEnd();
    return `  ${index === 0 ? style.bold(text) : text}`;
  });
}

function touchText(face: FaceReport): string {
  const touched = face.touches.map((name) => safeText(name)).join(', ');
  if (face.exposed === 0) return 'buried or cut away';
  return face.exposed < WHOLE ? `${touched} (${significant(100 * face.exposed, 2)} % exposed)` : touched;
}

/** Rounding noise of turned parts reads as 0. */
function vectorText(vector: Vector3, digits: number): string {
  return vector.map((value) => (Math.abs(value) < 1e-9 ? '0' : significant(value, digits))).join(', ');
}
