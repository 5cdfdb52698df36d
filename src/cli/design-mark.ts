import { createHash } from 'node:crypto';

/**
 * Hash of the text, the dials and the mode as used: runs of one file with others are not alike.
 * @param hash of the text
 */
export function designMark(
  { hash, dials }: { readonly hash: string; readonly dials: Readonly<Record<string, string>> },
  polarisation = 'averaged',
  saturated = false,
): string {
  const mode = saturated ? `${polarisation} saturated` : polarisation;
  return createHash('sha256').update(hash).update(JSON.stringify(dials)).update(mode).digest('hex');
}
