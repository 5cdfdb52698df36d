import type { DetectorDescription, DetectorTarget, FinishDescription } from '../design/description.js';
import { effectiveSize, projectedSolidAngle } from '../outcome/effective-etendue.js';
import { radianceArray } from '../outcome/radiance.js';
import type { RunTallies } from '../tallies/run-tallies.js';
import { EV_NM } from '../units/constants.js';
import { compare } from './judge-case.js';
import type { Proof, ProofCase, ProofContext } from './proof.js';
import {
  cell,
  detector,
  dye,
  EMISSION_NM,
  ENDLESS,
  lambertianDisc,
  lambertianSquare,
  medium,
  PUMP_NM,
  part,
  pump,
  thinBeam,
  twoColour,
} from './proof-cells.js';
import { traceCell } from './trace-cell.js';

const BANDS = 12;
const RADIUS_MM = 10;
/** Off the centre by this much, an isotropic source lights a sphere by the inverse square and the cosine of incidence. */
const OFF_CENTRE_MM = 4;
const GLASS = 1.5;

const sphere = (radius: number): DetectorTarget => ({
  kind: 'sphere',
  centre: [0, 0, 0],
  radius,
  axis: [0, 0, 1],
  polar: [0, Math.PI],
});
/** Something for the design to hold, out of the way of all light. */
const post = part('post', 'air', { kind: 'box', size: [1, 1, 1] }, { at: [0, 0, -40], faces: { '*': 'black' } });

export const detectorProof: Proof = {
  name: 'Detectors',
  law: 'inverse square and cosine law on spheres; radiance of a Lambertian, through an interface, of a beam; étendue',
  source:
    'Lambert’s cosine law, L/n² invariance: Born & Wolf, Principles of Optics, §4.8 (from memory); solid angles in closed form',
  status: 'exact',
  async run(context) {
    return [
      ...(await lambertian(context)),
      ...(await isotropic(context, 0)),
      ...(await isotropic(context, OFF_CENTRE_MM)),
      ...(await interfaceRadiance(context)),
      ...(await beam(context)),
    ];
  },
};

/** Light of each polar band of a sphere detector over all of it. */
function bandShares(tallies: RunTallies, where: string, nm: number) {
  const map = tallies.maps.find((one) => one.where === where);
  const energy = map === undefined ? [] : Array.from(map.energy[0], (ev, i) => ev + map.energy[1][i]);
  const total = energy.reduce((a, b) => a + b, 0);
  const photons = total / (EV_NM / nm);
  const share = (from: number, to: number) => {
    const value = energy.slice(from, to).reduce((a, b) => a + b, 0) / total;
    // One photon a history: the count is binomial; the net of starting points only makes the true error smaller.
    return { value, standardError: Math.sqrt((value * (1 - value)) / photons) };
  };
  return { share, total, area: map?.measure.reduce((a, b) => a + b, 0) ?? Number.NaN };
}

const edge = (band: number): number => (Math.PI * band) / BANDS;
const degrees = (band: number): number => (180 * band) / BANDS;

/** Small Lambertian at the centre: the light between two polar angles goes with sin². */
async function lambertian(context: ProofContext): Promise<ProofCase[]> {
  const tallies = await traceCell(
    context,
    cell('small Lambertian in a sphere', {
      media: [],
      parts: [post],
      pumps: [pump([0, 0, 0], [0, 0, 1], lambertianDisc(1e-4))],
      detectors: [detector('ball', sphere(RADIUS_MM), [1, BANDS]), detector('all', sphere(2 * RADIUS_MM))],
      exit: 'all',
    }),
    0.3,
  );
  const { share } = bandShares(tallies, 'ball', PUMP_NM);
  return [0, 1, 3, 5, 6].map((band) =>
    compare(
      `share of a small Lambertian’s light from ${degrees(band)}° to ${degrees(band + 1)}° on a sphere`,
      'sin² θ₂ − sin² θ₁; 0 behind',
      share(band, band + 1),
      band < BANDS / 2 ? Math.sin(edge(band + 1)) ** 2 - Math.sin(edge(band)) ** 2 : 0,
      1e-4,
    ),
  );
}

/** Small dyed ball of index 1, on the axis of the sphere. The light up to polar angle θ fills the cone under which the source sees it. */
async function isotropic(context: ProofContext, offCentre: number): Promise<ProofCase[]> {
  const ball = part('speck', 'dyed', { kind: 'sphere', radius: 0.002 }, { at: [0, 0, offCentre] });
  const tallies = await traceCell(
    context,
    cell(`isotropic source ${offCentre} mm off the centre`, {
      media: [medium('dyed', 1, { dyes: [dye('dye', twoColour(1e5, 0), 1)] })],
      parts: [ball],
      pumps: [pump([0, 0, offCentre - 1], [0, 0, 1], thinBeam(5e-4))],
      detectors: [
        detector('near', sphere(RADIUS_MM), [1, BANDS]),
        detector('far', sphere(2 * RADIUS_MM), [1, BANDS]),
        detector('all', sphere(3 * RADIUS_MM)),
      ],
      exit: 'all',
    }),
    0.3,
  );
  const near = bandShares(tallies, 'near', EMISSION_NM);
  const far = bandShares(tallies, 'far', EMISSION_NM);
  const within = (theta: number) => {
    const along = RADIUS_MM * Math.cos(theta) - offCentre;
    return (1 - along / Math.hypot(along, RADIUS_MM * Math.sin(theta))) / 2;
  };
  const bands = offCentre === 0 ? [0, 5, 11] : [0, 2, 5, 8, 11];
  return [
    ...bands.map((band) =>
      compare(
        `share of an isotropic source’s light, ${offCentre} mm off the centre, from ${degrees(band)}° to ${degrees(band + 1)}° on a sphere of ${RADIUS_MM} mm`,
        '(cos ψ₁ − cos ψ₂)/2 at the source',
        near.share(band, band + 1),
        within(edge(band + 1)) - within(edge(band)),
        1e-3,
      ),
    ),
    compare(
      `mean irradiance on spheres of ${RADIUS_MM} mm and ${2 * RADIUS_MM} mm, source ${offCentre} mm off the centre`,
      'inverse square: 4',
      { value: near.total / near.area / (far.total / far.area), standardError: 0 },
      4,
      1e-6,
    ),
  ];
}

/** Passes everything that is not totally reflected, so that only refraction acts. */
const PASS: FinishDescription = {
  name: 'pass',
  path: ['finishes', 'pass'],
  kind: 'dichroic',
  edgeNm: 600,
  widthNm: 0,
  passes: 'below',
  transmits: 1,
  reflects: 1,
  absorbs: 0,
};

/** Even Lambertian light in glass and once it has left it: the same at all angles, and smaller by n² outside. */
async function interfaceRadiance(context: ProofContext): Promise<ProofCase[]> {
  const plane = (name: string, z: number): DetectorDescription => ({
    ...detector(name, {
      kind: 'plane',
      at: [0, 0, z],
      normal: [0, 0, 1],
      outline: { kind: 'rectangle', size: [1, 1] },
    }),
    radiance: [1, 1, 6, 1],
  });
  const tallies = await traceCell(
    context,
    cell('radiance through an interface', {
      media: [medium('glass', GLASS)],
      finishes: [PASS],
      parts: [
        part(
          'slab',
          'glass',
          { kind: 'box', size: [1, 1, 2] },
          { faces: { ...ENDLESS, bottom: 'black', top: 'pass' } },
        ),
      ],
      pumps: [pump([0, 0, -0.5], [0, 0, 1], lambertianSquare(1))],
      detectors: [plane('inside', 0), plane('outside', 1), detector('all', sphere(RADIUS_MM))],
      exit: 'all',
    }),
    0.5,
  );
  // A pump of 1 W over 1 mm²: M/π.
  const even = 1e6 / Math.PI;
  const cases = (['inside', 'outside'] as const).flatMap((where) => {
    const { values, counts, etendue } = radianceOf(tallies, where);
    const inside = where === 'inside';
    return [
      ...[0, 2, 4].map((row) =>
        compare(
          `radiance ${inside ? 'in glass' : 'beyond its face'}, ${15 * row}° to ${15 * (row + 1)}° from the normal, W/(m² sr)`,
          inside ? 'M/π at every angle' : 'M/(π n²): L/n² stays',
          { value: values[row], standardError: values[row] / Math.sqrt(counts[row]) },
          inside ? even : even / GLASS ** 2,
        ),
      ),
      compare(
        `effective étendue ${inside ? 'in glass' : 'beyond its face'} over that of a half space`,
        '1',
        etendue(Math.PI),
        1,
      ),
    ];
  });
  return cases;
}

/** Parallel light fills one cell of direction. */
async function beam(context: ProofContext): Promise<ProofCase[]> {
  const square = { kind: 'rectangle', size: [2, 2] } as const;
  const tallies = await traceCell(
    context,
    cell('parallel beam', {
      media: [],
      parts: [post],
      pumps: [pump([0, 0, -1], [0, 0, 1], { kind: 'patch', outline: square, divergence: [0, 0] })],
      detectors: [
        {
          ...detector('window', { kind: 'plane', at: [0, 0, 0], normal: [0, 0, 1], outline: square }),
          radiance: [1, 1, 18, 1],
        },
        detector('all', sphere(RADIUS_MM)),
      ],
      exit: 'all',
    }),
    0.1,
  );
  const cone = Math.sin((5 * Math.PI) / 180) ** 2;
  const { values, etendue } = radianceOf(tallies, 'window');
  return [
    compare(
      'radiance of a parallel beam in the cell round the normal, 0° to 5°, W/(m² sr)',
      'P/(A π sin² 5°)',
      { value: values[0], standardError: 0 },
      1e6 / (4 * Math.PI * cone),
      1e-3,
    ),
    compare('effective étendue of a parallel beam over A π sin² 5°', '1', etendue(4 * Math.PI * cone), 1),
  ];
}

function radianceOf(tallies: RunTallies, where: string) {
  const recorded = tallies.radiance.find((one) => one.where === where);
  if (recorded === undefined) throw new Error(`no radiance at ${where}`);
  const [, , polar, azimuth] = recorded.shape;
  const wattsPerEv = PUMP_NM / EV_NM / tallies.moments.histories;
  const step = Math.PI / 2 / polar;
  const size = (row: number) => recorded.measure[0] * projectedSolidAngle(row * step, (row + 1) * step, azimuth);
  const filled = effectiveSize(recorded.energy, size);
  return {
    values: radianceArray(recorded, wattsPerEv).values,
    counts: Array.from(recorded.energy[0], (ev, i) => ((ev + recorded.energy[1][i]) * PUMP_NM) / EV_NM),
    /** Effective étendue as a share of `of`, mm² sr. */
    etendue: (of: number) => ({
      value: (filled?.value ?? Number.NaN) / of,
      standardError: (filled?.standardError ?? Number.NaN) / of,
    }),
  };
}
