/** What the page of a drawing tells beside the picture: the design in words and numbers, before any tracing. */
import type { RunRecord } from '../record/run-record.js';

export interface DesignSheet {
  readonly version: string;
  readonly design: RunRecord['design'];
  readonly about: string | null;
  readonly checks: RunRecord['checks'];
  readonly cautions: readonly string[];
  /** Wavelength, nm, at which index and depth of the media are given; null without a pump. */
  readonly atNm: number | null;
  readonly media: readonly {
    readonly medium: string;
    readonly base: string;
    readonly parts: readonly string[];
    readonly index: number;
    /** After which 1/e of the pump light is left, mm; null where nothing absorbs. */
    readonly depthMm: number | null;
    readonly dyes: readonly {
      readonly dye: string;
      readonly millimolesPerLitre: number | null;
      readonly quantumYield: number;
      readonly diluteYield: number;
    }[];
    /** What was taken for granted. */
    readonly notes: readonly string[];
  }[];
  readonly finishes: readonly { readonly finish: string; readonly words: string }[];
  readonly faces: readonly {
    /** 'part.face'. */
    readonly name: string;
    readonly shape: string;
    readonly centre: readonly number[];
    readonly areaMm2: number;
    /** Share of the area that bounds its part. */
    readonly exposed: number;
    readonly finish: string;
    readonly touches: readonly string[];
  }[];
  readonly pumps: readonly {
    readonly name: string;
    readonly watts: number;
    readonly wavelengthNm: number;
    readonly words: string;
    readonly aim: string;
  }[];
}
