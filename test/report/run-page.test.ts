import { describe, expect, it } from 'vitest';
import { runPage } from '../../src/report/run-page.js';
import { sampleRun } from '../run-folder/sample-run.js';
import { HOSTILE_TEXTS, hostileRun } from './hostile-run.js';

const { record, arrays } = sampleRun();
const page = runPage(record, arrays);
/** Without our own scripts, whose text holds names of tags. */
const body = page.replaceAll(/<script>[\s\S]*?<\/script>/g, '');

describe('run page', () => {
  it('is one document that asks for nothing from outside', () => {
    expect(page).toMatch(/^<!doctype html>\n<html lang="en">/);
    expect(page.match(/<script>/g)).toHaveLength(2);
    expect(body).not.toContain('<script');
    expect(body).not.toMatch(/(?:src|href)="(?!data:image\/png;base64,|#)/);
    expect(body).not.toMatch(/url\((?!#)|@import|https?:/);
    expect(page).toContain('default-src &#39;none&#39;');
  });

  it('is the same text for the same run', () => {
    expect(runPage(structuredClone(record), structuredClone(arrays))).toBe(page);
  });

  it('names every picture, each id once', () => {
    const ids = [...page.matchAll(/ id="([^"]+)"/g)].map(([, id]) => id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const [, labels] of page.matchAll(/aria-labelledby="([^"]+)"/g)) {
      for (const id of labels.split(' ')) expect(ids).toContain(id);
    }
    // But for the small axes of the view, which say nothing that is not said beside them.
    expect(body.match(/<svg(?! class="view-axes")/g)?.length).toBe(body.match(/<svg role="(?:img|group)" /g)?.length);
    expect(page.match(/<img/g)?.length).toBe(page.match(/<img [^>]*alt="[^"]+"/g)?.length);
  });

  it('says what is not known instead of leaving it out', () => {
    const figures = Object.fromEntries(
      Object.entries(record.figures).map(([name, figure]) => [
        name,
        { ...figure, value: null, standardError: null, note: `why-${name}` },
      ]),
    ) as typeof record.figures;
    const dark = runPage({ ...record, figures, maps: [], spectra: [], angles: [] }, arrays);
    for (const name of ['exitUniformityVariation', 'peakAbsorbedPowerDensity', 'timeToBoiling', 'chromaticityX']) {
      expect(dark.split(`why-${name}`).length).toBeGreaterThan(2);
    }
    expect(dark).toContain('What the wall socket gives is not known');
    expect(dark.replace(/<script>[\s\S]*<\/script>/, '')).not.toMatch(/NaN|Infinity|undefined(?! here)|\bnull\b/);
  });

  it('stays under 3 MB for a run of many fine maps', () => {
    const fine = (side: number, id: string) => ({
      ...arrays.maps[0],
      id,
      shape: [side, side],
      values: Float64Array.from({ length: side * side }, (_, i) => Math.sin(i * i) ** 2),
      measure: new Float64Array(side * side).fill(1),
    });
    const maps = Array.from({ length: 30 }, (_, i) => fine(300, `detector-${i}`));
    const side = 64;
    const volume = {
      ...arrays.maps[3],
      shape: [side, side, side],
      values: Float64Array.from({ length: side ** 3 }, (_, i) => Math.cos(i * i) ** 2),
      measure: new Float64Array(side ** 3).fill(1),
    };
    const all = [...maps, volume];
    const many = runPage(
      {
        ...record,
        design: { ...record.design, text: 'x'.repeat(5_000_000) },
        maps: all.map(({ id, shape, extentMm, axes, unit }) => ({
          ...record.maps[0],
          id,
          shape,
          extentMm,
          axes,
          unit,
          maximum: 1,
        })),
      },
      { ...arrays, maps: all },
    );
    expect(Buffer.byteLength(many)).toBeLessThan(3_000_000);
  });
});

describe('hostile texts', () => {
  it.each(HOSTILE_TEXTS.map((text) => [text.slice(0, 60), text] as const))('%s opens nothing', (_, text) => {
    const hostile = hostileRun(text);
    const made = runPage(hostile.record, hostile.arrays);
    // The same elements and attributes as for harmless texts, so nothing was opened, closed or added.
    const harmless = hostileRun('harmless');
    expect(shape(made)).toEqual(shape(runPage(harmless.record, harmless.arrays)));
    expect(made.length).toBeLessThan(3_000_000);
  });
});

/** Every tag in order with the names of its attributes, texts and values taken out. */
function shape(html: string): string[] {
  const body = html.replace(/(<style>)[\s\S]*?(<\/style>)/, '$1$2').replace(/(<script>)[\s\S]*?(<\/script>)/, '$1$2');
  return [...body.matchAll(/<\/?[a-z!][^>]*>/gi)].map(([tag]) => tag.replace(/="[^"]*"/g, '=""'));
}
