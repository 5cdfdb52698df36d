import type { Description } from './description.js';

/** Whether a trace of this design carries the polarisation of light. */
export function carriesPolarisation({ defaults, pumps }: Description): boolean {
  if (defaults.polarisation !== null) return defaults.polarisation === 'carried';
  return pumps.some(({ polarised }) => polarised !== null);
}
