/** The same cell, banks and power with a good and a poor spread of the pump. */
import { beforeAll, describe, expect, test } from 'vitest';
import { mapEvenness } from '../../src/outcome/map-evenness.js';
import { peakDensity } from '../../src/outcome/peak-density.js';
import type { TraceResult } from '../../src/trace/trace-result.js';
import { field, gap, traceShipped } from './shipped.js';

const HISTORIES = 65_536;
const SEED = 'spread';

describe(`two-bank-even-spread and two-bank-poor-spread, seed ${SEED}`, () => {
  let even: TraceResult;
  let poor: TraceResult;
  beforeAll(async () => {
    even = await traceShipped('two-bank-even-spread', HISTORIES, SEED);
    poor = await traceShipped('two-bank-poor-spread', HISTORIES, SEED);
  });

  test('have the same cell, media, banks and power', () => {
    const { parts, media, pumps } = poor.description;
    expect(even.description.parts.slice(0, 2)).toEqual(parts);
    expect([...media.keys()].every((name) => even.description.media.has(name))).toBe(true);
    const bank = ({ pumps: all }: TraceResult['description']) =>
      all.map(({ power, wavelengthNm, beam }) => [
        power,
        wavelengthNm,
        beam.kind === 'diodes' && { ...beam, lens: null },
      ]);
    expect(bank(even.description)).toEqual(bank(poor.description));
    expect(pumps.map(({ power }) => power)).toEqual([60, 60]);
  });

  test.each(['cell.front', 'cell.back'])('the good spread makes %s more even by 4 standard errors', (face) => {
    const [good, bad] = [even, poor].map((run) => mapEvenness(field(run, 'pumped-face', face))?.variation);
    if (!good || !bad) throw new Error('no variation');
    expect(gap(bad, good)).toBeGreaterThan(4);
  });

  test('the good spread has the lower peak of absorbed power by 4 standard errors', () => {
    const [good, bad] = [even, poor].map((run) => peakDensity(field(run, 'absorbed-pump')));
    const known = ({ value, standardError }: typeof good) => ({ value, standardError: standardError ?? Number.NaN });
    expect(gap(known(bad), known(good))).toBeGreaterThan(4);
  });

  test('neither peak is below the mean of the liquid, nor above what the brightest spot can give', () => {
    for (const run of [even, poor]) {
      const liquid = field(run, 'absorbed-pump');
      const volume = liquid.map.measure.reduce((a, b) => a + b, 0) * 1e-3;
      const { value, standardError } = peakDensity(liquid);
      expect(value).toBeGreaterThan(liquid.power / volume);
      // Beer–Lambert: dI/dz ≤ μ I; both banks together at their brightest, the far one undimmed.
      const bath = run.description.media.get('bath');
      const perCm = 10 * (bath?.dyes[0].absorption(445) ?? Number.NaN);
      const brightest = ['cell.front', 'cell.back'].map((face) => {
        const map = field(run, 'pumped-face', face);
        return Math.max(...map.values.filter((irradiance) => !Number.isNaN(irradiance)));
      });
      expect(value - 4 * (standardError ?? 0)).toBeLessThan(perCm * (brightest[0] + brightest[1]));
    }
  });
});
