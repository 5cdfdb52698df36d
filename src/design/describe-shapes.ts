/** Shapes as written -> shapes of the description; checks that each is a convex solid. */

import { describeOptics } from './describe-optics.js';
import type { ShapeDescription, Vector2 } from './description.js';
import type { DesignPath } from './fault.js';
import { checkName } from './form-record.js';
import { describeMesh } from './mesh/describe-mesh.js';
import { reportRepeatedNames } from './names.js';
import type { ShapeFields } from './part-fields.js';
import type { Reading } from './reading.js';

type Given<Key extends keyof ShapeFields> = NonNullable<ShapeFields[Key]>;

/** The shape among the fields, or null when there is none or it makes no sense; then the fault is told. */
export function describeShape(fields: ShapeFields, path: DesignPath, reading: Reading): ShapeDescription | null {
  const { box, prism, cylinder, cone, sphere, cap, mesh } = fields;
  if (box !== null) return { kind: 'box', size: box };
  if (prism !== null) return describePrism(prism, [...path, 'prism'], reading);
  if (cylinder !== null) return { kind: 'cylinder', radius: radiusOf(cylinder), height: cylinder.height };
  if (cone !== null) return describeCone(cone, [...path, 'cone'], reading);
  if (sphere !== null) return { kind: 'sphere', radius: radiusOf(sphere) };
  if (mesh !== null) return describeMesh(mesh, [...path, 'mesh'], reading);
  if (cap !== null) return describeCap(cap, [...path, 'cap'], reading);
  return describeOptics(fields, path, reading);
}

const half = (diameter: number | null): number => (diameter === null ? Number.NaN : diameter / 2);
const radiusOf = ({ radius, diameter }: Given<'sphere'> | Given<'cylinder'>): number => radius ?? half(diameter);

function describeCone(cone: Given<'cone'>, path: DesignPath, reading: Reading): ShapeDescription {
  const bottomRadius = cone['bottom-radius'] ?? half(cone['bottom-diameter']);
  const topRadius = cone['top-radius'] ?? half(cone['top-diameter']);
  if (bottomRadius === 0 && topRadius === 0) {
    const problem = 'a cone that is pointed at both ends has no volume';
    reading.report({ code: 'geometry', path, problem, expected: 'a radius above 0 mm at one end' });
  }
  return { kind: 'cone', bottomRadius, topRadius, height: cone.height };
}

function describeCap(cap: Given<'cap'>, path: DesignPath, reading: Reading): ShapeDescription {
  const radius = radiusOf(cap);
  if (cap.height > 2 * radius) {
    const expected = `at most the diameter, ${2 * radius} mm`;
    const found = `${cap.height} mm`;
    const problem = 'the cap is higher than its sphere';
    reading.report({ code: 'geometry', path: [...path, 'height'], problem, found, expected });
  }
  return { kind: 'cap', radius, height: cap.height };
}

/** Counter-clockwise as seen from +z; names stay with their edges when the outline is turned round. */
function describePrism(prism: Given<'prism'>, path: DesignPath, reading: Reading): ShapeDescription | null {
  const { outline, height, sides } = prism;
  if (outline.length === 0 || outline.flat().some(Number.isNaN)) return null;
  const named = checkSides(sides, outline.length, path, reading);
  const turns = outlineTurns(outline);
  const orientation = Math.sign(turns.reduce((sum, turn) => sum + turn, 0));
  const wrong = turns.findIndex((turn) => turn * orientation <= 0);
  // A star turns the same way at every corner, but more than once round.
  const rounds = turns.reduce((sum, turn) => sum + Math.abs(turn), 0) / (2 * Math.PI);
  if (orientation === 0 || wrong >= 0 || rounds > 1.5) {
    const corner = Math.max(0, wrong);
    reading.report({
      code: 'geometry',
      path: [...path, 'outline', corner],
      problem: wrong < 0 ? 'the outline crosses itself' : 'the outline is not convex at this corner',
      found: `[${outline[corner].map((value) => `${value} mm`).join(', ')}]`,
      expected: 'corners in order round a convex outline, none twice or on a straight side',
      suggestion: 'build other outlines from convex pieces with `union` or `minus`',
    });
    return null;
  }
  if (!named) return null;
  if (orientation > 0) return { kind: 'prism', outline, height, sides };
  // Edge i of the turned outline is edge n−2−i of the written one, and the last closes both.
  const n = outline.length;
  const names = sides ?? outline.map((_, i) => `side-${i + 1}`);
  return {
    kind: 'prism',
    outline: outline.toReversed(),
    height,
    sides: names.map((_, i) => names[(2 * n - 2 - i) % n]),
  };
}

/** Angle by which the outline turns at each corner, −π to π; 0 where a corner is double or straight. */
function outlineTurns(outline: readonly Vector2[]): number[] {
  const n = outline.length;
  return outline.map((corner, i) => {
    const [before, after] = [outline[(i + n - 1) % n], outline[(i + 1) % n]];
    const [ax, ay] = [corner[0] - before[0], corner[1] - before[1]];
    const [bx, by] = [after[0] - corner[0], after[1] - corner[1]];
    const cross = ax * by - ay * bx;
    const scale = Math.hypot(ax, ay) * Math.hypot(bx, by);
    return Math.abs(cross) <= 1e-9 * scale ? 0 : Math.atan2(cross, ax * bx + ay * by);
  });
}

/** False when there is not a name for each edge: then nothing can be said about names of faces. */
function checkSides(sides: readonly string[] | null, edges: number, path: DesignPath, reading: Reading): boolean {
  if (sides === null) return true;
  const at = [...path, 'sides'];
  if (sides.length !== edges) {
    const problem = 'the number of names is not that of the sides';
    const expected = `${edges} names, one for each edge of the outline`;
    // An empty list is one that could not be read.
    if (sides.length > 0) {
      reading.report({ code: 'geometry', path: at, problem, found: `${sides.length} names`, expected });
    }
    return false;
  }
  const taken = new Map(['bottom', 'top', 'others'].map((name) => [name, 'this name has a meaning of its own']));
  sides.forEach((name, i) => {
    if (name !== '') checkName(name, [...at, i], null, taken, reading);
  });
  reportRepeatedNames(
    sides.map((name, i) => ({ name, path: [...at, i] })),
    reading,
  );
  return true;
}
