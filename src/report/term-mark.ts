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
  // The space that does not break keeps the mark with its word.
  return markup`\u00a0<button type="button" class="mark" popovertarget="${termAnchor(id)}" aria-label="what ${term.name} means"></button>`;
}

/** Ids of the terms whose marks stand in a part of the page. Text from outside cannot hold a mark: its quotes are escaped. */
export function markedTerms({ text }: Markup): ReadonlySet<string> {
  return new Set([...text.matchAll(/ popovertarget="term-([A-Za-z0-9-]+)"/g)].map(([, id]) => id));
}
