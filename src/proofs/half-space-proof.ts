import { fateShare, figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase } from './proof.js';
import { cell, dye, ENDLESS, medium, PUMP_NM, part, pump, thinBeam } from './proof-cells.js';
import { INCIDENCE_WORDS, type Incidence, scatteringSlab } from './scattering-slab.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

/** Deep enough: at albedo 0.99 less than 2·10⁻⁶ of the light feels the bottom. */
const DEEP = 40;
/** Albedo, incidence, plane or spherical albedo 1 − √(1−ϖ) H(µ), six decimals. */
const ROWS: readonly (readonly [number, Incidence, number])[] = [
  [0.5, 'normal', 0.115226],
  [0.5, '60', 0.160144],
  [0.9, 'normal', 0.414947],
  [0.9, '60', 0.507939],
  [0.9, 'diffuse', 0.478024],
  [0.99, 'normal', 0.752721],
  [0.99, '60', 0.81514],
  [0.99, 'diffuse', 0.794564],
];

export const halfSpaceProof: Proof = {
  name: 'Dyed half-space, one wavelength',
  law: 'what comes back is 1 − √(1 − φ) H(µ₀), H of Chandrasekhar for isotropic scattering',
  source:
    'Chandrasekhar, Radiative Transfer (1950) ch. V, evaluated to 6 decimals; Giovanelli, Optica Acta 2 153 (1955)',
  status: 'computed here',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const [albedo, incidence, expected] of ROWS) {
      const tallies = await traceCell(context, scatteringSlab(DEEP, albedo, incidence), albedo > 0.95 ? 0.25 : 0.5);
      cases.push(
        compare(
          `yield ${albedo}, ${INCIDENCE_WORDS[incidence]}`,
          incidence === 'diffuse' ? '1 − 2√(1−φ)∫µH dµ' : `H(${incidence === '60' ? 0.5 : 1})`,
          fateShare(tallies, slotsOf({ fate: 'left-elsewhere', light: 'emitted', where: 'slab.top' })),
          expected,
          3e-6,
        ),
      );
    }
    cases.push(await giovanelli(context));
    return cases;
  },
};

/** The same with n = 1.5 against air: total reflection inside sends most of the light back for another turn. */
const giovanelli = async (context: Parameters<Proof['run']>[0]): Promise<ProofCase> => {
  const tallies = await traceCell(
    context,
    cell('half-space with a surface', {
      media: [medium('dyed', 1.5, { dyes: [dye('dye', 10, 0.9, PUMP_NM)] })],
      parts: [part('slab', 'dyed', { kind: 'box', size: [10, 10, 3] }, { faces: ENDLESS })],
      pumps: [pump([0, 0, 2.5], [0, 0, -1], thinBeam())],
      exit: 'slab.top',
    }),
    0.5,
  );
  return compare(
    'yield 0.9, n = 1.5 in air: comes back from within, without the first 4 %',
    'Giovanelli 1955: 0.2600 with the first 4 %',
    figureMean(tallies, { exitPhotons: 1, leakPhotons: 1 }),
    0.21992,
    5e-6,
  );
};
