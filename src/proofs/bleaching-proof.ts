import type { Description } from '../design/description.js';
import { summariseRun } from '../outcome/summarise-run.js';
import { traceDescription } from '../trace/trace-design.js';
import { AVOGADRO_PER_MOL, PLANCK_J_S, SPEED_OF_LIGHT_M_PER_S } from '../units/constants.js';
import { compare } from './judge-case.js';
import type { Proof } from './proof.js';
import { cell, dye, ENDLESS, medium, PUMP_NM, part, pump } from './proof-cells.js';

const YIELD = 2e-6;
const STRENGTH = 4e-4;
const WATTS = 30;
/** mm; 2 mL in the light, 200 mL beside it. */
const SIZE = [10, 10, 20] as const;
const RESERVOIR_MM3 = 200_000;
/** Optical depth. */
const DEPTH = 3;

export const bleachingProof: Proof = {
  name: 'Bleaching',
  law: 'N = N₀ exp(−Y A t/N₀): each photon absorbed destroys a molecule with probability Y; a reservoir shares the dose',
  source:
    'first-order photochemical decay; Eggeling, Widengren, Rigler & Seidel, Anal. Chem. 70 (1998) 2651 (abstract)',
  status: 'exact',
  async run({ histories, seed, threads }) {
    const plan = { histories, precision: null, seconds: null, seed: `${seed}/bleaching`, threads };
    const result = await traceDescription(bath(), plan);
    const about = { version: '', file: '', text: '', hash: '', dials: {}, repeat: '', startedAt: new Date(0) };
    const { figures } = summariseRun(result, about).record;
    const measured = (name: 'timeToBleach' | 'timeToBleachWithReservoir') => ({
      value: figures[name].value ?? Number.NaN,
      standardError: figures[name].standardError ?? 0,
    });
    const photons = (WATTS * PUMP_NM * 1e-9 * -Math.expm1(-DEPTH)) / (PLANCK_J_S * SPEED_OF_LIGHT_M_PER_S);
    const seconds = (litres: number) => (Math.log(1 / 0.9) * STRENGTH * litres * AVOGADRO_PER_MOL) / (YIELD * photons);
    return [
      compare(
        'seconds to lose a tenth of 2 mL',
        'ln(1/0.9) N/(Y P(1 − exp(−µd)) λ/hc)',
        measured('timeToBleach'),
        seconds(2e-3),
      ),
      compare(
        'seconds to lose a tenth with 200 mL more',
        'the same with the molecules of 202 mL',
        measured('timeToBleachWithReservoir'),
        seconds(202e-3),
      ),
    ];
  },
};

function bath(): Description {
  const fading = { value: YIELD, low: YIELD, high: YIELD, origin: '' };
  const dark = {
    ...dye('dark', DEPTH / SIZE[2], 0),
    concentration: STRENGTH,
    bleachYield: fading,
  };
  return cell('bleaching bath', {
    media: [{ ...medium('bath', 1.36, { dyes: [dark] }), reservoirMm3: RESERVOIR_MM3 }, medium('matched', 1.36)],
    around: 'matched',
    parts: [part('bath', 'bath', { kind: 'box', size: SIZE }, { faces: ENDLESS })],
    pumps: [
      pump(
        [0, 0, -11],
        [0, 0, 1],
        { kind: 'patch', outline: { kind: 'rectangle', size: [8, 8] }, divergence: [0, 0] },
        { power: WATTS },
      ),
    ],
    exit: 'bath.top',
  });
}
