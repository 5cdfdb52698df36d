/** Areas of map cells against the areas of plain geometry. */
import { describe, expect, test } from 'vitest';
import type { Description, PartDescription, Turn } from '../../src/design/description.js';
import { summariseRun } from '../../src/outcome/summarise-run.js';
import { compileScene } from '../../src/scene/compile-scene.js';
import { mapMeasure } from '../../src/scene/map-measure.js';
import { RegionGraph } from '../../src/scene/region-graph.js';
import { beam, describeDesign, medium, part } from '../helpers/describe.js';
import { traceHere } from '../helpers/trace.js';

function design(parts: readonly PartDescription[], exit: string): Description {
  return describeDesign({
    media: [medium('glass', 1, { kind: 'solid' })],
    parts,
    pumps: [
      beam([0, 0, -30], [0, 0, 1], {
        beam: { kind: 'patch', outline: { kind: 'rectangle', size: [20, 20] }, divergence: [0, 0] },
      }),
    ],
    exit,
    detectors: [{ name: 'eye', path: [], target: { kind: 'face', face: exit }, pixels: null }],
  });
}

function measured(parts: readonly PartDescription[], exit: string): { total: number; cells: Float64Array } {
  const { scene, legend } = compileScene(design(parts, exit));
  const cells = mapMeasure(legend.recorders[0], new RegionGraph(scene));
  return { total: cells.reduce((a, b) => a + b, 0), cells };
}

const skew: readonly Turn[] = [
  { axis: 'x', angle: 0.4 },
  { axis: 'y', angle: 1.2 },
];
const bored = (turns: readonly Turn[]) =>
  part('plate', { kind: 'box', size: [20, 20, 4] }, 'glass', {
    turns,
    minus: [{ name: 'bore', shape: { kind: 'cylinder', radius: 6, height: 30 } }],
  });

describe('area of a mapped face', () => {
  test.each([
    ['still', [] as readonly Turn[]],
    ['turned', skew],
  ])('a hole is no part of the face it pierces, %s', (_, turns) => {
    const { total, cells } = measured([bored(turns)], 'plate.top');
    expect(total).toBeCloseTo(400 - 36 * Math.PI, 0);
    expect(cells[20 + 40 * 20]).toBe(0);
    expect(cells[0]).toBeCloseTo(0.25, 12);
  });

  test('the wall of a hole ends where the part ends', () => {
    // 30 mm long, of which 4 mm lie in the plate.
    const { total } = measured([bored([])], 'plate.bore.side');
    expect(total / (2 * Math.PI * 6 * 4)).toBeCloseTo(1, 2);
  });

  test('what a later part swallows is no part of the face; what it only touches is', () => {
    const plate = part('plate', { kind: 'box', size: [20, 20, 4] }, 'glass');
    const over = part('over', { kind: 'box', size: [10, 20, 4] }, 'glass', { at: [-5, 0, 1] });
    expect(measured([plate, over], 'plate.top').total).toBeCloseTo(200, 9);
    const on = part('on', { kind: 'box', size: [10, 20, 4] }, 'glass', { against: { face: 'plate.top' } });
    expect(measured([plate, on], 'plate.top').total).toBeCloseTo(400, 9);
  });

  test('a ball half sunk into a later box shows half its surface', () => {
    const ball = part('ball', { kind: 'sphere', radius: 5 }, 'glass');
    const box = part('box', { kind: 'box', size: [20, 20, 20] }, 'glass', { at: [0, 0, -10] });
    // The rim is steep: cells there are the least exact.
    expect(measured([ball], 'ball.surface').total / (100 * Math.PI)).toBeCloseTo(1, 1);
    expect(measured([ball, box], 'ball.surface').total / measured([ball], 'ball.surface').total).toBeCloseTo(0.5, 9);
  });

  test('an evenly lit pierced plate reads its irradiance and even, seed 1', async () => {
    const result = await traceHere(design([bored([])], 'plate.top'), 65_536);
    const about = { version: '', file: '', text: '', hash: '', dials: {}, startedAt: new Date(0), repeat: '' };
    const { record } = summariseRun(result, about);
    // 1 W on 4 cm².
    const map = record.maps.find(({ id }) => id === 'detector-eye');
    expect(map?.mean).toBeCloseTo(0.25, 2);
    expect(map?.minOverMean).toBeGreaterThan(0.8);
  });
});
