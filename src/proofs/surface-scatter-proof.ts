import type { FinishDescription, ScatterTable, ShapeDescription, Vector3 } from '../design/description.js';
import { fateShare } from './estimate.js';
import { radians } from './fresnel-law.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { BLACK, cell, detector, part, pump, scatterTable, spreadingSheet, thinBeam } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

const AWAY_MM = 1000;
/** erf(√ln 2): share of a Gaussian within its full width at half maximum. */
const WITHIN_FWHM = 0.760968;
/** Gaussian in the angle or in its tangent: they part by this much at 4°. */
const SMALL_ANGLE = 1e-3;

/** A table that does not know angles: f = share/π is Lambert's law. */
const LAMBERT: ScatterTable = {
  incidenceDeg: [0, 45, 90],
  scatterDeg: [0, 90],
  azimuthDeg: [0],
  reflected: Array.from({ length: 3 }, () => [[0.3 / Math.PI], [0.3 / Math.PI]]),
  transmitted: Array.from({ length: 3 }, () => [[0.5 / Math.PI], [0.5 / Math.PI]]),
};
/** f = 3 cos θ/(2π): the cosine squared law, all of it transmitted; rows every degree. */
const STEEP: ScatterTable = {
  ...{ incidenceDeg: [0], azimuthDeg: [0], scatterDeg: Array.from({ length: 91 }, (_, i) => i) },
  reflected: [Array.from({ length: 91 }, () => [0])],
  transmitted: [Array.from({ length: 91 }, (_, i) => [(1.5 / Math.PI) * Math.cos(radians(i))])],
};
/** f = (1 + cos φ)/π, φ from the side light heads for: forward of the normal goes 1/2 + 1/π of it. */
const FORWARD: ScatterTable = {
  ...{ incidenceDeg: [0, 90], scatterDeg: [0, 90], azimuthDeg: Array.from({ length: 61 }, (_, i) => 3 * i) },
  reflected: Array.from({ length: 2 }, () => Array.from({ length: 2 }, () => new Array<number>(61).fill(0))),
  transmitted: Array.from({ length: 2 }, () =>
    Array.from({ length: 2 }, () => Array.from({ length: 61 }, (_, i) => (1 + Math.cos(radians(3 * i))) / Math.PI)),
  ),
};

interface Sheet {
  readonly label: string;
  readonly against: string;
  readonly finish: FinishDescription;
  /** Black stop that catches some of the light, and its centre. */
  readonly stop: ShapeDescription;
  readonly at: Vector3;
  readonly along?: Vector3;
  readonly expected: number;
  readonly tolerance: number;
}

const disc = (degrees: number): ShapeDescription => ({
  kind: 'cylinder',
  radius: AWAY_MM * Math.tan(radians(degrees)),
  height: 0.001,
});
const bar = (u: number, v: number): ShapeDescription => ({ kind: 'box', size: [u, v, 0.001] });
const within = (degrees: number) => 2 * AWAY_MM * Math.tan(radians(degrees / 2));
const above: Vector3 = [0, 0, AWAY_MM];

const oval = (shape: 'gaussian' | 'top-hat') => spreadingSheet('sheet', shape, [radians(4), radians(1)]);
const SHEETS: readonly Sheet[] = [
  ...(
    [
      ['u, 4°', bar(within(4), 3000)],
      ['v, 1°', bar(3000, within(1))],
    ] as const
  ).map(([along, stop]) => ({
    label: `Gaussian scatter of 4° by 1°, within its width along ${along}`,
    against: 'erf(√ln 2)',
    ...{ finish: oval('gaussian'), stop, at: above, expected: WITHIN_FWHM, tolerance: SMALL_ANGLE },
  })),
  ...(
    [
      ['u', bar(within(2), 3000)],
      ['v', bar(3000, within(0.5))],
    ] as const
  ).map(([along, stop]) => ({
    label: `top-hat scatter of 4° by 1°, within half its width along ${along}`,
    against: 'middle half of an ellipse: 2/π (asin ½ + ½ √¾)',
    ...{ finish: oval('top-hat'), stop, at: above, tolerance: SMALL_ANGLE },
    expected: (2 / Math.PI) * (Math.asin(0.5) + 0.5 * Math.sqrt(0.75)),
  })),
  {
    label: 'table of Lambert’s law, half of it transmitted, within 30°',
    against: '½ sin² 30°',
    ...{ finish: scatterTable('sheet', LAMBERT), stop: disc(30), at: above, expected: 0.125, tolerance: 0 },
  },
  {
    label: 'the same hit at 70°',
    against: '½ sin² 30°',
    along: [Math.sin(radians(70)), 0, Math.cos(radians(70))],
    ...{ finish: scatterTable('sheet', LAMBERT), stop: disc(30), at: above, expected: 0.125, tolerance: 0 },
  },
  {
    label: 'table of 3 cos θ/(2π), within 30°',
    against: '1 − cos³ 30°',
    ...{ finish: scatterTable('sheet', STEEP), stop: disc(30), at: above, tolerance: 2e-4 },
    expected: 1 - Math.cos(radians(30)) ** 3,
  },
  {
    label: 'table of (1 + cos φ)/π hit at 30°, on the half plane it heads for',
    against: '1/2 + 1/π',
    along: [0.5, 0, Math.cos(radians(30))],
    finish: scatterTable('sheet', FORWARD),
    ...{
      stop: { kind: 'box', size: [100, 200, 100] },
      at: [50, 0, 50.01],
      expected: 0.5 + 1 / Math.PI,
      tolerance: 2e-4,
    },
  },
];

export const surfaceScatterProof: Proof = {
  name: 'Sheets that scatter',
  law: 'two widths of scatter along u and v; tables of both directions give Lambert’s and other cosine laws',
  source: 'erf(√ln 2) = 0.760968, Abramowitz & Stegun table 7.1; Lambert (1760); integrals of the stated functions',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const sheet of SHEETS) {
      const { label, against, expected, tolerance } = sheet;
      cases.push(compare(`share: ${label}`, against, await caught(context, sheet), expected, tolerance));
    }
    return cases;
  },
};

/** Share of a thin beam that a black stop catches behind a sheet of air whose top has the finish. */
const caught = async (context: ProofContext, { label, finish, stop, at, along = [0, 0, 1] }: Sheet) => {
  const tallies = await traceCell(
    context,
    cell(label, {
      media: [],
      finishes: [BLACK, finish],
      parts: [
        part('stop', 'air', stop, { at, faces: { '*': 'black' } }),
        part('sheet', 'air', { kind: 'box', size: [2, 2, 0.005] }, { at: [0, 0, -0.0025], faces: { top: 'sheet' } }),
      ],
      pumps: [pump([-along[0], -along[1], -along[2]], along, thinBeam(1e-6))],
      detectors: [
        detector('beyond', {
          kind: 'plane',
          at: [0, 0, AWAY_MM + 1],
          normal: [0, 0, 1],
          outline: { kind: 'disc', radius: 2000 },
        }),
      ],
      exit: 'beyond',
    }),
    0.5,
  );
  return fateShare(tallies, slotsOf({ fate: 'absorbed-by-finish', by: 'black' }));
};
