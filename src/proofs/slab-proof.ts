import { fateShare, figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { INCIDENCE_WORDS, type Incidence, scatteringSlab } from './scattering-slab.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

/** Optical thickness, albedo, incidence, reflected, transmitted (with the unscattered beam), six decimals. */
const ROWS: readonly (readonly [number, number, Incidence, number, number])[] = [
  [0.1, 0.5, 'normal', 0.021733, 0.926465],
  [0.1, 0.9, '60', 0.08038, 0.898378],
  [0.5, 0.99, 'diffuse', 0.290663, 0.699417],
  [1, 0.5, 'normal', 0.099119, 0.446058],
  [1, 0.9, 'diffuse', 0.352712, 0.474746],
  [1, 0.99, '60', 0.486518, 0.491628],
  [2, 0.9, 'normal', 0.361649, 0.356501],
  [2, 0.5, 'diffuse', 0.145085, 0.107055],
  [5, 0.9, '60', 0.506604, 0.042242],
  [5, 0.99, 'normal', 0.680078, 0.220628],
  [10, 0.99, 'diffuse', 0.785324, 0.066433],
];

export const slabProof: Proof = {
  name: 'Dyed slab, one wavelength',
  law: 'R and T of a slab that scatters isotropically with albedo φ (X and Y functions)',
  source:
    'Chandrasekhar, Radiative Transfer ch. VIII; Carlstedt & Mullikin, Astrophys. J. Suppl. 12 449 (1966); by discrete ordinates to 6 decimals',
  status: 'computed here',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [tau, albedo, incidence, reflected, transmitted] of ROWS) {
      const tallies = await traceCell(context, scatteringSlab(tau, albedo, incidence), 0.4);
      const where = `depth ${tau}, yield ${albedo}, ${INCIDENCE_WORDS[incidence]}`;
      const table = `slab table, τ = ${tau}, ϖ = ${albedo}`;
      cases.push(
        compare(
          `R of a slab, ${where}`,
          table,
          fateShare(tallies, slotsOf({ fate: 'left-elsewhere', light: 'emitted', where: 'slab.top' })),
          reflected,
          1e-6,
        ),
        compare(
          `T of a slab, ${where}`,
          table,
          figureMean(tallies, { exitPhotons: 1, leakPhotons: 1 }),
          transmitted,
          1e-6,
        ),
      );
    }
    return cases;
  },
};
