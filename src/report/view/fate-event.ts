/** How the flow of the watts and the view tell each other what is chosen: an event on the document. */
export const FATE_EVENT = 'stokeswell:fate';

export interface FateRow {
  readonly fate: string;
  readonly light: string;
  /** As `viewName` writes it. */
  readonly where: string | null;
}

export interface FateChoice {
  /** Rows of the ledger that were chosen; none when the choice was taken back. */
  readonly rows: readonly FateRow[];
  /** Who chose, so that nobody answers himself. */
  readonly from: 'flow' | 'view';
}
