// Benchmarks of the built page in Chromium, from file://: opening to findings, an assessment of 8 zones x 12 changes
// in the page's worker, memory of the page. Ratios are to a reference loop in the same run and page.
import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { dirname, join } from 'node:path';

const root = join(dirname(fileURLToPath(import.meta.url)), '..', '..');
const { chromium } = createRequire(join(root, 'web', 'package.json'))('playwright-core');
const line = execFileSync('cargo', ['run', '--quiet', '--release', '--bin', 'line'], { cwd: join(root, 'tests', 'bench') }).toString();

const browser = await chromium.launch({
  executablePath: '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'],
});
const median = (list) => [...list].sort((a, b) => a - b)[Math.floor(list.length / 2)];

/** Resident memory of the renderers, MB: the page's process is the largest. */
async function renderer() {
  const cdp = await browser.newBrowserCDPSession();
  const { processInfo } = await cdp.send('SystemInfo.getProcessInfo');
  const sizes = processInfo
    .filter((p) => p.type === 'renderer')
    .map((p) => Number(/VmRSS:\s+(\d+)/.exec(readFileSync(`/proc/${p.id}/status`, 'utf8'))?.[1] ?? 0) / 1024);
  return Math.max(0, ...sizes);
}

async function fresh() {
  const page = await browser.newPage({ viewport: { width: 1366, height: 768 } });
  await page.addInitScript(() => {
    const Real = Worker;
    window.__bench = { workers: [], findings: null };
    window.Worker = class extends Real {
      constructor(...args) {
        super(...args);
        window.__bench.workers.push(this);
        this.addEventListener('message', ({ data }) => {
          if (data.answer?.findings && window.__bench.findings === null) {
            requestAnimationFrame(() => requestAnimationFrame(() => (window.__bench.findings ??= performance.now())));
          }
        });
      }
    };
  });
  return page;
}

const empty = await browser.newPage();
await empty.goto('about:blank');
const blank = await renderer();
await empty.close();

const opening = [];
let page;
for (let i = 0; i < 7; i += 1) {
  page = await fresh();
  await page.goto(pathToFileURL(join(root, 'dist', 'leeway.html')).href);
  // The page's policy forbids evaluated text, which waiting by predicate needs: ask again until it is there.
  while ((await page.evaluate(() => window.__bench.findings)) === null) await page.waitForTimeout(20);
  opening.push(await page.evaluate(() => window.__bench.findings));
  if (i < 6) await page.close();
}

const { times, loop, findings } = await page.evaluate(async (text) => {
  const worker = window.__bench.workers[0];
  const once = (id) =>
    new Promise((done) => {
      const start = performance.now();
      const hear = ({ data }) => {
        if (data.id !== id) return;
        worker.removeEventListener('message', hear);
        done({ time: performance.now() - start, count: data.answer.findings.length });
      };
      worker.addEventListener('message', hear);
      worker.postMessage({ id, method: 'assess', args: [text] });
    });
  const times = [];
  let findings = 0;
  for (let i = 0; i < 60; i += 1) {
    const { time, count } = await once(-1 - i);
    findings = count;
    if (i >= 20) times.push(time);
  }
  const loop = [];
  for (let i = 0; i < 9; i += 1) {
    const start = performance.now();
    let x = 1;
    for (let n = 0; n < 1e6; n += 1) x = x * 0.999999 + n;
    loop.push(performance.now() - start + 0 * x);
  }
  return { times, loop, findings };
}, line);
const reference = median(loop);
const show = (name, ms, promised) => console.log(`${name.padEnd(58)} ${ms.toFixed(1).padStart(8)} ms  ${(ms / reference).toFixed(1).padStart(7)} x reference  (promised ${promised})`);
console.log(`reference: a million multiply-adds in the page ${reference.toFixed(2)} ms`);
show(`assess ${findings} findings in the worker, there and back`, median(times), 'under 16 ms');
show('from opening to findings drawn', median(opening), 'under 1000 ms');
const used = await renderer();
console.log(`memory of the page's process ${used.toFixed(0)} MB, of an empty page's ${blank.toFixed(0)} MB: ${(used - blank).toFixed(0)} MB for Leeway (promised under 150 MB)`);
await browser.close();
