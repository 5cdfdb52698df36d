import { TERMS } from '../../terms/all-terms.js';
import { glossaryMarkdown } from '../../terms/glossary.js';
import { QUESTION_WORDS, QUESTIONS, type Term } from '../../terms/term.js';
import { CommandFault } from '../command-fault.js';
import { EXIT, type ExitCode } from '../exit-codes.js';
import { findTerm } from '../find-term.js';
import { breakLine, labelled } from '../ledger/labelled.js';
import { print } from '../output-stream.js';
import { safeText } from '../safe-text.js';
import { fitToStyle, styleFor, type TerminalStyle } from '../terminal-style.js';

export interface ExplainOptions {
  readonly json?: boolean;
  readonly markdown?: boolean;
}

const WIDTH = 78;

/** `stokeswell explain [TERM]`: what a word means, its formula, what it assumes, its source; without one, all words. */
export function explainCommand(words: readonly string[], { json, markdown }: ExplainOptions): ExitCode {
  const style = styleFor(process.stdout.isTTY === true, process.env);
  if (markdown) {
    print(glossaryMarkdown());
  } else if (words.length === 0) {
    print(json ? toJson(TERMS) : fitToStyle(`${showList(style).join('\n')}\n`, style));
  } else {
    const term = lookUp(words.join(' '));
    print(json ? toJson(term) : fitToStyle(`${showTerm(term, style).join('\n')}\n`, style));
  }
  return EXIT.ok;
}

const toJson = (value: Term | readonly Term[]): string => `${JSON.stringify(value, null, 2)}\n`;

function lookUp(written: string): Term {
  const answer = findTerm(written);
  if (answer.found) return answer.term;
  const nearest = answer.nearest.map((name) => `  ${name}\n`).join('');
  const meant = answer.nearest.length > 1 ? 'It may be one of these:' : 'Did you mean:';
  throw new CommandFault(
    EXIT.fault,
    `No term is called "${safeText(written, 60)}". ${nearest === '' ? '' : `${meant}\n${nearest}`}stokeswell explain lists them all.`,
  );
}

function showTerm({ name, means, formula, assumes, source, id, also = [] }: Term, style: TerminalStyle): string[] {
  const other = [...new Set([id, ...also])].filter((word) => word !== name).join(', ');
  const heading = breakLine(fitToStyle(`${name} (${other})`, style), WIDTH + 2);
  return [
    ...heading.map((line, i) =>
      i === 0 ? style.bold(line.slice(0, name.length)) + style.dim(line.slice(name.length)) : style.dim(line),
    ),
    ...labelled('  means', [means], style),
    ...labelled('  formula', [formula], style),
    ...labelled('  assumes', [assumes], style),
    ...labelled('  source', [source], style),
  ];
}

function showList(style: TerminalStyle): string[] {
  const groups = QUESTIONS.flatMap((question) => {
    const names = TERMS.filter((term) => term.question === question).map(({ name }) => name);
    const lines = breakLine(fitToStyle(names.join(', '), style), WIDTH);
    return [style.bold(QUESTION_WORDS[question]), ...lines.map((line) => `  ${line.trimStart()}`), ''];
  });
  return [...groups, 'stokeswell explain TERM says what one means.'];
}
