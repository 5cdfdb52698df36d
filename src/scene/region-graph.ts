/**
 * Regions and what happens between them, worked out as light first comes there.
 *
 * A region is a choice of side for every surface of the scene: which slab of each family of parallel planes, inside or outside each
 * quadric and each mesh. Where light is, is known by its region alone, never by asking a rounded coordinate, so no ray can slip between two
 * faces or be lost on an edge: it always has a next surface that bounds its region, and crossing it leads to exactly one
 * neighbour. Most surfaces continue beyond the part that they bound; crossing them there changes nothing (`CROSSING.pass`).
 *
 * A quadric whose surface keeps clear of the box that the axis planes make of a region is never asked there (`near`). It cannot change sides
 * unseen: light stays in the box to within rounding and crosses surfaces only where it is, so a side bit can be wrong only within rounding
 * of its surface, and there the surface is near every box that light may be in.
 */

import { meshSide } from './mesh/mesh-side.js';
import { QUADRIC_STRIDE, quadricValue } from './quadric.js';
import { quadricMeetsBox } from './quadric-in-box.js';
import type { Scene } from './scene-layout.js';
import { SPLIT, SURROUNDINGS } from './scene-layout.js';

/** Crossings that are no interface. */
export const enum CROSSING {
  /** Nothing changes here. */
  pass = -1,
  /** Not worked out yet. */
  unknown = -2,
}

/** Integers per interface in `interfaces`; a crossing is the place of its record there. */
export const enum INTERFACE {
  flags = 0,
  finish = 1,
  mediumBeyond = 2,
  ownerBeyond = 3,
  /** Face left, −1 when coming from the surroundings. */
  faceOut = 4,
  /** Face entered, −1 when going to the surroundings. */
  faceIn = 5,
  /** Face that carries the finish: where its absorption is booked. */
  faceActing = 6,
  /** Recorder: of a free plane or sphere, or of pump light arriving at the face entered. */
  recorder = 7,
  /** Table of a stack of thin films between the two media, in this direction; −1 for other finishes. */
  film = 8,
  STRIDE = 9,
}
export const enum FLAG {
  /** The interface is a free plane or sphere. */
  freeSurface = 1,
  /** Pump light that arrives here is recorded. */
  recordsArrival = 2,
  /** The finish spreads what it reflects or transmits. */
  spreads = 4,
}

/** Doubles the kernel keeps for each wall. */
const WALL_DOUBLES = 4;

/** Closer than this to a surface, the direction of travel decides on which side a starting point lies, mm. */
const TIE = 1e-9;

export class RegionGraph {
  /** Ways out of a region: low and high plane of every family, every quadric, then every named group of facets. */
  readonly ways: number;
  /**
   * Light is flown from one boundary to the next; otherwise all surfaces are axis planes, polarisation is not carried, and light is flown
   * from event to event.
   */
  readonly stepwise: boolean;
  readonly families: number;
  readonly quadrics: number;
  /** Quadrics and meshes. */
  readonly sides: number;
  readonly capacity: number;

  /** [region · 2·families + 2·family + (0 low | 1 high)]: offset of the plane that bounds the region, ±Infinity without. */
  readonly bound: Float64Array;
  /** [region · sides + quadric, or + quadrics + mesh]: −1 inside, +1 outside. */
  readonly side: Int8Array;
  /** [region · quadrics + i]: the first `nearCount[region]` are the quadrics that light there may meet, in order. */
  readonly near: Uint16Array;
  readonly nearCount: Int32Array;
  /** [region · ways + way]: region beyond, meaningful once `crossing` is known. */
  readonly neighbour: Int32Array;
  /** [region · ways + way]: place of the interface's record, or CROSSING.pass, or unknown. */
  readonly crossing: Int32Array;
  readonly owner: Int32Array;
  readonly medium: Int32Array;

  /**
   * Regions between axis planes only, empty in other scenes: what the kernel knows of their walls (kernel/wall.ts), and since when;
   * −1 while the ways out are not all resolved.
   */
  readonly walls: Float64Array;
  readonly wallsSince: Int32Array;

  /** Records of INTERFACE.STRIDE integers. Grows: read it anew after `resolve`. */
  interfaces = new Int32Array(64 * INTERFACE.STRIDE);

  #regions = 0;
  readonly #slab: Int32Array;
  /** Open-addressing hash of regions by their sides: region + 1, 0 free. */
  readonly #table: Int32Array;
  /** Slab of every family, then side of every quadric, of the region being looked up. */
  readonly #wanted: Int32Array;
  readonly #point = new Float64Array(6);
  readonly #low = new Float64Array(3);
  readonly #high = new Float64Array(3);
  readonly #knownInterfaces = new Map<string, number>();

  /** @param stepwise also where all surfaces are axis planes: slower, but the flight stops at every boundary. */
  constructor(
    readonly scene: Scene,
    stepwise = false,
  ) {
    this.families = scene.families;
    this.quadrics = scene.quadrics;
    this.sides = this.quadrics + scene.meshes;
    this.ways = 2 * this.families + this.quadrics + scene.groups;
    this.stepwise = stepwise || scene.polarised !== 0 || this.ways !== 6;
    const bytes = this.ways * 8 + this.families * 20 + this.sides + 2 * this.quadrics + 12;
    this.capacity = Math.max(64, Math.min(1 << 16, Math.floor(2 ** 28 / bytes)));
    this.bound = new Float64Array(this.capacity * 2 * this.families);
    this.side = new Int8Array(this.capacity * this.sides);
    this.near = new Uint16Array(this.capacity * this.quadrics);
    this.nearCount = new Int32Array(this.capacity);
    this.neighbour = new Int32Array(this.capacity * this.ways);
    this.crossing = new Int32Array(this.capacity * this.ways);
    this.owner = new Int32Array(this.capacity);
    this.medium = new Int32Array(this.capacity);
    const boxes = this.stepwise ? 0 : this.capacity;
    this.walls = new Float64Array(boxes * 6 * WALL_DOUBLES);
    this.wallsSince = new Int32Array(boxes);
    this.#slab = new Int32Array(this.capacity * this.families);
    this.#table = new Int32Array(2 ** Math.ceil(Math.log2(2 * this.capacity)));
    this.#wanted = new Int32Array(this.families + this.sides);
  }

  get regions(): number {
    return this.#regions;
  }

  /** Almost full: the kernel calls this between histories, when no region number is held. */
  get crowded(): boolean {
    return this.#regions > 0.75 * this.capacity;
  }

  /** Forgets every region; they are worked out anew when light comes there. Results do not depend on it. */
  forget(): void {
    this.#table.fill(0);
    this.#regions = 0;
  }

  /** As `forget`, for light under way: keeps its region. @returns its new number */
  renew(region: number): number {
    this.#want(region);
    this.forget();
    return this.#intern();
  }

  #want(region: number): void {
    for (let f = 0; f < this.families; f++) this.#wanted[f] = this.#slab[region * this.families + f];
    for (let q = 0; q < this.sides; q++) this.#wanted[this.families + q] = this.side[region * this.sides + q];
  }

  /** Region of a starting point; on a surface, the side the direction leads to. */
  locate(x: number, y: number, z: number, dx: number, dy: number, dz: number): number {
    const { scene } = this;
    const wanted = this.#wanted;
    for (let f = 0; f < this.families; f++) {
      const nx = scene.familyNormal[3 * f];
      const ny = scene.familyNormal[3 * f + 1];
      const nz = scene.familyNormal[3 * f + 2];
      const at = nx * x + ny * y + nz * z;
      const forward = nx * dx + ny * dy + nz * dz >= 0;
      let slab = 0;
      for (let i = scene.familyStart[f]; i < scene.familyStart[f + 1]; i++) {
        const beyond = at - scene.planeOffset[i];
        if (beyond > TIE || (beyond >= -TIE && forward)) slab++;
      }
      wanted[f] = slab;
    }
    for (let q = 0; q < this.quadrics; q++) {
      const c = q * QUADRIC_STRIDE;
      const h = 1e-6;
      const value = quadricValue(scene.quadric, c, x, y, z);
      const ahead = quadricValue(scene.quadric, c, x + h * dx, y + h * dy, z + h * dz);
      // q is about 2·radius·distance near its surface.
      const reach = TIE * quadricScale(scene.quadric, c, x, y, z);
      wanted[this.families + q] = (Math.abs(value) > reach ? value : ahead) > 0 ? 1 : -1;
    }
    if (scene.meshes > 0) {
      this.#point.set([x, y, z, dx, dy, dz]);
      for (let m = 0; m < scene.meshes; m++)
        wanted[this.families + this.quadrics + m] = meshSide(scene, m, this.#point);
    }
    return this.#intern();
  }

  /** Whether a point lies well inside a region, so that `locate` would return it, whatever the direction (of meshes: along 0.6, 0.64, 0.48). */
  contains(region: number, x: number, y: number, z: number): boolean {
    this.#point[0] = x;
    this.#point[1] = y;
    this.#point[2] = z;
    this.#point[3] = 0.6;
    this.#point[4] = 0.64;
    this.#point[5] = 0.48;
    return this.holds(region, this.#point);
  }

  /** As `contains`, of the point and direction in the first six numbers of an array. */
  holds(region: number, point: Float64Array): boolean {
    const x = point[0];
    const y = point[1];
    const z = point[2];
    const { scene } = this;
    for (let f = 0; f < this.families; f++) {
      const at = scene.familyNormal[3 * f] * x + scene.familyNormal[3 * f + 1] * y + scene.familyNormal[3 * f + 2] * z;
      const b = 2 * (region * this.families + f);
      if (at < this.bound[b] + TIE || at > this.bound[b + 1] - TIE) return false;
    }
    for (let q = 0; q < this.quadrics; q++) {
      const c = q * QUADRIC_STRIDE;
      const value = quadricValue(scene.quadric, c, x, y, z) * this.side[region * this.sides + q];
      if (value < TIE * quadricScale(scene.quadric, c, x, y, z)) return false;
    }
    for (let m = 0; m < scene.meshes; m++) {
      if (meshSide(scene, m, point) !== this.side[region * this.sides + this.quadrics + m]) return false;
    }
    return true;
  }

  /** Works out what lies beyond one way of a region. Returns the crossing. */
  resolve(region: number, way: number): number {
    const at = region * this.ways + way;
    if (this.crossing[at] !== CROSSING.unknown) return this.crossing[at];
    this.#want(region);
    const wanted = this.#wanted;
    let surface: number;
    let group = 0;
    if (way < 2 * this.families) {
      const family = way >> 1;
      const up = way & 1;
      surface = this.scene.familyStart[family] + wanted[family] - (up ? 0 : 1);
      wanted[family] += up ? 1 : -1;
    } else {
      let q = way - 2 * this.families;
      if (q >= this.quadrics) {
        const mesh = this.scene.groupMesh[q - this.quadrics];
        group = q - this.quadrics - this.scene.meshGroup[mesh];
        q = this.quadrics + mesh;
      }
      surface = this.scene.planeOffset.length + q;
      wanted[this.families + q] *= -1;
    }
    const beyond = this.#intern();
    this.neighbour[at] = beyond;
    this.crossing[at] = this.#interface(region, beyond, surface, group);
    return this.crossing[at];
  }

  /** Works out all six ways of a region between axis planes. */
  resolveAll(region: number): void {
    for (let way = 0; way < 6; way++) {
      if (Number.isFinite(this.bound[region * 6 + way])) this.resolve(region, way);
    }
    this.wallsSince[region] = 0;
  }

  /** What is known of walls holds no longer. */
  forgetWalls(): void {
    for (let region = 0; region < Math.min(this.#regions, this.wallsSince.length); region++) {
      if (this.wallsSince[region] > 0) this.wallsSince[region] = 0;
    }
  }

  /** Number of the region with the wanted sides; a new one if light has not been there. */
  #intern(): number {
    const wanted = this.#wanted;
    const mask = this.#table.length - 1;
    // FNV-1a over the sides.
    let hash = 0x811c9dc5;
    for (let i = 0; i < wanted.length; i++) hash = Math.imul(hash ^ wanted[i], 0x01000193);
    let cell = (hash ^ (hash >>> 15)) & mask;
    for (; this.#table[cell] !== 0; cell = (cell + 1) & mask) {
      if (this.#isWanted(this.#table[cell] - 1)) return this.#table[cell] - 1;
    }
    if (this.#regions >= this.capacity) throw new RangeError('more regions in one history than the graph can hold');
    const region = this.#regions++;
    if (region < this.wallsSince.length) this.wallsSince[region] = -1;
    this.#table[cell] = region + 1;
    for (let f = 0; f < this.families; f++) {
      const slab = wanted[f];
      const start = this.scene.familyStart[f];
      const count = this.scene.familyStart[f + 1] - start;
      const b = 2 * (region * this.families + f);
      this.#slab[region * this.families + f] = slab;
      this.bound[b] = slab > 0 ? this.scene.planeOffset[start + slab - 1] : Number.NEGATIVE_INFINITY;
      this.bound[b + 1] = slab < count ? this.scene.planeOffset[start + slab] : Number.POSITIVE_INFINITY;
    }
    for (let q = 0; q < this.sides; q++) this.side[region * this.sides + q] = wanted[this.families + q];
    this.#findNear(region);
    this.crossing.fill(CROSSING.unknown, region * this.ways, (region + 1) * this.ways);
    this.owner[region] = this.#ownerOf(region);
    this.medium[region] = this.scene.ownerMedium[this.owner[region]];
    return region;
  }

  #findNear(region: number): void {
    for (let axis = 0; axis < 3; axis++) {
      const b = 2 * (region * this.families + axis);
      this.#low[axis] = this.bound[b];
      this.#high[axis] = this.bound[b + 1];
    }
    let count = 0;
    for (let q = 0; q < this.quadrics; q++) {
      if (quadricMeetsBox(this.scene.quadric, q * QUADRIC_STRIDE, this.#low, this.#high))
        this.near[region * this.quadrics + count++] = q;
    }
    this.nearCount[region] = count;
  }

  #isWanted(region: number): boolean {
    for (let f = 0; f < this.families; f++) {
      if (this.#slab[region * this.families + f] !== this.#wanted[f]) return false;
    }
    for (let q = 0; q < this.sides; q++) {
      if (this.side[region * this.sides + q] !== this.#wanted[this.families + q]) return false;
    }
    return true;
  }

  #ownerOf(region: number): number {
    for (let owner = this.scene.owners - 1; owner > SURROUNDINGS; owner--) {
      for (let piece = this.scene.ownerPieceStart[owner]; piece < this.scene.ownerPieceStart[owner + 1]; piece++) {
        if (this.#inPiece(piece, region)) return owner;
      }
    }
    return SURROUNDINGS;
  }

  #inPiece(piece: number, region: number): boolean {
    const { pieceStart, pieceMember } = this.scene;
    for (let m = pieceStart[piece]; m < pieceStart[piece + 1]; m++) {
      const body = m === pieceStart[piece];
      if (this.#inPrimitive(pieceMember[m], region) !== body) return false;
    }
    return true;
  }

  #inPrimitive(primitive: number, region: number): boolean {
    const { primitiveStart, constraintSurface, constraintSide } = this.scene;
    for (let c = primitiveStart[primitive]; c < primitiveStart[primitive + 1]; c++) {
      if (this.#sideOf(constraintSurface[c], region) !== constraintSide[c]) return false;
    }
    return true;
  }

  #sideOf(surface: number, region: number): number {
    const { planeOffset, familyStart } = this.scene;
    if (surface >= planeOffset.length) return this.side[region * this.sides + surface - planeOffset.length];
    let family = 0;
    while (familyStart[family + 1] <= surface) family++;
    return this.#slab[region * this.families + family] > surface - familyStart[family] ? 1 : -1;
  }

  /** @param group of a mesh's surface: which of its named groups */
  #interface(from: number, to: number, surface: number, group: number): number {
    const { scene } = this;
    const isPlane = surface < scene.planeOffset.length;
    const detector = isPlane ? scene.planeDetector[surface] : scene.quadricDetector[surface - scene.planeOffset.length];
    if (detector >= 0) return this.#internInterface(-1, this.medium[to], this.owner[to], -1, -1, -1, detector, -1);
    const ownerFrom = this.owner[from];
    const ownerTo = this.owner[to];
    if (ownerFrom === ownerTo) return CROSSING.pass;
    const faceOut = this.#faceOf(ownerFrom, from, to, surface, group);
    const faceIn = this.#faceOf(ownerTo, from, to, surface, group);
    const outFinish = faceOut < 0 ? -1 : scene.faceFinish[faceOut];
    const inFinish = faceIn < 0 ? -1 : scene.faceFinish[faceIn];
    const acting = outFinish >= 0 ? faceOut : inFinish >= 0 ? faceIn : faceOut >= 0 ? faceOut : faceIn;
    const finish = Math.max(outFinish >= 0 ? outFinish : inFinish, 0);
    const outward = acting === faceOut ? 1 : 0;
    const film =
      scene.filmOf[((2 * finish + outward) * scene.media + this.medium[from]) * scene.media + this.medium[to]];
    if (film < 0 && scene.finishSplit[finish] === SPLIT.stack) {
      throw new Error(`no table of finish ${finish} between media ${this.medium[from]} and ${this.medium[to]}`);
    }
    return this.#internInterface(finish, this.medium[to], ownerTo, faceOut, faceIn, acting, -1, film);
  }

  /** Face of `owner` that lies on `surface` between two neighbouring regions, −1 if its boundary is not there. */
  #faceOf(owner: number, from: number, to: number, surface: number, group: number): number {
    const { ownerPieceStart, pieceStart, pieceMember, primitiveStart, constraintSurface, constraintFace } = this.scene;
    for (let piece = ownerPieceStart[owner]; piece < ownerPieceStart[owner + 1]; piece++) {
      if (this.#inPiece(piece, from) === this.#inPiece(piece, to)) continue;
      for (let m = pieceStart[piece]; m < pieceStart[piece + 1]; m++) {
        const primitive = pieceMember[m];
        if (this.#inPrimitive(primitive, from) === this.#inPrimitive(primitive, to)) continue;
        for (let c = primitiveStart[primitive]; c < primitiveStart[primitive + 1]; c++) {
          if (constraintSurface[c] === surface) return constraintFace[c] + group;
        }
      }
    }
    return -1;
  }

  #internInterface(
    finish: number,
    mediumBeyond: number,
    ownerBeyond: number,
    faceOut: number,
    faceIn: number,
    faceActing: number,
    detector: number,
    film: number,
  ): number {
    const { scene } = this;
    const key = `${finish},${mediumBeyond},${ownerBeyond},${faceOut},${faceIn},${detector},${film}`;
    const known = this.#knownInterfaces.get(key);
    if (known !== undefined) return known;
    const at = this.#knownInterfaces.size * INTERFACE.STRIDE;
    if (at >= this.interfaces.length) {
      const larger = new Int32Array(2 * this.interfaces.length);
      larger.set(this.interfaces);
      this.interfaces = larger;
    }
    this.#knownInterfaces.set(key, at);
    const arrival = faceIn < 0 ? -1 : scene.faceRecorderArriving[faceIn];
    const spreads = finish >= 0 && (scene.finishReflectSpread[finish] || scene.finishTransmitSpread[finish]);
    const flags =
      (detector >= 0 ? FLAG.freeSurface : 0) | (arrival >= 0 ? FLAG.recordsArrival : 0) | (spreads ? FLAG.spreads : 0);
    const recorder = detector >= 0 ? detector : arrival;
    this.interfaces.set([flags, finish, mediumBeyond, ownerBeyond, faceOut, faceIn, faceActing, recorder, film], at);
    return at;
  }
}

/** Size of the gradient of q: what turns a value of q into a distance. */
function quadricScale(q: Float64Array, c: number, x: number, y: number, z: number): number {
  const gx = q[c] * x + q[c + 3] * y + q[c + 4] * z + q[c + 6];
  const gy = q[c + 3] * x + q[c + 1] * y + q[c + 5] * z + q[c + 7];
  const gz = q[c + 4] * x + q[c + 5] * y + q[c + 2] * z + q[c + 8];
  return 2 * Math.sqrt(gx * gx + gy * gy + gz * gz) + 1e-12;
}
