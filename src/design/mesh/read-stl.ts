/** STL, the two forms of the stereolithography interface: 80 bytes of heading, a count and 50 bytes a facet; or words. */
import { ByteText } from './byte-text.js';
import { LARGEST_COORDINATE_MM, MeshBuilder } from './mesh-builder.js';
import { type MeshFileFault, MOST_MESH_FAULTS } from './mesh-file-fault.js';

const HEADING = 84;
const RECORD = 50;

/** @param unit mm per unit of the file */
export function readStl(bytes: Uint8Array, unit: number, weld: number): { mesh: MeshBuilder; faults: MeshFileFault[] } {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const announced = bytes.length >= HEADING ? view.getUint32(80, true) : 0;
  // Some binary files begin with "solid" too: their length gives them away.
  if (bytes.length >= HEADING && bytes.length === HEADING + RECORD * announced) {
    return readBinary(view, announced, unit, weld);
  }
  if (isText(bytes)) return readText(bytes, unit, weld);
  const mesh = new MeshBuilder(unit, weld, 0);
  const whole = Math.max(0, Math.floor((bytes.length - HEADING) / RECORD));
  const problem =
    bytes.length < HEADING
      ? 'this is no STL file: it ends within the heading'
      : bytes.length < HEADING + RECORD * announced
        ? 'the file is cut off, or it is no STL file'
        : 'the file is longer than its heading says';
  const found = `${bytes.length} bytes, room for ${whole} facets`;
  const expected = `${HEADING + RECORD * announced} bytes for the ${announced} facets of the heading (byte 80), or a text that begins with "solid"`;
  return {
    mesh,
    faults: [{ code: 'file', problem, found, expected, suggestion: 'export the mesh again', line: 1, column: 1 }],
  };
}

function isText(bytes: Uint8Array): boolean {
  const text = new ByteText(bytes.subarray(0, 4096));
  return text.word() && text.is('solid') && !bytes.subarray(0, 4096).includes(0);
}

function readBinary(view: DataView, count: number, unit: number, weld: number) {
  const mesh = new MeshBuilder(unit, weld, count);
  const faults: MeshFileFault[] = [];
  const corner = [0, 0, 0];
  for (let facet = 0; facet < count && faults.length < MOST_MESH_FAULTS; facet++) {
    const at = HEADING + RECORD * facet;
    for (let k = 0; k < 3; k++) {
      const from = at + 12 + 12 * k;
      const [x, y, z] = [0, 4, 8].map((offset) => view.getFloat32(from + offset, true));
      corner[k] = mesh.point(x, y, z);
      if (corner[k] >= 0) continue;
      const problem = `corner ${k + 1} of facet ${facet + 1}, at byte ${from}, is not a place`;
      faults.push({ ...outOfRange(problem, `${x}, ${y}, ${z}`, unit), line: 1, column: 1 });
    }
    if (corner[0] >= 0 && corner[1] >= 0 && corner[2] >= 0) mesh.facet(corner[0], corner[1], corner[2]);
  }
  return { mesh, faults };
}

export const outOfRange = (problem: string, found: string, unit: number) =>
  ({
    code: 'range',
    problem,
    found,
    expected: `numbers from −${LARGEST_COORDINATE_MM / unit} to ${LARGEST_COORDINATE_MM / unit}, which is 100 m in the unit of the mesh`,
  }) as const;

/** `solid NAME`, then facets of `facet normal …`, `outer loop`, three times `vertex x y z`, `endloop`, `endfacet`, then `endsolid`. */
function readText(bytes: Uint8Array, unit: number, weld: number) {
  const mesh = new MeshBuilder(unit, weld, bytes.length / 250);
  const faults: MeshFileFault[] = [];
  const text = new ByteText(bytes);
  const complain = (problem: string, expected: string, found = text.text()) =>
    faults.push({ code: 'file', problem, found, expected, line: text.line, column: text.column });
  const corner = [0, 0, 0];
  let corners = 0;
  /** What the reader is within. */
  let within: 'nothing' | 'solid' | 'facet' = 'nothing';
  while (faults.length < MOST_MESH_FAULTS && text.word()) {
    if (within === 'facet') {
      if (text.is('vertex')) {
        const point = readPoint(text, mesh, faults);
        if (corners < 3) corner[corners] = point;
        corners++;
      } else if (text.is('endfacet')) {
        if (corners !== 3) complain('a facet needs three corners', '3 lines that begin with "vertex"', `${corners}`);
        else if (corner[0] >= 0 && corner[1] >= 0 && corner[2] >= 0) mesh.facet(corner[0], corner[1], corner[2]);
        within = 'solid';
      } else if (text.is('endsolid') || text.is('facet') || text.is('solid')) {
        complain('a facet is not ended', '"endfacet"');
        break;
      } else if (!text.is('outer') && !text.is('loop') && !text.is('endloop')) {
        complain('this word does not belong into a facet', '"vertex", "endloop" or "endfacet"');
      }
    } else if (within === 'solid' && text.is('facet')) {
      within = 'facet';
      corners = 0;
      // The normal is left: the order of the corners says which side is outside.
      text.restOfLine();
    } else if (within === 'solid' && text.is('endsolid')) {
      within = 'nothing';
      text.restOfLine();
    } else if (within === 'nothing' && text.is('solid')) {
      within = 'solid';
      mesh.startGroup(text.restOfLine());
    } else {
      complain('this word does not belong here', within === 'solid' ? '"facet" or "endsolid"' : '"solid"');
      break;
    }
  }
  if (faults.length === 0 && within !== 'nothing') {
    const problem = `the file is cut off: it ends within a ${within}`;
    const suggestion = 'export the mesh again';
    faults.push({
      code: 'file',
      problem,
      expected: '"endsolid" at the end',
      suggestion,
      line: text.line,
      column: text.column,
    });
  }
  return { mesh, faults };
}

/** Three numbers from here on. @returns the number of the point, −1 after telling what is wrong */
export function readPoint(text: ByteText, mesh: MeshBuilder, faults: MeshFileFault[]): number {
  let x = 0;
  let y = 0;
  let z = 0;
  const { line } = text;
  let column = 0;
  for (let k = 0; k < 3; k++) {
    const given = text.wordInLine();
    if (k === 0) column = text.column;
    const value = given ? text.number() : Number.NaN;
    if (Number.isNaN(value)) {
      const problem = 'a coordinate is not a number';
      faults.push({
        code: 'quantity',
        problem,
        found: text.text(),
        expected: 'three numbers',
        line,
        column: text.column,
      });
      return -1;
    }
    if (k === 0) x = value;
    else if (k === 1) y = value;
    else z = value;
  }
  const point = mesh.point(x, y, z);
  if (point < 0) {
    faults.push({ ...outOfRange('this is not a place', `${x}, ${y}, ${z}`, mesh.unit), line, column });
  }
  return point;
}
