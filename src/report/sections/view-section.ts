import type { Drawing } from '../../record/drawing.js';
import { isometric, NARROW_ISOMETRIC, WIDE_ISOMETRIC } from '../charts/isometric.js';
import { GROUP_WORDS, GROUPS, type Group } from '../ledger-words.js';
import { type Markup, markup } from '../markup.js';
import { groupedCount, significant } from '../number-format.js';
import { finishTint } from '../view/finish-tints.js';
import { packDrawing } from '../view/pack-drawing.js';
import type { PackedDrawing } from '../view/packed-drawing.js';

export interface ViewOptions {
  readonly heading: string;
}

/** Paths drawn at first, fewer where they have many turns: more would be a tangle. */
const MOST_AT_FIRST = 60;
const FEWEST_AT_FIRST = 12;
const TURNS_AT_FIRST = 450;

const LOOKS = [
  ['first', 'Start', '0'],
  ['front', 'Front', '1'],
  ['left', 'Left', '2'],
  ['above', 'Above', '3'],
  ['all', 'With pumps', '4'],
] as const;

const TURNS = [
  ['turn-left', '\u2190', 'Turn to the left'],
  ['turn-right', '\u2192', 'Turn to the right'],
  ['turn-up', '\u2191', 'Turn upward'],
  ['turn-down', '\u2193', 'Turn downward'],
  ['nearer', '+', 'Come nearer'],
  ['farther', '\u2212', 'Go farther away'],
] as const;

/** The design in space, to be turned, cut and searched for paths; nothing where there is no drawing. Needs the page's view script. */
export function viewSection(
  drawing: Drawing | null,
  { heading }: ViewOptions = { heading: 'The design in space' },
): Markup | null {
  if (drawing === null || drawing.parts.length === 0) return null;
  const packed = packDrawing(drawing);
  return markup`<section id="view" class="view" data-drawing="${JSON.stringify(packed)}"><h2>${heading}</h2><p class="lead">${lead(drawing, packed)}</p><div class="view-desk"><div class="view-main"><div class="view-stage live-only"><canvas tabindex="0" role="img" aria-label="The design in space; the keys that turn it are listed below" aria-describedby="view-keys"></canvas><div class="view-names" aria-hidden="true"></div><svg class="view-axes" viewBox="-40 -40 80 80" aria-hidden="true">${[
    'x',
    'y',
    'z',
  ].map(
    (name) => markup`<path class="axis-${name}"/><text class="letter-${name}" text-anchor="middle">${name}</text>`,
  )}</svg><div class="view-scale" aria-hidden="true"></div></div><figure class="view-still"><div class="wide-only">${isometric(drawing, 'view-still-wide', WIDE_ISOMETRIC)}</div><div class="narrow-only">${isometric(drawing, 'view-still-narrow', NARROW_ISOMETRIC)}</div></figure><p class="note view-missing">This browser has no WebGL, so the design cannot be turned; the drawing shows it from one side.</p><img class="view-print" alt="The design in space as last seen on the screen">${looks()}<output class="readout view-readout live-only">Point at a face, or choose one below, for its name.</output>${legend(packed)}${keys()}</div><div class="view-controls live-only">${pathControls(packed)}${placeControls(packed)}${cutControls()}${partControls(packed)}</div></div></section>`;
}

function lead({ pathsFrom, parts }: Drawing, { paths }: PackedDrawing): Markup {
  const low = [0, 1, 2].map((axis) => Math.min(...parts.map(({ bounds }) => bounds[0][axis])));
  const high = [0, 1, 2].map((axis) => Math.max(...parts.map(({ bounds }) => bounds[1][axis])));
  const size = low.map((value, i) => significant(high[i] - value, 4)).join(' × ');
  const traced =
    paths.length === 0
      ? 'No light has been traced through it yet.'
      : `The paths are a few of every fate, picked from ${groupedCount(pathsFrom)} histories: they show where light goes, not how much of it. The ledger has the shares.`;
  return markup`All parts together measure ${size} mm along x, y and z. ${traced}`;
}

function looks(): Markup {
  return markup`<div class="view-looks live-only" role="group" aria-label="Look from">${LOOKS.map(
    ([look, words, key]) =>
      markup`<button type="button" data-look="${look}" aria-keyshortcuts="${key}">${words}</button>`,
  )}<span class="view-turns">${TURNS.map(
    ([look, sign, words]) =>
      markup`<button type="button" data-look="${look}" aria-label="${words}" title="${words}">${sign}</button>`,
  )}</span></div>`;
}

function keys(): Markup {
  return markup`<details class="live-only view-keys"><summary>Keys and gestures</summary><dl id="view-keys"><dt>drag, or arrow keys</dt><dd>turn</dd><dt>shift and drag, or shift and arrow keys</dt><dd>move</dd><dt>wheel once the picture was clicked, or + and −</dt><dd>nearer, farther</dd><dt>0, 1, 2, 3, 4</dt><dd>start, front, left, above, with pumps</dd><dt>n, p</dt><dd>next and previous part or face</dd><dt>Esc</dt><dd>let go of it</dd><dt>one finger, sideways</dt><dd>turn</dd><dt>two fingers</dt><dd>move, nearer, farther</dd></dl></details>`;
}

function legend({ parts, paths, pumps }: PackedDrawing): Markup {
  const faces = parts.flatMap((part) => part.faces);
  const kinds = [...new Set(faces.filter(({ isExit }) => !isExit).map(({ finishKind }) => finishKind))];
  const swatch = (kind: string) => {
    const { colour, opacity } = finishTint(kind);
    // On a legend a tint must be told from the paper.
    return markup`<i style="background:${colour};opacity:${Math.min(1, opacity + 0.45)}"></i>`;
  };
  const exit = faces.some(({ isExit }) => isExit) ? markup`<li><i class="output"></i>exit</li>` : null;
  const arrows = pumps.length > 0 ? markup`<li><i class="key-arrow"></i>pump, beside the part it lights</li>` : null;
  const light =
    paths.length === 0
      ? null
      : markup`<li><i class="key-thin"></i>pump light, thin</li><li><i class="key-light"></i>emitted light, in the colour of its wavelength</li><li><i class="key-dot"></i>where it ended</li>`;
  return markup`<ul class="view-legend" aria-label="Meaning of the colours">${kinds.map((kind) => markup`<li>${swatch(kind)}${finishTint(kind).words ?? kind}</li>`)}${exit}${arrows}${light}</ul>`;
}

function pathControls({ fates, paths }: PackedDrawing): Markup | null {
  if (paths.length === 0) return null;
  const groups = GROUPS.filter((group) => fates.some((fate) => fate.group === group));
  return markup`<fieldset><legend>Paths by how they ended</legend><p class="note">Tick one or several; with none ticked all are drawn.</p><div class="view-fates">${groups.map((group) => fateGroup(group, fates))}</div><p><button type="button" class="view-all-fates">All fates again</button></p><label class="view-line">At most<input type="range" class="view-most" min="1" max="${paths.length}" value="${atFirst(paths)}" aria-label="How many paths at most"></label><output class="view-count" aria-live="polite"></output></fieldset>`;
}

function atFirst(paths: PackedDrawing['paths']): number {
  let turns = 0;
  const full = paths.findIndex(([, points]) => {
    turns += points;
    return turns > TURNS_AT_FIRST;
  });
  return Math.min(paths.length, MOST_AT_FIRST, full < 0 ? MOST_AT_FIRST : Math.max(FEWEST_AT_FIRST, full));
}

function fateGroup(group: Group, fates: PackedDrawing['fates']): Markup {
  const mine = fates.flatMap((fate, i) => (fate.group === group ? [{ ...fate, i }] : []));
  const box = mine.toSorted((a, b) => b.paths - a.paths);
  return markup`<div role="group" aria-label="${GROUP_WORDS[group]}"><label class="view-group-line"><input type="checkbox" class="view-group" value="${group}"><i class="${group}"></i>${GROUP_WORDS[group]}</label>${box.map(
    ({ i, words, paths }) =>
      markup`<label class="view-fate-line"><input type="checkbox" class="view-fate" data-group="${group}" value="${i}"><span><bdi>${words}</bdi> <span class="place">${paths}</span></span></label>`,
  )}</div>`;
}

function placeControls({ parts, paths }: PackedDrawing): Markup {
  return markup`<fieldset><legend>A part or a face</legend><select class="view-place" aria-label="Part or face to light up"><option value="">none chosen</option>${parts.map(
    ({ name, faces }) =>
      markup`<optgroup label="${name}"><option value="${name}">${name}, all of it</option>${faces.map((face) => markup`<option value="${face.name}">${face.name}</option>`)}</optgroup>`,
  )}</select>${paths.length === 0 ? null : markup`<label class="view-line"><input type="checkbox" class="view-only"><span>only the paths it took</span></label>`}</fieldset>`;
}

function cutControls(): Markup {
  const axis = (value: string, words: string) =>
    markup`<label><input type="radio" name="view-axis" class="view-axis" value="${value}"${value === '' ? markup` checked` : null}>${words}</label>`;
  return markup`<fieldset><legend>Cut across</legend><div class="view-axis-line">${axis('', 'nothing')}${axis('x', 'x')}${axis('y', 'y')}${axis('z', 'z')}</div><label class="view-line"><span class="view-cut-text">no cut</span><input type="range" class="view-cut" min="0" max="1000" value="500" disabled aria-label="Place of the cut"></label><label class="view-line"><input type="checkbox" class="view-other-side" disabled><span>keep the other side</span></label></fieldset>`;
}

function partControls({ parts, pumps }: PackedDrawing): Markup {
  return markup`<fieldset><legend>Shown</legend><div class="view-parts">${parts.map(
    ({ name, medium }, i) =>
      markup`<label class="view-fate-line"><input type="checkbox" class="view-part" value="${i}" checked><span><bdi>${name}</bdi> <span class="place"><bdi>${medium}</bdi></span></span></label>`,
  )}<label class="view-fate-line"><input type="checkbox" class="view-show-names" checked><span>names</span></label><label class="view-fate-line"${pumps.length === 0 ? markup` hidden` : null}><input type="checkbox" class="view-show-pumps" checked><span>pumps</span></label></div></fieldset>`;
}
