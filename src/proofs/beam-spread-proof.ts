import type { BeamDescription, FinishDescription, PartDescription, ShapeDescription } from '../design/description.js';
import { fateShare } from './estimate.js';
import { radians } from './fresnel-law.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, detector, diffuser, part, pump, spreadingSheet, thinBeam } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

const AWAY_MM = 1000;
/** Full width at half maximum of the far fields, rad. */
const FWHM = radians(4);
/** erf(√ln 2): share of a Gaussian within its full width at half maximum. */
const WITHIN_FWHM = 0.760968;
const FOCAL_MM = 10;

interface Spread {
  readonly label: string;
  readonly against: string;
  readonly beam: BeamDescription;
  /** Finish of a thin sheet of air that the beam passes first. */
  readonly sheet?: FinishDescription;
  /** Black stop at AWAY_MM that catches the middle of the light. */
  readonly stop: ShapeDescription;
  readonly expected: number;
}

const square = (half: number): ShapeDescription => ({ kind: 'box', size: [2 * half, 2 * half, 0.001] });
const disc = (radius: number): ShapeDescription => ({ kind: 'cylinder', radius, height: 0.001 });
/** A disc that fills a cone of this half angle, seen from the source. */
const cone = (degrees: number): ShapeDescription => disc(AWAY_MM * Math.tan(radians(degrees)));
const diode = (lens: { focalLength: number; distance: number } | null): BeamDescription => ({
  kind: 'diodes',
  across: 1,
  along: 1,
  pitch: [1, 1],
  divergence: [FWHM, FWHM],
  lens,
});

const SPREADS: readonly Spread[] = [
  {
    label: 'Gaussian beam of radius 2 on a disc of radius 1.5',
    against: '1 − exp(−2a²/w²)',
    beam: { kind: 'gaussian', radius: 2, halfAngle: 0 },
    stop: disc(1.5),
    expected: -Math.expm1(-2 * (1.5 / 2) ** 2),
  },
  {
    label: 'Gaussian beam of half angle 1° within that angle',
    against: '1 − exp(−2)',
    beam: { kind: 'gaussian', radius: 1e-3, halfAngle: radians(1) },
    stop: cone(1),
    expected: -Math.expm1(-2),
  },
  {
    label: 'diode of 4° by 4° on the square of its FWHM',
    against: 'erf²(√ln 2)',
    beam: diode(null),
    stop: square(AWAY_MM * Math.tan(FWHM / 2)),
    expected: WITHIN_FWHM ** 2,
  },
  {
    label: 'the same made parallel by a lens of 10 mm',
    against: 'erf²(√ln 2) within f tan',
    beam: diode({ focalLength: FOCAL_MM, distance: FOCAL_MM }),
    stop: square(FOCAL_MM * Math.tan(FWHM / 2)),
    expected: WITHIN_FWHM ** 2,
  },
  {
    label: 'patch of 4° by 4° on the square of its FWHM',
    against: 'erf²(√ln 2)',
    beam: { kind: 'patch', outline: { kind: 'disc', radius: 1e-3 }, divergence: [FWHM, FWHM] },
    stop: square(AWAY_MM * Math.tan(FWHM / 2)),
    expected: WITHIN_FWHM ** 2,
  },
  {
    label: 'Gaussian scatter of 2° FWHM within 1°',
    against: '1 − exp(−ln 2)',
    beam: thinBeam(),
    sheet: spreadingSheet('sheet', 'gaussian', radians(2)),
    stop: cone(1),
    expected: 0.5,
  },
  {
    label: 'top-hat scatter of 4° within 1°',
    against: 'ratio of solid angles',
    beam: thinBeam(),
    sheet: spreadingSheet('sheet', 'top-hat', radians(4)),
    stop: cone(1),
    expected: (Math.sin(radians(0.5)) / Math.sin(radians(1))) ** 2,
  },
  {
    label: 'Lambertian sheet within 30°',
    against: 'sin² 30°',
    beam: thinBeam(),
    sheet: diffuser('sheet', 0, 1),
    stop: cone(30),
    expected: 0.25,
  },
];
/** Gaussian in the angle or in its tangent: they part by this much at 4°. */
const SMALL_ANGLE = 5e-4;

export const beamSpreadProof: Proof = {
  name: 'Spread of beams and sheets',
  law: 'share of a beam inside a stop: Gaussian radius, FWHM of far fields and of scatter, Lambert’s cosine',
  source: 'ISO 11146 (1/e² radius); Lambert (1760); erf(√ln 2) = 0.760968, Abramowitz & Stegun table 7.1',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const { label, against, beam, sheet, stop, expected } of SPREADS) {
      const parts: PartDescription[] = [part('stop', 'air', stop, { at: [0, 0, AWAY_MM], faces: { '*': 'black' } })];
      if (sheet) {
        const thin: ShapeDescription = { kind: 'box', size: [10, 10, 0.01] };
        parts.push(part('sheet', 'air', thin, { at: [0, 0, 0.1], faces: { top: 'sheet' } }));
      }
      const tallies = await traceCell(
        context,
        cell(label, {
          media: [],
          finishes: sheet ? [sheet] : [],
          parts,
          pumps: [pump([0, 0, 0], [0, 0, 1], beam)],
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
      const caught = fateShare(tallies, slotsOf({ fate: 'absorbed-by-finish', by: 'black' }));
      cases.push(compare(`share: ${label}`, against, caught, expected, SMALL_ANGLE));
    }
    return cases;
  },
};
