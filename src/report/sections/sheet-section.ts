import type { Drawing } from '../../record/drawing.js';
import { threeView } from '../charts/three-view.js';
import type { DesignSheet } from '../design-sheet.js';
import { type Markup, markup } from '../markup.js';

/** The dimensioned sheet, as in drawing.svg. */
export function sheetSection(drawing: Drawing, { design }: DesignSheet): Markup {
  return markup`<section id="views"><h2>Three views</h2><p class="lead">Thin dashed lines are hidden behind something. Parts that hold a dye are tinted, the exit is green, pumps are blue. Lengths are in mm.</p><figure class="drawing-sheet scroll" tabindex="0" aria-label="Three views; scroll sideways where the sheet is wider than the screen">${threeView(drawing, design, 'sheet')}</figure></section>`;
}
