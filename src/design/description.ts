/**
 * The description: a design file after reading, with every name resolved and every quantity in base units
 * (mm, nm for wavelengths, W, rad, mol/L, 1/mm). It is what the scene compiler takes; it knows no text,
 * no unit string and no line number, only the path of each thing in the file so that later faults can point at it.
 */
import type { ClosedMesh } from '../numerics/mesh/close-mesh.js';
import type { Curve } from '../units/curve.js';
import type { DesignPath } from './fault.js';

export type Vector3 = readonly [number, number, number];
export type Vector2 = readonly [number, number];

export interface Description {
  readonly title: string;
  readonly about: string | null;
  readonly dials: readonly Dial[];
  readonly media: ReadonlyMap<string, MediumDescription>;
  /** Name of the medium around everything; present in `media`. */
  readonly surroundings: string;
  readonly finishes: ReadonlyMap<string, FinishDescription>;
  /** In file order: where parts overlap, the later one wins. */
  readonly parts: readonly PartDescription[];
  readonly pumps: readonly PumpDescription[];
  readonly detectors: readonly DetectorDescription[];
  readonly exit: ExitDescription;
  readonly defaults: TraceDefaults;
}

export interface Dial {
  readonly name: string;
  /** As written in the file or turned on the command line. */
  readonly text: string;
  /** Value in base units of its dimension. */
  readonly value: number;
}

/** What the design itself asks of a trace; the command line overrides. */
export interface TraceDefaults {
  readonly histories: number | null;
  /** Relative standard error wanted on the exit fraction. */
  readonly precision: number | null;
  readonly seed: string | null;
  /** Voxels along x, y, z of the absorbed-power map over the bounding box of all dyed parts. */
  readonly voxels: Vector3 | null;
  /** Whether every photon keeps its polarisation, or interfaces treat all light as unpolarised; null: carried where a pump is polarised. */
  readonly polarisation?: 'carried' | 'averaged' | null;
}

// ------------------------------------------------------------------------------------------------ media

export interface MediumDescription {
  readonly name: string;
  readonly path: DesignPath;
  readonly kind: 'gas' | 'liquid' | 'solid';
  /** Library name of what it is made of ('ethanol', 'borosilicate-crown', 'air'), or 'custom'. */
  readonly base: string;
  /** Refractive index. */
  readonly index: Curve;
  /** Napierian absorption of the bare solvent or solid, 1/mm. */
  readonly absorption: Curve;
  readonly dyes: readonly DissolvedDye[];
  readonly scatterers: readonly ScattererDescription[];
  /** Heat data, null where the library has none. */
  readonly thermal: ThermalProperties | null;
  /** Solvents of a mixture with their shares by volume before mixing; left out for one material. */
  readonly mixture?: readonly { readonly solvent: string; readonly share: number }[];
  /** Self-quenching switched off by the design. */
  readonly quenching?: 'off';
  /** What was taken for granted about the medium, for people to read. */
  readonly notes?: readonly string[];
  /** Liquid that circulates besides what is in the parts, mm³; null or left out: none. */
  readonly reservoirMm3?: number | null;
}

export interface DissolvedDye {
  readonly name: string;
  /** The dye whose protolytic form this is; left out where forms are not told apart. */
  readonly formOf?: string;
  /** mol/L; null for a dye given directly by an absorption coefficient. */
  readonly concentration: number | null;
  /** Napierian absorption at this strength, 1/mm. */
  readonly absorption: Curve;
  /** 0..1, per absorbed photon, as traced: at this strength, pH and temperature. */
  readonly quantumYield: number;
  /** The same before the dye's own crowding lowers it; left out where nothing does. */
  readonly diluteYield?: number;
  /** How the dye quenches itself at this strength; left out where that is not modelled. */
  readonly quenching?: QuenchingDescription;
  readonly emission: EmissionDescription;
  /** Fluorescence lifetime, ns, null when unknown. */
  readonly lifetimeNs: number | null;
  /** null or left out: not known. */
  readonly molarMassGPerMol?: number | null;
  /** Molecules destroyed per photon absorbed; null or left out: not known. */
  readonly bleachYield?: GivenConstant | null;
  /** null or left out: not known, the dye is taken to have two levels. */
  readonly triplet?: { readonly yield: GivenConstant; readonly lifetimeNs: GivenConstant } | null;
  /** Share of the molecules in the ground state that `absorption` stands for; 1 when left out. */
  readonly groundShare?: number;
}

/** A constant with what is known of it. */
export interface GivenConstant {
  readonly value: number;
  /** Ends of what is published; the value itself where it was given by the user. */
  readonly low: number;
  readonly high: number;
  /** Where it comes from, for people to read. */
  readonly origin: string;
}

/** What became of the yield, for people to read. */
export interface QuenchingDescription {
  /** Yield at this strength over that of the dilute dye. */
  readonly factor: number;
  /** Share of the molecules that are bound in dark dimers. */
  readonly dimerShare: number;
  readonly law: string;
  readonly source: string;
  /** mol/L of the dye, in all its forms, and up to which the constants are meant. */
  readonly strength: number;
  readonly most: number;
}

/** What turns light aside within a medium. Several add up. */
export type ScattererDescription = { readonly name: string; readonly path: DesignPath } & (
  | {
      readonly kind: 'henyey-greenstein';
      /** Scattering coefficient, 1/mm. */
      readonly coefficient: Curve;
      /** Mean cosine of the scattering angle, −1..1, both excluded. */
      readonly anisotropy: Curve;
    }
  | {
      readonly kind: 'beads';
      /** mm. */
      readonly radius: number;
      /** Complex index n − ik of the beads, k > 0 absorbs. */
      readonly index: Curve;
      readonly extinction: Curve;
      /** Volume of all beads over volume of the medium. */
      readonly volumeFraction: number;
    }
);

/** Photons per nm, relative; or one line, which may be any wavelength exactly. */
export type EmissionDescription =
  | { readonly kind: 'line'; readonly wavelengthNm: number }
  | { readonly kind: 'spectrum'; readonly photonsPerNm: Curve; readonly fromNm: number; readonly toNm: number };

export interface ThermalProperties {
  readonly densityKgPerM3: number;
  readonly specificHeatJPerKgK: number;
  readonly conductivityWPerMK: number;
  /** °C at 101.325 kPa; null for solids. */
  readonly boilingPointC: number | null;
  readonly temperatureC: number;
  readonly source: string;
}

// ---------------------------------------------------------------------------------------------- finishes

export type FinishDescription = { readonly name: string; readonly path: DesignPath } & (
  | { readonly kind: 'clear' }
  | { readonly kind: 'black' }
  /** Fixed reflectance at every angle and wavelength; the rest is absorbed. */
  | { readonly kind: 'mirror'; readonly reflectance: number }
  /** Opaque metal, complex index n − ik, Fresnel in the medium that touches it. */
  | { readonly kind: 'metal'; readonly metal: string; readonly n: Curve; readonly k: Curve }
  /**
   * Idealised dichroic, the same at all angles. T = transmits in the pass band, R = reflects in the stop band,
   * `absorbs` everywhere; what is neither is reflected (pass band) or transmitted (stop band). The edge is a
   * logistic in wavelength whose 10–90 % width is `width`; a zero width is a step.
   */
  | {
      readonly kind: 'dichroic';
      readonly edgeNm: number;
      readonly widthNm: number;
      readonly passes: 'below' | 'above';
      readonly transmits: number;
      readonly reflects: number;
      readonly absorbs: number;
    }
  /** R and T on a grid, [wavelength][angle], bilinear; angle of incidence from the normal, in the medium of incidence. */
  | {
      readonly kind: 'table';
      readonly wavelengthsNm: readonly number[];
      readonly anglesDeg: readonly number[];
      readonly reflectance: readonly (readonly number[])[];
      readonly transmittance: readonly (readonly number[])[];
    }
  /**
   * Thin films by characteristic matrices, between the two media that really touch the face. Layers from the outside of the face
   * inward: the first touches what lies beyond the face, the last the part that the face belongs to.
   */
  | { readonly kind: 'stack'; readonly layers: readonly LayerDescription[]; readonly extrapolates: boolean }
  /** Lambertian in both directions; the rest is absorbed. */
  | { readonly kind: 'diffuser'; readonly reflects: number; readonly transmits: number }
  /**
   * Scatter about the specular or refracted direction; `fwhm` is the full width of the radiant intensity along the face's u and v, rad.
   * With `split` null the Fresnel law says what is reflected; otherwise the stated shares, the rest absorbed.
   */
  | {
      readonly kind: 'scatter';
      readonly shape: 'gaussian' | 'top-hat';
      readonly fwhm: Vector2;
      readonly split: { readonly reflects: number; readonly transmits: number } | null;
    }
  /** Scatter as measured: a function of both directions, the same at all wavelengths. */
  | ({ readonly kind: 'bsdf' } & ScatterTable)
);

/**
 * Bidirectional scattering distribution function, 1/sr: radiance out over irradiance in. Angles in degrees from the normal, rising;
 * azimuth from the side light heads for (0) to where it came from (180), the same on both sides of the plane of incidence. Linear between
 * rows; held beyond the first and the last incidence and below the first scatter angle, nothing beyond the last one.
 */
export interface ScatterTable {
  readonly incidenceDeg: readonly number[];
  readonly scatterDeg: readonly number[];
  /** One entry where it does not matter. */
  readonly azimuthDeg: readonly number[];
  /** [incidence][scatter][azimuth]. */
  readonly reflected: readonly (readonly (readonly number[])[])[];
  readonly transmitted: readonly (readonly (readonly number[])[])[];
}

export interface LayerDescription {
  readonly material: string;
  /** Complex index n − ik, held beyond `rangeNm`. */
  readonly n: Curve;
  readonly k: Curve;
  /** Wavelengths the material has data for, nm; null for a constant. */
  readonly rangeNm: readonly [number, number] | null;
  readonly thicknessNm: number;
  readonly path: DesignPath;
}

// ------------------------------------------------------------------------------------------------- parts

export interface PartDescription {
  readonly name: string;
  readonly path: DesignPath;
  readonly medium: string;
  /** Union of pieces. A part of one nameless piece has faces 'top', …; otherwise 'piece.top', …. */
  readonly pieces: readonly PieceDescription[];
  readonly placement: Placement;
  readonly faces: readonly FaceFinish[];
}

export interface FaceFinish {
  /** Face name within the part ('top', 'bore.side'), or '*' for every face not named. */
  readonly face: string;
  readonly finish: string;
  readonly path: DesignPath;
}

/** A convex shape minus other convex shapes, placed in the part's own frame. */
export interface PieceDescription {
  readonly name: string | null;
  readonly path: DesignPath;
  readonly shape: ShapeDescription;
  readonly at: Vector3;
  readonly turns: readonly Turn[];
  readonly minus: readonly PieceDescription[];
  readonly repeat?: Repeat;
}

/** The same piece many times, on a grid about its place along the axes of what holds it. */
export interface Repeat {
  readonly counts: Vector3;
  /** Centre to centre, mm. */
  readonly pitch: Vector3;
}

/**
 * Shapes, convex but for a tube and a lens with a hollow surface. The own frame of each has its origin at the centre of its bounding box, z up; a prism keeps
 * the coordinates of its outline and is centred in z.
 * Faces — box: left(−x) right(+x) front(−y) back(+y) bottom(−z) top(+z); prism: side-1 … side-n (edge i runs from
 * corner i to corner i+1) or the names in `sides`, bottom, top; cylinder, cone: side, bottom, top;
 * sphere: surface; cap: dome, bottom; frustum: the names in `sides`, bottom, top; tube: those of its outer shape, and
 * those of the sides of its bore after 'inside-'; lens: front(−y) back(+y), and edge (round outline) or left right bottom
 * top (rectangle); paraboloid: bowl, top; concentrator: wall (round) or left right front back, bottom (its small end), top;
 * mesh: its groups. A mesh need not be convex and keeps the coordinates of its file.
 */
export type ShapeDescription =
  | { readonly kind: 'box'; readonly size: Vector3 }
  | {
      readonly kind: 'prism';
      readonly outline: readonly Vector2[];
      readonly height: number;
      readonly sides: readonly string[] | null;
    }
  | { readonly kind: 'cylinder'; readonly radius: number; readonly height: number }
  | { readonly kind: 'cone'; readonly bottomRadius: number; readonly topRadius: number; readonly height: number }
  | { readonly kind: 'sphere'; readonly radius: number }
  /** The part of a sphere of `radius` above a plane: `height` from the flat bottom to the crown, at most 2·radius. */
  | { readonly kind: 'cap'; readonly radius: number; readonly height: number }
  | { readonly kind: 'mesh'; readonly mesh: ClosedMesh }
  /** Flat sides between two convex outlines, counter-clockwise as seen from +z, whose edges are parallel one by one. */
  | {
      readonly kind: 'frustum';
      readonly bottom: readonly Vector2[];
      readonly top: readonly Vector2[];
      readonly height: number;
      readonly sides: readonly string[];
    }
  /** A shape with a bore of the same height through it. */
  | { readonly kind: 'tube'; readonly outer: TubeWall; readonly bore: TubeWall }
  | LensDescription
  /** r² = 4·focalLength·z, from the vertex at the bottom to the flat top. */
  | { readonly kind: 'paraboloid'; readonly focalLength: number; readonly height: number }
  | ConcentratorDescription;

export type TubeWall = Extract<ShapeDescription, { readonly kind: 'frustum' | 'cone' }>;

/** A pane in the plane of x and z whose front looks along −y. */
export interface LensDescription {
  readonly kind: 'lens';
  readonly outline: Outline;
  /** Between the vertices, mm. */
  readonly thickness: number;
  /** Round about the axis; or drawn out along z (upright) or along x (lying), as on a cylinder. */
  readonly profile: 'round' | 'upright' | 'lying';
  readonly front: LensSurface;
  readonly back: LensSurface;
}

/** Depth behind the vertex at distance ρ from the axis: ρ²/(r + √(r² − (1 + conic)·ρ²)); bulging out of the glass or hollow. */
export type LensSurface =
  | { readonly kind: 'flat' }
  | { readonly kind: 'bulges' | 'hollow'; readonly radius: number; readonly conic: number };

/**
 * Compound parabolic concentrator along z, small end at the bottom. Its walls are parabolas tilted by the half angle of
 * acceptance; turned about the axis (round), crossed (square), or drawn out along y over `length` (trough).
 */
export interface ConcentratorDescription {
  readonly kind: 'concentrator';
  readonly form: 'round' | 'square' | 'trough';
  readonly halfAngle: number;
  /** Radius or half width of the small end, mm. */
  readonly smallEnd: number;
  readonly height: number;
  /** Of a trough. */
  readonly length: number | null;
  /** Cone frusta that stand for a round wall. */
  readonly slices: number;
}

/** Right-handed turn about an axis of the design through the shape's own origin, rad; applied in list order. */
export interface Turn {
  readonly axis: 'x' | 'y' | 'z';
  readonly angle: number;
}

export interface Placement {
  /** Where the part's own origin goes; ignored when `against` is given. */
  readonly at: Vector3;
  readonly turns: readonly Turn[];
  readonly against: Against | null;
}

/** Puts a flat face of this part on a flat face of an earlier part, centre on centre. */
export interface Against {
  /** 'part.face' of the part leaned on. */
  readonly face: string;
  /** Own face that touches; null: the flat face that looks the other way. */
  readonly with: string | null;
  /** Shift along the touched face's own u and v axes, mm. */
  readonly shift: Vector2;
  /** Empty distance left between the two faces, mm. */
  readonly gap: number;
  readonly path: DesignPath;
}

// ------------------------------------------------------------------------------------------------- pumps

export interface PumpDescription {
  readonly name: string;
  readonly path: DesignPath;
  /** Optical power, W. */
  readonly power: number;
  /** Centre of the line; photon mean of a spectrum. */
  readonly wavelengthNm: number;
  /** Full width at half maximum of the Gaussian line, nm; 0 is a line. */
  readonly linewidthNm: number;
  /** Measured spectrum, in place of the line. */
  readonly spectrum?: PumpSpectrum | null;
  /** Optical power per electrical power of the diode; null when not given. */
  readonly wallPlug: number | null;
  /** Efficiency of the driver, 0..1; null when not given. */
  readonly driver: number | null;
  /** Angle of the electric field from the beam's u towards its v, rad; null: unpolarised. */
  readonly polarised?: number | null;
  readonly aim: Aim;
  readonly beam: BeamDescription;
}

export interface PumpSpectrum {
  /** Relative. */
  readonly photonsPerNm: Curve;
  readonly fromNm: number;
  readonly toNm: number;
  /** Over photons. */
  readonly meanNm: number;
}

/** A turn of the whole pump about an axis of the design through a point, rad, once it is aimed. */
export interface AboutAxis {
  readonly axis: 'x' | 'y' | 'z';
  readonly through: Vector3;
  readonly angle: number;
}

export type Aim = AimedAt & { readonly turned?: AboutAxis | null };

type AimedAt =
  /** From `distance` in front of a face's centre (shifted along its u, v), along its inward normal, then tilted about u and v. */
  | {
      readonly kind: 'toward';
      readonly face: string;
      readonly distance: number;
      readonly shift: Vector2;
      readonly tilt: Vector2;
    }
  /** From a point along a direction; `roll` turns the beam's u, v axes about it, rad. */
  | { readonly kind: 'along'; readonly at: Vector3; readonly direction: Vector3; readonly roll: number };

export type Outline =
  | { readonly kind: 'rectangle'; readonly size: Vector2 }
  | { readonly kind: 'disc'; readonly radius: number };

export type BeamDescription =
  /** Evenly filled, collimated, or Gaussian in angle with the FWHM given for u and v, rad. */
  | {
      readonly kind: 'patch';
      readonly outline: Outline;
      readonly divergence: Vector2;
      readonly farField?: FarField | null;
    }
  /** 1/e² radius at the origin of the beam and 1/e² half angle of divergence, rad (independent draws: geometric optics). */
  | { readonly kind: 'gaussian'; readonly radius: number; readonly halfAngle: number }
  | { readonly kind: 'lambertian'; readonly outline: Outline }
  /**
   * A bank: `across` emitters along u by `along` emitters along v, centre to centre `pitch`; each emits a Gaussian far field
   * with FWHM `divergence` [u, v], rad, or the measured one. A thin lens in front bends every ray by tan' = tan − r/f. Of a stack,
   * `rows` such banks lie `pitch` apart along v, each `step` further from the target than the one before.
   */
  | {
      readonly kind: 'diodes';
      readonly across: number;
      readonly along: number;
      readonly pitch: Vector2;
      readonly divergence: Vector2;
      readonly farField?: FarField | null;
      readonly stack?: { readonly rows: number; readonly pitch: number; readonly step: number } | null;
      /** Standard deviation of each emitter's direction about u and about v, rad, and the seed of its draws. */
      readonly pointing?: { readonly spread: number; readonly seed: string } | null;
      readonly lens: { readonly focalLength: number; readonly distance: number } | null;
    }
  | { readonly kind: 'rays'; readonly rays: RayTable };

/** Cuts through a far field: relative intensity along u and along v at the same angles, rad. */
export interface FarField {
  readonly anglesRad: readonly number[];
  readonly u: readonly number[];
  readonly v: readonly number[];
}

/** Rays in the axes u, v, w of the pump; w is where it looks. Three numbers a ray in `position` (mm) and `direction` (unit). */
export interface RayTable {
  readonly position: readonly number[];
  readonly direction: readonly number[];
  /** Relative. */
  readonly watts: readonly number[];
  /** null: as the pump says. */
  readonly wavelengthNm: readonly number[] | null;
}

// --------------------------------------------------------------------------------------------- detectors

export interface DetectorDescription {
  readonly name: string;
  readonly path: DesignPath;
  readonly target: DetectorTarget;
  readonly pixels: Vector2 | null;
  /** Where radiance is recorded too. */
  readonly radiance?: RadianceCells | null;
}

export type DetectorTarget =
  /** Light that leaves the part through this face. */
  | { readonly kind: 'face'; readonly face: string }
  /** Light that crosses a bounded plane along its normal. */
  | { readonly kind: 'plane'; readonly at: Vector3; readonly normal: Vector3; readonly outline: Outline }
  /** Light that crosses a sphere outward, or the part of it between two polar angles from its axis, rad. */
  | {
      readonly kind: 'sphere';
      readonly centre: Vector3;
      readonly radius: number;
      readonly axis: Vector3;
      readonly polar: Vector2;
    };

/** Cells of a radiance record: along u and v of the map, and of direction by polar angle and azimuth from the normal. */
export type RadianceCells = readonly [u: number, v: number, polar: number, azimuth: number];

export interface ExitDescription {
  /** 'part.face' or the name of a detector. */
  readonly name: string;
  readonly path: DesignPath;
  readonly pixels: Vector2 | null;
  readonly radiance?: RadianceCells | null;
}
