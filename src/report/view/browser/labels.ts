import { Vector3 } from 'three';
import { along, outlookAxes } from '../outlook.js';
import type { Eye } from './eye.js';

export interface Label {
  readonly text: string;
  readonly at: readonly number[];
  readonly className: string;
}

const NICE = [1, 2, 5];
const BAR_PIXELS = 110;
const AXIS_PIXELS = 26;
const GAP = 4;
/** Corners that belong to the scale and to the axes. */
const SCALE: readonly [number, number] = [150, 36];
const AXES = 84;

/** Names over the picture, a scale, and the directions of the axes. What would cover an earlier name is left out. */
export class Labels {
  readonly #names: readonly { readonly label: Label; readonly element: HTMLElement }[];
  readonly #scale: HTMLElement;
  readonly #axes: Element;

  constructor(stage: Element, labels: readonly Label[]) {
    const layer = find(stage, '.view-names');
    this.#scale = find(stage, '.view-scale');
    this.#axes = find(stage, '.view-axes');
    this.#names = labels.map((label) => {
      const element = document.createElement('span');
      element.className = `view-name ${label.className}`;
      element.textContent = label.text;
      layer.append(element);
      return { label, element };
    });
  }

  place(eye: Eye, width: number, height: number, wanted: (label: Label) => boolean): void {
    const taken = [new DOMRect(0, height - SCALE[1], ...SCALE), new DOMRect(width - AXES, height - AXES, AXES, AXES)];
    for (const { label, element } of this.#names) {
      const spot = new Vector3(...label.at).project(eye.camera);
      const [x, y] = [((spot.x + 1) / 2) * width, ((1 - spot.y) / 2) * height];
      element.hidden = !wanted(label);
      if (element.hidden) continue;
      const [w, h] = [element.offsetWidth, element.offsetHeight];
      const seen = x >= 0 && y >= 0 && x <= width && y <= height;
      const box = seen ? freeBox(x, y, w, h, width, height, taken) : null;
      element.hidden = box === null;
      if (box === null) continue;
      taken.push(box);
      element.style.transform = `translate(${Math.round(box.x)}px,${Math.round(box.y)}px)`;
    }
    this.#showScale(eye);
    this.#showAxes(eye);
  }

  #showScale({ millimetresPerPixel }: Eye): void {
    const most = BAR_PIXELS * millimetresPerPixel;
    const power = 10 ** Math.floor(Math.log10(most));
    const length = power * Math.max(...NICE.filter((one) => one * power <= most));
    this.#scale.style.width = `${length / millimetresPerPixel}px`;
    const [value, unit] = length < 0.1 ? [1000 * length, 'µm'] : [length, 'mm'];
    this.#scale.textContent = `${Number(value.toPrecision(3))} ${unit}`;
  }

  #showAxes({ outlook }: Eye): void {
    const { right, up, toward } = outlookAxes(outlook);
    for (const [i, name] of ['x', 'y', 'z'].entries()) {
      const axis = [0, 1, 2].map((other) => (other === i ? 1 : 0));
      const [x, y] = [AXIS_PIXELS * along(axis, right), -AXIS_PIXELS * along(axis, up)];
      const line = this.#axes.querySelector(`.axis-${name}`);
      const text = this.#axes.querySelector(`.letter-${name}`);
      line?.setAttribute('d', `M0 0L${x.toFixed(1)} ${y.toFixed(1)}`);
      text?.setAttribute('x', (1.32 * x).toFixed(1));
      text?.setAttribute('y', (1.32 * y + 4).toFixed(1));
      // An axis along the line of sight is a point; its letter would sit on the others.
      const flat = Math.abs(along(axis, toward)) > 0.97;
      text?.setAttribute('visibility', flat ? 'hidden' : 'visible');
    }
  }
}

export function find(root: ParentNode, selector: string): HTMLElement {
  const element = root.querySelector<HTMLElement>(selector);
  if (element === null) throw new Error(`the view has no ${selector}`);
  return element;
}

/** A place for a name at its spot, or just above or below it, within the picture and off the others; null where there is none. */
function freeBox(
  x: number,
  y: number,
  w: number,
  h: number,
  width: number,
  height: number,
  taken: readonly DOMRect[],
): DOMRect | null {
  for (const down of [0, -1, 1, -2, 2]) {
    const left = Math.min(width - w - GAP, Math.max(GAP, x - w / 2));
    const top = Math.min(height - h - GAP, Math.max(GAP, y - h / 2 + down * (h + GAP)));
    const box = new DOMRect(left, top, w, h);
    if (!taken.some((other) => overlap(box, other))) return box;
  }
  return null;
}

const overlap = (a: DOMRect, b: DOMRect): boolean =>
  a.left < b.right + GAP && b.left < a.right + GAP && a.top < b.bottom && b.top < a.bottom;
