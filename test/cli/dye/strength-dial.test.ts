import { describe, expect, test } from 'vitest';
import { atStrength, strengthDial, strengthIn } from '../../../src/cli/dye/strength-dial.js';
import { readDesignText, type SoundDesign } from '../../../src/design/read-design.js';

const design = (dials: string, strength: string) =>
  readDesignText(
    `design: cell
dials: ${dials}
media: { bath: { solvent: ethanol, pH: 11, dyes: { fluorescein: ${strength} } } }
parts: { cell: { box: [8 mm, 8 mm, depth], medium: bath } }
pumps: { p: { patch: { disc: 1 mm }, power: 1 W, wavelength: 445 nm, toward: cell.bottom, distance: 5 mm } }
exit: cell.top
`,
    'cell.yaml',
  ) as SoundDesign;

describe('the dial of the strength', () => {
  test('is found among others, also in mg/L, and turned', () => {
    const reading = design('{ depth: 8 mm, much: 66 mg/L }', 'much');
    const dial = strengthDial(reading, {}, undefined);
    expect(dial).toMatchObject({ name: 'much', medium: 'bath', dye: 'fluorescein' });
    const before = strengthIn(reading.description, 'bath', 'fluorescein');
    const after = strengthIn(atStrength(reading, {}, dial, 0.01).description, 'bath', 'fluorescein');
    expect(after / before).toBeCloseTo(0.01, 12);
  });

  test('none, several, and one that does not exist are told', () => {
    expect(() => strengthDial(design('{ depth: 8 mm }', '0.2 mmol/L'), {}, undefined)).toThrow('no dial changes');
    const two = design('{ depth: 8 mm, one: 0.2 mmol/L, other: one }', 'other');
    expect(() => strengthDial(two, {}, undefined)).toThrow('one, other');
    expect(strengthDial(two, {}, 'other').name).toBe('other');
    expect(() => strengthDial(two, {}, 'depth')).toThrow('does not change');
    expect(() => strengthDial(two, {}, 'othr')).toThrow('Did you mean other?');
  });
});
