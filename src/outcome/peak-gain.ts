import type { DissolvedDye, MediumDescription } from '../design/description.js';
import { crossSectionCm2 } from '../photophysics/cross-section.js';
import { emissionWeights } from '../photophysics/emission-weights.js';
import { type Gain, largestGain, type PumpedDye } from '../photophysics/small-signal-gain.js';
import { steadyPopulations, tripletRatio } from '../photophysics/steady-populations.js';
import { stimulatedCrossSectionCm2 } from '../photophysics/stimulated-emission.js';
import type { Curve } from '../units/curve.js';
import type { PeakExcitation } from './peak-excitation.js';

/**
 * Largest small-signal gain where the dyes of one medium are densest excited, with the error of that density.
 * @param peaks the dyes of one medium, each with lifetime and strength
 * @returns null where no dye has an emission with width
 */
export function peakGain(peaks: readonly PeakExcitation[]): (Gain & { readonly standardError: number | null }) | null {
  const broad = peaks.filter(({ of }) => of.dye.emission.kind === 'spectrum');
  const [first] = broad;
  if (first === undefined) return null;
  const { medium } = first.of;
  const wavelengths = broad.flatMap(({ of: { dye } }) => range(dye));
  const bare: Curve = (nm) => 10 * Math.max(0, medium.absorption(nm));
  const gainAt = (shift: number) =>
    largestGain(
      broad.map((peak) => pumpedDye(peak, shift)),
      bare,
      wavelengths,
    );
  const gain = gainAt(0);
  if (gain === null) return null;
  const more = broad.every(({ excitations }) => excitations.standardError !== null) ? gainAt(1) : null;
  return { ...gain, standardError: more === null ? null : Math.abs(more.perCm - gain.perCm) };
}

/** @param shift standard errors that the excitation is moved by */
function pumpedDye(
  { of: { dye, molecules, kinetics, medium }, excitations }: PeakExcitation,
  shift: number,
): PumpedDye {
  const moved = excitations.value + shift * (excitations.standardError ?? 0);
  const { ground, excited } = steadyPopulations(moved, kinetics === null ? 0 : tripletRatio(kinetics));
  return {
    excited: excited * molecules,
    ground: ground * molecules,
    stimulated: stimulatedCurve(dye, medium),
    absorption: (nm) =>
      crossSectionCm2(Math.max(0, dye.absorption(nm)) / (dye.groundShare ?? 1), dye.concentration ?? 0),
  };
}

function stimulatedCurve({ emission, quantumYield, lifetimeNs }: DissolvedDye, { index }: MediumDescription): Curve {
  if (emission.kind === 'line' || lifetimeNs === null) return () => 0;
  const { nm, weights } = emissionWeights(emission, 1);
  const step = nm.length > 1 ? nm[1] - nm[0] : 1;
  return (at) => {
    const cell = Math.floor((at - emission.fromNm) / step);
    const photonsPerNm = (weights[cell] ?? 0) / step;
    return stimulatedCrossSectionCm2(at, photonsPerNm, quantumYield, lifetimeNs, index(at));
  };
}

function range({ emission }: DissolvedDye): number[] {
  if (emission.kind === 'line') return [];
  const first = Math.ceil(emission.fromNm);
  return Array.from({ length: Math.max(0, Math.floor(emission.toNm) - first + 1) }, (_, i) => first + i);
}
