import type { Drawing } from '../../record/drawing.js';
import type { DesignSheet } from '../design-sheet.js';
import { type Markup, markup, type Piece } from '../markup.js';
import { nameText } from '../name-text.js';
import { significant } from '../number-format.js';

/** More rows would make the page too long; `stokeswell check --faces` lists them all. */
const MOST_FACES = 400;

/** Parts, media, finishes, pumps, planes and faces as tables. */
export function designTables({ parts, pumps, planes }: Drawing, sheet: DesignSheet): Markup {
  const at = sheet.atNm === null ? '' : ` at ${significant(sheet.atNm, 5)} nm`;
  const faces = sheet.faces.slice(0, MOST_FACES);
  return markup`<section id="tables"><h2>The design in tables</h2>${table(
    'Parts',
    ['part', 'medium', 'size x × y × z, mm', 'centre, mm'],
    parts.map(({ name, medium, mediumKind, dyed, bounds: [low, high] }) => [
      nameText(name),
      markup`${nameText(medium)} (${mediumKind}${dyed ? ', dyed' : ''})`,
      high.map((c, i) => mm(c - low[i])).join(' × '),
      point(high.map((c, i) => (c + low[i]) / 2)),
    ]),
  )}${table(
    'Media',
    ['medium', 'made of', 'in', `index${at}`, `1/e depth${at}`, 'dyes'],
    sheet.media.map(({ medium, base, parts: inside, index, depthMm, dyes }) => [
      nameText(medium),
      nameText(base),
      names(inside),
      index.toFixed(4),
      depthMm === null ? 'no absorption' : `${significant(depthMm, 3)} mm`,
      dyes.length === 0
        ? '–'
        : dyes.map(
            ({ dye, millimolesPerLitre, quantumYield, diluteYield }, i) =>
              markup`${i === 0 ? '' : '; '}${nameText(dye)}${millimolesPerLitre === null ? '' : ` ${significant(millimolesPerLitre, 4)} mmol/L`}, quantum yield ${significant(100 * quantumYield, 3)} %${diluteYield > quantumYield ? ` (${significant(100 * diluteYield, 3)} % dilute)` : ''}`,
          ),
    ]),
  )}${sheet.media.flatMap(({ medium, notes }) =>
    notes.map((note) => markup`<p class="note">${nameText(medium)}: ${note}.</p>`),
  )}${table(
    'Finishes',
    ['finish', 'what it does'],
    sheet.finishes.map(({ finish, words }) => [nameText(finish), words]),
  )}${table(
    'Pumps',
    ['pump', 'power', 'wavelength', 'beam', 'stands at, mm', 'looks along', 'aim'],
    sheet.pumps.map(({ name, watts, wavelengthNm, words, aim }, i) => [
      markup`P${i + 1} ${nameText(name)}`,
      `${significant(watts, 4)} W`,
      `${significant(wavelengthNm, 6)} nm`,
      words,
      point(pumps[i]?.at ?? []),
      point(pumps[i]?.direction ?? []),
      nameText(aim, 120),
    ]),
  )}${
    planes.length === 0
      ? null
      : table(
          'Detectors in the open',
          ['detector', 'looks along', 'exit'],
          planes.map(({ name, normal, isExit }) => [nameText(name), point(normal), isExit ? 'yes' : 'no']),
        )
  }${table(
    'Faces',
    ['face', 'shape', 'area, mm²', 'centre, mm', 'finish', 'touches'],
    faces.map(({ name, shape, areaMm2, exposed, centre, finish, touches }) => [
      nameText(name),
      shape,
      exposed > 0.995 ? significant(areaMm2, 4) : `${significant(areaMm2, 4)}, ${significant(100 * exposed, 2)} % bare`,
      point(centre),
      nameText(finish),
      names(touches),
    ]),
  )}${
    sheet.faces.length > MOST_FACES
      ? markup`<p class="note">${sheet.faces.length - MOST_FACES} more faces; stokeswell check --faces lists them all.</p>`
      : null
  }</section>`;
}

function table(caption: string, heads: readonly string[], rows: readonly (readonly Piece[])[]): Markup {
  if (rows.length === 0) return markup``;
  return markup`<div class="scroll" tabindex="0" role="region" aria-label="${caption}"><table class="design-table"><caption>${caption}</caption><thead><tr>${heads.map((head) => markup`<th scope="col">${head}</th>`)}</tr></thead><tbody>${rows.map(
    ([first, ...rest]) => markup`<tr><th scope="row">${first}</th>${rest.map((cell) => markup`<td>${cell}</td>`)}</tr>`,
  )}</tbody></table></div>`;
}

const names = (list: readonly string[]): Piece =>
  list.map((name, i) => markup`${i === 0 ? '' : ', '}${nameText(name)}`);

const mm = (value: number): string => String(Number(value.toFixed(4)) + 0).replace('-', '−');
const point = (values: readonly number[]): string => values.map((c) => mm(Number(c.toFixed(3)))).join(', ');
