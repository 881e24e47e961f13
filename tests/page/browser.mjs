// The built page in Chromium, opened from its file; everything it asks for and everything it says is counted.
import { createRequire } from 'node:module';
import { existsSync } from 'node:fs';
import { mkdir } from 'node:fs/promises';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

const here = dirname(fileURLToPath(import.meta.url));
const require = createRequire(join(here, '../../web/package.json'));
const { chromium } = require('playwright-core');
export const axePath = require.resolve('axe-core/axe.min.js');

export const page = resolve(here, process.env.LEEWAY_PAGE ?? '../../dist/leeway.html');
export const shots = join(here, 'shots');
export const LAPTOP = { viewport: { width: 1366, height: 768 } };
export const TABLET = { viewport: { width: 820, height: 1180 }, hasTouch: true };
export const PHONE = { viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true };

const ARGS = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'];
const EXECUTABLE = process.env.CHROMIUM ?? ['/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'].find((p) => existsSync(p));

/** A browser for the tests of one file. */
export async function launch() {
  await mkdir(shots, { recursive: true });
  return chromium.launch({ executablePath: EXECUTABLE, args: ARGS, headless: true });
}

/** A fresh page on the built file; `seen` holds requests beyond the file, console messages and page errors. */
export async function open(browser, how = LAPTOP, { ready = true, before = null } = {}) {
  const context = await browser.newContext({ acceptDownloads: true, ...how });
  const tab = await context.newPage();
  const seen = { requests: [], messages: [], errors: [] };
  const own = pathToFileURL(page).href;
  tab.on('request', (r) => { if (r.url() !== own && !r.url().startsWith('blob:') && !r.url().startsWith('data:')) seen.requests.push(r.url()); });
  tab.on('console', (m) => seen.messages.push(`${m.type()}: ${m.text()}`));
  tab.on('pageerror', (e) => seen.errors.push(String(e)));
  // Listening all along keeps the choice of files with the test; switching it on and off loses one now and then.
  tab.on('filechooser', () => {});
  await tab.addInitScript(() => { window.__leewayTest = {}; });
  if (before) await tab.addInitScript(before);
  await tab.goto(own);
  if (ready) await tab.waitForSelector('.row .cell .gauge, .phone .cell .gauge', { timeout: 20000 });
  return { context, tab, seen };
}

/** The findings as a person reads them. */
export const findings = (tab) => tab.$$eval('.row .cell[aria-label], .phone .cell[aria-label]', (cells) => cells.map((c) => c.getAttribute('aria-label')));
export const heading = (tab) => tab.textContent('h1');
/** Waits until what is shown follows what was done. */
export const settle = (tab) => tab.evaluate(() => new Promise((done) => setTimeout(done, 120)));
/** Asks the page until it says yes. The page's own policy forbids the ready-made way, which builds code from text. */
export async function until(tab, asked, arg, patience = 5000) {
  const end = performance.now() + patience;
  for (;;) {
    if (await tab.evaluate(asked, arg)) return;
    if (performance.now() > end) throw new Error(`the page did not come to: ${asked} with ${JSON.stringify(arg)?.slice(0, 300)}`);
    await new Promise((done) => setTimeout(done, 30));
  }
}
