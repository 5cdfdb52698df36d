import type { Vector3 } from '../design/description.js';
import { fateShare, figureMean } from './estimate.js';
import { fresnelReflectance, radians } from './fresnel-law.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, medium, part, pump, thinBeam } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

const FROM_AIR = [0, 30, 56.31, 70, 80, 85, 89] as const;
const FROM_GLASS = [0, 25, 38, 41, 41.7, 43, 75, 89] as const;
const FROM_LIQUID = [0, 45, 63, 80] as const;
const HALF_MM = 5;
const BLACK_WALLS = { '*': 'black', top: 'clear' } as const;

/** A beam that meets the top of a block of 10 mm at its centre: from below when `up`, else from above. */
function slantedBeam(degrees: number, up: boolean, distance: number) {
  const angle = radians(degrees);
  const along: Vector3 = [Math.sin(angle), 0, (up ? 1 : -1) * Math.cos(angle)];
  const at: Vector3 = [-distance * along[0], 0, HALF_MM - distance * along[2]];
  return pump(at, along, thinBeam());
}

export const fresnelProof: Proof = {
  name: 'Fresnel reflection',
  law: 'unpolarised R(θ) of a plane face, total beyond the critical angle',
  source: 'Born & Wolf, Principles of Optics, §1.5.2',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const degrees of FROM_AIR) cases.push(await fromAir(context, degrees));
    for (const degrees of FROM_GLASS) cases.push(await fromInside(context, 1.5, degrees));
    for (const degrees of FROM_LIQUID) cases.push(await fromInside(context, 1.3614, degrees, 1.5168));
    return cases;
  },
};

async function fromAir(context: ProofContext, degrees: number): Promise<ProofCase> {
  const tallies = await traceCell(
    context,
    cell(`from air, ${degrees} deg`, {
      media: [medium('glass', 1.5)],
      parts: [part('block', 'glass', { kind: 'box', size: [10, 10, 10] }, { faces: BLACK_WALLS })],
      pumps: [slantedBeam(degrees, false, 1)],
      exit: 'block.top',
    }),
    0.3,
  );
  return compare(
    `R from air onto n = 1.5 at ${degrees}°`,
    'Born & Wolf (1.5.33)',
    fateShare(tallies, slotsOf({ fate: 'reflected-at-entry', where: 'block.top' })),
    fresnelReflectance(1, 1.5, radians(degrees)),
  );
}

/** Light that starts inside a black-walled block; what its clear top lets through. */
async function fromInside(context: ProofContext, inside: number, degrees: number, outside = 1): Promise<ProofCase> {
  const tallies = await traceCell(
    context,
    cell(`from ${inside} to ${outside}, ${degrees} deg`, {
      media: [medium('dense', inside), medium('outside', outside)],
      around: 'outside',
      parts: [part('block', 'dense', { kind: 'box', size: [10, 10, 10] }, { faces: BLACK_WALLS })],
      pumps: [slantedBeam(degrees, true, 1)],
      exit: 'block.top',
    }),
    0.3,
  );
  return compare(
    `T from n = ${inside} to ${outside} at ${degrees}°`,
    'Born & Wolf (1.5.33)',
    figureMean(tallies, { leakPhotons: 1 }),
    1 - fresnelReflectance(inside, outside, radians(degrees)),
  );
}
