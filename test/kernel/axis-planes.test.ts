/**
 * Between axis planes the kernel remembers what walls do to light. Its memory must show neither in the physics (the same design among
 * surfaces of other kinds is traced without it) nor in the bits (what a thread traced before is of no account).
 */
import { describe, expect, test } from 'vitest';
import type { Description } from '../../src/design/description.js';
import { batchStream } from '../../src/engine/trace-share.js';
import { clearBatch, createBatchTally, grownBytes, grownTally } from '../../src/kernel/batch-tally.js';
import { traceBatch } from '../../src/kernel/trace-batch.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { RegionGraph } from '../../src/scene/region-graph.js';
import type { Scene } from '../../src/scene/scene-layout.js';
import { BATCH_HISTORIES, FIGURE_PLACE } from '../../src/tallies/run-tallies.js';
import { beam, describeDesign, finish, flat, medium, part, plainDye } from '../helpers/describe.js';

/** Liquid inside a glass jacket: light comes back to it through other walls than it left by, with another direction. */
function jacketedCell(bead: boolean): Description {
  return describeDesign({
    media: [
      medium('bath', 1.45, { dyes: [plainDye(0.01, 0.9, 520)], absorption: 0.002 }),
      medium('glass', 1.62, { absorption: 0.001, kind: 'solid' }),
    ],
    finishes: [
      finish('silver', { kind: 'metal', metal: 'silver', n: flat(0.3), k: flat(2) }),
      finish('mirror', { kind: 'mirror', reflectance: 0.9 }),
      finish('blue', {
        kind: 'dichroic',
        edgeNm: 480,
        widthNm: 0,
        passes: 'below',
        transmits: 0.9,
        reflects: 0.8,
        absorbs: 0.05,
      }),
    ],
    parts: [
      part('jacket', { kind: 'box', size: [12, 9, 8] }, 'glass', {
        faces: { left: 'mirror', bottom: 'mirror', right: 'silver' },
      }),
      part('cell', { kind: 'box', size: [8, 6, 5] }, 'bath', { at: [0.5, 0.3, -0.2], faces: { front: 'blue' } }),
      // Far out of the way of light; a sphere among the surfaces sends all of it the general way.
      ...(bead ? [part('bead', { kind: 'sphere', radius: 0.01 }, 'glass', { at: [0, 0, 400] })] : []),
    ],
    pumps: [
      beam([0, -20, 0], [0.1, 1, 0.05], {
        beam: { kind: 'patch', outline: { kind: 'rectangle', size: [5, 3] }, divergence: [0.1, 0.05] },
      }),
      // From within the cell: many turns between cell and jacket.
      beam([0.5, 0.3, -1], [0.2, 0.3, 1], {
        name: 'inside',
        power: 3,
        beam: { kind: 'lambertian', outline: { kind: 'rectangle', size: [2, 2] } },
      }),
    ],
    exit: 'jacket.top',
  });
}

const machine = (scene: Scene) => ({
  graph: new RegionGraph(scene),
  tally: createBatchTally(scene, grownTally(scene, new ArrayBuffer(grownBytes(scene)))),
});

function trace(scene: Scene, { graph, tally }: ReturnType<typeof machine>, seed: string, batch: number): Float64Array {
  clearBatch(tally);
  expect(traceBatch(scene, graph, tally, batchStream(seed, batch), batch & 1, BATCH_HISTORIES)).toBe(0);
  return tally.vector.slice();
}

describe('light between axis planes', () => {
  test('ends as it does the general way (seeds "walls" and "general", 60 batches each)', () => {
    const batches = 60;
    const means = [false, true].map((bead) => {
      const { scene } = compileScene(jacketedCell(bead));
      expect(scene.quadrics).toBe(bead ? 1 : 0);
      const traced = machine(scene);
      const rows = Array.from({ length: batches }, (_, b) => trace(scene, traced, bead ? 'general' : 'walls', b));
      const slotOf = (face: number, slot: number) => 2 * (scene.faceSlot[face] + slot);
      // Faces of jacket and cell come first in both designs.
      const places = Array.from({ length: 12 * 5 }, (_, i) => slotOf(Math.floor(i / 5), i % 5)).concat([2, 4]);
      places.push(2 * scene.slots + FIGURE_PLACE.pumpPath, 2 * scene.slots + FIGURE_PLACE.emittedPath);
      return places.map((place) => {
        const values = rows.map((row) => row[place] / BATCH_HISTORIES);
        const mean = values.reduce((sum, value) => sum + value, 0) / batches;
        const spread = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
        return { mean, variance: spread / (batches * (batches - 1)) };
      });
    });
    const [walls, general] = means;
    expect(walls.filter(({ mean }) => mean > 1e-3).length).toBeGreaterThan(10);
    walls.forEach((here, i) => {
      const there = general[i];
      // Four standard errors; a count that one side never saw may be a few in all.
      const error = Math.sqrt(here.variance + there.variance) + 1 / (batches * BATCH_HISTORIES);
      expect(Math.abs(here.mean - there.mean)).toBeLessThan(4 * error);
    });
  });

  test('gives the same bits whatever was traced before (seed "bits")', () => {
    const { scene } = compileScene(jacketedCell(false));
    const fresh = machine(scene);
    const alone = trace(scene, fresh, 'bits', 3);
    const used = machine(scene);
    for (let batch = 0; batch < 3; batch++) trace(scene, used, 'bits', batch);
    used.tally.grown.maps.fill(0);
    used.tally.grown.spectra.fill(0);
    used.graph.forget();
    trace(scene, used, 'other', 7);
    used.tally.grown.maps.fill(0);
    used.tally.grown.spectra.fill(0);
    expect(trace(scene, used, 'bits', 3)).toEqual(alone);
    expect(used.tally.grown.maps).toEqual(fresh.tally.grown.maps);
    expect(used.tally.grown.spectra).toEqual(fresh.tally.grown.spectra);
  });
});
