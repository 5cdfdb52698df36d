import type { DyeSheet } from '../../outcome/dye-sheet.js';
import type { StrengthGuess } from '../../photophysics/first-strength.js';
import { labelled } from '../ledger/labelled.js';
import { significant } from '../number-format.js';
import { safeText } from '../safe-text.js';
import type { TerminalStyle } from '../terminal-style.js';

/** What a dye is like in its liquid, as the terminal prints it. */
export function dyeLines(sheet: DyeSheet, strength: string, style: TerminalStyle): string[] {
  const path = `${number(sheet.pathMm)} mm`;
  const { saturation, bleaching } = sheet;
  const strong = strength === '' ? '' : ` ${strength}`;
  return [
    style.bold(
      `${safeText(sheet.dye)}${strong} in ${safeText(sheet.medium)}; path ${path}, pump ${number(sheet.pumpNm, 5)} nm`,
    ),
    ...labelled(
      'Absorbance',
      [
        `${number(sheet.absorbance)} over the path at the pump (decadic): ${percent(sheet.absorbed)} absorbed`,
        `1/e depth ${depth(sheet.depthMm)}; peak ${sheet.peakNm} nm, ${number(sheet.peakAbsorbance)} over the path`,
      ],
      style,
    ),
    ...labelled(
      'Emission',
      [
        `peak ${number(sheet.emissionNm, 4)} nm, quantum yield as used ${percent(sheet.quantumYield)}${sheet.lifetimeNs === null ? '' : `, lifetime ${number(sheet.lifetimeNs)} ns`}`,
        `overlap probability ${percent(sheet.overlap)}: so much of it is taken back along the path; after all re-emissions ${percent(sheet.escaping)} of the photons absorbed get away`,
      ],
      style,
    ),
    ...labelled(
      'Saturation',
      [
        saturation === null
          ? 'not known: it needs lifetime, strength in mol/L and absorption at the pump'
          : `at ${watts(saturation.bare)}, photon energy ÷ (cross-section × lifetime)${saturation.withTriplet === null ? '; no triplet data: truly it may begin sooner' : `; with the triplet at ${watts(saturation.withTriplet)}`}`,
      ],
      style,
    ),
    ...labelled(
      'Bleaching',
      [
        bleaching === null
          ? 'no bleach yield known; give the dye a bleach-yield in a design'
          : `${scientific(bleaching.value)} molecules lost per absorption${bleaching.low < bleaching.high ? `, ${scientific(bleaching.low)} to ${scientific(bleaching.high)}` : ''} (${safeText(bleaching.origin)}); a tenth is lost after ${scientific(bleaching.dose)} photons per molecule`,
      ],
      style,
    ),
  ];
}

/** @param strength of the guess, as text; `way` says what it rests on */
export function guessLines(guess: StrengthGuess, strength: string, way: string, style: TerminalStyle): string[] {
  return labelled(
    'First guess',
    [
      `${strength}${Math.abs(guess.times - 1) < 0.02 ? ', as it is' : `, ${number(guess.times)} times what it is`}`,
      `why: there the dye takes ${percent(guess.absorbed)} of the pump on one crossing and takes back ${percent(guess.overlap)} of what it emits on its way; yield ${percent(guess.quantumYield)}. Stronger loses more to re-emission than it gains from the pump, weaker the other way round`,
      way,
    ],
    style,
  );
}

/** 0.0002 mol/L as "0.2 mmol/L"; '' for a dye without a strength in mol/L. */
export function strengthText(molesPerLitre: number | null): string {
  if (molesPerLitre === null) return '';
  const milli = molesPerLitre * 1e3;
  return milli < 0.01 ? `${number(milli * 1e3)} µmol/L` : `${number(milli)} mmol/L`;
}

const number = (value: number, digits = 3): string => significant(value, digits);
const percent = (share: number): string => `${number(100 * share)} %`;
const depth = (mm: number): string => (Number.isFinite(mm) ? `${number(mm)} mm` : 'none: it does not absorb there');
const watts = (value: number): string =>
  value >= 1e6
    ? `${number(value / 1e6)} MW/cm²`
    : value >= 1e3
      ? `${number(value / 1e3)} kW/cm²`
      : `${number(value)} W/cm²`;
const scientific = (value: number): string =>
  value >= 1e6 || value < 1e-3 ? value.toExponential(1).replace('.0e', 'e').replace('e+', 'e') : number(value, 2);
