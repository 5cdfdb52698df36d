/** A run in which dyes absorb with the molecules that are left in the ground state. */
import type { Description, MediumDescription } from '../design/description.js';
import { FIGURE } from '../tallies/run-tallies.js';
import { dyeExcitations, meanGroundShare } from './dye-excitation.js';
import type { GroundShare, SaturationStep } from './saturation-step.js';
import { traceDescription } from './trace-design.js';
import type { TraceOptions, TraceResult } from './trace-result.js';

export interface SaturatedTrace {
  readonly result: TraceResult;
  readonly steps: readonly SaturationStep[];
  /** Whether shares and exit fraction had come to rest. */
  readonly settled: boolean;
}

/** Part of the way that a share goes towards what a turn says. */
const RELAXATION = 0.7;
/** Shares have come to rest when they would move by less than this. */
const AT_REST = 0.001;
const MOST_TURNS = 25;
/** Histories of a turn, at most; the last trace has all that are asked for. */
const TURN_HISTORIES = 51_200;

/**
 * Traces in turns, all with the same seed: each dye absorbs with one ground-state share in all parts of a medium, which is then moved towards the
 * mean over the voxels that the light of this turn asks for (under-relaxed), until shares move by less than 0.1 % and the exit fraction by less
 * than its error. Then traces as asked. The absorbed total of a medium is right at the fixed point; within a part bright spots absorb a little too
 * much and dim ones too little, for a medium has one strength.
 * @param onStep told after each turn
 * @throws as traceDescription
 */
export async function traceSaturated(
  description: Description,
  options: TraceOptions,
  onStep: (step: SaturationStep) => void = () => {},
): Promise<SaturatedTrace> {
  const split = withOwnMedia(description);
  const steps: SaturationStep[] = [];
  let shares = split.parts.length === 0 ? [] : sharesOf(split);
  let settled = false;
  const { onProgress: _, ...silent } = options;
  for (let turn = 0; turn < MOST_TURNS && !settled; turn++) {
    const plan = { ...silent, histories: Math.min(options.histories, TURN_HISTORIES), precision: null, seconds: null };
    const result = await traceDescription(withShares(split, shares), plan);
    if (result.stopReason === 'interrupted') break;
    const asked = askedShares(result);
    const off = shares.reduce((most, one) => Math.max(most, Math.abs(one.share - shareIn(asked, one))), 0);
    const step = { shares, ...exitFraction(result), off };
    settled = off < AT_REST && atRest(steps.at(-1), step);
    steps.push(step);
    onStep(step);
    // The last turn moves them too: what is left is then much smaller than the bound.
    shares = shares.map((one) => ({ ...one, share: one.share + RELAXATION * (shareIn(asked, one) - one.share) }));
  }
  const result = await traceDescription(withShares(split, shares), options);
  return { result, steps, settled };
}

/** A weak pump needs a single turn. */
function atRest(before: SaturationStep | undefined, now: SaturationStep): boolean {
  if (before === undefined) return true;
  return Math.abs(now.exitPhotonFraction - before.exitPhotonFraction) <= (now.standardError ?? 0);
}

/** Each part of a medium with dye gets a medium of its own, named after both where several share one. */
function withOwnMedia(description: Description): Description {
  const media = new Map(description.media);
  const parts = description.parts.map((part) => {
    const medium = description.media.get(part.medium);
    const shared = description.parts.filter((other) => other.medium === part.medium).length > 1;
    if (medium === undefined || medium.dyes.length === 0 || !shared) return part;
    const name = `${medium.name} of ${part.name}`;
    media.set(name, { ...medium, name });
    return { ...part, medium: name };
  });
  return { ...description, media, parts };
}

const dyedMedia = ({ media, parts }: Description): MediumDescription[] =>
  [...new Set(parts.map(({ medium }) => medium))].flatMap((name) => media.get(name) ?? []);

const sharesOf = (description: Description): GroundShare[] =>
  dyedMedia(description).flatMap(({ name, dyes }) => dyes.map((dye) => ({ medium: name, dye: dye.name, share: 1 })));

function withShares(description: Description, shares: readonly GroundShare[]): Description {
  const media = new Map(description.media);
  for (const medium of dyedMedia(description)) {
    const dyes = medium.dyes.map((dye) => {
      const share = shareIn(shares, { medium: medium.name, dye: dye.name });
      return { ...dye, groundShare: share, absorption: (nm: number) => share * dye.absorption(nm) };
    });
    media.set(medium.name, { ...medium, dyes });
  }
  return { ...description, media };
}

const shareIn = (shares: readonly GroundShare[], { medium, dye }: Pick<GroundShare, 'medium' | 'dye'>): number =>
  shares.find((one) => one.medium === medium && one.dye === dye)?.share ?? 1;

function askedShares({ description, tallies }: TraceResult): GroundShare[] {
  return dyeExcitations(description, tallies).map((one) => ({
    medium: one.medium.name,
    dye: one.dye.name,
    share: meanGroundShare(one) ?? 1,
  }));
}

function exitFraction({ tallies: { moments, slots } }: TraceResult) {
  const at = 2 * slots.length + FIGURE.exitPhotons;
  const { histories, batches, sum, sumSquares } = moments;
  const exitPhotonFraction = sum[at] / histories;
  const variance = batches > 1 ? (sumSquares[at] - sum[at] ** 2 / histories) / (batches - 1) : null;
  return {
    exitPhotonFraction,
    standardError: variance === null ? null : Math.sqrt(Math.max(0, variance) / histories),
  };
}
