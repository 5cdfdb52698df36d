import type { RunRecord } from '../../record/run-record.js';
import { safeText } from '../safe-text.js';
import { fitToStyle, type TerminalStyle } from '../terminal-style.js';
import { evenness } from './evenness.js';
import { headline } from './headline.js';
import { labelled } from './labelled.js';
import { largestLosses } from './largest-losses.js';
import { ledgerTable } from './ledger-table.js';
import { saturation } from './saturation.js';
import { survival } from './survival.js';

/** What of a run is laid out: watts or photons of the ledger, its located warnings, and where its files are. */
export interface LedgerView {
  readonly count: 'watts' | 'photons';
  /** One text per warning. */
  readonly warnings: readonly string[];
  /** A small map of a face, ready to print; none where it is not wanted. */
  readonly map?: readonly string[];
  /** Folder of the run, null when no files were written. */
  readonly folder: string | null;
}

/** A run at a glance, 80 columns wide: how much comes out, where the rest goes, how even it is, whether it survives. */
export function showLedger(record: RunRecord, view: LedgerView, style: TerminalStyle): string {
  const rows = record.ledger[view.count];
  const sections = [
    headline(record, style),
    [
      style.bold(`Where the ${view.count === 'watts' ? 'watts go' : 'photons go'}, % of the pump light`),
      ...ledgerTable(rows, style),
    ],
    labelled('To win back', largestLosses(rows), style),
    evenness(record, style),
    view.map ?? [],
    survival(record, style),
    saturation(record, style),
    labelled('Warnings', view.warnings, { ...style, bold: style.warn }),
    labelled(
      'Cautions',
      record.cautions.map((text) => safeText(text, 1000)),
      { ...style, bold: style.warn },
    ),
    labelled('Files', view.folder === null ? [] : [safeText(view.folder)], style),
  ];
  const text = sections
    .filter((section) => section.length > 0)
    .map((section) => section.join('\n'))
    .join('\n\n');
  return `${fitToStyle(text, style)}\n`;
}
