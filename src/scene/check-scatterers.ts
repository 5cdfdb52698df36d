/** Whether the scatterers of a design can be believed, and traced in a sensible time. */
import type { Description, MediumDescription, ScattererDescription } from '../design/description.js';
import type { Fault } from '../design/fault.js';
import { scatteringAt } from './scattering-at.js';

/** Beads closer than at this share of the volume scatter together, not each for itself (common practice, no source). */
const CLOSE = 0.05;
/** So many transport mean free paths along the design make very long histories. */
const DEEP = 300;
/** An index this near to that of the medium is the same. */
const SAME_INDEX = 1e-6;

/** @param sizeMm longest side of the design */
export function scattererFaults({ media, parts, pumps }: Description, sizeMm: number): Fault[] {
  const used = new Set(parts.map(({ medium }) => medium));
  const nm = pumps[0]?.wavelengthNm;
  if (nm === undefined) return [];
  return [...media.values()].flatMap((medium) =>
    used.has(medium.name) ? medium.scatterers.flatMap((one) => faultsOf(one, medium, nm, sizeMm)) : [],
  );
}

function faultsOf(scatterer: ScattererDescription, medium: MediumDescription, nm: number, sizeMm: number): Fault[] {
  const { path } = scatterer;
  const faults: Fault[] = [];
  const caution = (fault: Omit<Fault, 'code' | 'severity' | 'path'>) =>
    faults.push({ code: 'caution', severity: 'warning', path, ...fault });
  const { scattering, absorption, anisotropy } = scatteringAt(scatterer, medium, nm);
  if (scatterer.kind === 'beads') {
    const { volumeFraction, index, extinction } = scatterer;
    if (volumeFraction > CLOSE) {
      caution({
        problem: 'beads this close do not scatter each for itself, as they are traced: real scattering is weaker',
        found: `${number(100 * volumeFraction)} % of the volume of ${medium.name}`,
        expected: `about ${100 * CLOSE} % or less`,
      });
    }
    if (absorption > 0) {
      caution({
        problem: 'these beads absorb; the light they take is booked with the medium they are in',
        found: `${number(absorption)} /mm absorbed, ${number(scattering)} /mm scattered at ${number(nm)} nm`,
      });
    }
    if (Math.abs(index(nm) - medium.index(nm)) < SAME_INDEX && extinction(nm) === 0) {
      caution({
        problem: 'these beads have the index of the medium and do not scatter',
        found: `index ${number(index(nm))} in ${number(medium.index(nm))} at ${number(nm)} nm`,
      });
    }
  }
  const turns = scattering * (1 - anisotropy) * sizeMm;
  if (turns > DEEP) {
    caution({
      problem: 'light turns very many times on its way through this medium, so tracing will be slow',
      found: `${number(turns)} transport mean free paths along ${number(sizeMm)} mm`,
    });
  }
  return faults;
}

const number = (value: number): number => Number(value.toPrecision(3));
