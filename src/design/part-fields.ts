/** Fields of parts and of the shapes they are made of. */
import { optional, required, withDefault } from './form.js';
import { either, mapped } from './form-either.js';
import { listOf, pair, triple } from './form-lists.js';
import { count, quantity } from './form-quantities.js';
import { mapOf, record } from './form-record.js';
import { freeText, oneWord, reference } from './form-scalars.js';

export const anyLength = quantity('length');
/** Nothing in a light engine is larger than 100 m or finer than a tenth of a wavelength. */
export const size = quantity('length', { min: 1e-5, max: 1e5 });
const radiusOrNone = quantity('length', { min: 0, max: 1e5 });
const lengthOrNone = quantity('length', { min: 0, max: 1e5 });
const angle = quantity('angle');

const point = pair(anyLength, 'a corner [x, y]');

const prism = record('outline and height', {
  outline: required(
    listOf(point, 'a list of at least 3 corners [x, y]', 3, 200),
    'Corners of the convex cross-section, one after the other round it.',
  ),
  height: required(size, 'Extent along z.'),
  sides: optional(
    listOf(freeText('a name for a side', 60), 'a name for each side', 1, 200),
    'Names of the sides; the first runs from the first corner to the second. Default: side-1, side-2, …',
  ),
});

const radius = optional(size, 'Radius; give it or the diameter.');
const diameter = optional(size, 'Diameter; give it or the radius.');

const cylinder = record(
  'radius and height',
  { radius, diameter, height: required(size, 'Extent along z.') },
  { exactlyOne: [['radius', 'diameter']] },
);

const cone = record(
  'bottom-radius, top-radius and height',
  {
    'bottom-radius': optional(radiusOrNone, 'Radius of the bottom; 0 mm for a point.'),
    'bottom-diameter': optional(radiusOrNone, 'Diameter of the bottom.'),
    'top-radius': optional(radiusOrNone, 'Radius of the top; 0 mm for a point.'),
    'top-diameter': optional(radiusOrNone, 'Diameter of the top.'),
    height: required(size, 'Extent along z.'),
  },
  {
    exactlyOne: [
      ['bottom-radius', 'bottom-diameter'],
      ['top-radius', 'top-diameter'],
    ],
  },
);

const sphere = record('radius', { radius, diameter }, { exactlyOne: [['radius', 'diameter']] });

const cap = record(
  'radius and height',
  {
    radius,
    diameter,
    height: required(size, 'From the flat bottom to the crown, at most the diameter of the sphere.'),
  },
  { exactlyOne: [['radius', 'diameter']] },
);

const mesh = record('file and unit', {
  file: required(freeText('the name of a file', 500), 'STL (text or binary) or OBJ in the folder of the design.'),
  unit: required(oneWord('mm', 'um', 'cm', 'm', 'in'), 'What a 1 in the file stands for; the file does not say.'),
  'faces-by': withDefault(
    oneWord('group', 'material', 'crease', 'none'),
    'group',
    'group',
    'Names of faces: `group` takes the solids of STL, the groups or objects of OBJ; `material` the materials of OBJ; `crease` parts the surface at edges, patch-1 being the largest; `none` calls all of it surface.',
  ),
  crease: optional(
    angle,
    'With `faces-by: crease`: patches end where neighbours differ by this angle. Default: 30 deg.',
  ),
  weld: withDefault(
    quantity('length', { min: 0, max: 1 }),
    0,
    '0 mm, only equal corners',
    'Corners nearer to each other than this are one.',
  ),
  'turn-inside-out': withDefault(oneWord('yes', 'no'), 'no', 'no', 'Turns facets over that look into the solid.'),
});

const lensSurface = either<LensSurfaceRecord>({
  scalar: mapped(oneWord('flat'), () => ({ bulges: null, hollow: null, conic: 0 })),
  map: record(
    'bulges or hollow, and conic',
    {
      bulges: optional(size, 'Radius of curvature at the vertex of a surface that bulges out of the glass.'),
      hollow: optional(size, 'Radius of curvature at the vertex of a surface that goes into the glass.'),
      conic: withDefault(
        quantity('number', { min: -1000, max: 1000 }),
        0,
        '0, a sphere',
        'Conic constant: −1 a paraboloid, below −1 a hyperboloid, between −1 and 0 and above 0 ellipsoids.',
      ),
    },
    { exactlyOne: [['bulges', 'hollow']] },
  ),
});

export interface LensSurfaceRecord {
  readonly bulges: number | null;
  readonly hollow: number | null;
  readonly conic: number;
}

const FLAT: LensSurfaceRecord = { bulges: null, hollow: null, conic: 0 };

const lens = record(
  'diameter or size, thickness, front and back',
  {
    diameter: optional(size, 'Diameter of a round lens; give it or the size.'),
    size: optional(pair(size, 'a size [x, z]'), 'Width and height of a rectangular lens; give it or the diameter.'),
    thickness: required(size, 'Between the two vertices, along y.'),
    front: withDefault(lensSurface, FLAT, 'flat', 'The side that looks along −y: `flat`, or how it bends.'),
    back: withDefault(lensSurface, FLAT, 'flat', 'The side that looks along +y.'),
    profile: withDefault(
      oneWord('round', 'upright-cylinder', 'lying-cylinder'),
      'round',
      'round',
      'Bent both ways (round); or as a cylinder along z (upright, bends light sideways) or along x (lying).',
    ),
  },
  { exactlyOne: [['diameter', 'size']] },
);

const paraboloid = record(
  'focal-length and diameter or height',
  {
    'focal-length': required(size, 'From the vertex to the focus.'),
    diameter: optional(size, 'Diameter of the flat top; give it or the height.'),
    height: optional(size, 'From the vertex to the flat top; give it or the diameter.'),
  },
  { exactlyOne: [['diameter', 'height']] },
);

const concentrator = record('form, half-angle and small-end', {
  form: withDefault(
    oneWord('round', 'square', 'trough'),
    'round',
    'round',
    'Turned about its axis, of four crossed walls, or of two walls drawn out along y.',
  ),
  'half-angle': required(
    quantity('angle', { min: Math.PI / 360, max: (Math.PI * 85) / 180 }),
    'Half angle of acceptance at the large end.',
  ),
  'small-end': required(size, 'Diameter or width of the small end, at the bottom.'),
  height: optional(size, 'Where it is cut off. Default: the full height, at which the walls stand upright.'),
  length: optional(size, 'Length of a trough along y.'),
  tolerance: withDefault(
    quantity('length', { min: 1e-7, max: 1 }),
    0.001,
    '1 µm',
    'How far the cone frusta that stand for a round wall may leave it.',
  ),
});

const taper = record('bottom, top and height', {
  bottom: required(pair(size, 'a size [x, y]'), 'Width and depth of the bottom.'),
  top: required(pair(size, 'a size [x, y]'), 'Width and depth of the top.'),
  height: required(size, 'Extent along z.'),
});

const sideCount = count(3, 60);

const polygon = record('sides, width and height', {
  sides: required(sideCount, 'Number of equal sides.'),
  width: required(size, 'Diameter of the circle that touches all sides (across flats where their number is even).'),
  'top-width': optional(size, 'The same at the top, of a taper. Default: the width.'),
  height: required(size, 'Extent along z.'),
});

const tunnel = record(
  'bore or diameter or sides with width, wall and height',
  {
    bore: optional(pair(size, 'a size [x, y]'), 'Width and depth of a rectangular bore.'),
    'top-bore': optional(pair(size, 'a size [x, y]'), 'The same at the top, of a taper. Default: the bore.'),
    diameter: optional(size, 'Diameter of a round bore.'),
    'top-diameter': optional(size, 'The same at the top, of a taper. Default: the diameter.'),
    sides: optional(sideCount, 'Number of equal sides of a polygonal bore.'),
    width: optional(size, 'Diameter of the circle that touches all sides of a polygonal bore.'),
    'top-width': optional(size, 'The same at the top, of a taper. Default: the width.'),
    wall: required(size, 'Thickness of the wall, measured across the axis.'),
    height: required(size, 'Extent along z.'),
  },
  { exactlyOne: [['bore', 'diameter', 'sides']] },
);

const turnRecord = record('axis and by', {
  axis: required(oneWord('x', 'y', 'z'), 'Axis of the design to turn about.'),
  by: required(angle, 'Angle, right-handed.'),
});

export type TurnRecord = ReturnType<typeof turnRecord.read>;

const turn = withDefault(
  either<readonly TurnRecord[]>({
    list: listOf(turnRecord, 'turns {axis: z, by: 30 deg}', 1, 20),
    map: mapped(turnRecord, (one) => [one]),
  }),
  [],
  'no turn',
  'Turns about axes through the own centre, one after the other.',
);

const shapeFields = {
  box: optional(triple(size, 'a size [x, y, z]'), 'Size along x, y, z. Faces: left, right, front, back, bottom, top.'),
  prism: optional(prism, 'Convex outline drawn out along z. Faces: side-1, … or the names in `sides`, bottom, top.'),
  cylinder: optional(cylinder, 'Cylinder along z. Faces: side, bottom, top.'),
  cone: optional(cone, 'Cone or frustum along z. Faces: side, bottom, top.'),
  sphere: optional(sphere, 'Sphere. Face: surface.'),
  cap: optional(cap, 'Part of a sphere above a plane. Faces: dome, bottom.'),
  lens: optional(
    lens,
    'Lens in the plane of x and z. Faces: front, back, and edge, or left, right, bottom, top of a rectangular one.',
  ),
  paraboloid: optional(paraboloid, 'Paraboloid of revolution about z, open upwards. Faces: bowl, top.'),
  concentrator: optional(
    concentrator,
    'Compound parabolic concentrator along z. Faces: wall, or left, right, front, back; bottom (the small end), top.',
  ),
  taper: optional(taper, 'Rectangular frustum along z. Faces: left, right, front, back, bottom, top.'),
  polygon: optional(
    polygon,
    'Regular polygon drawn out along z, straight or tapered. Faces: side-1 (looks along −y), …, bottom, top.',
  ),
  tunnel: optional(
    tunnel,
    'Wall round a bore along z. Faces: as a taper, cone or polygon outside, and inside-left, inside-side, inside-side-1, ….',
  ),
  mesh: optional(mesh, 'Closed triangle mesh from a file, in the coordinates of the file. Faces: its groups.'),
};

const SHAPES = [
  'box',
  'prism',
  'cylinder',
  'cone',
  'sphere',
  'cap',
  'lens',
  'paraboloid',
  'concentrator',
  'taper',
  'polygon',
  'tunnel',
  'mesh',
] as const;

const copies = count(1, 100);
/** Copies of a piece on a grid. */
const gridFields = {
  repeat: optional(
    triple(copies, 'numbers of copies [x, y, z]'),
    'Copies on a grid along x, y and z about `at`; their faces of one name are one face.',
  ),
  pitch: optional(triple(lengthOrNone, 'distances [x, y, z]'), 'Centre to centre of the copies.'),
};

const at = withDefault(
  triple(anyLength, 'a place [x, y, z]'),
  [0, 0, 0],
  '[0 mm, 0 mm, 0 mm]',
  'Where the own centre goes.',
);

const pieceName = required(freeText('a name', 60), 'Name of the piece; its faces are called name.face.');

const hole = record(
  'a name and a shape',
  { name: pieceName, ...shapeFields, at, turn, ...gridFields },
  { exactlyOne: [SHAPES] },
);

const minus = withDefault(
  listOf(hole, 'a list of named shapes', 1, 50),
  [],
  'nothing',
  'Shapes taken away, placed from the centre of the shape they are taken from.',
);

const piece = record(
  'a name and a shape',
  { name: pieceName, ...shapeFields, at, turn, ...gridFields, minus },
  { exactlyOne: [SHAPES] },
);

export type ShapeFields = Omit<ReturnType<typeof hole.read>, 'name' | 'at' | 'turn' | 'repeat' | 'pitch'>;
export type HoleRecord = ReturnType<typeof hole.read>;
export type PieceRecord = ReturnType<typeof piece.read>;

const partRecord = record(
  'a shape and a medium',
  {
    ...shapeFields,
    union: optional(listOf(piece, 'a list of named shapes', 1, 50), 'Several shapes of one medium joined to one part.'),
    minus,
    medium: required(
      reference('the name of a medium', ['bath', 'borosilicate-crown']),
      'A medium of `media`, or a solvent, solid or gas of the library.',
    ),
    at: optional(triple(anyLength, 'a place [x, y, z]'), 'Where the own centre goes. Default: the origin.'),
    turn,
    against: optional(
      reference('part.face of an earlier part', ['cell.top']),
      'Puts a flat face of this part on that face, centre on centre.',
    ),
    with: optional(
      reference('a face of this part', ['bottom']),
      'Own face that touches. Default: the flat face that looks the other way.',
    ),
    shift: optional(pair(anyLength, 'a shift [u, v]'), 'Shift along the touched face. Default: none.'),
    gap: optional(quantity('length', { min: 0 }), 'Empty distance left between the faces. Default: none.'),
    faces: withDefault(
      mapOf('faces with their finishes', reference('the name of a finish', ['clear', 'black']), new Map(), false),
      [],
      'all clear',
      'Finish of each face; `others` stands for every face not named.',
    ),
  },
  { exactlyOne: [[...SHAPES, 'union']] },
);

export type PartRecord = ReturnType<typeof partRecord.read>;

export const partsForm = mapOf('parts by name', partRecord);
