/** The page of `stokeswell draw`, for every shipped design and for hostile texts. */
import { describe, expect, it } from 'vitest';
import { designSheet } from '../../src/cli/design-sheet.js';
import { readDesignText } from '../../src/design/read-design.js';
import { drawDescription } from '../../src/drawing/draw-description.js';
import { drawPage } from '../../src/report/draw-page.js';
import { checkScene } from '../../src/scene/check-scene.js';
import { shippedNames, shippedText } from '../geometries/shipped.js';
import { HOSTILE_TEXTS } from './hostile-run.js';

function drawnDesign(name: string) {
  const reading = readDesignText(shippedText(name), `geometries/${name}.yaml`);
  if (!reading.ok) throw new Error(reading.faults.map(({ problem }) => problem).join('; '));
  const { faults, faces } = checkScene(reading.description);
  return { drawing: drawDescription(reading.description), sheet: designSheet(reading, faults, faces) };
}

describe('the page of a drawing', () => {
  it.each(shippedNames())('%s: sheet, tables, cautions and text in one page without network', (name) => {
    const { drawing, sheet } = drawnDesign(name);
    const page = drawPage(drawing, sheet);
    for (const words of ['Three views', 'Parts', 'Media', 'Pumps', 'Faces', 'class 4']) expect(page).toContain(words);
    for (const { name: face } of drawing.parts.flatMap(({ faces }) => faces)) expect(page).toContain(face);
    for (const { finish } of sheet.finishes) expect(page).toContain(finish);
    // The sheet, and what stands for the view where there is none, wide and narrow.
    const body = page.replaceAll(/<script>[\s\S]*?<\/script>/g, '');
    expect(body.match(/<svg (?!class="view-axes")/g)?.length).toBe(3);
    expect(body).not.toMatch(/NaN|undefined|\[object/);
    expect(page.replaceAll('http://www.w3.org/2000/svg', '')).not.toMatch(/(src|href)="https?:/);
    expect(page.length).toBeLessThan(1_500_000);
    expect(drawPage(drawing, sheet)).toBe(page);
  });

  it.each(HOSTILE_TEXTS.map((text, i) => [i, text] as const))(
    'hostile text %i brings no markup of its own',
    (_, text) => {
      const { drawing, sheet } = drawnDesign('wedge-cell');
      const tags = (page: string) =>
        [...new Set([...page.matchAll(/<\/?([a-z][^\s>/]*)/gi)].map(([, tag]) => tag))].sort();
      const plain = drawPage(drawing, {
        ...sheet,
        checks: [{ code: 'caution', severity: 'warning', path: ['a'], problem: 'a' }],
      });
      const hostile = drawPage(
        { ...drawing, parts: drawing.parts.map((one) => ({ ...one, name: text, medium: text })) },
        {
          ...sheet,
          version: text,
          about: text,
          design: { title: text, file: text, text, hash: sheet.design.hash, dials: { [text]: text } },
          checks: [
            { code: 'caution', severity: 'warning', path: [text], problem: text, found: text, suggestion: text },
          ],
          cautions: [text],
          media: sheet.media.map((one) => ({ ...one, medium: text, base: text, parts: [text] })),
          finishes: [{ finish: text, words: text }],
          faces: sheet.faces.map((one) => ({ ...one, name: text, finish: text, touches: [text] })),
          pumps: sheet.pumps.map((one) => ({ ...one, name: text, words: text, aim: text })),
        },
      );
      expect(tags(hostile)).toEqual(tags(plain));
      expect(hostile.replaceAll(/"[^"]*"/g, '""')).not.toMatch(/<[^>]*\son\w+=/);
      expect(hostile.match(/<script>/g)?.length).toBe(2);
    },
  );
});
