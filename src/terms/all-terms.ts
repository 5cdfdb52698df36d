/** The one table of terms: `stokeswell explain`, the marks of the page and the glossary of README read it. */
import { DESIGN_TERMS } from './design-terms.js';
import { FATE_TERMS } from './fate-terms.js';
import { FAULT_TERMS } from './fault-terms.js';
import { FIGURE_TERMS } from './figure-terms.js';
import { LIGHT_TERMS } from './light-terms.js';
import { PICTURE_TERMS } from './picture-terms.js';
import { RUN_TERMS } from './run-terms.js';
import { QUESTIONS, type Term } from './term.js';

const EVERY = [
  ...FIGURE_TERMS,
  ...FATE_TERMS,
  ...PICTURE_TERMS,
  ...LIGHT_TERMS,
  ...DESIGN_TERMS,
  ...RUN_TERMS,
  ...FAULT_TERMS,
];

/** In the order of the questions. */
export const TERMS: readonly Term[] = QUESTIONS.flatMap((question) =>
  EVERY.filter((term) => term.question === question),
);

const BY_ID: ReadonlyMap<string, Term> = new Map(TERMS.map((term) => [term.id, term]));

export const termById = (id: string): Term | undefined => BY_ID.get(id);
