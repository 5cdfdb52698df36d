import { describe, expect, test } from 'vitest';
import { readDesignText } from '../../src/design/read-design.js';
import { checkScene } from '../../src/scene/check-scene.js';

const design = (bath: string, dyes = '{}') => `design: T
dyes: ${dyes}
media: { bath: ${bath} }
parts: { cell: { box: [10 mm, 10 mm, 10 mm], medium: bath } }
pumps: { p: { patch: { disc: 1 mm }, power: 1 W, wavelength: 445 nm, divergence: 1 deg, toward: cell.left, distance: 5 mm } }
exit: cell.top
`;
function bath(text: string, dyes?: string) {
  const reading = readDesignText(design(text, dyes), 'design.yaml');
  if (!reading.ok) throw new Error(reading.faults.map(({ problem }) => problem).join('; '));
  const medium = reading.description.media.get('bath');
  if (medium === undefined) throw new Error('no bath');
  const strong = checkScene(reading.description).faults.filter(({ problem }) => problem.includes('quench'));
  return { ...medium, warnings: reading.warnings.map(({ problem }) => problem), strong };
}
const faults = (text: string) => {
  const reading = readDesignText(design(text), 'design.yaml');
  return reading.ok ? [] : reading.faults.filter(({ severity }) => severity === 'error');
};

describe('pH', () => {
  // At pH 6.43, the last pKa, half of monoanion and dianion is dianion (Henderson & Hasselbalch; Sjöback et al. 1995).
  test('mixes the forms of fluorescein in water', () => {
    const { dyes, warnings, notes } = bath(
      '{ solvent: water, pH: 6.43, quenching: off, dyes: { fluorescein: 0.1 mmol/L } }',
    );
    const [neutral, monoanion, dianion] = dyes;
    expect(dyes.map(({ name }) => name)).toEqual([
      'fluorescein neutral',
      'fluorescein monoanion',
      'fluorescein dianion',
    ]);
    expect(monoanion.concentration).toBeCloseTo(dianion.concentration ?? 0, 12);
    expect(dyes.reduce((sum, { concentration }) => sum + (concentration ?? 0), 0)).toBeCloseTo(1e-4, 15);
    expect([neutral, monoanion, dianion].map(({ quantumYield }) => quantumYield)).toEqual([0.3, 0.37, 0.93]);
    expect(warnings).toEqual([]);
    expect(notes?.join()).toContain('Sjöback');
  });

  test('above pH 9.5 there is but one', () => {
    const { dyes } = bath('{ solvent: water, pH: 11, quenching: off, dyes: { fluorescein: 0.1 mmol/L } }');
    expect(dyes.map(({ name, quantumYield }) => [name, quantumYield])).toEqual([['fluorescein', 0.93]]);
  });

  test('in ethanol, where the constants do not hold, it is only warned of; pH 19 is refused', () => {
    expect(bath('{ solvent: ethanol, pH: 7, dyes: { fluorescein: 0.1 mmol/L } }').warnings[0]).toContain(
      'between pH 9',
    );
    expect(faults('{ solvent: water, pH: 19, dyes: { fluorescein: 0.1 mmol/L } }')).toMatchObject([
      { code: 'range', found: '19' },
    ]);
  });
});

describe('strength', () => {
  test('lowers the yield, says of what, and can be switched off', () => {
    const [strong] = bath('{ solvent: ethanol, pH: 11, dyes: { fluorescein: 10 mmol/L } }').dyes;
    // Hopping formula 0.57413 times 0.91608 of single molecules (evaluated elsewhere).
    expect(strong.quantumYield / 0.97).toBeCloseTo(0.57413 * 0.91608, 4);
    expect(strong.diluteYield).toBe(0.97);
    expect(strong.lifetimeNs).toBeCloseTo(4.13 * 0.57413, 3);
    const [off] = bath('{ solvent: ethanol, pH: 11, quenching: off, dyes: { fluorescein: 10 mmol/L } }').dyes;
    expect(off.quantumYield).toBe(0.97);
    expect(off.diluteYield).toBeUndefined();
  });

  test('warns only beyond what is known', () => {
    expect(bath('{ solvent: ethanol, pH: 11, dyes: { fluorescein: 50 mmol/L } }').strong).toEqual([]);
    expect(bath('{ solvent: ethanol, pH: 11, dyes: { fluorescein: 0.2 mol/L } }').strong).toHaveLength(1);
    expect(bath('{ solvent: ethanol, dyes: { coumarin-6: 5 mmol/L } }').strong).toMatchObject([
      { expected: 'about 1 mmol/L or less' },
    ]);
    expect(bath('{ solvent: ethanol, quenching: off, dyes: { coumarin-6: 5 mmol/L } }').strong).toEqual([]);
  });

  // Rhodamine 6G pairs in water at 1e-4 mol/L already (Selwyn & Steinfeld 1972; memory, moderate).
  test('dimers of rhodamine 6G in water', () => {
    const [dye] = bath('{ solvent: water, dyes: { rhodamine-6g: 0.1 mmol/L } }').dyes;
    expect(dye.quenching?.dimerShare).toBeGreaterThan(0.2);
  });

  test('of a dye of the design goes by its own law', () => {
    const own = (law: string) =>
      bath(
        '{ solvent: ethanol, dyes: { mine: 8 mmol/L } }',
        `{ mine: { extinction: 8000 L/(mol cm), emission: 520 nm, yield: 0.8, quenching: ${law} } }`,
      ).dyes[0].quantumYield / 0.8;
    expect(own('{ half-at: 8 mmol/L }')).toBeCloseTo(0.5, 12);
    expect(own('{ stern-volmer: 125 L/mol }')).toBeCloseTo(0.5, 12);
    expect(own('{ perrin: 8 mmol/L }')).toBeCloseTo(Math.exp(-1), 12);
    expect(own('{ transfer-radius: 5.05 nm, pairing: 5 L/mol }')).toBeLessThan(0.8);
  });
});

describe('solvents mixed, liquids warmed', () => {
  test('shares must sum to 100 %, names must be known', () => {
    expect(faults('{ solvent: { ethanol: 60 %, water: 30 % } }')[0]).toMatchObject({ code: 'range', found: '90 %' });
    expect(faults('{ solvent: { ethanol: 60 %, watter: 40 % } }')[0]).toMatchObject({
      code: 'unknown-name',
      found: 'watter',
    });
  });

  test('absorb by volume and have no boiling point', () => {
    const { absorption, thermal, mixture, base } = bath('{ solvent: { water: 50 %, glycerol: 50 % } }');
    const water = bath('water').absorption(700);
    expect(absorption(700)).toBeCloseTo(water / 2, 12);
    expect(thermal?.boilingPointC).toBeNull();
    expect(mixture).toHaveLength(2);
    expect(base).toBe('50 % water, 50 % glycerol');
  });

  // dn/dT of ethanol −4.0e-4 /K (handbook; memory, high).
  test('a warm solvent has a lower index, a dye without data keeps its yield with a note', () => {
    const warm = bath('{ solvent: ethanol, temperature: 45 degC, pH: 11, dyes: { fluorescein: 1 µmol/L } }');
    expect(warm.index(520) - bath('ethanol').index(520)).toBeCloseTo(-8e-3, 6);
    expect(warm.dyes[0].diluteYield).toBe(0.97);
    expect(warm.notes?.join()).toContain('no data on its yield');
    expect(warm.warnings).toEqual([]);
    expect(warm.thermal?.temperatureC).toBeCloseTo(45, 9);
  });

  test('rhodamine B fades as it warms; a liquid above its boiling point is refused', () => {
    const [dye] = bath('{ solvent: ethanol, temperature: 26 °C, dyes: { rhodamine-b: 0.1 mmol/L } }').dyes;
    expect(1 - dye.quantumYield / 0.7).toBeCloseTo(0.0175, 3);
    expect(faults('{ solvent: ethanol, temperature: 79 °C }')[0].problem).toContain('boil');
  });
});
