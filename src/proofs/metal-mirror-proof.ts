import type { Vector3 } from '../design/description.js';
import { fateShare } from './estimate.js';
import { metalReflectance, radians } from './fresnel-law.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, medium, metal, part, pump, thinBeam } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { traceCell } from './trace-cell.js';

/** Metal, n, k, index of what touches it, angle, printed normal reflectance (4 decimals) or null where only the law says. */
const ROWS = [
  ['aluminium at 450 nm', 0.6332, 5.4544, 1, 0, 0.9219],
  ['aluminium at 450 nm', 0.6332, 5.4544, 1.36, 0, 0.8978],
  ['aluminium at 520 nm', 0.8878, 6.281, 1, 0, 0.9174],
  ['aluminium at 520 nm', 0.8878, 6.281, 1.36, 0, 0.8915],
  ['aluminium at 520 nm', 0.8878, 6.281, 1, 45, null],
  ['aluminium at 520 nm', 0.8878, 6.281, 1.36, 45, null],
  ['aluminium at 520 nm', 0.8878, 6.281, 1.36, 70, null],
] as const;

export const metalMirrorProof: Proof = {
  name: 'Metal mirror in air and in liquid',
  law: 'R of an opaque metal from n and k, in the medium that touches it',
  source: 'n, k: Rakić, Appl. Opt. 34 4755 (1995), as tabulated; law: Born & Wolf §14.2',
  status: 'verified',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const row of ROWS) cases.push(await reflect(context, row));
    return cases;
  },
};

async function reflect(
  context: ProofContext,
  [name, n, k, outside, degrees, printed]: (typeof ROWS)[number],
): Promise<ProofCase> {
  const angle = radians(degrees);
  const along: Vector3 = [Math.sin(angle), 0, -Math.cos(angle)];
  const tallies = await traceCell(
    context,
    cell(`${name} in ${outside}, ${degrees} deg`, {
      media: [medium('glass', 1.5), medium('outside', outside)],
      around: 'outside',
      finishes: [metal('aluminium', n, k)],
      parts: [part('mirror', 'glass', { kind: 'box', size: [10, 10, 2] }, { faces: { top: 'aluminium' } })],
      pumps: [pump([-along[0], 0, 1 - along[2]], along, thinBeam())],
      exit: 'mirror.bottom',
    }),
    0.5,
  );
  return compare(
    `R of ${name} in n = ${outside} at ${degrees}°`,
    printed === null ? 'Born & Wolf §14.2' : 'table of n, k and R',
    fateShare(tallies, slotsOf({ fate: 'reflected-at-entry', where: 'mirror.top' })),
    printed ?? metalReflectance(outside, n, k, angle),
    printed === null ? 0 : 5e-5,
  );
}
