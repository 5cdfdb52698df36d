/** Forms of maps: with a fixed table of fields, or from names of the user's own to like values. */
import { isMap } from 'yaml';
import { nearestName } from '../units/nearest-name.js';
import { type Entry, entriesOf, startOf } from './design-source.js';
import type { DesignPath } from './fault.js';
import type { Field, FieldValue, Form, JsonSchema } from './form.js';
import { describeNode, type Place, type Reading } from './reading.js';

export type FieldTable = Readonly<Record<string, Field<unknown>>>;
export type RecordValue<F extends FieldTable> = { readonly [K in keyof F]: FieldValue<F[K]> } & {
  readonly path: DesignPath;
};

export interface RecordRules<F extends FieldTable> {
  /** Groups of fields of which exactly one must be given. */
  readonly exactlyOne?: readonly (readonly (keyof F & string)[])[];
}

/** A map with the fields of a table. */
export function record<F extends FieldTable>(
  expects: string,
  fields: F,
  rules: RecordRules<F> = {},
): Form<RecordValue<F>> {
  const groups = rules.exactlyOne ?? [];
  const blank = (path: DesignPath) =>
    ({
      ...Object.fromEntries(Object.entries(fields).map(([name, field]) => [name, field.absent()])),
      path,
    }) as RecordValue<F>;
  return {
    expects,
    blank: () => blank([]),
    schema: recordSchema(fields, groups),
    read(place, reading) {
      const entries = readEntries(place, reading, expects);
      if (entries === null) return blank(place.path);
      const values: Record<string, unknown> = blank(place.path);
      const given = new Set<string>();
      for (const { key, name, value } of entries) {
        const path = [...place.path, name];
        if (!Object.hasOwn(fields, name)) {
          reportUnknownKey(name, path, startOf(key), Object.keys(fields), reading);
          continue;
        }
        given.add(name);
        values[name] = fields[name].form.read(reading.place(value, path), reading);
      }
      reportAbsent(fields, groups, given, place.path, reading);
      return values as RecordValue<F>;
    },
  };
}

/** A value under a name of the user's own, in file order. */
export interface Named<T> {
  readonly name: string;
  readonly path: DesignPath;
  readonly value: T;
}

const NAME = /^[\p{L}_](?:-?[\p{L}\p{N}_])*$/u;
const LONGEST_NAME = 60;
const MOST_ENTRIES = 1000;

/** A map from names to like values. `reserved` names are taken; each maps to the reason. */
export function mapOf<T>(
  expects: string,
  item: Form<T>,
  reserved: ReadonlyMap<string, string> = new Map(),
  plainNames = true,
): Form<readonly Named<T>[]> {
  return {
    expects,
    blank: () => [],
    schema: { type: 'object', additionalProperties: item.schema },
    read(place, reading) {
      const entries = readEntries(place, reading, expects) ?? [];
      if (entries.length > MOST_ENTRIES) {
        const problem = 'the section has too many entries';
        const found = `${entries.length} entries`;
        reading.report({ code: 'range', path: place.path, problem, found, expected: `at most ${MOST_ENTRIES}` });
      }
      return entries.slice(0, MOST_ENTRIES).map(({ key, name, value }) => {
        const path = [...place.path, name];
        if (plainNames) checkName(name, path, startOf(key), reserved, reading);
        return { name, path, value: item.read(reading.place(value, path), reading) };
      });
    },
  };
}

/** Names are used in arithmetic, in 'part.face' and in file names: letters, digits, '_' and inner hyphens only. */
export function checkName(
  name: string,
  path: DesignPath,
  offset: number | null,
  reserved: ReadonlyMap<string, string>,
  reading: Reading,
): void {
  const taken = reserved.get(name);
  const shaped = NAME.test(name) && name.length <= LONGEST_NAME;
  if (shaped && taken === undefined) return;
  const problem = taken ?? 'this cannot be a name';
  const expected = `letters, digits, hyphens between them, at most ${LONGEST_NAME}, a letter first`;
  reading.report({ code: 'type', path, problem, found: name, expected: taken ? 'another name' : expected }, offset);
}

function readEntries({ node, path }: Place, reading: Reading, expected: string): Entry[] | null {
  if (node === null) return null;
  if (!isMap(node)) {
    const problem = 'keys with values are needed here';
    reading.report({ code: 'type', path, problem, found: describeNode(node), expected });
    return null;
  }
  const { entries, duplicates, misfits } = entriesOf(node, reading.source);
  for (const { key, name } of duplicates) {
    const first = entries.find((entry) => entry.name === name);
    const line = reading.source.position(first ? startOf(first.key) : 0).line;
    const problem = `the key stands here a second time; the first is in line ${line}`;
    reading.report(
      { code: 'yaml', path: [...path, name], problem, found: name, expected: 'each key once' },
      startOf(key),
    );
  }
  for (const misfit of misfits) {
    const problem = 'this can be neither a key nor a lender of keys';
    reading.report(
      { code: 'yaml', path, problem, found: describeNode(misfit), expected: 'a plain name' },
      startOf(misfit),
    );
  }
  return entries;
}

function reportUnknownKey(
  name: string,
  path: DesignPath,
  offset: number,
  names: readonly string[],
  reading: Reading,
): void {
  const nearest = reading.full ? null : nearestName(name, names);
  reading.report(
    {
      code: 'unknown-key',
      path,
      problem: 'no such field here',
      found: name,
      expected: `one of ${names.join(', ')}`,
      ...(nearest === null ? {} : { suggestion: nearest }),
    },
    offset,
  );
}

function reportAbsent(
  fields: FieldTable,
  groups: readonly (readonly string[])[],
  given: ReadonlySet<string>,
  path: DesignPath,
  reading: Reading,
): void {
  for (const [name, { required, form }] of Object.entries(fields)) {
    if (required && !given.has(name)) {
      const problem = 'a required field is missing';
      reading.report({ code: 'missing', path: [...path, name], problem, expected: form.expects });
    }
  }
  for (const group of groups) {
    const chosen = group.filter((name) => given.has(name));
    if (chosen.length === 0) {
      reading.report({
        code: 'missing',
        path,
        problem: 'a required field is missing',
        expected: `one of ${group.join(', ')}`,
      });
    }
    for (const extra of chosen.slice(1)) {
      const problem = `${chosen[0]} and ${extra} exclude each other`;
      reading.report({ code: 'type', path: [...path, extra], problem, expected: `one of ${group.join(', ')}` });
    }
  }
}

function recordSchema(fields: FieldTable, groups: readonly (readonly string[])[]): JsonSchema {
  const properties = Object.fromEntries(
    Object.entries(fields).map(([name, { form, help, written }]) => {
      const description = written === null ? help : `${help} Default: ${written}.`;
      return [name, { ...form.schema, description }];
    }),
  );
  const needed = Object.keys(fields).filter((name) => fields[name].required);
  const choices = groups.map((group) => ({ oneOf: group.map((name) => ({ required: [name] })) }));
  return {
    type: 'object',
    properties,
    additionalProperties: false,
    ...(needed.length === 0 ? {} : { required: needed }),
    ...(choices.length === 0 ? {} : { allOf: choices }),
  };
}
