import { describe, expect, test } from 'vitest';
import type { Figure, FigureName } from '../../src/record/run-record.js';
import { durationWords, survivalVerdicts } from '../../src/terms/survival-words.js';
import { sampleRecord } from '../cli/sample-record.js';

const withValues = (values: Partial<Record<FigureName, number | null>>): Record<FigureName, Figure> => {
  const figures = { ...sampleRecord().figures };
  for (const [name, value] of Object.entries(values) as [FigureName, number | null][]) {
    figures[name] = { value, standardError: null, unit: '' };
  }
  return figures;
};
const words = (values: Partial<Record<FigureName, number | null>>) =>
  survivalVerdicts(withValues(values)).map((verdict) => `${verdict.alarm ? '!' : ''}${verdict.words}`);

describe('verdicts', () => {
  test('a weak pump is far from everything', () => {
    expect(words({ depletedAbsorption: 3e-5, gainOverLongestPath: 0, timeToBleach: 1e6 })).toEqual([
      'far from saturation: 0.003 % of the absorption is lost to it',
      'no net gain, so no amplified spontaneous emission',
      'a tenth of the dye is bleached after 12 days with the liquid of the cell alone',
    ]);
  });

  test('what is near is an alarm', () => {
    expect(
      words({ depletedAbsorption: 0.25, gainOverLongestPath: 2, timeToBleach: 3, timeToBleachWithReservoir: 40_000 }),
    ).toEqual([
      '!the dye saturates: 25 % of its absorption is lost',
      '!amplified spontaneous emission is to be expected, which is not traced',
      '!a tenth of the dye is bleached after 3 s with the liquid of the cell alone',
      'a tenth of the dye is bleached after 11 h with the reservoir',
    ]);
    // exp(0.5) − 1 = 0.6487.
    expect(words({ gainOverLongestPath: 0.5 })[1]).toContain('by up to 65 %');
  });

  test('nothing is said of what is not known', () => {
    expect(words({ depletedAbsorption: null, gainOverLongestPath: null, timeToBleach: null })).toEqual([]);
  });

  test.each([
    [0.00062, '0.00062 s'],
    [89, '89 s'],
    [90, '1.5 min'],
    [5400, '1.5 h'],
    [1e5, '28 h'],
    [4e8, '13 years'],
  ])('%d s', (seconds, told) => expect(durationWords(seconds)).toBe(told));
});
