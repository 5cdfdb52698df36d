import { termById } from '../terms/all-terms.js';
import { type Markup, markup } from './markup.js';

const PREFIX = 'term-';

/** Address of a term on the page. */
export const termAnchor = (id: string): string => PREFIX + id;

/**
 * A small mark beside a word or number: opens what the term means, without script. The text itself stands once, in the
 * section of terms at the end of the page. null for what has no term.
 * @param id of a term of src/terms
 */
export function termMark(id: string): Markup | null {
  const term = termById(id);
  if (term === undefined) return null;
  return markup`<button type="button" class="mark" popovertarget="${termAnchor(id)}" aria-label="what ${term.name} means"></button>`;
}

/** Words of our own with their mark, which stays on the line of the last of them. */
export function markedWords(words: string, id: string): Markup {
  const at = words.lastIndexOf(' ') + 1;
  return markup`${words.slice(0, at)}<span class="figure">${words.slice(at)}${termMark(id)}</span>`;
}

/** Ids of the terms whose marks stand in a part of the page. Text from outside cannot hold a mark: its quotes are escaped. */
export function markedTerms({ text }: Markup): ReadonlySet<string> {
  return new Set([...text.matchAll(/ popovertarget="term-([A-Za-z0-9-]+)"/g)].map(([, id]) => id));
}
