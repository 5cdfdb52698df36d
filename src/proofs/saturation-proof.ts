import type { Description, DissolvedDye } from '../design/description.js';
import { summariseRun } from '../outcome/summarise-run.js';
import { traceDescription } from '../trace/trace-design.js';
import { traceSaturated } from '../trace/trace-saturated.js';
import { AVOGADRO_PER_MOL, photonEnergyJ } from '../units/constants.js';
import { compare } from './judge-case.js';
import { lambertW } from './lambert-w.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, dye, ENDLESS, medium, PUMP_NM, part, pump } from './proof-cells.js';

/** mm: of the slab, and how many layers of one strength each it is cut into. */
const DEPTH = 1;
const LAYERS = 10;
const SIDE = 1;
const STRENGTH = 1e-3;
const LIFETIME_NS = 4;
/** Optical depth in weak light, and pump over saturation irradiance. */
const CASES = [
  { depth: 1, over: 1 },
  { depth: 2, over: 4 },
] as const;
/** A layer has one strength: 2.5e-4 off in transmission with 5 layers, 6e-5 with 10, 3e-5 with 20. */
const LAYERED = 1.5e-4;

export const saturationProof: Proof = {
  name: 'Saturation',
  law: 'ln T + (I₀/Iₛ)(T − 1) = −µd in a slab of a two-level dye; excited = absorbed photons per second × lifetime',
  source:
    'two-level rate equations, solved with Lambert’s W; 205 W at 445 nm and 4 ns keep 1.84e12 molecules excited, a nanogram of fluorescein: common practice, no source',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const { depth, over } of CASES) {
      const { result } = await traceSaturated(slab(depth, over), plan(context, `slab ${depth} ${over}`));
      const figure = figuresOf(result).blueLeakFraction;
      cases.push(
        compare(
          `transmission, optical depth ${depth} in weak light, pumped ${over} times the saturation irradiance`,
          'T = W((I₀/Iₛ) exp(I₀/Iₛ − µd))/(I₀/Iₛ)',
          { value: figure.value ?? Number.NaN, standardError: figure.standardError ?? 0 },
          lambertW(over * Math.exp(over - depth)) / over,
          LAYERED,
        ),
      );
    }
    const figures = figuresOf(await traceDescription(thick(), plan(context, 'thick')));
    const count = (name: 'excitedMolecules' | 'excitedMass', unit: number) => ({
      value: (figures[name].value ?? Number.NaN) / unit,
      standardError: (figures[name].standardError ?? 0) / unit,
    });
    return [
      ...cases,
      compare(
        'excited molecules, 205 W absorbed at 445 nm, 4 ns; 1e12',
        '1.84e12',
        count('excitedMolecules', 1e12),
        1.84,
        5e-3,
      ),
      compare('their mass as fluorescein, ng', 'about 1 ng', count('excitedMass', 1), 1, 0.05),
    ];
  },
};

function plan({ histories, seed, threads }: ProofContext, name: string) {
  return { histories, precision: null, seconds: null, seed: `${seed}/saturation ${name}`, threads };
}

const ABOUT = { version: '', file: '', text: '', hash: '', dials: {}, repeat: '' };
const figuresOf = (result: Parameters<typeof summariseRun>[0]) =>
  summariseRun(result, { ...ABOUT, startedAt: new Date(0) }).record.figures;

/** A dark dye without triplet: it absorbs and gives back nothing. */
const darkDye = (absorption: number): DissolvedDye => ({
  ...dye('dark', absorption, 0),
  concentration: STRENGTH,
  lifetimeNs: LIFETIME_NS,
  molarMassGPerMol: 332.31,
});

/** Lit evenly; mirrors at its sides make it endless, matched surroundings take away all reflection. */
function slab(depth: number, over: number): Description {
  const perMm = depth / DEPTH;
  const sigma = (10 * perMm) / (STRENGTH * 1e-3 * AVOGADRO_PER_MOL);
  const saturation = photonEnergyJ(PUMP_NM) / (sigma * LIFETIME_NS * 1e-9);
  const layer = DEPTH / LAYERS;
  const whole = cell(`saturated slab of depth ${depth}`, {
    media: [medium('bath', 1.36, { dyes: [darkDye(perMm)] }), medium('matched', 1.36)],
    around: 'matched',
    parts: Array.from({ length: LAYERS }, (_, i) =>
      part(
        `layer-${i + 1}`,
        'bath',
        { kind: 'box', size: [SIDE, SIDE, layer] },
        {
          faces: ENDLESS,
          at: [0, 0, (i + 0.5) * layer - DEPTH / 2],
        },
      ),
    ),
    pumps: [
      pump(
        [0, 0, -DEPTH],
        [0, 0, 1],
        { kind: 'patch', outline: { kind: 'rectangle', size: [SIDE, SIDE] }, divergence: [0, 0] },
        { power: over * saturation * (SIDE / 10) ** 2 },
      ),
    ],
    exit: `layer-${LAYERS}.top`,
  });
  return { ...whole, defaults: { ...whole.defaults, voxels: [1, 1, LAYERS] } };
}

/** So deep that nothing gets through. */
function thick(): Description {
  return cell('205 W into a deep cell', {
    media: [medium('bath', 1.36, { dyes: [darkDye(4)] }), medium('matched', 1.36)],
    around: 'matched',
    parts: [part('bath', 'bath', { kind: 'box', size: [10, 10, 20] }, { faces: ENDLESS })],
    pumps: [
      pump(
        [0, 0, -11],
        [0, 0, 1],
        { kind: 'patch', outline: { kind: 'rectangle', size: [8, 8] }, divergence: [0, 0] },
        { power: 205, wavelengthNm: 445 },
      ),
    ],
    exit: 'bath.top',
  });
}
