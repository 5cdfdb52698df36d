import type { BeamDescription, ShapeDescription } from '../design/description.js';
import { fateShare } from './estimate.js';
import { radians } from './fresnel-law.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, detector, part, pump } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

const AWAY_MM = 1000;
/** Full width at half maximum of the far field, rad. */
const FWHM = radians(4);
/** erf(√ln 2): share of a Gaussian within its full width at half maximum. */
const WITHIN_FWHM = 0.760968;

interface Spread {
  readonly label: string;
  readonly against: string;
  readonly beam: BeamDescription;
  /** Black stop at AWAY_MM that catches the middle of the beam. */
  readonly stop: ShapeDescription;
  readonly expected: number;
}

const square = (half: number): ShapeDescription => ({ kind: 'box', size: [2 * half, 2 * half, 0.001] });
const disc = (radius: number): ShapeDescription => ({ kind: 'cylinder', radius, height: 0.001 });

const SPREADS: readonly Spread[] = [
  {
    label: 'Gaussian beam of radius 2 on a disc of radius 1.5',
    against: '1 − exp(−2a²/w²)',
    beam: { kind: 'gaussian', radius: 2, halfAngle: 0 },
    stop: disc(1.5),
    expected: -Math.expm1(-2 * (1.5 / 2) ** 2),
  },
  {
    label: 'Gaussian beam of half angle 1° on a disc of that angle',
    against: '1 − exp(−2)',
    beam: { kind: 'gaussian', radius: 1e-3, halfAngle: radians(1) },
    stop: disc(AWAY_MM * Math.tan(radians(1))),
    expected: -Math.expm1(-2),
  },
  {
    label: 'diode of 4° by 4° on the square of its FWHM',
    against: 'erf²(√ln 2)',
    beam: { kind: 'diodes', across: 1, along: 1, pitch: [1, 1], divergence: [FWHM, FWHM], lens: null },
    stop: square(AWAY_MM * Math.tan(FWHM / 2)),
    expected: WITHIN_FWHM ** 2,
  },
  {
    label: 'patch of 4° by 4° on the square of its FWHM',
    against: 'erf²(√ln 2)',
    beam: { kind: 'patch', outline: { kind: 'disc', radius: 1e-3 }, divergence: [FWHM, FWHM] },
    stop: square(AWAY_MM * Math.tan(FWHM / 2)),
    expected: WITHIN_FWHM ** 2,
  },
];
/** Gaussian in the angle or in its tangent: they part by this much at 4°. */
const SMALL_ANGLE = 5e-4;

export const beamSpreadProof: Proof = {
  name: 'Spread of beams',
  law: 'share of a Gaussian beam inside a stop; FWHM of a diode’s far field',
  source: 'ISO 11146 Gaussian 1/e² radius; erf(√ln 2) = 0.760968, Abramowitz & Stegun table 7.1',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const { label, against, beam, stop, expected } of SPREADS) {
      const tallies = await traceCell(
        context,
        cell(label, {
          media: [],
          parts: [part('stop', 'air', stop, { at: [0, 0, AWAY_MM], faces: { '*': 'black' } })],
          pumps: [pump([0, 0, 0], [0, 0, 1], beam)],
          detectors: [
            detector('beyond', {
              kind: 'plane',
              at: [0, 0, AWAY_MM + 1],
              normal: [0, 0, 1],
              outline: { kind: 'disc', radius: 500 },
            }),
          ],
          exit: 'beyond',
        }),
        0.5,
      );
      const caught = fateShare(tallies, slotsOf({ fate: 'absorbed-by-finish', by: 'black' }));
      cases.push(compare(`share of a ${label}`, against, caught, expected, SMALL_ANGLE));
    }
    return cases;
  },
};
