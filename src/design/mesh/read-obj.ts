/** OBJ: vertices `v`, polygons `f`, groups `g`, objects `o`, materials `usemtl`. Normals, textures and smoothing say nothing about shape. */
import { GrowingIntegers } from '../../numerics/mesh/growing-array.js';
import { ByteText } from './byte-text.js';
import { MeshBuilder } from './mesh-builder.js';
import { type MeshFileFault, MOST_MESH_FAULTS } from './mesh-file-fault.js';
import { partPolygon } from './part-polygon.js';
import { readPoint } from './read-stl.js';

const MOST_CORNERS = 10_000;
const FREE_FORM = ['curv', 'curv2', 'surf', 'cstype'];

/**
 * @param unit mm per unit of the file
 * @param names what faces are called after: the group (or object, where there is no group), or the material
 */
export function readObj(
  bytes: Uint8Array,
  unit: number,
  weld: number,
  names: 'group' | 'material',
): { mesh: MeshBuilder; faults: MeshFileFault[] } {
  const mesh = new MeshBuilder(unit, weld, bytes.length / 60);
  const faults: MeshFileFault[] = [];
  const text = new ByteText(bytes);
  const vertices = new GrowingIntegers(bytes.length / 60);
  const polygon = new GrowingIntegers(8);
  let object = '';
  let group = '';
  let material = '';
  const complain = (problem: string, expected: string, found = text.text()) =>
    faults.push({ code: 'file', problem, found, expected, line: text.line, column: text.column });
  const rename = () => mesh.startGroup(names === 'material' ? material : group || object);
  do {
    if (!text.wordInLine()) continue;
    if (text.is('v')) vertices.push(readPoint(text, mesh, faults));
    else if (text.is('f')) {
      const sound = readPolygon(text, vertices, polygon, complain);
      if (!sound) continue;
      if (polygon.length === 3) mesh.facet(polygon.values[0], polygon.values[1], polygon.values[2]);
      else {
        const parts = partPolygon(mesh.coordinates, polygon.values.subarray(0, polygon.length));
        for (const [a, b, c] of parts) mesh.facet(a, b, c);
      }
    } else if (text.is('g')) {
      group = text.restOfLine();
      rename();
    } else if (text.is('o')) {
      object = text.restOfLine();
      group = '';
      rename();
    } else if (text.is('usemtl')) {
      material = text.restOfLine();
      if (names === 'material') rename();
    } else if (FREE_FORM.some((word) => text.is(word))) {
      complain('free-form curves and surfaces are not read', 'polygons, lines that begin with "f"');
    }
  } while (faults.length < MOST_MESH_FAULTS && text.nextLine());
  if (faults.length === 0 && mesh.facets === 0) {
    complain('the file has no polygon', 'lines that begin with "v" and "f"', 'none');
  }
  return { mesh, faults };
}

function readPolygon(
  text: ByteText,
  vertices: GrowingIntegers,
  polygon: GrowingIntegers,
  complain: (problem: string, expected: string, found?: string) => void,
): boolean {
  polygon.length = 0;
  let known = true;
  while (text.wordInLine()) {
    const number = vertexNumber(text.bytes, text.start, text.end);
    const index = number > 0 ? number - 1 : vertices.length + number;
    if (number === 0 || !(index >= 0 && index < vertices.length)) {
      complain('no vertex of this number stands above', `1 to ${vertices.length}, or −1 to −${vertices.length}`);
      return false;
    }
    const point = vertices.values[index];
    // Its fault has been told.
    if (point < 0) known = false;
    polygon.push(point);
    if (polygon.length > MOST_CORNERS) {
      complain('a polygon has too many corners', `at most ${MOST_CORNERS}`);
      return false;
    }
  }
  if (polygon.length >= 3) return known;
  complain('a polygon needs three corners', 'three vertex numbers', `${polygon.length}`);
  return false;
}

/** The number before the first slash; 0, which no vertex has, when there is none. */
function vertexNumber(bytes: Uint8Array, start: number, end: number): number {
  let at = start;
  const negative = bytes[at] === 45;
  if (negative) at++;
  let value = 0;
  for (; at < end && bytes[at] >= 48 && bytes[at] <= 57; at++) value = 10 * value + (bytes[at] - 48);
  if (at < end && bytes[at] !== 47) return 0;
  return negative ? -value : value;
}
