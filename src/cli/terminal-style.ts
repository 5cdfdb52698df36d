import pc from 'picocolors';

/** How a text is laid out for the stream it goes to. */
export interface TerminalStyle {
  /** '±' or '+-'. */
  readonly plusMinus: string;
  /** Block characters and other signs beyond ASCII may be printed. */
  readonly unicode: boolean;
  readonly bold: (text: string) => string;
  readonly dim: (text: string) => string;
  readonly warn: (text: string) => string;
  /** Bar colours of the groups of the ledger. */
  readonly good: (text: string) => string;
}

export type Environment = Readonly<Record<string, string | undefined>>;

/** Colour only on a terminal (whatever CI says) and without NO_COLOR. */
export function wantsColour(isTerminal: boolean, environment: Environment): boolean {
  return isTerminal && !environment.NO_COLOR && environment.TERM !== 'dumb';
}

/**
 * Style for a stream. Signs beyond ASCII where the
 * locale is UTF-8, or on a terminal that names no locale.
 */
export function styleFor(isTerminal: boolean, environment: Environment): TerminalStyle {
  const colours = pc.createColors(wantsColour(isTerminal, environment));
  const locale = environment.LC_ALL || environment.LC_CTYPE || environment.LANG;
  const unicode = locale ? /utf-?8/i.test(locale) : isTerminal;
  return {
    plusMinus: unicode ? '±' : '+-',
    unicode,
    bold: colours.bold,
    dim: colours.dim,
    warn: colours.yellow,
    good: colours.green,
  };
}

const ASCII_FOR: Readonly<Record<string, string>> = {
  '±': '+-',
  '²': '2',
  '³': '3',
  '°': 'deg',
  µ: 'u',
  μ: 'u',
  '–': '-',
  '—': '-',
  '…': '...',
  '·': '-',
  '×': 'x',
  '÷': '/',
  '−': '-',
  '√': 'root ',
  '≤': '<=',
  '§': 'section ',
  '∫': 'integral ',
  Σ: 'sum',
  Φ: 'Phi',
  α: 'alpha',
  β: 'beta',
  γ: 'gamma',
  ν: 'nu',
  τ: 'tau',
  ä: 'a',
  ö: 'o',
  '₀': '0',
  ₐ: 'a',
  ₑ: 'e',
  '⁴': '4',
  Δ: 'd',
  Ω: 'Omega',
  ε: 'epsilon',
  θ: 'theta',
  λ: 'lambda',
  π: 'pi',
  ρ: 'rho',
  σ: 'sigma',
  φ: 'phi',
  ȳ: 'y',
  é: 'e',
  É: 'E',
  '’': "'",
  '“': '"',
  '”': '"',
  '′': "'",
  '⁻': '-',
  '¹': '1',
  '₁': '1',
  '₂': '2',
};

/** The text as the style can show it: signs beyond ASCII are spelled out where they would not print. */
export function fitToStyle(text: string, style: TerminalStyle): string {
  // biome-ignore lint/suspicious/noControlCharactersInRegex: colour codes are ASCII and pass
  return style.unicode ? text : text.replace(/[^\x00-\x7f]/gu, (sign) => ASCII_FOR[sign] ?? '?');
}
