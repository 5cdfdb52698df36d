import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { parse } from 'yaml';
import { z } from 'zod';
import { designJsonSchema, designSchemaText } from '../../src/design/design-schema.js';
import { starterDesign } from '../../src/design/starter-design.js';

type Schema = Readonly<Record<string, unknown>>;
const isSchema = (value: unknown): value is Schema =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** Every `properties` table of the schema with its path. */
function* fieldsOf(schema: unknown, path = ''): Generator<readonly [string, Schema]> {
  if (Array.isArray(schema)) for (const [i, item] of schema.entries()) yield* fieldsOf(item, `${path}/${i}`);
  if (!isSchema(schema)) return;
  for (const [key, value] of Object.entries(schema)) {
    if (key === 'properties' && isSchema(value)) {
      for (const [name, field] of Object.entries(value)) if (isSchema(field)) yield [`${path}/${name}`, field];
    }
    yield* fieldsOf(value, `${path}/${key}`);
  }
}

test('the schema in the repository is current (npx stokeswell schema design > geometries/design.schema.json)', () => {
  expect(readFileSync(new URL('../../geometries/design.schema.json', import.meta.url), 'utf8')).toBe(
    designSchemaText(),
  );
});

test('every field is described', () => {
  const fields = [...fieldsOf(designJsonSchema())];
  expect(fields.length).toBeGreaterThan(100);
  for (const [path, field] of fields) expect([path, typeof field.description]).toEqual([path, 'string']);
});

test('patterns are regular expressions without flags: quantities with units need a unit or a dial', () => {
  for (const [, { pattern }] of fieldsOf(designJsonSchema())) {
    if (typeof pattern !== 'string') continue;
    const expression = new RegExp(pattern);
    for (const text of ['60 W', 'depth / 2', '5 °', '5°', '95 %']) expect(expression.test(text)).toBe(true);
    for (const text of ['60', '1.5', '(2 + 3)']) expect(expression.test(text)).toBe(false);
  }
});

test('unknown keys are refused, required ones asked for, at the top and below', () => {
  const schema = designJsonSchema();
  expect(schema).toMatchObject({
    $schema: 'http://json-schema.org/draft-07/schema#',
    additionalProperties: false,
    required: ['design', 'parts', 'pumps', 'exit'],
  });
  expect(schema).toHaveProperty('properties.parts.additionalProperties.additionalProperties', false);
});

describe('as another implementation reads it (zod, fromJSONSchema)', () => {
  // It passes over a bare `required`, by which the schema says that exactly one of some fields is given; so without those.
  const withoutChoices = JSON.parse(
    JSON.stringify(designJsonSchema(), (key, value: unknown) => (key === 'allOf' ? undefined : value)),
  );
  const validator = z.fromJSONSchema(withoutChoices);
  const accepts = (text: string) => validator.safeParse(parse(text)).success;

  test('accepts the starter design', () => {
    expect(validator.safeParse(parse(starterDesign())).error?.issues ?? []).toEqual([]);
  });

  test.each([
    ['power: bank-power', 'power: 60'],
    ['power: bank-power', 'powre: 60 W'],
    ['passes: below', 'passes: belo'],
    ['[20 mm, 8 mm, 1 mm]', '[20 mm, 8 mm]'],
    ['exit: lid.top', ''],
  ])('underlines %s → %s', (from, to) => {
    expect(accepts(starterDesign().replace(from, to))).toBe(false);
  });
});

test('a choice of fields is written as exactly one of several requirements', () => {
  expect(designJsonSchema()).toMatchObject({
    properties: {
      detectors: {
        additionalProperties: {
          allOf: [{ oneOf: [{ required: ['face'] }, { required: ['plane'] }, { required: ['sphere'] }] }],
        },
      },
    },
  });
});
