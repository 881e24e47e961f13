// Makes the page: everything in one HTML file that opens from a disk and asks nothing of anyone.
//
//   node web/build.mjs --wasm DIR --lines DIR --out dist/leeway.html [--licences FILE]
import { build } from 'esbuild';
import { createHash } from 'node:crypto';
import { mkdir, readFile, readdir, writeFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';

const here = dirname(fileURLToPath(import.meta.url));

function option(name, needed = true) {
  const at = process.argv.indexOf(`--${name}`);
  if (at > 0 && process.argv[at + 1]) return process.argv[at + 1];
  if (needed) throw new Error(`--${name} is missing`);
  return null;
}

async function bundle(entry) {
  const result = await build({
    entryPoints: [join(here, 'src', entry)], bundle: true, write: false, format: 'iife', target: 'es2022', minify: true, charset: 'utf8', legalComments: 'none', logLevel: 'warning',
  });
  return result.outputFiles[0].text.trim();
}

// Inside a script element only its own end tag and the comment opener can end or change it.
const inScript = (text) => text.replace(/<\/(script)/gi, '<\\/$1').replace(/<!--/g, '<\\!--');
const hash = (text) => `'sha256-${createHash('sha256').update(text).digest('base64')}'`;

const wasm = option('wasm');
const lines = option('lines');
const out = option('out');
const licencesFile = option('licences', false);

const glue = await readFile(join(wasm, 'leeway_wasm.js'), 'utf8');
const engine = gzipSync(await readFile(join(wasm, 'leeway_wasm_bg.wasm')), { level: 9 }).toString('base64');
const main = inScript(await bundle('main.js'));
const worker = inScript(`${glue.replace(/^let wasm_bindgen/m, 'globalThis.wasm_bindgen').replace(/^\s*\/?\*.*$/gm, '')}\n${await bundle('core/worker.js')}`);
const style = (await readFile(join(here, 'style.css'), 'utf8')).replace(/\/\*[\s\S]*?\*\//g, '').replace(/\n\s*/g, '\n').replace(/\n+/g, '\n').trim();
const demos = [];
for (const name of (await readdir(lines)).filter((n) => n.endsWith('.leeway.json')).sort()) {
  demos.push({ id: name.replace('.leeway.json', ''), line: JSON.parse(await readFile(join(lines, name), 'utf8')) });
}
// The bright line first: it is the one the page opens with.
demos.sort((a, b) => Number(b.id === 'heron-2') - Number(a.id === 'heron-2'));
const licences = licencesFile ? await readFile(licencesFile, 'utf8').catch(() => '') : '';

const policy = [
  "default-src 'none'",
  `script-src ${hash(main)} 'wasm-unsafe-eval'`,
  'worker-src blob:',
  `style-src ${hash(style)}`,
  'img-src data:',
  "connect-src 'none'",
  "base-uri 'none'",
  "form-action 'none'",
].join('; ');

const shell = await readFile(join(here, 'index.html'), 'utf8');
const parts = {
  POLICY: policy,
  STYLE: style,
  DEMOS: inScript(JSON.stringify(demos)),
  LICENCES: inScript(JSON.stringify(licences)),
  WORKER: worker,
  ENGINE: engine,
  MAIN: main,
};
const page = shell.replace(/%(POLICY|STYLE|DEMOS|LICENCES|WORKER|ENGINE|MAIN)%/g, (_, name) => parts[name]);
await mkdir(dirname(out), { recursive: true });
await writeFile(out, page);
console.log(`   ${out}: ${Buffer.byteLength(page)} bytes, ${demos.length} lines, engine ${engine.length} bytes packed`);
