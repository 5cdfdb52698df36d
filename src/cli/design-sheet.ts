/** What the page of a drawing tells beside the picture, from the description and its check. */
import type { BeamDescription, Description, FinishDescription, PumpDescription } from '../design/description.js';
import type { Fault } from '../design/fault.js';
import type { SoundDesign } from '../design/read-design.js';
import { cautionsFor } from '../materials/cautions.js';
import type { DesignSheet } from '../report/design-sheet.js';
import type { FaceReport } from '../scene/check-scene.js';
import { reportMedia } from './media-report.js';
import { significant } from './number-format.js';
import { toolVersion } from './tool-version.js';

export function designSheet(reading: SoundDesign, faults: readonly Fault[], faces: readonly FaceReport[]): DesignSheet {
  const { description, file, text, hash } = reading;
  const media = reportMedia(description);
  const used = new Set(description.parts.flatMap((part) => part.faces.map(({ finish }) => finish)));
  const filled = [...new Set(description.parts.map(({ medium }) => medium))].flatMap(
    (name) => description.media.get(name) ?? [],
  );
  return {
    version: toolVersion(),
    design: {
      title: description.title,
      file,
      text,
      hash,
      dials: Object.fromEntries(description.dials.map((dial) => [dial.name, dial.text])),
    },
    about: description.about,
    checks: faults,
    cautions: cautionsFor({
      pumpWatts: description.pumps.reduce((sum, { power }) => sum + power, 0),
      solvents: filled.flatMap(({ kind, base, mixture }) =>
        kind === 'liquid' ? (mixture?.map(({ solvent }) => solvent) ?? [base]) : [],
      ),
      dyes: filled.flatMap(({ dyes }) => dyes.map(({ name, formOf = name }) => formOf)),
    }),
    atNm: media[0]?.atNm ?? null,
    media,
    finishes: [...description.finishes.values()]
      .filter(({ name }) => used.has(name))
      .map((finish) => ({ finish: finish.name, words: finishWords(finish) })),
    faces: faces.map(({ part, face, ...rest }) => ({ ...rest, name: `${part}.${face}` })),
    pumps: description.pumps.map((pump) => ({
      name: pump.name,
      watts: pump.power,
      wavelengthNm: pump.wavelengthNm,
      words: beamWords(pump.beam),
      aim: aimWords(pump, description),
    })),
  };
}

const percent = (share: number): string => `${significant(100 * share, 4)} %`;
const mm = (length: number): string => `${significant(length, 5)} mm`;
const degrees = (angle: number): string => `${significant((angle * 180) / Math.PI, 4)}°`;

function finishWords(finish: FinishDescription): string {
  switch (finish.kind) {
    case 'clear':
      return 'clear: Fresnel';
    case 'black':
      return 'absorbs everything';
    case 'mirror':
      return `mirror, reflects ${percent(finish.reflectance)}`;
    case 'metal':
      return `mirror of ${finish.metal}`;
    case 'dichroic':
      return `dichroic, edge ${significant(finish.edgeNm, 6)} nm, passes ${finish.passes}, transmits ${percent(finish.transmits)}, reflects ${percent(finish.reflects)}`;
    case 'table':
      return 'shares from a table of wavelengths and angles';
    case 'stack':
      return `thin films, ${finish.layers.length} layers`;
    case 'bsdf':
      return 'scatters as a table of angles says';
    case 'diffuser':
      return `Lambertian, reflects ${percent(finish.reflects)}, transmits ${percent(finish.transmits)}`;
    case 'scatter':
      return `scatters, ${finish.shape}, FWHM ${finish.fwhm.map(degrees).join(' × ')}${finish.split === null ? '' : `, reflects ${percent(finish.split.reflects)}, transmits ${percent(finish.split.transmits)}`}`;
  }
}

function beamWords(beam: BeamDescription): string {
  switch (beam.kind) {
    case 'patch':
      return `patch, ${outlineWords(beam.outline)}, ${spreadWords(beam)}`;
    case 'lambertian':
      return `Lambertian, ${outlineWords(beam.outline)}`;
    case 'gaussian':
      return `Gaussian, 1/e² radius ${mm(beam.radius)}, half angle ${degrees(beam.halfAngle)}`;
    case 'rays':
      return `${beam.rays.watts.length} rays of a table`;
    case 'diodes': {
      const lens =
        beam.lens === null ? '' : `, lens of ${mm(beam.lens.focalLength)} focal length, ${mm(beam.lens.distance)} on`;
      return `${beam.across} × ${beam.along} diodes, pitch ${beam.pitch.map(mm).join(' × ')}${stackWords(beam)}, ${spreadWords(beam)}${lens}`;
    }
  }
}

function spreadWords({ divergence, farField = null }: Extract<BeamDescription, { kind: 'patch' | 'diodes' }>): string {
  return farField === null ? `divergence ${divergence.map(degrees).join(' × ')}` : 'far field of a table';
}

function stackWords({ stack = null, pointing = null }: Extract<BeamDescription, { kind: 'diodes' }>): string {
  const rows = stack === null ? '' : `, stack of ${stack.rows} rows ${mm(stack.pitch)} apart`;
  return pointing === null ? rows : `${rows}, pointing ± ${degrees(pointing.spread)}`;
}

function outlineWords(outline: Extract<BeamDescription, { kind: 'lambertian' }>['outline']): string {
  return outline.kind === 'disc' ? `disc of ${mm(outline.radius)} radius` : outline.size.map(mm).join(' × ');
}

function aimWords({ aim }: PumpDescription, { surroundings }: Description): string {
  return aim.kind === 'toward' ? `toward ${aim.face}, ${mm(aim.distance)} before it` : `free in ${surroundings}`;
}
