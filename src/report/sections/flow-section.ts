import type { RunRecord } from '../../record/run-record.js';
import { termById } from '../../terms/all-terms.js';
import { termOfRow } from '../../terms/fate-terms.js';
import { flowPicture, NARROW_FLOW, WIDE_FLOW } from '../charts/flow-picture.js';
import { largestLosses, lossText } from '../largest-losses.js';
import { type Markup, markup } from '../markup.js';
import { nameText } from '../name-text.js';
import { markedWords, termMark } from '../term-mark.js';
import { ledgerTable } from './ledger-table.js';

const LOSSES_LISTED = 5;

/** Where the light goes: the picture, the costliest losses, both ledgers. */
export function flowSection(record: RunRecord): Markup {
  const losses = largestLosses(record.ledger.watts).slice(0, LOSSES_LISTED);
  return markup`<section id="where"><h2>Where the light goes</h2><p class="lead">To scale, from the pump watts above to every fate. A photon may go round many times; each is counted where it ends, and every re-emission leaves its Stokes heat on the way.</p><div class="where"><div><figure class="wide-only">${flowPicture(record, 'flow-wide', WIDE_FLOW)}</figure><figure class="narrow-only">${flowPicture(record, 'flow-narrow', NARROW_FLOW)}</figure><output class="readout needs-script" id="flow-readout">Point at a stream, or step through them with the tab key, for its number and ±.</output><a class="to-view" href="#view" hidden>See these paths and faces in the view</a>${legend(record)}</div>${
    losses.length === 0
      ? null
      : markup`<div><h3>What could be won back${termMark('win-back')}</h3><ol class="losses">${losses.map(
          (loss) =>
            markup`<li><b>${lossText(loss)}</b> ${nameText(loss.words, 80)}${termMark(termOfRow(loss.rows[0]))}${loss.rows.length > 1 ? ` in ${loss.rows.length} entries of the ledger` : ''}</li>`,
        )}</ol><p class="note">Watts that end by one cause, wherever they do. Mending a cause wins back less than all of it: the light goes on and meets the next loss. Stokes heat is not listed; it is the price of every re-emission.</p></div>`
  }</div><h3>The two ledgers</h3><p class="note">Photons and watts differ because a re-emitted photon carries less energy; the difference is Stokes heat. Bars are drawn to the largest entry. ± is one standard error.</p><div class="ledgers">${ledgerTable(record.ledger.watts, 'watts')}${ledgerTable(record.ledger.photons, 'photons')}</div></section>`;
}

/** What the fates in the picture mean. */
function legend({ ledger: { watts } }: RunRecord): Markup | null {
  const ids = [...new Set(watts.filter(({ fraction }) => fraction > 0).map(termOfRow))];
  if (ids.length === 0) return null;
  return markup`<p class="note fates">Fates: ${ids.map((id) => markup`${markedWords(termById(id)?.name ?? id, id)} `)}</p>`;
}
