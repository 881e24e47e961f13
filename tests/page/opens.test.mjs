// The page opens from its file, asks nothing of anyone, says nothing to the console, and is read by people and programs alike.
import assert from 'node:assert/strict';
import { after, before, test } from 'node:test';
import { stat } from 'node:fs/promises';
import { readFileSync } from 'node:fs';
import { LAPTOP, PHONE, TABLET, axePath, findings, heading, launch, open, page, settle } from './browser.mjs';

let browser;
before(async () => { browser = await launch(); });
after(() => browser?.close());

const quiet = (seen) => assert.deepEqual(seen, { requests: [], messages: [], errors: [] });

for (const [name, how] of Object.entries({ laptop: LAPTOP, tablet: TABLET, phone: PHONE })) {
  test(`opens on a ${name} with findings, no request and no message`, async () => {
    const started = performance.now();
    const { context, tab, seen } = await open(browser, how);
    console.log(`   ${name}: ${Math.round(performance.now() - started)} ms from opening to findings`);
    assert.ok((await findings(tab)).length >= (name === 'phone' ? 4 : 20));
    assert.match(await heading(tab), /[a-z].*\./);
    assert.ok(await tab.isVisible('text=Invented line'));
    await settle(tab);
    quiet(seen);
    await context.close();
  });
}

test('the page is small enough to send', async () => {
  assert.ok((await stat(page)).size < 2_500_000);
});

test('the page itself forbids connections', async () => {
  const { context, tab } = await open(browser);
  const policy = await tab.getAttribute('meta[http-equiv="Content-Security-Policy"]', 'content');
  for (const part of ["default-src 'none'", "connect-src 'none'", "form-action 'none'"]) assert.ok(policy.includes(part), part);
  assert.ok(!policy.includes('unsafe-inline'));
  const tried = await tab.evaluate(() => fetch('http://127.0.0.1:9/').then(() => 'reached', () => 'refused'));
  assert.equal(tried, 'refused');
  const violated = tab.evaluate(() => new Promise((done) => { document.addEventListener('securitypolicyviolation', (e) => done(e.effectiveDirective)); new Image().src = 'http://127.0.0.1:9/a.png'; }));
  assert.equal(await violated, 'img-src');
  await context.close();
});

/** Views by name, and how each is come by. */
const views = {
  board: async () => {},
  variant: (tab) => tab.click('.modes button >> nth=1'),
  cell: (tab) => tab.click('.cell[aria-label] >> nth=0'),
  keypad: (tab) => tab.click('.chip >> nth=2'),
  substances: async (tab) => {
    await tab.click('.rail button:has-text("Substances")');
    await tab.waitForSelector('.find li button');
    await tab.click('.find li button >> nth=0');
    await tab.waitForSelector('.record svg');
  },
  zone: (tab) => tab.click('.tab >> nth=1'),
  change: (tab) => tab.click('.what .eq >> nth=0'),
  charge: async (tab) => { await tab.click('.linename'); await tab.click('.panel button:has-text("The charge")'); },
  proposals: async (tab) => { await tab.click('button:has-text("Add a change")'); await tab.waitForSelector('.proposals button'); },
  lines: async (tab) => { await tab.click('.linename'); await tab.click('.panel button:has-text("Another line")'); },
  empty: async (tab) => { await tab.click('.linename'); await tab.click('.panel button:has-text("Another line")'); await tab.click('.panel button:has-text("Begin an empty line")'); },
};

for (const [scheme, how] of [['light', { ...LAPTOP, colorScheme: 'light' }], ['dark', { ...LAPTOP, colorScheme: 'dark' }], ['tablet', TABLET]]) {
  test(`no barrier that a checker finds, ${scheme}`, async () => {
    const axe = readFileSync(axePath, 'utf8');
    const found = [];
    for (const [view, go] of Object.entries(views)) {
      const { context, tab, seen } = await open(browser, how);
      await go(tab);
      await settle(tab);
      await tab.evaluate(axe);
      const result = await tab.evaluate(() => globalThis.axe.run(document, { resultTypes: ['violations'] }));
      for (const v of result.violations) if (v.impact === 'serious' || v.impact === 'critical') found.push(`${view}: ${v.id}, ${v.nodes.length} times, ${v.nodes[0].target} ${v.nodes[0].failureSummary.split('\n')[1] ?? ''}`);
      quiet(seen);
      await context.close();
    }
    assert.deepEqual(found, []);
  });
}

for (const [name, how, touch] of [['laptop', LAPTOP, false], ['tablet', TABLET, true], ['phone', PHONE, true], ['200 % zoom', { viewport: { width: 683, height: 384 }, deviceScaleFactor: 2 }, false], ['laptop on its edge', { viewport: { width: 1180, height: 820 }, hasTouch: true }, false]]) {
  test(`nothing is cut, covered or out of reach, ${name}`, async () => {
    const found = [];
    for (const [view, go] of Object.entries(views)) {
      if (view === 'change' && name === 'phone') continue;
      if (view === 'change' && name === '200 % zoom') continue;
      const { context, tab } = await open(browser, how);
      await go(tab);
      await settle(tab);
      await tab.screenshot({ path: new URL(`shots/${view}-${name.replace(/\W+/g, '-')}.png`, import.meta.url).pathname, fullPage: true });
      found.push(...(await tab.evaluate(look, { touch })).map((f) => `${view}: ${f}`));
      await context.close();
    }
    assert.deepEqual(found, []);
  });
}

for (const [name, how] of [['laptop', LAPTOP], ['tablet', TABLET]]) {
  test(`every demo line and variant is drawn whole, ${name}`, async () => {
    const found = [];
    const { context, tab, seen } = await open(browser, how);
    const lines = async () => {
      await tab.click('.linename');
      await tab.click('.panel button:has-text("Another line")');
      await tab.waitForSelector('.panel .choices button');
    };
    await lines();
    const count = await tab.locator('.panel .choices button').count();
    for (let i = 0; i < count; i += 1) {
      if (i) await lines();
      await tab.click(`.panel .choices button >> nth=${i}`);
      await settle(tab);
      if (await tab.isVisible('.panel')) await tab.keyboard.press('Escape');
      await settle(tab);
      const variants = await tab.locator('.modes button').count();
      for (let v = 0; v < variants; v += 1) {
        await tab.click(`.modes button >> nth=${v}`);
        await settle(tab);
        const title = `${await tab.textContent('.linename')}, ${await tab.textContent(`.modes button >> nth=${v}`)}`;
        found.push(...(await tab.evaluate(look, { touch: false })).map((f) => `${title}: ${f}`));
        await tab.screenshot({ path: new URL(`shots/demo-${i}-${v}-${name}.png`, import.meta.url).pathname, fullPage: true });
        if (v === 0) {
          // Its first cell as well.
          await tab.click('.row .cell[aria-label] >> nth=0');
          await settle(tab);
          found.push(...(await tab.evaluate(look, { touch: false })).map((f) => `${title}, a cell: ${f}`));
          await tab.keyboard.press('Escape');
          await settle(tab);
        }
      }
    }
    quiet(seen);
    await context.close();
    assert.deepEqual(found, []);
  });
}

/** Runs in the page: sideways scrolling, cut text, words over words, small targets. */
function look({ touch }) {
  const found = [];
  const root = document.documentElement;
  if (root.scrollWidth > root.clientWidth) found.push(`the page scrolls sideways: ${root.scrollWidth} of ${root.clientWidth}`);
  const shown = (e) => { const r = e.getBoundingClientRect(); return r.width > 1 && r.height > 1 && getComputedStyle(e).visibility !== 'hidden'; };
  const inScroller = (e) => e.closest('.scroll.wide, .tablewrap, pre');
  const words = (e) => e.textContent.trim().slice(0, 40);
  // Text that runs out of its key or chip.
  for (const e of document.querySelectorAll('#page button, #page h1, #page h2, #page p, #page .say')) {
    if (!shown(e) || e.closest('.skip')) continue;
    const box = e.getBoundingClientRect();
    const text = document.createTreeWalker(e, NodeFilter.SHOW_TEXT);
    for (let node = text.nextNode(); node; node = text.nextNode()) {
      const range = document.createRange();
      range.selectNodeContents(node);
      const r = range.getBoundingClientRect();
      if (r.width > 1 && getComputedStyle(node.parentElement).position !== 'absolute' && (r.right > box.right + 1.5 || r.left < box.left - 1.5)) { found.push(`“${node.data.trim().slice(0, 40)}” runs out of its ${e.className || e.tagName}`); break; }
    }
    if (e.scrollWidth > e.clientWidth + 2 && e.clientWidth > 0 && getComputedStyle(e).overflowX !== 'visible') found.push(`“${words(e)}” is cut in its ${e.className || e.tagName}`);
  }
  // Words on drawings, against each other and against the drawing's edge.
  for (const svg of document.querySelectorAll('#page svg')) {
    if (!shown(svg)) continue;
    const edge = svg.getBoundingClientRect();
    const texts = [...svg.querySelectorAll('text')].map((t) => ({ r: t.getBoundingClientRect(), t: t.textContent }));
    texts.forEach(({ r, t }, i) => {
      if (r.right > edge.right + 2 || r.left < edge.left - 2) found.push(`“${t}” leaves its drawing`);
      for (const o of texts.slice(i + 1)) if (r.left < o.r.right - 1 && o.r.left < r.right - 1 && r.top + 3 < o.r.bottom - 3 && o.r.top + 3 < r.bottom - 3) found.push(`“${t}” and “${o.t}” lie over each other`);
    });
  }
  // Small letters.
  for (const e of document.querySelectorAll('#page *')) if (e.childElementCount === 0 && e.textContent.trim() && shown(e) && parseFloat(getComputedStyle(e).fontSize) < 12.9 && !e.closest('pre')) { found.push(`letters of ${getComputedStyle(e).fontSize}: “${words(e)}”`); break; }
  if (touch) {
    for (const e of document.querySelectorAll('#page button, #page select, #page input, #page summary, #page label.tick')) {
      if (!shown(e) || e.disabled || e.type === 'checkbox' || e.type === 'range' || inScroller(e)) continue;
      const r = e.getBoundingClientRect();
      const reach = e.classList.contains('tab') ? 14 : 0;
      if (r.height + reach < 43 || r.width < 24) found.push(`a target of ${Math.round(r.width)} by ${Math.round(r.height)}: “${words(e) || e.id}”`);
    }
  }
  return found.slice(0, 12);
}
