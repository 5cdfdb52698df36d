/** How fast the dye fades, as headline figures. */
import { timeToLose } from '../photophysics/bleaching.js';
import type { Figure } from '../record/run-record.js';
import type { DyeExcitation } from '../trace/dye-excitation.js';
import { NOT_PUMPED, names, short, unknown, withSpread } from './figure-parts.js';
import type { PeakExcitation } from './peak-excitation.js';

/** Share of the dye whose loss counts as bleached. */
const LOST = 0.1;

type BleachingFigureName = 'absorptionsPerMolecule' | 'timeToBleach' | 'timeToBleachWithReservoir';

/** @param spread relative error of the photons absorbed */
export function bleachingFigures(
  excited: readonly DyeExcitation[],
  peaks: readonly PeakExcitation[],
  spread: number | null,
): Record<BleachingFigureName, Figure> {
  const dosed = excited
    .filter(({ molecules }) => molecules > 0)
    .map((of) => ({ of, rate: of.perSecond / (of.molecules * of.volumeCm3) }))
    .toSorted((a, b) => b.rate - a.rate);
  if (dosed.length === 0) {
    const note = excited.length === 0 ? NOT_PUMPED : 'no dye with a strength in mol/L';
    return {
      absorptionsPerMolecule: unknown('1/s', note),
      timeToBleach: unknown('s', note),
      timeToBleachWithReservoir: unknown('s', note),
    };
  }
  const several = dosed.length > 1;
  return {
    absorptionsPerMolecule: withSpread(
      dosed[0].rate,
      spread,
      '1/s',
      `mean over the ${Number(dosed[0].of.volumeCm3.toPrecision(3))} mL in the light${several ? `, ${dosed[0].of.dye.name}` : ''}`,
    ),
    timeToBleach: bleachTime(dosed, peaks, spread, 'cell'),
    timeToBleachWithReservoir: bleachTime(dosed, peaks, spread, 'reservoir'),
  };
}

function bleachTime(
  dosed: readonly { readonly of: DyeExcitation; readonly rate: number }[],
  peaks: readonly PeakExcitation[],
  spread: number | null,
  by: 'cell' | 'reservoir',
): Figure {
  const silent = dosed.filter(({ of }) => !of.dye.bleachYield).map(({ of }) => of.dye);
  const known = dosed.flatMap(({ of, rate }) => {
    const { bleachYield } = of.dye;
    const reservoirCm3 = (of.medium.reservoirMm3 ?? 0) * 1e-3;
    if (!bleachYield || (by === 'reservoir' && reservoirCm3 === 0)) return [];
    const diluted = by === 'cell' ? rate : (rate * of.volumeCm3) / (of.volumeCm3 + reservoirCm3);
    return [{ of, bleachYield, rate: diluted, seconds: timeToLose(LOST, bleachYield.value, diluted), reservoirCm3 }];
  });
  const soonest = known.toSorted((a, b) => a.seconds - b.seconds)[0];
  if (soonest === undefined) {
    return unknown(
      's',
      silent.length > 0 ? `no bleach yield known of ${names(silent)}` : 'the medium has no reservoir',
    );
  }
  const { of, bleachYield, rate, seconds, reservoirCm3 } = soonest;
  if (!Number.isFinite(seconds)) return unknown('s', 'a bleach yield of 0: it never bleaches');
  const yields = `${of.dye.name}, ${short(bleachYield.value)} lost per absorption (${bleachYield.origin})`;
  const range =
    bleachYield.low < bleachYield.high
      ? `; from ${short(timeToLose(LOST, bleachYield.high, rate))} to ${short(timeToLose(LOST, bleachYield.low, rate))} s over the known range`
      : '';
  const volume = Number((of.volumeCm3 + (by === 'cell' ? 0 : reservoirCm3)).toPrecision(3));
  const peak = peaks.find((one) => one.of === of);
  const still =
    by === 'cell' && peak !== undefined
      ? `; still liquid at the densest voxel ${short(timeToLose(LOST, bleachYield.value, peak.density / of.molecules))} s`
      : '';
  const missing = silent.length > 0 ? `; none known of ${names(silent)}` : '';
  return withSpread(seconds, spread, 's', `${yields}${range}; ${volume} mL well mixed, steady pumps${still}${missing}`);
}
