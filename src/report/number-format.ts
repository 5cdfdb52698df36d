/**
 * Numbers as a person reads them: a value is rounded to the second significant digit of its standard error,
 * so that no digit is shown that the run does not know.
 */

/** A value and its error as text with the same number of decimals; `exponent` is the common power of ten, 0 for none. */
export interface RoundedPair {
  readonly value: string;
  /** null: no error known. */
  readonly error: string | null;
  readonly exponent: number;
}

/** Values outside this range are written with a power of ten. */
const PLAIN_BELOW = 1e7;
const PLAIN_ABOVE = 1e-4;
/** Digits shown of a value whose error is unknown. */
const DIGITS_WITHOUT_ERROR = 4;

/**
 * Rounds a value to its standard error.
 * @param standardError same unit as `value`; null when unknown, 0 when exact
 * @param plain never use a power of ten (columns of a table)
 */
export function roundToError(value: number, standardError: number | null, plain = false): RoundedPair {
  if (!Number.isFinite(value))
    return { value: Number.isNaN(value) ? 'unknown' : 'unbounded', error: null, exponent: 0 };
  const error = standardError !== null && Number.isFinite(standardError) ? Math.abs(standardError) : null;
  if (error === null || error === 0) {
    const text = significant(value, DIGITS_WITHOUT_ERROR);
    return { value: text, error: error === null ? null : '0', exponent: 0 };
  }
  const largest = Math.max(Math.abs(value), error);
  const exponent = plain || (largest < PLAIN_BELOW && largest >= PLAIN_ABOVE) ? 0 : orderOf(largest);
  const scaledValue = shiftDecimal(value, -exponent);
  // Round the error first: 0.0996 becomes 0.10, whose second digit stands one place further left.
  const scaledError = Number(shiftDecimal(error, -exponent).toPrecision(2));
  const decimals = 1 - orderOf(scaledError);
  return { value: roundTo(scaledValue, decimals), error: roundTo(scaledError, decimals), exponent };
}

/** "0.4123 ± 0.0012 W", "(1.20 ± 0.03)e-7 W", or "12.3 W" when no error is known. */
export function formatWithError(value: number, standardError: number | null, unit: string, plusMinus: string): string {
  const pair = roundToError(value, standardError);
  const tail = unit === '' ? '' : ` ${unit}`;
  if (pair.error === null || pair.error === '0') return `${pair.value}${tail}`;
  const both = `${pair.value} ${plusMinus} ${pair.error}`;
  return pair.exponent === 0 ? `${both}${tail}` : `(${both})e${pair.exponent}${tail}`;
}

/** At most `digits` significant digits, no trailing zeros: 60 for 60.000, 0.3313 for 0.331271. */
export function significant(value: number, digits: number): string {
  if (!Number.isFinite(value)) return Number.isNaN(value) ? 'unknown' : 'unbounded';
  return String(Number(value.toPrecision(digits)));
}

/** 1234567 as "1 234 567" with spaces that do not break; below 10 000 as it is. */
export function groupedCount(count: number): string {
  return count < 10_000 ? String(count) : String(count).replace(/\B(?=(\d{3})+$)/g, '\u00a0');
}

/** Seconds as "0.34 s", "12 s", "4 min 05 s", "3 h 20 min". */
export function formatSeconds(seconds: number): string {
  if (seconds < 10) return `${significant(seconds, 2)} s`;
  const whole = Math.round(seconds);
  if (whole < 120) return `${whole} s`;
  const minutes = Math.floor(whole / 60);
  const two = (n: number): string => String(n).padStart(2, '0');
  if (minutes < 120) return `${minutes} min ${two(whole % 60)} s`;
  return `${groupedCount(Math.floor(minutes / 60))} h ${two(minutes % 60)} min`;
}

/** Decimal order of magnitude of a number as it prints; 0 for 0. */
function orderOf(value: number): number {
  return value === 0 ? 0 : Number(value.toExponential().split('e')[1]);
}

/** value · 10^places through its decimal text: exact where a multiplication would round or overflow. */
function shiftDecimal(value: number, places: number): number {
  const [mantissa, order] = value.toExponential().split('e');
  return places === 0 ? value : Number(`${mantissa}e${Number(order) + places}`);
}

/** Fixed decimals; negative decimals round to tens, hundreds, …; never "-0". */
function roundTo(value: number, decimals: number): string {
  const text =
    decimals >= 0
      ? value.toFixed(Math.min(decimals, 100))
      : String(Math.round(value / 10 ** -decimals) * 10 ** -decimals);
  return /^-0*\.?0*$/.test(text) ? text.slice(1) : text;
}
