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
const GAP = 3;

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
    const taken: DOMRect[] = [];
    for (const { label, element } of this.#names) {
      const spot = new Vector3(...label.at).project(eye.camera);
      const [x, y] = [((spot.x + 1) / 2) * width, ((1 - spot.y) / 2) * height];
      element.hidden = !wanted(label);
      if (element.hidden) continue;
      const [w, h] = [element.offsetWidth, element.offsetHeight];
      const box = new DOMRect(x - w / 2 - GAP, y - h / 2 - GAP, w + 2 * GAP, h + 2 * GAP);
      element.hidden = !fits(box, width, height) || taken.some((other) => overlap(box, other));
      if (element.hidden) continue;
      taken.push(box);
      element.style.transform = `translate(${Math.round(x - w / 2)}px,${Math.round(y - h / 2)}px)`;
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

const fits = (box: DOMRect, width: number, height: number): boolean =>
  box.left >= 0 && box.top >= 0 && box.right <= width && box.bottom <= height;

const overlap = (a: DOMRect, b: DOMRect): boolean =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
