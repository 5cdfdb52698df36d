import type { Figure, FigureName, RunRecord } from '../../record/run-record.js';
import { STOP_WORDS } from '../../terms/stop-words.js';
import { formatSeconds, formatWithError, groupedCount } from '../number-format.js';
import { safeText } from '../safe-text.js';
import type { TerminalStyle } from '../terminal-style.js';
import { labelled } from './labelled.js';

/** Title, what was traced, and the first question: how much comes out, and how sure is that. */
export function headline(record: RunRecord, style: TerminalStyle): string[] {
  const { design, run, figures } = record;
  const threads = run.threads <= 1 ? '1 thread' : `${run.threads} threads`;
  const dials = Object.entries(design.dials).map(([name, value]) => `${safeText(name, 40)} = ${safeText(value, 40)}`);
  return [
    style.bold(safeText(design.title, 78)),
    style.dim(safeText(design.file)),
    style.dim(
      `${groupedCount(run.histories)} histories in ${formatSeconds(run.seconds)} on ${threads}, seed ${safeText(run.seed)}`,
    ),
    style.dim(STOP_WORDS[run.stopReason]),
    '',
    ...(dials.length > 0 ? labelled('Dials', [dials.join(', ')], style) : []),
    ...labelled('Output', outputLines(figures, style), style),
    ...labelled('Colour', colourLines(figures, style), style),
    ...labelled('Pump leak', leakLines(record, style), style),
  ];
}

type Figures = Readonly<Record<FigureName, Figure>>;

function outputLines(figures: Figures, style: TerminalStyle): string[] {
  const pump = withUnit(figures.pumpPower, 'W', style);
  return [
    join(', ', [
      withUnit(figures.exitPower, 'W', style),
      after(scaled(figures.opticalEfficiency, 100, '%', style), ` of ${pump ?? 'the'} pump light`),
    ]),
    join(', ', [
      withUnit(figures.luminousFlux, 'lm', style),
      after(withUnit(figures.luminousEfficacyOptical, 'lm', style), ' per pump W'),
    ]),
    after(
      withUnit(figures.luminousEfficacyWallPlug, 'lm', style),
      ` per electrical W${inBrackets(figures.luminousEfficacyWallPlug)}`,
    ),
    after(withUnit(figures.exitPhotonFraction, '', style), ' exit photons per pump photon'),
  ].filter((line) => line !== null);
}

function colourLines(figures: Figures, style: TerminalStyle): string[] {
  return [
    join(', ', [
      before('x ', withUnit(figures.chromaticityX, '', style)),
      before('y ', withUnit(figures.chromaticityY, '', style)),
    ]),
    join(', ', [
      before('dominant ', withUnit(figures.dominantWavelength, 'nm', style)),
      before('mean ', withUnit(figures.meanExitWavelength, 'nm', style)),
    ]),
  ].filter((line) => line !== null);
}

function leakLines({ figures, run }: RunRecord, style: TerminalStyle): string[] {
  if (figures.blueLeak.value === 0) {
    return [`no pump light through the exit seen in ${groupedCount(run.histories)} histories`];
  }
  const power = withUnit(figures.blueLeak, 'W', style);
  const share = scaled(figures.blueLeakFraction, 100, '%', style);
  const line = join(', ', [after(power, ' of pump light through the exit'), share]);
  return line === null ? [] : [line];
}

/** A figure in its own unit, null when it is undefined for this run. */
export function withUnit(figure: Figure, unit: string, style: TerminalStyle): string | null {
  return scaled(figure, 1, unit, style);
}

function scaled(figure: Figure, factor: number, unit: string, style: TerminalStyle): string | null {
  if (figure.value === null || !Number.isFinite(figure.value)) return null;
  const error = figure.standardError === null ? null : figure.standardError * factor;
  return formatWithError(figure.value * factor, error, unit, style.plusMinus);
}

function inBrackets(figure: Figure): string {
  return figure.note ? ` (${safeText(figure.note)})` : '';
}

function after(text: string | null, tail: string): string | null {
  return text === null ? null : text + tail;
}

function before(head: string, text: string | null): string | null {
  return text === null ? null : head + text;
}

function join(separator: string, texts: readonly (string | null)[]): string | null {
  const known = texts.filter((text) => text !== null);
  return known.length === 0 ? null : known.join(separator);
}
