/** State of a photon where the hot loop hands it to a helper: a call would box every fraction it is given. */

/** Places of what is measured. The first six are what most helpers call the ray. */
export const enum RAY {
  x = 0,
  y = 1,
  z = 2,
  dx = 3,
  dy = 4,
  dz = 5,
  /** Optical depth to go until light is absorbed. */
  depth = 6,
  /** Refractive index where light is. */
  index = 7,
  /** Number drawn for the interface ahead. */
  unit = 8,
  /** Path length inside parts since launch or the first absorption, and before that, mm. */
  path = 9,
  pumpPath = 10,
  /** Distance to the next boundary among other surfaces than axis planes, mm. */
  ahead = 11,
  /** Reciprocals of the direction. */
  perDx = 12,
  perDy = 13,
  perDz = 14,
  // Polarised light only; see kernel/polarised-light.ts.
  /** Stokes parameters over the first one, about the axis below. */
  stokesQ = 15,
  stokesU = 16,
  stokesV = 17,
  /** Unit vector across the direction, to which the Stokes parameters refer. */
  axisX = 18,
  axisY = 19,
  axisZ = 20,
  /** Direction for which they hold: light that a dye or scatterer has turned since is unpolarised. */
  heldX = 21,
  heldY = 22,
  heldZ = 23,
  /** Facet of a mesh that lies ahead, counted from 1, 0 none; and where light will be when it gets there. */
  facet = 24,
  facetX = 25,
  facetY = 26,
  facetZ = 27,
  COUNT = 28,
}

/** Places of what is counted. */
export const enum NOW {
  region = 0,
  medium = 1,
  owner = 2,
  wavelength = 3,
  /** 0 pump, 1 emitted. */
  light = 4,
  /** 0 while light has only met outsides. */
  entered = 5,
  /** Face last crossed, or that reflected light before it ever entered; −1 none. */
  lastFace = 6,
  /** Boundaries in a row at which nothing was left to chance. */
  closed = 7,
  /** Way out of the region that lies ahead, −1 none. */
  way = 8,
  absorptions = 9,
  /** Numbers used of the blocks of units and of exponential variates. */
  draw = 10,
  exponential = 11,
  /** Goes up whenever light changes so that what is known of walls no longer holds. */
  era = 12,
  /** Axis of the refractions of this era, −1 before the first: after two axes light may come back with other components. */
  bentAxis = 13,
  deposits = 14,
  COUNT = 32,
}

/** Sets the reciprocals of a new direction. Along a plane there is no distance to it: ∞, or 0 · ∞, which never wins. */
export function turnTo(ray: Float64Array): void {
  for (let axis = 0; axis < 3; axis++) {
    const component = ray[RAY.dx + axis];
    ray[RAY.perDx + axis] = component !== 0 ? 1 / component : Number.POSITIVE_INFINITY;
  }
}
