/** What the rod of rod-fed-cell.yaml does to the pump. */
import { describe, expect, test } from 'vitest';
import { mapEvenness } from '../../src/outcome/map-evenness.js';
import { field, gap, shipped, traceShipped } from './shipped.js';

const HISTORIES = 16_384;
const SEED = 'rod';

const unevenness = async (length: string) => {
  const run = await traceShipped('rod-fed-cell', HISTORIES, SEED, { dials: { 'rod-length': length } });
  const variation = mapEvenness(field(run, 'detector', 'rod-end'))?.variation;
  if (!variation) throw new Error('no variation');
  return variation;
};

describe(`the end of the mixing rod, seed ${SEED}`, () => {
  test('is more even than that of a short rod, by 4 standard errors', async () => {
    expect(gap(await unevenness('5 mm'), await unevenness('100 mm'))).toBeGreaterThan(4);
  });

  // Method of images: neighbouring beams enter at angles a pitch over the focal length apart; in glass their paths part by
  // pitch·L/(n f). Where that is the side of the rod, every beam is folded onto every other, here at L = 70 mm.
  test('is least even where the rod folds all beams onto each other, by 4 standard errors', async () => {
    const { media } = shipped('rod-fed-cell');
    const index = media.get('silica')?.index(445) ?? Number.NaN;
    const [pitch, focalLength, side] = [2, 12, 8];
    const folded = `${((side * index * focalLength) / pitch).toFixed(1)} mm`;
    expect(folded).toBe('70.4 mm');
    const worst = await unevenness(folded);
    expect(gap(worst, await unevenness('100 mm'))).toBeGreaterThan(4);
    expect(gap(worst, await unevenness('50 mm'))).toBeGreaterThan(4);
  });
});
