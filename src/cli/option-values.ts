/** Values of command-line options: text in, checked value out; each throws commander's InvalidArgumentError. */
import { InvalidArgumentError } from 'commander';

/** Sums of photon energies stay exact up to a little above this (engine/run-batches.ts, MOST_HISTORIES). */
const MOST_HISTORIES = 2e9;
const MOST_THREADS = 1024;
const LONGEST_SECONDS = 30 * 86_400;
const LONGEST_SEED = 100;
const SECONDS_IN: Readonly<Record<string, number>> = { ms: 1e-3, s: 1, min: 60, h: 3600 };

/** `200000`, `2e6`, `2.5e6`: a whole number of histories, 1 to 2·10⁹. */
export function parseHistories(text: string): number {
  const value = wholeNumber(text);
  if (value === null) refuse('Write a whole number such as 200000 or 2e6.');
  if (value < 1) refuse('At least 1 history is needed.');
  if (value > MOST_HISTORIES) refuse('At most 2e9 histories can be asked for.');
  return value;
}

/** `0.2%`: relative standard error of the exit fraction, as a fraction. */
export function parsePrecision(text: string): number {
  const match = /^\s*(\d+(?:\.\d*)?|\.\d+)(?:e([+-]?\d{1,3}))?\s*%\s*$/i.exec(text);
  if (!match) refuse('Write it in per cent, for example 0.2%.');
  const value = Number(`${match[1]}e${match[2] ?? '0'}`) / 100;
  if (!(value > 0 && value < 1)) refuse('It must lie above 0 % and below 100 %.');
  return value;
}

/** `30s`, `500 ms`, `2min`, `1.5h`: seconds. */
export function parseDuration(text: string): number {
  const match = /^\s*(\d+(?:\.\d*)?|\.\d+)\s*(ms|s|min|h)\s*$/.exec(text);
  if (!match) refuse('Write a time with its unit, ms, s, min or h, for example 30s.');
  const seconds = Number(match[1]) * (SECONDS_IN[match[2] ?? ''] ?? Number.NaN);
  if (!(seconds > 0)) refuse('It must be longer than 0.');
  if (seconds > LONGEST_SECONDS) refuse('It must not be longer than 720 h (30 days).');
  return seconds;
}

/** `420 nm to 650 nm`, `420-650nm`: first and last wavelength, nm. */
export function parseWavelengths(text: string): readonly [number, number] {
  const match = /^\s*(\d+(?:\.\d*)?)\s*(?:nm)?\s*(?:-|–|to)\s*(\d+(?:\.\d*)?)\s*nm\s*$/.exec(text);
  if (!match) refuse('Write two wavelengths, for example "420 nm to 650 nm".');
  const [low, high] = [Number(match[1]), Number(match[2])];
  if (!(low >= 200 && high <= 2000 && low < high)) refuse('They must rise and lie between 200 and 2000 nm.');
  return [low, high];
}

/** A whole number of strengths, 3 to 101. */
export function parsePoints(text: string): number {
  const value = wholeNumber(text);
  if (value === null || value < 3 || value > 101) refuse('Write a whole number from 3 to 101.');
  return value;
}

/** A whole number of threads, 1 to 1024. */
export function parseThreads(text: string): number {
  const value = wholeNumber(text);
  if (value === null || value < 1 || value > MOST_THREADS) refuse(`Write a whole number from 1 to ${MOST_THREADS}.`);
  return value;
}

/** Any short printable text; it seeds every random stream of the run. */
export function parseSeed(text: string): string {
  if (text.length === 0 || text.length > LONGEST_SEED || /[\p{Cc}\p{Cs}]/u.test(text)) {
    refuse(`Write 1 to ${LONGEST_SEED} printable characters.`);
  }
  return text;
}

/** `name=value`, given once per dial; collects them by name. */
export function collectDial(text: string, earlier: Readonly<Record<string, string>>): Record<string, string> {
  const at = text.indexOf('=');
  const name = text.slice(0, at).trim();
  const value = text.slice(at + 1).trim();
  if (at < 1 || name === '' || value === '') refuse('Write name=value, for example "depth=10 mm" in quotes.');
  if (Object.hasOwn(earlier, name)) refuse(`The dial "${name}" is given twice.`);
  return { ...earlier, [name]: value };
}

function wholeNumber(text: string): number | null {
  const value = /^\s*\d+(\.\d+)?(e\+?\d{1,3})?\s*$/i.test(text) ? Number(text) : Number.NaN;
  return Number.isInteger(value) ? value : null;
}

function refuse(sentence: string): never {
  throw new InvalidArgumentError(sentence);
}
