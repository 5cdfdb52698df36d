/** The 3D view in a real browser, over a drawing made by hand. */
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { LedgerRow } from '../../src/record/run-record.js';
import { runPage } from '../../src/report/run-page.js';
import { sampleRun } from '../run-folder/sample-run.js';
import { boxDrawing } from './box-drawing.js';
import { hostileDrawing } from './hostile-drawing.js';
import { HOSTILE_TEXTS, hostileRun } from './hostile-run.js';
import { openBrowser } from './open-browser.js';

const PATHS = 40;
/** Said by the software rasteriser about pictures taken of it, not by the page. */
const ABOUT_PICTURES = 'GPU stall due to ReadPixels';

let folder = '';
let browser: Browser;
let url = '';
let context: BrowserContext;
let page: Page;
let complaints: string[] = [];

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'stokeswell-'));
  browser = await openBrowser();
  url = await keep('view.html', runPage(record(), { ...sampleRun().arrays, drawing: boxDrawing([20, 8, 8], PATHS) }));
});
afterAll(async () => {
  await browser?.close();
  await rm(folder, { recursive: true, force: true });
});

beforeEach(async () => {
  await openPage(browser);
});
afterEach(() => context.close());

async function openPage(one: Browser, width = 1000): Promise<void> {
  context = await one.newContext({ viewport: { width, height: 800 } });
  page = await context.newPage();
  page.setDefaultTimeout(20_000);
  complaints = [];
  page.on('console', (message) => {
    if (!message.text().includes(ABOUT_PICTURES)) complaints.push(message.text());
  });
  page.on('pageerror', (error) => complaints.push(error.message));
  page.on('requestfailed', (request) => complaints.push(request.url()));
}

async function keep(name: string, html: string): Promise<string> {
  const path = join(folder, name);
  await writeFile(path, html);
  return pathToFileURL(path).href;
}

/** The sample record with the fates of the drawing in its ledger, and Stokes heat. */
function record() {
  const { record: sample } = sampleRun();
  const row = (fate: LedgerRow['fate'], light: LedgerRow['light'], where: string, fraction: number): LedgerRow => ({
    fate,
    light,
    where,
    by: null,
    fraction,
    standardError: 0.001,
  });
  const watts = [
    row('left-by-exit', 'emitted', 'lid.top', 0.4),
    row('absorbed-by-finish', 'emitted', 'cell.left', 0.2),
    row('stokes-heat', 'pump', 'cell', 0.2),
    row('left-elsewhere', 'emitted', 'cell.right', 0.2),
  ];
  return { ...sample, ledger: { ...sample.ledger, watts } };
}

const view = () => page.locator('#view');
const shown = async (): Promise<number> => Number(await view().getAttribute('data-shown'));
const frames = async (): Promise<number> => Number(await view().getAttribute('data-frames'));
const readout = () => page.locator('.view-readout');

async function goToView(at = url): Promise<void> {
  await page.goto(at);
  await view().scrollIntoViewIfNeeded();
  await page.locator('#view.live[data-frames]').waitFor();
  await settled();
}

/** Until nothing is drawn any more. */
async function settled(): Promise<void> {
  for (let last = -1; last !== (await frames()); ) {
    last = await frames();
    await page.waitForTimeout(150);
  }
}

/** What the canvas shows. */
async function pixels(): Promise<string> {
  await settled();
  return (await page.locator('.view-stage').screenshot()).toString('base64');
}

describe('the view', () => {
  it('starts without a complaint, asks for nothing, and draws no frame while nothing changes', async () => {
    const asked: string[] = [];
    page.on('request', (request) => asked.push(request.url()));
    await goToView();
    expect(await shown()).toBe(PATHS);
    const before = await frames();
    await page.waitForTimeout(500);
    expect(await frames()).toBe(before);
    expect(complaints).toEqual([]);
    expect(asked.filter((one) => one !== url && !/^(data|blob):/.test(one))).toEqual([]);
    expect(await page.locator('.view-still').isVisible()).toBe(false);
  });

  it('turns under the mouse, the keys and the buttons, and comes back', async () => {
    await goToView();
    const atFirst = async () => {
      await page.locator('button[data-look=first]').click();
      await page.mouse.move(0, 0);
      await page.evaluate('document.activeElement.blur()');
      return await pixels();
    };
    const seen = [await atFirst()];
    const box = await page.locator('.view-stage canvas').boundingBox();
    if (box === null) throw new Error('no canvas');
    await page.mouse.move(box.x + 200, box.y + 150);
    await page.mouse.down();
    await page.mouse.move(box.x + 290, box.y + 180, { steps: 4 });
    await page.mouse.up();
    seen.push(await pixels());
    await page.locator('.view-stage canvas').focus();
    for (const key of ['ArrowLeft', 'ArrowUp', '+', 'Shift+ArrowRight', '1', '2', '3', '4']) {
      await page.keyboard.press(key);
      seen.push(await pixels());
    }
    await page.locator('button[data-look=farther]').click();
    seen.push(await pixels());
    expect(new Set(seen).size).toBe(seen.length);
    expect((await atFirst()) === seen[0]).toBe(true);
    expect(complaints).toEqual([]);
  });

  it('shows only the fates that are ticked, and no more paths than wanted', async () => {
    await goToView();
    const box = page.locator('.view-fate-line', { hasText: 'cell.left' }).first();
    await box.locator('input').focus();
    await page.keyboard.press('Space');
    expect(await shown()).toBe(PATHS / 8);
    await page.locator('.view-group[value=output]').check();
    expect(await shown()).toBe(PATHS / 8 + PATHS / 4);
    await page.locator('.view-most').fill('6');
    expect(await shown()).toBe(6);
    expect(await page.locator('.view-count').textContent()).toBe('6 paths drawn of 15 that fit');
    await page.locator('.view-all-fates').click();
    await page.locator('.view-most').fill(String(PATHS));
    expect(await shown()).toBe(PATHS);
  });

  it('names the face under the pointer, and shows only what a face took', async () => {
    await goToView();
    const box = await page.locator('.view-stage canvas').boundingBox();
    if (box === null) throw new Error('no canvas');
    await page.keyboard.press('Escape');
    await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
    await page.locator('.view-readout', { hasText: 'ended here' }).waitFor();
    expect(await readout().textContent()).toMatch(/^(cell|lid)\.\w+: .*; \d+ of the paths at hand ended here$/);
    await page.locator('.view-place').selectOption('cell.left');
    expect(await readout().textContent()).toBe('cell.left: silvered (mirror); 5 of the paths at hand ended here');
    expect(await shown()).toBe(PATHS);
    await page.locator('.view-only').check();
    expect(await shown()).toBe(PATHS / 8);
    await page.locator('.view-stage canvas').focus();
    await page.keyboard.press('n');
    expect(await page.locator('.view-place').inputValue()).toBe('cell.right');
    expect(await shown()).toBe(0);
  });

  it('cuts across an axis where the slider says, and hides parts', async () => {
    await goToView();
    const seen = [await pixels()];
    await page.locator('.view-axis[value=x]').check();
    expect(await page.locator('.view-cut-text').textContent()).toBe('x = 0 mm');
    seen.push(await pixels());
    await page.locator('.view-cut').fill('250');
    expect(await page.locator('.view-cut-text').textContent()).toBe('x = \u22125 mm');
    seen.push(await pixels());
    await page.locator('.view-other-side').check();
    seen.push(await pixels());
    await page.locator('.view-axis[value=""]').check();
    await page.locator('.view-part[value="1"]').uncheck();
    seen.push(await pixels());
    expect(new Set(seen).size).toBe(seen.length);
    expect(complaints).toEqual([]);
  });

  it('follows the streams of the flow: a click or Enter chooses, a second one takes it back', async () => {
    await goToView();
    const stream = page.locator('.wide-only .stream', { hasText: 'cell.left' });
    expect(await stream.getAttribute('role')).toBe('button');
    await stream.locator('text').click();
    expect(await stream.getAttribute('aria-pressed')).toBe('true');
    expect(await shown()).toBe(PATHS / 8);
    expect(await page.locator('.to-view').isVisible()).toBe(true);
    await stream.focus();
    await page.keyboard.press('Enter');
    expect(await stream.getAttribute('aria-pressed')).toBe('false');
    expect(await shown()).toBe(PATHS);
    await page.locator('.wide-only .stream', { hasText: 'Stokes heat' }).focus();
    await page.keyboard.press('Enter');
    expect(await shown()).toBe((PATHS * 6) / 8);
    expect(await readout().textContent()).toContain('left on the way');
    await page.locator('.wide-only .stream', { hasText: 'cell.right' }).focus();
    await page.keyboard.press('Enter');
    expect(await shown()).toBe(0);
    expect(await readout().textContent()).toContain('too rare');
    // A choice in the view takes that of the flow back.
    await page.locator('.view-group[value=output]').check();
    expect(await page.locator('.stream[aria-pressed=true]').count()).toBe(0);
    expect(await shown()).toBe(PATHS / 4);
    expect(complaints).toEqual([]);
  });

  it('prints what it shows, on white', async () => {
    await page.emulateMedia({ colorScheme: 'dark' });
    await goToView();
    await page.pdf({ format: 'A4' });
    const source = await page.locator('.view-print').getAttribute('src');
    expect(source?.slice(0, 22)).toBe('data:image/png;base64,');
    const corner = await page.evaluate(`(async () => {
      const image = document.querySelector('.view-print');
      await image.decode();
      const canvas = document.createElement('canvas');
      const drawing = canvas.getContext('2d');
      drawing.drawImage(image, 0, 0);
      return [...drawing.getImageData(2, 2, 1, 1).data];
    })()`);
    expect(corner).toEqual([255, 255, 255, 255]);
    expect(complaints).toEqual([]);
  });

  it.each(['light', 'dark'] as const)('passes the accessibility checker, %s', async (colorScheme) => {
    await page.emulateMedia({ colorScheme });
    await goToView();
    await page.evaluate(await readFile(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8'));
    const faults = await page.evaluate(`axe.run('#view').then(({ violations }) =>
      violations.map(({ id, nodes }) => id + ': ' + nodes.map(({ html }) => html.slice(0, 120)).join(' | ')))`);
    expect(faults).toEqual([]);
  });

  it('fits a phone', async () => {
    await page.setViewportSize({ width: 390, height: 800 });
    await goToView();
    expect(await page.evaluate('document.documentElement.scrollWidth')).toBeLessThanOrEqual(390);
    expect(await page.locator('.view-stage').isVisible()).toBe(true);
  });
});

describe('without WebGL or script', () => {
  it('shows the drawing and says why', async () => {
    await context.close();
    const flat = await openBrowser(['--disable-3d-apis']);
    try {
      await openPage(flat);
      await page.goto(url);
      await view().scrollIntoViewIfNeeded();
      await page.locator('#view.no-3d').waitFor();
      expect(await page.locator('.view-still svg').first().isVisible()).toBe(true);
      expect(await page.locator('.view-missing').isVisible()).toBe(true);
      expect(await page.locator('.view-stage').isVisible()).toBe(false);
      expect(await page.locator('.view-controls').isVisible()).toBe(false);
    } finally {
      await flat.close();
    }
  });

  it('shows the drawing where no script may run', async () => {
    const still = await browser.newContext({ javaScriptEnabled: false });
    const quiet = await still.newPage();
    await quiet.goto(url);
    expect(await quiet.locator('.view-still svg').first().isVisible()).toBe(true);
    expect(await quiet.locator('.view-stage').isVisible()).toBe(false);
    await still.close();
  });
});

describe('hostile names', () => {
  it('run nothing and break nothing', async () => {
    await page.setViewportSize({ width: 390, height: 800 });
    const run = hostileRun(HOSTILE_TEXTS[0]);
    const drawing = hostileDrawing(HOSTILE_TEXTS);
    await goToView(await keep('hostile.html', runPage(run.record, { ...run.arrays, drawing })));
    const places = await page.locator('.view-place option').count();
    await page.locator('.view-stage canvas').focus();
    for (let i = 0; i < places; i++) await page.keyboard.press('n');
    for (const box of await page.locator('.view-group').all()) await box.check();
    expect(await shown()).toBe(PATHS);
    for (const stream of await page.locator('.narrow-only .stream').all()) {
      await stream.focus();
      await page.keyboard.press('Enter');
    }
    await settled();
    expect(await page.evaluate('globalThis.pwned')).toBeUndefined();
    expect(await page.locator('script').count()).toBe(2);
    expect(complaints).toEqual([]);
    expect(await page.evaluate('document.documentElement.scrollWidth')).toBeLessThanOrEqual(390);
  });
});
