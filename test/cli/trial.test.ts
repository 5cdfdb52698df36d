/** `check` and `trace` refuse a pump that misses everything, with its line in the file, before anything is written. */
import { mkdtemp, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { checkCommand } from '../../src/cli/commands/check.js';
import { traceCommand } from '../../src/cli/commands/trace.js';
import { EXIT } from '../../src/cli/exit-codes.js';

const DESIGN = `design: Aside
media:
  bath: { solvent: ethanol, pH: 11, dyes: { fluorescein: 0.2 mmol/L } }
parts:
  cell: { box: [10 mm, 10 mm, 10 mm], medium: bath }
pumps:
  aside:
    patch: { disc: 1 mm }
    power: 1 W
    wavelength: 445 nm
    toward: cell.front
    distance: 40 mm
    shift: [SHIFT, 0 mm]
exit: cell.top
`;

let cwd = '';
let printed = '';
beforeEach(async () => {
  cwd = await mkdtemp(join(tmpdir(), 'stokeswell-'));
  printed = '';
  vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
    printed += String(text);
    return true;
  });
});
afterEach(async () => {
  vi.restoreAllMocks();
  await rm(cwd, { recursive: true, force: true });
});

async function design(shift: string): Promise<string> {
  const file = join(cwd, 'aside.yaml');
  await writeFile(file, DESIGN.replace('SHIFT', shift));
  return file;
}

test('check says which pump, where', async () => {
  expect(await checkCommand([await design('30 mm')], { dial: {} })).toBe(EXIT.fault);
  expect(printed).toContain('aside.yaml:7:3: pumps.aside');
  expect(printed).toContain('misses everything');
});

test('check lets a pump that hits pass', async () => {
  expect(await checkCommand([await design('3 mm')], { dial: {} })).toBe(EXIT.ok);
  expect(printed).not.toContain('misses');
});

test('trace ends with the same sentence and writes nothing', async () => {
  const file = await design('30 mm');
  const run = traceCommand(file, {
    out: join(cwd, 'run'),
    files: true,
    ledger: 'watts',
    pictures: 'none',
    dial: {},
    threads: 0,
    histories: 1024,
  });
  await expect(run).rejects.toThrow(/aside\.yaml:7:3: pumps\.aside .* misses everything/);
  expect(await readdir(cwd)).toEqual(['aside.yaml']);
});

test('trace keeps the warning of a pump that often misses', async () => {
  const file = await design('5 mm');
  const options = { files: false, ledger: 'watts', pictures: 'none', dial: {}, threads: 0, histories: 1024 } as const;
  expect(await traceCommand(file, options)).toBe(EXIT.ok);
  expect(printed).toMatch(/much\s+of\s+this\s+pump\s+meets\s+no\s+part/);
});
