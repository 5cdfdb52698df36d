import { beamSpreadProof } from './beam-spread-proof.js';
import { beerLambertProof } from './beer-lambert-proof.js';
import { birksProof } from './birks-proof.js';
import { bleachingProof } from './bleaching-proof.js';
import { brightnessProof } from './brightness-proof.js';
import { detectorProof } from './detector-proof.js';
import { diffuseFresnelProof } from './diffuse-fresnel-proof.js';
import { energyProof } from './energy-proof.js';
import { escapeConeProof } from './escape-cone-proof.js';
import { fresnelProof } from './fresnel-proof.js';
import { glassPlateProof } from './glass-plate-proof.js';
import { glassSphereProof } from './glass-sphere-proof.js';
import { halfSpaceProof } from './half-space-proof.js';
import { innerFilterProof } from './inner-filter-proof.js';
import { integratingSphereProof } from './integrating-sphere-proof.js';
import { lensProof } from './lens-proof.js';
import { lightBoxProof } from './light-box-proof.js';
import { meanChordProof } from './mean-chord-proof.js';
import { meshProof } from './mesh-proof.js';
import { metalMirrorProof } from './metal-mirror-proof.js';
import { mixingRodProof } from './mixing-rod-proof.js';
import { mixtureProof } from './mixture-proof.js';
import { overlapProof } from './overlap-proof.js';
import { parallelBeamProof } from './parallel-beam-proof.js';
import { photometryProof } from './photometry-proof.js';
import { polarisedLightProof } from './polarised-light-proof.js';
import { polarisingFilmsProof } from './polarising-films-proof.js';
import { prismProof } from './prism-proof.js';
import type { Proof } from './proof.js';
import { quenchingProof } from './quenching-proof.js';
import { reciprocityProof } from './reciprocity-proof.js';
import { reflectorProof } from './reflector-proof.js';
import { saturationProof } from './saturation-proof.js';
import { scatteringMediumProof } from './scattering-medium-proof.js';
import { slabProof } from './slab-proof.js';
import { surfaceScatterProof } from './surface-scatter-proof.js';
import { thinFilmProof } from './thin-film-proof.js';
import { trappedLightProof } from './trapped-light-proof.js';
import { twoColourSlabProof } from './two-colour-slab-proof.js';
import { viewFactorProof } from './view-factor-proof.js';

/** Every proof, from single laws to whole cells. */
export const allProofs: readonly Proof[] = [
  beerLambertProof,
  energyProof,
  overlapProof,
  saturationProof,
  bleachingProof,
  fresnelProof,
  diffuseFresnelProof,
  metalMirrorProof,
  polarisedLightProof,
  thinFilmProof,
  polarisingFilmsProof,
  prismProof,
  lensProof,
  reflectorProof,
  beamSpreadProof,
  surfaceScatterProof,
  viewFactorProof,
  detectorProof,
  meanChordProof,
  parallelBeamProof,
  meshProof,
  escapeConeProof,
  trappedLightProof,
  glassSphereProof,
  glassPlateProof,
  slabProof,
  halfSpaceProof,
  twoColourSlabProof,
  birksProof,
  innerFilterProof,
  quenchingProof,
  brightnessProof,
  mixtureProof,
  scatteringMediumProof,
  integratingSphereProof,
  lightBoxProof,
  mixingRodProof,
  reciprocityProof,
  photometryProof,
];
