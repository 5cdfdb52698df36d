/**
 * Seven ways to spread the same bank on the same face. What is expected of each is common practice, no source: mixing evens out,
 * a wider diffuser is more even and loses more.
 */
import { readdirSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { readDesign } from '../../src/design/read-design.js';
import { mapEvenness } from '../../src/outcome/map-evenness.js';
import { checkScene } from '../../src/scene/check-scene.js';
import { type Changes, type Estimate, FOLDER, field, gap, shipped, shippedText, traceShipped } from './shipped.js';

const SET = 'homogenizers';
const HISTORIES = 16_384;
const SEED = 'spread';
const names = readdirSync(`${FOLDER}/${SET}`)
  .map((file) => file.replace('.yaml', ''))
  .sort();

interface Spread {
  /** Standard deviation over mean of the pump on the cell's front. */
  readonly variation: Estimate;
  readonly arrives: Estimate;
}

async function spread(name: string, changes?: Changes, histories = HISTORIES): Promise<Spread> {
  const run = await traceShipped(`${SET}/${name}`, histories, SEED, changes);
  const map = field(run, 'pumped-face', 'cell.front');
  const variation = mapEvenness(map)?.variation;
  if (!variation) throw new Error(`no variation of ${name}`);
  const value = map.power / 50;
  return { variation, arrives: { value, standardError: Math.sqrt((value * (1 - value)) / histories) } };
}

test('the set is these, and all have the same bank and the same cell', () => {
  expect(names).toEqual(['bare', 'diffuser', 'flys-eye', 'rod', 'rod-and-diffuser', 'tapered-rod', 'tunnel']);
  const bare = shipped(`${SET}/bare`);
  for (const name of names) {
    const { parts, pumps, exit } = shipped(`${SET}/${name}`);
    expect(parts.slice(0, 2)).toEqual(bare.parts);
    expect(exit).toEqual(bare.exit);
    expect(pumps.map((pump) => ({ ...pump, aim: null, path: null }))).toEqual(
      bare.pumps.map((pump) => ({ ...pump, aim: null, path: null })),
    );
    expect(pumps[0].aim).toMatchObject({ kind: 'toward', face: 'cell.front' });
  }
});

describe.each(names)('%s', (name) => {
  test('points editors to the schema, says that its data are invented, cautions, and has no fault', async () => {
    const text = shippedText(`${SET}/${name}`);
    expect(text.split('\n', 1)[0]).toBe('# yaml-language-server: $schema=../design.schema.json');
    const head = text.slice(0, text.indexOf('\ndesign:')).replaceAll('\n# ', ' ');
    expect(head).toMatch(/\binvented\b/);
    expect(head).toMatch(/Cautions: .*class 4 laser.*burns.*local rules.*licence/);
    const reading = await readDesign(`${FOLDER}/${SET}/${name}.yaml`);
    expect(reading.ok ? reading.warnings : reading.faults).toEqual([]);
    if (reading.ok) expect(checkScene(reading.description).faults).toEqual([]);
  });
});

describe(`the spread of the pump, by 4 standard errors, seed ${SEED}`, () => {
  test('every way but the slow pair of lens arrays is more even than none, and costs light', async () => {
    const bare = await spread('bare');
    for (const name of names.filter((each) => each !== 'bare' && each !== 'flys-eye')) {
      const other = await spread(name);
      expect(gap(bare.variation, other.variation), name).toBeGreaterThan(4);
      expect(gap(bare.arrives, other.arrives), name).toBeGreaterThan(4);
    }
  });

  test('a diffuser before the rod is more even than the rod alone, and costs light', async () => {
    const many = 65_536;
    const [rod, both] = [await spread('rod', {}, many), await spread('rod-and-diffuser', {}, many)];
    expect(gap(rod.variation, both.variation)).toBeGreaterThan(4);
    expect(gap(rod.arrives, both.arrives)).toBeGreaterThan(4);
  });

  test('a wider diffuser melts the spots and sends less light to the cell', async () => {
    const [narrow, wide] = [
      await spread('diffuser', { dials: { spread: '1 deg' } }),
      await spread('diffuser', { dials: { spread: '10 deg' } }),
    ];
    expect(gap(narrow.variation, wide.variation)).toBeGreaterThan(4);
    expect(gap(narrow.arrives, wide.arrives)).toBeGreaterThan(4);
  });

  test('a rod folds five beams a pitch apart evenly at 72 mm and onto each other at 180 mm', async () => {
    // Method of images: in glass the beams part by pitch·L/(n f) = 0.0546 L; at 0.4 of the rod's side they fold to equal distances,
    // at the whole side all onto one another.
    const [even, folded] = [await spread('rod'), await spread('rod', { dials: { 'rod-length': '180 mm' } })];
    expect(gap(folded.variation, even.variation)).toBeGreaterThan(4);
  });
});
