/** Style of the sheet, held in the picture itself: it must do without a page. Light unless a screen asks for dark; print is light. */
export const SHEET_STYLE = `
.three-view text{fill:#1b2226;font:11.5px system-ui,"Segoe UI",Roboto,"DejaVu Sans",sans-serif;unicode-bidi:isolate}
.three-view .small{font-size:10px}
.three-view .strong{font-size:14px;font-weight:bold}
.three-view .heading{font-weight:bold}
.three-view .view-title{font-weight:bold;fill:#565f66}
.three-view .soft{fill:#565f66}
.three-view path,.three-view circle{fill:none}
.three-view .sheet{fill:#fff}
.three-view .tint{fill:#0b7a5c;fill-opacity:.1}
.three-view .visible{stroke:#1b2226;stroke-width:1.5;stroke-linecap:round;stroke-linejoin:round}
.three-view .hidden{stroke:#7b858c;stroke-width:.7;stroke-dasharray:5 2.5}
.three-view .thin,.three-view .leader{stroke:#565f66;stroke-width:.6}
.three-view .arrow{fill:#565f66}
.three-view .dimension text{fill:#1b2226;font-size:11px;paint-order:stroke;stroke:#fff;stroke-width:3px}
.three-view .balloon{fill:#fff;stroke:#565f66;stroke-width:.7}
.three-view .pump-line{stroke:#2a66ad;stroke-width:.8}
.three-view .pump-strong,.three-view .pump-ring{stroke:#2a66ad;stroke-width:1.8}
.three-view .pump-ring{fill:#fff}
.three-view .pump-fill{fill:#2a66ad}
.three-view .pump-text{fill:#2a66ad;font-weight:bold;paint-order:stroke;stroke:#fff;stroke-width:3px}
.three-view .exit-line{stroke:#0b7a5c;stroke-width:2.6;stroke-linecap:round;stroke-linejoin:round}
.three-view .exit-arrow{stroke:#0b7a5c;stroke-width:1.6;fill:#fff}
.three-view .exit-label text{fill:#0b7a5c;font-weight:bold}
.three-view .plane-line{stroke:#565f66;stroke-width:1;stroke-dasharray:10 3 2 3}
.three-view .exit-plane{stroke:#0b7a5c;stroke-width:2}
.three-view .frame{stroke:#1b2226;stroke-width:1}
.three-view .bar{fill:#1b2226}
@media screen and (prefers-color-scheme:dark){
.three-view text,.three-view .dimension text{fill:#e9e6df}
.three-view .view-title,.three-view .soft{fill:#a7b0b6}
.three-view .sheet,.three-view .balloon,.three-view .pump-ring,.three-view .exit-arrow{fill:#1a2125}
.three-view .tint{fill:#3ccda2;fill-opacity:.14}
.three-view .visible,.three-view .frame{stroke:#e9e6df}
.three-view .bar{fill:#e9e6df}
.three-view .hidden{stroke:#7f8a91}
.three-view .thin,.three-view .leader,.three-view .plane-line,.three-view .balloon{stroke:#a7b0b6}
.three-view .arrow{fill:#a7b0b6}
.three-view .dimension text,.three-view .pump-text{stroke:#1a2125}
.three-view .pump-line,.three-view .pump-strong,.three-view .pump-ring{stroke:#6ea9ec}
.three-view .pump-fill,.three-view .pump-text{fill:#6ea9ec}
.three-view .exit-line,.three-view .exit-arrow,.three-view .exit-plane{stroke:#3ccda2}
.three-view .exit-label text{fill:#3ccda2}
}
`;
