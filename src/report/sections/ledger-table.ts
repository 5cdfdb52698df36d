import type { LedgerRow } from '../../record/run-record.js';
import { termOfRow } from '../../terms/fate-terms.js';
import { fateWords, GROUP_WORDS, GROUPS, groupOf, totalOf } from '../ledger-words.js';
import { type Markup, markup } from '../markup.js';
import { nameText } from '../name-text.js';
import { roundToError, significant } from '../number-format.js';
import { markedWords, termMark } from '../term-mark.js';

/** A ledger as a table: every fate with its share, standard error and a bar; groups and the whole summed. */
export function ledgerTable(rows: readonly LedgerRow[], of: 'watts' | 'photons'): Markup {
  const longest = Math.max(...rows.map(({ fraction }) => fraction), Number.MIN_VALUE);
  const groups = [...GROUPS].reverse().map((group) => ({
    group,
    mine: rows.filter((row) => groupOf(row) === group).toSorted((a, b) => b.fraction - a.fraction),
  }));
  return markup`<table class="ledger" data-ledger="${of}"><caption>${of === 'watts' ? 'Of the pump watts' : 'Of the pump photons'}${termMark('ledger')}</caption><thead><tr><th scope="col">what became of it</th><th scope="col" class="number">%</th><th scope="col" class="number">±${termMark('standard-error')}</th><th scope="col"><span class="unseen">bar</span></th></tr></thead>${groups.map(
    ({ group, mine }) =>
      mine.length === 0 && group !== 'output'
        ? null
        : markup`<tbody><tr class="sum"><th scope="rowgroup">${markedWords(GROUP_WORDS[group], group)}</th><td class="number">${significant(100 * totalOf(mine), 4)}</td><td></td><td></td></tr>${mine.map((row) => line(row, longest))}</tbody>`,
  )}<tfoot><tr class="sum"><th scope="row">all of it</th><td class="number">${(100 * totalOf(rows)).toFixed(2)}</td><td></td><td></td></tr></tfoot></table>`;
}

function line(row: LedgerRow, longest: number): Markup {
  const { light, where, fraction, standardError } = row;
  const pair = roundToError(100 * fraction, standardError === null ? null : 100 * standardError, true);
  const width = (100 * Math.max(0, fraction)) / longest;
  const place = where === null ? null : markup` <span class="place">${nameText(where, 40)}</span>`;
  return markup`<tr><td>${nameText(fateWords(row), 48)}${termMark(termOfRow(row))}${place} <span class="light ${light}">${light}</span></td><td class="number"><data value="${String(fraction)}">${pair.value}</data></td><td class="number">${pair.error ?? ''}</td><td class="bar"><span class="${groupOf(row)}" style="width:${width.toFixed(1)}%"></span></td></tr>`;
}
