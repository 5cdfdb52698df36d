/** Dyes of the library as a host finds them: spectra of the nearest solvent, forms by pH, constants of quenching. */
import {
  dyeSolvents,
  type RangedConstant,
  readDye,
  readDyeQuenching,
  readPhotostability,
} from '../materials/library.js';
import type { GivenConstant } from './description.js';
import type { Dye, Host } from './dye.js';
import type { DesignPath } from './fault.js';
import { nearestSolvent } from './nearest-solvent.js';
import type { Reading } from './reading.js';

export function libraryDye(name: string, path: DesignPath, host: Host, reading: Reading): Dye {
  const measured = dyeSolvents(name);
  const solvent = measured.includes(host.base) ? host.base : nearestSolvent(host.base, measured);
  const data = readDye(name, solvent);
  if (solvent !== host.base || !host.pure) {
    reading.report({
      code: 'caution',
      severity: 'warning',
      path,
      problem: `the library has no spectra of ${name} in ${host.words}; those in ${solvent} are used, peaks and yield may differ`,
      found: host.words,
      expected: measured.join(', '),
    });
  }
  // Constants of acids belong to the solvent they were measured in, of which there must be most.
  const forms = host.pH !== null && solvent === host.base ? data.forms : [];
  if (data.pHRange !== null && forms.length === 0) cautionAboutPH(name, data.pHRange, host.pH, path, reading);
  return {
    extinction: data.extinction,
    absorption: null,
    emission: { kind: 'spectrum', ...data.emission },
    quantumYield: data.quantumYield,
    lifetimeNs: data.lifetimeNs,
    molarMassGPerMol: data.molarMassGPerMol,
    forms,
    quenching: quenchingOf(name, solvent, host),
    temperature: data.temperature,
    notes: [],
    ...libraryStability(name, host.base),
  };
}

function libraryStability(name: string, solvent: string): Pick<Dye, 'bleachYield' | 'triplet'> {
  const { bleachYield, triplet } = readPhotostability(name, solvent);
  const given = ({ value, low, high, measuredIn, status }: RangedConstant): GivenConstant => ({
    value,
    low,
    high,
    origin: `of ${measuredIn}; ${status}`,
  });
  return {
    bleachYield: bleachYield && given(bleachYield),
    triplet: triplet && { yield: given(triplet.yield), lifetimeNs: given(triplet.lifetimeNs) },
  };
}

/** Dimers form where molecules can meet: in liquids. */
function quenchingOf(name: string, solvent: string, host: Host): Dye['quenching'] {
  if (host.kind !== 'liquid') return null;
  const data = readDyeQuenching(name, host.base) ?? readDyeQuenching(name, solvent);
  if (data === null) return null;
  const { radiusNm, dimerRadiusNm, pairing, most, source, status } = data;
  const law = { kind: 'transfer-to-dimers', radiusNm, dimerRadiusNm, pairing } as const;
  return { law, most, source: `Bojarski 1972; ${source}; ${status}` };
}

function cautionAboutPH(
  name: string,
  [low, high]: readonly [number, number],
  pH: number | null,
  path: DesignPath,
  reading: Reading,
): void {
  // A pH that cannot be has been told already.
  if (pH !== null && (Number.isNaN(pH) || pH < 0 || pH > 14 || (pH >= low && pH <= high))) return;
  reading.report({
    code: 'caution',
    severity: 'warning',
    path,
    problem: `yield and spectra of ${name} are those of the form it has between pH ${low} and pH ${high}`,
    found: pH === null ? 'no pH' : `pH ${pH}`,
    expected: `pH ${low} to ${high}`,
  });
}
