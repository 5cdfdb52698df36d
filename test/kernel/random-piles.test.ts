/**
 * Light in random piles of parts. STOKESWELL_PILE_HISTORIES raises the number of histories (10^8 takes hours).
 */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Description, FinishDescription, Vector3 } from '../../src/design/description.js';
import { shapeFaces } from '../../src/design/shape-faces.js';
import { batchStream } from '../../src/engine/trace-share.js';
import { clearBatch, createBatchTally, grownBytes, grownTally } from '../../src/kernel/batch-tally.js';
import { traceBatch } from '../../src/kernel/trace-batch.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { RegionGraph } from '../../src/scene/region-graph.js';
import { FIGURE } from '../../src/tallies/run-tallies.js';
import { beads, beam, describeDesign, finish, haze, medium, part, plainDye } from '../helpers/describe.js';
import { ownerByHand, type PilePart, pileArbitrary } from '../helpers/random-pile.js';

const WANTED = Number(process.env.STOKESWELL_PILE_HISTORIES ?? 1_000_000);
const HISTORIES_PER_PILE = 2048;

const finishes: readonly FinishDescription[] = [
  finish('half-mirror', { kind: 'mirror', reflectance: 0.7 }),
  finish('white', { kind: 'diffuser', reflects: 0.6, transmits: 0.3 }),
  finish('frosted', { kind: 'scatter', shape: 'gaussian', fwhm: [0.3, 0.3], split: null }),
  finish('hat', { kind: 'scatter', shape: 'top-hat', fwhm: [0.8, 0.8], split: { reflects: 0.4, transmits: 0.5 } }),
  finish('brushed', { kind: 'scatter', shape: 'gaussian', fwhm: [0.6, 0.1], split: null }),
  finish('measured', {
    kind: 'bsdf',
    incidenceDeg: [0, 60],
    scatterDeg: [0, 45, 90],
    azimuthDeg: [0, 180],
    reflected: [
      [
        [0.1, 0.1],
        [0.05, 0.05],
        [0.02, 0.02],
      ],
      [
        [0.1, 0.1],
        [0.2, 0.05],
        [0.1, 0],
      ],
    ],
    transmitted: [
      [
        [0.2, 0.2],
        [0.1, 0.1],
        [0, 0],
      ],
      [
        [0.1, 0.1],
        [0.1, 0.02],
        [0.1, 0],
      ],
    ],
  }),
];
const FINISHES = ['', 'half-mirror', 'white', 'frosted', 'hat', 'black', 'clear', 'brushed', 'measured'];

function pileDesign(pile: readonly PilePart[], pick: readonly number[], clear: boolean): Description {
  const turbid = pick[0] % 2 === 1;
  const media = clear
    ? [medium('m0', 1), medium('m1', 1), medium('m2', 1)]
    : [
        medium('m0', 1.33, { dyes: [plainDye(0.4, 0.9, 520)], scatterers: turbid ? [haze(0.3, -0.2)] : [] }),
        medium('m1', 1.5, {
          absorption: 0.02,
          kind: 'solid',
          scatterers: turbid ? [haze(0.4, 0.8), beads(0.0006, 1.7, 3e-4)] : [],
        }),
        medium('m2', 1, { absorption: 0.001, kind: 'gas' }),
      ];
  const exitFace = shapeFaces(pile[0].shape).at(-1) ?? '';
  return describeDesign({
    media,
    finishes,
    parts: pile.map(({ shape, at, turns, hole }, i) => {
      const name = FINISHES[pick[i] % FINISHES.length];
      return part(`p${i}`, shape, `m${pick[i] % 3}`, {
        at,
        turns,
        minus: hole === null ? [] : [{ name: 'hole', ...hole }],
        faces: clear || name === '' ? {} : { '*': name },
      });
    }),
    pumps: [
      beam([0, 0, 9], [0, 0, -1], {
        beam: { kind: 'lambertian', outline: { kind: 'rectangle', size: [10, 10] } },
      }),
      beam([0.1, 0.2, 0.3], [0.3, -0.5, 0.7], {
        name: 'inside',
        beam: { kind: 'lambertian', outline: { kind: 'disc', radius: 3 } },
      }),
    ],
    exit: `p0.${exitFace}`,
  });
}

function traceRaw(description: Description, histories: number, seed: string) {
  const { scene } = compileScene(description);
  const graph = new RegionGraph(scene);
  const tally = createBatchTally(scene, grownTally(scene, new ArrayBuffer(grownBytes(scene))));
  clearBatch(tally);
  const defects = traceBatch(scene, graph, tally, batchStream(seed, 0), 0, histories);
  return { scene, tally, defects };
}

describe('random piles of touching and overlapping parts', () => {
  test(`no history of ${WANTED} is lost and every quantum of energy has a fate`, { timeout: 36e5 * 10 }, () => {
    const runs = Math.ceil(WANTED / HISTORIES_PER_PILE);
    fc.assert(
      fc.property(pileArbitrary, fc.array(fc.nat(20), { minLength: 5, maxLength: 5 }), (pile, pick) => {
        const { scene, tally, defects } = traceRaw(pileDesign(pile, pick, false), HISTORIES_PER_PILE, 'pile');
        expect(defects).toBe(0);
        let photons = 0;
        let quanta = 0;
        for (let slot = 0; slot < scene.slots; slot++) {
          photons += tally.vector[2 * slot];
          quanta += tally.vector[2 * slot + 1];
        }
        expect(photons).toBe(HISTORIES_PER_PILE);
        expect(quanta).toBe(tally.vector[2 * scene.slots + FIGURE.launchedEnergy]);
      }),
      { numRuns: runs, seed: 1 },
    );
  });

  test('a ray through clear parts of index 1 runs as far inside them as marching along it by hand says', () => {
    const direction = fc
      .tuple(...Array.from({ length: 3 }, () => fc.double({ min: -1, max: 1, noNaN: true })))
      .filter((d) => Math.hypot(...d) > 0.1);
    const step = 0.002;
    fc.assert(
      fc.property(pileArbitrary, direction, fc.tuple(fc.nat(60), fc.nat(60)), (pile, d, [a, b]) => {
        const norm = Math.hypot(...d);
        const unit = d.map((c) => c / norm) as unknown as Vector3;
        const start = unit.map((c, i) => -20 * c + [a / 20 - 1.51, b / 20 - 1.53, 0.017][i]) as unknown as Vector3;
        const design = describeDesignWithBeam(pile, start, unit);
        const { scene, tally } = traceRaw(design, 1, 'march');
        let inside = 0;
        for (let s = step / 2; s < 40; s += step) {
          const p = start.map((c, i) => c + s * unit[i]) as unknown as Vector3;
          if ((ownerByHand(pile, p, 0) ?? 0) > 0) inside += step;
        }
        // Each of the few boundaries on the way may fall anywhere within one step.
        expect(Math.abs(tally.vector[2 * scene.slots + FIGURE.pumpPath] - inside)).toBeLessThan(10 * step);
      }),
      { numRuns: 150, seed: 3 },
    );
  });
});

function describeDesignWithBeam(pile: readonly PilePart[], start: Vector3, unit: Vector3): Description {
  const design = pileDesign(pile, [0, 1, 2, 0, 1], true);
  // Light that leaves by an exit ends there: the exit is a plane that the ray has passed by when it comes out of the pile.
  const at = unit.map((c) => 60 * c) as unknown as Vector3;
  const target = { kind: 'plane', at, normal: unit, outline: { kind: 'disc', radius: 1 } } as const;
  return {
    ...design,
    pumps: [beam(start, unit)],
    detectors: [{ name: 'beyond', path: [], target, pixels: null }],
    exit: { ...design.exit, name: 'beyond' },
  };
}
