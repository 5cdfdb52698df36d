import type { Description } from '../design/description.js';
import type { Fault } from '../design/fault.js';

/** Light born in the open would belong to no part, and an endless medium has no map. */
export function surroundingFaults({ media, surroundings }: Description): Fault[] {
  const dyes = media.get(surroundings)?.dyes ?? [];
  if (dyes.length === 0) return [];
  return [
    {
      code: 'geometry',
      severity: 'error',
      path: ['surroundings'],
      problem: 'the surroundings may hold no dye',
      found: `${dyes.map(({ name }) => name).join(', ')} in ${surroundings}`,
      suggestion: 'put the dyed liquid into a part as large as its vessel',
    },
  ];
}
