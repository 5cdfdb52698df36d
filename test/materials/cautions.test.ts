/** Limits of laser classes after IEC 60825-1; flash points after the NIOSH Pocket Guide; wording is ours. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { cautionsFor } from '../../src/materials/cautions.js';
import { dyeNames, solventNames } from '../../src/materials/library.js';

const only = (hazards: Partial<Parameters<typeof cautionsFor>[0]>) =>
  cautionsFor({ pumpWatts: 0, solvents: [], dyes: [], ...hazards });

describe('cautionsFor', () => {
  test.each([
    [120, 'Laser pumps of 120 W are class 4'],
    [0.501, 'class 4'],
    [0.5, 'may be class 3B'],
    [0.006, 'may be class 3B'],
    [0.005, 'may be class 3R or lower'],
  ])('a pump of %f W', (pumpWatts, words) => {
    const [caution] = only({ pumpWatts });
    expect(caution).toContain(words);
  });

  test('flammable solvents give their flash point; methanol is a poison too', () => {
    expect(only({ solvents: ['ethanol'] })).toEqual([
      expect.stringMatching(/^Ethanol is flammable \(flash point 13 °C\)/),
    ]);
    expect(only({ solvents: ['methanol'] })).toEqual([
      expect.stringContaining('flash point 11 °C'),
      expect.stringContaining('poisonous'),
    ]);
    expect(only({ solvents: ['glycerol'] })).toEqual([
      expect.stringContaining('hotter than its flash point of 160 °C'),
    ]);
    expect(only({ solvents: ['water'] })).toEqual([]);
  });

  test('a liquid without figures is sent to its data sheet', () => {
    expect(only({ solvents: ['toluene'] })).toEqual([
      expect.stringContaining('held for toluene: read its safety data sheet'),
    ]);
    expect(only({ solvents: ['custom'] })).toEqual([expect.stringContaining('held for a liquid of your own')]);
  });

  test('rhodamines are named as toxic and staining', () => {
    expect(only({ dyes: ['rhodamine-6g', 'fluorescein'] })).toEqual([
      expect.stringMatching(/^Rhodamine-6g: toxic and staining/),
      expect.stringMatching(/^Fluorescein: read the safety data sheet/),
    ]);
  });

  test('a pumped liquid is warned of pressure; the same thing is said once', () => {
    const cautions = only({ pumpWatts: 60, solvents: ['ethanol', 'ethanol'], dyes: ['fluorescein', 'fluorescein'] });
    expect(cautions).toHaveLength(4);
    expect(cautions[2]).toContain('pressure');
  });

  test('nothing dangerous, nothing said', () => expect(only({})).toEqual([]));

  test('each is one short sentence that defers to local codes and licensed practice', () => {
    const some = (names: readonly string[]) => fc.subarray([...names]);
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 1e4, noNaN: true }),
        some(solventNames()),
        some(dyeNames()),
        (pumpWatts, solvents, dyes) => {
          for (const caution of cautionsFor({ pumpWatts, solvents, dyes })) {
            expect(caution).toMatch(/^[A-Z].*follow your local codes and licensed practice\.$/);
            expect(caution.length).toBeLessThan(330);
          }
        },
      ),
    );
  });

  test('a power that is none is refused', () => {
    for (const pumpWatts of [-1, Number.NaN, Number.POSITIVE_INFINITY])
      expect(() => only({ pumpWatts })).toThrow(RangeError);
  });
});
