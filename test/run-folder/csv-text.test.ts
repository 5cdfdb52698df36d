/** Against RFC 4180 ("Common Format and MIME Type for CSV Files", rules 5 to 7, from memory). */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { csvText } from '../../src/run-folder/csv-text.js';

const HOSTILE = [
  'a',
  '=',
  '+',
  '-',
  '@',
  '"',
  ',',
  ' ',
  "'",
  '\t',
  '\r',
  '\n',
  '\0',
  '\u2028',
  '\u202e',
  '\ud800',
  '漢',
];

describe('csvText', () => {
  it('quotes commas and quotes, doubles quotes, leaves gaps blank', () => {
    expect(
      csvText(
        ['a', 'b'],
        [
          ['x,y', 'say "so"'],
          [null, Number.NaN],
        ],
      ),
    ).toBe('a,b\n"x,y","say ""so"""\n,\n');
  });

  it('brings every number back to the same bits', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true }), (x) => {
        const read = Number(csvText(['x'], [[x]]).split('\n')[1]);
        expect(read).toBe(x === 0 ? 0 : x);
      }),
    );
  });

  it('keeps any text to one field of one line, none of them a formula', () => {
    fc.assert(
      fc.property(fc.string({ unit: fc.constantFrom(...HOSTILE) }), (text) => {
        const lines = csvText([text, 'end'], []).split('\n');
        expect(lines).toHaveLength(2);
        const [, field] = /^("(?:[^"]|"")*"|[^",]*),end$/.exec(lines[0]) ?? [];
        expect(field).toBeDefined();
        expect(field?.replace(/^"/, '').trimStart()).not.toMatch(/^[=+\-@]/);
      }),
    );
  });
});
