/** From wall power to lumens, factor by factor, beside what other emitters make of the same wall power. */
import type { RunRecord } from '../../record/run-record.js';
import { chainOf, WALL_WORDS } from '../chain-steps.js';
import { figureText, noteText } from '../figure-text.js';
import { type Markup, markup } from '../markup.js';
import { significant } from '../number-format.js';
import { otherEmitters } from '../other-emitters.js';
import { termMark } from '../term-mark.js';
import { comparison } from './comparison.js';

export function chainSection(record: RunRecord): Markup {
  const { figures } = record;
  const { wallWatts, pumpWatts, steps } = chainOf(record);
  const total = figureText(record, 'luminousEfficacyWallPlug');
  return markup`<section id="chain"><h2>From the wall socket to lumens${termMark('wall-to-lumens')}</h2>${
    wallWatts === null
      ? markup`<p class="lead">What the wall socket gives is not known${noteText(figures.luminousEfficacyWallPlug)}, so the chain begins with the pump light.</p>`
      : markup`<p class="lead">${significant(wallWatts, 4)} W from the wall make ${figureText(record, 'luminousFlux') ?? 'no lumens'}: <b>${total}</b>${noteText(figures.luminousEfficacyWallPlug)}.</p>`
  }<ol class="chain"><li class="start"><b>${significant(wallWatts ?? pumpWatts, 4)} W</b> ${wallWatts === null ? WALL_WORDS.pump : WALL_WORDS.wall}</li>${steps.map(
    ({ name, factor, result }) =>
      markup`<li><span class="factor">× ${significant(factor, 4)}</span><span class="step-name">${name}</span><b>${result}</b></li>`,
  )}</ol><p class="note">Each factor is a quotient of figures, ledger rows and pumps of this run${
    wallWatts === null ? '' : '; drivers and diodes are those of all pumps together'
  }. The optics lose pump light that misses, is reflected or is let through; the way out loses emitted light to finishes, solids and other faces.</p>${comparison(otherEmitters(), figures.luminousEfficacyWallPlug.value, wallWatts)}</section>`;
}
