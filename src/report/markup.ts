/** HTML and SVG text in which whatever comes from outside is escaped unless it was built by `markup` itself. */

/** Text that is markup already. Only `markup`, `trusted` and `join` make it. */
export class Markup {
  constructor(readonly text: string) {}
  toString(): string {
    return this.text;
  }
}

export type Piece = Markup | string | number | null | readonly Piece[];

/** Tag for templates: strings and numbers are escaped, markup is kept, lists are joined, null leaves nothing. */
export function markup(parts: TemplateStringsArray, ...pieces: readonly Piece[]): Markup {
  return new Markup(parts.reduce((text, part, i) => text + pieceText(pieces[i - 1] ?? null) + part));
}

/** Text of our own that is markup. Never anything from a design or a record. */
export function trusted(text: string): Markup {
  return new Markup(text);
}

/** Pieces one after another with markup between them. */
export function join(pieces: readonly Piece[], between: Markup): Markup {
  return new Markup(pieces.map(pieceText).join(between.text));
}

function pieceText(piece: Piece): string {
  if (piece === null) return '';
  if (piece instanceof Markup) return piece.text;
  if (typeof piece === 'string') return escapeText(piece);
  if (typeof piece === 'number') return escapeText(String(piece));
  return piece.map(pieceText).join('');
}

const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

/** Control characters but tab and line feed, format characters (bidirectional marks among them), lone surrogates, odd line ends, and what XML forbids. */
const UNSEEN = /(?![\t\n])[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}\uFFFE\uFFFF]/gu;

/** Fit for element content and quoted attributes. What cannot be seen, or would reorder its neighbours, shows as its code point. */
export function escapeText(text: string): string {
  return visibleText(text).replace(/[&<>"']/g, (c) => ENTITIES[c] ?? c);
}

/** Plain text in which what cannot be seen shows as its code point. */
export function visibleText(text: string): string {
  return text.replace(/\r\n/g, '\n').replace(UNSEEN, codePoint);
}

function codePoint(character: string): string {
  return `\u27e8U+${(character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0')}\u27e9`;
}
