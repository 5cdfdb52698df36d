import type { RecordedMap } from '../tallies/run-tallies.js';

const MAP_WORDS: Readonly<Record<RecordedMap['what'], string>> = {
  exit: 'light out of',
  'pumped-face': 'pump light onto',
  detector: 'light at detector',
  'absorbed-pump': 'pump light absorbed in',
  'absorbed-all': 'all light absorbed in',
};

const isKnown = (what: string): what is RecordedMap['what'] => Object.hasOwn(MAP_WORDS, what);

/** What a map shows; its place follows. @param what kind of map as in run.json */
export const mapWords = (what: string): string => (isKnown(what) ? MAP_WORDS[what] : 'light at');
