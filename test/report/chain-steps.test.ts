import { describe, expect, it } from 'vitest';
import { chainOf } from '../../src/report/chain-steps.js';
import { sampleRecord } from '../cli/sample-record.js';

const record = sampleRecord();
const [pump] = record.pumps;
const withPumps = (pumps: typeof record.pumps) => chainOf({ ...record, pumps });

describe('chainOf', () => {
  it('multiplies to the lumens, step by step', () => {
    const { wallWatts, steps } = withPumps([pump, pump]);
    const all = steps.reduce((product, { factor }) => product * factor, wallWatts ?? 0);
    expect(all / (record.figures.luminousFlux.value ?? 0)).toBeCloseTo(1, 12);
    expect(steps.map(({ name }) => name.split(':')[0])).toEqual(['driver', 'diode', 'optics', 'dye', 'way out', 'eye']);
  });

  // By hand: 30 W at 32 % and 90 %, twice: 60/0.32 = 187.5 W into the diodes, 187.5/0.9 = 208.33 W from the wall.
  it('tells drivers and diodes apart', () => {
    const { wallWatts, steps } = withPumps([pump, pump]);
    expect(wallWatts).toBeCloseTo(208.3333, 4);
    expect(steps[0].factor).toBeCloseTo(0.9, 12);
    expect(steps[0].watts).toBeCloseTo(187.5, 12);
    expect(steps[1].factor).toBeCloseTo(0.32, 12);
  });

  // By hand: 30/(0.32·0.9) + 10/(0.5·0.8) = 104.17 + 25 W from the wall, 93.75 + 20 W into the diodes.
  it('weighs unlike pumps by their power', () => {
    const { wallWatts, steps } = withPumps([pump, { ...pump, power: 10, diodeEfficiency: 0.5, driverEfficiency: 0.8 }]);
    expect(wallWatts).toBeCloseTo(129.1667, 4);
    expect(steps[0].factor).toBeCloseTo(113.75 / 129.1667, 5);
  });

  it('says where a driver is not given, and begins with the pump light where a diode is not', () => {
    expect(withPumps([{ ...pump, driverEfficiency: null }]).steps[0]).toMatchObject({ factor: 1 });
    expect(withPumps([{ ...pump, driverEfficiency: null }]).steps[0].name).toContain('not given');
    const { wallWatts, steps } = withPumps([pump, { ...pump, diodeEfficiency: null }]);
    expect(wallWatts).toBeNull();
    expect(steps[0].name).toContain('optics');
  });
});
