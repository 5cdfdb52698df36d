import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Description } from '../../src/design/description.js';
import { shapeFaces } from '../../src/design/shape-faces.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { RegionGraph } from '../../src/scene/region-graph.js';
import { beam, describeDesign, medium, part } from '../helpers/describe.js';
import { ownerByHand, type PilePart, pileArbitrary } from '../helpers/random-pile.js';

function pileDesign(pile: readonly PilePart[]): Description {
  return describeDesign({
    media: [medium('glass', 1.5)],
    parts: pile.map(({ shape, at, turns, hole }, i) =>
      part(`p${i}`, shape, 'glass', { at, turns, minus: hole === null ? [] : [{ name: 'hole', ...hole }] }),
    ),
    pumps: [beam([50, 0, 0], [-1, 0, 0])],
    exit: `p0.${shapeFaces(pile[0].shape).at(-1)}`,
  });
}

const coordinate = fc.double({ min: -8, max: 8, noNaN: true });

describe('region graph', () => {
  test('the owner of a point is that of the textbook inside test, for random piles', () => {
    fc.assert(
      fc.property(
        pileArbitrary,
        fc.array(fc.tuple(coordinate, coordinate, coordinate), { minLength: 20, maxLength: 20 }),
        (pile, points) => {
          const graph = new RegionGraph(compileScene(pileDesign(pile)).scene);
          for (const p of points) {
            const truth = ownerByHand(pile, p, 1e-6);
            if (truth !== null) expect(graph.owner[graph.locate(...p, 0.6, 0.64, 0.48)]).toBe(truth);
          }
        },
      ),
      { numRuns: 200, seed: 20261201 },
    );
  });

  test('crossing a surface and coming back leads to the same region', () => {
    fc.assert(
      fc.property(pileArbitrary, fc.tuple(coordinate, coordinate, coordinate), (pile, p) => {
        const graph = new RegionGraph(compileScene(pileDesign(pile)).scene);
        const region = graph.locate(...p, 0.6, 0.64, 0.48);
        for (let way = 0; way < graph.ways; way++) {
          if (way < 2 * graph.families && !Number.isFinite(graph.bound[region * 2 * graph.families + way])) continue;
          graph.resolve(region, way);
          const beyond = graph.neighbour[region * graph.ways + way];
          const back = way < 2 * graph.families ? way ^ 1 : way;
          graph.resolve(beyond, back);
          expect(graph.neighbour[beyond * graph.ways + back]).toBe(region);
        }
      }),
      { numRuns: 100, seed: 7 },
    );
  });

  test('forgetting regions changes no answer', () => {
    const pile: PilePart[] = [
      { shape: { kind: 'box', size: [4, 4, 4] }, at: [0, 0, 0], turns: [], hole: null },
      { shape: { kind: 'sphere', radius: 2 }, at: [2, 0, 0], turns: [], hole: null },
    ];
    const graph = new RegionGraph(compileScene(pileDesign(pile)).scene);
    const before = graph.owner[graph.locate(1.9, 0.1, 0.2, 1, 0, 0)];
    graph.forget();
    expect(graph.owner[graph.locate(1.9, 0.1, 0.2, 1, 0, 0)]).toBe(before);
  });
});
