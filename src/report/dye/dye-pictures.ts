import { linePlot } from '../charts/line-plot.js';
import { shortName } from '../name-text.js';
import { significant } from '../number-format.js';
import { type DrawnPicture, standalonePicture } from '../pictures/standalone-picture.js';

/** What the pictures of a dye show. */
export interface DyeOnSheet {
  readonly dye: string;
  readonly medium: string;
  /** As people write it; '' where there is none. */
  readonly strength: string;
  readonly pathMm: number;
  readonly pumpNm: number;
  readonly depthMm: number;
  readonly absorbed: number;
  readonly overlap: number;
  readonly quantumYield: number;
  readonly spectra: {
    readonly nm: readonly number[];
    readonly absorbance: readonly number[];
    readonly emission: readonly number[];
  };
  readonly paths: {
    readonly mm: readonly number[];
    readonly pump: readonly number[];
    readonly emitted: readonly number[];
  };
}

const DIGITS = 3;
const percent = (share: number): string => `${significant(100 * share, DIGITS)} %`;

function wordsOf(sheet: DyeOnSheet): string {
  const strength = sheet.strength === '' ? '' : `, ${sheet.strength}`;
  return `${shortName(sheet.dye, 60)} in ${shortName(sheet.medium, 60)}${strength}`;
}

/** Absorbance over the path and emission, by wavelength. @param foot version and the like */
export function dyeSpectraPicture(sheet: DyeOnSheet, foot: string): DrawnPicture {
  const { nm, absorbance, emission } = sheet.spectra;
  const highest = niceAbove(Math.max(...absorbance, 1e-6));
  const path = `${significant(sheet.pathMm, DIGITS)} mm`;
  const chart = linePlot(
    {
      id: 'dye-spectra',
      title: 'Absorbance and emission',
      description: `Absorbance over ${path} from ${nm[0]} to ${nm[nm.length - 1]} nm, with the emission scaled to the same height.`,
      across: 'wavelength, nm',
      up: `absorbance over ${path}`,
    },
    [nm[0], nm[nm.length - 1]],
    'linear',
    highest,
    [
      { words: `absorbance over ${path}, decadic`, colour: 'pump', points: nm.map((x, i) => [x, absorbance[i]]) },
      {
        words: 'emission, photons per nm, drawn to its peak',
        colour: 'output',
        dash: 1,
        points: nm.map((x, i) => [x, emission[i] * highest * 0.96]),
      },
    ],
    [{ x: sheet.pumpNm, words: `pump ${significant(sheet.pumpNm, 5)} nm` }],
  );
  return standalonePicture([chart], {
    title: 'Absorbance and emission of a dye',
    subtitle: wordsOf(sheet),
    facts: ['Where both curves are high, the dye takes back the light it emits.'],
    foot,
  });
}

/** What is taken of pump and emitted light, by length of path. */
export function dyePathPicture(sheet: DyeOnSheet, foot: string): DrawnPicture {
  const { mm, pump, emitted } = sheet.paths;
  const chart = linePlot(
    {
      id: 'dye-path',
      title: 'Taken along a path',
      description: `Shares of the pump light and of emitted light that the dye takes along a straight path of ${significant(mm[0], 2)} to ${significant(mm[mm.length - 1], 2)} mm.`,
      across: 'length of path, mm',
      up: 'taken, %',
    },
    [mm[0], mm[mm.length - 1]],
    'log',
    100,
    [
      {
        words: `pump light, ${significant(sheet.pumpNm, 5)} nm: ${percent(sheet.absorbed)} at the path`,
        colour: 'pump',
        points: mm.map((x, i) => [x, 100 * pump[i]]),
      },
      {
        words: `emitted light taken back (overlap probability): ${percent(sheet.overlap)} at the path`,
        colour: 'output',
        dash: 1,
        points: mm.map((x, i) => [x, 100 * emitted[i]]),
      },
    ],
    [
      { x: sheet.pathMm, words: `path ${significant(sheet.pathMm, DIGITS)} mm` },
      { x: sheet.depthMm, words: `1/e depth of the pump ${significant(sheet.depthMm, DIGITS)} mm` },
    ],
  );
  return standalonePicture([chart], {
    title: 'What the dye takes along a straight path',
    subtitle: wordsOf(sheet),
    facts: [
      `Of light taken back ${percent(sheet.quantumYield)} is emitted anew, in another direction. The bare liquid, walls and scattering are left out.`,
    ],
    foot,
  });
}

/** The next of 1, 1.5, 2, 3, 5, 7 times a power of ten. */
export function niceAbove(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value));
  return ([1, 1.5, 2, 3, 5, 7, 10].find((step) => step * power >= value * 1.02) ?? 15) * power;
}
