import type { Description, MediumDescription, QuenchingDescription } from '../design/description.js';
import { absorptionAt, scatteringAt } from '../scene/scattering-at.js';
import { significant } from './number-format.js';
import { safeText } from './safe-text.js';
import type { TerminalStyle } from './terminal-style.js';

/** A medium as the pump meets it. */
export interface MediumReport {
  readonly medium: string;
  readonly base: string;
  readonly parts: readonly string[];
  /** Wavelength of the first pump, nm, at which the rest is given. */
  readonly atNm: number;
  readonly index: number;
  /** Depth after which 1/e of the pump light is left, mm; null where nothing absorbs. */
  readonly depthMm: number | null;
  readonly dyes: readonly {
    readonly dye: string;
    readonly millimolesPerLitre: number | null;
    /** As traced. */
    readonly quantumYield: number;
    /** Before the dye's own crowding lowers it. */
    readonly diluteYield: number;
    /** How and by whose constants it is lowered; null where that is not modelled. */
    readonly quenching: { readonly law: string; readonly dimerShare: number; readonly source: string } | null;
  }[];
  /** What was taken for granted. */
  readonly notes: readonly string[];
  readonly scatterers: readonly {
    readonly scatterer: string;
    /** Mean free path between two scatterings, mm; null where it does not scatter. */
    readonly freePathMm: number | null;
    /** Mean cosine of the scattering angle. */
    readonly anisotropy: number;
  }[];
}

/** Media that fill a part, at the wavelength of the first pump. */
export function reportMedia(description: Description): MediumReport[] {
  const atNm = description.pumps[0]?.wavelengthNm;
  if (atNm === undefined) return [];
  return [...description.media.values()]
    .map((medium) => ({ medium, parts: description.parts.filter((part) => part.medium === medium.name) }))
    .filter(({ parts }) => parts.length > 0)
    .map(({ medium, parts }) => ({
      medium: medium.name,
      base: medium.base,
      parts: parts.map((part) => part.name),
      atNm,
      index: medium.index(atNm),
      depthMm: depthAt(medium, atNm),
      dyes: medium.dyes.map((dye) => ({
        dye: dye.name,
        millimolesPerLitre: dye.concentration === null ? null : dye.concentration * 1e3,
        quantumYield: dye.quantumYield,
        diluteYield: dye.diluteYield ?? dye.quantumYield,
        quenching: dye.quenching === undefined ? null : pickQuenching(dye.quenching),
      })),
      notes: [...(medium.notes ?? []), ...(medium.quenching === 'off' ? ['self-quenching switched off'] : [])],
      scatterers: medium.scatterers.map((scatterer) => {
        const { scattering, anisotropy } = scatteringAt(scatterer, medium, atNm);
        return { scatterer: scatterer.name, freePathMm: scattering > 0 ? 1 / scattering : null, anisotropy };
      }),
    }));
}

const pickQuenching = ({ law, dimerShare, source }: QuenchingDescription) => ({ law, dimerShare, source });

/** '96.8 % (97 % dilute, 0.2 % in dark dimers)'. */
export function yieldWords({ quantumYield, diluteYield, quenching }: MediumReport['dyes'][number]): string {
  const used = `${significant(100 * quantumYield, 3)} %`;
  if (quenching === null) return used;
  const dimers = quenching.dimerShare > 0 ? `, ${significant(100 * quenching.dimerShare, 2)} % in dark dimers` : '';
  return `${used} (${significant(100 * diluteYield, 3)} % dilute${dimers})`;
}

/** A line a medium, and one a note. */
export function mediaLines(media: readonly MediumReport[], style: TerminalStyle): string[] {
  return media.flatMap((report) => {
    const dyes = report.dyes.map((dye) => {
      const strength = dye.millimolesPerLitre === null ? '' : ` ${significant(dye.millimolesPerLitre, 4)} mmol/L`;
      return `${safeText(dye.dye)}${strength}, quantum yield ${yieldWords(dye)}`;
    });
    const depth = report.depthMm === null ? 'no absorption' : `1/e depth ${significant(report.depthMm, 3)} mm`;
    const facts = [
      safeText(report.base),
      `index ${report.index.toFixed(4)} and ${depth} at ${significant(report.atNm, 5)} nm`,
      ...dyes,
      ...report.scatterers.map(({ scatterer, freePathMm, anisotropy }) => {
        const free = freePathMm === null ? 'does not scatter' : `mean free path ${significant(freePathMm, 3)} mm`;
        return `${safeText(scatterer)}: ${free}, mean cosine ${anisotropy.toFixed(3)}`;
      }),
    ];
    return [
      `  ${style.bold(safeText(report.medium))} in ${report.parts.map((part) => safeText(part)).join(', ')}: ${facts.join('; ')}`,
      ...report.notes.map((note) => `    note: ${safeText(note)}`),
    ];
  });
}

function depthAt(medium: MediumDescription, wavelengthNm: number): number | null {
  const absorption = absorptionAt(medium, wavelengthNm);
  return absorption > 0 ? 1 / absorption : null;
}
