import type { RunRecord } from '../../record/run-record.js';
import { termOfFault } from '../../terms/fault-terms.js';
import { type Markup, markup } from '../markup.js';
import { shortName } from '../name-text.js';
import { termMark } from '../term-mark.js';

const LONGEST = 400;

/** What the tool would warn a colleague about. */
export function checksSection({ checks }: Pick<RunRecord, 'checks'>): Markup | null {
  if (checks.length === 0) return null;
  return markup`<section id="checks"><h2>Checks${termMark('check')}</h2><ul class="checks">${checks.map(
    ({ code, severity, path, problem, found, expected, suggestion }) =>
      markup`<li><b>${severity}</b>${path.length > 0 ? markup` <code>${shortName(path.join('.'), LONGEST)}</code>` : null} ${shortName(problem, LONGEST)}${termMark(termOfFault({ code, severity, problem }))}${clause('found', found)}${clause('expected', expected)}${clause('next', suggestion)}</li>`,
  )}</ul></section>`;
}

function clause(word: string, text: string | undefined): Markup | null {
  return text === undefined ? null : markup`; ${word}: ${shortName(text, LONGEST)}`;
}
