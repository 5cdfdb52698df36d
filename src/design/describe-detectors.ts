/** Detectors and exit as written -> those of the description. */

import { describeOutline } from './describe-beam.js';
import { checkFace, type FaceIndex } from './describe-parts.js';
import { checkDirection } from './describe-pumps.js';
import type { DetectorDescription, DetectorTarget, ExitDescription } from './description.js';
import type { DesignRecord } from './design-fields.js';
import type { DesignPath } from './fault.js';
import { checkReference } from './names.js';
import type { DetectorRecord } from './pump-fields.js';
import type { Reading } from './reading.js';

const MOST_PIXELS = 4_000_000;
/** Every thread keeps two halves of 8 bytes a cell, and the table in the run folder has a row for each. */
const MOST_RADIANCE_CELLS = 500_000;

export function describeDetectors(design: DesignRecord, faces: FaceIndex, reading: Reading): DetectorDescription[] {
  return design.detectors.flatMap(({ name, path, value }) => {
    const target = describeTarget(value, path, faces, reading);
    checkCells(value.pixels, [...path, 'pixels'], 'pixels', reading);
    checkCells(value.radiance, [...path, 'radiance'], 'cells', reading, MOST_RADIANCE_CELLS);
    return target === null ? [] : [{ name, path, target, pixels: value.pixels, radiance: value.radiance }];
  });
}

function describeTarget(
  { face, plane, sphere }: DetectorRecord,
  path: DesignPath,
  faces: FaceIndex,
  reading: Reading,
): DetectorTarget | null {
  if (face !== null) {
    checkFace(face, faces, 'no part has this face', reading);
    return { kind: 'face', face: face.name };
  }
  if (sphere !== null) return describeSphere(sphere, [...path, 'sphere'], reading);
  if (plane === null) return null;
  checkDirection(plane.normal, [...path, 'plane', 'normal'], reading);
  return { kind: 'plane', at: plane.at, normal: plane.normal, outline: describeOutline(plane) };
}

function describeSphere(
  { centre, radius, axis, polar }: NonNullable<DetectorRecord['sphere']>,
  path: DesignPath,
  reading: Reading,
): DetectorTarget {
  checkDirection(axis, [...path, 'axis'], reading);
  const [from, to] = polar.map((angle) => Number(((angle * 180) / Math.PI).toPrecision(6)));
  if (!(to > from)) {
    const problem = 'the part of the sphere is empty';
    const expected = 'two angles, the smaller one first';
    reading.report({ code: 'range', path: [...path, 'polar'], problem, found: `${from} deg to ${to} deg`, expected });
  }
  return { kind: 'sphere', centre, radius, axis, polar };
}

export function describeExit(design: DesignRecord, faces: FaceIndex, reading: Reading): ExitDescription {
  const { face, pixels, radiance } = design.exit;
  checkCells(pixels, ['exit', 'pixels'], 'pixels', reading);
  checkCells(radiance, ['exit', 'radiance'], 'cells', reading, MOST_RADIANCE_CELLS);
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
  return { name: face.name, path: face.path, pixels, radiance };
}

/** A map or voxel grid must fit into memory, several times over. */
export function checkCells(
  cells: readonly number[] | null,
  path: DesignPath,
  word: string,
  reading: Reading,
  most = MOST_PIXELS,
): void {
  const total = (cells ?? []).reduce((product, each) => product * each, 1);
  if (!(total > most)) return;
  const expected = `at most ${most} ${word}`;
  reading.report({ code: 'range', path, problem: 'the grid is too fine', found: `${total} ${word}`, expected });
}
