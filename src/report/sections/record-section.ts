import type { FigureName, RunRecord } from '../../record/run-record.js';
import { STOP_WORDS } from '../../terms/stop-words.js';
import { figureText, noteText } from '../figure-text.js';
import { type Markup, markup } from '../markup.js';
import { shortName } from '../name-text.js';
import { formatSeconds, groupedCount } from '../number-format.js';
import { termMark } from '../term-mark.js';
import { saturationSection } from './saturation-section.js';

/** A longer design text would fill the page; run.json has it whole. */
const LONGEST_TEXT = 200_000;
const LONGEST_LINE = 400;

/** What was run, with what, and how to run it again. */
export function recordSection(record: RunRecord): Markup {
  const { design, run, tool, cautions } = record;
  const cut = design.text.length > LONGEST_TEXT;
  return markup`<section id="record"><h2>This run</h2><dl class="record">${item('Design', shortName(design.title, LONGEST_LINE))}${item('File', shortName(design.file, LONGEST_LINE))}${item('SHA-256 of its text', markup`<code>${design.hash}</code>`)}${item(
    'Dials',
    Object.entries(design.dials)
      .sort(([a], [b]) => (a < b ? -1 : 1))
      .map(([name, value]) => `${shortName(name)} = ${shortName(value)}`)
      .join(', ') || 'none',
  )}${item('Seed', shortName(run.seed, LONGEST_LINE))}${item('Histories', `${groupedCount(run.histories)} in ${groupedCount(run.batches)} ${run.batches === 1 ? 'batch' : 'batches'}; ${STOP_WORDS[run.stopReason]}`, termMark(`stop-${run.stopReason}`))}${item(
    'Traced',
    `${run.startedAt}, ${formatSeconds(run.seconds)} on ${run.threads} ${run.threads === 1 ? 'thread' : 'threads'}`,
  )}${item('Polarisation', run.polarisation === 'carried' ? 'carried by every photon' : 'averaged: faces treat all light as unpolarised', termMark('polarisation'))}${item('Version', `${tool.name} ${tool.version}, record format ${record.format}`)}${item('Tables beside this page', shortName(tablesOf(record).join(', '), 2000))}${pictureItem(record)}${item('To repeat it', markup`<code>${shortName(run.repeat, LONGEST_LINE)}</code>`)}</dl><h3 id="cautions">Cautions${termMark('cautions')}</h3>${
    cautions.length === 0
      ? markup`<p>None are held for what this design uses; follow your local codes all the same.</p>`
      : markup`<ul class="cautions">${cautions.map((text) => markup`<li>${shortName(text, 1000)}</li>`)}</ul>`
  }${saturationSection(record)}<h3>All figures${termMark('figure')}</h3><p class="note">The sums, shares and quotients on this page are made of these, of the ledgers and of the maps in run.json; the values of single cells, wavelengths and directions are in the tables beside it.</p>${figureTable(record)}<h3>Design text</h3>${
    cut ? markup`<p class="note">Cut after ${groupedCount(LONGEST_TEXT)} characters; run.json has it whole.</p>` : null
  }<pre class="design-text" tabindex="0" aria-label="Design text">${design.text.slice(0, LONGEST_TEXT)}</pre></section>`;
}

function item(term: string, value: Markup | string, mark: Markup | null = null): Markup {
  return markup`<div><dt>${term}</dt><dd>${value}${mark}</dd></div>`;
}

/** Names without their endings, which are alike for all. */
function pictureItem({ pictures }: RunRecord): Markup | null {
  if (pictures.length === 0) return null;
  const names = pictures.flatMap(({ files }) => files.slice(0, 1).map((file) => file.replace(/\.[^.]*$/, '')));
  const endings = [...new Set(pictures.flatMap(({ files }) => files.map((file) => file.replace(/^.*\./, ''))))];
  return item('Pictures beside this page', shortName(`${names.join(', ')}; each as ${endings.join(' and ')}`, 2000));
}

function tablesOf({ maps, spectra, curves, angles, radiance }: RunRecord): readonly string[] {
  const files = [
    ...maps.flatMap((map) => map.files),
    ...spectra.map(({ file }) => file),
    ...curves.map(({ file }) => file),
    ...angles.flatMap(({ file, photometricFile }) => [file, photometricFile]),
    ...radiance.flatMap(({ files }) => files),
  ];
  return ['run.json', 'ledger.csv', ...new Set(files.filter((file) => file !== ''))];
}

function figureTable(record: RunRecord): Markup {
  const names = (Object.keys(record.figures) as FigureName[]).sort();
  return markup`<div class="scroll"><table class="figures"><thead><tr><th scope="col">name in run.json</th><th scope="col">value ± standard error</th><th scope="col">note</th></tr></thead><tbody>${names.map(
    (name) =>
      markup`<tr><th scope="row"><code>${name}</code>${termMark(name)}</th><td>${figureText(record, name, { mark: false }) ?? 'undefined here'}</td><td>${noteText(record.figures[name])}</td></tr>`,
  )}</tbody></table></div>`;
}
