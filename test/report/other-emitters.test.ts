/** V(525) = 0.7932 and V(520) = 0.710: CIE 1931 observer (CIE 15:2004); wall-plug figures are the library's typical ones, from memory. */
import { describe, expect, it } from 'vitest';
import { otherEmitters } from '../../src/report/other-emitters.js';

describe('otherEmitters', () => {
  it('turns wall power into lumens through driver, emitter and eye', () => {
    const [led, diode, white] = otherEmitters();
    expect(led.lumensPerWatt[1]).toBeCloseTo(0.92 * 0.3 * 683 * 0.7932, 0);
    expect(diode.lumensPerWatt[1]).toBeCloseTo(0.92 * 0.15 * 683 * 0.71, 0);
    expect(white.lumensPerWatt[1]).toBeCloseTo(0.92 * 170, 6);
    for (const {
      lumensPerWatt: [low, typical, high],
    } of [led, diode, white]) {
      expect(low).toBeLessThan(typical);
      expect(typical).toBeLessThan(high);
    }
  });
});
