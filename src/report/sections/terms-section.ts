import { TERMS } from '../../terms/all-terms.js';
import type { Term } from '../../terms/term.js';
import { type Markup, markup } from '../markup.js';
import { markedTerms, termAnchor } from '../term-mark.js';

/**
 * The terms marked in the sections before, each once. A mark lifts its entry out of here as a card; where a browser knows no
 * such cards, and in print, they are read here.
 */
export function termsSection(before: Markup): Markup {
  const marked = markedTerms(before);
  const terms = TERMS.filter(({ id }) => marked.has(id)).toSorted((a, b) =>
    a.name.toLowerCase() < b.name.toLowerCase() ? -1 : 1,
  );
  return markup`<section id="terms"><h2>Words on this page</h2><p class="lead">What each means, how it is reckoned, what it takes for granted, and where it comes from.</p><dl class="terms">${terms.map(entry)}</dl></section>`;
}

function entry({ id, name, means, formula, assumes, source }: Term): Markup {
  return markup`<div class="term" id="${termAnchor(id)}" popover><dt>${name}</dt><dd>${means}</dd>${line('formula', formula)}${line('assumes', assumes)}${line('source', source)}<dd class="close"><button type="button" popovertarget="${termAnchor(id)}" popovertargetaction="hide">close</button></dd></div>`;
}

function line(label: string, text: string): Markup | null {
  return text === 'none' ? null : markup`<dd><span class="label">${label}</span> ${text}</dd>`;
}
