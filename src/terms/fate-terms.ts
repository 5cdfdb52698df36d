/** Fates, kinds of light and groups of the ledger. */
import type { LedgerRow } from '../record/run-record.js';
import type { Fate, Light } from '../tallies/run-tallies.js';
import type { Group } from './ledger-words.js';
import { type TermText, termsOf } from './term.js';

const COUNTED = 'photons that ended so ÷ launched photons; watts: by energy';

const FATES: Readonly<Record<Fate, TermText>> = {
  missed: {
    name: 'missed every part',
    also: ['missed'],
    means: 'pump light that met no part at all',
    formula: COUNTED,
    assumes: 'met a detector or nothing; mend it by aim, distance or divergence',
    source: 'bookkeeping of this program',
  },
  'reflected-at-entry': {
    name: 'reflected at entry',
    means: 'pump light sent away before it was ever inside a part',
    formula: COUNTED,
    assumes: 'counted at the face that sent it away',
    source: 'Fresnel’s law or the finish; bookkeeping of this program',
  },
  'left-by-exit': {
    name: 'left by the exit',
    means: 'emitted light that crossed the exit outward: the output',
    formula: COUNTED,
    assumes: 'ends there; what comes after the exit is not traced',
    source: 'bookkeeping of this program',
  },
  'left-elsewhere': {
    name: 'left elsewhere',
    means: 'emitted light that got away by another face than the exit',
    formula: COUNTED,
    assumes: 'counted at the face it crossed last',
    source: 'bookkeeping of this program',
  },
  'absorbed-by-finish': {
    name: 'absorbed by a finish',
    also: ['absorbed by the finish', 'mirror loss'],
    means: 'light a mirror, dichroic, diffuser or black face turned to heat',
    formula: `1 − R − T at each hit; ${COUNTED.split(';')[0]}`,
    assumes: 'counted at the face; a finish never creates energy',
    source: 'bookkeeping of this program',
  },
  'absorbed-by-solid': {
    name: 'absorbed by a solid',
    also: ['absorbed by the solid', 'absorbed by glass'],
    means: 'light the glass or polymer of a part turned to heat',
    formula: 'Beer–Lambert along the path: 1 − exp(−μ s)',
    assumes: 'μ as given or tabulated; where dyes share the part, in proportion',
    source: 'Beer–Lambert law; μ from the design or the library',
  },
  'absorbed-by-solvent': {
    name: 'absorbed by a solvent',
    also: ['absorbed by the solvent', 'absorbed by ethanol', 'absorbed by water', 'absorbed by methanol'],
    means: 'light the bare liquid turned to heat, not its dye',
    formula: 'Beer–Lambert along the path: 1 − exp(−μ s)',
    assumes: 'μ of the pure liquid; with dyes, shared in proportion',
    source: 'Beer–Lambert law; μ from the design or the library',
  },
  'lost-in-dye': {
    name: 'not re-emitted',
    also: ['lost in dye', 'not re-emitted by the dye'],
    means: 'photons a dye absorbed and turned to heat instead of light',
    formula: '1 − quantum yield of the dilute dye, at each absorption',
    assumes: 'what crowding takes besides is “quenched”; no saturation',
    source: 'definition of the quantum yield',
  },
  quenched: {
    name: 'quenched',
    also: ['quenched in the dye', 'self-quenched', 'concentration quenching loss'],
    means: 'photons a dye would have given back were it less crowded',
    formula: 'yield of the dilute dye − yield at this strength',
    assumes: 'transfer to dark dimers, and what dimers absorb',
    source: 'Bojarski 1972; Förster 1949; constants of the library',
  },
  'stokes-heat': {
    name: 'Stokes heat',
    also: ['Stokes loss'],
    means: 'energy a dye keeps when it gives back a redder photon',
    formula: 'Σ (E absorbed − E emitted) ÷ Σ E launched; watts only',
    assumes: 'below 0 where a dye emits bluer than it absorbed',
    source: 'conservation of energy (Stokes 1852; from memory)',
  },
  trapped: {
    name: 'trapped for good',
    also: ['trapped'],
    means: 'light going round for ever between faces that take nothing',
    formula: COUNTED,
    assumes: 'told after 40 000 faces without loss or chance; real cells lose',
    source: 'bookkeeping of this program',
  },
};

/** What left as pump light is no output and has words of its own. */
const AS_PUMP = {
  'left-by-exit-as-pump': {
    name: 'pump light by the exit',
    means: 'pump light that crossed the exit outward: the blue leak',
    formula: COUNTED,
    assumes: 'never absorbed by a dye; no output, a matter of eye safety',
    source: 'bookkeeping of this program',
  },
  'left-elsewhere-as-pump': {
    name: 'left again unabsorbed',
    means: 'pump light that got into a part and out again',
    formula: COUNTED,
    assumes: 'counted at the face it crossed last; a deeper cell keeps more of it',
    source: 'bookkeeping of this program',
  },
} satisfies Record<string, TermText>;

const LIGHTS: Readonly<Record<`light-${Light}`, TermText>> = {
  'light-pump': {
    name: 'pump light',
    also: ['pump (light)'],
    means: 'light of the pumps until a dye has first re-emitted it',
    formula: 'none',
    assumes: 'scattered or reflected pump light is pump light still',
    source: 'word of this program',
  },
  'light-emitted': {
    name: 'emitted light',
    also: ['emitted', 'fluorescence'],
    means: 'light of a dye, from the first re-emission on',
    formula: 'none',
    assumes: 'isotropic, unpolarised, after the dye’s emission spectrum',
    source: 'word of this program',
  },
};

const GROUP_TEXTS: Readonly<Record<Group, TermText>> = {
  output: {
    name: 'output',
    means: 'all emitted light out by the exit',
    formula: 'the row “left by the exit” of emitted light',
    assumes: 'pump light by the exit is lost pump light',
    source: 'word of this program',
  },
  'pump-lost': {
    name: 'lost pump light',
    means: 'pump light that no dye took up',
    formula: 'Σ of the rows of pump light but those of the dye',
    assumes: 'the sum has no error of its own: its rows are not independent',
    source: 'word of this program',
  },
  'light-lost': {
    name: 'lost emitted light',
    means: 'emitted light that did not reach the exit',
    formula: 'Σ of the rows of emitted light but output and those of the dye',
    assumes: 'the sum has no error of its own: its rows are not independent',
    source: 'word of this program',
  },
  heat: {
    name: 'heat in the dye',
    means: 'energy that stays in the dye: Stokes heat and not re-emitted',
    formula: 'Σ of the rows “Stokes heat” and “not re-emitted”',
    assumes: 'heat of solvent, solids and finishes is counted elsewhere',
    source: 'word of this program',
  },
};

export const FATE_TERMS = [
  ...termsOf(() => 'where', FATES),
  ...termsOf(() => 'where', AS_PUMP),
  ...termsOf(() => 'where', GROUP_TEXTS),
  ...termsOf(() => 'where', LIGHTS),
];

/** Term of a row of the ledger. */
export function termOfRow({ fate, light }: Pick<LedgerRow, 'fate' | 'light'>): string {
  const own = light === 'pump' ? `${fate}-as-pump` : fate;
  return Object.hasOwn(AS_PUMP, own) ? own : fate;
}
