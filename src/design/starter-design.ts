/** The design that `stokeswell new` writes: small, complete, and explained line by line. */
export const starterDesign = (): string => STARTER;

const STARTER = `# yaml-language-server: $schema=./design.schema.json
# A design file. Every quantity carries a unit and may be arithmetic over dials, such as depth / 2 + 1 mm.
#   stokeswell check FILE    says what is wrong with it, all at once
#   stokeswell trace FILE    follows the light
# The numbers are invented. Cautions: banks of this power are class 4 lasers, and ethanol burns; follow your local
# rules and have people with the licence for such work look at what you build.

design: Two-bank box cell, green
about: >
  A green strobe that inspects cloth on a loom. Two banks of blue laser diodes pump a dye solution through its long
  sides; the light leaves upward through a window.

# Dials: named quantities. Studies turn them; fields use them by name. A minus after a name needs spaces around it.
dials:
  strength: 0.20 mmol/L # of the dye; mg/L works too
  depth: 8 mm # of the liquid, from the floor to the window
  bank-power: 60 W # optical, of each bank

# Media: what parts are filled with. Also: { solid: pmma }, { index: 1.36 }, or the bare name of a library material.
media:
  bath: { solvent: ethanol, pH: 11, dyes: { fluorescein: strength } }
  window: borosilicate-crown

# Finishes: what faces do to light. A face without one is clear; \`clear\` and \`black\` are always there.
finishes:
  blue-pass: { dichroic: { edge: 490 nm, width: 4 nm, passes: below, transmits: 95 %, reflects: 98 % } }
  silvered: { mirror: 94 % }

# Parts: closed solids, placed by their centres (at: [x, y, z]) or against a face of an earlier part. Where parts
# overlap, the later one wins. A box has the faces left, right (along x), front, back (along y), bottom, top (along z).
parts:
  cell:
    box: [20 mm, 8 mm, depth]
    medium: bath
    faces: { front: blue-pass, back: blue-pass, left: silvered, right: silvered, bottom: silvered }
  lid:
    box: [20 mm, 8 mm, 1 mm]
    medium: window
    against: cell.top

# Pumps: here banks of 6 x 4 diodes that look at the two long sides. The divergence is [fast, slow], full width at
# half maximum, behind the collimating lenses.
pumps:
  front-bank:
    diodes: { across: 6, along: 4, pitch: [3 mm, 1.6 mm] }
    power: bank-power
    wavelength: 445 nm
    linewidth: 2 nm
    divergence: [2 deg, 4 deg]
    toward: cell.front
    distance: 40 mm
    wall-plug: 32 %
    driver: 90 %
  back-bank:
    diodes: { across: 6, along: 4, pitch: [3 mm, 1.6 mm] }
    power: bank-power
    wavelength: 445 nm
    linewidth: 2 nm
    divergence: [2 deg, 4 deg]
    toward: cell.back
    distance: 40 mm
    wall-plug: 32 %
    driver: 90 %

# Where light becomes output: part.face, or the name of a detector.
exit: lid.top

# What a trace does when the command line does not say otherwise.
trace: { histories: 200000, seed: loom }
`;
