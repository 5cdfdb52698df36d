import { OrthographicCamera, Vector3 } from 'three';
import { along, boxCorners, type Outlook, outlookAxes } from '../outlook.js';

const MARGIN = 1.12;
const MOST_ELEVATION = Math.PI / 2;
const ZOOM_RANGE: readonly [number, number] = [0.05, 60];

/** What is to be seen: the corners that must fit and the middle they turn about. */
export interface Subject {
  readonly low: readonly number[];
  readonly high: readonly number[];
  /** Further points that must fit. */
  readonly points: readonly (readonly number[])[];
}

/** The eye: turns about the middle of its subject, comes nearer, moves sideways. Parallel projection, so lengths stay true. */
export class Eye {
  readonly camera = new OrthographicCamera();
  outlook: Outlook;
  /** 1 fits the subject into the picture. */
  zoom = 1;
  #subject: Subject;
  #pan: readonly [number, number] = [0, 0];
  #perPixel = 1;

  constructor(subject: Subject, outlook: Outlook) {
    this.#subject = subject;
    this.outlook = outlook;
  }

  /** Millimetres of the design in one CSS pixel. */
  get millimetresPerPixel(): number {
    return this.#perPixel;
  }

  look(outlook: Outlook, subject = this.#subject): void {
    this.outlook = outlook;
    this.#subject = subject;
    this.zoom = 1;
    this.#pan = [0, 0];
  }

  turn(azimuth: number, elevation: number): void {
    const up = Math.min(MOST_ELEVATION, Math.max(-MOST_ELEVATION, this.outlook.elevation + elevation));
    this.outlook = { azimuth: (this.outlook.azimuth + azimuth) % (2 * Math.PI), elevation: up };
  }

  nearer(factor: number): void {
    this.zoom = Math.min(ZOOM_RANGE[1], Math.max(ZOOM_RANGE[0], this.zoom * factor));
  }

  /** Moves what is seen by so many pixels. */
  shift(right: number, down: number): void {
    this.#pan = [this.#pan[0] - right * this.#perPixel, this.#pan[1] + down * this.#perPixel];
  }

  /** Brings the camera up to date for a picture of so many CSS pixels. */
  aim(width: number, height: number): void {
    const { right, up, toward } = outlookAxes(this.outlook);
    const { low, high, points } = this.#subject;
    const all = [...boxCorners(low, high), ...points];
    const span = (axis: readonly number[]) => {
      const places = all.map((point) => along(point, axis));
      return [Math.min(...places), Math.max(...places)] as const;
    };
    const [across, upward, deep] = [span(right), span(up), span(toward)];
    const perPixel = (MARGIN * Math.max((across[1] - across[0]) / width, (upward[1] - upward[0]) / height)) / this.zoom;
    this.#perPixel = Math.max(perPixel, 1e-9);
    const middle = (pair: readonly [number, number]) => (pair[0] + pair[1]) / 2;
    const at = new Vector3()
      .addScaledVector(new Vector3(...right), middle(across) + this.#pan[0])
      .addScaledVector(new Vector3(...up), middle(upward) + this.#pan[1])
      .addScaledVector(new Vector3(...toward), middle(deep));
    // Far enough back for pumps that stand well off.
    const far = 40 * Math.hypot(...high.map((value, i) => value - low[i])) + 4 * (deep[1] - deep[0]) + 1;
    const { camera } = this;
    camera.left = (-width * this.#perPixel) / 2;
    camera.right = -camera.left;
    camera.top = (height * this.#perPixel) / 2;
    camera.bottom = -camera.top;
    camera.near = 0;
    camera.far = 2 * far;
    camera.position.copy(at).addScaledVector(new Vector3(...toward), far);
    camera.up.set(...up);
    camera.lookAt(at);
    camera.updateProjectionMatrix();
    camera.updateMatrixWorld();
  }
}
