// Opening, saving, keeping and losing nothing.
import assert from 'node:assert/strict';
import { after, before, test } from 'node:test';
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { LAPTOP, TABLET, findings, heading, launch, open, page, settle, until } from './browser.mjs';
import { pathToFileURL } from 'node:url';

const lines = fileURLToPath(new URL('../lines/', import.meta.url));
let browser;
let folder;
before(async () => { browser = await launch(); folder = await mkdtemp(join(tmpdir(), 'leeway-')); });
after(async () => { await browser?.close(); await rm(folder, { recursive: true, force: true }); });

const quiet = (seen) => assert.deepEqual(seen, { requests: [], messages: [], errors: [] });
const dew = '.chip[data-key="chip-gas-dew_point--1"]';
async function edit(tab, text = '-38 C fp') {
  const was = await tab.textContent(dew);
  await tab.click(dew);
  await until(tab, () => document.activeElement?.id === 'pad-input');
  await tab.keyboard.type(text);
  await tab.waitForSelector('.pad .act .main:not([disabled])');
  await tab.keyboard.press('Enter');
  await until(tab, ([sel, old]) => document.querySelector(sel).textContent !== old, [dew, was]);
  await settle(tab);
}
async function save(tab) {
  const [download] = await Promise.all([tab.waitForEvent('download'), tab.keyboard.press('Control+s')]);
  const path = join(folder, download.suggestedFilename());
  await download.saveAs(path);
  return path;
}
async function choose(tab, path) {
  const [chooser] = await Promise.all([tab.waitForEvent('filechooser'), tab.keyboard.press('Control+o')]);
  await chooser.setFiles(path);
}

for (const [name, how] of [['laptop', LAPTOP], ['tablet', TABLET]]) {
  test(`what is saved and opened again is judged the same, ${name}`, async () => {
    const one = await open(browser, how);
    await edit(one.tab);
    const [was, said] = [await findings(one.tab), await heading(one.tab)];
    const path = await save(one.tab);
    assert.match(path, /heron-2.*\.leeway\.json$/);
    const file = JSON.parse(await readFile(path, 'utf8'));
    assert.equal(file.leeway, 1);
    assert.equal(file.zones[1].gas.dew_point.value, -38);
    quiet(one.seen);
    await one.context.close();
    const two = await open(browser, how);
    assert.notDeepEqual(await findings(two.tab), was);
    await choose(two.tab, path);
    await until(two.tab, (want) => [...document.querySelectorAll('.row .cell[aria-label]')].map((c) => c.getAttribute('aria-label')).join('\n') === want, was.join('\n'));
    assert.equal(await heading(two.tab), said);
    quiet(two.seen);
    await two.context.close();
  });
}

test('a file is saved with every field it came with', async () => {
  const { context, tab } = await open(browser);
  const line = JSON.parse(await readFile(join(lines, 'heron-2.leeway.json'), 'utf8'));
  line.site = { works: 'Tarnholt', since: 1998 };
  line.zones[0].thermocouple = 'TE-11';
  const path = join(folder, 'own-fields.leeway.json');
  await writeFile(path, JSON.stringify(line));
  await choose(tab, path);
  await until(tab, () => document.querySelector('.rail .file')?.textContent.includes('own-fields'));
  const saved = JSON.parse(await readFile(await save(tab), 'utf8'));
  assert.deepEqual(saved, line);
  await context.close();
});

const bad = {
  'truncated.leeway.json': ['{"leeway": 1, "name": "Cut', /line 1|end/i],
  'picture.leeway.json': [Buffer.from([0x89, 0x50, 0x4e, 0x47, 0, 1, 2, 3, 0xff, 0xfe, 0, 0]), /text|UTF-8|JSON/i],
  'empty.leeway.json': ['', /empty|nothing|end/i],
  'list.leeway.json': ['[1, 2, 3]', /./],
  'unit.leeway.json': [null, /furlong/],
};
test('a file that is no line is refused with file, place, found, expected and what to do; the line stays', async () => {
  const { context, tab, seen } = await open(browser);
  await edit(tab);
  const was = await findings(tab);
  for (const [name, [content, says]] of Object.entries(bad)) {
    let text = content;
    if (text === null) {
      const line = JSON.parse(await readFile(join(lines, 'heron-2.leeway.json'), 'utf8'));
      line.zones[2].temperature.unit = 'furlong';
      text = JSON.stringify(line);
    }
    await writeFile(join(folder, name), text);
    await choose(tab, join(folder, name));
    await until(tab, (n) => document.querySelector('.notice')?.textContent.includes(n), name);
    const told = await tab.textContent('.notice');
    assert.match(told, says, `${name}: ${told}`);
    assert.match(told, /was not opened/);
    assert.match(told, /What to do|Expected/, `${name}: ${told}`);
    assert.deepEqual(await findings(tab), was, `${name} leaves the line alone`);
    await tab.click('.notice button:has-text("Leave it")');
    await tab.waitForSelector('.notice', { state: 'detached' });
  }
  assert.match(await tab.textContent(dew), /−38/);
  quiet(seen);
  await context.close();
});

test('a file newer than the program opens, says so, and keeps what is not known', async () => {
  const { context, tab } = await open(browser);
  const line = { ...JSON.parse(await readFile(join(lines, 'heron-2.leeway.json'), 'utf8')), leeway: 99, later: { x: 1 } };
  const path = join(folder, 'newer.leeway.json');
  await writeFile(path, JSON.stringify(line));
  await choose(tab, path);
  await tab.waitForSelector('.notice');
  assert.match(await tab.textContent('.notice'), /version 99/);
  assert.deepEqual(JSON.parse(await readFile(await save(tab), 'utf8')), line);
  await context.close();
});

test('a file of a hundred megabytes is refused, and the page stays quick', async () => {
  const { context, tab, seen } = await open(browser);
  const path = join(folder, 'huge.leeway.json');
  await writeFile(path, Buffer.alloc(100_000_000, 32));
  await choose(tab, path);
  await tab.waitForSelector('.notice');
  assert.match(await tab.textContent('.notice'), /was not opened/);
  assert.ok((await findings(tab)).length >= 20);
  quiet(seen);
  await context.close();
});

test('a file is dropped onto the page', async () => {
  const { context, tab, seen } = await open(browser);
  const text = await readFile(join(lines, 'kiln-k4.leeway.json'), 'utf8');
  const data = await tab.evaluateHandle((t) => { const d = new DataTransfer(); d.items.add(new File([t], 'dropped.leeway.json', { type: 'application/json' })); return d; }, text);
  await tab.dispatchEvent('#page', 'drop', { dataTransfer: data });
  await until(tab, (n) => document.querySelector('.linename')?.textContent === n, JSON.parse(text).name);
  await tab.keyboard.press('Control+z');
  await until(tab, () => /Heron/.test(document.querySelector('.linename').textContent));
  quiet(seen);
  await context.close();
});

test('the browser keeps the work: after closing and opening again it is there', async () => {
  const { context, tab, seen } = await open(browser);
  await edit(tab);
  const was = await findings(tab);
  await settle(tab);
  const again = await context.newPage();
  await again.goto(pathToFileURL(page).href);
  await again.waitForSelector('.row .cell .gauge');
  await settle(again);
  assert.deepEqual(await findings(again), was);
  assert.match(await again.textContent('.rail .file'), /not saved/);
  quiet(seen);
  await context.close();
});

test('a browser that keeps nothing is told of once, and nothing else is lost', async () => {
  const { context, tab, seen } = await open(browser, LAPTOP, { before: () => { Object.defineProperty(window, 'localStorage', { get() { throw new Error('closed'); } }); } });
  await edit(tab);
  await tab.waitForSelector('.notice');
  assert.match(await tab.textContent('.notice'), /keeps nothing/);
  await tab.click('.notice button:has-text("I know")');
  await edit(tab, '-41');
  await settle(tab);
  assert.equal(await tab.locator('.notice').count(), 0, 'told once');
  quiet(seen);
  await context.close();
});

test('leaving with unsaved work asks first; without it does not', async () => {
  const { context, tab } = await open(browser);
  const asks = () => tab.evaluate(() => { const e = new Event('beforeunload', { cancelable: true }); window.dispatchEvent(e); return e.defaultPrevented; });
  assert.equal(await asks(), false);
  await edit(tab);
  assert.equal(await asks(), true);
  await save(tab);
  await settle(tab);
  assert.equal(await asks(), false);
  await edit(tab, '-41');
  assert.equal(await asks(), true);
  await tab.keyboard.press('Control+z');
  await settle(tab);
  assert.equal(await asks(), false, 'undone to what was saved');
  await context.close();
});

test('after a trap the engine starts again, the work is there, it is told once and goes on', async () => {
  const { context, tab, seen } = await open(browser);
  await edit(tab);
  const was = await findings(tab);
  await tab.evaluate(() => window.__leewayTest.crash());
  await tab.waitForSelector('.notice');
  assert.match(await tab.textContent('.notice'), /started again.*Nothing you typed is lost/s);
  assert.equal(await tab.locator('.notice').count(), 1);
  assert.deepEqual(await findings(tab), was);
  await tab.evaluate(() => window.__leewayTest.crash());
  await settle(tab);
  assert.equal(await tab.locator('.notice').count(), 1, 'a second fall is not told twice');
  await tab.click('.notice button');
  await edit(tab, '-52 C fp');
  assert.notDeepEqual(await findings(tab), was, 'what comes after is judged');
  // A trap while something is typed loses nothing typed.
  await tab.click(dew);
  await until(tab, () => document.activeElement?.id === 'pad-input');
  await tab.keyboard.type('-33');
  await tab.evaluate(() => window.__leewayTest.crash());
  await settle(tab);
  assert.equal(await tab.inputValue('#pad-input'), '-33');
  await tab.waitForSelector('.pad .act .main:not([disabled])');
  assert.deepEqual(seen.requests, []);
  assert.deepEqual(seen.errors, []);
  await context.close();
});

test('the board prints on A4 with its readings, findings and cautions', async () => {
  const { context, tab, seen } = await open(browser);
  await tab.click('.modes button >> nth=1');
  await settle(tab);
  const pdf = await tab.pdf({ preferCSSPageSize: true, printBackground: false, path: fileURLToPath(new URL('shots/board.pdf', import.meta.url)) });
  const text = pdf.toString('latin1');
  assert.match(text.slice(0, 8), /%PDF/);
  const pages = (text.match(/\/Type\s*\/Page\b/g) ?? []).length;
  assert.ok(pages >= 1 && pages <= 2, `${pages} pages`);
  const box = text.match(/\/MediaBox\s*\[\s*0\s+0\s+([\d.]+)\s+([\d.]+)/);
  const sides = [Number(box[1]), Number(box[2])].sort((a, b) => a - b);
  assert.ok(Math.abs(sides[0] - 595) < 2 && Math.abs(sides[1] - 842) < 2, `A4, not ${sides}`);
  await tab.emulateMedia({ media: 'print' });
  for (const gone of ['.rail', '.push', '.modes']) assert.equal(await tab.locator(gone).first().isVisible(), false, gone);
  for (const there of ['h1', '.trace', '.chip', '.row .cell', '.gas', '.drawing']) assert.equal(await tab.locator(there).first().isVisible(), true, there);
  quiet(seen);
  await context.close();
});
