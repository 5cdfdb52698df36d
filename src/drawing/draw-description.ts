/** Description -> drawing: the design in space, before any tracing. */
import type { Description, Vector3 } from '../design/description.js';
import { DesignFaults } from '../design/design-faults.js';
import type { Drawing, DrawnPlane } from '../record/drawing.js';
import { designSize } from '../scene/compile-solids.js';
import { type PlacedPart, placeParts } from '../scene/place-parts.js';
import { frameAbout, normalise, snapDirection } from '../scene/vector.js';
import { carvePart, facetPieces, outsidePart } from './carve-part.js';
import { drawPart } from './draw-part.js';
import { drawPumps, outlineEdges } from './draw-pumps.js';
import { FACETS_ROUND } from './facet-patch.js';
import { sphereEdges } from './sphere-edges.js';

/** Facets this share of the design's size off a plane lie in it. */
const RELATIVE_TOLERANCE = 1e-9;
/** A sphere detector of a larger radius, in sizes of the design, would leave nothing to see of the parts. */
const LARGEST_SPHERE = 1.5;

/**
 * The parts as triangles and rims, the pumps and the free planes; no paths. Where parts overlap the later one is drawn, as it wins there.
 * @throws DesignFaults when parts cannot be placed. The faces that pumps and exit name must exist (checked before).
 */
export function drawDescription(description: Description): Drawing {
  const { parts, faults } = placeParts(description.parts);
  if (faults.length > 0) throw new DesignFaults(faults);
  const tolerance = RELATIVE_TOLERANCE * designSize(parts);
  const pieces = parts.map((part) => facetPieces(part, facetsRound(part)));
  const exitFace = exitFaceOf(description);
  return {
    parts: parts.map((part, i) => {
      const later = pieces.slice(i + 1).flat();
      const skin = carvePart(pieces[i], tolerance);
      return drawPart(
        part,
        skin.map((face) => outsidePart(face, later, tolerance)),
        description,
        exitFace,
      );
    }),
    pumps: drawPumps(description, parts),
    planes: drawPlanes(description, designSize(parts)),
    paths: [],
    pathsFrom: 0,
  };
}

/** Parts of many pieces, such as arrays of lenslets, are drawn coarser: each is small, and they add up. */
function facetsRound({ pieces }: PlacedPart): number {
  if (pieces.length <= 64) return FACETS_ROUND;
  return pieces.length <= 512 ? FACETS_ROUND / 2 : FACETS_ROUND / 4;
}

function exitFaceOf({ exit, detectors }: Description): string | null {
  const target = detectors.find(({ name }) => name === exit.name)?.target;
  if (target === undefined) return exit.name;
  return target.kind === 'face' ? target.face : null;
}

function drawPlanes({ detectors, exit }: Description, size: number): DrawnPlane[] {
  return detectors.flatMap(({ name, target }): DrawnPlane[] => {
    if (target.kind === 'sphere') {
      const edges = target.radius <= LARGEST_SPHERE * size ? sphereEdges(target) : [];
      return [{ name, isExit: name === exit.name, normal: snapDirection(normalise(target.axis)), edges }];
    }
    if (target.kind !== 'plane') return [];
    const normal: Vector3 = snapDirection(normalise(target.normal));
    const edges = outlineEdges(target.outline, { origin: target.at, ...frameAbout(normal) });
    return [{ name, isExit: name === exit.name, normal, edges }];
  });
}
