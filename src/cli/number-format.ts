/** Numbers as the page writes them, with the plain spaces a terminal wants. */
import { groupedCount as groupedOnPage } from '../report/number-format.js';

export {
  formatSeconds,
  formatWithError,
  type RoundedPair,
  roundToError,
  significant,
} from '../report/number-format.js';

/** 1234567 as "1 234 567"; below 10 000 as it is. */
export const groupedCount = (count: number): string => groupedOnPage(count).replaceAll('\u00a0', ' ');
