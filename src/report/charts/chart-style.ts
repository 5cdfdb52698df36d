/**
 * Style of the charts, on a page and in a file of its own alike. Simple selectors and one declaration a property: the drawer of PNG files knows
 * no more. Colours are var(--name) of colours.ts.
 */
export const CHART_STYLE = `
.picture{font-size:11.5px}
.picture text{fill:var(--ink);unicode-bidi:isolate}
.picture .caption,.picture .axis text,.mean-text{fill:var(--soft);font-size:11px}
.picture .axis .axis-title{fill:var(--ink);font-size:11.5px}
.axis line{stroke:var(--soft);stroke-width:1}
.ring{fill:none;stroke:var(--line);stroke-width:1}
.flow{font-size:14px}
.flow .flow-strong{font-weight:700;font-size:15px}
.flow .flow-heading{font-size:13px;font-weight:600;fill:var(--soft)}
.flow-small{font-size:13px}
.flow-small .flow-heading{font-size:12.5px}
.flow-number{font-weight:600}
.flow-pump-lost path,rect.flow-pump-lost{fill:var(--pump)}
.flow-heat path{fill:var(--heat)}
.flow-light-lost path{fill:var(--stray)}
.flow-output path{fill:var(--output)}
.stream path{stroke:var(--paper);stroke-width:.7}
.flow-dye{stroke:var(--ink);stroke-width:1.5;stroke-dasharray:5 4}
.frame{fill:none;stroke:var(--soft);stroke-width:1}
.cross line{stroke:#fff;stroke-width:1.2;mix-blend-mode:difference}
.profile-field{fill:none;stroke:var(--line)}
.profile-line{fill:none;stroke:var(--output);stroke-width:1.6}
.mean-mark{fill:var(--ink)}
.spectrum.pump{fill:var(--pump)}
.spectrum.emitted{fill:var(--output)}
.shape{fill:none;stroke:var(--ink);stroke-width:1.2;stroke-dasharray:4 3}
.base{stroke:var(--line)}
.curve{fill:none;stroke-width:1.2}
.curve-absorption{stroke:var(--focus)}
.curve-emission{stroke:var(--ink)}
.curve-finish{stroke:var(--stray);stroke-width:1.4}
.curve-dash-1{stroke-dasharray:7 3}
.curve-dash-2{stroke-dasharray:2 2}
.curve-dash-3{stroke-dasharray:8 3 2 3}
.plot-line{fill:none;stroke-width:1.9;stroke-linejoin:round}
.plot-pump{stroke:var(--pump)}
.plot-output{stroke:var(--output)}
.plot-lost{stroke:var(--heat)}
.plot-ink{stroke:var(--ink)}
.plot-dash-1{stroke-dasharray:7 4}
.plot-dash-2{stroke-dasharray:2 3}
.plot-grid{stroke:var(--line);stroke-width:1}
.plot-mark{stroke:var(--soft);stroke-width:1;stroke-dasharray:3 3}
.plot-error{stroke:var(--output);stroke-width:1.4}
.plot-dot{fill:var(--output)}
.plot-band{fill:var(--line);fill-opacity:.5}
.bar-share{fill:var(--output)}
.bar-above{fill:var(--stray)}
.chain-electrical{fill:var(--soft)}
.chain-pump{fill:var(--pump)}
.chain-emitted{fill:var(--output)}
.chain-factor{font-weight:600}
.locus{fill:none;stroke:var(--soft)}
.locus-dot{fill:var(--ink)}
.locus-line{stroke:#000;stroke-width:1.2;stroke-dasharray:4 3}
.white-point{fill:#fff;stroke:#000}
.point-halo{fill:none;stroke:#fff;stroke-width:5}
.point{fill:none;stroke:#000;stroke-width:2.4}
.error-ellipse{fill:#000}
.picture .point-text,.picture .on-colour{fill:#000;font-weight:600}
.picture .point-text{paint-order:stroke;stroke:#fff;stroke-opacity:.75;stroke-width:3px}
.picture .on-colour{font-weight:400;font-size:11px}
.intensity{fill:none;stroke:var(--output);stroke-width:2}
.radiance-range{fill:var(--output);fill-opacity:.25}
.lambert{fill:none;stroke:var(--ink);stroke-width:1.1;stroke-dasharray:5 4}
`;
