import type { Figure, FigureName, RunRecord } from '../record/run-record.js';
import { type Markup, markup } from './markup.js';
import { formatWithError } from './number-format.js';

/** A figure keeps its error and unit on one line up to this many characters. */
const LONGEST_UNBROKEN = 28;

/** How a figure is shown. */
export interface FigureShow {
  /** Multiplies value and error; 100 for per cent. */
  readonly factor?: number;
  readonly unit?: string;
}

/**
 * A figure with ± and unit. The element carries name, value and standard error as they stand in run.json, so that a
 * program can read the page too. null where the figure is undefined for this run.
 */
export function figureText(record: RunRecord, name: FigureName, show: FigureShow = {}): Markup | null {
  const figure = record.figures[name];
  const text = plainFigure(figure, show);
  if (text === null) return null;
  const error = figure.standardError === null ? '' : String(figure.standardError);
  return markup`<data class="figure${text.length > LONGEST_UNBROKEN ? ' long' : ''}" data-figure="${name}" value="${String(figure.value)}" data-error="${error}">${text}</data>`;
}

/** The same as plain text. */
export function plainFigure(figure: Figure, { factor = 1, unit = figure.unit }: FigureShow = {}): string | null {
  if (figure.value === null) return null;
  const error = figure.standardError === null ? null : figure.standardError * factor;
  return formatWithError(figure.value * factor, error, unit, '±');
}

/** The note of a figure in brackets, or nothing. */
export function noteText({ note }: Figure): Markup | null {
  return note === undefined ? null : markup` <span class="note">(${note})</span>`;
}
