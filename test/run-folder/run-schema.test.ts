import { describe, expect, it } from 'vitest';
import { nameFiles } from '../../src/run-folder/file-names.js';
import { runJsonSchema, runRecordSchema } from '../../src/run-folder/run-schema.js';
import { sampleRecord } from '../cli/sample-record.js';
import { sampleRun } from './sample-run.js';

const { record } = sampleRun();
const accepts = (value: unknown) => runRecordSchema.safeParse(value).success;

describe('runRecordSchema', () => {
  it('accepts records, with file names or without', () => {
    expect(accepts(sampleRecord())).toBe(true);
    expect(runRecordSchema.parse(nameFiles(record))).toEqual(nameFiles(record));
  });

  it.each<[string, (of: typeof record) => unknown]>([
    ['another format', (of) => ({ ...of, format: 1 })],
    ['a figure short', ({ figures: { luminousFlux: _, ...figures }, ...of }) => ({ ...of, figures })],
    ['a figure that is text', (of) => ({ ...of, figures: { ...of.figures, luminousFlux: '12 lm' } })],
    [
      'a negative error',
      (of) => ({ ...of, figures: { ...of.figures, exitPower: { value: 1, standardError: -1, unit: 'W' } } }),
    ],
    [
      'a fate nobody knows',
      (of) => ({ ...of, ledger: { ...of.ledger, photons: [{ ...of.ledger.photons[0], fate: 'gone' }] } }),
    ],
    ['a ledger that does not close', (of) => ({ ...of, ledger: { ...of.ledger, watts: of.ledger.watts.slice(1) } })],
    ['a path for a file name', (of) => ({ ...of, angles: [{ ...of.angles[0], file: '../../secret' }] })],
    ['a hidden file', (of) => ({ ...of, maps: [{ ...of.maps[0], files: ['.profile'] }] })],
    [
      'a path among the pictures',
      (of) => ({ ...of, pictures: [{ id: 'flow', title: '', files: ['pictures/flow.svg'] }] }),
    ],
    ['a driver that creates power', (of) => ({ ...of, pumps: [{ ...of.pumps[0], driverEfficiency: 1.1 }] })],
    ['a curve of an unknown kind', (of) => ({ ...of, curves: [{ ...of.curves[0], what: 'smell' }] })],
    ['a map of too few axes', (of) => ({ ...of, maps: [{ ...of.maps[0], axes: ['u'] }] })],
    ['a broken hash', (of) => ({ ...of, design: { ...of.design, hash: 'abc' } })],
    ['a time that is none', (of) => ({ ...of, run: { ...of.run, startedAt: 'yesterday' } })],
    ['half a history', (of) => ({ ...of, run: { ...of.run, histories: 0.5 } })],
  ])('refuses %s', (_, spoil) => {
    expect(accepts(record)).toBe(true);
    expect(accepts(spoil(record))).toBe(false);
  });
});

describe('runJsonSchema', () => {
  it('is draft-07, asks for what the record always holds, and allows keys to come', () => {
    const schema = runJsonSchema();
    expect(schema).toMatchObject({
      $schema: 'http://json-schema.org/draft-07/schema#',
      type: 'object',
      properties: { format: { const: 3 }, ledger: { type: 'object' } },
    });
    expect(schema).toHaveProperty('required', Object.keys(record));
    expect(schema).not.toHaveProperty('additionalProperties');
    expect(schema).toHaveProperty('properties.figures.propertyNames.enum', Object.keys(record.figures));
  });
});
