import type { Description, ScattererDescription } from '../design/description.js';
import { fateShare, figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { beads, cell, ENDLESS, haze, medium, PUMP_NM, part, pump, thinBeam } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

const INDEX = 1.36;

interface Slab {
  readonly label: string;
  readonly against: string;
  /** Optical thickness, share of it that scatters. */
  readonly tau: number;
  readonly albedo: number;
  readonly scatterer: (coefficient: number) => ScattererDescription;
  /** The rest of the thickness is absorbed by the beads themselves. */
  readonly beadsAbsorb?: boolean;
  /** Reflected and transmitted (with the unscattered beam), normal incidence. */
  readonly reflected: number;
  readonly transmitted: number;
  readonly rounding: number;
}

const law =
  (g: number) =>
  (coefficient: number): ScattererDescription =>
    haze(coefficient, g);

/** Beads of a size 2πrn/λ and relative index, as many as give the coefficient of scattering; `efficiency` is Q of scattering. */
const spheres =
  (size: number, m: number, k: number, efficiency: number) =>
  (coefficient: number): ScattererDescription => {
    const radius = (size * PUMP_NM) / (2 * Math.PI * INDEX) / 1e6;
    return beads(radius, m * INDEX, k * INDEX, (coefficient * 4 * radius) / (3 * efficiency));
  };

const DOUBLING = 'adding and doubling, 60 directions';
const SLABS: readonly Slab[] = [
  {
    label: 'isotropic, depth 2, albedo 0.9',
    against: 'slab table, τ = 2, ϖ = 0.9',
    ...{ tau: 2, albedo: 0.9, scatterer: law(0), reflected: 0.361649, transmitted: 0.356501, rounding: 1e-6 },
  },
  {
    label: 'g = 0.75, depth 2, albedo 0.9',
    against: 'van de Hulst 1980 table 35 (memory): 0.09739, 0.66096',
    ...{ tau: 2, albedo: 0.9, scatterer: law(0.75), reflected: 0.09739, transmitted: 0.66096, rounding: 1e-5 },
  },
  {
    label: 'g = 0.9, depth 10, nothing absorbs',
    against: DOUBLING,
    ...{ tau: 10, albedo: 1, scatterer: law(0.9), reflected: 0.307423, transmitted: 0.692577, rounding: 1e-6 },
  },
  {
    label: 'g = −0.5, depth 5, albedo 0.99',
    against: DOUBLING,
    ...{ tau: 5, albedo: 0.99, scatterer: law(-0.5), reflected: 0.749975, transmitted: 0.154241, rounding: 1e-6 },
  },
  {
    label: 'beads of size 5, index 1.2, depth 2, nothing absorbs',
    against: DOUBLING,
    ...{ tau: 2, albedo: 1, scatterer: spheres(5, 1.2, 0, 1.769974), reflected: 0.045681, transmitted: 0.954319 },
    rounding: 2e-6,
  },
  {
    label: 'beads of size 3, index 1.5, depth 5, albedo 0.9',
    against: DOUBLING,
    ...{ tau: 5, albedo: 0.9, scatterer: spheres(3, 1.5, 0, 3.418056), reflected: 0.157311, transmitted: 0.289221 },
    rounding: 2e-6,
  },
  {
    label: 'beads of size 10, index 1.1, depth 8, albedo 0.99',
    against: DOUBLING,
    ...{ tau: 8, albedo: 0.99, scatterer: spheres(10, 1.1, 0, 1.71399), reflected: 0.048726, transmitted: 0.851436 },
    rounding: 2e-6,
  },
  {
    label: 'beads of size 1, index 1.5 − 0.02i, depth 2',
    against: DOUBLING,
    ...{ tau: 2, albedo: 0.7874004, scatterer: spheres(1, 1.5, 0.02, 0.2123727), beadsAbsorb: true },
    ...{ reflected: 0.213396, transmitted: 0.324642, rounding: 2e-6 },
  },
];

export const scatteringMediumProof: Proof = {
  name: 'Slab that scatters',
  law: 'R and T of a slab of any phase function: equation of transfer; Mie’s series for beads',
  source:
    'van de Hulst, Multiple Light Scattering vol. 2 (1980); others by an own doubling code that gives his values to 5 digits; Giovanelli, Optica Acta 2 153 (1955)',
  status: 'computed here',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const slab of SLABS) {
      const { label, against, reflected, transmitted, rounding } = slab;
      const tallies = await traceCell(context, slabCell(slab), 0.5);
      const back = fateShare(tallies, slotsOf({ fate: 'left-elsewhere', light: 'pump', where: 'slab.top' }));
      const through = figureMean(tallies, { leakPhotons: 1 });
      cases.push(compare(`R: ${label}`, against, back, reflected, rounding));
      cases.push(compare(`T: ${label}`, against, through, transmitted, rounding));
    }
    cases.push(await giovanelli(context));
    return cases;
  },
};

/** A slab without end in a medium of its own index, lit along its normal on its top; its bottom is the exit. */
function slabCell({ label, tau, albedo, scatterer, beadsAbsorb = false }: Slab): Description {
  const thickness = Math.max(1, tau / 10);
  const absorption = beadsAbsorb ? 0 : ((1 - albedo) * tau) / thickness;
  const scatterers = [scatterer((albedo * tau) / thickness)];
  return cell(label, {
    media: [medium('turbid', INDEX, { absorption, scatterers }), medium('matched', INDEX)],
    around: 'matched',
    parts: [part('slab', 'turbid', { kind: 'box', size: [10, 10, thickness] }, { faces: ENDLESS })],
    pumps: [pump([0, 0, thickness], [0, 0, -1], thinBeam())],
    exit: 'slab.bottom',
  });
}

/** A half-space of n = 1.5 in air: total reflection inside sends most of the light back for another turn. */
const giovanelli = async (context: ProofContext): Promise<ProofCase> => {
  const tallies = await traceCell(
    context,
    cell('turbid half-space with a surface', {
      media: [medium('turbid', 1.5, { absorption: 1, scatterers: [haze(9, 0)] })],
      parts: [part('slab', 'turbid', { kind: 'box', size: [10, 10, 3] }, { faces: ENDLESS })],
      pumps: [pump([0, 0, 2.5], [0, 0, -1], thinBeam())],
      exit: 'slab.top',
    }),
    0.5,
  );
  const within = figureMean(tallies, { leakPhotons: 1 });
  return compare(
    'R: half-space, isotropic, albedo 0.9, n = 1.5 in air, without the first 4 %',
    'Giovanelli 1955: 0.2600 with the first 4 %',
    within,
    0.21992,
    5e-6,
  );
};
