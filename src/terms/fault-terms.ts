/** Fault codes, and what the checks warn of. */
import type { Fault, FaultCode } from '../design/fault.js';
import { type TermText, termsOf } from './term.js';

const OWN = 'check of this program';
const ERROR = 'an error unless told as a warning: nothing is traced';

const FAULTS: Readonly<Record<`fault-${FaultCode}`, TermText>> = {
  'fault-file': {
    name: 'fault of the file',
    also: ['file'],
    means: 'a file that cannot be read: missing, too large, binary, empty',
    formula: 'none',
    assumes: ERROR,
    source: OWN,
  },
  'fault-yaml': {
    name: 'fault of the YAML',
    also: ['yaml'],
    means: 'text that is not YAML, a key twice, or aliases without end',
    formula: 'none',
    assumes: 'every scalar is text; our own grammar reads its quantity',
    source: 'YAML 1.2.2',
  },
  'fault-missing': {
    name: 'missing field',
    also: ['missing'],
    means: 'a field the design must have is not there or is empty',
    formula: 'none',
    assumes: ERROR,
    source: OWN,
  },
  'fault-unknown-key': {
    name: 'unknown key',
    means: 'a key that does not belong where it stands',
    formula: 'none',
    assumes: 'the nearest key that does is offered',
    source: OWN,
  },
  'fault-unknown-name': {
    name: 'unknown name',
    means: 'a medium, finish, part, face, dye or dial that does not exist',
    formula: 'none',
    assumes: 'the nearest name that does is offered',
    source: OWN,
  },
  'fault-type': {
    name: 'wrong kind of value',
    also: ['type'],
    means: 'a list where a number should be, and the like',
    formula: 'none',
    assumes: ERROR,
    source: OWN,
  },
  'fault-quantity': {
    name: 'fault of a quantity',
    also: ['quantity'],
    means: 'no quantity, a wrong unit or dimension, or bad arithmetic',
    formula: 'none',
    assumes: 'every quantity carries its unit',
    source: OWN,
  },
  'fault-range': {
    name: 'out of range',
    also: ['range'],
    means: 'a number no physical thing can have',
    formula: 'none',
    assumes: ERROR,
    source: OWN,
  },
  'fault-geometry': {
    name: 'fault of the geometry',
    also: ['geometry'],
    means: 'a shape or a placement that makes no sense',
    formula: 'none',
    assumes: ERROR,
    source: OWN,
  },
  'fault-finish': {
    name: 'fault of a finish',
    means: 'a finish that cannot act, or two of them on one spot',
    formula: 'none',
    assumes: ERROR,
    source: OWN,
  },
  'fault-unreachable': {
    name: 'unreachable',
    means: 'an exit or a pump that nothing reaches',
    formula: 'none of 2048 trial photons got there',
    assumes: 'a warning where more photons might: a dark exit may be faint',
    source: OWN,
  },
  'fault-energy': {
    name: 'fault of energy',
    also: ['energy'],
    means: 'shares of a finish that add up to more than 1',
    formula: 'R + T > 1, or R + T + A > 1',
    assumes: 'a finish takes light or leaves it, and makes none',
    source: 'conservation of energy',
  },
  'fault-caution': {
    name: 'warning',
    also: ['caution', 'warnings'],
    means: 'something suspicious that can be traced all the same',
    formula: 'none',
    assumes: 'results stand, but read them with what it says in mind',
    source: OWN,
  },
};

const CHECKS = {
  'pump-misses': {
    name: 'pump misses parts',
    also: ['much of this pump meets no part'],
    means: 'much of a pump’s light passes by every part',
    formula: 'more than 5 % of 2048 trial photons meet no part',
    assumes: 'a trial of 2048 photons is enough to tell',
    source: OWN,
  },
  'dark-exit': {
    name: 'dark exit',
    also: ['no light came to the exit'],
    means: 'none of the trial photons came to the exit',
    formula: '0 of the trial photons by the exit',
    assumes: 'the exit may be blocked, or only faint',
    source: OWN,
  },
  'exit-inside': {
    name: 'exit touches a part',
    also: ['the exit touches another part'],
    means: 'light counts as output before it has left the device',
    formula: 'none',
    assumes: 'what the part beyond the exit reflects or absorbs is not seen',
    source: OWN,
  },
  'shut-wall': {
    name: 'wall shut by its finish',
    also: ['shuts this part off'],
    means: 'a finish for all other faces also lies where parts touch',
    formula: 'none',
    assumes: 'seldom meant; name the faces, or give the joint “clear”',
    source: OWN,
  },
  'no-dye': {
    name: 'no dye in any part',
    also: ['nothing will fluoresce'],
    means: 'no part holds a dye, so no light is emitted',
    formula: 'none',
    assumes: 'right for tests of optics, not for a light source',
    source: OWN,
  },
  'strong-dye': {
    name: 'dye too strong',
    also: ['quench themselves', 'concentration quenching', 'self-quenching', 'dimers'],
    means: 'so strong a dye quenches itself and pairs up, not modelled here',
    formula: 'concentration > 1 mmol/L',
    assumes: 'one limit for all dyes; the output will read high',
    source: 'common practice, no source',
  },
  'coarse-voxels': {
    name: 'voxels too coarse',
    also: ['voxels are too coarse for this pump'],
    means: 'voxels blur the hottest spot: it reads cool, boiling late',
    formula: 'voxel > 1/2 of the 1/e depth, or of the beam’s 1/e² radius',
    assumes: 'depth at the wavelength of the pump, in the darkest medium',
    source: OWN,
  },
  'other-solvent': {
    name: 'dye data of another solvent',
    also: ['the library has no spectra'],
    means: 'the library’s spectra of this dye are from another liquid',
    formula: 'none',
    assumes: 'peaks may lie some 10 nm off, the yield some tenths',
    source: 'common practice, no source',
  },
  'other-ph': {
    name: 'dye data of another pH',
    also: ['yield and spectra of'],
    means: 'the dye’s data are those of the form it has at other pH',
    formula: 'none',
    assumes: 'forms of the dye are not mixed by pH in this version',
    source: OWN,
  },
  'fine-stack': {
    name: 'stack finer than its table',
    also: ['finer in angle than its table'],
    means: 'shares of this stack change faster with angle than its table',
    formula: 'error of the table above 1e-3 at some angle',
    assumes: 'few thick layers, or very many',
    source: OWN,
  },
  extrapolated: {
    name: 'extrapolated layer data',
    also: ['extrapolates', 'extrapolate'],
    means: 'light at wavelengths a layer material has no data for',
    formula: 'the nearest value of n and k is held',
    assumes: 'the design asked for it',
    source: OWN,
  },
  'dense-beads': {
    name: 'dense beads',
    also: ['beads this close'],
    means: 'beads so near to each other that they scatter together',
    formula: 'more than 5 % of the volume',
    assumes: 'each is traced as if it were alone',
    source: 'common practice, no source',
  },
  'absorbing-beads': {
    name: 'absorbing beads',
    also: ['these beads absorb'],
    means: 'beads that take light as well as turn it',
    formula: 'Q_abs = Q_ext − Q_sca',
    assumes: 'what they take is booked with the medium they are in',
    source: 'Bohren & Huffman, 1983 (from memory)',
  },
  'matched-beads': {
    name: 'beads of the index of the medium',
    also: ['index-matched beads'],
    means: 'beads that do not scatter, having the index around them',
    formula: 'm = 1',
    assumes: 'at the wavelengths of the design',
    source: OWN,
  },
  'coincident-mesh': {
    name: 'mesh flush with another part',
    also: ['coincident faces', 'a face of a mesh lies exactly on'],
    means: 'rounding decides which face comes first: light sees a gap',
    formula: 'none',
    assumes: 'let the mesh overlap what it touches; nothing is lost',
    source: OWN,
  },
  turbid: {
    name: 'very turbid medium',
    also: ['turbid'],
    means: 'light turns very many times on its way: tracing will be slow',
    formula: 'many mean free paths across the design',
    assumes: 'none',
    source: OWN,
  },
  'one-way-scatter': {
    name: 'scatter that is not reciprocal',
    also: ['not reciprocal', 'reciprocity'],
    means: 'a BSDF that differs when light goes the other way',
    formula: 'f(in, out) = f(out, in) for real surfaces',
    assumes: 'it is traced as given',
    source: 'Helmholtz’s reciprocity (from memory)',
  },
  unused: {
    name: 'unused',
    also: ['nothing uses this dial', 'no part is filled', 'no medium holds', 'no face has', 'no layer is made'],
    means: 'a dial, medium, dye or finish the design declares and never uses',
    formula: 'none',
    assumes: 'often a slip, never an error',
    source: OWN,
  },
  'map-left-out': {
    name: 'map left out',
    also: ['is left out: none of its cells'],
    means: 'no cell of a map meets the face or liquid it maps',
    formula: 'none',
    assumes: 'finer cells would meet it',
    source: OWN,
  },
} satisfies Record<string, TermText>;

type CheckName = keyof typeof CHECKS;

/** How the sentence of each warning is known again; a record holds no more of it. */
const TOLD: Readonly<Record<CheckName, RegExp>> = {
  'pump-misses': /much of this pump meets no part/,
  'dark-exit': /no light came to the exit/,
  'exit-inside': /the exit touches another part/,
  'shut-wall': /shuts this part off/,
  'no-dye': /no part holds a dye/,
  'strong-dye': /dyes quench themselves/,
  'coarse-voxels': /voxels are too coarse/,
  'other-solvent': /the library has no spectra of/,
  'other-ph': /are those of the form it has/,
  'fine-stack': /finer in angle than its table/,
  extrapolated: /layer material is extrapolated/,
  'dense-beads': /beads this close/,
  'absorbing-beads': /these beads absorb/,
  'matched-beads': /have the index of the medium/,
  'coincident-mesh': /a face of a mesh lies exactly/,
  turbid: /light turns very many times/,
  'one-way-scatter': /is not reciprocal/,
  unused:
    /^(?:nothing uses this dial|no layer is made of this material|no part is filled with this medium|no medium holds this dye|no face has this finish)/,
  'map-left-out': /is left out: none of its cells/,
};

export const FAULT_TERMS = [...termsOf(() => 'run', FAULTS), ...termsOf(() => 'run', CHECKS)];

/** Term of what a check tells; of its code where the sentence is not known. */
export function termOfFault({ code, severity, problem }: Pick<Fault, 'code' | 'severity' | 'problem'>): string {
  const own = `fault-${code}`;
  if (severity === 'error') return own;
  const names = Object.keys(TOLD) as CheckName[];
  return names.find((name) => TOLD[name].test(problem)) ?? own;
}
