import { AmbientLight, DirectionalLight, Raycaster, Scene, Vector2, WebGLRenderer } from 'three';
import { firstOutlook } from '../outlook.js';
import type { OpenDrawing, OpenFace, OpenPath } from '../unpack-drawing.js';
import { Cut, type CutAt } from './cut.js';
import { Eye, type Subject } from './eye.js';
import { find, type Label, Labels } from './labels.js';
import { type PageColours, pageColours } from './page-colours.js';
import { PartModels } from './part-models.js';
import { PathModels } from './path-models.js';
import { PumpModels } from './pump-models.js';

const MOST_PIXEL_RATIO = 2;
const PRINT_WIDTH = 1500;

/** What is to be seen. */
export interface Show {
  readonly paths: readonly OpenPath[];
  readonly isLit: (face: OpenFace) => boolean;
  readonly hiddenParts: ReadonlySet<number>;
  readonly cut: CutAt | null;
  readonly names: boolean;
  readonly pumps: boolean;
}

/** The picture itself. It is drawn when something changed and never otherwise. */
export class Stage {
  readonly eye: Eye;
  readonly canvas: HTMLCanvasElement;
  readonly near: Subject;
  readonly everything: Subject;
  #renderer: WebGLRenderer;
  #scene = new Scene();
  #cut = new Cut();
  #parts: PartModels;
  #paths: PathModels;
  #pumps: PumpModels;
  #labels: Labels;
  #light = new DirectionalLight(0xffffff, 1.6);
  #view: HTMLElement;
  #drawing: OpenDrawing;
  #show: Show | null = null;
  #colours: PageColours;
  #waiting = false;
  #frames = 0;

  constructor(view: HTMLElement, canvas: HTMLCanvasElement, context: WebGL2RenderingContext, drawing: OpenDrawing) {
    this.#view = view;
    this.canvas = canvas;
    this.#drawing = drawing;
    this.#renderer = new WebGLRenderer({ canvas, context });
    this.#renderer.localClippingEnabled = true;
    const { planes } = this.#cut;
    this.#parts = new PartModels(drawing, planes);
    this.#paths = new PathModels(drawing, planes);
    this.#pumps = new PumpModels(drawing);
    this.#scene.add(this.#parts.group, this.#paths.group, this.#pumps.group, this.#cut.group);
    this.#scene.add(new AmbientLight(0xffffff, 1.8), this.#light);
    this.#labels = new Labels(find(view, '.view-stage'), labelsOf(drawing));
    this.#colours = pageColours(view, false);
    const { parts, pumps } = drawing;
    const [low, high] = [Math.min, Math.max].map((pick, i) =>
      [0, 1, 2].map((axis) => pick(...parts.map((part) => (i === 0 ? part.low : part.high)[axis]))),
    );
    this.near = { low, high, points: pumps.map(({ tail }) => tail) };
    this.everything = { ...this.near, points: pumps.flatMap(({ at, outline }) => [at, ...pointsOf(outline)]) };
    this.eye = new Eye(this.near, firstOutlook(high.map((value, i) => value - low[i])));
    matchMedia('(prefers-color-scheme: dark)').addEventListener('change', () => this.#repaint(false));
    new ResizeObserver(() => this.ask()).observe(canvas);
  }

  show(show: Show): void {
    const before = this.#show;
    this.#show = show;
    this.#parts.showParts(show.hiddenParts);
    this.#parts.paint(this.#colours, show.isLit);
    this.#cut.set(show.cut, this.#parts.visibleFaces(), this.#colours.ink);
    this.#pumps.group.visible = show.pumps;
    if (before?.paths !== show.paths) this.#paths.show(show.paths, this.#colours, this.#pixelRatio());
    this.ask();
  }

  /** Asks for a picture with the next frame. */
  ask(): void {
    if (this.#waiting) return;
    this.#waiting = true;
    requestAnimationFrame(() => {
      this.#waiting = false;
      this.#draw(this.canvas.clientWidth, this.canvas.clientHeight, this.#pixelRatio());
    });
  }

  /** The face under a spot of the canvas that is not cut away. */
  faceAt(x: number, y: number): OpenFace | null {
    const spot = new Vector2((2 * x) / this.canvas.clientWidth - 1, 1 - (2 * y) / this.canvas.clientHeight);
    const ray = new Raycaster();
    ray.setFromCamera(spot, this.eye.camera);
    const hit = ray.intersectObjects([...this.#parts.meshes()], false).find(({ point }) => !this.#cut.hides(point));
    return this.#parts.faceOf(hit?.object);
  }

  /** The present picture on white paper, as a data URL. */
  printed(): string {
    const { clientWidth: width, clientHeight: height } = this.canvas;
    this.#repaint(true);
    this.#draw(width, height, PRINT_WIDTH / Math.max(width, 1));
    const url = this.canvas.toDataURL();
    this.#repaint(false);
    return url;
  }

  #repaint(print: boolean): void {
    this.#colours = pageColours(this.#view, print);
    this.#pumps.paint(this.#colours);
    if (this.#show === null) return;
    const { paths } = this.#show;
    this.show(this.#show);
    this.#paths.show(paths, this.#colours, this.#pixelRatio());
  }

  #pixelRatio(): number {
    return Math.min(MOST_PIXEL_RATIO, devicePixelRatio);
  }

  #draw(width: number, height: number, pixelRatio: number): void {
    if (width === 0 || height === 0) return;
    if (this.#frames === 0) this.#pumps.paint(this.#colours);
    this.#renderer.setPixelRatio(pixelRatio);
    this.#renderer.setSize(width, height, false);
    this.#renderer.setClearColor(this.#colours.paper);
    this.eye.aim(width, height);
    this.#light.position.copy(this.eye.camera.position);
    this.#renderer.render(this.#scene, this.eye.camera);
    const { names = true, hiddenParts, pumps = true } = this.#show ?? {};
    this.#labels.place(this.eye, width, height, ({ className, text }) => {
      const part = this.#drawing.parts.findIndex(({ name }) => name === text);
      return names && (pumps || className !== 'of-pump') && !(className === 'of-part' && hiddenParts?.has(part));
    });
    this.#frames++;
    this.#view.dataset.frames = String(this.#frames);
  }
}

function pointsOf(outline: Float32Array): readonly (readonly number[])[] {
  return Array.from({ length: outline.length / 3 }, (_, i) => [...outline.subarray(3 * i, 3 * i + 3)]);
}

/** The exit first, for names that come later give way. */
function labelsOf({ parts, pumps, planes }: OpenDrawing): readonly Label[] {
  const exits = parts.flatMap(({ faces }) =>
    faces
      .filter(({ isExit }) => isExit)
      .map((face) => ({ text: `exit: ${face.name}`, at: middleOf(face.positions), className: 'of-exit' })),
  );
  return [
    ...exits,
    ...planes.map(({ name, isExit, outline }) => ({
      text: isExit ? `exit: ${name}` : name,
      at: middleOf(outline),
      className: isExit ? 'of-exit' : 'of-plane',
    })),
    ...pumps.map(({ name, watts, wavelengthNm, tail }) => ({
      text: `${name}, ${Number(watts.toPrecision(3))} W, ${Math.round(wavelengthNm)} nm`,
      at: tail,
      className: 'of-pump',
    })),
    ...parts.map(({ name, low, high }) => ({
      text: name,
      at: low.map((value, i) => (value + high[i]) / 2),
      className: 'of-part',
    })),
  ];
}

function middleOf(positions: Float32Array): readonly number[] {
  const ends = [0, 1, 2].map((axis) => {
    const places = positions.filter((_, i) => i % 3 === axis);
    return [places.reduce((a, b) => Math.min(a, b), Infinity), places.reduce((a, b) => Math.max(a, b), -Infinity)];
  });
  return ends.map(([low, high]) => (low + high) / 2);
}
