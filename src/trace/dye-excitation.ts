/** How often the molecules of each dye are excited, voxel by voxel, from the maps of absorbed light. */
import type { Description, DissolvedDye, MediumDescription } from '../design/description.js';
import { moleculesPerCm3 } from '../photophysics/cross-section.js';
import { emissionWeights } from '../photophysics/emission-weights.js';
import { photonRate } from '../photophysics/photon-rate.js';
import { type DyeKinetics, steadyPopulations, tripletRatio } from '../photophysics/steady-populations.js';
import { FIGURE, type RecordedMap, type RunTallies } from '../tallies/run-tallies.js';
import { halfHistories } from './half-histories.js';

/** One dye of one medium, over the voxels that hold it. */
export interface DyeExcitation {
  readonly medium: MediumDescription;
  readonly dye: DissolvedDye;
  /** Voxels of the map. */
  readonly cells: readonly number[];
  readonly volumeCm3: number;
  /** Photons absorbed per s and cm³ in each of `cells`: of all histories, of even and of odd batches; a half without histories is null. */
  readonly density: Float64Array;
  readonly halves: readonly [Float64Array | null, Float64Array | null];
  /** Photons absorbed per s in all of it. */
  readonly perSecond: number;
  /** Molecules per cm³, in whatever state. */
  readonly molecules: number;
  /** Wτ of `steadyPopulations` per photon absorbed per s and cm³; null without lifetime or strength. */
  readonly excitationsPerDensity: number | null;
  readonly kinetics: DyeKinetics | null;
}

/**
 * All dyes of all parts. Where several dyes share a liquid, pump light is shared out by their absorption at the pumps' wavelengths and
 * emitted light by their absorption of what they emit. What the bare liquid absorbs is spread over the dyes' voxels in proportion.
 */
export function dyeExcitations(description: Description, tallies: RunTallies): DyeExcitation[] {
  const pump = tallies.maps.find(({ what }) => what === 'absorbed-pump');
  const all = tallies.maps.find(({ what }) => what === 'absorbed-all');
  if (pump === undefined || all === undefined) return [];
  const photons = photonDensities(description, tallies, pump, all);
  const media = new Set(description.parts.map(({ medium }) => medium));
  return [...media].flatMap((name): DyeExcitation[] => {
    const medium = description.media.get(name);
    if (medium === undefined || medium.dyes.length === 0) return [];
    const cells = cellsOf(description, name, pump);
    if (cells.length === 0) return [];
    const volumeCm3 = cells.reduce((sum, cell) => sum + pump.measure[cell], 0) * 1e-3;
    const shares = shareOut(medium, description);
    return medium.dyes.map((dye, d) => {
      const density = ({ pump: blue, emitted }: Photons) =>
        Float64Array.from(cells, (cell) => shares.pump[d] * blue[cell] + shares.emitted[d] * emitted[cell]);
      const both = density(photons.both);
      const [even, odd] = photons.halves;
      const kinetics = kineticsOf(dye);
      const molecules = moleculesPerCm3(dye.concentration ?? 0);
      const known = kinetics !== null && molecules > 0;
      return {
        medium,
        dye,
        cells,
        volumeCm3,
        density: both,
        halves: [even && density(even), odd && density(odd)],
        perSecond: both.reduce((sum, value, i) => sum + value * pump.measure[cells[i]] * 1e-3, 0),
        molecules,
        // The tracer absorbs with the ground state alone: what it absorbed, over that, is what one of its molecules sees.
        excitationsPerDensity: known ? (kinetics.lifetimeNs * 1e-9) / ((dye.groundShare ?? 1) * molecules) : null,
        kinetics,
      };
    });
  });
}

/**
 * Share of a dye's molecules in the ground state as light sees it: the mean over the voxels weighted by what they absorb. Populations from
 * one half of the batches are weighted with the other, both ways, so that noise does not pass for saturation. null without lifetime or strength.
 */
export function meanGroundShare({
  density,
  halves,
  excitationsPerDensity,
  kinetics,
  perSecond,
}: DyeExcitation): number | null {
  if (excitationsPerDensity === null || kinetics === null) return null;
  if (!(perSecond > 0)) return 1;
  const ratio = tripletRatio(kinetics);
  const [even, odd] = halves;
  const pairs =
    even === null || odd === null
      ? [[density, density]]
      : [
          [even, odd],
          [odd, even],
        ];
  let absorbed = 0;
  let seen = 0;
  for (const [weight, population] of pairs) {
    weight.forEach((photons, i) => {
      absorbed += photons;
      seen += photons * steadyPopulations(population[i] * excitationsPerDensity, ratio).ground;
    });
  }
  return seen / absorbed;
}

function kineticsOf({ lifetimeNs, triplet }: DissolvedDye): DyeKinetics | null {
  if (lifetimeNs === null) return null;
  return { lifetimeNs, triplet: triplet ? { yield: triplet.yield.value, lifetimeNs: triplet.lifetimeNs.value } : null };
}

/** Per s and cm³, by voxel. */
interface Photons {
  readonly pump: Float64Array;
  readonly emitted: Float64Array;
}

function photonDensities({ pumps }: Description, tallies: RunTallies, pump: RecordedMap, all: RecordedMap) {
  const { moments, slots } = tallies;
  const mean = (figure: number) => moments.sum[2 * slots.length + figure] / moments.histories;
  const watts = pumps.reduce((sum, { power }) => sum + power, 0);
  const launchedPerSecond = photonRate(watts, mean(FIGURE.launchedEnergy));
  const total = (energy: RecordedMap['energy']) =>
    energy.reduce((sum, half) => sum + half.reduce((a, b) => a + b, 0), 0);
  const pumpEv = total(pump.energy);
  const emittedEv = total(all.energy) - pumpEv;
  // Maps hold energies; photons are counted for the whole run.
  const perEv = (absorbed: number, ev: number) =>
    ev > 0 ? (absorbed * moments.histories * launchedPerSecond) / ev : 0;
  const [pumpPerEv, emittedPerEv] = [
    perEv(mean(FIGURE.pumpAbsorbed), pumpEv),
    perEv(mean(FIGURE.reabsorptions), emittedEv),
  ];
  const photons = (energyOf: (map: RecordedMap) => ArrayLike<number>, histories: number): Photons => {
    const [blue, both] = [energyOf(pump), energyOf(all)];
    const scale = (i: number) => (pump.measure[i] > 0 ? 1 / (histories * pump.measure[i] * 1e-3) : 0);
    return {
      pump: Float64Array.from(blue, (ev, i) => ev * pumpPerEv * scale(i)),
      emitted: Float64Array.from(both, (ev, i) => (ev - blue[i]) * emittedPerEv * scale(i)),
    };
  };
  const counts = halfHistories(moments.histories);
  const half = (h: 0 | 1) => (counts[h] > 0 ? photons(({ energy }) => energy[h], counts[h]) : null);
  return {
    both: photons(({ energy: [even, odd] }) => even.map((ev, i) => ev + odd[i]), moments.histories),
    halves: [half(0), half(1)] as const,
  };
}

function cellsOf({ parts }: Description, medium: string, { measure, part }: RecordedMap): number[] {
  const cells: number[] = [];
  measure.forEach((volume, cell) => {
    if (volume > 0 && (part === undefined || parts[part[cell]]?.medium === medium)) cells.push(cell);
  });
  return cells;
}

/** How the light that the dyes of a medium absorb is shared out among them. */
function shareOut({ dyes }: MediumDescription, { pumps }: Description): { pump: number[]; emitted: number[] } {
  const one = dyes.length === 1 ? [1] : null;
  const normalised = (weights: number[]) => {
    const sum = weights.reduce((a, b) => a + b, 0);
    return one ?? weights.map((weight) => (sum > 0 ? weight / sum : 0));
  };
  const pump = normalised(
    dyes.map(({ absorption }) =>
      pumps.reduce((sum, { power, wavelengthNm }) => {
        const here = dyes.reduce((all, dye) => all + Math.max(0, dye.absorption(wavelengthNm)), 0);
        return sum + (here > 0 ? (power * wavelengthNm * Math.max(0, absorption(wavelengthNm))) / here : 0);
      }, 0),
    ),
  );
  const emissions = dyes.map(({ emission }) => emissionWeights(emission, 1));
  const emitted = normalised(
    dyes.map(({ absorption }) =>
      emissions.reduce((sum, { nm, weights }, e) => {
        const taken = weights.reduce((all, weight, i) => all + weight * Math.max(0, absorption(nm[i])), 0);
        return sum + pump[e] * dyes[e].quantumYield * taken;
      }, 0),
    ),
  );
  return { pump, emitted };
}
