/** Forms of lists. */
import { isSeq } from 'yaml';
import type { Form, JsonSchema } from './form.js';
import { describeNode, type Place, type Reading } from './reading.js';

/** A list of `least` to `most` like items. */
export const listOf = <T>(item: Form<T>, expects: string, least: number, most: number): Form<readonly T[]> => ({
  expects,
  blank: () => [],
  schema: { type: 'array', items: item.schema, minItems: least, maxItems: most },
  read: (place, reading) => readItems(place, reading, expects, least, most).map((each) => item.read(each, reading)),
});

/** A list of exactly these items, e.g. [a length, a length]. */
export const tuple = <T extends readonly unknown[]>(
  expects: string,
  ...items: { readonly [K in keyof T]: Form<T[K]> }
): Form<T> => {
  const forms: readonly Form<unknown>[] = items;
  return {
    expects,
    blank: () => forms.map((form) => form.blank()) as unknown as T,
    schema: tupleSchema(forms),
    read(place, reading) {
      const places = readItems(place, reading, expects, forms.length, forms.length);
      const complete = places.length === forms.length;
      return forms.map((form, i) => (complete ? form.read(places[i], reading) : form.blank())) as unknown as T;
    },
  };
};

export const pair = <T>(item: Form<T>, expects: string): Form<readonly [T, T]> => tuple<[T, T]>(expects, item, item);

export const triple = <T>(item: Form<T>, expects: string): Form<readonly [T, T, T]> =>
  tuple<[T, T, T]>(expects, item, item, item);

function tupleSchema(forms: readonly Form<unknown>[]): JsonSchema {
  const items = forms.map(({ schema }) => schema);
  return { type: 'array', items, minItems: items.length, maxItems: items.length };
}

function readItems(place: Place, reading: Reading, expected: string, least: number, most: number): Place[] {
  const { node, path } = place;
  if (node === null) return [];
  if (!isSeq(node)) {
    reading.report({ code: 'type', path, problem: 'a list is needed here', found: describeNode(node), expected });
    return [];
  }
  const length = node.items.length;
  if (length < least || length > most) {
    const found = `a list of ${length}`;
    reading.report({ code: 'type', path, problem: 'the list has the wrong length', found, expected });
    return [];
  }
  return node.items.map((item, i) => reading.place(item, [...path, i]));
}
