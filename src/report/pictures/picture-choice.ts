import type { RunRecord } from '../../record/run-record.js';

/** none; svg: drawings alone; all: drawings and PNG of them. */
export const PICTURE_CHOICES = ['none', 'svg', 'all'] as const;
export type PictureChoice = (typeof PICTURE_CHOICES)[number];

/** What was drawn for a record: pictures are made again in the same formats. */
export function choiceOf({ pictures }: RunRecord): PictureChoice {
  if (pictures.length === 0) return 'none';
  return pictures.some(({ files }) => files.some((file) => file.endsWith('.png'))) ? 'all' : 'svg';
}
