/** A mesh as written -> a closed mesh, or what is wrong with its file and where. */
import { closeMesh, type MeshClosing, type MeshFacets, type MeshProblem } from '../../numerics/mesh/close-mesh.js';
import type { ShapeDescription } from '../description.js';
import type { DesignPath } from '../fault.js';
import type { ShapeFields } from '../part-fields.js';
import type { Reading } from '../reading.js';
import type { MeshBuilder } from './mesh-builder.js';
import type { MeshFileFault } from './mesh-file-fault.js';
import { readObj } from './read-obj.js';
import { readStl } from './read-stl.js';

type MeshFields = NonNullable<ShapeFields['mesh']>;
type MeshShape = Extract<ShapeDescription, { kind: 'mesh' }>;

const UNIT_MM = { mm: 1, um: 1e-3, cm: 10, m: 1000, in: 25.4 } as const;
const CREASE = Math.PI / 6;
/** Each face costs a place in every region of the scene. */
const MOST_GROUPS = 500;
/** Shares of the size of a mesh that are tried to see whether welding would close it. */
const WELDS = [1e-7, 1e-6, 1e-5, 1e-4];

export function describeMesh(fields: MeshFields, path: DesignPath, reading: Reading): MeshShape | null {
  // What could not be read has been told.
  if (fields.file === '' || Number.isNaN(fields.weld) || Number.isNaN(fields.crease)) return null;
  if (fields.crease !== null && fields['faces-by'] !== 'crease') {
    const problem = 'crease has no meaning without `faces-by: crease`';
    reading.report({ code: 'geometry', path: [...path, 'crease'], problem, expected: '`faces-by: crease`' });
  }
  const file = [...path, 'file'];
  const source = reading.readMesh(fields.file);
  if (!source.ok) {
    const { problem, expected = 'an STL or OBJ file in the folder of the design', suggestion } = source;
    const hint = suggestion === undefined ? {} : { suggestion };
    reading.report({ code: 'file', path: file, problem, found: fields.file, expected, ...hint });
    return null;
  }
  const parsed = parseMesh(source.bytes, fields);
  if (parsed === null) {
    const problem = 'this kind of mesh is not read';
    reading.report({
      code: 'file',
      path: file,
      problem,
      found: fields.file,
      expected: 'a name that ends in .stl or .obj',
    });
    return null;
  }
  for (const { line, column, ...fault } of parsed.faults) {
    reading.report({ ...fault, path: file }, { file: source.file, line, column });
  }
  if (parsed.faults.length > 0) return null;
  const facets = parsed.mesh.finish();
  if (facets.groups.length > MOST_GROUPS) {
    const problem = 'the mesh has too many named faces';
    const found = `${facets.groups.length}`;
    const suggestion = '`faces-by: crease` or `faces-by: none`';
    reading.report({ code: 'range', path: file, problem, found, expected: `at most ${MOST_GROUPS}`, suggestion });
    return null;
  }
  return close(facets, fields, file, reading, () => weldThatCloses(source.bytes, fields));
}

/** null when the name of the file does not say what it is. */
function parseMesh(
  bytes: Uint8Array,
  { file, unit, weld, 'faces-by': by }: MeshFields,
): { mesh: MeshBuilder; faults: readonly MeshFileFault[] } | null {
  if (/\.stl$/i.test(file)) return readStl(bytes, UNIT_MM[unit], weld);
  if (/\.obj$/i.test(file)) return readObj(bytes, UNIT_MM[unit], weld, by === 'material' ? 'material' : 'group');
  return null;
}

function closeAs(facets: MeshFacets, fields: MeshFields): MeshClosing {
  const crease = fields['faces-by'] === 'crease' ? (fields.crease ?? CREASE) : null;
  const plain = fields['faces-by'] === 'none' ? { group: facets.group.map(() => 0), groups: ['surface'] } : {};
  return closeMesh({ ...facets, ...plain }, { turnInsideOut: fields['turn-inside-out'] === 'yes', crease });
}

function close(
  facets: MeshFacets,
  fields: MeshFields,
  path: DesignPath,
  reading: Reading,
  closingWeld: () => string | null,
): MeshShape | null {
  const closing = closeAs(facets, fields);
  if (closing.ok) {
    const { mesh, notes } = closing;
    if (notes.dropped > 0) {
      const problem = `${notes.dropped} facets of the mesh are left out because two of their corners are one`;
      reading.report({ code: 'caution', severity: 'warning', path, problem, found: fields.file });
    }
    return { kind: 'mesh', mesh };
  }
  for (const problem of closing.problems) {
    const weld = problem.kind === 'open' ? closingWeld() : null;
    reading.report({ ...wordsFor(problem, weld), code: 'geometry', path, found: foundText(problem, fields.file) });
  }
  return null;
}

/** The least weld among a few that makes the mesh closed, as the design would say it. */
function weldThatCloses(bytes: Uint8Array, fields: MeshFields): string | null {
  const size = parseMesh(bytes, fields)?.mesh.size ?? 0;
  for (const share of WELDS) {
    const weld = Number((size * share).toPrecision(1));
    if (weld <= fields.weld || weld > 1) continue;
    const parsed = parseMesh(bytes, { ...fields, weld });
    if (parsed === null || parsed.faults.length > 0) return null;
    const closing = closeAs(parsed.mesh.finish(), { ...fields, weld });
    if (closing.ok || closing.problems.every(({ kind }) => kind !== 'open')) return `weld: ${weld} mm`;
  }
  return null;
}

function foundText({ count, more, places, kind }: MeshProblem, file: string): string {
  if (kind === 'empty') return file;
  const spots = places.map((place) => `(${place.map((value) => Number(value.toPrecision(6))).join(', ')})`).join(', ');
  const counted = more ? `more than ${count}` : `${count}`;
  return `${counted} in ${file}, ${places.length < count ? 'for instance at' : 'at'} ${spots} mm`;
}

function wordsFor({ kind }: MeshProblem, weld: string | null) {
  switch (kind) {
    case 'empty':
      return { problem: 'the mesh has no facets', expected: 'at least four triangles' };
    case 'open':
      return {
        problem: 'the mesh is open: it has edges with a facet on one side only',
        expected: 'every edge between exactly two facets',
        suggestion: weld === null ? 'close the holes where the mesh was made' : `${weld} closes it`,
      };
    case 'crowded':
      return {
        problem: 'the mesh has edges with more than two facets',
        expected: 'every edge between exactly two facets',
        suggestion: 'part the bodies that touch there, or take out inner walls',
      };
    case 'twisted':
      return {
        problem: 'facets side by side look opposite ways: one out, one in',
        expected: 'corners counter-clockwise as seen from outside, in every facet',
        suggestion: 'unify the normals where the mesh was made',
      };
    case 'self-cutting':
      return {
        problem: 'the mesh cuts itself, or lies on itself: pairs of facets cross',
        expected: 'facets that meet at edges and corners only',
        suggestion: 'join the bodies to one where the mesh was made, or make them parts of their own: later ones win',
      };
    case 'inside-out':
      return {
        problem: 'the mesh is inside out: shells of it look into the solid',
        expected:
          'corners counter-clockwise as seen from outside; inner shells, the walls of cavities, look into the cavity',
        suggestion: '`turn-inside-out: yes`',
      };
  }
}
