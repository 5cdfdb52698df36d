import type { RunRecord } from '../record/run-record.js';

/** Why a run ended. */
export const STOP_WORDS: Readonly<Record<RunRecord['run']['stopReason'], string>> = {
  histories: 'all histories traced',
  precision: 'wanted precision reached',
  time: 'time used up',
  interrupted: 'interrupted: what was traced until then',
};
