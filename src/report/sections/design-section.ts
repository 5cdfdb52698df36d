import type { DesignSheet } from '../design-sheet.js';
import { type Markup, markup } from '../markup.js';
import { shortName } from '../name-text.js';
import { groupedCount } from '../number-format.js';

/** A longer text would fill the page. */
const LONGEST_TEXT = 200_000;
const LONGEST_LINE = 400;

/** The file the drawing was made of, its dials, its text, and the cautions for what it uses. */
export function designSection({ design, cautions, version }: DesignSheet): Markup {
  const dials = Object.entries(design.dials).sort(([a], [b]) => (a < b ? -1 : 1));
  return markup`<section id="record"><h2>This drawing</h2><dl class="record">${item('File', shortName(design.file, LONGEST_LINE))}${item('SHA-256 of its text', markup`<code>${design.hash}</code>`)}${item(
    'Dials',
    dials.map(([name, text]) => `${shortName(name)} = ${shortName(text)}`).join(', ') || 'none',
  )}${item('Version', `stokeswell ${shortName(version, 30)}`)}</dl><h3 id="cautions">Cautions</h3>${
    cautions.length === 0
      ? markup`<p>None are held for what this design uses; follow your local codes all the same.</p>`
      : markup`<ul class="cautions">${cautions.map((text) => markup`<li>${shortName(text, 1000)}</li>`)}</ul>`
  }<h3>Design text</h3>${
    design.text.length > LONGEST_TEXT
      ? markup`<p class="note">Cut after ${groupedCount(LONGEST_TEXT)} characters.</p>`
      : null
  }<pre class="design-text" tabindex="0" aria-label="Design text">${design.text.slice(0, LONGEST_TEXT)}</pre></section>`;
}

function item(term: string, value: Markup | string): Markup {
  return markup`<div><dt>${term}</dt><dd>${value}</dd></div>`;
}
