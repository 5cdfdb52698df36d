/** Bundles the browser's side of the 3D view into a module that holds it as text, for the report to put into its page. */
import { mkdir, writeFile } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const from = (path) => fileURLToPath(new URL(path, import.meta.url));
const target = from('../../../dist/report/view/');

const { outputFiles } = await build({
  entryPoints: [from('browser/main.ts')],
  tsconfig: from('browser/tsconfig.json'),
  bundle: true,
  minify: true,
  format: 'iife',
  target: 'es2022',
  write: false,
  legalComments: 'eof',
});
const [{ text }] = outputFiles;
// Inside a script element neither may stand.
if (/<\/script|<!--/i.test(text)) throw new Error('the bundle of the view holds a tag that would end its element');
await mkdir(target, { recursive: true });
await writeFile(`${target}view-bundle.js`, `export const VIEW_BUNDLE = ${JSON.stringify(text)};\n`);
