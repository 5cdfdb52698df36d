import type { PartDescription, PumpDescription } from '../design/description.js';
import { fateShare } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, detector, lambertianDisc, lambertianSquare, part, pump } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';
import { coaxialDiscs, parallelRectangles, perpendicularRectangles } from './view-factors.js';

const THIN_MM = 1e-4;

interface Setup {
  readonly label: string;
  readonly against: string;
  readonly target: PartDescription;
  readonly source: PumpDescription;
  /** Face of the target that looks at the source. */
  readonly face: string;
  readonly expected: number;
}

const discs = (r1: number, r2: number): Setup => ({
  label: `disc of ${r1} to disc of ${r2} at distance 1`,
  against: 'C-41',
  target: part(
    'target',
    'air',
    { kind: 'cylinder', radius: r2, height: THIN_MM },
    {
      at: [0, 0, 1 + THIN_MM / 2],
      faces: { '*': 'black' },
    },
  ),
  source: pump([0, 0, 0], [0, 0, 1], lambertianDisc(r1)),
  face: 'target.bottom',
  expected: coaxialDiscs(r1, r2),
});

const parallel = (side: number): Setup => ({
  label: `square of ${side} to its like at distance 1`,
  against: 'C-11',
  target: part(
    'target',
    'air',
    { kind: 'box', size: [side, side, THIN_MM] },
    {
      at: [0, 0, 1 + THIN_MM / 2],
      faces: { '*': 'black' },
    },
  ),
  source: pump([0, 0, 0], [0, 0, 1], lambertianSquare(side)),
  face: 'target.bottom',
  expected: parallelRectangles(side, side),
});

const perpendicular = (height: number): Setup => ({
  label: `unit square to a wall of height ${height} on its edge`,
  against: 'C-14',
  target: part(
    'target',
    'air',
    { kind: 'box', size: [THIN_MM, 1, height] },
    {
      at: [-0.5 - THIN_MM / 2, 0, height / 2],
      faces: { '*': 'black' },
    },
  ),
  source: pump([0, 0, 0], [0, 0, 1], lambertianSquare(1)),
  face: 'target.right',
  expected: perpendicularRectangles(height, 1),
});

const SETUPS = [
  discs(1, 1),
  discs(0.5, 1),
  discs(2, 1),
  parallel(1),
  parallel(0.4),
  perpendicular(1),
  perpendicular(2),
  perpendicular(0.25),
];

export const viewFactorProof: Proof = {
  name: 'View factors',
  law: 'share of Lambertian light from one plane figure that meets another',
  source: 'Siegel & Howell, Thermal Radiation Heat Transfer, appendix; Howell catalogue C-11, C-14, C-41',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const setup of SETUPS) cases.push(await measure(context, setup));
    return cases;
  },
};

async function measure(context: ProofContext, setup: Setup): Promise<ProofCase> {
  const { label, against, target, source, face, expected } = setup;
  const beyond = { kind: 'disc' as const, radius: 50 };
  const tallies = await traceCell(
    context,
    cell(label, {
      media: [],
      parts: [target],
      pumps: [source],
      detectors: [detector('beyond', { kind: 'plane', at: [0, 0, 5], normal: [0, 0, 1], outline: beyond })],
      exit: 'beyond',
    }),
    0.5,
  );
  const met = fateShare(tallies, slotsOf({ fate: 'absorbed-by-finish', where: face }));
  return compare(`view factor, ${label}`, against, met, expected);
}
