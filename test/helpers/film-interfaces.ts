import type { LayerDescription } from '../../src/design/description.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { RegionGraph } from '../../src/scene/region-graph.js';
import { beam, describeDesign, finish, flat, medium, part, plainDye } from './describe.js';

export const filmLayer = (n: number, thicknessNm: number, k = 0): LayerDescription => ({
  material: 'own',
  n: flat(n),
  k: flat(k),
  rangeNm: null,
  thicknessNm,
  path: [],
});

/** `count` layers for 575 nm, each off by up to a tenth: narrow resonances inside the band. */
export const unevenLayers = (count: number, k = 0) =>
  Array.from({ length: count }, (_, i) => {
    const n = i % 2 ? 1.48 : 2.42;
    return filmLayer(n, (575 / 4 / n) * (1 + 0.1 * Math.sin(7 * i)), k);
  });

/** A scene whose part in medium `inside` carries the stack on its top, and the interface there both ways. */
export function filmInterfaces(
  layers: readonly LayerDescription[],
  outside: number,
  inside: number,
  polarisation: 'carried' | 'averaged' = 'averaged',
  emissionNm = 700,
) {
  const described = describeDesign({
    media: [medium('outer', outside), medium('inner', inside, { dyes: [plainDye(0.1, 0.9, emissionNm)] })],
    surroundings: 'outer',
    finishes: [finish('films', { kind: 'stack', layers, extrapolates: false })],
    parts: [part('block', { kind: 'box', size: [4, 4, 4] }, 'inner', { faces: { top: 'films' } })],
    pumps: [beam([0, 0, 9], [0, 0, -1], { wavelengthNm: 440 })],
    exit: 'block.bottom',
  });
  const { scene, legend } = compileScene({ ...described, defaults: { ...described.defaults, polarisation } });
  const graph = new RegionGraph(scene);
  const within = graph.locate(0, 0, 1, 0, 0, 1);
  const outward = graph.resolve(within, 5);
  const inward = graph.resolve(graph.neighbour[within * graph.ways + 5], 4);
  return { scene, graph, legend, outward, inward };
}

/** Random numbers from a fixed seed (Park & Miller 1988). */
export function parkMiller(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}
