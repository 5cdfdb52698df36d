import { describe, expect, test } from 'vitest';
import type { Description, ShapeDescription, Vector3 } from '../../src/design/description.js';
import { batchStream } from '../../src/engine/trace-share.js';
import { clearBatch, createBatchTally, grownBytes, grownTally } from '../../src/kernel/batch-tally.js';
import { findBoundary } from '../../src/kernel/next-boundary.js';
import { NOW, RAY, turnTo } from '../../src/kernel/photon.js';
import { traceBatch } from '../../src/kernel/trace-batch.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { RegionGraph } from '../../src/scene/region-graph.js';
import { beam, describeDesign, finish, medium, part, plainDye } from '../helpers/describe.js';
import { boxFacets, bumpyFacets, icosphereFacets, joinFacets, mustClose, turned } from '../helpers/mesh-bodies.js';

/** Photons of every fate by name, and figures, of some batches of 1024. */
function trace(description: Description, batches: number, seed: string) {
  const { scene, legend } = compileScene(description);
  const graph = new RegionGraph(scene);
  const tally = createBatchTally(scene, grownTally(scene, new ArrayBuffer(grownBytes(scene))));
  const counts = new Map<string, number[]>();
  const figures: number[][] = [];
  let defects = 0;
  for (let batch = 0; batch < batches; batch++) {
    clearBatch(tally);
    defects += traceBatch(scene, graph, tally, batchStream(seed, batch), 0, 1024);
    legend.slots.forEach(({ fate, light, where, by }, slot) => {
      const name = [fate, light, where, by].join(' ');
      const list = counts.get(name) ?? [];
      list[batch] = tally.vector[2 * slot];
      counts.set(name, list);
    });
    figures.push([...tally.vector.slice(2 * scene.slots)]);
  }
  return { counts, figures, defects, histories: 1024 * batches };
}

const total = (list: readonly number[]) => list.reduce((a, b) => a + b, 0);
/** Variance of the sum of a list of batches. */
function variance(list: readonly number[]): number {
  const mean = total(list) / list.length;
  return (list.reduce((sum, x) => sum + (x - mean) ** 2, 0) * list.length) / (list.length - 1);
}

const meshShape = (facets: Parameters<typeof mustClose>[0]): ShapeDescription => ({
  kind: 'mesh',
  mesh: mustClose(facets),
});
const FACES = { left: 'half', right: 'half', front: 'pass', back: 'pass', bottom: 'white' };

function greenCell(body: ShapeDescription): Description {
  return describeDesign({
    media: [medium('bath', 1.36, { dyes: [plainDye(0.3, 0.95, 520)], absorption: 0.002 })],
    finishes: [
      finish('half', { kind: 'mirror', reflectance: 0.9 }),
      finish('white', { kind: 'diffuser', reflects: 0.9, transmits: 0 }),
      finish('pass', {
        kind: 'dichroic',
        edgeNm: 490,
        widthNm: 5,
        passes: 'below',
        transmits: 0.95,
        reflects: 0.97,
        absorbs: 0,
      }),
    ],
    parts: [part('cell', body, 'bath', { faces: FACES })],
    pumps: [
      beam([0, -30, 0], [0, 1, 0], {
        beam: { kind: 'patch', outline: { kind: 'rectangle', size: [8, 4] }, divergence: [0.05, 0.1] },
      }),
    ],
    exit: 'cell.top',
  });
}

describe('light in meshes', () => {
  test('a box as a mesh has the fates of the box, each within 4 standard errors (seed mesh-box)', () => {
    const box = trace(greenCell({ kind: 'box', size: [10, 4, 6] }), 24, 'mesh-box/a');
    const mesh = trace(greenCell(meshShape(boxFacets([10, 4, 6]))), 24, 'mesh-box/b');
    expect(mesh.defects).toBe(0);
    for (const [name, list] of box.counts) {
      const other = mesh.counts.get(name);
      if (other === undefined) throw new Error(`the mesh has no fate ${name}`);
      const error = Math.sqrt(variance(list) + variance(other) + 1);
      expect(Math.abs(total(list) - total(other)) / error, name).toBeLessThan(4);
    }
  });

  test('the face of a mesh that light leaves by, and its finish, are those of its group', () => {
    const { counts } = trace(greenCell(meshShape(boxFacets([10, 4, 6]))), 4, 'faces');
    expect(total(counts.get('left-by-exit emitted cell.top ') ?? [])).toBeGreaterThan(100);
    expect(total(counts.get('absorbed-by-finish emitted cell.left half') ?? [])).toBeGreaterThan(10);
    expect(total(counts.get('left-elsewhere emitted cell.left ') ?? [])).toBe(0);
  });

  test.each([
    ['ball of 320 facets', icosphereFacets(3, 2)],
    ['ball of 5120 facets', icosphereFacets(3, 4)],
    ['box', boxFacets([2, 3, 5])],
  ])('the mean chord of a %s is 4V/S of the mesh (Cauchy): even light on every facet (seed chord)', (_, facets) => {
    // Isotropic lines through a convex body, here drawn from a disc that its shadow never leaves, have chords of mean 4V/S.
    const mesh = mustClose(facets);
    const expected = (4 * mesh.volume) / mesh.area;
    const reach = 3.2;
    const { scene } = compileScene(
      describeDesign({
        media: [medium('glass', 1), medium('air2', 1)],
        parts: [part('body', { kind: 'mesh', mesh }, 'glass')],
        pumps: [beam([0, 0, 9], [0, 0, -1])],
        exit: `body.${mesh.groups[0]}`,
      }),
    );
    let state = 11;
    const random = () => {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      return (state + 0.5) / 2 ** 32;
    };
    const graph = new RegionGraph(scene);
    const batches: { chord: number; hits: number }[] = [];
    for (let batch = 0; batch < 40; batch++) {
      let chord = 0;
      let hits = 0;
      for (let i = 0; i < 500; i++) {
        const cos = 2 * random() - 1;
        const turn = 2 * Math.PI * random();
        const sin = Math.sqrt(1 - cos * cos);
        const d: Vector3 = [sin * Math.cos(turn), sin * Math.sin(turn), cos];
        const u: Vector3 = [-Math.sin(turn), Math.cos(turn), 0];
        const v: Vector3 = [-cos * Math.cos(turn), -cos * Math.sin(turn), sin];
        const r = reach * Math.sqrt(random());
        const a = 2 * Math.PI * random();
        const start = d.map((c, k) => -20 * c + r * (Math.cos(a) * u[k] + Math.sin(a) * v[k])) as unknown as Vector3;
        const length = pathInside(scene, graph, start, d);
        chord += length;
        if (length > 0) hits++;
      }
      batches.push({ chord, hits });
    }
    const chord = batches.reduce((sum, one) => sum + one.chord, 0);
    const hits = batches.reduce((sum, one) => sum + one.hits, 0);
    const mean = chord / hits;
    const error = Math.sqrt(variance(batches.map((one) => one.chord - mean * one.hits))) / hits;
    expect(Math.abs(mean - expected)).toBeLessThan(4 * error);
    expect(error / expected).toBeLessThan(0.01);
  });

  test('a ball of facets keeps light as the ball does, and misses it by a quarter with every halving of its edges', () => {
    // Beer's law over a fixed grid of parallel chords: no chance in it, so the order of convergence is plain to see.
    const [radius, cells] = [2, 60];
    const mean = (chord: (x: number, y: number) => number) => {
      let sum = 0;
      for (let i = 0; i < cells * cells; i++) {
        const at = (k: number) => radius * ((2 * k + 1) / cells - 1);
        sum += Math.exp(-chord(at(i % cells), at(Math.floor(i / cells))));
      }
      return sum / cells ** 2;
    };
    const ball = mean((x, y) => 2 * Math.sqrt(Math.max(0, radius ** 2 - x * x - y * y)));
    const misses = [1, 2, 3, 4].map((level) => {
      const { scene } = compileScene(
        describeDesign({
          media: [medium('glass', 1)],
          parts: [
            part('body', meshShape(icosphereFacets(radius, level)), 'glass', { turns: [{ axis: 'x', angle: 0.3 }] }),
          ],
          pumps: [beam([0, 0, 9], [0, 0, -1])],
          exit: 'body.surface',
        }),
      );
      const graph = new RegionGraph(scene);
      return mean((x, y) => pathInside(scene, graph, [x, y, 9], [0, 0, -1])) - ball;
    });
    for (let i = 1; i < misses.length; i++) {
      expect(misses[i - 1] / misses[i]).toBeGreaterThan(3.5);
      expect(misses[i - 1] / misses[i]).toBeLessThan(4.6);
    }
  });

  test('of light that starts inside and is aimed exactly at corners and edges, none is lost, whatever the finish', () => {
    for (const [level, name] of [
      [0, 'clear'],
      [1, 'bright'],
      [2, 'white'],
    ] as const) {
      const shape = meshShape(icosphereFacets(2, level));
      if (shape.kind !== 'mesh') return;
      const { facetPoint, facetCorner } = shape.mesh.tree;
      const design = (start: Vector3, direction: Vector3) =>
        describeDesign({
          media: [medium('bath', 1.4, { absorption: 0.02 })],
          finishes: [
            finish('bright', { kind: 'mirror', reflectance: 0.999 }),
            finish('white', { kind: 'diffuser', reflects: 0.6, transmits: 0.4 }),
          ],
          parts: [part('body', shape, 'bath', { faces: { surface: name } })],
          pumps: [beam(start, direction)],
          exit: 'body.surface',
        });
      for (let e = 0; e < facetCorner.length; e += [5, 23, 97][level]) {
        const f = e % 3 === 2 ? e - 2 : e + 1;
        const share = e % 2 === 0 ? 0 : 0.5;
        const to = [0, 1, 2].map(
          (k) => facetPoint[3 * facetCorner[e] + k] * (1 - share) + facetPoint[3 * facetCorner[f] + k] * share,
        );
        const norm = Math.hypot(...to);
        const { counts, defects } = trace(
          design([0, 0, 0], to.map((c) => c / norm) as unknown as Vector3),
          1,
          `edge ${e}`,
        );
        expect(defects).toBe(0);
        expect([...counts.values()].reduce((sum, list) => sum + total(list), 0)).toBe(1024);
        expect(
          [...counts].filter(([fate]) => fate.startsWith('trapped')).reduce((sum, [, list]) => sum + total(list), 0),
        ).toBe(0);
      }
    }
  });

  test('nothing is lost in bumpy, hollow and touching meshes, with mirrors all round or none (seed closed)', () => {
    const hollow = joinFacets(boxFacets([6, 6, 6]), turned(icosphereFacets(2, 2)));
    for (const body of [bumpyFacets(3, 3, 0.6, 5), hollow]) {
      for (const name of ['clear', 'half', 'white', 'frosted']) {
        const shape = meshShape(body);
        const faces = { '*': name };
        const { counts, defects, histories } = trace(
          describeDesign({
            media: [
              medium('bath', 1.4, { dyes: [plainDye(0.05, 0.9, 520)] }),
              medium('stone', 1.7, { absorption: 0.01, kind: 'solid' }),
            ],
            finishes: [
              finish('half', { kind: 'mirror', reflectance: 0.98 }),
              finish('white', { kind: 'diffuser', reflects: 0.6, transmits: 0.39 }),
              finish('frosted', { kind: 'scatter', shape: 'gaussian', fwhm: [0.3, 0.3], split: null }),
            ],
            parts: [
              part('first', shape, 'bath', { faces }),
              // Face to face with the hollow box, and across the bumpy one.
              part('second', { kind: 'box', size: [4, 4, 4] }, 'stone', { at: [5, 0, 0] }),
              part('third', shape, 'stone', { at: [0, 0, 2], turns: [{ axis: 'x', angle: 0.4 }] }),
            ],
            pumps: [
              beam([0, 0, 9], [0, 0, -1], {
                beam: { kind: 'lambertian', outline: { kind: 'rectangle', size: [12, 12] } },
              }),
              beam([0.1, 0.2, 0.3], [0.3, -0.5, 0.7], {
                name: 'inside',
                beam: { kind: 'lambertian', outline: { kind: 'disc', radius: 3 } },
              }),
            ],
            exit: `first.${shape.kind === 'mesh' ? shape.mesh.groups[0] : ''}`,
          }),
          2,
          `closed/${name}`,
        );
        expect(defects).toBe(0);
        expect([...counts.values()].reduce((sum, list) => sum + total(list), 0)).toBe(histories);
      }
    }
  });
});

/** Path of one straight ray through index-matched parts, by the kernel's own steps. */
function pathInside(
  scene: ReturnType<typeof compileScene>['scene'],
  graph: RegionGraph,
  start: Vector3,
  d: Vector3,
): number {
  const ray = new Float64Array(RAY.COUNT);
  const now = new Int32Array(NOW.COUNT);
  ray.set([...start, ...d]);
  ray[RAY.depth] = Number.POSITIVE_INFINITY;
  now[NOW.region] = graph.locate(...start, ...d);
  turnTo(ray);
  let inside = 0;
  for (let step = 0; step < 1000; step++) {
    now[NOW.medium] = graph.medium[now[NOW.region]];
    findBoundary(scene, graph, ray, now);
    if (now[NOW.way] < 0) return inside;
    const ahead = ray[RAY.ahead];
    if (graph.owner[now[NOW.region]] > 0) inside += ahead;
    for (let c = 0; c < 3; c++) ray[c] += ahead * ray[3 + c];
    graph.resolve(now[NOW.region], now[NOW.way]);
    now[NOW.region] = graph.neighbour[now[NOW.region] * graph.ways + now[NOW.way]];
  }
  throw new Error('a straight ray crosses no thousand surfaces');
}
