/**
 * What frees light from total reflection raises the output. The physics is textbook matter: a flat window passes only its escape cone
 * and a dome bonded on it lifts that limit; scattering carries light from trapped angles into the cone (common practice, no source);
 * a taper that opens towards its mouth has the larger étendue there.
 */
import { describe, expect, test } from 'vitest';
import { type Changes, type Estimate, exitFraction, gap, shippedText, traceShipped } from './shipped.js';

const HISTORIES = 16_384;
const SEED = 'optics';

const traced = new Map<string, Promise<Estimate>>();

/** Exit photons per history; a design that several tests look at is traced once. */
function exit(name: string, changes?: Changes): Promise<Estimate> {
  const key = JSON.stringify([name, changes]);
  const known = traced.get(key) ?? traceShipped(name, HISTORIES, SEED, changes).then(exitFraction);
  traced.set(key, known);
  return known;
}

describe(`by 4 standard errors more light leaves, seed ${SEED}`, () => {
  test('by a bonded dome than by the bare window of the same cell', async () => {
    const dome = await exit('box-with-bonded-dome');
    expect(gap(dome, await exit('two-bank-box-cell'))).toBeGreaterThan(4);
    // The same file with its dome cut off is the box cell.
    const text = shippedText('box-with-bonded-dome');
    const part = text.slice(text.indexOf('  dome:\n'), text.indexOf('\npumps:'));
    const bare = await exit('box-with-bonded-dome', {
      replace: [
        [part, ''],
        ['exit: { face: dome.crown.dome, radiance: [6, 6, 18, 12] }', 'exit: lid.top'],
        // A sphere has light flown from surface to surface, which draws other numbers.
        ['  stray: { sphere: { centre: [0 mm, 0 mm, depth / 2], radius: 30 mm } }\n', ''],
      ],
    });
    expect(bare.value).toBe((await exit('two-bank-box-cell')).value);
  });

  test('by a dome bonded than by one that stands off by a film of air', async () => {
    const loose = await exit('box-with-bonded-dome', {
      replace: [['with: rim.bottom', 'with: rim.bottom\n    gap: 0.05 mm']],
    });
    expect(gap(await exit('box-with-bonded-dome'), loose)).toBeGreaterThan(4);
  });

  test('with a white back than with a mirror that reflects the same share', async () => {
    const mirror = await exit('box-with-white-back', {
      replace: [['diffuser: { reflects: whiteness }', 'mirror: whiteness']],
    });
    expect(gap(await exit('box-with-white-back'), mirror)).toBeGreaterThan(4);
  });

  test('from a plate with a white far edge than from one mirrored all round', async () => {
    const mirrored = await exit('edge-lit-plate', { replace: [['diffuser: { reflects: 97 % }', 'mirror: 97 %']] });
    expect(gap(await exit('edge-lit-plate'), mirrored)).toBeGreaterThan(4);
  });

  test('from a plate over a film of air than from one that touches its mirror', async () => {
    const wet = await exit('edge-lit-plate', { replace: [['    gap: air-gap\n', '']] });
    expect(gap(await exit('edge-lit-plate'), wet)).toBeGreaterThan(4);
  });

  test('from a wedge than from a straight cell of the same volume', async () => {
    const straight = await exit('wedge-cell', { dials: { mouth: '5 mm', tip: '5 mm' } });
    expect(gap(await exit('wedge-cell'), straight)).toBeGreaterThan(4);
  });
});
