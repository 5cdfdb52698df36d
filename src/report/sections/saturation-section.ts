import type { RunRecord } from '../../record/run-record.js';
import { type Markup, markup } from '../markup.js';
import { shortName } from '../name-text.js';
import { formatWithError, significant } from '../number-format.js';
import { termMark } from '../term-mark.js';

/** How the strengths of a saturated run were found; null for a run that took no account of it. */
export function saturationSection({ saturation }: RunRecord): Markup | null {
  if (saturation === null) return null;
  const { settled, shares, steps } = saturation;
  const end = settled
    ? 'Shares and exit fraction have come to rest.'
    : 'They have not come to rest: take this run with care.';
  return markup`<h3>Saturation${termMark('effective-strength')}</h3><p>${
    shares.length === 0
      ? 'No part holds a dye.'
      : shares
          .map(({ medium, dye, share }) => `${shortName(dye)} in ${shortName(medium)}: ${percent(share)} absorb.`)
          .join(' ')
  } ${end} One strength stands for a whole part: bright spots absorb a little too much, dim ones too little.</p><div class="scroll"><table class="figures"><thead><tr><th scope="col">turn</th><th scope="col">traced with, % absorbing</th><th scope="col">exit photon fraction</th><th scope="col">off by, %</th></tr></thead><tbody>${steps.map(
    (step, i) =>
      markup`<tr><td>${i + 1}</td><td>${step.shares.map(({ share }) => significant(100 * share, 4)).join(', ')}</td><td>${formatWithError(step.exitPhotonFraction, step.standardError, '', '±')}</td><td>${significant(100 * step.off, 2)}</td></tr>`,
  )}</tbody></table></div>`;
}

const percent = (share: number): string => `${significant(100 * share, 4)} %`;
