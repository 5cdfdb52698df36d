/** The page of a run: one self-contained HTML document. */
import type { RunArrays } from '../record/run-arrays.js';
import type { RunRecord } from '../record/run-record.js';
import { markup } from './markup.js';
import { pageHead } from './page-head.js';
import { pageShell } from './page-shell.js';
import { answers } from './sections/answers.js';
import { chainSection } from './sections/chain-section.js';
import { checksSection } from './sections/checks.js';
import { flowSection } from './sections/flow-section.js';
import { lightSection } from './sections/light-section.js';
import { mapsSection } from './sections/maps-section.js';
import { recordSection } from './sections/record-section.js';
import { termsSection } from './sections/terms-section.js';
import { viewSection } from './sections/view-section.js';
import { shownMaps } from './shown-map.js';
import { VIEW_BUNDLE } from './view/view-bundle.js';

/** File name of the page in the folder of its run. */
export const REPORT_HTML = 'report.html';

/**
 * The page of a run, the same text for the same record and arrays. Arrays of another run, or missing ones, leave their
 * pictures out.
 */
export function runPage(record: RunRecord, arrays: RunArrays): string {
  const maps = shownMaps(record, arrays);
  const view = viewSection(arrays.drawing);
  const sections = markup`${answers(record, maps)}${checksSection(record)}${flowSection(record)}${view}${mapsSection(record, maps)}${lightSection(record, arrays)}${chainSection(record)}${recordSection(record)}`;
  return pageShell(
    record.design.title,
    markup`${pageHead(record, view !== null)}<main>${sections}${termsSection(sections)}</main>`,
    view === null ? [] : [VIEW_BUNDLE],
  );
}
