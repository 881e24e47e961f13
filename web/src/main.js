/** Wires state, engine and views together. */
import { STANDINGS } from './chart/mark.js';
import { createClient } from './core/client.js';
import { h, morph } from './dom.js';
import * as files from './files.js';
import * as edit from './line.js';
import { createStore, keep, kept, storageOf } from './store.js';
import * as S from './state.js';
import { chipMark, paper, sentence } from './view/frame.js';
import { fieldOf } from './view/pad.js';
import { shell } from './view/shell.js';

/**
 * @typedef {import('./types.js').Line} Line
 * @typedef {import('./types.js').State} State
 * @typedef {import('./types.js').Target} Target
 * @typedef {import('./types.js').Problem} Problem
 * @typedef {import('./types.js').Assessment} Assessment
 */

const part = (/** @type {string} */ id) => document.getElementById(id)?.textContent ?? '';
/** @type {{id: string, line: Line}[]} */
const demos = JSON.parse(part('demos'));
const storage = storageOf();
const old = kept(storage);
const start = old?.doc.line ?? demos[0]?.line ?? edit.empty();
const store = createStore({ ...S.initial(start), storage: storage !== null, ...(old ? { doc: old.doc, saved: old.unsaved ? null : old.doc.line, fileName: old.fileName, savedAt: old.savedAt, demo: old.demo } : { demo: demos[0]?.id ?? null, welcome: true }) });
/** @param {(s: State) => State} change */
const set = (change) => store.set(change);
const get = store.get;

/** The engine's bytes: packed as text in the page, unpacked once. */
async function unpack() {
  const packed = Uint8Array.from(atob(part('engine')), (c) => c.charCodeAt(0));
  return new Response(new Blob([packed]).stream().pipeThrough(new DecompressionStream('gzip'))).arrayBuffer();
}

/** @type {import('./core/client.js').Client} */
let engine;
/** Assessments by line: lines never change, so going back and forth costs nothing. @type {WeakMap<Line, Assessment>} */
const known = new WeakMap();

/** @param {Line} line @returns {Promise<{assessment: Assessment} | {problem: Problem}>} */
async function judge(line) {
  const have = known.get(line);
  if (have) return { assessment: have };
  try {
    const assessment = await engine.ask('assess', [JSON.stringify(line)]);
    known.set(line, assessment);
    return { assessment };
  } catch (error) {
    return { problem: problemOf(error) };
  }
}

/** @param {unknown} error @returns {Problem} */
const problemOf = (error) => /** @type {any} */ (error)?.problem ?? { code: 'page', at: '', place: '', message: String(/** @type {any} */ (error)?.message ?? error), found: '', expected: '', hints: [] };

/** Keeps what is shown in step with the line, newest only. */
async function follow() {
  const line = S.lineOnShow(get());
  const before = S.lineBefore(get());
  if (get().shownLine !== line) {
    const have = known.get(line);
    const answer = have ? { stale: /** @type {const} */ (false), answer: have } : await engine.latest('assess', 'assess', [JSON.stringify(line)]);
    if (!answer.stale && S.lineOnShow(get()) === line) {
      if ('answer' in answer) {
        known.set(line, answer.answer);
        set((s) => ({ ...s, shown: answer.answer, shownLine: line, lineProblem: null }));
      } else set((s) => ({ ...s, shownLine: line, lineProblem: answer.problem }));
    }
  }
  if (before && S.lineBefore(get()) === before) {
    const found = await judge(before);
    const compared = 'assessment' in found ? found.assessment : null;
    if (S.lineBefore(get()) === before && get().compared !== compared) set((s) => ({ ...s, compared }));
  } else if (!before && get().compared) set((s) => ({ ...s, compared: null }));
}

/** @param {string} message @param {string} expected @returns {Problem} */
const pageProblem = (message, expected) => ({ code: 'page', at: '', place: '', message, found: '', expected, hints: [] });

/** Asked before it is kept: an edit that makes no line is refused beside its field. @param {Line} line @param {string} what @param {{field?: string, reading?: boolean, panel?: import('./types.js').Panel | null}} how */
async function commit(line, what, how) {
  if (line === get().doc.line) return true;
  const base = get().doc.line;
  const found = await judge(line);
  if ('problem' in found) {
    const key = how.field;
    if (key) set((s) => S.field(s, key, { ...s.fields[key], problem: found.problem }));
    else set((s) => S.told(s, { id: 'edit', title: 'This was not changed.', text: found.problem.message }));
    return false;
  }
  if (get().doc.line !== base) return false;
  set((s) => {
    let next = S.settled(S.edited(s, line, what, how.reading));
    if (how.field) next = S.field(next, how.field, null);
    if ('panel' in how) next = { ...next, panel: how.panel ?? null, fields: {} };
    return S.heard(next, 'edit');
  });
  return true;
}

/** What was typed, as the engine is asked. @param {Target} target @param {string} text @param {string} chosen unit, empty where none was chosen @param {string} over */
function asked(target, text, chosen, over) {
  const q = edit.quantityAt(get().doc.line, target);
  const was = q && typeof q === 'object' ? q : null;
  const field = fieldOf(target);
  let sent = text.trim();
  // A unit chosen on a key counts as typed; one that is typed wins.
  if (chosen && chosen !== was?.unit && !/[a-zA-Z°%]/.test(sent.split('±')[0].replace(/[eE][-+]?\d/, ''))) {
    const [value, tolerance] = sent.split('±');
    sent = `${value.trim()} ${chosen}${tolerance === undefined ? '' : ` ± ${tolerance.trim()}`}`;
  }
  const zone = target.zones[0];
  const pressure = zone === undefined ? null : get().shown?.zones[zone]?.pressure_bar ?? null;
  return { text: sent, field, unit: was?.unit ?? chosen ?? '', over: over || was?.over || '', tolerance: was?.tolerance ?? null, pressure_bar: pressure };
}

let typing = 0;
/** Done when what is typed last is understood: Enter keeps what stands there, not what stood a key earlier. */
let understanding = Promise.resolve();
async function understand() {
  const e = get().edit;
  if (!e) return;
  const mine = (typing += 1);
  const { target, text } = e;
  /** @type {Problem | null} */
  let problem = null;
  /** @type {import('./types.js').Entry | null} */
  let entry = null;
  try {
    entry = await engine.ask('readEntry', [asked(target, text, e.unit, e.over)]);
  } catch (error) {
    problem = problemOf(error);
  }
  if (mine !== typing || !get().edit || get().edit?.target !== target) return;
  const line = get().doc.line;
  let tentative = null;
  if (entry) {
    const next = edit.putQuantity(line, target, entry.quantity, entry.field);
    const found = JSON.stringify(next) === JSON.stringify(line) ? { assessment: known.get(line) } : await judge(next);
    if (mine !== typing || !get().edit || get().edit?.target !== target) return;
    if ('problem' in found) problem = found.problem;
    else if (JSON.stringify(next) !== JSON.stringify(line)) tentative = next;
  }
  set((s) => (s.edit ? { ...s, edit: { ...s.edit, entry: problem ? null : entry, problem, tentative } } : s));
}

/** @param {Partial<import('./types.js').Edit>} change */
function typed(change) {
  set((s) => (s.edit ? { ...s, edit: { ...s.edit, fresh: false, ...change } } : s));
  understanding = understand();
}

/** @param {string} name @param {Uint8Array} bytes */
async function take(name, bytes) {
  try {
    const opened = await engine.ask('open', [bytes]);
    const line = /** @type {Line} */ (JSON.parse(opened.text));
    set((s) => {
      let next = S.opened(s, line, { fileName: name, what: `Open ${name}` });
      next = { ...S.heard(S.heard(next, 'file'), 'welcome'), welcome: false, saved: line };
      if (opened.notes.length) next = S.told(next, { id: 'notes', title: `${name} is open.`, text: [...opened.notes.slice(0, 6).map((/** @type {any} */ n) => sentence(`${n.at ? `${n.at}: ` : ''}${n.text}`)), ...(opened.notes.length > 6 ? [`${opened.notes.length - 6} more notes on the line.`] : [])].join(' ') });
      else next = S.heard(next, 'notes');
      return next;
    });
  } catch (error) {
    set((s) => S.told(s, { id: 'file', title: 'This file was not opened. Your line is as it was.', text: '', problem: problemOf(error), file: name, keys: [{ label: 'Open another', act: 'open', main: true }, { label: 'Leave it', act: 'hear' }] }));
  }
}
/** @param {string} name */
const unreadable = (name) => set((s) => S.told(s, { id: 'file', title: 'This file was not opened. Your line is as it was.', text: `The browser could not read ${name}.` }));

/** Focus goes where the work is; back where it came from when it is done. @type {Element | null} */
let cameFrom = null;
/** @param {string} selector */
const focusSoon = (selector) => requestAnimationFrame(() => requestAnimationFrame(() => /** @type {HTMLElement | null} */ (document.querySelector(selector))?.focus({ preventScroll: false })));

/** @param {string} kind @param {number} index */
function openPanel(kind, index) {
  if (!get().panel) cameFrom = document.activeElement;
  set((s) => ({ ...s, panel: { kind, index }, edit: null, fields: {}, proposals: kind === 'addchange' ? null : s.proposals }));
  focusSoon(`#panel-${kind}`);
  if (kind === 'addchange') void propose();
}
async function propose() {
  const answer = await engine.latest('propose', 'propose', [JSON.stringify(get().doc.line)]);
  if (!answer.stale) set((s) => ({ ...s, proposals: 'answer' in answer ? answer.answer : [] }));
}

/** What the keypad would cover is brought into sight: the zone being changed and its first gauges. */
function inSight() {
  const below = document.querySelector('.pad.below')?.getBoundingClientRect();
  const open = document.querySelector('.chip.open')?.getBoundingClientRect();
  if (!open) return;
  if (below && open.bottom > below.top - 8) window.scrollBy(0, open.bottom - below.top + 120);
  const beside = document.querySelector('.pad.beside')?.getBoundingClientRect();
  if (beside && beside.bottom > window.innerHeight) window.scrollBy(0, Math.min(beside.bottom - window.innerHeight + 8, Math.max(0, open.top - 8)));
}

/** A place to go back to, so that the browser's own Back leaves a cell. @param {State} s @param {string} view @returns {State} */
const viewed = (s, view) => ({ ...s, view, panel: null, menu: null });

export const act = {
  /** @param {string} view */
  go(view) {
    set((s) => viewed({ ...s, edit: null }, view));
    if (view === 'substances' && !get().rows) act.query(get().query);
    window.scrollTo(0, 0);
  },
  /** @param {number} zone @param {number} change */
  openCell(zone, change) {
    set((s) => viewed({ ...s, edit: null, cell: { zone, change }, change }, 'cell'));
    window.scrollTo(0, 0);
    focusSoon('.cell-view .back');
  },
  /** @param {number} change */
  select: (change) => set((s) => ({ ...s, change })),
  /** @param {string} lever */
  lever: (lever) => set((s) => ({ ...s, lever })),
  /** @param {number} k */
  coverage: (k) => void commit({ ...get().doc.line, coverage_factor: k }, `Doubt k = ${k}`, {}),
  panel: openPanel,
  close() {
    set((s) => ({ ...s, panel: null, fields: {} }));
    if (cameFrom instanceof HTMLElement && cameFrom.isConnected) cameFrom.focus();
  },

  /** @param {Target} target */
  startEdit(target) {
    cameFrom = document.activeElement;
    const q = edit.quantityAt(get().doc.line, target);
    const text = q ? String(Number(Number(q.value).toPrecision(12))).replace('-', '−') : '';
    set((s) => ({ ...s, panel: null, welcome: false, edit: { target, text, fresh: true, unit: q?.unit ?? '', over: q?.over ?? '', tolerance: q?.tolerance ?? null, old: q ?? null, oldText: text, entry: null, problem: null, tentative: null, onTolerance: false } }));
    requestAnimationFrame(() => requestAnimationFrame(() => {
      const input = /** @type {HTMLInputElement | null} */ (document.querySelector('#pad-input'));
      input?.focus({ preventScroll: true });
      input?.select();
    }));
    understanding = understand();
    void understanding.then(() => requestAnimationFrame(() => requestAnimationFrame(inSight)));
  },
  /** @param {string} text */
  type: (text) => typed({ text }),
  /** @param {string} c */
  press(c) {
    const e = get().edit;
    if (!e) return;
    const input = /** @type {HTMLInputElement | null} */ (document.querySelector('#pad-input'));
    let { text } = e;
    if (c === '⌫') text = e.fresh ? '' : [...text].slice(0, -1).join('');
    else if (c === '−' && !e.fresh && !text.includes('±')) text = /^[-−]/.test(text) ? text.slice(1) : `−${text}`;
    else if (c === '±') text = text.includes('±') ? `${text.split('±')[0].trim()} ± ` : `${text.trim()} ± `;
    else text = e.fresh ? c : text + c;
    // Shown at once, not with the next frame: fingers are quick.
    if (input) input.value = text;
    typed({ text });
    input?.focus({ preventScroll: true });
  },
  /** @param {string} unit */
  unit(unit) {
    const e = get().edit;
    if (!e) return;
    // A unit that was typed gives way to the key.
    const text = e.text.replace(/\s*(°?[CFK]|ppmv?|ppb|%|m?bar|kPa|Pa|psi|atm|m?V|K\/(s|min|h)|s|min|h)(?=\s*(±|$))/i, '');
    typed({ unit, text });
  },
  /** @param {string} over */
  over: (over) => typed({ over, text: (get().edit?.text ?? '').replace(/\s*(dp|fp|dew|frost|ice|water)\b/gi, '') }),
  bound() {
    const e = get().edit;
    if (e) typed({ text: e.text.trim().startsWith('<') ? e.text.replace('<', '').trim() : `< ${e.text.split('±')[0].trim()}` });
  },
  async keep() {
    await understanding;
    const e = get().edit;
    if (!e?.tentative) {
      if (e && !e.problem) act.takeBack();
      return;
    }
    const { tentative, target } = e;
    const place = target.zones.length === 1 ? ` in ${get().doc.line.zones?.[target.zones[0]].name}` : '';
    set((s) => S.edited(s, tentative, `${target.label}${place}`, true));
    act.backToChip();
  },
  takeBack() {
    typing += 1;
    set((s) => ({ ...s, edit: null }));
    act.backToChip();
  },
  backToChip() {
    if (cameFrom instanceof HTMLElement && cameFrom.isConnected) cameFrom.focus({ preventScroll: true });
  },

  /** A remedy tried: an edit like any other. @param {Target} target @param {string} text @param {string} what */
  async tryValue(target, text, what) {
    const { line } = get().doc;
    try {
      const entry = await engine.ask('readEntry', [asked(target, text, '', '')]);
      await commit(edit.putQuantity(line, target, entry.quantity, entry.field), what, { reading: true });
    } catch (error) {
      set((s) => S.told(s, { id: 'edit', title: 'This was not changed.', text: problemOf(error).message }));
    }
  },

  /** @param {string} key @param {import('./types.js').Field} f */
  field: (key, f) => set((s) => S.field(s, key, f)),
  /** @param {Line} line @param {string} what @param {{field?: string, reading?: boolean, panel?: import('./types.js').Panel | null}} [how] */
  edit: (line, what, how = {}) => void commit(line, what, how),
  /** @param {string} key @param {string} text @param {string} was @param {(text: string) => Line | null} make @param {string} label @param {((text: string) => string | null) | undefined} check */
  async text(key, text, was, make, label, check) {
    if (text === was) return set((s) => S.field(s, key, null));
    const wants = check?.(text);
    if (wants) return set((s) => S.field(s, key, { text, problem: pageProblem(`Found ${text.trim() ? `“${text.trim()}”` : 'nothing'}, expected ${wants}`, wants) }));
    const line = make(text);
    if (line) await commit(line, label, { field: key });
  },
  /** @param {string} key @param {Target} target @param {string} text @param {string} [unit] */
  async quantity(key, target, text, unit) {
    const { line } = get().doc;
    if (!text.trim()) {
      if (edit.quantityAt(line, target) === undefined) return set((s) => S.field(s, key, null));
      return void (await commit(edit.putQuantity(line, target, undefined), `${target.label} taken away`, { field: key, reading: true }));
    }
    try {
      const entry = await engine.ask('readEntry', [asked(target, text, edit.quantityAt(line, target) ? '' : unit ?? '', '')]);
      const done = await commit(edit.putQuantity(line, target, entry.quantity, entry.field), target.label, { field: key, reading: target.kind !== 'change' && target.kind !== 'member' });
      if (done) set((s) => S.field(s, key, { readBack: `${entry.read_back}${entry.consequence ? `: ${entry.consequence}` : ''}` }));
    } catch (error) {
      set((s) => S.field(s, key, { text, problem: problemOf(error) }));
    }
  },
  /** A number without a unit. @param {string} key @param {string} field @param {string} text @param {(v: number | undefined) => Line} make @param {string} label */
  async plain(key, field, text, make, label) {
    if (!text.trim()) return void (await commit(make(undefined), label, { field: key }));
    try {
      const entry = await engine.ask('readEntry', [{ text, field }]);
      await commit(make(entry.quantity), label, { field: key });
    } catch (error) {
      set((s) => S.field(s, key, { text, problem: problemOf(error) }));
    }
  },
  /** @param {string} key @param {number} i @param {string} formula @param {string} text */
  async addChannel(key, i, formula, text) {
    const { line } = get().doc;
    const name = formula.trim();
    const zone = edit.zonesOf(line)[i];
    if (!name) return set((s) => S.field(s, key, { problem: pageProblem('Found no gas, expected a formula such as CO2', '') }));
    if (zone.gas?.analysis?.[name]) return set((s) => S.field(s, key, { problem: pageProblem(`${name} is read already: change it above`, '') }));
    try {
      const entry = await engine.ask('readEntry', [{ text, field: 'gas', unit: '%' }]);
      const quantity = name === 'H2O' ? { basis: 'wet', ...entry.quantity } : entry.quantity;
      if (await commit(edit.setZone(line, i, edit.withChannel(zone, name, quantity)), `${name} added`, { field: key, reading: true })) set((s) => S.field(S.field(s, `${key}-a`, null), `${key}-b`, null));
    } catch (error) {
      set((s) => S.field(s, key, { problem: problemOf(error) }));
    }
  },
  /** @param {string} key @param {string} substance @param {string} text */
  async addMember(key, substance, text) {
    const { line } = get().doc;
    if (!substance.trim()) return set((s) => S.field(s, key, { problem: pageProblem('Found no substance, expected a formula such as Cr', '') }));
    try {
      const entry = text.trim() ? await engine.ask('readEntry', [{ text, field: 'share_wt', unit: '%' }]) : null;
      if (await commit(edit.addMember(line, { substance: substance.trim(), ...(entry ? { share_wt: entry.quantity } : {}) }), `${substance.trim()} added`, { field: key })) set((s) => S.field(S.field(s, `${key}-a`, null), `${key}-b`, null));
    } catch (error) {
      set((s) => S.field(s, key, { problem: problemOf(error) }));
    }
  },
  async addZone() {
    const { line } = get().doc;
    const text = (/** @type {string} */ k) => (get().fields[`new-${k}`]?.text ?? '').trim();
    /** @param {string} k @param {Problem} problem */
    const refuse = (k, problem) => set((s) => S.field(s, `new-${k}`, { ...s.fields[`new-${k}`], problem }));
    const names = edit.zonesOf(line).map((z) => z.name);
    const name = text('name') || edit.freeName(names.length ? `Zone ${names.length + 1}` : 'Soak', names);
    if (names.includes(name)) return refuse('name', pageProblem(`Found “${name}”, expected a name that no other zone has`, ''));
    /** @type {Record<string, any>} */
    const got = {};
    for (const [k, field, unit] of [['temperature', 'temperature', 'C'], ['h2', 'gas', '%'], ['dew', 'dew_point', 'C']]) {
      if (k !== 'temperature' && !text(k)) continue;
      try {
        got[k] = await engine.ask('readEntry', [{ text: text(k), field, unit }]);
        set((s) => S.field(s, `new-${k}`, { text: text(k), readBack: got[k].read_back }));
      } catch (error) {
        return refuse(k, text(k) ? problemOf(error) : pageProblem('Found nothing, expected the zone’s temperature', ''));
      }
    }
    const balance = get().fields['new-balance']?.text ?? 'N2';
    /** @type {Record<string, any>} */
    const analysis = {};
    if (got.h2 && balance !== 'H2') analysis.H2 = got.h2.quantity;
    if (got.dew && got.dew.field !== 'dew_point') analysis[got.dew.field] = got.dew.quantity;
    const zone = { name, temperature: got.temperature.quantity, gas: { basis: 'dry', analysis, balance, ...(got.dew && got.dew.field === 'dew_point' ? { dew_point: got.dew.quantity } : {}) } };
    await commit(edit.addZone(line, names.length, zone), `${name} added`, { field: 'new-zone', panel: null });
  },
  /** @param {string} text */
  async tryEquation(text) {
    set((s) => S.field(s, 'nc-eq', { text }));
    if (!text.includes('=') && !/->|→/.test(text)) return;
    const answer = await engine.latest('equation', 'change', [{ equation: text, at: [], activities: [] }]);
    if (answer.stale || (get().fields['nc-eq']?.text ?? '') !== text) return;
    set((s) => S.field(s, 'nc-eq', 'answer' in answer ? { text, readBack: `${answer.answer[0].equation}; at standard state it goes ${answer.answer[0].goes}` } : { text, problem: answer.problem }));
  },
  async addChange() {
    const { line } = get().doc;
    const text = (/** @type {string} */ k, d = '') => (get().fields[`nc-${k}`]?.text ?? d).trim();
    const equation = text('eq');
    /** @param {Problem} problem */
    const refuse = (problem) => set((s) => S.field(s, 'nc-eq', { text: text('eq'), problem }));
    if (!equation) return refuse(pageProblem('Found no equation, expected one such as Cr + H2O = Cr2O3 + H2', ''));
    try {
      await engine.ask('change', [{ equation, at: [], activities: [] }]);
    } catch (error) {
      return refuse(problemOf(error));
    }
    await commit(edit.addChange(line, { name: text('name') || equation, equation, wish: text('wish', 'avoid') }), 'Change added', { field: 'nc-eq', panel: null });
  },
  /** @param {import('./types.js').Proposal} p */
  addProposal: (p) => void commit(edit.addChange(get().doc.line, { name: p.name, equation: p.equation, wish: p.wish }), `${p.name} added`, {}),

  undo: () => set(S.undo),
  redo: () => set(S.redo),
  newLine() {
    set((s) => ({ ...S.opened(s, edit.empty(), { what: 'Empty line' }), welcome: false }));
    focusSoon('.empty .btn');
  },
  /** @param {string} id */
  demo(id) {
    const found = demos.find((d) => d.id === id);
    if (found) set((s) => ({ ...S.opened(s, found.line, { demo: id, what: found.line.name }), welcome: false }));
    window.scrollTo(0, 0);
  },
  demos: () => demos.map((d) => ({ id: d.id, name: d.line.name, about: d.line.about ?? '', variants: (d.line.variants ?? []).map((v) => v.name) })),
  /** @param {string} name */
  async variant(name) {
    const { doc } = get();
    const base = doc.variant ? doc.recipe ?? doc.line : doc.line;
    try {
      const text = await engine.ask('variant', [JSON.stringify(base), name]);
      set((s) => ({ ...S.settled(S.varied(s, name, JSON.parse(text))), welcome: false }));
    } catch (error) {
      set((s) => S.told(s, { id: 'edit', title: 'This variant does not fit the line as it is now.', text: problemOf(error).message }));
    }
  },
  recipe: () => set((s) => S.settled(S.recipe(s))),

  open: () => void files.pick(take, unreadable),
  async save() {
    const { line } = get().doc;
    const name = await files.save(line);
    if (name) set((s) => ({ ...S.heard(s, 'storage'), saved: line, fileName: name, savedAt: new Date().toLocaleTimeString([], { hour: '2-digit', minute: '2-digit', hour12: false }) }));
  },
  print() {
    set((s) => ({ ...s, panel: null, view: 'board' }));
    requestAnimationFrame(() => requestAnimationFrame(() => window.print()));
  },
  /** @param {string} id @param {string} [does] */
  notice(id, does = 'hear') {
    set((s) => S.heard(s, id));
    if (does === 'open') act.open();
    if (does === 'save') void act.save();
  },
  /** @param {string} id */
  hear: (id) => set((s) => (id === 'welcome' ? { ...s, welcome: false } : S.heard(s, id))),

  /** @param {string} query */
  async query(query) {
    set((s) => ({ ...s, query }));
    const answer = await engine.latest('substances', 'substances', [query]);
    if (!answer.stale && 'answer' in answer) set((s) => ({ ...s, rows: answer.answer }));
  },
  /** @param {string | null} formula */
  async formula(formula) {
    set((s) => ({ ...s, formula, phase: 0, readTemperature: null, substance: formula ? s.substance : null }));
    if (!formula) return;
    const answer = await engine.latest('substance', 'substance', [formula]);
    if (!answer.stale && 'answer' in answer) set((s) => ({ ...s, substance: answer.answer }));
    if (document.documentElement.clientWidth < 900) window.scrollTo(0, 0);
  },
  /** @param {number} i */
  setRecord: (i) => set((s) => ({ ...s, phase: i })),
  /** @param {number} t */
  readAt: (t) => set((s) => ({ ...s, readTemperature: t })),
  licences: () => /** @type {string} */ (JSON.parse(part('licences') || '""')),
  legend: () => Object.entries(STANDINGS).map(([name, st]) => h('li', { class: `s-${st.tone}` }, chipMark(name), h('b', null, st.word), h('span', null, st.meaning))),
};
/** @typedef {typeof act} Act */

let waiting = false;
function draw() {
  if (waiting) return;
  waiting = true;
  requestAnimationFrame(() => {
    waiting = false;
    const state = get();
    document.title = `${S.unsaved(state) ? '• ' : ''}${state.doc.line.name}: Leeway`;
    const page = document.getElementById('page');
    if (page) morph(page, shell(state, act));
  });
}

store.listen((state, was) => {
  draw();
  if (state.doc !== was.doc || state.edit !== was.edit) void follow();
  if (state.doc !== was.doc || state.saved !== was.saved || state.fileName !== was.fileName) {
    const ok = keep(state, storage);
    if (!ok && state.storage !== false) set((s) => ({ ...s, storage: false }));
    if (!ok && state.past.length && !told) {
      told = true;
      set((s) => S.told(s, { id: 'storage', title: 'This browser keeps nothing between visits.', text: 'The line lives in this page only. Save it to a file before you close.', keys: [{ label: 'Save to file', act: 'save', main: true }, { label: 'I know', act: 'hear' }] }));
    }
  }
  if (state.panel?.kind === 'addchange' && state.doc !== was.doc) void propose();
});
let told = false;

/** Paper has its own measure: drawn at once, before the browser takes its picture. @param {boolean} now */
function forPaper(now) {
  paper(now);
  const page = document.getElementById('page');
  if (page) morph(page, shell(get(), act));
}
window.addEventListener('beforeprint', () => forPaper(true));
window.addEventListener('afterprint', () => forPaper(false));
window.matchMedia('print').addEventListener('change', (e) => forPaper(e.matches));
window.addEventListener('resize', draw);
new ResizeObserver(draw).observe(document.body);
window.addEventListener('beforeunload', (event) => {
  if (S.unsaved(get())) event.preventDefault();
});
window.addEventListener('dragover', (event) => event.preventDefault());
window.addEventListener('drop', (event) => {
  event.preventDefault();
  const file = event.dataTransfer?.files[0];
  if (file) void files.read(file, take, unreadable);
});
window.addEventListener('keydown', (event) => {
  const ctrl = event.ctrlKey || event.metaKey;
  const key = event.key.toLowerCase();
  // In a field the browser's own undo of typing comes first, except on the keypad where Undo takes back.
  const inText = event.target instanceof HTMLInputElement && event.target.type !== 'checkbox' && event.target.type !== 'range' && event.target.id !== 'pad-input';
  if (ctrl && key === 'z' && !inText) {
    event.preventDefault();
    if (event.shiftKey) act.redo();
    else act.undo();
  } else if (ctrl && key === 'y' && !inText) {
    event.preventDefault();
    act.redo();
  } else if (ctrl && key === 's') {
    event.preventDefault();
    void act.save();
  } else if (ctrl && key === 'o') {
    event.preventDefault();
    act.open();
  } else if (event.key === 'Escape') {
    const s = get();
    if (s.edit) act.takeBack();
    else if (s.panel) act.close();
    else if (s.view === 'cell') act.go('board');
  }
});

async function begin() {
  draw();
  const bytes = await unpack();
  const url = URL.createObjectURL(new Blob([part('worker')], { type: 'text/javascript' }));
  engine = createClient(() => new Worker(url), bytes, () =>
    set((s) => S.told(s, { id: 'engine', title: 'The engine stopped and was started again.', text: 'Nothing you typed is lost.' })));
  const hook = /** @type {any} */ (window).__leewayTest;
  if (hook) hook.crash = () => engine.ask('crash', []).catch(() => {});
  const version = await engine.ask('dataVersion', []);
  set((s) => ({ ...s, dataVersion: version }));
  await follow();
}
begin().catch((error) => {
  const page = document.getElementById('page');
  if (page) page.textContent = `Leeway cannot start in this browser: ${error?.message ?? error}. A browser of 2023 or later opens it.`;
});
