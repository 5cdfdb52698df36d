/** Pictures as files: what is in them, that nothing of a page is missing in them, and that PNG files hold their text. */
import { Resvg } from '@resvg/resvg-js';
import { decode } from 'fast-png';
import { describe, expect, it } from 'vitest';
import { LIGHT } from '../../../src/report/colours.js';
import { drawPictures } from '../../../src/report/pictures/draw-pictures.js';
import { choiceOf } from '../../../src/report/pictures/picture-choice.js';
import { picturePng } from '../../../src/report/pictures/picture-png.js';
import { runPictures } from '../../../src/report/pictures/run-pictures.js';
import { wrapped } from '../../../src/report/pictures/standalone-picture.js';
import { sampleRun } from '../../run-folder/sample-run.js';
import { HOSTILE_TEXTS, hostileRun } from '../hostile-run.js';
import { outline } from '../outline.js';

/** Reading the fonts of a machine takes long. */
const NO_FONTS = { font: { loadSystemFonts: false } };

const { record, arrays } = sampleRun();
const pictures = runPictures(record, arrays);
const svgOf = (id: string) => pictures.find((picture) => picture.id === id)?.draw().svg ?? '';
/** Words a reader sees. */
const textOf = (svg: string) => svg.replace(/<(style|title|desc)\b[^>]*>[^<]*<\/\1>/g, '').replace(/<[^>]*>/g, ' ');

describe('the pictures of a run', () => {
  it('are all its plots, each under a name of its own', () => {
    expect(pictures.map(({ name }) => name)).toEqual([
      'picture-flow',
      'picture-map-exit-lid-top',
      'picture-map-detector-etc',
      'picture-map-detector-etc-2',
      'picture-map-absorbed-pump',
      'picture-spectra',
      'picture-chromaticity',
      'picture-directions-exit-lid-top',
      'picture-radiance-exit-lid-top',
      'picture-absorptions-per-history',
      'picture-chain',
    ]);
  });

  it.each(pictures.map((picture) => [picture.id, picture] as const))('%s stands alone', (_, picture) => {
    const { svg, width } = picture.draw();
    // An XML reader of another make takes it, with the size it says.
    expect(new Resvg(svg, NO_FONTS).width).toBe(Math.ceil(width));
    expect(svg).toMatch(/^<svg xmlns="http:\/\/www\.w3\.org\/2000\/svg"/);
    expect(svg).not.toMatch(/var\(|NaN|Infinity|undefined/);
    expect(svg.match(/(?:href|src|url)[=(]"?(?!data:image\/png|#)[^"\s)]{3,}/g)).toBeNull();
    expect(svg).toContain(`<rect width="${width}"`);
    expect(svg).toContain(LIGHT.ink);
    expect(svg).toContain('DejaVu Sans Condensed, DejaVu Sans');
    const text = textOf(svg);
    for (const words of [picture.title, record.design.title, '200\u00a0000 histories', 'one standard error']) {
      expect(text).toContain(words);
    }
  });

  it.each([
    ['flow', '24.000 ± 0.066 W'],
    ['map exit-lid.top', 'irradiance, W/cm²'],
    ['map exit-lid.top', 'u, mm'],
    ['map absorbed-pump', 'absorbed power density, W/cm³'],
    ['spectra', 'wavelength, nm'],
    ['spectra', 'absorption of dye in bath, to its peak'],
    ['chromaticity', '0.33120 ± 0.00040'],
    ['directions exit-lid.top', 'radiant intensity, W/sr'],
    ['absorptions-per-history', '% of histories'],
    ['chain', '63.50 ± 0.18 lm/W'],
    ['chain', 'power after each step, W'],
  ])('%s says %s', (id, words) => {
    expect(textOf(svgOf(id)).replace(/\s+/g, ' ')).toContain(words);
  });

  it('show all three cuts of a volume', () => {
    const cuts = [...svgOf('map absorbed-pump').matchAll(/cut at ([xyz]) =/g)].map(([, axis]) => axis);
    expect(new Set(cuts)).toEqual(new Set(['x', 'y', 'z']));
    expect(svgOf('map absorbed-pump').match(/<image /g)).toHaveLength(3);
  });

  it('keep their structure', async () => {
    await expect(`${outline(svgOf('absorptions-per-history'))}\n`).toMatchFileSnapshot(
      '../outline/file-of-histogram.txt',
    );
  });
});

describe('PNG files', () => {
  /** Pixels darker than half in a box of the drawing's units. */
  function ink(png: Uint8Array, scale: number, [x0, y0, x1, y1]: readonly [number, number, number, number]): number {
    const { width, data, channels } = decode(png);
    let dark = 0;
    for (let y = Math.round(y0 * scale); y < y1 * scale; y++) {
      for (let x = Math.round(x0 * scale); x < x1 * scale; x++) dark += data[(y * width + x) * channels] < 128 ? 1 : 0;
    }
    return dark;
  }
  const TITLE = [16, 20, 200, 40] as const;
  const picture = pictures.find(({ id }) => id === 'absorptions-per-history')?.draw() ?? { svg: '', width: 0 };

  it('hold their text, without fonts of the machine', async () => {
    const png = await picturePng(picture);
    const { width } = decode(png);
    expect(width).toBe(Math.round(2 * picture.width));
    expect(ink(png, 2, TITLE)).toBeGreaterThan(400);
    // Axis title at the bottom: 'absorptions by dye in one history'.
    const { height } = decode(png);
    expect(ink(png, 2, [120, height / 2 - 60, 300, height / 2 - 35])).toBeGreaterThan(200);
    // The same drawing with no font at hand has none there: the count above is of letters.
    const silent = new Resvg(picture.svg, { ...NO_FONTS, fitTo: { mode: 'zoom', value: 2 } });
    expect(ink(silent.render().asPng(), 2, TITLE)).toBe(0);
  });

  it('are as wide as a printed page at most', async () => {
    const wide = pictures.find(({ id }) => id === 'map absorbed-pump')?.draw() ?? { svg: '', width: 0 };
    expect(wide.width).toBeGreaterThan(1000);
    expect(decode(await picturePng(wide)).width).toBeLessThanOrEqual(1480);
  });
});

describe('drawPictures', () => {
  it.each([
    ['none', []],
    ['svg', ['.svg']],
    ['all', ['.svg', '.png']],
  ] as const)('%s', async (choice, endings) => {
    // Enough of a run to see how files are named; each PNG takes its time.
    const short = { ...record, maps: record.maps.slice(0, 1), spectra: [], angles: [] };
    const { records, files, noPng } = await drawPictures(short, arrays, choice);
    expect(noPng).toBeNull();
    expect(files.map(([name]) => name).sort()).toEqual(records.flatMap((one) => one.files).sort());
    expect(new Set(files.map(([name]) => name.replace(/^[^.]*/, '')))).toEqual(new Set(endings));
    expect(records).toHaveLength(choice === 'none' ? 0 : runPictures(short, arrays).length);
    expect(choiceOf({ ...record, pictures: records })).toBe(choice);
  });
});

describe('hostile texts', () => {
  it.each([...HOSTILE_TEXTS, 'not for XML: \uffff\ufffe'].map((text) => [text.slice(0, 40), text] as const))(
    '%s stay text',
    (_, text) => {
      const { record: hostile, arrays: hostileArrays } = hostileRun(text);
      for (const picture of runPictures(hostile, hostileArrays)) {
        const { svg, width } = picture.draw();
        expect(new Resvg(svg, NO_FONTS).width).toBe(Math.ceil(width));
        const tags = new Set([...svg.matchAll(/<([a-zA-Z]+)/g)].map(([, tag]) => tag));
        for (const tag of tags) expect(TAGS).toContain(tag);
        expect(svg.replace(/"[^"]*"/g, '""')).not.toMatch(/<[^<>]*\son\w+=/);
        expect(picture.name).toMatch(/^picture-[^/\\.]+$/);
      }
    },
  );
});

const TAGS = [
  ...['svg', 'title', 'desc', 'style', 'g', 'rect', 'path', 'line', 'circle', 'ellipse', 'text', 'tspan', 'image'],
  ...['defs', 'use', 'linearGradient', 'stop'],
];

describe('wrapped', () => {
  it('breaks between words, cuts what is longer than a line, and loses nothing else', () => {
    expect(wrapped('one two three', 7)).toEqual(['one two', 'three']);
    expect(wrapped('abcdefghij', 5)).toEqual(['abcd…']);
    expect(wrapped('a '.repeat(50), 9).join(' ').split(' ')).toHaveLength(50);
    expect(wrapped('', 9)).toEqual([]);
  });
});
