/** Detectors and exit as written -> those of the description. */

import { describeOutline } from './describe-beam.js';
import { checkFace, type FaceIndex } from './describe-parts.js';
import { checkDirection } from './describe-pumps.js';
import type { DetectorDescription, DetectorTarget, ExitDescription, Vector2 } from './description.js';
import type { DesignRecord } from './design-fields.js';
import type { DesignPath } from './fault.js';
import { checkReference } from './names.js';
import type { DetectorRecord } from './pump-fields.js';
import type { Reading } from './reading.js';

const MOST_PIXELS = 4_000_000;

export function describeDetectors(design: DesignRecord, faces: FaceIndex, reading: Reading): DetectorDescription[] {
  return design.detectors.flatMap(({ name, path, value }) => {
    const target = describeTarget(value, path, faces, reading);
    checkCells(value.pixels, [...path, 'pixels'], 'pixels', reading);
    return target === null ? [] : [{ name, path, target, pixels: value.pixels }];
  });
}

function describeTarget(
  { face, plane }: DetectorRecord,
  path: DesignPath,
  faces: FaceIndex,
  reading: Reading,
): DetectorTarget | null {
  if (face !== null) {
    checkFace(face, faces, 'no part has this face', reading);
    return { kind: 'face', face: face.name };
  }
  if (plane === null) return null;
  checkDirection(plane.normal, [...path, 'plane', 'normal'], reading);
  return { kind: 'plane', at: plane.at, normal: plane.normal, outline: describeOutline(plane) };
}

export function describeExit(design: DesignRecord, faces: FaceIndex, reading: Reading): ExitDescription {
  const { face, pixels } = design.exit;
  checkCells(pixels, ['exit', 'pixels'], 'pixels', reading);
  const detectors = design.detectors.map(({ name }) => name);
  const isDetector = detectors.includes(face.name);
  if (!isDetector && face.name.includes('.')) checkFace(face, faces, 'no part has this face', reading);
  else if (!isDetector) {
    const all = [...faces].flatMap(([part, own]) => (own ?? []).map((each) => `${part}.${each}`));
    // The bare name of a part lacks only the face; its own faces are then what is looked for.
    const own = all.filter((each) => each.startsWith(`${face.name}.`));
    const problem = 'no detector has this name, and it is not part.face';
    checkReference(face, own.length > 0 ? own : [...detectors, ...all], problem, reading);
  }
  return { name: face.name, path: face.path, pixels };
}

/** A map or voxel grid must fit into memory, several times over. */
export function checkCells(
  cells: readonly number[] | Vector2 | null,
  path: DesignPath,
  word: string,
  reading: Reading,
): void {
  const total = (cells ?? []).reduce((product, each) => product * each, 1);
  if (!(total > MOST_PIXELS)) return;
  const expected = `at most ${MOST_PIXELS} ${word}`;
  reading.report({ code: 'range', path, problem: 'the grid is too fine', found: `${total} ${word}`, expected });
}
