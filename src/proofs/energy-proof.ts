import { EV_NM } from '../units/constants.js';
import { fateEnergy, figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof } from './proof.js';
import {
  cell,
  diffuser,
  dye,
  EMISSION_NM,
  medium,
  mirror,
  PUMP_NM,
  part,
  pump,
  thinBeam,
  twoColour,
} from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { closureGap, traceCell } from './trace-cell.js';

const YIELD = 0.8;
const SECOND_NM = 500;
/** Watts of the two pumps. */
const POWERS = [2, 1] as const;

export const energyProof: Proof = {
  name: 'Photons and energy',
  law: 'photons are shared as power × wavelength; both ledgers close; the Stokes heat is 1 − λ_pump/λ_emitted of each emission',
  source: 'E = hc/λ; conservation of energy',
  status: 'exact',
  async run(context) {
    const tallies = await traceCell(
      context,
      cell('lossy cell', {
        media: [medium('bath', 1.36, { absorption: 0.03, dyes: [dye('dye', twoColour(0.4, 0.02), YIELD)] })],
        finishes: [mirror('dull', 0.85), diffuser('white', 0.7, 0.1)],
        parts: [
          part('bath', 'bath', { kind: 'box', size: [6, 5, 4] }, { faces: { left: 'dull', back: 'white' } }),
          part('dome', 'bath', { kind: 'cap', radius: 3, height: 2 }, { at: [0, 0, 2.5] }),
        ],
        pumps: [
          pump([0, -5, 0], [0, 1, 0], thinBeam(1), { name: 'first', power: POWERS[0] }),
          pump([1, -5, 0], [0, 1, 0], thinBeam(1), { name: 'second', power: POWERS[1], wavelengthNm: SECOND_NM }),
        ],
        exit: 'dome.dome',
      }),
    );
    const { value: photonEnergy, standardError } = figureMean(tallies, { launchedEnergy: 1 });
    const watts = POWERS[0] + POWERS[1];
    const heat = await traceCell(
      context,
      cell('Stokes heat', {
        media: [medium('bath', 1.36, { dyes: [dye('dye', twoColour(1000, 0), YIELD)] })],
        parts: [part('bath', 'bath', { kind: 'box', size: [6, 5, 4] })],
        pumps: [pump([0, 0, 0], [0, 0, 1], thinBeam())],
        exit: 'bath.top',
      }),
      0.02,
    );
    const quantum = EV_NM / PUMP_NM;
    const share = (slot: Parameters<typeof slotsOf>[0]) => {
      const { value, standardError: error } = fateEnergy(heat, slotsOf(slot));
      return { value: value / quantum, standardError: error / quantum };
    };
    return [
      compare(
        'mean photon energy of two pumps, eV',
        'hc·ΣP/Σ(Pλ)',
        { value: photonEnergy, standardError },
        (EV_NM * watts) / (POWERS[0] * PUMP_NM + POWERS[1] * SECOND_NM),
      ),
      compare('what the ledgers of a lossy cell miss', '0', { value: closureGap(tallies), standardError: 0 }, 0, 1e-12),
      compare(
        'Stokes heat per pump energy',
        'φ(1 − λ_p/λ_e)',
        share({ fate: 'stokes-heat' }),
        YIELD * (1 - PUMP_NM / EMISSION_NM),
      ),
      compare('energy lost in the dye', '1 − φ', share({ fate: 'lost-in-dye' }), 1 - YIELD),
    ];
  },
};
