/** A form for a place where a single value, a list or a map may stand, each with its own meaning. */
import { isMap, isSeq } from 'yaml';
import type { Form } from './form.js';
import { describeNode } from './reading.js';

export interface Alternatives<T> {
  readonly scalar?: Form<T>;
  readonly list?: Form<T>;
  readonly map?: Form<T>;
}

export const either = <T>({ scalar, list, map }: Alternatives<T>): Form<T> => {
  const forms = [scalar, list, map].filter((form) => form !== undefined);
  const expects = forms.map((form) => form.expects).join(', or ');
  return {
    expects,
    blank: forms[0].blank,
    schema: { anyOf: forms.map(({ schema }) => schema) },
    read(place, reading) {
      const { node, path } = place;
      if (node === null) return forms[0].blank();
      const form = isSeq(node) ? list : isMap(node) ? map : scalar;
      if (form === undefined) {
        const problem = 'this cannot stand here';
        reading.report({ code: 'type', path, problem, found: describeNode(node), expected: expects });
        return forms[0].blank();
      }
      return form.read(place, reading);
    },
  };
};

/** The same form with its value turned into another. */
export const mapped = <T, U>(form: Form<T>, turn: (value: T) => U): Form<U> => ({
  expects: form.expects,
  schema: form.schema,
  blank: () => turn(form.blank()),
  read: (place, reading) => turn(form.read(place, reading)),
});
