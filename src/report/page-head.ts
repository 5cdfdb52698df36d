import type { RunRecord } from '../record/run-record.js';
import { type Markup, markup } from './markup.js';
import { nameText, shortName } from './name-text.js';
import { groupedCount } from './number-format.js';

const PLACES = [
  ['where', 'Where it goes'],
  ['view', 'In space'],
  ['even', 'How even'],
  ['light', 'Colour and direction'],
  ['chain', 'Wall to lumens'],
  ['record', 'This run'],
  ['terms', 'Words'],
] as const;

/** Title, what was traced, and the way to each section. */
export function pageHead({ design, run, tool }: RunRecord, hasView: boolean): Markup {
  return markup`<a class="skip" href="#answers">To the answers</a><header><h1>${nameText(design.title, 120)}</h1><p>${groupedCount(run.histories)} histories, seed <bdi>${shortName(run.seed, 40)}</bdi>, traced ${run.startedAt.slice(0, 10)} by ${tool.name} ${shortName(tool.version, 30)}</p><nav aria-label="Sections">${PLACES.filter(
    ([id]) => hasView || id !== 'view',
  ).map(([id, words]) => markup`<a href="#${id}">${words}</a>`)}</nav></header>`;
}
