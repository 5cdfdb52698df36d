/** The import rules in biome.json must not go blind: each forbidden import, planted in a copy, is refused. */
import { spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';

const root = join(import.meta.dirname, '../..');
let copy = '';

beforeAll(() => {
  copy = mkdtempSync(join(tmpdir(), 'import-rules-'));
  cpSync(join(root, 'src'), join(copy, 'src'), { recursive: true });
  const config = JSON.parse(readFileSync(join(root, 'biome.json'), 'utf8'));
  delete config.vcs;
  delete config.$schema;
  writeFileSync(join(copy, 'biome.json'), JSON.stringify(config));
});
afterAll(() => rmSync(copy, { recursive: true, force: true }));

function lint(file: string, text: string): string {
  const path = join(copy, file);
  mkdirSync(dirname(path), { recursive: true });
  writeFileSync(path, text);
  const binary = join(root, 'node_modules/@biomejs/biome/bin/biome');
  const { stdout, stderr } = spawnSync(process.execPath, [binary, 'lint', file], { cwd: copy, encoding: 'utf8' });
  rmSync(path);
  return stdout + stderr;
}

const FORBIDDEN: readonly (readonly [string, string])[] = [
  ['src/kernel/planted.ts', "import { buildProgram } from '../cli/program.js';"],
  ['src/kernel/planted.ts', "import { readFileSync } from 'node:fs';"],
  ['src/kernel/planted.ts', "import { Piscina } from 'piscina';"],
  ['src/kernel/planted.ts', "import type { Description } from '../design/description.js';"],
  ['src/optics/planted.ts', "import { readSolvent } from '../materials/library.js';"],
  ['src/photophysics/planted.ts', "import { readSolvent } from '../materials/library.js';"],
  ['src/photophysics/planted.ts', "import { fresnelReflectance } from '../optics/fresnel.js';"],
  ['src/photophysics/planted.ts', "import { readFileSync } from 'node:fs';"],
  ['src/kernel/planted.ts', "import { steadyPopulations } from '../photophysics/steady-populations.js';"],
  ['src/report/planted.ts', "import { steadyPopulations } from '../photophysics/steady-populations.js';"],
  ['src/numerics/planted.ts', "import seedrandom from 'seedrandom';"],
  ['src/units/planted.ts', "import { linearCurve } from '../numerics/interpolate.js';"],
  ['src/scene/planted.ts', "import { runBatches } from '../engine/run-batches.js';"],
  ['src/scene/planted.ts', "import { readFileSync } from 'node:fs';"],
  ['src/design/planted.ts', "import { compileScene } from '../scene/compile-scene.js';"],
  ['src/design/planted.ts', "import { readFileSync } from 'node:fs';"],
  ['src/outcome/planted.ts', "import { Worker } from 'node:worker_threads';"],
  ['src/outcome/planted.ts', "import { runBatches } from '../engine/run-batches.js';"],
  ['src/terms/planted.ts', "import { significant } from '../report/number-format.js';"],
  ['src/terms/planted.ts', "import { nearestName } from '../units/nearest-name.js';"],
  ['src/terms/planted.ts', "import { readFileSync } from 'node:fs';"],
  ['src/outcome/planted.ts', "import { TERMS } from '../terms/all-terms.js';"],
  ['src/run-folder/planted.ts', "import { print } from '../cli/output-stream.js';"],
  ['src/report/planted.ts', "import { print } from '../cli/output-stream.js';"],
  ['src/report/planted.ts', "import { Scene } from 'three';"],
  ['src/report/view/browser/planted.ts', "import { readFileSync } from 'node:fs';"],
  ['src/report/view/browser/planted.ts', "import type { Description } from '../../../design/description.js';"],
  ['src/run-folder/planted.ts', "import { runPage } from '../report/run-page.js';"],
  ['src/proofs/planted.ts', "import { traceBatch } from '../kernel/trace-batch.js';"],
  ['src/engine/planted.ts', "import { flat } from '../../test/helpers/describe.js';"],
];

describe('import rules', () => {
  test.each(FORBIDDEN)('%s may not say %s', (file, line) => {
    expect(lint(file, `${line}\n`)).toContain('noRestrictedImports');
  });

  test('a cycle is refused', () => {
    const path = join(copy, 'src/numerics/planted-a.ts');
    writeFileSync(path, "import { b } from './planted-b.js';\nexport const a = (): number => b();\n");
    const found = lint(
      'src/numerics/planted-b.ts',
      "import { a } from './planted-a.js';\nexport const b = (): number => a();\n",
    );
    rmSync(path);
    expect(found).toContain('noImportCycles');
  });

  test('what is allowed is not refused', () => {
    const allowed = "import type { Scene } from '../scene/scene-layout.js';\nexport type Planted = Scene;\n";
    expect(lint('src/kernel/planted.ts', allowed)).not.toContain('noRestrictedImports');
  });
});
