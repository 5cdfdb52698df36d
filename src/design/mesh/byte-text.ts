/** Words and numbers of a text that may be too large for a string: straight from its bytes. */

const NEWLINE = 10;
const RETURN = 13;
const BACKSLASH = 92;

export class ByteText {
  /** Of the word read last. */
  start = 0;
  end = 0;
  line = 1;
  #lineStart = 0;
  #at: number;

  constructor(readonly bytes: Uint8Array) {
    // A byte order mark is no text.
    this.#at = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf ? 3 : 0;
    this.#lineStart = this.#at;
  }

  /** Column of the word read last, from 1; of the end of the text when there is none. */
  get column(): number {
    return Math.max(1, this.start - this.#lineStart + 1);
  }

  /** Goes to the next word in this line. @returns false at the end of the line; a backslash there joins the next line to it */
  wordInLine(): boolean {
    const { bytes } = this;
    let at = this.#at;
    for (;;) {
      while (at < bytes.length && bytes[at] <= 32 && bytes[at] !== NEWLINE && bytes[at] !== RETURN) at++;
      if (bytes[at] !== BACKSLASH) break;
      let next = at + 1;
      if (bytes[next] === RETURN) next++;
      if (bytes[next] === NEWLINE) next++;
      if (next === at + 1) break;
      at = next;
      this.line++;
      this.#lineStart = at;
    }
    this.start = at;
    while (at < bytes.length && bytes[at] > 32) at++;
    this.end = at;
    this.#at = at;
    return this.end > this.start;
  }

  /** Leaves the rest of the line. @returns false at the end of the text */
  nextLine(): boolean {
    const { bytes } = this;
    let at = this.#at;
    while (at < bytes.length && bytes[at] !== NEWLINE && bytes[at] !== RETURN) at++;
    if (at >= bytes.length) {
      this.#at = at;
      this.start = at;
      this.end = at;
      return false;
    }
    if (bytes[at] === RETURN && bytes[at + 1] === NEWLINE) at++;
    this.#at = at + 1;
    this.line++;
    this.#lineStart = at + 1;
    return true;
  }

  /** Goes to the next word, over the ends of lines. @returns false at the end of the text */
  word(): boolean {
    while (!this.wordInLine()) if (!this.nextLine()) return false;
    return true;
  }

  /** Rest of the line after the word read last, trimmed. */
  restOfLine(): string {
    const { bytes } = this;
    let at = this.#at;
    const from = at;
    while (at < bytes.length && bytes[at] !== NEWLINE && bytes[at] !== RETURN) at++;
    this.#at = at;
    return decode(bytes, from, at).trim();
  }

  /** Whether the word is this one, in capitals or not; `word` in small letters. */
  is(word: string): boolean {
    if (this.end - this.start !== word.length) return false;
    for (let i = 0; i < word.length; i++) {
      const byte = this.bytes[this.start + i];
      const small = byte >= 65 && byte <= 90 ? byte + 32 : byte;
      if (small !== word.charCodeAt(i)) return false;
    }
    return true;
  }

  text(): string {
    return this.end > this.start
      ? decode(this.bytes, this.start, Math.min(this.end, this.start + 60))
      : 'the end of the line';
  }

  /** The word as a number, NaN when it is none. */
  number(): number {
    return parseNumber(this.bytes, this.start, this.end);
  }
}

const decode = (bytes: Uint8Array, start: number, end: number): string =>
  new TextDecoder('utf-8').decode(bytes.subarray(start, Math.min(end, start + 1000)));

const TENS = Float64Array.from({ length: 23 }, (_, i) => 10 ** i);
const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;

/** Up to 15 digits and powers of ten up to 22 are exact in a double (Clinger 1990); the rest is left to the library. */
export function parseNumber(bytes: Uint8Array, start: number, end: number): number {
  let at = start;
  const negative = bytes[at] === 45;
  if (negative || bytes[at] === 43) at++;
  let value = 0;
  let digits = 0;
  let decimals = 0;
  let point = false;
  let seen = false;
  for (; at < end; at++) {
    const byte = bytes[at];
    if (byte >= 48 && byte <= 57) {
      value = value * 10 + (byte - 48);
      seen = true;
      if (value > 0) digits++;
      if (point) decimals++;
    } else if (byte === 46 && !point) point = true;
    else break;
  }
  let exponent = 0;
  if (at < end && (bytes[at] | 32) === 101) {
    at++;
    const minus = bytes[at] === 45;
    if (minus || bytes[at] === 43) at++;
    const first = at;
    for (; at < end && bytes[at] >= 48 && bytes[at] <= 57 && at - first < 4; at++) {
      exponent = 10 * exponent + (bytes[at] - 48);
    }
    if (minus) exponent = -exponent;
    if (at === first) return Number.NaN;
  }
  const power = exponent - decimals;
  if (at === end && seen && digits <= 15 && power >= -22 && power <= 22) {
    const size = power < 0 ? value / TENS[-power] : value * TENS[power];
    return negative ? -size : size;
  }
  const word = decode(bytes, start, end);
  return NUMBER.test(word) ? Number(word) : Number.NaN;
}
