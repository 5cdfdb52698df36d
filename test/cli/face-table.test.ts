import { describe, expect, it } from 'vitest';
import { faceTable } from '../../src/cli/face-table.js';
import { styleFor } from '../../src/cli/terminal-style.js';

describe('faceTable', () => {
  it('lists faces in columns: place, direction, area, finish, what touches', () => {
    const table = faceTable(
      [
        {
          part: 'cell',
          face: 'top',
          shape: 'flat',
          centre: [10, 4, 8],
          normal: [6e-17, 0, 1],
          areaMm2: 160,
          finish: 'clear',
          touches: ['lid.bottom'],
          exposed: 1,
        },
        {
          part: 'dome\u001b[2J',
          face: 'bottom',
          shape: 'flat',
          centre: [10, 4, 8.123456],
          normal: [0, 0, -1],
          areaMm2: 12.5664,
          finish: 'blue-pass',
          touches: ['cell.top', 'surroundings'],
          exposed: 0.25,
        },
      ],
      styleFor(false, { LANG: 'C.UTF-8' }),
    );
    expect(table).toEqual([
      '  face         shape  centre, mm     normal       mm²  finish     touches',
      '  cell.top     flat   10, 4, 8       0, 0, 1      160  clear      lid.bottom',
      '  dome.bottom  flat   10, 4, 8.1235  0, 0, -1  12.566  blue-pass  cell.top, surroundings (25 % exposed)',
    ]);
  });
});
