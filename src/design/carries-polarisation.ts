import type { Description } from './description.js';

/** Whether a trace of this design carries the polarisation of light. */
export function carriesPolarisation({ defaults, pumps }: Description): boolean {
  const { polarisation = null } = defaults;
  if (polarisation !== null) return polarisation === 'carried';
  return pumps.some(({ polarised = null }) => polarised !== null);
}
