import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { readJcampDx } from '../../src/design/jcamp-dx.js';

/** A spectrum of seven points, its data lines given. */
const file = (data: string, more = '', points = 7) => `##TITLE= looms
##JCAMP-DX= 4.24 $$ invented
##DATA TYPE= UV/VISIBLE SPECTRUM
##XUNITS= NANOMETERS
##YUNITS= ABSORBANCE
##XFACTOR= 1
##YFACTOR= 0.01
##FIRSTX= 400
##LASTX= 406
##NPOINTS= ${points}
${more}##XYDATA= (X++(Y..Y))
${data}
##END=
`;

const values = (text: string) => {
  const read = readJcampDx(text);
  if (!read.ok) throw new Error(`${read.fault.line}: ${read.fault.problem}`);
  return read.spectrum.y.map((y) => Math.round(y * 100));
};
const fault = (text: string) => {
  const read = readJcampDx(text);
  if (read.ok) throw new Error('read without a fault');
  return read.fault;
};

// The four packings of one row of numbers, after the forms of McDonald & Wilks, Appl. Spectrosc. 42 151 (1988) (digits from memory).
describe('one spectrum in every packing', () => {
  const wanted = [1, 2, 3, 3, 2, 1, -12];
  test.each([
    ['plain', '400 1 2 3 3\n404 2 1 -12'],
    ['packed', '400+1+2+3+3\n404+2+1-12'],
    ['squeezed', '400ABCC\n404BAa2'],
    ['difference', '400AJJ%jj\n405Aj3'],
    ['difference and duplicate', '400AJT%jT\n405Aj3'],
  ])('%s', (_, data) => {
    expect(values(file(data))).toEqual(wanted);
  });

  test('a duplicate counts the value itself', () => {
    expect(values(file('400 5V 2U'))).toEqual([5, 5, 5, 5, 2, 2, 2]);
    expect(values(file('400E Y'))).toEqual([5, 5, 5, 5, 5, 5, 5]);
  });

  test('pairs', () => {
    const pairs = file('400, 1; 401, 2; 402, 3\n403 4 404 5 405 6 406 7').replace(
      'XYDATA= (X++(Y..Y))',
      'XYPOINTS= (XY..XY)',
    );
    expect(values(pairs)).toEqual([1, 2, 3, 4, 5, 6, 7]);
  });
});

describe('refused with line and reason', () => {
  const good = file('400ABCC\n404BAa2');
  test('a file cut in half', () => {
    const half = good.slice(0, good.indexOf('404'));
    expect(fault(half)).toMatchObject({ line: 12, problem: expect.stringContaining('cut off') });
    expect(fault(`${half}##END=\n`).problem).toContain('number of the points'.slice(0, 6));
    expect(fault(`${half}##END=\n`)).toMatchObject({
      found: '4 points',
      expected: expect.stringContaining('7 points'),
    });
  });
  test('a line that is missing in the middle', () => {
    expect(fault(file('400AB\n404BAa2'))).toMatchObject({ line: 13, expected: 'x = 402' });
  });
  test('a check value that is wrong', () => {
    expect(fault(file('400AJJ%jj\n405Bj3'))).toMatchObject({ line: 13, problem: expect.stringContaining('repeat') });
  });
  test('units that are not stated, values marked invalid, other kinds', () => {
    expect(fault(good.replace('##YUNITS= ABSORBANCE\n', '')).problem).toContain('YUNITS');
    expect(fault(file('400ABC?\n404BAa2')).problem).toContain('invalid');
    expect(fault(good.replace('XYDATA= (X++(Y..Y))', 'PEAK TABLE= (XY..XY)')).found).toBe('PEAKTABLE');
    expect(fault(good.replace('(X++(Y..Y))', '(X++(R..R))')).expected).toBe('(X++(Y..Y))');
    expect(fault('wavelength,absorbance\n400,1').problem).toContain('##TITLE=');
    expect(fault(`${good}${good}`).problem).toContain('several blocks');
    expect(fault(file('400 1 2', '##FIRSTY= 0.09\n', 2).replace('LASTX= 406', 'LASTX= 401')).problem).toContain(
      'FIRSTY',
    );
  });
});

/** Writes whole numbers as differences and duplicates, the way of the standard, sharing no code with the reader. */
function pack(numbers: readonly number[], perLine: number): string {
  const lead = (n: number, up: string, down: string) => {
    const [digit, ...rest] = String(Math.abs(n));
    return (n < 0 ? down[Number(digit) - 1] : up[Number(digit)]) + rest.join('');
  };
  const lines: string[] = [];
  for (let start = 0; start < numbers.length; start += perLine) {
    const from = Math.max(0, start - 1);
    let line = `${400 + from}${lead(numbers[from], '@ABCDEFGHI', 'abcdefghi')}`;
    for (let i = from + 1; i < Math.min(numbers.length, start + perLine); i++)
      line += lead(numbers[i] - numbers[i - 1], '%JKLMNOPQR', 'jklmnopqr');
    lines.push(line);
  }
  return lines.join('\n');
}

test('whatever is packed comes out again', () => {
  fc.assert(
    fc.property(
      fc.array(fc.integer({ min: -9999, max: 99999 }), { minLength: 4, maxLength: 60 }),
      fc.integer({ min: 3, max: 9 }),
      (numbers, perLine) => {
        // A last line of the first value alone would not end in a difference.
        fc.pre(perLine >= 3);
        const text = file(pack(numbers, perLine), '', numbers.length).replace(
          'LASTX= 406',
          `LASTX= ${399 + numbers.length}`,
        );
        expect(values(text)).toEqual(numbers);
      },
    ),
  );
});

test('cut anywhere, a file is refused', () => {
  const good = file(pack([5, 7, 9, 4, 3, 2, 11], 4));
  for (let at = 0; at < good.length - 2; at++) {
    const read = readJcampDx(good.slice(0, at));
    if (read.ok) expect(good.slice(0, at)).toMatch(/##END=$/);
  }
});
