import { mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { readDesignText } from '../../../src/design/read-design.js';
import type { MeshFacets } from '../../../src/numerics/mesh/close-mesh.js';
import { boxFacets, icosphereFacets, joinFacets, turned } from '../../helpers/mesh-bodies.js';
import { binaryStl, objText, textStl } from '../../helpers/write-mesh.js';

const folder = mkdtempSync(join(tmpdir(), 'mesh-'));
afterAll(() => rmSync(folder, { recursive: true }));

const write = (name: string, content: string | Uint8Array) => {
  writeFileSync(join(folder, name), content);
  return name;
};

function read(mesh: string, exit = 'cell.top') {
  const text = `design: Loom strobe
media: { bath: { solvent: water, pH: 11, dyes: { fluorescein: 0.1 mmol/L } } }
parts:
  cell:
    mesh: { ${mesh} }
    medium: bath
pumps: { lamp: { patch: { disc: 1 mm }, power: 1 W, wavelength: 445 nm, at: [0 mm, -9 mm, 0 mm], direction: [0, 1, 0] } }
exit: ${exit}
`;
  return readDesignText(text, join(folder, 'strobe.yaml'));
}

/** Faults about the mesh. */
const faults = (mesh: string) => {
  const reading = read(mesh);
  return (reading.ok ? reading.warnings : reading.faults).filter(({ path }) => path.includes('mesh'));
};

const box = boxFacets([2, 2, 2]);
const dropFacet = (mesh: MeshFacets, facet: number): MeshFacets => ({
  ...mesh,
  corners: Int32Array.from([...mesh.corners].filter((_, i) => Math.floor(i / 3) !== facet)),
  group: Int32Array.from([...mesh.group].filter((_, i) => i !== facet)),
});

describe('mesh in a design', () => {
  test('faces are those of the file, or patches, or one', () => {
    write('box.obj', objText(box));
    mkdirSync(join(folder, 'deep'));
    write('deep/box.STL', textStl(box));
    const names = (mesh: string, exit: string) => {
      const reading = read(mesh, exit);
      if (!reading.ok) throw new Error(reading.faults.map(({ problem }) => problem).join());
      const { shape } = reading.description.parts[0].pieces[0];
      return shape.kind === 'mesh' ? shape.mesh.groups : [];
    };
    expect(names('file: box.obj, unit: mm', 'cell.top')).toEqual(['left', 'right', 'front', 'back', 'bottom', 'top']);
    expect(names('file: deep/box.STL, unit: cm', 'cell.top')).toHaveLength(6);
    expect(names('file: box.obj, unit: mm, faces-by: crease', 'cell.patch-6')).toHaveLength(6);
    expect(names('file: box.obj, unit: mm, faces-by: crease, crease: 100 deg', 'cell.patch-1')).toHaveLength(1);
    expect(names('file: box.obj, unit: mm, faces-by: none', 'cell.surface')).toEqual(['surface']);
    expect(names('file: box.obj, unit: mm, faces-by: material', 'cell.surface')).toEqual(['surface']);
  });

  test('a wrong face is told with those there are', () => {
    write('box.obj', objText(box));
    const reading = read('file: box.obj, unit: mm', 'cell.lid');
    expect(reading.ok).toBe(false);
  });

  test.each([
    ['open', dropFacet(box, 11), 'is open', '3 in open.obj, at (', 'close the holes'],
    ['inside', turned(box), 'inside out', '1 in inside.obj', 'turn-inside-out: yes'],
    [
      'cut',
      joinFacets(box, boxFacets([2, 2, 2], [0.7, 0.3, 0.2])),
      'cuts itself',
      'in cut.obj, for instance at (',
      'join',
    ],
  ])('%s: what is wrong, how often, where, and what to do', (name, mesh, problem, found, suggestion) => {
    write(`${name}.obj`, objText(mesh));
    const [fault] = faults(`file: ${name}.obj, unit: mm`);
    expect(fault).toMatchObject({ code: 'geometry', severity: 'error', line: 5 });
    expect(fault.problem).toContain(problem);
    expect(fault.found).toContain(found);
    expect(fault.suggestion).toContain(suggestion);
  });

  test('corners that miss each other by a little: the weld that mends it is named, and mends it', () => {
    const apart = { ...box, points: new Float64Array(108), corners: Int32Array.from({ length: 36 }, (_, i) => i) };
    for (let i = 0; i < 36; i++) {
      for (let c = 0; c < 3; c++)
        apart.points[3 * i + c] = box.points[3 * box.corners[i] + c] + 1e-6 * ((i * 7 + c) % 5);
    }
    write('loose.obj', objText(apart));
    const [fault] = faults('file: loose.obj, unit: mm');
    expect(fault.suggestion).toMatch(/^weld: \S+ mm closes it$/);
    expect(faults(`file: loose.obj, unit: mm, ${fault.suggestion?.replace(' closes it', '')}`)).toEqual([]);
  });

  test('turned on request; degenerate facets are dropped with a warning', () => {
    write('inside.obj', objText(turned(icosphereFacets(1, 1))));
    expect(faults('file: inside.obj, unit: mm, turn-inside-out: yes')).toEqual([]);
    write('slivers.obj', `${objText(box)}f 1 1 2\n`);
    expect(faults('file: slivers.obj, unit: mm')).toMatchObject([{ code: 'caution', severity: 'warning' }]);
  });

  test('faults of the file have its name, line and column; of a binary file the byte', () => {
    write('bad.obj', 'v 0 0 0\nv 1 x 0\n');
    expect(faults('file: bad.obj, unit: mm')[0]).toMatchObject({ file: join(folder, 'bad.obj'), line: 2, column: 5 });
    const half = binaryStl(box);
    write('half.stl', half.subarray(0, 400));
    expect(faults('file: half.stl, unit: mm')[0]).toMatchObject({
      file: join(folder, 'half.stl'),
      problem: expect.stringContaining('cut off'),
    });
  });

  test.each([
    ['../strobe.obj', 'leaves the folder'],
    ['/etc/hosts.obj', 'leaves the folder'],
    ['link.obj', 'leads nowhere'],
    ['absent.obj', 'no such file'],
    ['deep', 'not a file'],
    ['notes.txt', 'kind of mesh'],
  ])('%s is refused', (file, problem) => {
    mkdirSync(join(folder, 'deep'), { recursive: true });
    write('notes.txt', 'hello');
    if (file === 'link.obj') symlinkSync(join(folder, 'nowhere'), join(folder, 'link.obj'));
    expect(faults(`file: ${file}, unit: mm`)[0].problem).toContain(problem);
  });

  test('a crease without patches, a negative weld, an unknown unit', () => {
    write('box.obj', objText(box));
    expect(faults('file: box.obj, unit: mm, crease: 20 deg')[0].problem).toContain('no meaning');
    expect(faults('file: box.obj, unit: mm, weld: -1 um')[0].code).toBe('range');
    expect(faults('file: box.obj, unit: furlong')[0].code).toBe('unknown-name');
  });
});
