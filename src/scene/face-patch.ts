/** Areas, centres, bounds and sample points of face patches. */
import type { Vector3 } from '../design/description.js';
import type { FacePatch } from './convex-solid.js';
import { dishArea, dishMiddle, dishRange, dishSample } from './dish.js';
import { facetsAim, facetsArea, facetsPoint, facetsRange } from './mesh/facet-patch.js';
import { girthOf, heightOf, isRevolved, revolvedArea, revolvedSample, stationsOf } from './revolved.js';
import { add, cross, dot, length, normalise, scale, subtract } from './vector.js';

/** Area of the whole patch, mm². */
export function patchArea(patch: FacePatch): number {
  switch (patch.kind) {
    case 'polygon':
      return length(polygonVectorArea(patch.corners));
    case 'disc':
      return Math.PI * patch.radius ** 2;
    case 'side':
    case 'profile':
      return revolvedArea(patch);
    case 'zone':
      return 2 * Math.PI * patch.radius * (patch.radius - patch.from);
    case 'dish':
      return dishArea(patch);
    case 'group':
      return patch.members.reduce((sum, member) => sum + patchArea(member), 0);
    case 'facets':
      return facetsArea(patch);
  }
}

function polygonVectorArea(corners: readonly Vector3[]): Vector3 {
  let sum: Vector3 = [0, 0, 0];
  for (let i = 1; i + 1 < corners.length; i++) {
    sum = add(sum, cross(subtract(corners[i], corners[0]), subtract(corners[i + 1], corners[0])));
  }
  return scale(sum, 0.5);
}

/** Centre of a flat patch (of area), of the axis of a side, crown of a dome or lens, centre of a sphere; of a group their mean. */
export function patchCentre(patch: FacePatch): Vector3 {
  switch (patch.kind) {
    case 'polygon':
      return polygonCentre(patch.corners);
    case 'disc':
    case 'facets':
      return patch.centre;
    case 'side':
    case 'profile':
      return add(patch.base, scale(patch.axis, heightOf(patch) / 2));
    case 'dish':
      return dishMiddle(patch);
    case 'group':
      return scale(
        patch.members.reduce(
          (sum: Vector3, member) => add(sum, scale(patchCentre(member), patchArea(member))),
          [0, 0, 0],
        ),
        1 / patchArea(patch),
      );
    case 'zone':
      return patch.from <= -patch.radius ? patch.centre : add(patch.centre, scale(patch.axis, patch.radius));
  }
}

function polygonCentre(corners: readonly Vector3[]): Vector3 {
  let total = 0;
  let sum: Vector3 = [0, 0, 0];
  for (let i = 1; i + 1 < corners.length; i++) {
    const area = length(cross(subtract(corners[i], corners[0]), subtract(corners[i + 1], corners[0])));
    const middle = scale(add(add(corners[0], corners[i]), corners[i + 1]), 1 / 3);
    sum = add(sum, scale(middle, area));
    total += area;
  }
  return scale(sum, 1 / total);
}

/** Outward normal at the centre; for sides and whole spheres their axis, which is what their angular maps refer to. */
export function patchNormal(patch: FacePatch): Vector3 {
  return 'normal' in patch ? patch.normal : patch.axis;
}

export interface PatchPoint {
  readonly point: Vector3;
  readonly normal: Vector3;
}

/** A point of the patch, uniform in area for (s, t) uniform in the unit square, with the outward normal there. */
export function patchPoint(patch: FacePatch, s: number, t: number): PatchPoint {
  switch (patch.kind) {
    case 'polygon':
      return { point: polygonPoint(patch.corners, s, t), normal: patch.normal };
    case 'disc': {
      const r = patch.radius * Math.sqrt(s);
      return { point: ring(patch.centre, patch.u, patch.v, r, t), normal: patch.normal };
    }
    case 'side':
    case 'profile':
      return revolvedSample(patch, s, t);
    case 'dish':
      return dishSample(patch, s, t);
    case 'group': {
      const { member, rest } = pickByArea(patch.members, s);
      return patchPoint(patch.members[member], rest, t);
    }
    case 'zone': {
      const along = patch.from + (patch.radius - patch.from) * s;
      const r = Math.sqrt(Math.max(0, patch.radius ** 2 - along ** 2));
      const point = ring(add(patch.centre, scale(patch.axis, along)), patch.u, patch.v, r, t);
      return { point, normal: normalise(subtract(point, patch.centre)) };
    }
    case 'facets':
      return facetsPoint(patch, s, t);
  }
}

/** The patch that holds the share s of the area of all, and the share of its own area below that. */
export function pickByArea(patches: readonly FacePatch[], s: number): { member: number; rest: number } {
  const areas = patches.map(patchArea);
  let rest = s * areas.reduce((a, b) => a + b, 0);
  let member = 0;
  while (member < areas.length - 1 && rest > areas[member]) rest -= areas[member++];
  return { member, rest: Math.min(1, rest / areas[member]) };
}

function ring(centre: Vector3, u: Vector3, v: Vector3, radius: number, turn: number): Vector3 {
  const angle = 2 * Math.PI * turn;
  return add(centre, add(scale(u, radius * Math.cos(angle)), scale(v, radius * Math.sin(angle))));
}

function polygonPoint(corners: readonly Vector3[], s: number, t: number): Vector3 {
  const areas: number[] = [];
  for (let i = 1; i + 1 < corners.length; i++) {
    areas.push(length(cross(subtract(corners[i], corners[0]), subtract(corners[i + 1], corners[0]))));
  }
  let rest = s * areas.reduce((a, b) => a + b, 0);
  let triangle = 0;
  while (triangle < areas.length - 1 && rest > areas[triangle]) rest -= areas[triangle++];
  const a = Math.sqrt(Math.min(1, rest / areas[triangle]));
  const edge1 = subtract(corners[triangle + 1], corners[0]);
  const edge2 = subtract(corners[triangle + 2], corners[0]);
  return add(corners[0], add(scale(edge1, a * (1 - t)), scale(edge2, a * t)));
}

/** Low and high of the patch along a unit direction, mm. */
export function patchRange(patch: FacePatch, direction: Vector3): readonly [number, number] {
  switch (patch.kind) {
    case 'polygon': {
      const values = patch.corners.map((corner) => dot(corner, direction));
      return [Math.min(...values), Math.max(...values)];
    }
    case 'disc':
      return discRange(patch.centre, patch.radius, patch.normal, direction);
    case 'side':
    case 'profile': {
      const rings = stationsOf(patch).map(([height, radius]) =>
        discRange(add(patch.base, scale(patch.axis, height)), radius, patch.axis, direction),
      );
      return [Math.min(...rings.map(([low]) => low)), Math.max(...rings.map(([, high]) => high))];
    }
    case 'dish':
      return dishRange(patch, direction);
    case 'group': {
      const all = patch.members.map((member) => patchRange(member, direction));
      return [Math.min(...all.map(([low]) => low)), Math.max(...all.map(([, high]) => high))];
    }
    case 'zone': {
      // Rim of the zone, and the sphere itself where its own extreme point belongs to the zone.
      const lean = dot(patch.axis, direction);
      const middle = dot(patch.centre, direction);
      const rimRadius = Math.sqrt(Math.max(0, patch.radius ** 2 - patch.from ** 2));
      const rim = discRange(add(patch.centre, scale(patch.axis, patch.from)), rimRadius, patch.axis, direction);
      const low = -lean * patch.radius >= patch.from ? middle - patch.radius : rim[0];
      const high = lean * patch.radius >= patch.from ? middle + patch.radius : rim[1];
      return [Math.min(low, rim[0]), Math.max(high, rim[1])];
    }
    case 'facets':
      return facetsRange(patch, direction);
  }
}

function discRange(centre: Vector3, radius: number, normal: Vector3, direction: Vector3): readonly [number, number] {
  const reach = radius * Math.sqrt(Math.max(0, 1 - dot(normal, direction) ** 2));
  const middle = dot(centre, direction);
  return [middle - reach, middle + reach];
}

/**
 * The spot a pump aimed at a face looks at, with the outward normal and the face's u and v there. On the side of a cylinder
 * or cone and on a whole sphere that is the front (towards −v, which is −y before any turn), half way up.
 */
export function patchAim(patch: FacePatch): { point: Vector3; normal: Vector3; u: Vector3; v: Vector3 } {
  if (patch.kind === 'facets') return facetsAim(patch);
  const front = scale(patch.v, -1);
  if (isRevolved(patch)) {
    const point = add(patchCentre(patch), scale(front, girthOf(patch) / (2 * Math.PI)));
    return { point, normal: front, u: patch.u, v: patch.axis };
  }
  if (patch.kind === 'zone' && patch.from <= -patch.radius) {
    return { point: add(patch.centre, scale(front, patch.radius)), normal: front, u: patch.u, v: patch.axis };
  }
  return { point: patchCentre(patch), normal: patchNormal(patch), u: patch.u, v: patch.v };
}
