import type { Figure, FigureName, RunRecord } from '../record/run-record.js';
import { type Markup, markup } from './markup.js';
import { formatWithError } from './number-format.js';
import { termMark } from './term-mark.js';

/** A figure keeps its error and unit on one line up to this many characters. */
const LONGEST_UNBROKEN = 28;

/** How a figure is shown. */
export interface FigureShow {
  /** Multiplies value and error; 100 for per cent. */
  readonly factor?: number;
  readonly unit?: string;
  /** false: without the mark that opens its meaning. */
  readonly mark?: false;
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
  const mark = show.mark === false ? null : termMark(name);
  return markup`<span class="figure${text.length > LONGEST_UNBROKEN ? ' long' : ''}"><data data-figure="${name}" value="${String(figure.value)}" data-error="${error}">${text}</data>${mark}</span>`;
}

/** The same; words with the mark of the figure where it is undefined for this run. */
export function figureOr(record: RunRecord, name: FigureName, words: string, show: FigureShow = {}): Markup {
  return figureText(record, name, show) ?? markup`${words}${termMark(name)}`;
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
