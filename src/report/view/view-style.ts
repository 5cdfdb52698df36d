/** Style of the 3D view, its controls and the drawing in its place. */
export const VIEW_STYLE = `
.view-desk{display:grid;grid-template-columns:minmax(0,1fr) 300px;gap:8px 28px;align-items:start;margin-top:12px}
.live-only,.view-print,.view-missing{display:none}
.live .live-only{display:block}.live .view-still{display:none}
.no-3d .view-missing{display:block}
.view-main{min-width:0}
.view-stage{position:relative;height:min(68vh,560px);min-height:300px;border:1px solid var(--line);background:var(--panel);overflow:hidden}
.view-stage canvas{display:block;width:100%;height:100%;touch-action:pan-y;cursor:grab}
.view-stage canvas:active{cursor:grabbing}
.view-stage canvas:focus-visible{outline-offset:-3px}
.view-names{position:absolute;inset:0;pointer-events:none;overflow:hidden}
.view-name{position:absolute;left:0;top:0;white-space:nowrap;font-size:12px;line-height:1.3;padding:0 5px;background:color-mix(in srgb,var(--panel) 82%,transparent);border-radius:3px;max-width:70%;overflow:hidden;text-overflow:ellipsis}
.view-name[hidden]{display:block;visibility:hidden}
.view-name.of-exit{color:var(--output);font-weight:650}
.view-name.of-pump{color:var(--pump);font-weight:600}
.view-axes{position:absolute;right:6px;bottom:6px;width:80px;height:80px;pointer-events:none;overflow:visible}
.view-axes path{stroke:var(--soft);stroke-width:1.5;fill:none}
.view-axes text{fill:var(--soft);font-size:12px}
.view-scale{position:absolute;left:12px;bottom:10px;border:solid var(--soft);border-width:0 1.5px 1.5px;font-size:12px;line-height:1.5;text-align:center;color:var(--soft);white-space:nowrap;pointer-events:none;background:color-mix(in srgb,var(--panel) 82%,transparent)}
.live .view-looks{display:flex;flex-wrap:wrap;gap:6px;margin-top:8px}
.view-turns{display:flex;gap:4px;margin-left:auto}
.view button{font:inherit;font-size:.86rem;color:inherit;background:var(--panel);border:1px solid var(--soft);border-radius:4px;padding:5px 11px;min-height:34px;cursor:pointer}
.view-turns button{min-width:36px;padding:5px 0}
.view button:hover{border-color:var(--ink);background:var(--line)}
.view-legend{list-style:none;display:flex;flex-wrap:wrap;gap:3px 18px;margin:6px 0;padding:0;font-size:.84rem;color:var(--soft)}
.view-legend li{display:flex;align-items:center;gap:6px}
.view-legend i{width:15px;height:11px;border:1px solid var(--soft)}
.view-legend .key-arrow{border:0;width:18px;height:10px;background:var(--pump);clip-path:polygon(0 35%,58% 35%,58% 0,100% 50%,58% 100%,58% 65%,0 65%)}
.view-legend .key-thin{border:0;border-top:1px solid var(--pump);height:0;width:20px}
.view-legend .key-light{border:0;height:3px;width:26px;background:linear-gradient(90deg,#18a058,#8d9a1c,#c77a12,#c8402a)}
.view-legend .key-dot{border:0;width:8px;height:8px;border-radius:50%;background:conic-gradient(var(--pump) 25%,var(--heat) 0 50%,var(--stray) 0 75%,var(--output) 0)}
.view-keys{font-size:.86rem;margin-top:4px}
.view-keys summary{cursor:pointer;padding:4px 0}
.view-keys dl{display:grid;grid-template-columns:auto 1fr;gap:2px 16px;margin:4px 0}
.view fieldset{border:0;border-top:1px solid var(--line);margin:0 0 10px;padding:8px 0 0;min-width:0}
.view fieldset:first-child{border-top:0;padding-top:0}
.view legend{font-weight:600;font-size:.92rem;padding:0;float:left;width:100%}
.view legend+*{clear:both}
.view-fates,.view-parts{max-height:340px;overflow:auto;margin:4px 0;padding:2px}
.view-parts{max-height:190px}
.view-fates label,.view-parts label,.view-line{display:flex;gap:7px;align-items:baseline;font-size:.86rem;padding:3px 0;line-height:1.3;min-width:0}
.view-group-line{font-weight:600;align-items:center}
.view-group-line i{width:11px;height:11px;flex:none}
.view .view-fate-line[hidden]{display:none}
.view-fate-line{padding-left:2px}
.view-fates .view-fate-line{padding-left:18px}
.view-fate-line span{min-width:0}
.view input{accent-color:var(--output);margin:0;flex:none}
.view input[type=range]{flex:1;min-width:0;align-self:center;height:24px}
.view-line:has(input[type=range]){align-items:center}
.view-cut-text{min-width:8em;font-variant-numeric:tabular-nums}
.view-count{display:block;font-size:.86rem;color:var(--soft)}
.view-axis-line{display:flex;flex-wrap:wrap;gap:4px 16px;font-size:.86rem;padding:4px 0}
.view-axis-line label{display:flex;gap:5px;align-items:center;min-height:26px}
.view select{font:inherit;font-size:.86rem;width:100%;color:inherit;background:var(--panel);border:1px solid var(--soft);border-radius:4px;padding:6px;margin-top:4px}
.view-still{margin:0}
.isometric{max-width:860px;font-size:13px}
.isometric path{fill-rule:nonzero;stroke-linejoin:round;stroke-linecap:round}
.iso-edges path{fill:none;stroke:var(--ink);stroke-width:1}
.iso-curved{stroke:var(--ink);stroke-width:.8}
.iso-edges .iso-exit,.iso-exit{fill:none;stroke:var(--output);stroke-width:2.6}
.iso-plane{fill:none;stroke:var(--soft)}
.iso-paths path{fill:none;stroke-width:1.2}.iso-paths .iso-pump-light{stroke:var(--pump);stroke-width:.6}
.iso-paths circle{fill:var(--ink)}
.iso-pumps path{fill:none;stroke:var(--pump);stroke-width:1.2}
.iso-pumps .iso-shaft{stroke-width:4;stroke-linecap:butt}.iso-pumps .iso-head,.iso-pumps circle{fill:var(--pump);stroke:none}
.iso-leader{fill:none;stroke:var(--soft);stroke-width:.8}
.picture .iso-name,.isometric .caption{paint-order:stroke;stroke:var(--paper);stroke-width:4px;stroke-linejoin:round}
.narrow-only .isometric{font-size:11px}
.iso-anchor{fill:var(--soft)}
.iso-scale{fill:none;stroke:var(--soft);stroke-width:1.4}
.stream[aria-pressed]{cursor:pointer}
.stream[aria-pressed=true] path{stroke:var(--focus);stroke-width:3.5}
.to-view{display:block;font-size:.9rem}.to-view[hidden]{display:none}
@media (max-width:900px){.view-desk{grid-template-columns:minmax(0,1fr)}.view-stage{height:min(60vh,440px)}}
@media (max-width:640px){.view button{min-height:40px}.view-turns{margin-left:0}.view-fates label,.view-parts label,.view-line{padding:6px 0}}
@media print{
.live .live-only,.view-missing{display:none}
.live .view-print[src]{display:block;width:100%;border:1px solid var(--line)}
.view-desk{display:block}
}
`;
