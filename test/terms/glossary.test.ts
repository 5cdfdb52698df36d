import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { glossaryMarkdown } from '../../src/terms/glossary.js';

it('README holds the glossary that the table of terms yields (stokeswell explain --markdown)', () => {
  const readme = readFileSync(new URL('../../README.md', import.meta.url), 'utf8');
  const [, held] = /\n## Glossary\n[\s\S]*?\n\n(\*\*How much[\s\S]*?)\nLicence:/.exec(readme) ?? [];
  expect(held).toBe(glossaryMarkdown());
});
