import { mixSolvents } from '../design/mix-solvents.js';
import { foersterRadius, overlapIntegral } from '../materials/foerster-radius.js';
import { readDye } from '../materials/library.js';
import { compare } from './judge-case.js';
import type { Proof } from './proof.js';

/** Mass share of ethanol in water; index at 589 nm, 20 °C, as handbooks print it. */
const INDICES = [
  [0.2, 1.3469],
  [0.5, 1.3616],
  [0.8, 1.3658],
] as const;
/** What the rule itself misses, with the true density. */
const RULE = 2.5e-3;
/** Densities at 20 °C, g/mL. */
const [ETHANOL, WATER] = [0.7893, 0.9982];

const exactly = (value: number) => ({ value, standardError: 0 });

export const mixtureProof: Proof = {
  name: 'Index of ethanol in water; Förster radius',
  law: '(n² − 1)/(n² + 2) adds up by volume; R₀ = 0.02108 (κ²φ n⁻⁴ J)^(1/6) nm',
  source:
    'handbook of chemistry and physics, aqueous ethanol (from memory); radius of rhodamine 6G: Bojarski et al., Chem. Phys. 210 485 (1996), 5.5 to 5.8 nm (from memory)',
  status: 'memory',
  async run() {
    const indices = INDICES.map(([mass, index]) => {
      const volume = mass / ETHANOL / (mass / ETHANOL + (1 - mass) / WATER);
      const mixed = mixSolvents([
        { solvent: 'ethanol', share: volume },
        { solvent: 'water', share: 1 - volume },
      ]);
      const label = `index at 589 nm, ${100 * mass} % ethanol by mass`;
      return compare(label, 'handbook', exactly(mixed.index(589.3)), index, RULE);
    });
    const { emission, extinction, quantumYield } = readDye('rhodamine-6g', 'ethanol');
    const overlap = overlapIntegral(emission.photonsPerNm, extinction, emission.fromNm, emission.toNm);
    const radius = foersterRadius(overlap, quantumYield, 1.3614);
    return [
      ...indices,
      compare('R₀ of rhodamine 6G to itself, nm', 'middle of 5.5 to 5.8', exactly(radius), 5.65, 0.15),
    ];
  },
};
