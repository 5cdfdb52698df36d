/**
 * Stands in for a solvent in which a dye was not measured. Shifts of spectra follow the polarity of the solvent
 * (Lippert 1957), so the measured solvent of nearest static relative permittivity is taken, compared by ratio.
 * Values at 20–25 °C from memory of handbook tables, good to a few percent: enough to rank.
 */
const RELATIVE_PERMITTIVITY: Readonly<Record<string, number>> = {
  water: 78.4,
  'propylene-carbonate': 66,
  glycerol: 46.5,
  'ethylene-glycol': 41.4,
  methanol: 33,
  'propylene-glycol': 28,
  ethanol: 24.9,
  pmma: 3.5,
  polycarbonate: 2.9,
  toluene: 2.4,
};

/** The member of `measured` nearest to `solvent`; the first one when nothing is known. `measured` is not empty. */
export function nearestSolvent(solvent: string, measured: readonly string[]): string {
  const wanted = RELATIVE_PERMITTIVITY[solvent];
  if (wanted === undefined) return measured[0];
  const distance = (name: string): number => {
    const value = RELATIVE_PERMITTIVITY[name];
    return value === undefined ? Number.POSITIVE_INFINITY : Math.abs(Math.log(value / wanted));
  };
  return measured.reduce((best, name) => (distance(name) < distance(best) ? name : best), measured[0]);
}
