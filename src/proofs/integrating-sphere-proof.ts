import { fateShare, figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, diffuser, part, pump, thinBeam } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

const RADIUS_MM = 25;
/** Wall reflectance, share of the sphere's area that the port takes. */
const ROWS = [
  [0.95, 0.02],
  [0.98, 0.05],
  [0.99, 0.01],
] as const;

export const integratingSphereProof: Proof = {
  name: 'Integrating sphere',
  law: 'light that first strikes the wall leaves through the port with ρf/(1 − ρ(1 − f)); multiplier M = ρ/(1 − ρ(1 − f))',
  source: 'Goebel, Appl. Opt. 6 125 (1967)',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [reflectance, port] of ROWS) {
      // Light that would meet the missing cap of wall crosses the flat port instead: the cap's area is what counts.
      const height = 2 * RADIUS_MM * (1 - port);
      const tallies = await traceCell(
        context,
        cell(`sphere ${reflectance}, port ${port}`, {
          media: [],
          finishes: [diffuser('white', reflectance)],
          parts: [part('sphere', 'air', { kind: 'cap', radius: RADIUS_MM, height }, { faces: { dome: 'white' } })],
          pumps: [pump([0, 0, 0], [0.3, 0.2, 1], thinBeam())],
          exit: 'sphere.bottom',
        }),
        0.3,
      );
      const multiplier = reflectance / (1 - reflectance * (1 - port));
      const absorbed = fateShare(tallies, slotsOf({ fate: 'absorbed-by-finish', where: 'sphere.dome' }));
      const perHit = reflectance / (1 - reflectance);
      const where = `ρ = ${reflectance}, port ${100 * port} %`;
      cases.push(
        compare(
          `out of the port, ${where}`,
          'ρf/(1 − ρ(1 − f))',
          figureMean(tallies, { leakPhotons: 1 }),
          multiplier * port,
        ),
        compare(
          `sphere multiplier, ${where}`,
          'M = ρ/(1 − ρ(1 − f))',
          { value: absorbed.value * perHit, standardError: absorbed.standardError * perHit },
          multiplier,
        ),
      );
    }
    return cases;
  },
};
