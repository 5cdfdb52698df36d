import { expect, test } from 'vitest';
import { beam, describeDesign, medium, part, plainDye } from '../helpers/describe.js';
import { binomialError, figure, share, traceHere } from '../helpers/trace.js';

const HISTORIES = 20_480;

/** A cube of the index around it, so absorbing that all pump light ends in the dye, which cannot take back its own. */
function cube(diluteYield: number | null) {
  const dye = { ...plainDye(50, 0.6, 520), absorption: (nm: number) => (nm < 500 ? 50 : 0) };
  return describeDesign({
    media: [medium('bath', 1, { dyes: [diluteYield === null ? dye : { ...dye, diluteYield }] })],
    parts: [part('cell', { kind: 'box', size: [10, 10, 10] }, 'bath')],
    pumps: [beam([0, 0, 20], [0, 0, -1])],
    exit: 'cell.left',
  });
}

test('what lies between the dilute yield and the one in use is quenched, by 4 standard errors, seed 1', async () => {
  const plain = await traceHere(cube(null), HISTORIES);
  const split = await traceHere(cube(0.9), HISTORIES);
  const absorbed = figure(plain, 'pumpAbsorbed');
  const quenched = share(split, { fate: 'quenched', light: 'pump', where: 'cell', by: 'dye' });
  const lost = share(split, { fate: 'lost-in-dye' });
  // By the definition of both yields: 0.9 − 0.6 and 1 − 0.9 of what is absorbed.
  expect(Math.abs(quenched - 0.3 * absorbed)).toBeLessThan(4 * binomialError(0.3, HISTORIES));
  expect(Math.abs(lost - 0.1 * absorbed)).toBeLessThan(4 * binomialError(0.1, HISTORIES));
  // The same photons end as without the split, and nothing else changes.
  expect(share(plain, { fate: 'quenched' })).toBe(0);
  expect(quenched + lost).toBeCloseTo(share(plain, { fate: 'lost-in-dye' }), 12);
  expect(figure(split, 'exitPhotons')).toBe(figure(plain, 'exitPhotons'));
});
