/** One line for a fault: `file:line:column: path.to.field — problem; found X; expected Y. Did you mean Z?` */
import type { DesignPath, LocatedFault } from './fault.js';

const LONGEST_FOUND = 80;

export function formatFault(fault: LocatedFault): string {
  const { file, line, column, path, severity, problem, found, expected, suggestion } = fault;
  const subject = [severity === 'warning' ? 'warning' : '', formatPath(path)].filter((word) => word !== '').join(': ');
  const clauses = [problem];
  if (found !== undefined) clauses.push(`found ${shorten(found)}`);
  if (expected !== undefined) clauses.push(`expected ${expected}`);
  const told = `${subject === '' ? '' : `${subject} — `}${clauses.join('; ')}.`;
  return visible(
    `${file}:${line}:${column}: ${told}${suggestion === undefined ? '' : ` ${formatSuggestion(suggestion)}`}`,
  );
}

/** Keys joined by dots, places in lists counted from 1: 'parts.cell.box#2'. */
export const formatPath = (path: DesignPath): string =>
  path.map((step, i) => (typeof step === 'number' ? `#${step + 1}` : `${i === 0 ? '' : '.'}${step}`)).join('');

/** A name is offered, a step is told. */
function formatSuggestion(suggestion: string): string {
  if (!/\s/.test(suggestion)) return `Did you mean ${suggestion}?`;
  return `${suggestion[0].toUpperCase()}${suggestion.slice(1)}.`;
}

const shorten = (text: string): string => {
  const characters = [...text];
  return characters.length <= LONGEST_FOUND ? text : `${characters.slice(0, LONGEST_FOUND - 1).join('')}…`;
};

/** Control characters and those that turn the direction of writing would act on the terminal: shown as code points. */
const visible = (text: string): string =>
  text.replace(/[\p{Cc}\u061C\u200E\u200F\u2028-\u202E\u2066-\u2069]/gu, (character) => {
    const code = character.codePointAt(0) ?? 0;
    return `\\u{${code.toString(16)}}`;
  });
