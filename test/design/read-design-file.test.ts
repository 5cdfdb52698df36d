import { mkdir, mkdtemp, open, rm, symlink, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { readDesign } from '../../src/design/read-design.js';
import { starterDesign } from '../../src/design/starter-design.js';

let folder = '';
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'stokeswell-read-'));
  await mkdir(join(folder, 'designs', 'tables'), { recursive: true });
  await writeFile(join(folder, 'designs', 'cell.yaml'), starterDesign());
  await writeFile(join(folder, 'outside.csv'), TABLE);
});
afterAll(() => rm(folder, { recursive: true, force: true }));

const HEADING = 'wavelength_nm,angle_deg,reflectance,transmittance';
const TABLE = `# invented\n${HEADING}\n450,0,0.05,0.95\n450,45,0.1,0.8\n550,0,0.98,0.01\n550,45,0.7,0.2\n`;
const inFolder = (name: string) => join(folder, 'designs', name);

async function faultsOf(name: string) {
  const reading = await readDesign(inFolder(name));
  if (reading.ok) throw new Error(`${name} was accepted`);
  return reading.faults;
}

/** A design whose blue-pass is the table at `path`. */
async function readWithTable(path: string) {
  const design = starterDesign().replace(/\{ dichroic: .*\} \}/, `{ table: ${JSON.stringify(path)} }`);
  await writeFile(inFolder('tabled.yaml'), design);
  return readDesign(inFolder('tabled.yaml'));
}

async function tableFault(path: string) {
  const reading = await readWithTable(path);
  if (reading.ok) throw new Error(`${path} was accepted`);
  return reading.faults;
}

test('a design on disk', async () => {
  const reading = await readDesign(inFolder('cell.yaml'));
  expect(reading.ok && reading.file).toBe(inFolder('cell.yaml'));
  expect(reading.ok && reading.text).toBe(starterDesign());
});

test('a missing file is answered with the nearest one', async () => {
  expect(await faultsOf('cel.yaml')).toMatchObject([
    {
      code: 'file',
      problem: 'there is no such file',
      found: 'cel.yaml',
      suggestion: inFolder('cell.yaml'),
      line: 1,
      column: 1,
    },
  ]);
  expect((await faultsOf('cell.yml'))[0].suggestion).toBe(inFolder('cell.yaml'));
  expect(await faultsOf('nowhere/cell.yaml')).toMatchObject([{ code: 'file', problem: 'there is no such file' }]);
  expect(await faultsOf('cell.yaml/cell.yaml')).toMatchObject([{ code: 'file', problem: 'there is no such file' }]);
});

test('a folder is no design', async () => {
  expect(await faultsOf('')).toMatchObject([{ code: 'file', problem: 'this is not a file', found: 'a folder' }]);
});

test('empty, binary and wrongly encoded files', async () => {
  await writeFile(inFolder('empty.yaml'), '');
  await writeFile(inFolder('binary.yaml'), Uint8Array.from([0x7f, 0x45, 0x4c, 0x46, 0, 1, 2]));
  await writeFile(inFolder('latin.yaml'), Uint8Array.from([0x64, 0x3a, 0x20, 0xb5, 0x6d]));
  expect(await faultsOf('empty.yaml')).toMatchObject([{ code: 'file', problem: 'the file is empty' }]);
  expect(await faultsOf('binary.yaml')).toMatchObject([
    { code: 'file', problem: expect.stringContaining('zero bytes') },
  ]);
  expect(await faultsOf('latin.yaml')).toMatchObject([{ code: 'file', problem: expect.stringContaining('UTF-8') }]);
});

test('100 MB are refused by their size, unread', async () => {
  const handle = await open(inFolder('huge.yaml'), 'w');
  await handle.truncate(100_000_000);
  await handle.close();
  const start = performance.now();
  expect(await faultsOf('huge.yaml')).toMatchObject([{ code: 'file', found: '100000000 bytes' }]);
  expect(performance.now() - start).toBeLessThan(500);
});

test('a byte order mark and Windows line ends are no faults', async () => {
  await writeFile(inFolder('windows.yaml'), `\uFEFF${starterDesign().replaceAll('\n', '\r\n')}`);
  expect((await readDesign(inFolder('windows.yaml'))).ok).toBe(true);
});

test('a coating table beside the design', async () => {
  await writeFile(inFolder('tables/coating.csv'), TABLE);
  const reading = await readWithTable('tables/coating.csv');
  if (!reading.ok) throw new Error('a sound table');
  expect(reading.description.finishes.get('blue-pass')).toMatchObject({
    kind: 'table',
    wavelengthsNm: [450, 550],
    anglesDeg: [0, 45],
    reflectance: [
      [0.05, 0.1],
      [0.98, 0.7],
    ],
    transmittance: [
      [0.95, 0.8],
      [0.01, 0.2],
    ],
  });
});

test('paths that leave the folder of the design are refused, through links too', async () => {
  await symlink(join(folder, 'outside.csv'), inFolder('tables/link.csv'));
  await symlink(folder, inFolder('up'));
  await symlink(join(folder, 'nothing.csv'), inFolder('tables/dangling.csv'));
  const leaves = [{ code: 'file', problem: 'the path leaves the folder of the design' }];
  expect(await tableFault('../outside.csv')).toMatchObject(leaves);
  expect(await tableFault('tables/../../outside.csv')).toMatchObject(leaves);
  expect(await tableFault(join(folder, 'outside.csv'))).toMatchObject(leaves);
  expect(await tableFault('tables/link.csv')).toMatchObject(leaves);
  expect(await tableFault('up/outside.csv')).toMatchObject(leaves);
  expect(await tableFault('tables/dangling.csv')).toMatchObject([{ code: 'file', problem: 'the link leads nowhere' }]);
});

test('tables that are not there or cannot be read', async () => {
  await writeFile(inFolder('coating.csv'), TABLE);
  await writeFile(inFolder('binary.csv'), Uint8Array.from([0x61, 0, 0x62]));
  await writeFile(inFolder('latin.csv'), Uint8Array.from([0x61, 0xff, 0x62]));
  expect(await tableFault('coatin.csv')).toMatchObject([
    { code: 'file', found: 'coatin.csv', suggestion: 'coating.csv' },
  ]);
  expect(await tableFault('tables')).toMatchObject([{ code: 'file', problem: 'this is not a file' }]);
  expect(await tableFault('binary.csv')).toMatchObject([{ problem: expect.stringContaining('zero bytes') }]);
  expect(await tableFault('latin.csv')).toMatchObject([{ problem: expect.stringContaining('UTF-8') }]);
});

test.each([
  ['a heading that lacks a column', 'wavelength_nm,angle_deg,reflectance\n', 1, 1, 'lacks transmittance'],
  ['no rows', `${HEADING}\n`, 1, 1, 'no rows'],
  ['a word for a number', `${HEADING}\n450,0,0.1,none\n`, 2, 11, 'transmittance is not a number'],
  ['an absent cell', `${HEADING}\n450,0,0.1\n`, 2, 1, 'transmittance is not a number'],
  ['NaN', `${HEADING}\n450,0,NaN,0.1\n`, 2, 7, 'reflectance is not a number'],
  ['a share above 1', `${HEADING}\n450,0,1.2,0\n`, 2, 7, 'reflectance is out of range'],
  ['R + T above 1', `${HEADING}\n450,0,0.1,0.2\n450,45,0.6,0.5\n`, 3, 1, 'create energy'],
  ['a row twice', `${HEADING}\n450,0,0.1,0.2\n450,0,0.1,0.2\n`, 3, 1, 'twice'],
])('faults of a table stand in the table: %s', async (_, text, line, column, problem) => {
  await writeFile(inFolder('faulty.csv'), text);
  const file = inFolder('faulty.csv');
  expect(await tableFault('faulty.csv')).toContainEqual(
    expect.objectContaining({ file, line, column, problem: expect.stringContaining(problem) }),
  );
});
