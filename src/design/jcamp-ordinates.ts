/** One line of (X++(Y..Y)) data: X, then values in plain, packed, squeezed, difference and duplicate form, mixed at will. */
export type OrdinateLine =
  | {
      readonly ok: true;
      readonly x: number;
      /** Without the check value that repeats the last one of the line before. */
      readonly values: readonly number[];
      readonly endsInDifference: boolean;
    }
  | { readonly ok: false; readonly problem: string; readonly found?: string };

/** First digits that carry a sign: squeezed '@ABC…I' 0…9, 'a…i' −1…−9; difference '%JKL…R', 'j…r'; duplicate 'STU…Zs' 1…9. */
const SQUEEZED = '@ABCDEFGHI';
const SQUEEZED_NEGATIVE = ' abcdefghi';
const DIFFERENCE = '%JKLMNOPQR';
const DIFFERENCE_NEGATIVE = ' jklmnopqr';
const DUPLICATE = ' STUVWXYZs';

const TOKEN =
  /\s*(?:[,;]\s*)?(?:([@A-Ia-i])(\d*\.?\d*)|([%J-Rj-r])(\d*)|([S-Zs])(\d*)|([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+(?![\d.]))?)|(\S))/gy;

/** @param check last value of the line before, where that ended in differences: this line repeats it first */
export function ordinates(text: string, check: number | null): OrdinateLine {
  const numbers: number[] = [];
  let kind: 'value' | 'difference' = 'value';
  let lastStep = 0;
  const content = text.trim();
  TOKEN.lastIndex = 0;
  // X is plain, and may run into a squeezed digit: 'E' begins a value there, never an exponent.
  const head = /^[+-]?(?:\d+\.?\d*|\.\d+)/.exec(content);
  if (head === null)
    return { ok: false, problem: 'the line does not start with a number', found: content.slice(0, 20) };
  TOKEN.lastIndex = head[0].length;
  while (TOKEN.lastIndex < content.length) {
    const at = TOKEN.lastIndex;
    const match = TOKEN.exec(content);
    if (match === null) return { ok: false, problem: 'this is no number', found: content.slice(at, at + 20) };
    const [, squeezed, squeezedRest, difference, differenceRest, duplicate, duplicateRest, plain] = match;
    const previous = numbers[numbers.length - 1];
    if (squeezed !== undefined) {
      numbers.push(signed(squeezed, squeezedRest, SQUEEZED, SQUEEZED_NEGATIVE));
      kind = 'value';
    } else if (plain !== undefined) {
      numbers.push(Number(plain));
      kind = 'value';
    } else if (difference !== undefined) {
      if (previous === undefined)
        return { ok: false, problem: 'a difference stands where no value came before', found: match[0] };
      lastStep = signed(difference, differenceRest, DIFFERENCE, DIFFERENCE_NEGATIVE);
      numbers.push(previous + lastStep);
      kind = 'difference';
    } else if (duplicate !== undefined) {
      const times = Number(`${DUPLICATE.indexOf(duplicate)}${duplicateRest}`);
      if (previous === undefined)
        return { ok: false, problem: 'a repeat stands where no value came before', found: match[0] };
      if (times > 1_000_000) return { ok: false, problem: 'a value is repeated too often', found: match[0] };
      for (let i = 1; i < times; i++)
        numbers.push((numbers[numbers.length - 1] ?? 0) + (kind === 'difference' ? lastStep : 0));
    } else {
      const found = match[0].trim();
      const problem = found === '?' ? 'the file marks this value as invalid' : 'this is no number';
      return { ok: false, problem, found };
    }
  }
  if (numbers.length === 0) return { ok: false, problem: 'the line has no values', found: content };
  if (check !== null) {
    const again = numbers.shift();
    if (again !== check) {
      return { ok: false, problem: `the line should first repeat the value before it, ${check}`, found: String(again) };
    }
  }
  return { ok: true, x: Number(head[0]), values: numbers, endsInDifference: kind === 'difference' };
}

function signed(first: string, rest: string, positive: string, negative: string): number {
  const digit = positive.indexOf(first);
  return digit >= 0 ? Number(`${digit}${rest}`) : -Number(`${negative.indexOf(first)}${rest}`);
}
