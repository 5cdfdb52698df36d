/** Light, dyes and heat: what the figures rest on. */
import { type Question, type TermText, termsOf } from './term.js';

const CIE_VOCABULARY = 'CIE S 017 International Lighting Vocabulary (from memory)';
const IUPAC = 'IUPAC glossary of terms in photochemistry, 2007 (from memory)';

const OUT = {
  'wall-plug-efficiency': {
    name: 'wall-plug efficiency',
    also: ['wall-plug', 'wallPlug'],
    means: 'light out of a diode per electrical watt into it',
    formula: 'optical power ÷ electrical power of the diode',
    assumes: 'given in the design; at its working current and temperature',
    source: 'common practice, no source',
  },
  driver: {
    name: 'driver efficiency',
    also: ['driver'],
    means: 'share of the wall’s watts that reaches the diodes',
    formula: 'electrical power of the diodes ÷ power from the wall',
    assumes: 'given in the design; not stated counts as lossless',
    source: 'common practice, no source',
  },
  'wall-to-lumens': {
    name: 'chain from wall to lumens',
    also: ['wall to lumens', 'chain', 'From the wall socket to lumens'],
    means: 'what each step makes of the watts it is given, as factors',
    formula: 'wall × driver and diode × dye takes up × gives back × exit × eye',
    assumes: 'factors are quotients of figures and ledger sums of this run',
    source: 'bookkeeping of this program',
  },
  'direct-emitters': {
    name: 'direct emitters',
    also: ['typical', 'same wall power in other hands'],
    means: 'what green and white emitters make of the same wall power',
    formula: 'efficiency × driver × 683.002 lm/W × V(λ); white: its own lm/W',
    assumes: 'typical products of the early 2020s; not of this run',
    source: 'common practice, from memory',
  },
  etendue: {
    name: 'étendue',
    also: ['etendue', 'throughput of light'],
    means: 'area times solid angle a light fills; optics cannot shrink it',
    formula: 'G = n² A π sin² θ, for a flat face and a cone of half angle θ',
    assumes: 'no figure of this version; a dye may shrink it, at a cost in heat',
    source: CIE_VOCABULARY,
  },
  'solid-angle': {
    name: 'solid angle',
    also: ['sr', 'steradian'],
    means: 'how much of all directions, sr; all of them are 4π',
    formula: 'Ω = Δφ (cos θ₁ − cos θ₂) for a cell of directions',
    assumes: 'θ from the normal, φ round it',
    source: 'SI Brochure, 9th edition, 2019',
  },
  'luminous-efficacy-of-radiation': {
    name: 'lumens per watt of light',
    also: ['efficacy of radiation', 'seen by the eye'],
    means: 'how bright the eye finds a watt of this light, lm/W',
    formula: 'luminous flux ÷ exit power',
    assumes: 'at most 683.002 lm/W, at 555 nm',
    source: 'CIE 018:2019',
  },
  'photopic-vision': {
    name: 'V(λ)',
    also: ['photopic vision', 'observer', '2° observer', 'eye curve'],
    means: 'how the eye weighs wavelengths by day',
    formula: 'V(λ) = ȳ(λ) of the CIE 1931 2° observer',
    assumes: 'daylight vision; dim light is seen bluer',
    source: 'CIE 15:2004',
  },
} satisfies Record<string, TermText>;

const WHERE = {
  ledger: {
    name: 'ledger',
    also: ['ledgers', 'photon ledger', 'watt ledger'],
    means: 'table of all fates, once of the photons and once of the watts',
    formula: 'Σ of all rows = 1 within 10⁻¹², or the run fails',
    assumes: 'fates are exhaustive and exclude one another',
    source: 'conservation of energy',
  },
  fate: {
    name: 'fate',
    also: ['fates'],
    means: 'how a photon, or a bundle of its energy, ended',
    formula: 'none',
    assumes: 'each ends once; Stokes heat is left behind on the way',
    source: 'word of this program',
  },
  'win-back': {
    name: 'to win back',
    also: ['what could be won back', 'largest losses'],
    means: 'what one finish, one dye or one way out costs in all',
    formula: 'Σ of the rows with that cause; Stokes heat left out',
    assumes: 'mending it wins back less: the light meets the next loss',
    source: 'bookkeeping of this program',
  },
  absorbance: {
    name: 'absorbance',
    also: ['optical density', 'extinction'],
    means: 'how much a layer dims light, in powers of ten',
    formula: 'A = ε c d; passed = 10^−A; absorption μ = ln 10 × ε c',
    assumes: 'molecules apart from one another and not saturated',
    source: IUPAC,
  },
  'molar-extinction': {
    name: 'molar extinction',
    also: ['molar absorption coefficient', 'extinction coefficient'],
    means: 'how strongly a dye absorbs per strength and length, L/(mol cm)',
    formula: 'ε(λ), from the library or the design; linear between points',
    assumes: 'in the solvent it was measured in, at 25 °C',
    source: IUPAC,
  },
  strength: {
    name: 'strength',
    also: ['concentration', 'mmol/L'],
    means: 'how much dye a liquid holds, mol/L or mg/L',
    formula: 'c = mass per litre ÷ molar mass',
    assumes: 'evenly dissolved; above about 1 mmol/L dyes quench themselves',
    source: 'definition',
  },
  'depth-1e': {
    name: '1/e depth',
    also: ['penetration depth', 'depth'],
    means: 'depth at which 1/e, some 37 %, of the light is left',
    formula: '1 ÷ μ, with μ of solvent and dyes together',
    assumes: 'straight on, no reflection',
    source: 'Beer–Lambert law',
  },
  'beer-lambert': {
    name: 'Beer–Lambert law',
    means: 'how light dies away along its path in what absorbs',
    formula: 'passed = exp(−μ s), μ = Σ ln 10 × ε c + μ of the solvent',
    assumes: 'a photon’s absorber is drawn in proportion to its share of μ',
    source: 'Bouguer 1729, Lambert 1760, Beer 1852 (from memory)',
  },
  'quantum-yield': {
    name: 'quantum yield',
    also: ['fluorescence yield', 'yield'],
    means: 'chance that a dye gives back a photon it absorbed',
    formula: 'photons emitted ÷ photons absorbed',
    assumes: 'the same at all wavelengths and strengths',
    source: IUPAC,
  },
  'stokes-shift': {
    name: 'Stokes shift',
    means: 'how much redder a dye emits than it absorbs',
    formula: 'λ of peak emission − λ of peak absorption',
    assumes: 'a small one means that the dye takes its own light back',
    source: IUPAC,
  },
  fresnel: {
    name: 'Fresnel’s law',
    also: ['Fresnel reflection', 'clear'],
    means: 'how much a bare boundary reflects, by angle and index',
    formula: 'R = (R_s + R_p)/2; 1 beyond the critical angle asin(n₂/n₁)',
    assumes: 'smooth, no interference; see polarisation',
    source: 'Born & Wolf, Principles of Optics, 7th ed., 1999 (from memory)',
  },
  'total-internal-reflection': {
    name: 'total internal reflection',
    also: ['TIR', 'critical angle'],
    means: 'all light is reflected that meets a thinner medium too flatly',
    formula: 'sin θ > n₂/n₁',
    assumes: 'also where a finish would pass it, but for a matt diffuser',
    source: 'Born & Wolf, Principles of Optics, 7th ed., 1999 (from memory)',
  },
  'refractive-index': {
    name: 'refractive index',
    also: ['index', 'dispersion'],
    means: 'how much slower light goes in a medium, by wavelength',
    formula: 'n(λ), from the library’s dispersion formula or the design',
    assumes: 'relative to air, which is 1; at library temperature',
    source: 'the source named in the library',
  },
} satisfies Record<string, TermText>;

const SURVIVE = {
  'heat-share': {
    name: 'heat share',
    also: ['of absorbed pump power is heat'],
    means: 'share of the absorbed pump watts that becomes heat in the liquid',
    formula: 'heat of all kinds in dyed parts ÷ absorbed pump power',
    assumes: 'the same everywhere in the cell',
    source: 'bookkeeping of this program',
  },
  'boiling-point': {
    name: 'boiling point',
    means: 'temperature at which the liquid boils, °C',
    formula: 'of the bare solvent, from the library',
    assumes: '101.325 kPa; a closed cell boils later and holds pressure',
    source: 'the source named in the library',
  },
  'flash-point': {
    name: 'flash point',
    also: ['flammable'],
    means: 'temperature above which a liquid’s vapour can catch fire',
    formula: 'of the bare solvent, from the library; up to 60 °C: flammable',
    assumes: 'follow your local codes and licensed practice',
    source: 'UN Globally Harmonized System, chapter 2.6 (from memory)',
  },
  'laser-class': {
    name: 'laser class',
    also: ['class 4', 'class 3B'],
    means: 'how a laser can hurt: class 4 burns, blinds and starts fires',
    formula: 'steady visible light above 500 mW: class 4',
    assumes: 'whole pump power in one beam; follow local codes',
    source: 'IEC 60825-1',
  },
  cautions: {
    name: 'cautions',
    means: 'how what this design uses can hurt people',
    formula: 'by pump power, solvents and dyes',
    assumes: 'no substitute for safety data sheets, local codes and training',
    source: 'the library’s safety table, each figure with its source',
  },
  saturation: {
    name: 'saturation',
    also: ['bleaching', 'photobleaching'],
    means: 'a dye pumped so hard that it runs out of molecules to excite',
    formula: 'not computed in this version',
    assumes: 'pumps are weak enough, and the dye does not fade',
    source: 'none',
  },
} satisfies Record<string, TermText>;

const of = (question: Question) => () => question;

export const LIGHT_TERMS = [
  ...termsOf(of('out'), OUT),
  ...termsOf(of('where'), WHERE),
  ...termsOf(of('survive'), SURVIVE),
];
