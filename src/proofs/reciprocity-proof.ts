import type { Description, Vector3 } from '../design/description.js';
import { type Estimate, figureMean } from './estimate.js';
import { compare } from './judge-case.js';
import type { Proof, ProofContext } from './proof.js';
import { cell, detector, diffuser, dye, lambertianDisc, medium, mirror, PUMP_NM, part, pump } from './proof-cells.js';
import { traceCell } from './trace-cell.js';

interface Aperture {
  readonly name: string;
  readonly at: Vector3;
  /** Away from the cell. */
  readonly outward: Vector3;
  readonly radius: number;
}

const BELOW: Aperture = { name: 'below', at: [0.4, -0.5, -3], outward: [0, 0, -1], radius: 1.4 };
const BESIDE: Aperture = { name: 'beside', at: [2.5, 0.6, 0.3], outward: [1, 0, 0], radius: 1.8 };

export const reciprocityProof: Proof = {
  name: 'Reciprocity of two apertures',
  law: 'A₁F₁₂ = A₂F₂₁ for Lambertian light between two apertures, whatever lossy scatterer lies between',
  source: 'Helmholtz reciprocity; Case & Zweifel, Linear Transport Theory (1967) §2.7',
  status: 'exact',
  async run(context) {
    const forth = await between(context, BELOW, BESIDE);
    const back = await between(context, BESIDE, BELOW);
    const ratio = (forth.value * BELOW.radius ** 2) / (back.value * BESIDE.radius ** 2);
    const relative = Math.hypot(forth.standardError / forth.value, back.standardError / back.value);
    const measured: Estimate = { value: ratio, standardError: ratio * relative };
    return [
      compare('a dyed block with a dull mirror and a white wall, there over back', 'A₁F₁₂/A₂F₂₁ = 1', measured, 1),
    ];
  },
};

async function between(context: ProofContext, from: Aperture, to: Aperture): Promise<Estimate> {
  return figureMean(await traceCell(context, lossyBlock(from, to)), { exitPhotons: 1, leakPhotons: 1 });
}

/** Clear faces, a mirror that absorbs a fifth, a white wall; inside, isotropic scattering of albedo 0.95 and a grey solvent. */
function lossyBlock(from: Aperture, to: Aperture): Description {
  const inward: Vector3 = [-from.outward[0], -from.outward[1], -from.outward[2]];
  return cell(`from ${from.name} to ${to.name}`, {
    media: [medium('dyed', 1.4, { absorption: 0.02, dyes: [dye('dye', 0.3, 0.95, PUMP_NM)] })],
    finishes: [mirror('dull', 0.8), diffuser('white', 0.7)],
    parts: [part('block', 'dyed', { kind: 'box', size: [4, 6, 5] }, { faces: { left: 'dull', back: 'white' } })],
    pumps: [pump(from.at, inward, lambertianDisc(from.radius))],
    detectors: [
      detector('receiver', {
        kind: 'plane',
        at: to.at,
        normal: to.outward,
        outline: { kind: 'disc', radius: to.radius },
      }),
    ],
    exit: 'receiver',
  });
}
