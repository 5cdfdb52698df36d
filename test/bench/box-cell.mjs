/** The box that hand-box.mjs is written for, as a description for the general kernel: green dye between two dichroic sides, lid of glass. */
const flat = (value) => () => value;
const place = (placement) => ({ at: [0, 0, 0], turns: [], against: null, ...placement });

function medium(name, kind, index, dyes = []) {
  return {
    name,
    path: [],
    kind,
    base: name,
    index: flat(index),
    absorption: flat(0),
    dyes,
    scatterers: [],
    thermal: null,
  };
}

function molarAbsorption(nm) {
  if (nm < 500) return nm < 470 ? 8000 : 8000 + (nm - 470) * 2800;
  return 92000 * Math.exp(-(((nm - 500) / 16) ** 2));
}

const dye = {
  name: 'dye',
  concentration: 2e-4,
  absorption: (nm) => Math.LN10 * 0.0002 * 0.1 * molarAbsorption(nm),
  quantumYield: 0.95,
  lifetimeNs: 4,
  emission: { kind: 'spectrum', photonsPerNm: (nm) => Math.exp(-(((nm - 525) / 20) ** 2)), fromNm: 490, toNm: 620 },
};

function box(name, mediumName, size, placement, faces) {
  const piece = { name: null, path: [], shape: { kind: 'box', size }, at: [0, 0, 0], turns: [], minus: [] };
  const finished = Object.entries(faces).map(([face, finish]) => ({ face, finish, path: [] }));
  return { name, path: [], medium: mediumName, pieces: [piece], placement: place(placement), faces: finished };
}

function pump(face) {
  return {
    name: face,
    path: [],
    power: 60,
    wavelengthNm: 445,
    linewidthNm: 0,
    wallPlug: null,
    driver: null,
    aim: { kind: 'toward', face: `cell.${face}`, distance: 40, shift: [0, 0], tilt: [0, 0] },
    beam: { kind: 'patch', outline: { kind: 'rectangle', size: [12, 5] }, divergence: [0, 0] },
  };
}

const dichroic = {
  kind: 'dichroic',
  edgeNm: 480,
  widthNm: 0,
  passes: 'below',
  transmits: 0.95,
  reflects: 0.98,
  absorbs: 0,
};
const finishes = { clear: { kind: 'clear' }, dichroic, silver: { kind: 'mirror', reflectance: 0.95 } };
const mirrored = { front: 'dichroic', back: 'dichroic', left: 'silver', right: 'silver', bottom: 'silver' };
const onCell = { face: 'cell.top', with: null, shift: [0, 0], gap: 0, path: [] };

export const boxCell = {
  title: 'Box for the yardstick',
  about: null,
  dials: [],
  media: new Map([
    ['air', medium('air', 'gas', 1)],
    ['glass', medium('glass', 'solid', 1.52)],
    ['bath', medium('bath', 'liquid', 1.364, [dye])],
  ]),
  surroundings: 'air',
  finishes: new Map(Object.entries(finishes).map(([name, finish]) => [name, { name, path: [], ...finish }])),
  parts: [box('cell', 'bath', [20, 8, 8], {}, mirrored), box('lid', 'glass', [20, 8, 1], { against: onCell }, {})],
  pumps: [pump('front'), pump('back')],
  detectors: [],
  exit: { name: 'lid.top', path: [], pixels: null },
  defaults: { histories: null, precision: null, seed: null, voxels: null },
};
