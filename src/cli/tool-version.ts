import { readFileSync } from 'node:fs';

/** Version of this copy of stokeswell, from its package.json (the same relative place in src and in dist). */
export function toolVersion(): string {
  const text = readFileSync(new URL('../../package.json', import.meta.url), 'utf8');
  const data: unknown = JSON.parse(text);
  if (typeof data === 'object' && data !== null && 'version' in data && typeof data.version === 'string') {
    return data.version;
  }
  throw new Error('package.json of stokeswell has no version');
}
