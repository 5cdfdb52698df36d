/**
 * The scene: what the kernel reads. Flat typed arrays only, over shared memory, so that threads see one copy.
 * Numbers of slots and kinds are const enums: the build writes them into the kernel as literals, where imported objects would be looked up.
 * Lengths in mm; spectral tables are indexed [thing · wavelengths + wavelength index].
 */
export const SCENE_VERSION = 3;

/** Index of the surroundings among owners; part i of the design is owner i + 1. */
export const SURROUNDINGS = 0;

/** How a finish decides between reflection, transmission and absorption. */
export const enum SPLIT {
  fresnel = 0,
  spectral = 1,
  metal = 2,
  table = 3,
  stack = 4,
}
/** Blocks of a stack's table (film-table.ts): of angles, and wavelengths to a group. */
export const enum FILM {
  blocks = 16,
  group = 8,
  /** Numbers at each node where light is unpolarised: share transmitted, share absorbed. */
  channels = 2,
}
/** Numbers at each node where polarisation is carried: shares, and products of the amplitude of s and the conjugate of that of p. */
export const enum POLARISED_FILM {
  transmittedS = 0,
  transmittedP = 1,
  absorbedS = 2,
  absorbedP = 3,
  reflectedReal = 4,
  reflectedImaginary = 5,
  transmittedReal = 6,
  transmittedImaginary = 7,
  COUNT = 8,
}
/** Where reflected or transmitted light goes. */
export const enum SPREAD {
  specular = 0,
  lambertian = 1,
  gaussian = 2,
  topHat = 3,
  /** The same with two widths, along the face's u and v. */
  gaussianOval = 4,
  topHatOval = 5,
  /** By a table of both directions. */
  table = 6,
}
/** Integers per finish in `scatterHead`: numbers of entries, and places in `scatterNumbers`. */
export const enum SCATTER {
  incidences = 0,
  /** Cells of the outward hemisphere: polar × azimuth. */
  polarCells = 1,
  azimuthCells = 2,
  /** Angles of incidence, rad. */
  incidence = 3,
  /** Edges of the cells: sin² of the polar angle; azimuth, rad. */
  polar = 4,
  azimuth = 5,
  /** Share reflected at each incidence; cumulative shares of its cells. */
  reflected = 6,
  reflectedCells = 7,
  transmitted = 8,
  transmittedCells = 9,
  STRIDE = 10,
}
/** What directions in a scattering medium are drawn from. */
export const enum PHASE {
  /** Steps of equal probability in a table of cosines. */
  cells = 1024,
  /** In place of a table: the law of Henyey and Greenstein. */
  henyeyGreenstein = -1,
}
export const enum BEAM {
  patch = 0,
  gaussian = 1,
  lambertian = 2,
  diodes = 3,
  rays = 4,
}
export const enum OUTLINE {
  rectangle = 0,
  disc = 1,
}

/** Slots of a face's fates, counted from `faceSlot[face]`. */
export const enum FACE_SLOT {
  reflectedAtEntry = 0,
  leftPump = 1,
  leftEmitted = 2,
  absorbedPump = 3,
  absorbedEmitted = 4,
  COUNT = 5,
}
/** Slots of an owner's fates, counted from `ownerSlot[owner]`. */
export const enum OWNER_SLOT {
  bulkPump = 0,
  bulkEmitted = 1,
  trappedPump = 2,
  trappedEmitted = 3,
  COUNT = 4,
}
/** Slots of one dye in one owner, counted from `dyeSlot[owner · maxAbsorbers + absorber]`. */
export const enum DYE_SLOT {
  lostPump = 0,
  lostEmitted = 1,
  stokesPump = 2,
  stokesEmitted = 3,
  quenchedPump = 4,
  quenchedEmitted = 5,
  COUNT = 6,
}
/** Slots that every scene has. */
export const enum SLOT {
  missed = 0,
  exitPump = 1,
  exitEmitted = 2,
}

/** Doubles per pump in `pumps`. */
export const enum PUMP {
  originX = 0, // origin of the beam, mm
  axisU = 3, // unit vectors
  axisV = 6,
  axisW = 9, // direction of the beam
  sizeU = 12, // full width, or radius of a disc or Gaussian, mm
  sizeV = 13,
  spreadU = 14, // patch, diodes: standard deviation of the angle, rad; Gaussian = 1/e² half angle / 2
  spreadV = 15,
  across = 16,
  along = 17,
  pitchU = 18,
  pitchV = 19,
  lensPower = 20, // 1/focal length, 1/mm, 0 without lens
  lensDistance = 21,
  fieldX = 22, // unit vector of the electric field across the beam; 0, 0, 0: unpolarised
  rows = 25, // of a stack; pitch along v, and how much further back each starts, mm
  rowPitch = 26,
  rowStep = 27,
  STRIDE = 28,
}

/** Doubles per recorder in `recorderFrame`. */
export const enum RECORDER {
  originX = 0,
  stepU = 3, // unit axis u divided by the cell width, so that a dot product gives the cell
  stepV = 6,
  axisN = 9, // outward normal at the centre: axis of the angular map
  axisU = 12, // unit axes for the azimuth
  axisV = 15,
  STRIDE = 18,
}
/** Shapes of recorders. */
export const enum WRAP {
  flat = 0,
  /** Side of a cylinder or cone: u is the azimuth about the axis in axisN, v the height. */
  side = 1,
  /** Sphere: u is the azimuth about axisN from axisU, v the polar angle. */
  sphere = 2,
}
/** Kinds of outward normal. */
export const enum NORMAL {
  flat = 0,
  ofSide = 1,
  aboutCentre = 2,
}
/** Doubles per recorder in `recorderNormal`. */
export const enum LOCAL_NORMAL {
  /** NORMAL. */
  kind = 0,
  centreX = 1,
  /** Parts of a side's normal along the radius and along the axis. */
  radial = 4,
  axial = 5,
  /** −1 where light leaves towards the axis or centre. */
  sign = 6,
  STRIDE = 7,
}
/** Cells of angular maps and histograms. */
export const enum CELLS {
  /** Of 90°; a recorder that looks both ways has twice as many. */
  polar = 45,
  azimuth = 72,
  absorptions = 64,
  path = 100,
}

export interface Scene {
  readonly version: number;
  readonly wavelengths: number;
  /** 1: the polarisation of light is carried. Then light is flown from boundary to boundary everywhere. */
  readonly polarised: number;

  // ---- surfaces. Families of parallel planes come first; families 0, 1, 2 are the design axes x, y, z.
  readonly families: number;
  readonly familyNormal: Float64Array; // [family · 3]
  readonly familyStart: Int32Array; // [family + 1], into planeOffset
  readonly planeOffset: Float64Array; // ascending within a family: normal · p = offset
  readonly quadrics: number;
  readonly quadric: Float64Array; // [quadric · 10]: xx yy zz xy xz yz x y z 1 of q(p), inside q < 0 (see quadric.ts)

  // ---- meshes. Those of a mesh lie together in each array; all together they are a FacetTree (numerics/mesh/facet-tree.ts).
  readonly meshes: number;
  readonly groups: number; // named groups of facets of all meshes; each is one face
  readonly meshRoot: Int32Array; // [mesh + 1]: its first node
  readonly meshFacet: Int32Array; // [mesh + 1]: its first facet
  readonly meshGroup: Int32Array; // [mesh + 1]: its first group
  readonly meshReach: Float64Array; // within this of a facet, rounding decides on which side a point lies, mm
  readonly groupMesh: Int32Array; // [group]
  readonly facetPoint: Float64Array; // [point · 3]
  readonly facetCorner: Int32Array; // [facet · 3]
  readonly facetGroup: Int32Array; // [facet]
  readonly nodeBox: Float32Array; // [node · 12]
  readonly nodeChild: Int32Array; // [node · 2]

  // ---- solids. A surface id is a plane index, or planes + quadric index, or planes + quadrics + mesh index.
  readonly primitiveStart: Int32Array; // [primitive + 1], into the three arrays below
  readonly constraintSurface: Int32Array;
  readonly constraintSide: Int8Array; // −1: inside is below the offset (q < 0), +1: above
  readonly constraintFace: Int32Array; // of a mesh the face of its first group; the others follow
  readonly pieceStart: Int32Array; // [piece + 1], into pieceMember; first member is the body, the others are taken away
  readonly pieceMember: Int32Array;
  readonly ownerPieceStart: Int32Array; // [owner + 1], into pieces; the surroundings have none
  readonly owners: number;
  readonly ownerMedium: Int32Array;

  // ---- faces
  readonly faces: number;
  readonly faceOwner: Int32Array;
  readonly faceFinish: Int32Array; // −1: none given
  readonly faceAxis: Float64Array; // [face · 3]: v of a flat face, axis of a round one: where two widths of scatter lie
  readonly faceExit: Int8Array; // 1: light that leaves here is output
  readonly faceRecorderOut: Int32Array; // light leaving through the face, −1 none
  readonly faceRecorderArriving: Int32Array; // pump light arriving from outside, −1 none
  readonly planeDetector: Int32Array; // [plane]: recorder of a free plane, −1
  readonly quadricDetector: Int32Array; // [quadric]: recorder of a free sphere, −1
  readonly detectorAperture: Float64Array; // [recorder · 2]: half widths u, v; v < 0: disc of radius u; 0: unbounded; sphere: polar angles
  readonly detectorExit: Int8Array; // [recorder]
  readonly detectorSign: Int8Array; // [recorder]: sign of the detector's normal along its family's

  // ---- media
  readonly media: number;
  readonly index: Float64Array; // [medium · wavelengths]
  readonly attenuation: Float64Array; // 1/mm, sum of all absorbers and scatterers
  readonly maxAbsorbers: number;
  readonly absorberCount: Int32Array; // [medium]; absorber 0 is the bare solvent or solid, the others are dyes
  readonly absorberShare: Float64Array; // [(medium · maxAbsorbers + absorber) · wavelengths]: cumulative
  readonly dyeYield: Float64Array; // [medium · maxAbsorbers + absorber]
  readonly diluteYield: Float64Array; // at least dyeYield; a photon drawn between the two is quenched
  readonly dyeSpectrum: Int32Array; // alias table of its emission

  // ---- scatterers of media; where none scatters, maxScatterers is 0 and only scatterShare has entries
  readonly maxScatterers: number;
  readonly scatterShare: Float64Array; // [medium · wavelengths]: share of the attenuation that scatters
  readonly scattererCount: Int32Array; // [medium]
  readonly scattererShare: Float64Array; // [(medium · maxScatterers + scatterer) · wavelengths]: cumulative
  readonly phaseTable: Int32Array; // as scattererShare: place in phaseCosine of the table of the knot below, or PHASE.henyeyGreenstein
  readonly phaseValue: Float64Array; // as scattererShare: odds of the next table, or mean cosine
  readonly phaseCosine: Float64Array; // tables of PHASE.cells + 1 rising cosines

  // ---- finishes
  readonly finishes: number;
  readonly finishSplit: Int32Array;
  readonly finishReflectSpread: Int32Array;
  readonly finishTransmitSpread: Int32Array;
  readonly finishWidth: Float64Array; // Gaussian: FWHM; top hat: half angle; rad; along the face's u where they are two
  readonly finishWidthV: Float64Array; // along v
  readonly scatterHead: Int32Array; // [finish · SCATTER.STRIDE]
  readonly scatterNumbers: Float64Array;
  readonly finishA: Float64Array; // [finish · wavelengths]: reflectance, or n of a metal
  readonly finishB: Float64Array; // transmittance, or k of a metal
  readonly finishTable: Int32Array; // first row of an angular table, −1
  readonly tableAngles: number; // angles per table, evenly from 0 to 90°
  readonly tableReflectance: Float64Array; // [(row + wavelength) · tableAngles + angle]
  readonly tableTransmittance: Float64Array;

  // ---- stacks of thin films; a film is one of them, between two media, in one direction
  readonly filmOf: Int32Array; // [((finish · 2 + (0 inward | 1 outward)) · media + medium here) · media + medium beyond], −1
  readonly filmBlock: Int32Array; // [film]: first block; blocks are [group · FILM.blocks + block]
  readonly filmBeyond: Int32Array; // [film]: first block beyond the critical angle, −1 where all is reflected there
  readonly filmStart: Int32Array; // [block], into filmNodes
  readonly filmCells: Int32Array; // [block]: intervals of angle; 0: the stack is worked out there and then
  readonly filmNodes: Float32Array; // [(wavelength in its group · (cells + 1) + node) · channels + channel]: FILM.channels, or POLARISED_FILM where `polarised` is 1
  readonly filmLayerStart: Int32Array; // [film + 1], into filmLayers; where polarisation is averaged, there are none
  readonly filmLayers: Float64Array; // of a film [(wavelength · layers + layer) · 3]: real and imaginary part of the squared index, 2π·thickness/wavelength

  // ---- pumps
  readonly pumpCount: number;
  readonly pumps: Float64Array;
  readonly pumpBeam: Int32Array;
  readonly pumpOutline: Int32Array;
  readonly pumpSpectrum: Int32Array;
  readonly pumpCumulative: Float64Array; // cumulative share of photons
  // What follows is laid out in compile-emitters.ts.
  readonly farFieldStart: Int32Array; // [pump], −1
  readonly farFieldPoints: Int32Array; // [pump]
  readonly farFields: Float64Array;
  readonly pointingStart: Int32Array; // [pump], −1
  readonly pointing: Float64Array; // [emitter · 2], rad
  readonly rayStart: Int32Array; // [pump], −1
  readonly rayCount: Int32Array; // [pump]
  readonly rays: Float64Array; // [ray · 6]
  readonly rayKeep: Float64Array; // [ray]
  readonly rayOther: Int32Array;
  readonly rayWavelength: Int32Array; // [ray], −1: drawn from the pump's spectrum

  // ---- pooled alias tables of spectra, [table · wavelengths]
  readonly spectrumKeep: Float64Array;
  readonly spectrumOther: Int32Array;

  // ---- weights per wavelength
  readonly energyQuanta: Float64Array; // photon energy in whole quanta, so that sums of it are exact
  readonly luminousQuanta: Float64Array; // energyQuanta · ȳ, whole
  readonly observerX: Float64Array;
  readonly observerY: Float64Array;
  readonly observerZ: Float64Array;
  readonly wavelengthNm: Float64Array;

  // ---- tallies
  readonly slots: number;
  readonly faceSlot: Int32Array;
  readonly ownerSlot: Int32Array;
  readonly dyeSlot: Int32Array; // [owner · maxAbsorbers + absorber], −1 for the bulk
  readonly recorders: number;
  readonly recorderFrame: Float64Array;
  readonly recorderWrap: Int32Array; // WRAP
  readonly recorderCells: Int32Array; // [recorder · 2]: cells along u, v
  readonly recorderMap: Int32Array; // offset of the map in the maps array
  readonly recorderSpectrum: Int32Array; // offset of its pump spectrum (emitted follows), −1
  readonly recorderAngles: Int32Array; // offset, −1
  readonly recorderPolar: Int32Array; // polar cells of the angular record, each of 2°
  readonly recorderRadiance: Int32Array; // offset, −1
  readonly radianceGrid: Int32Array; // [recorder · 4]: cells u, v, polar, azimuth
  readonly recorderNormal: Float64Array; // [recorder · LOCAL_NORMAL.STRIDE]
  readonly recorderNext: Int32Array; // next recorder of light leaving through the same face, −1
  readonly recorderLights: Int32Array; // bit 0: map counts pump, bit 1: emitted
  readonly voxelOrigin: Float64Array; // 3
  readonly voxelScale: Float64Array; // cells per mm, 3
  readonly voxelCells: Int32Array; // 3
  readonly voxelPumpMap: number; // offset of the absorbed-pump map
  readonly voxelEmittedMap: number;
  readonly mapCells: number; // of one half
  readonly spectrumCells: number;
  readonly angleCells: number;
  readonly radianceCells: number; // of one half
  readonly spectrumLaunched: number;
  readonly spectrumAbsorbedPump: number;
  readonly spectrumEmitted: number;
  readonly pathHistogramStep: number; // mm
}
