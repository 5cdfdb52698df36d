import type { PartDescription, Vector3 } from '../design/description.js';
import { fateShare } from './estimate.js';
import { type Complex, type Film, type FilmResponse, filmResponse } from './film-law.js';
import { radians } from './fresnel-law.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import { cell, medium, PUMP_NM, part, pump, stack, thinBeam } from './proof-cells.js';
import { slotsOf } from './slots-of.js';
import { plateNormal, type Tilt, tiltedPlate } from './tilted-plate.js';
import { traceCell } from './trace-cell.js';

const ECHOES = 'sum of echoes';
const JONES = 'amplitudes by sums of echoes, Jones vectors';
/** What tables of films may be off between their nodes; far less almost everywhere. */
const TABLE = 3e-4;
/** What gets into a plate is gone within micrometres. */
const SWALLOWS = { absorption: 1e6 };
const quarter = (n: number, nm: number, sine = 0): Film => [n, 0, nm / (4 * Math.sqrt(n * n - sine * sine))];

const FIFTEEN = Array.from({ length: 15 }, (_, i) => quarter(i % 2 ? 1.46 : 2.35, 520));
const SILVER: Film[] = [[0.05, 3.3, 50]];

/** Polarising coat after MacNeille: at 45° in the glass, light meets each face between films at Brewster's angle. */
const HIGH = 2.35;
const LOW = 1.38;
const SINE = (HIGH * LOW) / Math.hypot(HIGH, LOW);
const PRISM = SINE * Math.SQRT2;
const POLARISER = Array.from({ length: 15 }, (_, i) => quarter(i % 2 ? LOW : HIGH, PUMP_NM, SINE));

/** Media of the retarders: the analyser is 1.5 times denser than what lies around. */
const AROUND = 1.52;
const BREWSTER = Math.atan(1.5);
const BREWSTER_S = ((1.5 ** 2 - 1) / (1.5 ** 2 + 1)) ** 2;
const RETARDERS: Readonly<Record<'reflected' | 'transmitted', readonly Film[]>> = {
  reflected: [
    [2.3, 0, 38],
    [1.46, 0, 95],
  ],
  // T of 64 % and 100 %, s and p out of step by some 125°.
  transmitted: Array.from({ length: 15 }, (_, i) => quarter(i % 2 ? 1.46 : 2.35, 350)),
};

export const polarisingFilmsProof: Proof = {
  name: 'Thin films in polarised light',
  law: 'R and T of s and p light, Malus’s law between two polarising coats, phases after coats that reflect and transmit',
  source: 'MacNeille, US patent 2 403 731 (1946, from memory); Born & Wolf §1.6; Jones 1941; Airy 1833 and Rouard 1937',
  status: 'exact',
  async run(context) {
    const cases: ProofCase[] = [];
    for (const polarisation of ['s', 'p'] as const) {
      for (const degrees of [30, 45, 60])
        cases.push(...(await shine(context, 'films', FIFTEEN, degrees, polarisation)));
      cases.push(...(await shine(context, 'silver', SILVER, 60, polarisation)));
    }
    for (const turn of [0, 30, 60, 90]) cases.push(await malus(context, turn));
    for (const turn of [0, 45, 90, 135]) {
      cases.push(await retarded(context, 'reflected', 1, turn));
      cases.push(await retarded(context, 'reflected', 2, turn));
      cases.push(await retarded(context, 'transmitted', 1, turn));
      cases.push(await retarded(context, 'transmitted', 2, turn));
    }
    return cases;
  },
};

async function shine(
  context: ProofContext,
  what: 'films' | 'silver',
  films: readonly Film[],
  degrees: number,
  polarisation: 's' | 'p',
): Promise<ProofCase[]> {
  const angle = radians(degrees);
  const along: Vector3 = [Math.sin(angle), 0, -Math.cos(angle)];
  const nm = 520;
  const name = what === 'films' ? '15 layers in liquid' : '50 nm of silver-like metal in liquid';
  const tallies = await traceCell(
    context,
    cell(`${name} at ${degrees} deg, ${polarisation}`, {
      media: [medium('liquid', 1.3614), medium('inside', 1.52, SWALLOWS)],
      around: 'liquid',
      finishes: [stack('films', films)],
      parts: [part('block', 'inside', { kind: 'box', size: [10, 10, 2] }, { faces: { top: 'films' } })],
      pumps: [fieldAt(polarisation === 's' ? 0 : 90, [-along[0], 0, 1 - along[2]], along, nm)],
      exit: 'block.bottom',
    }),
    0.3,
  );
  const { reflectance, transmittance } = filmResponse(films, 1.3614, 1.52, angle, nm, polarisation);
  const reflected = fateShare(tallies, slotsOf({ fate: 'reflected-at-entry', where: 'block.top' }));
  const where = `${name} at ${degrees}°`;
  const cases = [compare(`R of ${polarisation} light, ${where}`, ECHOES, reflected, reflectance, TABLE)];
  if (what === 'films') return cases;
  const taken = fateShare(tallies, slotsOf({ fate: 'absorbed-by-finish', where: 'block.top' }));
  const lost = 1 - reflectance - transmittance;
  return [...cases, compare(`${polarisation} light absorbed, ${where}`, ECHOES, taken, lost, TABLE)];
}

/** Unpolarised light through one coat, then through another whose plane of incidence is turned. */
async function malus(context: ProofContext, degrees: number): Promise<ProofCase> {
  const along: Vector3 = [0, 0, -1];
  const tilt = { along, from: [0, 0, 10], across: [1, 0, 0], angle: Math.PI / 4 } as const;
  const coated = { size: [4, 4, 1], faces: { top: 'coat' } } as const;
  const tallies = await traceCell(
    context,
    cell(`polarising coats at ${degrees} deg`, {
      media: [medium('prism', PRISM), medium('dark', PRISM, SWALLOWS)],
      around: 'prism',
      finishes: [stack('coat', POLARISER)],
      parts: [
        tiltedPlate('polariser', 'prism', { ...tilt, distance: 10, turn: 0 }, coated),
        tiltedPlate('analyser', 'dark', { ...tilt, distance: 30, turn: radians(degrees) }, coated),
      ],
      pumps: [pump([0, 0, 10], along, thinBeam())],
      exit: 'polariser.left',
      polarisation: 'carried',
    }),
  );
  const shares = (['s', 'p'] as const).map(
    (one) => filmResponse(POLARISER, PRISM, PRISM, Math.PI / 4, PUMP_NM, one).transmittance,
  );
  const [s, p] = shares;
  const cos2 = Math.cos(radians(degrees)) ** 2;
  return compare(
    `through two polarising coats, ${degrees}° between their planes`,
    'Malus, with T_s and T_p of each coat by sums of echoes',
    fateShare(tallies, slotsOf({ fate: 'absorbed-by-solvent', where: 'analyser' })),
    0.5 * (p * (p * cos2 + s * (1 - cos2)) + s * (s * cos2 + p * (1 - cos2))),
    TABLE,
  );
}

/** Light at 45° off coated faces beyond the critical angle, or through coats at 60°, into a face at Brewster's angle. */
async function retarded(
  context: ProofContext,
  how: 'reflected' | 'transmitted',
  times: 1 | 2,
  turn: number,
): Promise<ProofCase> {
  const angle = radians(how === 'reflected' ? 50 : 60);
  const [sine, cosine] = [Math.sin(angle), Math.cos(angle)];
  const down: Vector3 = [sine, 0, -cosine];
  const up: Vector3 = [sine, 0, cosine];
  const last = how === 'reflected' && times === 1 ? up : down;
  // s is y before and after; p is direction × s.
  const p: Vector3 = [-last[2], 0, last[0]];
  // The second face looks down, 2 mm above the first, where the light comes.
  const [far, high] = [2 * Math.tan(angle), 2];
  const next: Vector3 = how === 'reflected' ? [far, 0, high] : [10 * sine, 0, -10 * cosine];
  const from: Vector3 = times === 2 ? next : [0, 0, 0];
  const tilt: Tilt = { along: last, from, distance: 20, across: p, turn: radians(turn), angle: BREWSTER };
  const beyond = how === 'reflected' ? 1 : AROUND;
  const parts: PartDescription[] = [
    part('block', 'beyond', { kind: 'box', size: [2, 2, 1] }, { at: [0, 0, -0.5], faces: { top: 'coat' } }),
    tiltedPlate('analyser', 'dense', tilt),
  ];
  if (times === 2) {
    const side = how === 'reflected' ? 'bottom' : 'top';
    const at: Vector3 = [next[0], 0, next[2] + (side === 'bottom' ? 0.5 : -0.5)];
    parts.push(part('second', 'beyond', { kind: 'box', size: [2, 2, 1] }, { at, faces: { [side]: 'coat' } }));
  }
  const films = RETARDERS[how];
  const tallies = await traceCell(
    context,
    cell(`${how} ${times}, analyser at ${turn} deg`, {
      media: [medium('around', AROUND), medium('beyond', beyond), medium('dense', 1.5 * AROUND, SWALLOWS)],
      around: 'around',
      finishes: [stack('coat', films)],
      parts,
      pumps: [fieldAt(45, [-0.8 * down[0], 0, -0.8 * down[2]], down, PUMP_NM)],
      exit: 'analyser.bottom',
    }),
  );
  const s = filmResponse(films, AROUND, beyond, angle, PUMP_NM, 's');
  const along = filmResponse(films, AROUND, beyond, angle, PUMP_NM, 'p');
  const turned = (response: FilmResponse, sign: number): Complex => {
    const { r, t } = response;
    // Beyond a reflection p = direction × s lies against the field along the films.
    const [x, y]: Complex = how === 'transmitted' ? t : [sign * r[0], sign * r[1]];
    return times === 1 ? [x, y] : [x * x - y * y, 2 * x * y];
  };
  const fields = [turned(s, 1), turned(along, -1)];
  const normal = plateNormal(tilt);
  // s of the analyser is direction × normal, along y and along p; the pump's field is half s, half p.
  const side: Vector3 = [
    last[1] * normal[2] - last[2] * normal[1],
    last[2] * normal[0] - last[0] * normal[2],
    last[0] * normal[1] - last[1] * normal[0],
  ];
  const size = Math.hypot(...side);
  const a = side[1] / size;
  const b = (side[0] * p[0] + side[2] * p[2]) / size;
  const power = (x: number, y: number) =>
    0.5 * ((x * fields[0][0] + y * fields[1][0]) ** 2 + (x * fields[0][1] + y * fields[1][1]) ** 2);
  return compare(
    how === 'reflected'
      ? `behind ${times === 1 ? 'a coat' : 'two coats'} beyond the critical angle, analyser at ${turn}°`
      : `through ${times === 1 ? 'a coat' : 'two coats'} at 60°, analyser at ${turn}°`,
    JONES,
    fateShare(tallies, slotsOf({ fate: 'absorbed-by-solvent', where: 'analyser' })),
    power(1, 0) + power(0, 1) - BREWSTER_S * power(a, b),
    TABLE,
  );
}

/** A thin beam whose field stands at an angle to s of a face that looks along z. */
const fieldAt = (degrees: number, at: Vector3, along: Vector3, wavelengthNm: number) => ({
  ...pump(at, along, thinBeam(), { wavelengthNm }),
  polarised: radians(degrees),
});
