// Every control does something: each is used on a fresh page, and the page, the focus or the browser must answer.
// Controls that look and do alike (thirty cells, five tabs) are tried at the first, the middle and the last.
import assert from 'node:assert/strict';
import { after, before, test } from 'node:test';
import { LAPTOP, TABLET, launch, open } from './browser.mjs';

/** Long enough for a drawing; whatever takes longer is asked for again. */
const settle = (tab) => tab.evaluate(() => new Promise((done) => setTimeout(done, 50)));

let browser;
before(async () => { browser = await launch(); });
after(() => browser?.close());

const views = {
  board: async () => {},
  variant: async (tab) => { await tab.click('.modes button >> nth=1'); await tab.waitForSelector('.chip.changed'); },
  keypad: async (tab) => { await tab.click('.chip[data-key="chip-gas-dew_point--1"]'); await tab.keyboard.type('-38'); await tab.waitForSelector('.pad .act .main:not([disabled])'); },
  cell: async (tab) => { await tab.click('.modes button >> nth=1'); await tab.click('.cell[aria-label*="off side"] >> nth=0'); await tab.waitForSelector('.mend button'); },
  substances: async (tab) => { await tab.click('.rail button:has-text("Substances")'); await tab.waitForSelector('.find li button'); await tab.fill('#find', 'Cr2O3'); await settle(tab); await tab.click('.find li button >> nth=0'); await tab.waitForSelector('.record .cellname'); },
  zone: (tab) => tab.click('.tab >> nth=4'),
  addzone: (tab) => tab.click('button:has-text("Add a zone")'),
  change: (tab) => tab.click('.what .eq >> nth=1'),
  proposals: async (tab) => { await tab.click('button:has-text("Add a change")'); await tab.waitForSelector('.proposals button'); },
  line: (tab) => tab.click('.linename'),
  charge: async (tab) => { await tab.click('.linename'); await tab.click('.panel button:has-text("The charge")'); },
  lines: async (tab) => { await tab.click('.linename'); await tab.click('.panel button:has-text("Another line")'); },
  about: async (tab, how) => { if (how === TABLET) { await tab.click('.rail button:has-text("More")'); await tab.click('.panel button:has-text("About")'); } else await tab.click('.rail button:has-text("About")'); },
  more: (tab) => tab.click('.rail button:has-text("More")'),
  empty: async (tab) => { await tab.click('.linename'); await tab.click('.panel button:has-text("Another line")'); await tab.click('.panel button:has-text("Begin an empty line")'); await tab.waitForSelector('.empty'); },
};

/** Runs in the page: the controls to try, by index among all, with a name for the report. */
function list(scope) {
  const all = [...document.querySelectorAll('button, select, input, textarea, summary')];
  const groups = new Map();
  all.forEach((e, i) => {
    const r = e.getBoundingClientRect();
    if (e.disabled || r.width < 1 || r.height < 1 || (scope && !e.closest(scope))) return;
    if (e.getAttribute('aria-pressed') === 'true' || e.getAttribute('aria-current') || e.classList.contains('set')) return;
    const own = e.closest('.order, .keys, .units, .act') || e.classList.contains('btn') || e.classList.contains('text') || e.closest('.rail');
    const key = `${e.tagName} ${e.type ?? ''} ${e.className} ${own ? e.textContent : ''}`;
    groups.set(key, [...(groups.get(key) ?? []), { i, name: `${e.tagName.toLowerCase()}.${e.className} “${(e.getAttribute('aria-label') || e.textContent || e.id).slice(0, 60)}”`, kind: e.tagName === 'INPUT' ? e.type : e.tagName }]);
  });
  return [...groups.values()].flatMap((g) => (g.length > 3 ? [g[0], g[Math.floor(g.length / 2)], g[g.length - 1]] : g));
}

/** Runs in the page: all that a person would notice. */
function look() {
  const fields = [...document.querySelectorAll('input, select, textarea')].map((e) => (e.type === 'checkbox' ? e.checked : e.value)).join('|');
  return `${document.title}\n${document.getElementById('page').innerHTML}\n${fields}\n${[...document.querySelectorAll('details')].map((d) => d.open)}\n${window.__seen ?? ''}`;
}

for (const [name, how] of [['laptop', LAPTOP], ['tablet', TABLET]]) {
  test(`every control does something, ${name}`, { timeout: 900_000 }, async () => {
    const dead = [];
    let tried = 0;
    for (const [view, go] of Object.entries(views)) {
      // The drawer holds the same forms on both; what lies differently is tried on both.
      if (how === TABLET && !['board', 'keypad', 'cell', 'more', 'substances'].includes(view)) continue;
      if (how === LAPTOP && view === 'more') continue;
      const panelled = ['zone', 'addzone', 'change', 'proposals', 'line', 'charge', 'lines', 'about', 'more'].includes(view);
      const scope = panelled ? '.panel' : view === 'keypad' ? '.pad' : view === 'board' ? '' : view === 'variant' ? '.bar, .modes' : 'main';
      const { context, tab, seen } = await open(browser, how, { before: () => { try { localStorage.clear(); } catch { /* closed */ } window.print = () => { window.__seen = 'printed'; }; } });
      let events = 0;
      tab.on('filechooser', () => { events += 1; });
      tab.on('download', () => { events += 1; });
      await settle(tab);
      const base = await tab.evaluate(look);
      await go(tab, how);
      await settle(tab);
      const controls = await tab.evaluate(list, scope);
      assert.ok(controls.length, `${view} has controls`);
      for (const [n, control] of controls.entries()) {
        if (n) {
          // Back to the beginning by Esc where that is enough, else by opening the page again.
          for (let i = 0; i < 2 && (await tab.evaluate(look)) !== base; i += 1) {
            await tab.keyboard.press('Escape');
            await settle(tab);
          }
          if ((await tab.evaluate(look)) !== base) {
            await tab.reload();
            await tab.waitForSelector('.row .cell .gauge');
            await settle(tab);
          }
          await go(tab, how);
          await settle(tab);
        }
        const el = (await tab.$$('button, select, input, textarea, summary'))[control.i];
        const was = await tab.evaluate(look);
        const then = events;
        tried += 1;
        if (control.kind === 'SELECT') {
          const options = await el.$$eval('option', (l) => l.map((o) => o.value));
          const now = await el.inputValue();
          const other = options.find((o) => o !== now);
          if (other === undefined) { dead.push(`${view}: ${control.name} offers one choice`); continue; }
          await el.selectOption(other);
        } else if (control.kind === 'range') {
          await el.focus();
          await tab.keyboard.press('PageUp');
        } else if (['text', 'search', 'TEXTAREA'].includes(control.kind)) {
          await el.fill('12');
          await tab.keyboard.press('Tab');
        } else await el.click();
        let noticed = false;
        for (let i = 0; i < 40 && !noticed; i += 1) {
          await settle(tab);
          noticed = events !== then || (await tab.evaluate(look)) !== was;
        }
        if (!noticed) dead.push(`${view}: ${control.name}`);
      }
      assert.deepEqual(seen, { requests: [], messages: [], errors: [] }, view);
      await context.close();
    }
    console.log(`   ${name}: ${tried} controls tried`);
    assert.deepEqual(dead, []);
  });
}
