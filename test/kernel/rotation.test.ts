/** Space has no axes: moved, turned, mirrored and renumbered designs give the same ledgers. */
import { describe, expect, test } from 'vitest';
import type { Description, PumpDescription, Vector2 } from '../../src/design/description.js';
import { FIGURE, FIGURE_COUNT } from '../../src/tallies/run-tallies.js';
import type { TraceResult } from '../../src/trace/trace-result.js';
import { beads, beam, describeDesign, finish, haze, medium, part, plainDye } from '../helpers/describe.js';
import { moveDesign } from '../helpers/move-design.js';
import { traceHere } from '../helpers/trace.js';

const HISTORIES = 131_072;
/** Fewer photons than this in both runs together have no normal error. */
const FEWEST = 100;

const dye = { ...plainDye(0.35, 0.92, 520), absorption: (nm: number) => (nm < 500 ? 0.35 : 0.03) };
const media = [
  medium('bath', 1.36, { dyes: [dye], absorption: 0.002, scatterers: [haze(0.03, 0.6), beads(0.001, 1.59, 1e-5)] }),
  medium('glass', 1.52, { kind: 'solid', absorption: 0.004 }),
];
const finishes = [
  finish('silver', { kind: 'mirror', reflectance: 0.94 }),
  finish('aluminium', { kind: 'metal', metal: 'aluminium', n: () => 0.6, k: () => 5.4 }),
  finish('white', { kind: 'diffuser', reflects: 0.8, transmits: 0.1 }),
  finish('frosted', { kind: 'scatter', shape: 'gaussian', fwhm: [0.4, 0.4], split: null }),
  finish('brushed', {
    kind: 'scatter',
    shape: 'gaussian',
    fwhm: [0.5, 0.1],
    split: { reflects: 0.9, transmits: 0.05 },
  }),
  finish('blue-pass', {
    kind: 'dichroic',
    edgeNm: 490,
    widthNm: 4,
    passes: 'below',
    transmits: 0.95,
    reflects: 0.97,
    absorbs: 0.01,
  }),
];

const bank: PumpDescription = beam([0, 0, 0], [0, 0, 1], {
  name: 'bank',
  aim: { kind: 'toward', face: 'cell.front', distance: 30, shift: [1.5, -0.5], tilt: [0.06, -0.15] },
  beam: {
    kind: 'diodes',
    across: 5,
    along: 2,
    pitch: [2.5, 1.5],
    divergence: [0.04, 0.1],
    lens: { focalLength: 60, distance: 8 },
  },
});
const spot = beam([3, 25, 0.5], [-0.12, -1, 0.05], {
  name: 'spot',
  wavelengthNm: 465,
  linewidthNm: 3,
  power: 2,
  beam: { kind: 'gaussian', radius: 1.2, halfAngle: 0.03 },
});

/** A box with a bore, a dome, a wedge and a ball, no symmetry left. */
function cell(): Description {
  const outline: readonly Vector2[] = [
    [-2, -4],
    [2, -4],
    [-2, 4],
  ];
  return describeDesign({
    media,
    finishes,
    parts: [
      part('cell', { kind: 'box', size: [20, 8, 9] }, 'bath', {
        minus: [{ name: 'bore', shape: { kind: 'cylinder', radius: 1, height: 30 }, at: [5, 1, 0] }],
        faces: { front: 'blue-pass', left: 'silver', right: 'brushed', 'bore.side': 'frosted' },
      }),
      part('ball', { kind: 'sphere', radius: 2 }, 'glass', { at: [-4, 0.5, 1] }),
      part('dome', { kind: 'cap', radius: 5, height: 3 }, 'glass', { against: { face: 'cell.top', shift: [-3, 0] } }),
      part('wedge', { kind: 'prism', outline, height: 9, sides: null }, 'glass', {
        at: [12, 0, 0],
        faces: { 'side-2': 'aluminium' },
      }),
      part('floor', { kind: 'box', size: [20, 8, 1] }, 'glass', { at: [0, 0, -5], faces: { bottom: 'white' } }),
    ],
    pumps: [bank, spot],
    exit: 'dome.dome',
    detectors: [
      {
        name: 'above',
        path: [],
        target: { kind: 'plane', at: [-3, 0, 12], normal: [0, 0, 1], outline: { kind: 'disc', radius: 6 } },
        pixels: null,
      },
    ],
  });
}

interface Estimate {
  readonly mean: number;
  readonly variance: number;
  readonly photons: number;
}

/** Mean per history and its variance from batch sums, of every row of both ledgers, every figure, and what the plane saw. */
function estimates({ tallies }: TraceResult, rename: (where: string) => string): Map<string, Estimate> {
  const { sum, sumSquares, histories, batches } = tallies.moments;
  const found = new Map<string, Estimate>();
  const put = (key: string, at: number, photons: number) => {
    const scatter = Math.max(0, sumSquares[at] - sum[at] ** 2 / histories) / (batches - 1);
    found.set(key, { mean: sum[at] / histories, variance: scatter / histories, photons });
  };
  tallies.slots.forEach(({ fate, light, where, by }, i) => {
    const key = [fate, light, where === null ? '' : rename(where), by].join(' ');
    put(`photons ${key}`, 2 * i, sum[2 * i]);
    // Heat has no photons of its own.
    put(`energy ${key}`, 2 * i + 1, fate === 'stokes-heat' ? FEWEST : sum[2 * i]);
  });
  const first = 2 * tallies.slots.length;
  const names = Object.keys(FIGURE);
  for (let i = 0; i < FIGURE_COUNT; i++) put(`figure ${names[i]}`, first + i, histories);
  for (const { id, photons } of tallies.spectra.filter(({ what }) => what === 'detector')) {
    const count = photons.reduce((a, b) => a + b, 0);
    found.set(id, { mean: count / histories, variance: count / histories ** 2, photons: count });
  }
  return found;
}

/** Every quantity of two independent runs agrees within 4 standard errors of the difference. */
function expectSame(a: TraceResult, b: TraceResult, rename = (where: string) => where): void {
  const left = estimates(a, (where) => where);
  const right = estimates(b, rename);
  expect([...right.keys()].sort()).toEqual([...left.keys()].sort());
  const apart: string[] = [];
  let judged = 0;
  for (const [key, one] of left) {
    const other = right.get(key) as Estimate;
    if (one.photons + other.photons < FEWEST) continue;
    judged++;
    const error = Math.sqrt(one.variance + other.variance);
    if (Math.abs(one.mean - other.mean) > 4 * error + 1e-12 * Math.abs(one.mean)) {
      apart.push(`${key}: ${one.mean} and ${other.mean}, standard error ${error}`);
    }
  }
  expect(apart).toEqual([]);
  expect(judged).toBeGreaterThan(60);
}

const still = traceHere(cell(), HISTORIES, 'still');

describe('a whole design, seeds still and moved', () => {
  test('turned about a skew axis', async () => {
    const turns = [
      { axis: 'x', angle: 0.5 },
      { axis: 'y', angle: -0.8 },
      { axis: 'z', angle: 1.1 },
    ] as const;
    expectSame(await still, await traceHere(moveDesign(cell(), { turns, shift: [0, 0, 0] }), HISTORIES, 'moved'));
  });

  test('turned by a right angle, so that axis planes stay axis planes', async () => {
    const turns = [
      { axis: 'z', angle: Math.PI / 2 },
      { axis: 'x', angle: -Math.PI / 2 },
    ] as const;
    expectSame(await still, await traceHere(moveDesign(cell(), { turns, shift: [0, 0, 0] }), HISTORIES, 'moved'));
  });

  test('moved by two metres', async () => {
    const motion = { turns: [], shift: [1234.5, -2000, 777.7] } as const;
    expectSame(await still, await traceHere(moveDesign(cell(), motion), HISTORIES, 'moved'));
  });

  test('turned and moved by two metres', async () => {
    const motion = { turns: [{ axis: 'y', angle: 0.3 }], shift: [1234.5, -2000, 777.7] } as const;
    expectSame(await still, await traceHere(moveDesign(cell(), motion), HISTORIES, 'moved'));
  });
});

/** Without emission, scatter and the round beam nothing is drawn in a frame of its own: the same photons take the same ways. */
function specular(): Description {
  const design = cell();
  const plain = new Map(design.finishes);
  for (const name of ['white', 'frosted'])
    plain.set(name, { ...finish('silver', { kind: 'mirror', reflectance: 0.94 }), name });
  const dark = medium('bath', 1.36, { dyes: [{ ...dye, quantumYield: 0 }], absorption: 0.002 });
  return { ...design, finishes: plain, media: new Map([...design.media, ['bath', dark]]), pumps: [bank] };
}

describe('photons that meet only mirrors and clear faces, seed 1', () => {
  test.each([
    ['turned', [0, 0, 0]],
    ['turned and moved by two metres', [1234.5, -2000, 777.7]],
  ] as const)('end one by one as they would unmoved: %s', async (_, shift) => {
    const turns = [
      { axis: 'x', angle: 0.5 },
      { axis: 'z', angle: 1.1 },
    ] as const;
    const a = (await traceHere(specular(), HISTORIES)).tallies;
    const b = (await traceHere(moveDesign(specular(), { turns, shift }), HISTORIES)).tallies;
    let apart = 0;
    a.slots.forEach((_, i) => {
      apart += Math.abs(a.moments.sum[2 * i] - b.moments.sum[2 * i]) / 2;
    });
    // A photon that hits an edge, or whose draw is a rounding away from a share, may go the other way.
    expect(apart).toBeLessThanOrEqual(8);
  });
});

/** Parts that touch and do not overlap; `hand` −1 is the mirror image in x. */
function handed(hand: 1 | -1): Description {
  const [left, right] = hand === 1 ? ['left', 'right'] : ['right', 'left'];
  // Mirrored and kept counter-clockwise.
  const corners: readonly Vector2[] = [
    [-1, -4],
    [3, -4],
    [-1, 4],
  ];
  const outline = hand === 1 ? corners : corners.map(([x, y]): Vector2 => [-x, y]).toReversed();
  const sides = hand === 1 ? ['flat', 'slant', 'joint'] : ['slant', 'flat', 'joint'];
  return describeDesign({
    media,
    finishes,
    parts: [
      part('cell', { kind: 'box', size: [20, 8, 9] }, 'bath', { faces: { [left]: 'silver', back: 'white' } }),
      part('wedge', { kind: 'prism', outline, height: 9, sides }, 'glass', {
        at: [11 * hand, 0, 0],
        faces: { slant: 'aluminium' },
      }),
      part('lid', { kind: 'box', size: [12, 8, 2] }, 'glass', {
        at: [3 * hand, 0, 5.5],
        faces: { [right]: 'silver', bottom: 'frosted' },
      }),
    ],
    pumps: [
      beam([4 * hand, -20, 1], [-0.1 * hand, 1, 0.05], { beam: { kind: 'gaussian', radius: 1.5, halfAngle: 0.05 } }),
    ],
    exit: 'lid.top',
  });
}

describe('a design without overlaps', () => {
  test('mirrored, seeds 1 and 2', async () => {
    const swap = (where: string) =>
      where.startsWith('wedge') ? where : where.replace(/left|right/, (side) => (side === 'left' ? 'right' : 'left'));
    expectSame(await traceHere(handed(1), HISTORIES, '1'), await traceHere(handed(-1), HISTORIES, '2'), swap);
  });

  test('its parts in another order, seeds 1 and 2', async () => {
    const design = handed(1);
    const reversed = { ...design, parts: design.parts.toReversed() };
    expectSame(await traceHere(design, HISTORIES, '1'), await traceHere(reversed, HISTORIES, '2'));
  });
});
