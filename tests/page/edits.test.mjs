// Every edit by touch and by keyboard, read back, undone and done again.
import assert from 'node:assert/strict';
import { after, before, test } from 'node:test';
import { LAPTOP, PHONE, TABLET, findings, heading, launch, open, settle, until } from './browser.mjs';

let browser;
before(async () => { browser = await launch(); });
after(() => browser?.close());

const dew = (zone) => `.chip[data-key="chip-gas-dew_point--${zone}"]`;
const heat = (zone) => `.chip[data-key="chip-zone-temperature--${zone}"]`;
const changed = (tab, was) => until(tab, (old) => [...document.querySelectorAll('.row .cell[aria-label], .phone .cell[aria-label]')].map((c) => c.getAttribute('aria-label')).join('\n') !== old, was.join('\n'));
const same = (tab, want) => until(tab, (old) => [...document.querySelectorAll('.row .cell[aria-label], .phone .cell[aria-label]')].map((c) => c.getAttribute('aria-label')).join('\n') === old, want.join('\n'));
/** The keypad is open and listens. */
const padOpen = (tab) => until(tab, () => document.activeElement?.id === 'pad-input');
/** The keypad has understood what is typed. */
const understood = (tab) => tab.waitForSelector('.pad .act .main:not([disabled])');
async function run(how, steps) {
  const { context, tab, seen } = await open(browser, how);
  await steps(tab);
  assert.deepEqual(seen, { requests: [], messages: [], errors: [] });
  await context.close();
}

test('by keyboard alone: a chip is reached, typed into, kept, undone and redone', () => run(LAPTOP, async (tab) => {
  const was = await findings(tab);
  await tab.focus(dew(1));
  await tab.keyboard.press('Enter');
  await padOpen(tab);
  await tab.keyboard.type('-38 C fp');
  await changed(tab, was);
  assert.match(await tab.textContent('.pad .readback'), /−38.*over ice.*ppm/s, 'it is read back in full with what it means');
  assert.ok(await tab.isVisible('.cell .was'), 'the value before stays as a hollow mark');
  await tab.keyboard.press('Enter');
  await tab.waitForSelector('.pad', { state: 'detached' });
  assert.match(await tab.textContent(dew(1)), /−38/);
  assert.equal(await tab.evaluate(() => document.activeElement.className.includes('chip')), true, 'the focus is back on the chip');
  const now = await findings(tab);
  await tab.keyboard.press('Control+z');
  await same(tab, was);
  await tab.keyboard.press('Control+Shift+z');
  await same(tab, now);
  await tab.keyboard.press('Control+z');
  await tab.keyboard.press('Control+y');
  await same(tab, now);
}));

test('by touch alone: keys type, one takes it back, one keeps it', () => run(TABLET, async (tab) => {
  const was = await findings(tab);
  await tab.tap(dew(1));
  await padOpen(tab);
  for (const key of ['−', '3', '8']) await tab.tap(`.pad .keys button:has-text("${key}") >> nth=0`);
  assert.equal(await tab.inputValue('#pad-input'), '−38');
  await changed(tab, was);
  await tab.tap('.pad .act button >> nth=0');
  await same(tab, was);
  await tab.tap(heat(0));
  await padOpen(tab);
  for (const key of ['8', '5', '0']) await tab.tap(`.pad .keys button:has-text("${key}") >> nth=0`);
  await understood(tab);
  await tab.tap('.pad .act .main');
  await changed(tab, was);
  assert.match(await tab.textContent(heat(0)), /850/);
  await tab.tap('.rail button:has-text("Undo")');
  await same(tab, was);
}));

test('on a telephone an edit is made and undone too', () => run(PHONE, async (tab) => {
  const was = await findings(tab);
  await tab.tap(dew(1));
  await padOpen(tab);
  for (const key of ['−', '2', '0']) await tab.tap(`.pad .keys button:has-text("${key}") >> nth=0`);
  await understood(tab);
  await tab.tap('.pad .act .main');
  await changed(tab, was);
  await tab.tap('.rail button:has-text("Undo")');
  await same(tab, was);
}));

for (const [typed, chip, shown] of [['-48 C dp', dew(1), /−48/], ['-44,5', dew(1), /−44\.5/], ['-48 F', dew(1), /−48.*°F/], ['35 ppm', dew(1), null], ['1 922 F', heat(3), /1.922.*°F/], ['1090 ± 2', heat(3), /1.090.*± 2/s]]) {
  test(`“${typed}” is understood`, () => run(LAPTOP, async (tab) => {
    await tab.click(chip);
    await padOpen(tab);
    await tab.keyboard.type(typed);
    await tab.keyboard.press('Enter');
    await tab.waitForSelector('.pad', { state: 'detached' });
    if (shown) assert.match((await tab.textContent(chip)).replace(/[\u2009\u202f]/g, ' '), shown);
    else assert.match(await tab.textContent('.chip[data-key="chip-channel-gas-H2O-1"]'), /35.*ppm/s, 'water typed for a dew point becomes a water channel');
  }));
}

test('what is not understood is said in place, what is typed stays, and Esc gives all back', () => run(LAPTOP, async (tab) => {
  const was = await findings(tab);
  await tab.click(dew(1));
  await padOpen(tab);
  await tab.keyboard.type('-48 parsec');
  await tab.waitForSelector('.pad .trouble');
  assert.match(await tab.textContent('.pad .trouble'), /parsec/);
  assert.equal(await tab.inputValue('#pad-input'), '-48 parsec');
  assert.ok(await tab.isDisabled('.pad .act .main'));
  await tab.keyboard.press('Enter');
  assert.ok(await tab.isVisible('.pad'), 'Enter keeps nothing that is not understood');
  await tab.keyboard.press('Escape');
  await tab.waitForSelector('.pad', { state: 'detached' });
  await same(tab, was);
  assert.ok(await tab.isDisabled('.rail button:has-text("Undo")'), 'nothing is left to undo');
}));

test('unit, ice or water and tolerance are chosen on keys', () => run(LAPTOP, async (tab) => {
  await tab.click(dew(1));
  await padOpen(tab);
  await tab.keyboard.type('-38');
  await understood(tab);
  await tab.click('.pad .units button:has-text("over water")');
  await until(tab, () => /over (liquid )?water/.test(document.querySelector('.pad .readback').textContent));
  await tab.click('.pad .units button:has-text("°F")');
  await until(tab, () => /°F/.test(document.querySelector('.pad .readback').textContent));
  await tab.click('.pad .tol');
  await settle(tab);
  await tab.keyboard.type('5');
  await until(tab, () => /± 5/.test(document.querySelector('.pad .readback').textContent.replace(/\u2009/g, ' ')));
}));

test('undo goes back through a hundred edits and forward again', () => run(LAPTOP, async (tab) => {
  const was = await findings(tab);
  for (let i = 0; i < 100; i += 1) await tab.selectOption('select[aria-label^="Coverage factor"]', String([1, 3, 2][i % 3]));
  await settle(tab);
  for (let i = 0; i < 100; i += 1) await tab.keyboard.press('Control+z');
  await same(tab, was);
}));

test('the coverage factor is kept in the line and moves the standings', () => run(LAPTOP, async (tab) => {
  const was = await findings(tab);
  await tab.selectOption('select[aria-label^="Coverage factor"]', '3');
  await changed(tab, was);
  await tab.keyboard.press('Control+z');
  await same(tab, was);
}));

test('a variant is one tap away and one tap back', () => run(TABLET, async (tab) => {
  const was = await findings(tab);
  const said = await heading(tab);
  await tab.tap('.modes button >> nth=1');
  await changed(tab, was);
  assert.notEqual(await heading(tab), said);
  assert.ok(await tab.isVisible('.chip.changed'));
  await tab.tap('text=Back to recipe');
  await same(tab, was);
}));

test('a remedy is tried by one key and undone by one', () => run(LAPTOP, async (tab) => {
  await tab.click('.modes button >> nth=1');
  await settle(tab);
  const was = await findings(tab);
  await tab.click('.cell[aria-label*="off side"] >> nth=0');
  await tab.waitForSelector('.mend button');
  const said = await heading(tab);
  await tab.click('.mend button >> nth=0');
  await until(tab, (old) => document.querySelector('h1').textContent !== old, said);
  assert.match(await tab.getAttribute('.one-cell .standing', 'class'), /s-on/, 'beyond doubt means on side');
  await tab.keyboard.press('Control+z');
  await tab.keyboard.press('Escape');
  await tab.waitForSelector('.board');
  await same(tab, was);
}));

test('zones are added, named, moved, copied and deleted', () => run(LAPTOP, async (tab) => {
  const names = () => tab.$$eval('.tab span', (list) => list.map((e) => e.textContent));
  const first = await names();
  await tab.click('button:has-text("Add a zone")');
  await tab.fill('#new-name', 'Reheat');
  await tab.fill('#new-temperature', '940 ± 5');
  await tab.fill('#new-h2', '75 %');
  await tab.fill('#new-dew', '-45');
  await tab.keyboard.press('Enter');
  await until(tab, () => [...document.querySelectorAll('.tab span')].some((e) => e.textContent === 'Reheat'));
  assert.deepEqual(await names(), [...first, 'Reheat']);
  await tab.click('.tab:has-text("Reheat")');
  await tab.click('.panel button:has-text("Earlier")');
  await until(tab, () => document.querySelectorAll('.tab span')[4].textContent === 'Reheat');
  const input = tab.locator('.panel .f:has(label:text-is("Name")) input');
  await input.fill('Second heat');
  await input.press('Tab');
  await until(tab, () => document.querySelectorAll('.tab span')[4].textContent === 'Second heat');
  await tab.click('.panel button:text-is("Copy")');
  await until(tab, () => document.querySelectorAll('.tab').length === 7);
  await tab.click('.panel button[aria-label^="Delete Second heat"]');
  await until(tab, () => document.querySelectorAll('.tab').length === 6);
  for (let i = 0; i < 5; i += 1) await tab.keyboard.press('Control+z');
  await settle(tab);
  assert.deepEqual(await names(), first);
}));

test('a name that is taken is refused in place and stays as typed', () => run(LAPTOP, async (tab) => {
  await tab.click('.tab >> nth=0');
  const input = tab.locator('.panel .f:has(label:text-is("Name")) input');
  await input.fill('Soak');
  await input.press('Tab');
  await tab.waitForSelector('.panel .trouble');
  assert.equal(await input.inputValue(), 'Soak');
  assert.notEqual(await tab.textContent('.tab span >> nth=0'), 'Soak');
}));

test('a gas channel is added, changed and taken away', () => run(LAPTOP, async (tab) => {
  await tab.click('.tab >> nth=0');
  await tab.fill('.panel .addrow input >> nth=0', 'CO2');
  await tab.fill('.panel .addrow input >> nth=1', '120 ppm');
  await tab.click('.panel .addrow button');
  await tab.waitForSelector('.chip[data-key="chip-channel-gas-CO2-0"]');
  assert.match(await tab.textContent('.chip[data-key="chip-channel-gas-CO2-0"]'), /120.*ppm/);
  await tab.click('.panel button[aria-label="Delete CO2"]');
  await tab.waitForSelector('.chip[data-key="chip-channel-gas-CO2-0"]', { state: 'detached' });
}));

test('a change is typed, judged, limited to zones, reworded and deleted', () => run(LAPTOP, async (tab) => {
  await tab.click('button:has-text("Add a change")');
  await tab.fill('#nc-eq', 'Ti + O2 = TiO2');
  await until(tab, () => /TiO/.test(document.querySelector('.f:has(#nc-eq) .ok, .f:has(#nc-eq) .trouble')?.textContent ?? ''));
  await tab.fill('#nc-eq', 'Cr + H2O = Cr2O3 + H2 ++');
  await tab.click('.panel button:has-text("Add this change")');
  await tab.waitForSelector('.panel .trouble');
  assert.equal(await tab.inputValue('#nc-eq'), 'Cr + H2O = Cr2O3 + H2 ++', 'what was typed stays');
  await tab.fill('#nc-eq', 'Mn + H2O = MnO + H2');
  await tab.fill('#nc-name', 'Manganese oxidises');
  await tab.click('.panel button:has-text("Add this change")');
  const row = '.row:has(.name:text-is("Manganese oxidises"))';
  await tab.waitForSelector(`${row} .cell[aria-label]`);
  const before = await tab.locator(`${row} .cell[aria-label]`).count();
  await tab.click(`${row} .eq`);
  await tab.click('.zonesof input >> nth=0');
  await until(tab, ([sel, n]) => document.querySelectorAll('.row').length && [...document.querySelectorAll('.row')].find((r) => r.textContent.includes('Manganese oxidises')).querySelectorAll('.cell[aria-label]').length === n, [row, before - 1]);
  await tab.selectOption('.panel .f:has(label:text-is("Wish")) select', 'want');
  await until(tab, () => /Want/.test([...document.querySelectorAll('.group')].at(-1)?.textContent ?? '') && [...document.querySelectorAll('.row')].at(-1).textContent.includes('Manganese'));
  await tab.click('.panel button:has-text("Delete")');
  await tab.waitForSelector(row, { state: 'detached' });
}));

test('a proposal is tapped and stands on the board', () => run(TABLET, async (tab) => {
  const rows = await tab.locator('.row').count();
  await tab.tap('button:has-text("Add a change")');
  await tab.waitForSelector('.proposals button');
  const name = await tab.textContent('.proposals button b >> nth=0');
  await tab.tap('.proposals button >> nth=0');
  await until(tab, (n) => document.querySelectorAll('.row').length === n + 1, rows);
  assert.ok((await tab.$$eval('.row .name', (l) => l.map((e) => e.textContent))).some((t) => t.startsWith(name)));
}));

test('an equation that is not understood stands in its row with the reason, the others stay judged', () => run(LAPTOP, async (tab) => {
  await tab.click('.what .eq >> nth=0');
  const input = tab.locator('.panel .f:has(label:text-is("Equation")) input, .panel .f:has(label:text-is("Equation")) textarea');
  await input.fill('Cr + H2O = Xx2O3');
  await input.press('Tab');
  await tab.waitForSelector('.rowtrouble, .panel .trouble');
  assert.ok((await findings(tab)).length >= 20);
}));

test('an empty line is begun and built to its first finding', () => run(LAPTOP, async (tab) => {
  await tab.click('.rail button:has-text("Lines")');
  await tab.click('.panel button:has-text("Begin an empty line")');
  await until(tab, () => document.querySelector('h1').textContent === 'No zone yet. Begin with the hottest.');
  await tab.click('.empty button:has-text("Add a zone")');
  await tab.fill('#new-name', 'Muffle');
  await tab.fill('#new-temperature', '1120');
  await tab.fill('#new-h2', '25 %');
  await tab.fill('#new-dew', '-40');
  await tab.click('.panel button:has-text("Add this zone")');
  await tab.waitForSelector('.tab:has-text("Muffle")');
  await tab.click('.linename');
  await tab.click('.panel button:has-text("The charge")');
  await tab.fill('#memadd-a', 'Cr');
  await tab.fill('#memadd-b', '18,1 %');
  await tab.keyboard.press('Enter');
  await tab.waitForSelector('.member');
  await tab.fill('#memadd-a', 'Fe');
  await tab.fill('#memadd-b', '73 %');
  await tab.keyboard.press('Enter');
  await until(tab, () => document.querySelectorAll('.member').length === 2);
  await tab.click('.panel button:has-text("Propose changes")');
  await tab.waitForSelector('.proposals button');
  await tab.click('.proposals button >> nth=0');
  await tab.waitForSelector('.row .cell[aria-label]');
  assert.equal((await findings(tab)).length, 1);
}));

test('every demo line opens with its variants, each marked as invented and judged', () => run(LAPTOP, async (tab) => {
  await tab.click('.rail button:has-text("Lines")');
  await tab.waitForSelector('.panel .choices button');
  const count = await tab.locator('.panel .choices button').count();
  assert.equal(count, 6);
  await tab.keyboard.press('Escape');
  for (let i = 0; i < count; i += 1) {
    await tab.click('.rail button:has-text("Lines")');
    const name = await tab.textContent(`.panel .choices button b >> nth=${i}`);
    await tab.click(`.panel .choices button >> nth=${i}`);
    await until(tab, (n) => document.querySelector('.linename')?.textContent === n && document.querySelector('.row .cell[aria-label]'), name);
    await settle(tab);
    if (await tab.isVisible('.panel')) await tab.keyboard.press('Escape');
    assert.ok(await tab.isVisible('text=Invented line'));
    const was = await findings(tab);
    const variants = await tab.locator('.modes button').count();
    assert.ok(variants >= 2, `${name} has a variant`);
    for (let v = 1; v < variants; v += 1) {
      await tab.click(`.modes button >> nth=${v}`);
      // A reading that only checks another moves no finding yet; its chip shows it.
      await tab.waitForSelector('.chip.changed, .row.changed');
      assert.ok((await tab.getAttribute(`.modes button >> nth=${v}`, 'title')).length > 20, 'a variant says what it stands for');
      await tab.click('text=Back to recipe');
      await same(tab, was);
    }
  }
}));

test('in a cell one steps along the row and down the column without going back', () => run(TABLET, async (tab) => {
  await tab.tap('.row .cell[aria-label] >> nth=0');
  await tab.waitForSelector('.one-cell');
  const zones = [];
  for (;;) {
    zones.push(await heading(tab));
    const next = tab.locator('.steps button[aria-label^="Next zone"]');
    if (!(await next.count())) break;
    await next.tap();
    await settle(tab);
  }
  assert.equal(new Set(zones).size, 5);
  await tab.tap('.steps button[aria-label^="Next change"]');
  await settle(tab);
  assert.ok(!zones.includes(await heading(tab)));
  await tab.tap('.back');
  await tab.waitForSelector('.board');
}));

test('a cell shows where its figures come from', () => run(LAPTOP, async (tab) => {
  await tab.click('.row .cell[aria-label] >> nth=0');
  await tab.waitForSelector('.one-cell');
  for (const [what, part] of [['levers with what is held', '.lev tbody tr'], ['doubt by contributor', '.bars li'], ['as read and shifted', '.shifted'], ['the arithmetic', '.calc'], ['what the substances are taken as', '.taken li'], ['cautions', '.gas'], ['the large gauge', 'svg.big']]) assert.ok(await tab.locator(part).count(), what);
  const shares = await tab.$$eval('.bars b', (l) => l.map((e) => parseInt(e.textContent, 10)));
  const total = shares.reduce((a, b) => a + b, 0);
  assert.ok(total >= 97 && total <= 100, `shares add up to ${total}`);
  // The hand check redoes on a calculator: dG = dG0 + R T ln Q to the digits shown.
  const rows = await tab.$$eval('[data-key="byhand"] .calc tr', (l) => l.map((r) => r.lastElementChild.textContent));
  const number = (t) => Number(t.replace(/[\u2009\u202f]/g, '').replace('−', '-').replace(/[^\d.eE+-]/g, ''));
  assert.ok(Math.abs(number(rows[0]) + number(rows[2]) - number(rows[3])) < 0.011, rows.join(' | '));
}));

test('substances are found by formula, name and elements, with curves and uses', () => run(LAPTOP, async (tab) => {
  await tab.click('.rail button:has-text("Substances")');
  await tab.waitForSelector('.find li button');
  const all = await tab.locator('.find li').count();
  const filtered = async (q) => {
    await tab.fill('#find', q);
    await until(tab, (text) => document.querySelector('.count').textContent.includes(text), q);
    await settle(tab);
    return tab.$$eval('.find li b', (l) => l.map((e) => e.textContent));
  };
  assert.ok(all > 60);
  assert.ok((await filtered('Ca C O')).includes('CaCO₃'));
  assert.ok((await filtered('Cr2O3')).includes('Cr₂O₃'));
  const none = await filtered('qqqq');
  assert.equal(none.length, 0);
  assert.match(await tab.textContent('.count'), /Nothing/);
  await filtered('Cr2O3');
  await tab.click('.find li button >> nth=0');
  await tab.waitForSelector('.record h1');
  assert.equal(await tab.locator('.record figure').count(), 3);
  const read = await tab.textContent('.slider span');
  await tab.focus('.slider input');
  await tab.keyboard.press('PageUp');
  await settle(tab);
  assert.notEqual(await tab.textContent('.slider span'), read);
  assert.match(await tab.textContent('.record'), /preferred/);
  await tab.click('.record .cellname:has-text("Chromium oxidises")');
  await tab.waitForSelector('.one-cell');
}));
