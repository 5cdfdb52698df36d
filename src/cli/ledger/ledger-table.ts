import type { LedgerRow } from '../../record/run-record.js';
import { fateWords, GROUP_WORDS } from '../../terms/ledger-words.js';
import { roundToError } from '../number-format.js';
import { safeText } from '../safe-text.js';
import { fitToStyle, type TerminalStyle } from '../terminal-style.js';
import { arrangeLedger } from './arrange-ledger.js';
import { alignDecimals, fitLeft } from './columns.js';
import { drawBar } from './draw-bar.js';

const LEDGER_WIDTH = 80;
const FATE_WIDTH = 32;
const WHERE_WIDTH = 17;
const LIGHT_WIDTH = 8;
const SHORTEST_BAR = 4;

interface Line {
  /** Sums (of a group, of everything) stand out; they have no bar. */
  readonly kind: 'sum' | 'row' | 'folded';
  readonly fate: string;
  readonly where: string;
  readonly light: string;
  /** Per cent. */
  readonly value: string;
  readonly error: string;
  readonly fraction: number;
  readonly isOutput: boolean;
}

/** The ledger as lines of at most 80 characters: fate, where, pump or emitted, per cent ± standard error, bar. */
export function ledgerTable(rows: readonly LedgerRow[], style: TerminalStyle): string[] {
  const lines = toLines(rows);
  const values = alignDecimals(lines.map((line) => line.value));
  const errors = alignDecimals(lines.map((line) => line.error));
  const largest = Math.max(0, ...lines.map((line) => (line.kind === 'row' ? line.fraction : 0)));
  return lines.map((line, index) => {
    const words = wordColumns(line, style);
    const sign = line.error === '' ? ' '.repeat(style.plusMinus.length) : style.plusMinus;
    const text = `${words}${values[index]} ${sign} ${errors[index]} `;
    if (line.kind === 'sum') return style.bold(text.trimEnd());
    if (line.kind === 'folded') return text.trimEnd();
    const barWidth = Math.max(SHORTEST_BAR, LEDGER_WIDTH - [...text].length);
    const bar = drawBar(line.fraction / largest, barWidth, style.unicode);
    return bar === '' ? text.trimEnd() : text + (line.isOutput ? style.good(bar) : style.warn(bar));
  });
}

function wordColumns(line: Line, style: TerminalStyle): string {
  const column = (text: string, width: number): string =>
    `${fitLeft(fitToStyle(safeText(text), style), width - 1, style.unicode ? '…' : '~')} `;
  if (line.kind === 'sum') return column(line.fate, FATE_WIDTH + WHERE_WIDTH + LIGHT_WIDTH);
  return `  ${column(line.fate, FATE_WIDTH - 2)}${column(line.where, WHERE_WIDTH)}${column(line.light, LIGHT_WIDTH)}`;
}

function toLines(rows: readonly LedgerRow[]): Line[] {
  const ledger = arrangeLedger(rows);
  const lines: Line[] = [];
  for (const group of ledger.groups) {
    lines.push(withoutError('sum', GROUP_WORDS[group.name], group.fraction));
    for (const row of group.rows) lines.push(rowLine(row, group.name === 'output'));
    if (group.folded.rows > 0) {
      const count = group.folded.rows === 1 ? '1 row' : `${group.folded.rows} rows`;
      lines.push(withoutError('folded', `smaller losses (${count})`, group.folded.fraction));
    }
  }
  lines.push(withoutError('sum', 'total', ledger.total));
  return lines;
}

function rowLine(row: LedgerRow, isOutput: boolean): Line {
  const error = row.standardError === null ? null : 100 * row.standardError;
  const pair = roundToError(100 * row.fraction, error, true);
  return {
    kind: 'row',
    fate: fateWords(row),
    where: row.where ?? '',
    light: row.light,
    value: pair.value,
    error: pair.error ?? '',
    fraction: row.fraction,
    isOutput,
  };
}

/** Sums carry no error of their own: their rows are correlated. */
function withoutError(kind: 'sum' | 'folded', fate: string, fraction: number): Line {
  return { kind, fate, where: '', light: '', value: (100 * fraction).toFixed(2), error: '', fraction, isOutput: false };
}
