/** How faces are tinted by the kind of their finish, on light and on dark paper. */

export interface FinishTint {
  readonly colour: string;
  readonly opacity: number;
  /** In the legend; the kind itself where there are no better words. */
  readonly words?: string;
}

const TINTS: Readonly<Record<string, FinishTint>> = {
  clear: { colour: '#7fb0c9', opacity: 0.1 },
  mirror: { colour: '#8593a0', opacity: 0.4 },
  metal: { colour: '#b78f52', opacity: 0.4 },
  dichroic: { colour: '#9a62c4', opacity: 0.26 },
  stack: { colour: '#c4558f', opacity: 0.26, words: 'thin films' },
  films: { colour: '#c4558f', opacity: 0.26, words: 'thin films' },
  table: { colour: '#3f9a90', opacity: 0.28, words: 'tabulated' },
  diffuser: { colour: '#cf9a5b', opacity: 0.34 },
  scatter: { colour: '#a9a43c', opacity: 0.28, words: 'scattering' },
  black: { colour: '#4a5054', opacity: 0.7 },
};

const OTHER: FinishTint = { colour: '#8a8f80', opacity: 0.28 };

export function finishTint(kind: string): FinishTint {
  return Object.hasOwn(TINTS, kind) ? TINTS[kind] : OTHER;
}
