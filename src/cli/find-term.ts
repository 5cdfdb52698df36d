import { TERMS } from '../terms/all-terms.js';
import type { Term } from '../terms/term.js';
import { nearestName } from '../units/nearest-name.js';

/** One term, or the names of those that may have been meant, nearest first. */
export type FoundTerm =
  | { readonly found: true; readonly term: Term }
  | { readonly found: false; readonly nearest: readonly string[] };

/** Longer words than any term has are not searched for. */
const LONGEST = 80;
const MOST_NAMES = 8;

/** Letters and digits only, so that case, hyphens, spaces and camelCase do not count. */
const plain = (text: string): string =>
  text
    .normalize('NFKD')
    .toLowerCase()
    .replace(/[^\p{L}\p{N}±]/gu, '');

const WORDS: readonly (readonly [string, Term])[] = TERMS.flatMap((term) =>
  [term.name, term.id, ...(term.also ?? [])].map((word) => [plain(word), term] as const),
);

/** Finds a term by its id, its name or another word for it; else by a piece of one that only one term has. */
export function findTerm(written: string): FoundTerm {
  const wanted = plain([...written].slice(0, LONGEST).join(''));
  if (wanted === '' || [...written].length > LONGEST) return { found: false, nearest: [] };
  const exact = WORDS.find(([word]) => word === wanted);
  if (exact !== undefined) return { found: true, term: exact[1] };
  const holding = wanted.length < 3 ? [] : WORDS.filter(([word]) => word.includes(wanted)).map(([, term]) => term);
  const terms = [...new Set(holding)];
  if (terms.length === 1) return { found: true, term: terms[0] };
  if (terms.length > 1) return { found: false, nearest: terms.slice(0, MOST_NAMES).map(({ name }) => name) };
  const near = nearestName(
    wanted,
    WORDS.map(([word]) => word),
  );
  return { found: false, nearest: near === null ? [] : namesOf(near) };
}

const namesOf = (word: string): string[] =>
  WORDS.filter(([one]) => one === word)
    .map(([, { name }]) => name)
    .slice(0, 1);
