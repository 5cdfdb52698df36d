/** What a word on the terminal or the page means, in four lines. */

/** Longest of the four lines, characters: with its label it fits 80 columns. */
export const LONGEST_LINE = 68;

export interface TermText {
  /** As the terminal and the page word it. */
  readonly name: string;
  /** Other words for it. */
  readonly also?: readonly string[];
  readonly means: string;
  /** As this program computes it. */
  readonly formula: string;
  readonly assumes: string;
  /** Standard or paper; 'from memory' where it was not read, 'common practice, no source' for a fact of the trade. */
  readonly source: string;
}

/** The four questions of a user, and what one must know to ask them. */
export const QUESTIONS = ['out', 'where', 'even', 'survive', 'design', 'run'] as const;
export type Question = (typeof QUESTIONS)[number];

export const QUESTION_WORDS: Readonly<Record<Question, string>> = {
  out: 'How much comes out?',
  where: 'Where did the rest go?',
  even: 'How even is it?',
  survive: 'Will it survive?',
  design: 'Words of a design',
  run: 'Words of a run and its checks',
};

export interface Term extends TermText {
  /** Unique; letters, digits and hyphens. */
  readonly id: string;
  readonly question: Question;
}

/** Texts by id, each with the question it belongs to. */
export function termsOf<Id extends string>(
  questionOf: (id: Id) => Question,
  texts: Readonly<Record<Id, TermText>>,
): readonly Term[] {
  const entries = Object.entries(texts) as [Id, TermText][];
  return entries.map(([id, text]) => ({ ...text, id, question: questionOf(id) }));
}
