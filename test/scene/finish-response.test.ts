/** The law of every finish, worked out directly, against what the kernel does with the compiled one. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { FinishDescription } from '../../src/design/description.js';
import { SHARES } from '../../src/kernel/shares.js';
import { splitLight } from '../../src/kernel/split-light.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { finishResponse } from '../../src/scene/finish-response.js';
import { RegionGraph } from '../../src/scene/region-graph.js';
import { beam, describeDesign, finish, flat, medium, part } from '../helpers/describe.js';
import '../helpers/fixed-seeds.js';

const layer = (n: number, k: number, thicknessNm: number) => ({
  material: 'own',
  n: flat(n),
  k: flat(k),
  rangeNm: null,
  thicknessNm,
  path: [],
});

const finishes: readonly FinishDescription[] = [
  finish('clear', { kind: 'clear' }),
  finish('black', { kind: 'black' }),
  finish('mirror', { kind: 'mirror', reflectance: 0.94 }),
  finish('metal', { kind: 'metal', metal: 'own', n: flat(0.8), k: flat(6) }),
  finish('ideal', {
    kind: 'dichroic',
    edgeNm: 452,
    widthNm: 6,
    passes: 'above',
    transmits: 0.95,
    reflects: 0.9,
    absorbs: 0.02,
  }),
  finish('table', {
    kind: 'table',
    wavelengthsNm: [440, 460],
    anglesDeg: [0, 90],
    reflectance: [
      [0.1, 0.5],
      [0.3, 0.9],
    ],
    transmittance: [
      [0.8, 0.4],
      [0.6, 0.1],
    ],
  }),
  finish('white', { kind: 'diffuser', reflects: 0.7, transmits: 0.2 }),
  finish('frosted', {
    kind: 'scatter',
    shape: 'gaussian',
    fwhm: [0.1, 0.1],
    split: { reflects: 0.1, transmits: 0.85 },
  }),
  finish('ground', { kind: 'scatter', shape: 'gaussian', fwhm: [0.1, 0.1], split: null }),
  finish('films', { kind: 'stack', layers: [layer(2.3, 0.01, 60), layer(1.4, 0, 90)], extrapolates: false }),
];

test.each(finishes.map((each) => [each.kind, each] as const))('%s, both ways, any angle', (_, coat) => {
  const description = describeDesign({
    media: [medium('inner', 1.4)],
    finishes: [coat],
    parts: [part('block', { kind: 'box', size: [4, 4, 4] }, 'inner', { faces: { top: coat.name } })],
    pumps: [beam([0, 0, 9], [0, 0, -1], { linewidthNm: 2 })],
    exit: 'block.bottom',
  });
  const { scene, legend } = compileScene(description);
  const graph = new RegionGraph(scene);
  const within = graph.locate(0, 0, 1, 0, 0, 1);
  const outward = graph.resolve(within, 5);
  const inward = graph.resolve(graph.neighbour[within * graph.ways + 5], 4);
  const shares = new Float64Array(SHARES.COUNT);
  fc.assert(
    fc.property(
      fc.boolean(),
      fc.double({ min: 0.01, max: 1, noNaN: true }),
      fc.nat({ max: scene.wavelengths - 1 }),
      (into, cosine, wavelength) => {
        shares[SHARES.index] = into ? 1 : 1.4;
        shares[SHARES.cosine] = cosine;
        splitLight(scene, graph.interfaces, into ? inward : outward, wavelength, shares);
        const { s, p } = finishResponse(coat, {
          indexHere: into ? 1 : 1.4,
          indexBeyond: into ? 1.4 : 1,
          cosine,
          wavelengthNm: legend.grid.nm[wavelength],
          inward: into,
        });
        expect(shares[SHARES.reflected]).toBeCloseTo((s.reflectance + p.reflectance) / 2, 3);
        expect(shares[SHARES.transmitted]).toBeCloseTo((s.transmittance + p.transmittance) / 2, 3);
      },
    ),
    { numRuns: 60 },
  );
});
