/** Forms of single values: texts, words of a list, names that refer to something. */
import { nearestName } from '../units/nearest-name.js';
import type { DesignPath } from './fault.js';
import type { Form } from './form.js';

/** A name with the place where it is used. An empty name is one that could not be read. */
export interface Reference {
  readonly name: string;
  readonly path: DesignPath;
}

/** Free text; plain numbers are taken as they are written. */
export const freeText = (expects: string, longest: number): Form<string> => ({
  expects,
  blank: () => '',
  schema: { type: ['string', 'number'], maxLength: longest },
  read(place, reading) {
    const text = reading.text(place, expects);
    if (text === null) return '';
    if (text.length > longest) {
      const problem = `the text is longer than ${longest} characters`;
      reading.report({
        code: 'range',
        path: place.path,
        problem,
        found: `${text.length} characters`,
        expected: expects,
      });
    }
    return text;
  },
});

/** One word of a closed list. */
export const oneWord = <W extends string>(...words: readonly W[]): Form<W> => {
  const expects = `one of ${words.join(', ')}`;
  return {
    expects,
    blank: () => words[0],
    schema: { enum: words },
    read(place, reading) {
      const text = reading.text(place, expects);
      const word = words.find((each) => each === text);
      if (text !== null && word === undefined) {
        const nearest = nearestName(text, words);
        const hint = nearest === null ? {} : { suggestion: nearest };
        const problem = 'this word is not known here';
        reading.report({ code: 'unknown-name', path: place.path, problem, found: text, expected: expects, ...hint });
      }
      return word ?? words[0];
    },
  };
};

/** The name of a thing declared elsewhere; whether it exists is checked once everything is read. */
export const reference = (expects: string, examples: readonly string[]): Form<Reference> => ({
  expects,
  blank: () => ({ name: '', path: [] }),
  schema: { type: 'string', examples },
  read: (place, reading) => ({ name: reading.text(place, expects) ?? '', path: place.path }),
});
