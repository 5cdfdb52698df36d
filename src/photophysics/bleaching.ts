/**
 * Share of the molecules left after a time when each absorption destroys one with probability `bleachYield`:
 * dN/dt = −Y r N, so exp(−Y r t). The law: photochemical first-order decay; Eggeling, Widengren, Rigler & Seidel, Anal. Chem. 70 (1998) 2651.
 * @param absorptionsPerSecond r, photons absorbed per molecule and second, of all molecules that share the dose: those in a reservoir count too
 */
export function shareLeft(bleachYield: number, absorptionsPerSecond: number, seconds: number): number {
  return Math.exp(-bleachYield * absorptionsPerSecond * seconds);
}

/** Seconds until a share is destroyed, the inverse of `shareLeft`; Infinity where nothing bleaches. */
export function timeToLose(share: number, bleachYield: number, absorptionsPerSecond: number): number {
  return -Math.log1p(-share) / (bleachYield * absorptionsPerSecond);
}

/** Photons a molecule absorbs until a share of all is destroyed; Infinity where nothing bleaches. */
export function doseToLose(share: number, bleachYield: number): number {
  return -Math.log1p(-share) / bleachYield;
}
