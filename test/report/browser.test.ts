/** The page of a real run in a real browser. */
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { FigureName, RunRecord } from '../../src/record/run-record.js';
import { runPage } from '../../src/report/run-page.js';
import { HOSTILE_TEXTS, hostileRun } from './hostile-run.js';
import { openBrowser } from './open-browser.js';
import { realRun } from './real-run.js';

let folder = '';
let browser: Browser;
let record: RunRecord;
let url = '';

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'stokeswell-'));
  browser = await openBrowser();
  const run = await realRun('geometries/two-bank-box-cell.yaml', 30_000);
  // What run.json holds, not what the program still had in memory.
  record = JSON.parse(JSON.stringify(run.record));
  url = await keep('report.html', runPage(run.record, run.arrays));
});
afterAll(async () => {
  await browser?.close();
  await rm(folder, { recursive: true, force: true });
});

let context: BrowserContext;
let page: Page;
/** Errors, refused loads and dialogs since the page was opened. */
let complaints: string[] = [];

beforeEach(async () => {
  context = await browser.newContext({ viewport: { width: 1280, height: 900 } });
  page = await context.newPage();
  page.setDefaultTimeout(10_000);
  complaints = [];
  // The software rasteriser speaks of its own pace when a picture of the page is taken.
  page.on('console', (message) => {
    if (!message.text().includes('GL Driver Message')) complaints.push(message.text());
  });
  page.on('pageerror', (error) => complaints.push(error.message));
  page.on('requestfailed', (request) => complaints.push(request.url()));
  page.on('dialog', (dialog) => {
    complaints.push(dialog.message());
    void dialog.dismiss();
  });
});
afterEach(() => context.close());

async function keep(name: string, html: string): Promise<string> {
  const path = join(folder, name);
  await writeFile(path, html);
  return pathToFileURL(path).href;
}

describe('the page of a real run', () => {
  it('opens in under a second, without a complaint and without asking for anything', async () => {
    const asked: string[] = [];
    page.on('request', (request) => asked.push(request.url()));
    await page.goto(url);
    // The quickest of three: the machine may be busy with other tests.
    const opened: number[] = [];
    for (let i = 0; i < 3; i++) {
      await page.goto(url);
      opened.push(Number(await page.evaluate('performance.getEntriesByType("navigation")[0].loadEventEnd')));
    }
    expect(Math.min(...opened)).toBeGreaterThan(0);
    expect(Math.min(...opened)).toBeLessThan(1000);
    expect(complaints).toEqual([]);
    expect(asked.filter((one) => one !== url && !one.startsWith('data:'))).toEqual([]);
  });

  it('shows every figure of run.json as it stands there', async () => {
    await page.goto(url);
    const shown = await page.$$eval('data[data-figure]', (list) =>
      list.map((one) => ({
        name: one.getAttribute('data-figure') ?? '',
        value: one.getAttribute('value'),
        error: one.getAttribute('data-error'),
        text: one.textContent ?? '',
      })),
    );
    for (const [name, figure] of Object.entries(record.figures)) {
      const mine = shown.filter((one) => one.name === name);
      if (figure.value === null) {
        expect(mine).toEqual([]);
        continue;
      }
      expect(mine.length).toBeGreaterThan(0);
      for (const { value, error } of mine) {
        expect(Number(value)).toBe(figure.value);
        expect(error).toBe(figure.standardError === null ? '' : String(figure.standardError));
      }
      // In the table of all figures the text is in the figure's own unit, rounded within a tenth of its error.
      const text = mine.at(-1)?.text ?? '';
      const [, number, power] = /^\(?(-?[\d.]+)(?: ± [\d.]+)?\)?(?:e(-?\d+))?/.exec(text) ?? [];
      const read = Number(number) * 10 ** Number(power ?? 0);
      const slack = figure.standardError ? 0.1 * figure.standardError : 1e-3 * Math.abs(figure.value);
      expect(Math.abs(read - figure.value)).toBeLessThanOrEqual(slack);
    }
    const exit: FigureName = 'exitPower';
    expect(await page.locator(`#answers [data-figure=${exit}]`).count()).toBe(1);
  });

  it.each(['watts', 'photons'] as const)('shows every entry of the ledger of %s', async (of) => {
    await page.goto(url);
    const shown = await page.$$eval(`table[data-ledger=${of}] data`, (list) =>
      list.map((one) => one.getAttribute('value')),
    );
    expect(shown.map(Number).sort()).toEqual(record.ledger[of].map(({ fraction }) => fraction).sort());
  });

  it('gives each map its numbers, and a value and cross-sections under the pointer and the arrow keys', async () => {
    await page.goto(url);
    expect(await page.locator('figure.map').count()).toBe(record.maps.length);
    const [map] = record.maps;
    const figure = page.locator('figure.map').first();
    expect(await figure.locator('.facts').first().textContent()).toContain(String(Number(map.mean.toPrecision(4))));
    const readout = figure.locator('.readout');
    const before = await figure.locator('.profile-u').getAttribute('d');
    await figure.locator('image').hover({ position: { x: 20, y: 20 } });
    const atPointer = await readout.textContent();
    expect(atPointer).toMatch(/^u = −[\d.]+ mm, v = [\d.]+ mm: [\d.]+ W\/cm²$/);
    expect(await figure.locator('.profile-u').getAttribute('d')).not.toBe(before);
    await figure.locator('.cut').focus();
    await page.keyboard.press('ArrowRight');
    expect(await readout.textContent()).not.toBe(atPointer);
    expect(complaints).toEqual([]);
  });

  it('moves the cut through the liquid', async () => {
    await page.goto(url);
    const cut = page.locator('figure.volume .cut').first();
    const before = await cut.locator('image').getAttribute('href');
    await cut.locator('input').fill('0');
    expect(await cut.locator('image').getAttribute('href')).not.toBe(before);
    expect(await cut.locator('.slice-text').textContent()).toMatch(/^z = −[\d.]+ mm$/);
    expect(complaints).toEqual([]);
  });

  it('says number and ± of a stream under the pointer and on focus', async () => {
    await page.goto(url);
    await page.locator('#flow-wide-title').waitFor({ state: 'attached' });
    await page.locator('.wide-only .stream.flow-output').focus();
    expect(await page.locator('#flow-readout').textContent()).toMatch(
      /^[\d.]+ ± [\d.]+ %, [\d.]+ ± [\d.]+ W: left by the exit/,
    );
  });

  it.each([360, 390, 820, 1400])('fits a window of %i pixels, light and dark', async (width) => {
    await page.setViewportSize({ width, height: 800 });
    const papers: unknown[] = [];
    for (const colorScheme of ['light', 'dark'] as const) {
      await page.emulateMedia({ colorScheme });
      await page.goto(url);
      expect(await page.evaluate('document.documentElement.scrollWidth')).toBeLessThanOrEqual(width);
      papers.push(await page.evaluate('getComputedStyle(document.body).backgroundColor'));
    }
    expect(papers[0]).not.toBe(papers[1]);
  });

  it.each([1280, 400])('opens what a word means by mouse and keys, without script, %i pixels wide', async (width) => {
    const still = await browser.newContext({ javaScriptEnabled: false, viewport: { width, height: 800 } });
    const quiet = await still.newPage();
    quiet.setDefaultTimeout(10_000);
    await quiet.goto(url);
    const term = quiet.locator('#term-exitPower');
    const mark = quiet.locator('#answers').getByRole('button', { name: 'what exit power means' });
    expect(await quiet.locator('.term:popover-open').count()).toBe(0);
    await mark.click();
    const card = await quiet.locator('.term:popover-open').boundingBox();
    expect(card).not.toBeNull();
    if (card === null) return;
    expect(card.x).toBeGreaterThanOrEqual(0);
    expect(card.x + card.width).toBeLessThanOrEqual(width);
    expect(card.y).toBeGreaterThanOrEqual(0);
    expect(card.y + card.height).toBeLessThanOrEqual(800);
    for (const label of ['formula', 'assumes', 'source']) expect(await term.textContent()).toContain(label);
    await quiet.keyboard.press('Escape');
    expect(await quiet.locator('.term:popover-open').count()).toBe(0);
    await mark.focus();
    await quiet.keyboard.press('Enter');
    await quiet.locator('.term:popover-open').getByRole('button', { name: 'close' }).click();
    expect(await quiet.locator('.term:popover-open').count()).toBe(0);
    // On paper the marks are gone and the texts stay.
    await quiet.emulateMedia({ media: 'print' });
    expect(await mark.isVisible()).toBe(false);
    expect(await term.isVisible()).toBe(true);
    await still.close();
  });

  it('answers the four questions without script, and prints', async () => {
    const still = await browser.newContext({ javaScriptEnabled: false });
    const quiet = await still.newPage();
    await quiet.goto(url);
    expect(await quiet.locator('#answers h2').allTextContents()).toHaveLength(4);
    expect(await quiet.locator('.needs-script').first().isVisible()).toBe(false);
    await still.close();
    await page.goto(url);
    const pdf = await page.pdf({ format: 'A4' });
    expect(pdf.subarray(0, 5).toString('latin1')).toBe('%PDF-');
    expect(pdf.length).toBeGreaterThan(20_000);
  });
});

describe('hostile texts', () => {
  it.each(HOSTILE_TEXTS.map((text) => [text.slice(0, 50), text] as const))(
    '%s runs nothing and breaks nothing',
    async (_, text) => {
      const { record: hostile, arrays } = hostileRun(text);
      await page.setViewportSize({ width: 390, height: 800 });
      await page.goto(await keep('hostile.html', runPage(hostile, arrays)));
      for (const stream of await page.locator('.narrow-only .stream').all()) await stream.focus();
      await page.locator('figure.map image').first().hover();
      expect(await page.evaluate('globalThis.pwned')).toBeUndefined();
      expect(await page.locator('script').count()).toBe(2);
      expect(complaints).toEqual([]);
      expect(await page.evaluate('document.documentElement.scrollWidth')).toBeLessThanOrEqual(390);
      expect(await page.locator('h2').count()).toBeGreaterThan(8);
    },
  );

  it('even a script that got into the page does not run', async () => {
    const { record: calm, arrays } = hostileRun('calm');
    const broken = runPage(calm, arrays).replace('</main>', '<script>globalThis.pwned = 1</script></main>');
    await page.goto(await keep('broken.html', broken));
    expect(await page.evaluate('globalThis.pwned')).toBeUndefined();
    expect(complaints.join()).toContain('Content Security Policy');
  });
});
