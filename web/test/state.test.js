import assert from 'node:assert/strict';
import { readFileSync, readdirSync } from 'node:fs';
import { test } from 'node:test';
import * as L from '../src/line.js';
import * as S from '../src/state.js';
import { keep, kept } from '../src/store.js';

const folder = new URL('../../tests/lines/', import.meta.url);
const demos = readdirSync(folder).filter((n) => n.endsWith('.json')).map((n) => JSON.parse(readFileSync(new URL(n, folder), 'utf8')));
const heron = demos.find((d) => d.name.includes('Heron'));
/** Nothing may be written into: an edit gives a new line and shares what it leaves alone. */
const frozen = (x) => {
  if (x && typeof x === 'object' && !Object.isFrozen(x)) {
    Object.freeze(x);
    Object.values(x).forEach(frozen);
  }
  return x;
};
const start = (line = heron) => S.initial(frozen(structuredClone(line)));
const dew = (zone) => ({ kind: 'gas', field: 'dew_point', label: 'Frost point', zones: [zone] });
const put = (s, zone, value) => S.edited(s, L.putQuantity(s.doc.line, dew(zone), { value, unit: 'C', tolerance: 2, over: 'ice' }, 'dew_point'), 'Frost point', true);

test('undo and redo go as far as there were edits, and give the very same lines', () => {
  let s = start();
  const lines = [s.doc.line];
  for (let i = 0; i < 500; i += 1) {
    s = put(s, i % 4, -30 - i / 10);
    lines.push(s.doc.line);
  }
  for (let i = 499; i >= 0; i -= 1) {
    s = S.undo(s);
    assert.equal(s.doc.line, lines[i]);
  }
  assert.equal(S.undo(s), s, 'nothing is left to undo');
  for (let i = 1; i <= 500; i += 1) {
    s = S.redo(s);
    assert.equal(s.doc.line, lines[i]);
  }
  assert.equal(S.redo(s), s, 'nothing is left to redo');
});

test('an edit after an undo drops what was undone', () => {
  let s = put(put(start(), 0, -40), 0, -41);
  s = put(S.undo(s), 0, -42);
  assert.equal(s.future.length, 0);
  assert.equal(S.undo(s).doc.line.zones[0].gas.dew_point.value, -40);
});

test('undo while something is typed takes back the typing only', () => {
  const s = { ...put(start(), 0, -40), edit: { tentative: null } };
  const back = S.undo(s);
  assert.equal(back.edit, null);
  assert.equal(back.doc, s.doc);
});

test('an edit that changes nothing leaves no step behind', () => {
  const s = start();
  assert.equal(S.edited(s, s.doc.line, 'nothing', true).past.length, 0);
});

test('a change of reading leaves a mark of the value before; a change of structure takes it away', () => {
  let s = put(start(), 1, -38);
  assert.equal(S.lineBefore(s).zones[1].gas.dew_point.value, heron.zones[1].gas.dew_point.value);
  s = S.edited(s, L.copyZone(s.doc.line, 0), 'copy');
  assert.equal(S.lineBefore(s), null);
});

test('a variant is measured against the recipe, and the recipe comes back as it was', () => {
  const s = start();
  const line = s.doc.line;
  const worse = L.putQuantity(line, dew(0), { value: -20, unit: 'C' }, 'dew_point');
  let v = S.varied(s, 'Leak', worse);
  assert.equal(S.lineBefore(v), line);
  assert.equal(S.unsaved(v), false, 'a variant of the file is no work that could be lost');
  v = put(v, 1, -10);
  assert.equal(S.unsaved(v), true);
  assert.equal(S.lineBefore(v), line);
  const back = S.recipe(v);
  assert.equal(back.doc.line, line);
  assert.equal(back.doc.variant, null);
  assert.equal(S.undo(back).doc.variant, 'Leak');
});

test('work is unsaved from the first edit until it is saved or undone', () => {
  const s = start();
  assert.equal(S.unsaved(s), false);
  const e = put(s, 0, -40);
  assert.equal(S.unsaved(e), true);
  assert.equal(S.unsaved(S.undo(e)), false);
  assert.equal(S.unsaved({ ...e, saved: e.doc.line }), false);
});

test('opening another line is undone like an edit', () => {
  const s = S.opened(put(start(), 0, -40), L.empty(), { what: 'Empty line' });
  assert.equal(s.doc.line.zones.length, 0);
  assert.equal(S.undo(s).doc.line.name, heron.name);
});

test('a cell or a form whose zone or change is gone is let go', () => {
  const s = { ...start(), view: 'cell', cell: { zone: 4, change: 0 }, panel: { kind: 'zone', index: 4 } };
  const t = S.settled(S.edited(s, L.removeZone(s.doc.line, 4), 'delete'));
  assert.equal(t.cell, null);
  assert.equal(t.view, 'board');
  assert.equal(t.panel, null);
});

test('fields that the page does not know stay through every kind of edit', () => {
  const line = frozen({
    ...structuredClone(heron), site: { works: 'Tarnholt' },
    zones: heron.zones.map((z) => ({ ...structuredClone(z), thermocouple: 'TE-1', gas: { ...structuredClone(z.gas), probe: 'P', dew_point: { ...z.gas.dew_point, probe_id: 'D7' } } })),
    changes: heron.changes.map((c) => ({ ...structuredClone(c), owner: 'A. N.' })),
    charge: heron.charge.map((m) => ({ ...structuredClone(m), heat: 'H1' })),
  });
  let l = L.putQuantity(line, dew(1), { value: -38, unit: 'C' }, 'dew_point');
  assert.equal(l.zones[1].gas.dew_point.probe_id, 'D7');
  l = L.renameZone(L.moveZone(L.copyZone(l, 1), 2, 0), 0, 'Front');
  l = L.setChange(L.copyChange(l, 0), 0, 'wish', 'want');
  l = L.setMember(l, 0, 'activity', 0.3);
  assert.deepEqual(l.site, { works: 'Tarnholt' });
  assert.ok(l.zones.every((z) => z.thermocouple === 'TE-1' && z.gas.probe === 'P'));
  assert.ok(l.changes.every((c) => c.owner === 'A. N.'));
  assert.ok(l.charge.every((m) => m.heat === 'H1'));
});

test('renaming, copying and deleting a zone carry through to the changes that watch it', () => {
  const line = frozen({ ...structuredClone(heron), changes: [{ name: 'a', equation: 'x', wish: 'avoid', zones: ['Soak'] }, { name: 'b', equation: 'y', wish: 'avoid' }] });
  const soak = line.zones.findIndex((z) => z.name === 'Soak');
  assert.deepEqual(L.renameZone(line, soak, 'Hold').changes[0].zones, ['Hold']);
  assert.deepEqual(L.copyZone(line, soak).changes[0].zones, ['Soak', 'Soak 2']);
  assert.deepEqual(L.removeZone(line, soak).changes.map((c) => c.name), ['b']);
});

test('zones, changes and members move, copy and go without touching the others', () => {
  for (const demo of demos) {
    const line = frozen(structuredClone(demo));
    const n = line.zones.length;
    assert.deepEqual(L.moveZone(L.moveZone(line, 0, n - 1), n - 1, 0), line);
    assert.equal(L.moveZone(line, 0, -1).zones, line.zones, 'past the end nothing moves');
    assert.deepEqual(L.removeZone(L.copyZone(line, 0), 1).zones, line.zones);
    assert.deepEqual(L.removeChange(L.copyChange(line, 0), 1), line);
    assert.deepEqual(L.removeMember(L.copyMember(line, 0), 1), line);
    const names = L.copyZone(L.copyZone(line, 0), 0).zones.map((z) => z.name);
    assert.equal(new Set(names).size, names.length, 'names stay unique');
  }
});

test('an entry keeps the instrument or the kind of tolerance unless another is typed', () => {
  assert.deepEqual(L.merged({ value: 900, unit: 'C', instrument: 'type K class 1' }, { value: 910, unit: 'C' }), { value: 910, unit: 'C', instrument: 'type K class 1' });
  assert.deepEqual(L.merged({ value: 900, unit: 'C', instrument: 'type K class 1' }, { value: 910, unit: 'C', tolerance: 3 }), { value: 910, unit: 'C', tolerance: 3 });
  assert.deepEqual(L.merged({ value: 1, unit: '%', tolerance: 0.1, tolerance_kind: 'standard' }, { value: 2, unit: '%', tolerance: 0.2 }), { value: 2, unit: '%', tolerance: 0.2, tolerance_kind: 'standard' });
});

test('water typed for a dew point becomes a channel of its own and the dew point goes', () => {
  const line = L.putQuantity(frozen(structuredClone(heron)), dew(2), { value: 35, unit: 'ppm', basis: 'wet' }, 'H2O');
  assert.equal(line.zones[2].gas.dew_point, undefined);
  assert.equal(line.zones[2].gas.analysis.H2O.value, 35);
  assert.ok(line.zones[1].gas.dew_point);
});

test('the work is kept in storage as it was, and a storage that refuses is no failure', () => {
  const box = new Map();
  const storage = { setItem: (k, v) => box.set(k, v), getItem: (k) => box.get(k) ?? null };
  const s = put(start(), 0, -40);
  assert.equal(keep(s, storage), true);
  assert.deepEqual(kept(storage).doc.line, s.doc.line);
  assert.equal(kept(storage).unsaved, true);
  assert.equal(keep(s, { setItem() { throw new Error('full'); } }), false);
  assert.equal(keep(s, null), false);
  assert.equal(kept({ getItem: () => '{broken' }), null);
  assert.equal(kept(null), null);
});
