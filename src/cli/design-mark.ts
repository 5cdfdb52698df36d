import { createHash } from 'node:crypto';

/** Hash of the text and the dials as used: runs of one file with other dials are not alike. @param hash of the text */
export function designMark({
  hash,
  dials,
}: {
  readonly hash: string;
  readonly dials: Readonly<Record<string, string>>;
}): string {
  return createHash('sha256').update(hash).update(JSON.stringify(dials)).digest('hex');
}
