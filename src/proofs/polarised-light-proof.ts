import type { PumpDescription, Vector3 } from '../design/description.js';
import type { RunTallies } from '../tallies/run-tallies.js';
import { fateShare } from './estimate.js';
import { radians } from './fresnel-law.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, medium, part, piece, pump, thinBeam } from './proof-cells.js';
import { tiltedPlate } from './tilted-plate.js';
import { traceCell } from './trace-cell.js';

const GLASS = 1.5;
const BREWSTER = Math.atan(GLASS);
/** Of s light at Brewster's angle. */
const BREWSTER_S = ((GLASS * GLASS - 1) / (GLASS * GLASS + 1)) ** 2;
/** Born & Wolf §1.5.4: glass of 1.51 at 54°37′ turns s against p by 45° at each total reflection. */
const RHOMB_INDEX = 1.51;
const RHOMB_DEGREES = 54 + 37 / 60;
/** What gets into a plate is gone within micrometres. */
const SWALLOWS = { absorption: 1e6 };

export const polarisedLightProof: Proof = {
  name: 'Polarised light',
  law: 'R of s and p light, Brewster’s angle, Malus’s law between two faces, circular light behind a Fresnel rhomb',
  source: 'Born & Wolf, Principles of Optics, §1.5.2–1.5.4',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const degrees of [0, 30, 45, 56.31, 75]) {
      cases.push(await onGlass(context, degrees, 0), await onGlass(context, degrees, 90));
    }
    for (const turn of [0, 30, 60, 90]) cases.push(await malus(context, turn));
    for (const turn of [0, 45, 90, 135]) cases.push(await behindRhomb(context, turn));
    return cases;
  },
};

/** @param field angle of the electric field from s */
async function onGlass(context: ProofContext, degrees: number, field: number): Promise<ProofCase> {
  const angle = radians(degrees);
  const along: Vector3 = [Math.sin(angle), 0, -Math.cos(angle)];
  const tallies = await traceCell(
    context,
    cell(`glass at ${degrees} deg, field at ${field} deg`, {
      media: [medium('glass', GLASS, SWALLOWS)],
      parts: [part('plate', 'glass', { kind: 'box', size: [10, 10, 2] })],
      pumps: [polarised(pump([-along[0], 0, 1 - along[2]], along, thinBeam()), field)],
      exit: 'plate.bottom',
    }),
    0.3,
  );
  const inside = Math.asin(Math.sin(angle) / GLASS);
  const expected =
    degrees === 0
      ? ((GLASS - 1) / (GLASS + 1)) ** 2
      : field === 0
        ? (Math.sin(angle - inside) / Math.sin(angle + inside)) ** 2
        : (Math.tan(angle - inside) / Math.tan(angle + inside)) ** 2;
  return compare(
    `R of ${field === 0 ? 's' : 'p'} light on n = ${GLASS} at ${degrees}°`,
    'Fresnel’s sine and tangent law, Born & Wolf §1.5.2',
    reflectedBy(tallies, 'plate.top'),
    expected,
  );
}

/** Unpolarised light off one face at Brewster's angle, then off another whose plane of incidence is turned. */
async function malus(context: ProofContext, degrees: number): Promise<ProofCase> {
  const along: Vector3 = [Math.sin(BREWSTER), 0, -Math.cos(BREWSTER)];
  const next: Vector3 = [along[0], 0, -along[2]];
  const tallies = await traceCell(
    context,
    cell(`Malus at ${degrees} deg`, {
      media: [medium('glass', GLASS, SWALLOWS)],
      parts: [
        part('first', 'glass', { kind: 'box', size: [2, 2, 1] }, { at: [0, 0, -0.5] }),
        analyser(next, [0, 0, 0], [Math.cos(BREWSTER), 0, -Math.sin(BREWSTER)], degrees),
      ],
      pumps: [{ ...pump([-2 * along[0], 0, -2 * along[2]], along, thinBeam()), polarised: null }],
      exit: 'first.bottom',
      polarisation: 'carried',
    }),
  );
  return compare(
    `off two faces at Brewster’s angle, ${degrees}° between their planes`,
    'half of R_s · R_s · cos², Malus',
    reflectedBy(tallies, 'analyser.top'),
    0.5 * BREWSTER_S * BREWSTER_S * Math.cos(radians(degrees)) ** 2,
  );
}

/** Light at 45° through a rhomb is circular: a face at Brewster's angle reflects alike, however it is turned. */
async function behindRhomb(context: ProofContext, degrees: number): Promise<ProofCase> {
  const angle = radians(RHOMB_DEGREES);
  const [s, c] = [Math.sin(angle), Math.cos(angle)];
  const along: Vector3 = [s, -c, 0];
  const height = 4;
  const length = 2 * height * Math.tan(angle);
  const lean = (height * c) / s;
  const tallies = await traceCell(
    context,
    cell(`rhomb, analyser at ${degrees} deg`, {
      media: [medium('rhomb', RHOMB_INDEX), medium('glass', GLASS, SWALLOWS)],
      parts: [
        part('rhomb', 'rhomb', [
          piece({
            kind: 'prism',
            outline: [
              [0, 0],
              [length, 0],
              [length + lean, height],
              [lean, height],
            ],
            height: 4,
            sides: null,
          }),
        ]),
        analyser(along, [length + lean / 2, height / 2, 0], [c, s, 0], degrees),
      ],
      pumps: [polarised(pump([lean / 2 - 3 * s, height / 2 + 3 * c, 0], along, thinBeam()), 45)],
      exit: 'analyser.bottom',
    }),
  );
  // Light that turns back at both ends passes the rhomb three times and is circular again.
  const loss = ((RHOMB_INDEX - 1) / (RHOMB_INDEX + 1)) ** 2;
  return compare(
    `into a face at Brewster’s angle behind a Fresnel rhomb, turned ${degrees}°`,
    '1 − half of R_s, whatever the turn: circular light, Born & Wolf §1.5.4',
    fateShare(tallies, ({ fate, where }) => fate === 'absorbed-by-solvent' && where === 'analyser'),
    ((1 - loss) / (1 + loss)) * (1 - 0.5 * BREWSTER_S),
    // The angle is printed to one minute of arc.
    2e-5,
  );
}

const polarised = (of: PumpDescription, degrees: number): PumpDescription => ({ ...of, polarised: radians(degrees) });

const reflectedBy = (tallies: RunTallies, where: string) =>
  fateShare(tallies, (slot) => slot.where === where && slot.fate === 'reflected-at-entry');

const analyser = (along: Vector3, from: Vector3, across: Vector3, degrees: number) =>
  tiltedPlate('analyser', 'glass', { along, from, distance: 20, across, turn: radians(degrees), angle: BREWSTER });
