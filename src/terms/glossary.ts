/** The glossary of README: one line a term, in the order of the questions. */
import { TERMS } from './all-terms.js';
import { QUESTION_WORDS, QUESTIONS } from './term.js';

export function glossaryMarkdown(): string {
  const parts = QUESTIONS.map((question) => {
    const lines = TERMS.filter((term) => term.question === question).map(
      ({ name, means }) => `- **${name}**: ${means}`,
    );
    return `**${QUESTION_WORDS[question]}**\n\n${lines.join('\n')}\n`;
  });
  return parts.join('\n');
}
