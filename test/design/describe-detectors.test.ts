import { describe, expect, test } from 'vitest';
import { readDesignText } from '../../src/design/read-design.js';
import { starterDesign } from '../../src/design/starter-design.js';

const read = (detector: string, exit = 'lid.top') =>
  readDesignText(
    starterDesign().replace(/^exit: .*$/m, `detectors: { ball: ${detector} }\nexit: ${exit}`),
    'ball.yaml',
  );

describe('sphere detectors and radiance', () => {
  test('whole and about z unless said otherwise, as exit too', () => {
    const reading = read('{ sphere: { centre: [0 mm, 1 mm, 0 mm], radius: 3 cm } }', 'ball');
    if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
    expect(reading.description.detectors).toMatchObject([
      {
        target: { kind: 'sphere', centre: [0, 1, 0], radius: 30, axis: [0, 0, 1], polar: [0, Math.PI] },
        radiance: null,
      },
    ]);
    expect(reading.description.exit).toMatchObject({ name: 'ball', radiance: null });
  });

  test('radiance by a list, by yes, and on the exit', () => {
    const reading = read('{ face: cell.left, radiance: [2, 3, 9, 1] }', '{ face: lid.top, radiance: yes }');
    if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
    expect(reading.description.detectors[0].radiance).toEqual([2, 3, 9, 1]);
    expect(reading.description.exit.radiance).toEqual([4, 4, 18, 12]);
  });

  test.each([
    ['{ sphere: { centre: [0 mm, 0 mm, 0 mm] } }', 'missing', /radius/],
    ['{ sphere: { centre: [0 mm, 0 mm, 0 mm], radius: 0 mm } }', 'range', /radius/],
    ['{ sphere: { centre: [0 mm, 0 mm, 0 mm], radius: 5 mm, polar: [60 deg, 30 deg] } }', 'range', /60 deg to 30 deg/],
    ['{ sphere: { centre: [0 mm, 0 mm, 0 mm], radius: 5 mm, polar: [0 deg, 200 deg] } }', 'range', /polar/],
    [
      '{ sphere: { centre: [0 mm, 0 mm, 0 mm], radius: 5 mm, axis: [0, 0, 0] } }',
      'range',
      /axis a direction of length zero/,
    ],
    ['{ face: cell.left, sphere: { centre: [0 mm, 0 mm, 0 mm], radius: 5 mm } }', 'type', /exclude each other/],
    ['{ face: cell.left, radiance: [100, 100, 90, 72] }', 'range', /too fine.*64800000 cells.*at most 500000 cells/],
    ['{ face: cell.left, radiance: [4, 4, 9] }', 'type', /wrong length/],
    ['{ face: cell.left, radiance: coarse }', 'unknown-name', /coarse/],
  ])('%s is refused', (detector, code, words) => {
    const reading = read(detector);
    if (reading.ok) throw new Error('accepted');
    const texts = reading.faults.map(
      (fault) => `${fault.code} ${fault.path.join('.')} ${fault.problem} ${fault.found} ${fault.expected}`,
    );
    expect(
      texts.filter((text) => text.startsWith(`${code} `) && words.test(text)),
      texts.join('\n'),
    ).not.toEqual([]);
  });
});
