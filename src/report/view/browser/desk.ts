import { choosePaths, fatesOfRows, isAt, type PathChoice } from '../choose-paths.js';
import { FATE_EVENT, type FateChoice, type FateRow } from '../fate-event.js';
import { FROM_ABOVE, FROM_FRONT, FROM_LEFT, firstOutlook } from '../outlook.js';
import type { OpenDrawing, OpenFace } from '../unpack-drawing.js';
import type { CutAt } from './cut.js';
import { handsOn, KEY_NEARER, KEY_TURN } from './hands.js';
import { find } from './labels.js';
import type { Stage } from './stage.js';

const CUT_STEPS = 1000;

/** The controls around the picture, and what they ask of it. */
export class Desk {
  readonly #view: HTMLElement;
  readonly #stage: Stage;
  readonly #drawing: OpenDrawing;
  readonly #readout: HTMLElement;
  readonly #count: HTMLElement | null;
  #reemitted: PathChoice['reemitted'] = 'any';
  /** Places that were chosen from outside. */
  #lit: ReadonlySet<string> = new Set();
  #shown: ReturnType<typeof choosePaths>['shown'] = [];

  constructor(view: HTMLElement, stage: Stage, drawing: OpenDrawing) {
    this.#view = view;
    this.#stage = stage;
    this.#drawing = drawing;
    this.#readout = find(view, '.view-readout');
    this.#count = view.querySelector('.view-count');
    handsOn(
      stage.canvas,
      stage.eye,
      () => stage.ask(),
      (x, y) => this.#choosePlace(stage.faceAt(x, y)?.name ?? ''),
    );
    this.#listen();
    this.#apply();
  }

  /** Rows of the ledger were chosen elsewhere on the page; none takes the choice back. */
  choose(rows: readonly FateRow[]): void {
    const { fates, reemitted } = fatesOfRows(rows, this.#drawing.fates);
    this.#ticks('.view-fate').forEach((box) => {
      box.checked = fates.has(Number(box.value));
    });
    this.#reemitted = reemitted;
    this.#lit = new Set(rows.flatMap(({ where }) => (where === null ? [] : [where])));
    this.#choosePlace('', false);
    this.#apply();
    if (rows.length === 0) this.#say('');
    else if (reemitted !== 'any') {
      this.#say('Stokes heat is left on the way, not at the end: these are the paths a dye took and sent out anew.');
    } else if (fates.size === 0) this.#say('No path that ended so was kept: it is too rare.');
  }

  #listen(): void {
    const view = this.#view;
    const { eye, canvas } = this.#stage;
    let hovered: OpenFace | null = null;
    let waiting = false;
    canvas.addEventListener('pointermove', (event) => {
      if (event.buttons !== 0 || waiting) return;
      waiting = true;
      requestAnimationFrame(() => {
        waiting = false;
        const face = this.#stage.faceAt(event.offsetX, event.offsetY);
        if (face === hovered) return;
        hovered = face;
        this.#say(face === null ? this.#placeWords(this.#place) : this.#faceWords(face));
      });
    });
    view.addEventListener('input', (event) => {
      const target = event.target as HTMLElement;
      if (target.matches('.view-group')) this.#tickGroup(target as HTMLInputElement);
      if (target.matches('.view-fate, .view-group')) this.#ownChoice();
      if (target.matches('.view-place')) this.#say(this.#placeWords(this.#place));
      this.#apply();
    });
    const first = firstOutlook(this.#stage.near.high.map((value, i) => value - this.#stage.near.low[i]));
    const actions: Readonly<Record<string, () => void>> = {
      first: () => eye.look(first, this.#stage.near),
      front: () => eye.look(FROM_FRONT, this.#stage.near),
      left: () => eye.look(FROM_LEFT, this.#stage.near),
      above: () => eye.look(FROM_ABOVE, this.#stage.near),
      all: () => eye.look(eye.outlook, this.#stage.everything),
      'turn-left': () => eye.turn(KEY_TURN, 0),
      'turn-right': () => eye.turn(-KEY_TURN, 0),
      'turn-up': () => eye.turn(0, KEY_TURN),
      'turn-down': () => eye.turn(0, -KEY_TURN),
      nearer: () => eye.nearer(KEY_NEARER),
      farther: () => eye.nearer(1 / KEY_NEARER),
    };
    const keys: Readonly<Record<string, string>> = {
      '0': 'first',
      '1': 'front',
      '2': 'left',
      '3': 'above',
      '4': 'all',
    };
    const act = (name: string | undefined) => {
      if (name === undefined || actions[name] === undefined) return false;
      actions[name]();
      this.#stage.ask();
      return true;
    };
    for (const button of view.querySelectorAll<HTMLElement>('button[data-look]')) {
      button.addEventListener('click', () => act(button.dataset.look));
    }
    view.querySelector('.view-all-fates')?.addEventListener('click', () => {
      for (const box of this.#ticks('.view-fate, .view-group, .view-only')) box.checked = false;
      this.#choosePlace('', false);
      this.#ownChoice();
      this.#apply();
    });
    canvas.addEventListener('keydown', (event) => {
      if (!event.ctrlKey && !event.metaKey && !event.altKey && act(keys[event.key])) event.preventDefault();
      if (event.key === 'n' || event.key === 'p') this.#stepPlace(event.key === 'n' ? 1 : -1);
      if (event.key === 'Escape') this.#choosePlace('');
    });
    addEventListener('beforeprint', () => {
      if (!view.classList.contains('live')) return;
      (find(view, '.view-print') as HTMLImageElement).src = this.#stage.printed();
    });
  }

  #apply(): void {
    const { drawing, place, only } = { drawing: this.#drawing, place: this.#place, only: this.#isTicked('.view-only') };
    const fates = new Set(this.#ticks('.view-fate').flatMap((box) => (box.checked ? [Number(box.value)] : [])));
    const { shown, fitting } = choosePaths(drawing.paths, drawing.fates, {
      fates,
      place: only && place !== '' ? place : null,
      reemitted: this.#reemitted,
      most: this.#nothingFits(fates) ? 0 : Number(this.#value('.view-most', '0')),
    });
    if (shown.length !== this.#shown.length || shown.some((path, i) => path !== this.#shown[i])) this.#shown = shown;
    const lit = new Set([...this.#lit, ...[...fates].flatMap((fate) => drawing.fates[fate].where ?? [])]);
    if (place !== '') lit.add(place);
    this.#stage.show({
      paths: this.#shown,
      isLit: ({ name }) => [...lit].some((one) => isAt(name, one)),
      hiddenParts: new Set(this.#ticks('.view-part').flatMap((box) => (box.checked ? [] : [Number(box.value)]))),
      cut: this.#cut(),
      names: this.#isTicked('.view-show-names'),
      pumps: this.#isTicked('.view-show-pumps'),
    });
    this.#view.dataset.shown = String(shown.length);
    if (this.#count !== null) {
      const of = fitting > shown.length ? ` of ${fitting} that fit` : '';
      this.#count.textContent = `${shown.length} paths drawn${this.#nothingFits(fates) ? '' : of}`;
    }
  }

  /** A choice from outside that no path at hand answers. */
  #nothingFits(fates: ReadonlySet<number>): boolean {
    return this.#lit.size > 0 && fates.size === 0 && this.#reemitted === 'any';
  }

  #cut(): CutAt | null {
    const axis = 'xyz'.indexOf(this.#value('.view-axis:checked', '')) as -1 | 0 | 1 | 2;
    const slider = find(this.#view, '.view-cut') as HTMLInputElement;
    const text = find(this.#view, '.view-cut-text');
    const other = find(this.#view, '.view-other-side') as HTMLInputElement;
    slider.disabled = this.#value('.view-axis:checked', '') === '';
    other.disabled = slider.disabled;
    if (slider.disabled || axis === -1) {
      text.textContent = 'no cut';
      return null;
    }
    const { low, high } = this.#stage.near;
    const place = low[axis] + ((high[axis] - low[axis]) * Number(slider.value)) / CUT_STEPS;
    text.textContent = `${'xyz'[axis]} = ${Number(place.toPrecision(4))} mm`.replace('-', '\u2212');
    slider.setAttribute('aria-valuetext', text.textContent);
    return { axis, place, above: other.checked === (axis !== 1) };
  }

  get #place(): string {
    return this.#value('.view-place', '');
  }

  #choosePlace(name: string, apply = true): void {
    const select = find(this.#view, '.view-place') as HTMLSelectElement;
    select.value = [...select.options].some(({ value }) => value === name) ? name : '';
    if (!apply) return;
    this.#say(this.#placeWords(select.value));
    this.#apply();
  }

  #stepPlace(by: number): void {
    const select = find(this.#view, '.view-place') as HTMLSelectElement;
    const count = select.options.length;
    this.#choosePlace(select.options[(select.selectedIndex + by + count) % count].value);
  }

  #tickGroup(group: HTMLInputElement): void {
    for (const box of this.#ticks(`.view-fate[data-group="${group.value}"]`)) box.checked = group.checked;
  }

  /** The reader ticked for himself: what was chosen elsewhere is off. */
  #ownChoice(): void {
    this.#reemitted = 'any';
    this.#lit = new Set();
    for (const group of this.#ticks('.view-group')) {
      const mine = this.#ticks(`.view-fate[data-group="${group.value}"]`);
      const ticked = mine.filter(({ checked }) => checked).length;
      group.checked = ticked === mine.length;
      group.indeterminate = ticked > 0 && ticked < mine.length;
    }
    const detail: FateChoice = { rows: [], from: 'view' };
    document.dispatchEvent(new CustomEvent(FATE_EVENT, { detail }));
  }

  #faceWords({ name, finish, finishKind, isExit }: OpenFace): string {
    const kind = finish === finishKind ? finish : `${finish} (${finishKind})`;
    const ended = this.#endedAt(name);
    return `${name}: ${kind}${isExit ? ', the exit' : ''}${this.#drawing.paths.length > 0 ? `; ${ended} of the paths at hand ended here` : ''}`;
  }

  #placeWords(place: string): string {
    const face = this.#drawing.parts.flatMap(({ faces }) => faces).find(({ name }) => name === place);
    if (face !== undefined) return this.#faceWords(face);
    const part = this.#drawing.parts.find(({ name }) => name === place);
    if (part === undefined) return '';
    const size = part.high.map((value, i) => Number((value - part.low[i]).toPrecision(4))).join(' × ');
    const ended =
      this.#drawing.paths.length > 0 ? `; ${this.#endedAt(place)} of the paths at hand ended in or at it` : '';
    return `${part.name}: ${part.medium}${part.dyed ? ', dyed' : ''}, ${size} mm${ended}`;
  }

  #endedAt(place: string): number {
    return this.#drawing.fates.reduce((sum, { where, paths }) => sum + (isAt(where, place) ? paths : 0), 0);
  }

  #say(words: string): void {
    this.#readout.textContent = words === '' ? 'Point at a face, or choose one below, for its name.' : words;
  }

  #ticks(selector: string): readonly HTMLInputElement[] {
    return [...this.#view.querySelectorAll<HTMLInputElement>(selector)];
  }

  #isTicked(selector: string): boolean {
    return this.#view.querySelector<HTMLInputElement>(selector)?.checked ?? false;
  }

  #value(selector: string, otherwise: string): string {
    return this.#view.querySelector<HTMLInputElement | HTMLSelectElement>(selector)?.value ?? otherwise;
  }
}
