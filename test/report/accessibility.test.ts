/** Both pages against the rules of an accessibility checker (WCAG 2 A and AA, and its best practices), light and dark, wide and narrow. */
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { designSheet } from '../../src/cli/design-sheet.js';
import { readDesign } from '../../src/design/read-design.js';
import { drawDescription } from '../../src/drawing/draw-description.js';
import { drawPage } from '../../src/report/draw-page.js';
import { runPage } from '../../src/report/run-page.js';
import { checkScene } from '../../src/scene/check-scene.js';
import { openBrowser } from './open-browser.js';
import { realRun } from './real-run.js';

let folder = '';
let browser: Browser;
let checker = '';

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'stokeswell-'));
  browser = await openBrowser();
  checker = await readFile(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
  const file = 'geometries/two-bank-box-cell.yaml';
  const run = await realRun(file, 30_000);
  await writeFile(join(folder, 'report.html'), runPage(run.record, run.arrays));
  const reading = await readDesign(file);
  if (!reading.ok) throw new Error('the design has faults');
  const { faults, faces } = checkScene(reading.description);
  const page = drawPage(drawDescription(reading.description), designSheet(reading, faults, faces));
  await writeFile(join(folder, 'drawing.html'), page);
});
afterAll(async () => {
  await browser?.close();
  await rm(folder, { recursive: true, force: true });
});

describe.each(['report.html', 'drawing.html'])('%s', (name) => {
  it.each([
    ['light', 1280],
    ['dark', 1280],
    ['light', 400],
    ['dark', 400],
  ] as const)('%s, %i pixels wide', { timeout: 60_000 }, async (colorScheme, width) => {
    const page = await browser.newPage({ viewport: { width, height: 900 }, colorScheme });
    await page.goto(pathToFileURL(join(folder, name)).href);
    await page.evaluate(checker);
    const found = await page.evaluate(`axe.run().then(({ violations }) =>
      violations.map(({ id, nodes }) => id + ': ' + nodes.slice(0, 3).map(({ html }) => html.slice(0, 160)).join(' | ')))`);
    expect(found).toEqual([]);
    await page.close();
  });
});
