/** Six stacks in a ring round a hexagon: no side is better lit than another. */
import { expect, test } from 'vitest';
import { binomialError, share } from '../helpers/trace.js';
import { traceShipped } from './shipped.js';

const HISTORIES = 32_768;

test('every side turns away the same share within 4 standard errors, seed ring', async () => {
  const run = await traceShipped('ring-pumped-hexagon', HISTORIES, 'ring');
  const sides = [1, 2, 3, 4, 5, 6].map((side) => {
    const where = `cell.side-${side}`;
    return share(run, { fate: 'reflected-at-entry', where }) + share(run, { fate: 'left-elsewhere', where });
  });
  const mean = sides.reduce((a, b) => a + b, 0) / 6;
  expect(mean).toBeGreaterThan(0.02);
  for (const side of sides) expect(Math.abs(side - mean)).toBeLessThan(4 * binomialError(mean, HISTORIES));
});
