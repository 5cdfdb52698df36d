/** Light that nothing ever ends must not hang the program. */
import { describe, expect, test } from 'vitest';
import type { FinishDescription } from '../../src/design/description.js';
import { beam, describeDesign, finish, medium, part, plainDye } from '../helpers/describe.js';
import { share, traceHere } from '../helpers/trace.js';

const lossless: readonly (readonly [string, FinishDescription])[] = [
  [
    'a table with R + T = 1',
    finish('walls', {
      kind: 'table',
      wavelengthsNm: [400, 500, 700],
      anglesDeg: [0, 30, 90],
      reflectance: [
        [0.1, 0.3, 0.7],
        [0.13, 0.31, 0.77],
        [0.2, 0.4, 0.9],
      ],
      transmittance: [
        [0.9, 0.7, 0.3],
        [0.87, 0.69, 0.23],
        [0.8, 0.6, 0.1],
      ],
    }),
  ],
  [
    'a dichroic that loses nothing',
    finish('walls', {
      kind: 'dichroic',
      edgeNm: 480,
      widthNm: 0,
      passes: 'above',
      transmits: 0.9,
      reflects: 0.95,
      absorbs: 0,
    }),
  ],
];

function cell(walls: FinishDescription, solid: 'box' | 'cylinder') {
  return describeDesign({
    // Clear at its own emission: nothing absorbs there.
    media: [medium('bath', 1.5, { dyes: [{ ...plainDye(0, 1, 520), absorption: (nm) => (nm < 480 ? 2 : 0) }] })],
    finishes: [walls],
    parts: [
      solid === 'box'
        ? part('cell', { kind: 'box', size: [6, 6, 6] }, 'bath', { faces: { '*': 'walls' } })
        : part('cell', { kind: 'cylinder', radius: 3, height: 6 }, 'bath', { faces: { '*': 'walls' } }),
    ],
    pumps: [beam([0.1, 0.2, 0.3], [0.3, 0.2, -1])],
    exit: 'cell.top',
  });
}

describe.each(['box', 'cylinder'] as const)('in a %s', (solid) => {
  test.each(lossless)('%s: what is reflected totally for ever is trapped, and every history ends', async (_, walls) => {
    const run = await traceHere(cell(walls, solid), 64);
    const ends = run.tallies.slots.reduce((sum, __, i) => sum + run.tallies.moments.sum[2 * i], 0);
    expect(ends).toBe(64);
    expect(share(run, { fate: 'left-by-exit' })).toBeGreaterThan(0);
  });

  test('a cavity of perfect diffusers ends as trapped', async () => {
    const white = finish('walls', { kind: 'diffuser', reflects: 1, transmits: 0 });
    const inside = cell(white, solid);
    const design = {
      ...inside,
      exit: { name: 'far', path: [], pixels: null },
      detectors: [
        {
          name: 'far',
          path: [],
          pixels: null,
          target: { kind: 'plane', at: [0, 0, 50], normal: [0, 0, 1], outline: { kind: 'disc', radius: 5 } },
        } as const,
      ],
    };
    const run = await traceHere(design, 2);
    expect(share(run, { fate: 'trapped', where: 'cell' })).toBe(1);
  });
});
