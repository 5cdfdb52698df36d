/** How evenly the exit is lit, as headline figures. */
import type { Figure } from '../record/run-record.js';
import { mapEvenness } from './map-evenness.js';
import { hasMeasure, type MapField } from './map-field.js';

type EvennessFigureName =
  | 'exitUniformityVariation'
  | 'exitUniformityMinOverMean'
  | 'exitFlatness'
  | 'exitBeamUniformity';

/** @param dark why there is nothing to judge when no light left by the exit, else undefined. */
export function evennessFigures(
  fields: readonly MapField[],
  dark: string | undefined,
): Record<EvennessFigureName, Figure> {
  const exit = fields.find((field) => field.map.what === 'exit' && hasMeasure(field));
  const evenness = exit === undefined ? null : mapEvenness(exit);
  const figure = (value: number | null, note: string): Figure => ({ value, standardError: null, unit: '', note });
  if (evenness === null) {
    const why = exit === undefined ? 'no map of the exit' : 'no light on whole cells of the exit';
    const nothing = figure(null, dark ?? why);
    return {
      exitUniformityVariation: nothing,
      exitUniformityMinOverMean: nothing,
      exitFlatness: nothing,
      exitBeamUniformity: nothing,
    };
  }
  const { variation, minOverMean, flatness, uniformity, note } = evenness;
  return {
    exitUniformityVariation:
      variation === null
        ? figure(null, 'too few histories to take the noise out')
        : {
            value: variation.value,
            standardError: variation.standardError,
            unit: '',
            note: `coefficient of variation, noise taken out${variation.resolved ? '' : '; not told from even'}`,
          },
    exitUniformityMinOverMean: figure(minOverMean, note),
    exitFlatness: figure(flatness, `ISO 13694 at 10 %, ${note}`),
    exitBeamUniformity: figure(uniformity, `ISO 13694 at 10 %, ${note}`),
  };
}
