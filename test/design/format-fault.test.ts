import { expect, test } from 'vitest';
import { formatFault, formatPath } from '../../src/design/format-fault.js';

const place = { file: 'cell.yaml', line: 4, column: 10, severity: 'error' } as const;

test('file:line:column: path — problem; found X; expected Y. Did you mean Z?', () => {
  const fault = { ...place, code: 'quantity', path: ['parts', 'cell', 'box', 1], problem: 'is not a unit' } as const;
  expect(formatFault({ ...fault, found: 'furlong', expected: 'a length such as 8 mm', suggestion: 'mm' })).toBe(
    'cell.yaml:4:10: parts.cell.box#2 — is not a unit; found furlong; expected a length such as 8 mm. Did you mean mm?',
  );
  expect(formatFault({ ...fault, suggestion: 'write 8 mm' })).toBe(
    'cell.yaml:4:10: parts.cell.box#2 — is not a unit. Write 8 mm.',
  );
  expect(formatFault({ ...fault, path: [], severity: 'warning' })).toBe('cell.yaml:4:10: warning — is not a unit.');
});

test('places in lists are counted from 1', () => {
  expect(formatPath(['dyes', 'probe', 'extinction', 0, 1])).toBe('dyes.probe.extinction#1#2');
});

test('what is quoted cannot steer a terminal and is not endless', () => {
  const line = formatFault({
    ...place,
    code: 'type',
    path: ['a\u001b[2J'],
    problem: 'x',
    found: `\u202e${'y'.repeat(500)}\n`,
  });
  expect(line).not.toMatch(/[\p{Cc}\u202e]/u);
  expect(line.length).toBeLessThan(250);
});
