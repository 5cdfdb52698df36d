import { describe, expect, it } from 'vitest';
import type { Drawing } from '../../src/record/drawing.js';
import { isometric, NARROW_ISOMETRIC, WIDE_ISOMETRIC } from '../../src/report/charts/isometric.js';
import { runPage } from '../../src/report/run-page.js';
import { viewSection } from '../../src/report/sections/view-section.js';
import { VIEW_BUNDLE } from '../../src/report/view/view-bundle.js';
import { sampleRun } from '../run-folder/sample-run.js';
import { boxDrawing } from './box-drawing.js';
import { hostileDrawing } from './hostile-drawing.js';
import { HOSTILE_TEXTS, hostileRun } from './hostile-run.js';

const { record, arrays } = sampleRun();
const pageWith = (drawing: Drawing | null) => runPage(record, { ...arrays, drawing });

describe('the view of a design', () => {
  it('is left out with its script where there is no drawing', () => {
    expect(viewSection(null)).toBeNull();
    const page = pageWith(null);
    expect(page.match(/<script/g)).toHaveLength(1);
    expect(page).not.toContain('id="view"');
    expect(page).not.toContain('href="#view">In space');
  });

  it('names every id once, and every control', () => {
    const page = pageWith(boxDrawing()).replaceAll(/<script>[\s\S]*?<\/script>/g, '');
    const ids = [...page.matchAll(/ id="([^"]+)"/g)].map(([, id]) => id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const [input] of page.matchAll(/<(?:input|select)[^>]*>/g)) {
      const at = page.indexOf(input);
      const inLabel = page.lastIndexOf('<label', at) > page.lastIndexOf('</label>', at);
      expect(inLabel || input.includes('aria-label='), input).toBe(true);
    }
  });

  it('says that paths are a choice of every fate and not in proportion', () => {
    const text = viewSection(boxDrawing())?.text ?? '';
    expect(text).toContain('picked from 2048 histories');
    expect(text).toContain('not how much of it');
    const before = viewSection({ ...boxDrawing(), paths: [], pathsFrom: 0 })?.text ?? '';
    expect(before).toContain('No light has been traced');
    expect(before).not.toContain('class="view-fates"');
  });

  it('stays under 3 MB with thousands of long paths', () => {
    const drawing = boxDrawing([20, 8, 8], 2000);
    const long = drawing.paths.map((path, i) => ({
      ...path,
      points: Array.from({ length: 900 }, (_, k) => Math.sin(i + k * k) * 4),
      wavelengthsNm: Array.from({ length: 299 }, (_, k) => 500 + ((i * k) % 100)),
    }));
    const page = pageWith({ ...drawing, paths: long });
    expect(Buffer.byteLength(page)).toBeLessThan(1_700_000);
  });

  it('has a bundle that evaluates no text, asks for nothing and carries its licence', () => {
    expect(VIEW_BUNDLE.length).toBeLessThan(650_000);
    expect(VIEW_BUNDLE).not.toMatch(
      /\beval\(|new Function|\bfetch\(|XMLHttpRequest|importScripts|\bimport\(|<\/script|<!--/i,
    );
    expect(VIEW_BUNDLE.match(/https?:\/\/[\w./]+/g)).toEqual(['http://www.w3.org/1999/xhtml']);
    expect(VIEW_BUNDLE).toMatch(/Three\.js Authors\s+\*? ?SPDX-License-Identifier: MIT/);
  });
});

describe('the drawing in its place', () => {
  it('names parts, pump and exit, and stays small', () => {
    const wide = isometric(boxDrawing([20, 8, 8], 400), 'still', WIDE_ISOMETRIC).text;
    const narrow = isometric(boxDrawing([20, 8, 8], 400), 'still', NARROW_ISOMETRIC).text;
    for (const text of [wide, narrow]) {
      for (const name of ['cell', 'lid', 'exit: lid.top', 'front-bank']) expect(text).toContain(`>${name}`);
      expect(text).toContain('20 by 8 by 9 mm');
      expect(text).not.toMatch(/NaN|Infinity|undefined/);
    }
    expect(wide.length + narrow.length).toBeLessThan(150_000);
    expect(wide.match(/<circle cx/g)?.length).toBeGreaterThan(20);
  });

  it('keeps names apart', () => {
    const [part] = boxDrawing().parts;
    const parts = Array.from({ length: 9 }, (_, i) => ({ ...part, name: `part-${i}` }));
    const text = isometric({ ...boxDrawing(), parts }, 'still', WIDE_ISOMETRIC).text;
    const places = [...text.matchAll(/class="iso-name" x="([\d.-]+)" y="([\d.-]+)"/g)].map(([, x, y]) => [
      Number(x),
      Number(y),
    ]);
    expect(places.length).toBeGreaterThanOrEqual(9);
    for (const [i, [x, y]] of places.entries()) {
      for (const [x1, y1] of places.slice(i + 1)) expect(x !== x1 || Math.abs(y - y1) >= 20).toBe(true);
    }
  });
});

describe('hostile names', () => {
  it.each(HOSTILE_TEXTS.map((text) => [text.slice(0, 60), text] as const))('%s opens nothing', (_, text) => {
    expect(shape(pageOf(text))).toEqual(shape(pageOf('harmless')));
  });
});

function pageOf(text: string): string {
  const run = hostileRun(text);
  return runPage(run.record, { ...run.arrays, drawing: hostileDrawing([text]) });
}

/** Every tag in order with the names of its attributes, texts and values taken out. */
function shape(html: string): string[] {
  const body = html.replaceAll(/(<(style|script)>)[\s\S]*?(<\/\2>)/g, '$1$3');
  return [...body.matchAll(/<\/?[a-z!][^>]*>/gi)].map(([tag]) => tag.replace(/="[^"]*"/g, '=""'));
}
