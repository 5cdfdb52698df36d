/** The page of a design before any tracing: one self-contained HTML document. */
import type { Drawing } from '../record/drawing.js';
import { threeView } from './charts/three-view.js';
import type { DesignSheet } from './design-sheet.js';
import { markup } from './markup.js';
import { nameText, shortName } from './name-text.js';
import { pageShell } from './page-shell.js';
import { checksSection } from './sections/checks.js';
import { designSection } from './sections/design-section.js';
import { designTables } from './sections/design-tables.js';
import { sheetSection } from './sections/sheet-section.js';
import { termsSection } from './sections/terms-section.js';
import { viewSection } from './sections/view-section.js';
import { VIEW_BUNDLE } from './view/view-bundle.js';

/** File names of the two drawings. */
export const DRAWING_HTML = 'drawing.html';
export const DRAWING_SVG = 'drawing.svg';

/** The same text for the same design. */
export function drawPage(drawing: Drawing, sheet: DesignSheet): string {
  const { design, about, version } = sheet;
  const sections = [
    checksSection(sheet),
    sheetSection(drawing, sheet),
    viewSection(drawing),
    designTables(drawing, sheet),
    designSection(sheet),
  ];
  return pageShell(
    `${shortName(design.title, 60)}: drawing`,
    markup`<a class="skip" href="#views">To the views</a><header><h1>${nameText(design.title, 120)}</h1><p>Drawn before any tracing by stokeswell ${shortName(version, 30)}${about === null ? null : markup`. ${nameText(about, 600)}`}</p><nav aria-label="Sections"><a href="#views">Three views</a><a href="#view">In space</a><a href="#tables">Tables</a><a href="#record">Design text</a><a href="#cautions">Cautions</a></nav></header><main>${sections}${termsSection(markup`${sections}`)}</main>`,
    [VIEW_BUNDLE],
  );
}

/** The three-view sheet as a file of its own. */
export function drawSvg(drawing: Drawing, { design }: DesignSheet): string {
  return `<?xml version="1.0" encoding="UTF-8"?>\n${threeView(drawing, design, 'sheet').text}\n`;
}
