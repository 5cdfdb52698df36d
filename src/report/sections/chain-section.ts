/** From wall power to lumens, factor by factor, beside what other emitters make of the same wall power. */
import type { RunRecord } from '../../record/run-record.js';
import { figureText, noteText, plainFigure } from '../figure-text.js';
import { groupOf, totalOf } from '../ledger-words.js';
import { type Markup, markup } from '../markup.js';
import { significant } from '../number-format.js';
import { otherEmitters } from '../other-emitters.js';
import { termMark } from '../term-mark.js';
import { comparison } from './comparison.js';

interface Step {
  readonly name: string;
  readonly factor: string;
  readonly result: string;
}

export function chainSection(record: RunRecord): Markup {
  const { figures } = record;
  const wall = wallWatts(record);
  const total = figureText(record, 'luminousEfficacyWallPlug');
  return markup`<section id="chain"><h2>From the wall socket to lumens${termMark('wall-to-lumens')}</h2>${
    wall === null
      ? markup`<p class="lead">What the wall socket gives is not known${noteText(figures.luminousEfficacyWallPlug)}, so the chain begins with the pump light.</p>`
      : markup`<p class="lead">${significant(wall, 4)} W from the wall make ${figureText(record, 'luminousFlux') ?? 'no lumens'}: <b>${total}</b>${noteText(figures.luminousEfficacyWallPlug)}.</p>`
  }<ol class="chain"><li class="start"><b>${significant(wall ?? figures.pumpPower.value ?? 0, 4)} W</b> ${wall === null ? 'of pump light' : 'from the wall'}</li>${steps(
    record,
    wall,
  ).map(
    ({ name, factor, result }) =>
      markup`<li><span class="factor">× ${factor}</span><span class="step-name">${name}</span><b>${result}</b></li>`,
  )}</ol><p class="note">Each factor is a quotient of figures of this run.${wall === null ? null : ' The record holds drivers and diodes as one product.'}</p>${comparison(otherEmitters(), figures.luminousEfficacyWallPlug.value, wall)}</section>`;
}

/** Electrical power, W: the lumens over the lumens per electrical watt. null where either says nothing. */
function wallWatts({ figures: { luminousFlux, luminousEfficacyWallPlug } }: RunRecord): number | null {
  if (luminousFlux.value === null || luminousEfficacyWallPlug.value === null) return null;
  return luminousEfficacyWallPlug.value > 0 ? luminousFlux.value / luminousEfficacyWallPlug.value : null;
}

function steps({ figures, ledger: { watts } }: RunRecord, wall: number | null): readonly Step[] {
  const pump = figures.pumpPower.value ?? 0;
  const share = (group: ReturnType<typeof groupOf>) => totalOf(watts.filter((row) => groupOf(row) === group));
  const taken = 1 - share('pump-lost');
  const emitted = taken - share('heat');
  const out = share('output');
  const flux = figures.luminousFlux.value ?? 0;
  const inWatts = (fraction: number) => `${significant(fraction * pump, 4)} W`;
  const drivers: readonly Step[] =
    wall === null
      ? []
      : [{ name: 'drivers and diodes', factor: factorText(pump, wall), result: `${inWatts(1)} of pump light` }];
  return [
    ...drivers,
    {
      name: 'taken up by the dye, not reflected, missed or let through',
      factor: factorText(taken, 1),
      result: `${inWatts(taken)} in the dye`,
    },
    {
      name: 'given back as light over all re-emissions, not heat',
      factor: factorText(emitted, taken),
      result: `${inWatts(emitted)} of emitted light`,
    },
    {
      name: 'finds the exit, not a finish, a solid or another face',
      factor: factorText(out, emitted),
      result: `${inWatts(out)} out`,
    },
    {
      name: 'seen by the eye, lm per W of this light',
      factor: factorText(flux, out * pump),
      result: plainFigure(figures.luminousFlux) ?? 'no lumens',
    },
  ];
}

function factorText(part: number, whole: number): string {
  return whole > 0 ? significant(part / whole, 4) : '0';
}
