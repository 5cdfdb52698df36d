/** Words of a run and its statistics. */
import type { RunRecord } from '../record/run-record.js';
import { type TermText, termsOf } from './term.js';

const WORD = 'word of this program';

const WORDS = {
  run: {
    name: 'run',
    also: ['run folder'],
    means: 'one traced design, and its folder of results',
    formula: 'none',
    assumes: 'run.json holds every number shown anywhere',
    source: WORD,
  },
  history: {
    name: 'history',
    also: ['histories'],
    means: 'one pump photon followed through all re-emissions to its end',
    formula: 'none',
    assumes: 'as nature would: every event drawn by chance, none cut short',
    source: 'word of the Monte Carlo trade',
  },
  figure: {
    name: 'figure',
    also: ['figures'],
    means: 'one headline number with unit and standard error',
    formula: 'none',
    assumes: 'where it has no value or no error, its note says why',
    source: WORD,
  },
  'standard-error': {
    name: 'standard error',
    also: ['±', 'error', 'plus minus'],
    means: 'how far chance may have moved a number; ± is one of it',
    formula: '√(scatter of the batches ÷ histories), carried to the figure',
    assumes: 'chance only: wrong data or a coarse model are not in it',
    source: 'batch means and delta method of statistics',
  },
  polarisation: {
    name: 'polarisation',
    also: ['polarised', 'carried', 'averaged', 's and p'],
    means: 'carried by every photon, or averaged at every face',
    formula: 'Stokes Q, U, V about the normal of the plane of incidence',
    assumes: 'dyes and scatter emit unpolarised; fixed shares treat s, p alike',
    source: 'Born & Wolf, Principles of Optics, §1.4 (from memory)',
  },
  batch: {
    name: 'batch',
    also: ['batches'],
    means: '1024 histories with one random stream; the grain of the errors',
    formula: 'below 16 batches, groups of 64 histories serve',
    assumes: 'batches know nothing of one another',
    source: WORD,
  },
  'counting-noise': {
    name: 'counting noise',
    also: ['photon noise', 'shot noise', 'speckle'],
    means: 'unevenness of a map that comes from chance alone',
    formula: '1 ÷ √(photons per cell)',
    assumes: 'photons arrive independently of one another',
    source: 'Poisson’s law',
  },
  precision: {
    name: 'precision',
    means: 'relative standard error wanted on the exit fraction',
    formula: 'standard error ÷ exit photon fraction',
    assumes: 'not tried before 32 batches',
    source: WORD,
  },
  seed: {
    name: 'seed',
    means: 'text that chooses the random numbers of a run',
    formula: 'none',
    assumes: 'same design, seed and histories: the same bits',
    source: WORD,
  },
  check: {
    name: 'check',
    also: ['checks', 'trial'],
    means: 'what the program looks at before it traces, and warns of',
    formula: 'geometry, media, and a trial of 2048 photons',
    assumes: 'finds what it knows to look for',
    source: WORD,
  },
  'fault-code': {
    name: 'fault',
    also: ['fault code', 'faults', 'error in a design'],
    means: 'something wrong with a design, with file, line and column',
    formula: 'none',
    assumes: 'all faults of a file are told at once',
    source: WORD,
  },
} satisfies Record<string, TermText>;

const STOPS: Readonly<Record<`stop-${RunRecord['run']['stopReason']}`, TermText>> = {
  'stop-histories': {
    name: 'all histories traced',
    means: 'the run ended as asked: so many histories',
    formula: 'none',
    assumes: 'none',
    source: WORD,
  },
  'stop-precision': {
    name: 'wanted precision reached',
    means: 'the run ended when the exit fraction was sure enough',
    formula: 'standard error ÷ exit photon fraction ≤ wanted',
    assumes: 'other figures may be less sure',
    source: WORD,
  },
  'stop-time': {
    name: 'time used up',
    means: 'the run ended when its time was over',
    formula: 'none',
    assumes: 'how many histories that makes depends on the machine',
    source: WORD,
  },
  'stop-interrupted': {
    name: 'interrupted',
    also: ['Ctrl-C', 'interrupted: what was traced until then'],
    means: 'the run was stopped by hand; whole batches were kept',
    formula: 'none',
    assumes: 'the same bits as a run asked for that many histories',
    source: WORD,
  },
};

export const RUN_TERMS = [...termsOf(() => 'run', WORDS), ...termsOf(() => 'run', STOPS)];
