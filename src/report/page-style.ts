import { CHART_STYLE } from './charts/chart-style.js';
import { colourVariables, DARK, LIGHT } from './colours.js';

/** All the style of a page: light and dark, phone to desktop, and print. */
export const PAGE_STYLE = `
:root{${colourVariables(LIGHT)}}
@media screen and (prefers-color-scheme:dark){:root{${colourVariables(DARK)}}}
*{box-sizing:border-box}
html{scroll-behavior:smooth}
@media (prefers-reduced-motion:reduce){html{scroll-behavior:auto}}
body{margin:0;background:var(--paper);color:var(--ink);font:15px/1.45 system-ui,"Segoe UI",Roboto,"Helvetica Neue",sans-serif;font-variant-numeric:tabular-nums;overflow-wrap:anywhere}
header,main{max-width:1200px;margin:0 auto;padding:0 16px}
header{padding-top:14px}
h1{font-size:1.35rem;line-height:1.2;margin:0;font-weight:650}
header p{margin:2px 0 6px;color:var(--soft);font-size:.86rem}
nav{display:flex;flex-wrap:wrap;gap:2px 16px;font-size:.86rem}
nav a{padding:3px 0}
a{color:inherit;text-decoration:underline;text-decoration-color:var(--soft);text-underline-offset:3px}
a:hover{text-decoration-color:currentColor}
:focus-visible{outline:3px solid var(--focus);outline-offset:2px;border-radius:2px}
.skip{position:absolute;left:-999px}
.skip:focus{left:8px;top:8px;background:var(--panel);padding:6px 10px;z-index:2}
section{margin:34px 0}
section>h2{font-size:1.25rem;margin:0 0 4px;padding-top:10px;border-top:2px solid var(--ink)}
h3{font-size:1rem;margin:22px 0 4px}
p{margin:4px 0}
.lead{max-width:70ch;color:var(--soft)}
.note,.facts{color:var(--soft);font-size:.86rem;max-width:75ch}
.facts b{color:var(--ink)}
.unseen{position:absolute;width:1px;height:1px;overflow:hidden;clip-path:inset(50%)}
.print-only{display:none}
.needs-script{display:none}
.scripted .needs-script{display:block}
#answers{display:grid;gap:0;grid-template-columns:repeat(4,1fr);margin:14px 0 26px;border:1px solid var(--line);background:var(--panel)}
.answer{padding:12px 16px 14px;min-width:0;border-left:1px solid var(--line)}
.answer:first-child{border-left:0}
.answer h2{font-size:.92rem;font-weight:600;margin:0;color:var(--soft)}
.answer p{margin:3px 0}
.answer .note{font-size:.8rem}
.big{font-size:1.55rem;font-weight:650;line-height:1.15;letter-spacing:-.01em}
.figure{white-space:nowrap}.figures .figure,.figure.long{white-space:normal}
.mark{position:relative;display:inline-block;width:9px;height:9px;margin:0 2px 0 4px;padding:0;border:0;border-radius:0;background:linear-gradient(var(--soft) 0 0) 0 0/9px 1px no-repeat,linear-gradient(var(--soft) 0 0) 0 50%/9px 1px no-repeat,linear-gradient(var(--soft) 0 0) 0 100%/5px 1px no-repeat;vertical-align:baseline;cursor:pointer}
.mark::after{content:"";position:absolute;inset:-8px}
.mark:hover,.mark:focus-visible{background-color:var(--line);box-shadow:0 0 0 4px var(--line)}
@supports not selector(:popover-open){.mark,.close{display:none}}
.terms{display:grid;grid-template-columns:repeat(auto-fill,minmax(min(100%,340px),1fr));gap:14px 32px;margin:12px 0}
.term{display:block;position:static;width:auto;height:auto;margin:0;padding:0;border:0;background:none;color:inherit;font-size:.86rem;overflow:visible}
.term dt{color:var(--ink);font-weight:650;font-size:.95rem}
.term .label{color:var(--soft)}
.term .close{display:none}
.term:popover-open{position:fixed;inset:auto 16px 16px auto;width:min(27rem,100vw - 24px);max-height:80vh;overflow:auto;padding:12px 16px;border:2px solid var(--ink);background:var(--panel)}
.term:popover-open .close{display:block;text-align:right}
.close button{font:inherit;color:inherit;background:none;border:1px solid var(--line);padding:3px 12px;cursor:pointer}
@supports (position-area:block-end){@media (min-width:641px){.term:popover-open{inset:auto;margin:6px 0;position-area:block-end span-inline-end;position-try-fallbacks:flip-block,flip-inline,flip-block flip-inline}}}
.swatch{display:inline-block;width:2.2em;height:1em;vertical-align:-.12em;margin-right:.5em;border:1px solid var(--line)}
.thumbnail{display:block;max-width:100%;image-rendering:pixelated;margin:6px 0;border:1px solid var(--line)}
.share-bar{display:flex;height:16px;margin:8px 0 5px;background:var(--line)}
.share-bar span+span{border-left:1px solid var(--panel)}
.verdicts{margin:6px 0;padding:0 0 0 1.05em;font-size:.84rem;line-height:1.35}
.verdicts li{margin:3px 0}
.verdicts .figure{white-space:normal}
.why{display:inline}
.why summary{display:inline;cursor:pointer;color:var(--soft);font-size:.8rem;text-decoration:underline dotted}
.why[open]{display:block;margin:2px 0 5px}
.legend,.checks,.cautions,.losses{margin:0;padding:0 0 0 1.2em}
.legend{list-style:none;padding:0;font-size:.84rem}
.legend li{padding-left:1.35em;position:relative}
.key{position:absolute;left:0;top:.28em;width:.8em;height:.8em}
.output{background:var(--output)}.pump-lost{background:var(--pump)}.heat{background:var(--heat)}.light-lost{background:var(--stray)}
.losses li,.cautions li,.checks li{margin:3px 0;max-width:80ch}
figure{margin:12px 0;min-width:0}
${CHART_STYLE}.picture{display:block;width:100%;height:auto;overflow:hidden}
.flow{max-width:860px}
.stream{outline-offset:1px}
.stream:hover path,.stream:focus path{stroke:var(--ink);stroke-width:2}
.where{display:grid;grid-template-columns:minmax(0,3fr) minmax(220px,1fr);gap:8px 40px;align-items:start}
.narrow-only{display:none}
.readout{min-height:1.5em;font-size:.9rem;padding:4px 0;color:var(--ink)}
.scripted .readout{display:block}
.ledgers{display:grid;grid-template-columns:repeat(auto-fit,minmax(min(100%,440px),1fr));gap:8px 36px}
table{border-collapse:collapse;width:100%;font-size:.86rem}
caption{text-align:left;font-weight:600;padding:6px 0}
th,td{text-align:left;font-weight:400;padding:3px 10px 3px 0;border-bottom:1px solid var(--line);vertical-align:baseline}
thead th{color:var(--soft);font-size:.8rem}
.number{text-align:right;white-space:nowrap}
.ledger .sum th,.ledger .sum td,.own th,.own td{font-weight:650}
.ledger tbody .sum th,.ledger tbody .sum td{padding-top:10px}
.place{color:var(--soft)}
.light{font-size:.74rem;color:var(--soft);border:1px solid var(--line);border-radius:3px;padding:0 4px;white-space:nowrap}
.bar{width:24%;padding-right:0}
.bar span{display:block;height:.7em;min-width:1px}
.maps{display:grid;grid-template-columns:repeat(auto-fill,minmax(min(100%,350px),1fr));gap:10px 40px;align-items:start}
.volume{grid-column:1/-1}
.cuts{display:grid;grid-template-columns:repeat(auto-fill,minmax(min(100%,330px),1fr));gap:10px 32px;align-items:start}
.cut{padding:4px 0}
.cut label{font-size:.88rem}
.cut input{width:100%;max-width:340px;display:block;accent-color:var(--output)}
.heat-map image{image-rendering:pixelated}
.heat-map{touch-action:pan-y;max-width:520px}
.cross{pointer-events:none}
.spectra,.chromaticity,.polar,.histogram{max-width:520px}
.chain{list-style:none;margin:14px 0;padding:0;display:grid;grid-template-columns:repeat(auto-fit,minmax(min(100%,150px),1fr));border:1px solid var(--line);background:var(--panel)}
.chain li{padding:10px 14px;border-right:1px solid var(--line);border-bottom:1px solid var(--line);margin:0 -1px -1px 0;display:flex;flex-direction:column;gap:2px}
.chain .start{justify-content:end}
.factor{font-size:1.15rem;font-weight:650}
.step-name{color:var(--soft);font-size:.84rem;flex:1}
.scroll{overflow-x:auto}
.comparison th[scope=row]{min-width:8em;overflow-wrap:normal}
.comparison .number .note{display:block}
.comparison .range{position:relative;width:36%;min-width:70px;height:1.9em;padding:0}
.range span{position:absolute;top:.55em;height:.8em}
.spread{background:var(--soft);opacity:.55}
.middle{width:3px;margin-left:-1px;background:var(--ink)}
.record div{display:grid;grid-template-columns:minmax(110px,190px) 1fr;gap:0 14px;padding:4px 0;border-bottom:1px solid var(--line)}
.record{margin:10px 0}
dt{color:var(--soft)}dd{margin:0;min-width:0}
code,pre{font-family:ui-monospace,"DejaVu Sans Mono",Consolas,monospace;font-size:.84rem}
pre{background:var(--panel);border:1px solid var(--line);padding:12px;max-height:70vh;overflow:auto;white-space:pre-wrap;overflow-wrap:anywhere;unicode-bidi:plaintext}
.figures th{white-space:nowrap}
.drawing-sheet{border:1px solid var(--line)}
.drawing-sheet .three-view{display:block;width:100%;min-width:980px;height:auto}
.design-table{margin:14px 0;min-width:640px;overflow-wrap:normal}
@media (max-width:1080px){#answers{grid-template-columns:1fr 1fr}.answer:nth-child(odd){border-left:0}.answer:nth-child(n+3){border-top:1px solid var(--line)}}
@media (max-width:900px){.where{grid-template-columns:minmax(0,1fr)}}
@media (max-width:640px){
body{font-size:14.5px}
.wide-only{display:none}.narrow-only{display:block}
.answer{padding:9px 8px}.answer .big .mark{margin-right:0}
.big{font-size:1.2rem}
.answer p{font-size:.86rem;line-height:1.35}.answer .note,.legend{font-size:.76rem}
.answer .big{font-size:1rem}.answer .big .figure{white-space:normal}.answer .big .figure:not(.long) data{white-space:nowrap}
.term:popover-open{inset:auto 12px 12px 12px}
.bar{width:16%}
.record div{grid-template-columns:1fr}
}
@media print{
@page{margin:14mm}
body{background:#fff;font-size:10.5pt}
nav,.skip,.mark,.scripted .needs-script,.scripted .readout{display:none}
.print-only{display:block;font-size:.85rem}
figure,.answer,tr,.cut,.chain li,.term{break-inside:avoid}
.terms{grid-template-columns:1fr 1fr}
h2,h3{break-after:avoid}
section{margin:16px 0}
#answers{grid-template-columns:1fr 1fr}
pre{max-height:none;border:0;padding:0}
.drawing-sheet{border:0}
.drawing-sheet .three-view{min-width:0}
*{-webkit-print-color-adjust:exact;print-color-adjust:exact}
.maps,.cuts{grid-template-columns:1fr 1fr}
}
`;
