import seedrandom from 'seedrandom';
import { expect, test } from 'vitest';
import type { Vector3 } from '../../src/design/description.js';
import { beam, describeDesign, medium, part } from '../helpers/describe.js';
import { traceHere } from '../helpers/trace.js';

test('a scene of more regions than the graph can hold is traced all the same (seed crowd)', async () => {
  const random = seedrandom('crowd');
  const spot = (): Vector3 => [36 * random() - 18, 36 * random() - 18, 36 * random() - 18];
  const beads = Array.from({ length: 60 }, (_, i) =>
    i % 2 === 0
      ? part(`bead-${i}`, { kind: 'sphere', radius: 0.5 + random() }, 'glass', { at: spot() })
      : part(`brick-${i}`, { kind: 'box', size: [1 + random(), 1 + random(), 1 + random()] }, 'glass', {
          at: spot(),
          turns: [
            { axis: 'z', angle: random() },
            { axis: 'x', angle: random() },
          ],
        }),
  );
  const design = describeDesign({
    media: [medium('bath', 1.33, { absorption: 0.002 }), medium('glass', 1.5)],
    parts: [part('cell', { kind: 'box', size: [40, 40, 40] }, 'bath'), ...beads],
    pumps: [
      beam([0, 0, 0], [0, 0, 1], { beam: { kind: 'lambertian', outline: { kind: 'rectangle', size: [30, 30] } } }),
    ],
    exit: 'cell.top',
  });
  const run = await traceHere(design, 12_288);
  const ends = run.tallies.slots.reduce((sum, _, i) => sum + run.tallies.moments.sum[2 * i], 0);
  expect(ends).toBe(12_288);
});
