/** Promise protected: the build writes the kernel's constants into it as literals. Looked up as objects they cost a fifth of the pace. */
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';

const kernel = join(import.meta.dirname, '../../dist/kernel');
const ENUMS =
  /\b(SPLIT|SPREAD|BEAM|OUTLINE|FACE_SLOT|OWNER_SLOT|DYE_SLOT|SLOT|PUMP|RECORDER|CELLS|CROSSING|INTERFACE|FLAG|SHARES|LIMIT|WALL|BLOCK|FIGURE_PLACE|LAUNCH)\.\w/;

test('no constant is looked up in the built kernel', () => {
  const files = readdirSync(kernel).filter((name) => name.endsWith('.js'));
  expect(files).toContain('trace-batch.js');
  for (const file of files) {
    const code = readFileSync(join(kernel, file), 'utf8').replaceAll(/\/\*[\s\S]*?\*\//g, '');
    expect(ENUMS.exec(code)?.[0] ?? null, file).toBeNull();
  }
});
