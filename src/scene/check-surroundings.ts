import type { Description } from '../design/description.js';
import type { Fault } from '../design/fault.js';

/** Light born in the open would belong to no part, and an endless medium has no map and lets no scattered light go. */
export function surroundingFaults({ media, surroundings }: Description): Fault[] {
  const { dyes = [], scatterers = [] } = media.get(surroundings) ?? {};
  const faults: Fault[] = [];
  if (scatterers.length > 0) {
    faults.push({
      code: 'geometry',
      severity: 'error',
      path: ['surroundings'],
      problem: 'the surroundings may not scatter: light would wander in them for ever',
      found: `${scatterers.map(({ name }) => name).join(', ')} in ${surroundings}`,
      suggestion: 'put the scattering medium into a part',
    });
  }
  if (dyes.length === 0) return faults;
  return [
    ...faults,
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
