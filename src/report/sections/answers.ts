/** The four questions, answered in one screen. */

import type { RunRecord } from '../../record/run-record.js';
import { termOfRow } from '../../terms/fate-terms.js';
import { survivalVerdicts } from '../../terms/survival-words.js';
import { planePng } from '../charts/raster.js';
import { figureOr, figureText, noteText } from '../figure-text.js';
import { largestLosses, lossText } from '../largest-losses.js';
import { GROUP_WORDS, GROUPS, groupOf, totalOf } from '../ledger-words.js';
import { screenHex } from '../light-colour.js';
import { type Markup, markup } from '../markup.js';
import { nameText, shortName } from '../name-text.js';
import { groupedCount, significant } from '../number-format.js';
import { cutOf, type ShownMap } from '../shown-map.js';
import { markedWords, termMark } from '../term-mark.js';

export function answers(record: RunRecord, maps: readonly ShownMap[]): Markup {
  return markup`<section id="answers" aria-label="The four questions">${howMuch(record)}${whereTo(record)}${howEven(record, maps)}${survives(record)}</section>`;
}

function answer(question: string, contents: Markup): Markup {
  return markup`<div class="answer"><h2>${question}</h2>${contents}</div>`;
}

function howMuch(record: RunRecord): Markup {
  const { figures, run } = record;
  const { chromaticityX: x, chromaticityY: y } = figures;
  const swatch =
    x.value === null || y.value === null
      ? null
      : markup`<span class="swatch" style="background:${screenHex(x.value, y.value)}" aria-hidden="true"></span>`;
  const leak =
    figures.blueLeak.value === 0
      ? markup`no pump light through the exit seen in ${groupedCount(run.histories)} histories${termMark('blueLeak')}`
      : markup`${figureOr(record, 'blueLeak', '?')} of pump light leaks through the exit`;
  const dominant = figureText(record, 'dominantWavelength');
  return answer(
    'How much comes out?',
    markup`<p class="big">${figureOr(record, 'exitPower', 'nothing')}</p><p>${figureOr(record, 'luminousFlux', 'no lumens')}, ${figureOr(record, 'opticalEfficiency', '0 %', { factor: 100, unit: '%' })} of ${figureOr(record, 'pumpPower', '?')} of pump light</p><p>${swatch}${dominant === null ? markup`no colour to name${termMark('dominantWavelength')}` : markup`dominant ${dominant}`}</p><p class="note">${leak}</p>`,
  );
}

function whereTo({ ledger: { watts } }: RunRecord): Markup {
  const shares = [...GROUPS].reverse().map((group) => ({
    group,
    fraction: totalOf(watts.filter((row) => groupOf(row) === group)),
  }));
  const [worst] = largestLosses(watts);
  const told =
    worst === undefined
      ? markup`<p class="big">nothing is lost</p>`
      : markup`<p class="big">${lossText(worst)}</p><p>${nameText(worst.words, 80)}: the loss that costs most${worst.rows.length > 1 ? markup`, at ${worst.rows.length} places` : null}${termMark(termOfRow(worst.rows[0]))}</p>`;
  return answer(
    'Where did the rest go?',
    markup`${told}<div class="share-bar" aria-hidden="true">${shares.map(
      ({ group, fraction }) =>
        markup`<span class="${group}" style="width:${(100 * Math.max(0, fraction)).toFixed(2)}%"></span>`,
    )}</div><ul class="legend">${shares.map(
      ({ group, fraction }) =>
        markup`<li><span class="key ${group}" aria-hidden="true"></span>${significant(100 * fraction, 3)} % ${markedWords(GROUP_WORDS[group], group)}</li>`,
    )}</ul>`,
  );
}

function howEven(record: RunRecord, maps: readonly ShownMap[]): Markup {
  const { figures } = record;
  const exit = maps.find(({ record: { what } }) => what === 'exit');
  const least = figureText(record, 'exitUniformityMinOverMean');
  const faces = maps.filter(({ record: { what, variation: v } }) => what === 'pumped-face' && v !== null);
  const worst = faces.toSorted((a, b) => (b.record.variation ?? 0) - (a.record.variation ?? 0))[0]?.record;
  return answer(
    'How even is it?',
    markup`<p class="big">${figureOr(record, 'exitUniformityVariation', 'not known', { factor: 100, unit: '%' })}</p><p>spread of the light over the exit, noise taken out${
      figures.exitUniformityVariation.value === null ? noteText(figures.exitUniformityVariation) : null
    }</p>${exit === undefined ? null : thumbnail(exit)}<p>${least === null ? null : markup`least over mean ${least}. `}${
      worst === undefined
        ? null
        : markup`Pumped face ${nameText(worst.where, 30)}: ${significant(100 * (worst.variation ?? 0), 2)} %${termMark('map-pumped-face')}`
    }</p>`,
  );
}

function thumbnail(map: ShownMap): Markup {
  const [[u0, u1], [v0, v1]] = map.record.extentMm;
  const ratio = Math.min(6, Math.max(0.4, (u1 - u0) / (v1 - v0)));
  const shape = `aspect-ratio:${ratio.toFixed(3)};width:${Math.min(250, 120 * ratio).toFixed(0)}px`;
  return markup`<img class="thumbnail" style="${shape}" alt="Small map of the exit ${shortName(map.record.where)}; the large one follows below" src="${planePng(cutOf(map, [0, 1], 2, 0), map.record.maximum)}">`;
}

function survives(record: RunRecord): Markup {
  const { figures, checks } = record;
  const time = figureText(record, 'timeToBoiling');
  const warnings =
    checks.length === 0
      ? 'The checks found nothing to warn of.'
      : `${checks.length} ${checks.length === 1 ? 'warning' : 'warnings'}`;
  return answer(
    'Will it survive?',
    markup`<p class="big">${figureOr(record, 'peakAbsorbedPowerDensity', 'not known')}</p><p>absorbed at the hottest spot${noteText(figures.peakAbsorbedPowerDensity)}</p><p>${
      time === null
        ? markup`Time to boiling not known${termMark('timeToBoiling')}`
        : markup`At rest it boils after <b>${time}</b>`
    }${noteText(figures.timeToBoiling)}</p>${dyeSurvives(record)}<p>${checks.length === 0 ? warnings : markup`<a href="#checks">${warnings}</a>`} <a href="#cautions">Cautions</a></p>`,
  );
}

/** Saturation, amplified emission and bleaching: a line each, its assumption behind a fold. */
function dyeSurvives(record: RunRecord): Markup {
  const { figures } = record;
  const verdicts = survivalVerdicts(figures).map(({ figure, words, alarm }) => {
    const told = markup`${capital(words)}${termMark(figure)}`;
    return markup`<li>${alarm ? markup`<b>${told}</b>` : told}${assumption(figures[figure])}</li>`;
  });
  const excited = figureText(record, 'excitedMolecules');
  const mass = figureText(record, 'excitedMass');
  const share = figureText(record, 'peakExcitedFraction', { factor: 100, unit: '%' });
  const count =
    excited === null
      ? null
      : markup`<li>Excited at any time: ${excited}${mass === null ? null : markup`, ${mass}`}${share === null ? null : markup`; at the densest spot ${share}`}${assumption(figures.peakExcitedFraction)}</li>`;
  const silent =
    figures.timeToBleach.value === null
      ? markup`<li>Time to bleach not known${termMark('timeToBleach')}${assumption(figures.timeToBleach)}</li>`
      : null;
  return markup`<ul class="verdicts">${count}${verdicts}${silent}</ul>`;
}

function assumption({ note }: RunRecord['figures'][keyof RunRecord['figures']]): Markup | null {
  return note === undefined
    ? null
    : markup` <details class="why"><summary>why</summary><span class="note">${capital(note)}.</span></details>`;
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
