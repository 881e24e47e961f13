/** What the data hold: the list, a record's curves, and every set side by side. */
import { curve } from '../chart/curve.js';
import { h } from '../dom.js';
import { THIN, celsius, fixed, formulas, number } from '../format.js';
import { changesOf } from '../line.js';
import { button, frame, sentence } from './frame.js';

/** @typedef {import('../types.js').State} State */
/** @typedef {import('../main.js').Act} Act */

/** @param {State} state @param {Act} act */
export function substances(state, act) {
  const f = frame();
  const rows = state.rows ?? [];
  const open = state.substance;
  const narrow = f.tablet;
  return h('main', { id: 'main', class: `substances${narrow && state.formula ? ' has-record' : ''}` },
    h('section', { class: 'find', 'aria-label': 'Substances' },
      h('label', { for: 'find' }, 'Formula, name or elements'),
      h('input', { id: 'find', type: 'search', autocomplete: 'off', spellcheck: 'false', placeholder: 'Ca C O', value: state.query, oninput: (/** @type {any} */ e) => act.query(e.target.value) }),
      h('p', { class: 'count', role: 'status' }, state.rows ? (rows.length ? `${rows.length} substance${rows.length === 1 ? '' : 's'}${state.query ? ` for “${state.query}”` : ''}` : `Nothing for “${state.query}”. Try a formula, a name, or elements such as Ca C O.`) : 'Looking …'),
      h('ol', null, rows.map((r) => h('li', { 'data-key': r.formula }, h('button', { type: 'button', 'aria-current': state.formula === r.formula ? 'true' : null, onclick: () => act.formula(r.formula) }, h('span', null, h('b', null, formulas(r.formula)), ` ${shortName(r.name)}`), h('i', null, `${r.phases.length ? phases(r) : ''}${r.sets > 1 ? `, ${r.sets} sets` : ''}`))))),
      h('p', { class: 'datanote' }, `Data ${state.dataVersion}. Nothing here leaves this page.`)),
    h('section', { class: 'record', 'aria-label': 'Record', 'data-key': 'record' }, open ? record(state, act, open, f) : h('div', { class: 'norecord' }, h('h1', null, 'What the data hold'), h('p', null, 'Choose a substance to see its heat capacity, enthalpy and Gibbs energy, every source side by side, and where this line uses it.'))));
}

/** @param {string} n */
const shortName = (n) => n.split(/[,;] /)[0];
/** @param {import('../types.js').SubstanceRow} r */
const phases = (r) => (r.phases.length > 2 || r.phases.join(', ').length > 20 ? `${r.phases.length} phases` : r.phases.join(', '));

/** @param {State} state @param {Act} act @param {import('../types.js').Substance} sub @param {ReturnType<typeof frame>} f */
function record(state, act, sub, f) {
  const set = sub.sets[Math.min(state.phase, sub.sets.length - 1)];
  const pieces = set.phases.filter((p) => p.temperature_K.length > 1);
  const low = Math.min(...set.phases.map((p) => p.from_K));
  const high = Math.max(...set.phases.map((p) => p.to_K));
  const at = state.readTemperature !== null && state.readTemperature >= low && state.readTemperature <= high ? state.readTemperature : Math.min(Math.max(1000, low), high);
  const room = f.phone ? f.width : Math.min(f.tablet ? f.width : f.width - 230, 1000);
  const w = f.phone ? room : Math.floor((room - 44) / 3);
  const kinds = /** @type {[string, 'Cp_J_per_K' | 'H_minus_H298_kJ' | 'G_kJ'][]} */ ([['Cp, J/(mol K)', 'Cp_J_per_K'], ['H − H(298), kJ/mol', 'H_minus_H298_kJ'], ['G, kJ/mol', 'G_kJ']]);
  const used = usedBy(state, sub.formula);
  return [
    f.tablet ? button('‹ All substances', () => act.formula(null), 'text') : null,
    h('h1', null, `${formulas(sub.formula)}${sub.name ? `, ${sub.name.split(';')[0]}` : ''}`),
    h('p', { class: 'q' }, `${set.source}: ${number(low, 6)} to ${number(high, 6)}${THIN}K (${celsius(low)} to ${celsius(high)}); beyond it: no data. ${fixed(sub.molar_mass_g, 3)}${THIN}g/mol.`),
    h('div', { class: 'curves' }, kinds.map(([title, key]) => h('figure', { 'data-key': key }, h('figcaption', null, title), curve(document, { title, curves: pieces.map((p) => ({ name: p.phase, x: p.temperature_K, y: p[key], main: !p.metastable })), at, width: w })))),
    h('label', { class: 'slider' }, h('span', null, `Read at ${number(at, 5)}${THIN}K (${celsius(at)})`), h('input', { type: 'range', min: Math.ceil(low), max: Math.floor(high), step: 1, value: String(Math.round(at)), 'aria-label': 'Temperature to read the curves at, K', oninput: (/** @type {any} */ e) => act.readAt(Number(e.target.value)) })),
    h('h2', null, 'Phases ', h('small', null, set.source)),
    h('table', { class: 'src' }, h('thead', null, h('tr', null, ['phase', 'from, K', 'to, K', ''].map((t) => h('th', { scope: 'col' }, t)))), h('tbody', null, set.phases.map((p) => h('tr', null, h('td', null, `${p.phase} (${p.state})`), h('td', null, number(p.from_K, 6)), h('td', null, number(p.to_K, 6)), h('td', { class: 'why' }, p.metastable ? 'only when named' : ''))))),
    h('h2', null, 'Every source, side by side ', h('small', null, 'standard values at 298.15 K, 1 bar; u is one standard uncertainty')),
    h('div', { class: 'tablewrap', tabindex: 0, role: 'region', 'aria-label': 'Every source' }, h('table', { class: 'src' },
      h('thead', null, h('tr', null, ['record', 'H, kJ/mol', 'S, J/(mol K)', 'range, K', 'stands for'].map((t) => h('th', { scope: 'col' }, t)))),
      h('tbody', null, sub.sets.map((r, i) => h('tr', { class: r.preferred ? 'pref' : '' },
        h('td', null, h('button', { type: 'button', class: 'cellname', 'aria-pressed': String(i === state.phase), onclick: () => act.setRecord(i) }, r.source), r.gas ? ' gas' : ''),
        h('td', null, `${fixed(r.H298_kJ, 2)} ± ${number(r.u_H298_kJ, 2)}`), h('td', null, `${fixed(r.S298_J_per_K, 2)} ± ${number(r.u_S298_J_per_K, 2)}`),
        h('td', null, `${number(Math.min(...r.phases.map((p) => p.from_K)), 6)} to ${number(Math.max(...r.phases.map((p) => p.to_K)), 6)}`), h('td', { class: 'why' }, r.preferred ? 'preferred' : 'beside it')))))),
    h('ul', { class: 'takenlist reasons' }, sub.sets.map((r) => h('li', null, h('b', null, `${r.source}${r.gas ? ', gas' : ''}${r.preferred ? ', preferred' : ''}. `), [r.why, r.made, r.doubt ? `Doubt: ${r.doubt}` : ''].filter(Boolean).map((t) => sentence(t)).join(' '), h('span', { class: 'q' }, ` ${r.cite}`)))),
    h('h2', null, 'Used by ', h('small', null, 'this line: change, zones, share of its doubt')),
    used.length ? h('table', { class: 'src' }, h('tbody', null, used.map((u) => h('tr', null, h('td', null, h('button', { type: 'button', class: 'cellname', onclick: () => act.openCell(u.zone, u.change) }, u.name)), h('td', { class: 'why' }, u.zones), h('td', null, u.share))))) : h('p', { class: 'note q' }, changesOf(state.doc.line).length ? 'No change of this line uses it.' : 'This line watches no change yet.'),
  ];
}

/** @param {State} state @param {string} formula */
function usedBy(state, formula) {
  const a = state.shown;
  if (!a) return [];
  return a.changes.flatMap((c, i) => {
    const list = a.findings.filter((x) => x.change_index === i && x.used.some((u) => u.formula === formula));
    if (!list.length) return [];
    const shares = list.flatMap((x) => x.budget.filter((b) => b.source === `data of ${formula}`).map((b) => b.share));
    const [lo, hi] = [Math.min(...shares), Math.max(...shares)];
    const pc = (/** @type {number} */ v) => number(v * 100, v < 0.1 ? 1 : 2);
    const share = shares.length ? (pc(lo) === pc(hi) ? `data ${pc(hi)}${THIN}% of the doubt` : `data ${pc(lo)} to ${pc(hi)}${THIN}% of the doubt`) : '';
    return [{ name: c.name, change: i, zone: list[0].zone_index, zones: list.map((x) => x.zone).join(', '), share }];
  });
}
