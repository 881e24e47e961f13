/** The drawer: lines to choose from, and the forms for zones, gases, charge and changes. */
import { h } from '../dom.js';
import { equation, fixed, formulas, number, reading, typed } from '../format.js';
import { changesOf, chargeOf, copyChange, copyMember, copyZone, moveChange, moveMember, moveZone, putQuantity, quantityAt, removeChange, removeMember, removeZone, renameZone, setChange, setMember, setZone, withGas, withKey, zonesOf } from '../line.js';
import { fileWords } from './shell.js';
import { button, say, sentence, trouble } from './frame.js';

/**
 * @typedef {import('../types.js').State} State
 * @typedef {import('../types.js').Target} Target
 * @typedef {import('../types.js').Line} Line
 * @typedef {import('../main.js').Act} Act
 */

/** @param {State} state @param {Act} act */
export function panel(state, act) {
  const at = /** @type {import('../types.js').Panel} */ (state.panel);
  const views = { lines, more, about, line: lineForm, zone: zoneForm, addzone: addZoneForm, charge: chargeForm, change: changeForm, addchange: addChangeForm };
  const make = /** @type {Record<string, (state: State, act: Act, index: number) => [string, any]>} */ (views)[at.kind] ?? lines;
  const [title, body] = make(state, act, at.index);
  return h('div', { class: 'panel-wrap', 'data-key': 'panel' },
    h('div', { class: 'panel', role: 'dialog', 'aria-label': title, 'data-key': `p-${at.kind}-${at.index}`, tabindex: -1, id: `panel-${at.kind}`, onkeydown: (/** @type {KeyboardEvent} */ e) => { if (e.key === 'Escape') { e.stopPropagation(); act.close(); } } },
      h('div', { class: 'panel-head' }, h('h2', null, title), button('Close', act.close, 'btn', { 'aria-label': `Close: ${title}` })),
      h('div', { class: 'panel-body' }, body)));
}

/** @param {State} state @param {Act} act @returns {[string, any]} */
function lines(state, act) {
  return ['Lines', [
    h('p', { class: 'q' }, 'Another line takes the place of this one; Undo brings this one back.'),
    h('div', { class: 'keys' }, button('Begin an empty line', act.newLine, 'btn main'), button('Open a file', act.open, 'btn')),
    h('h3', null, 'Invented lines ', h('small', null, 'plants, readings and faults are made up')),
    h('ol', { class: 'choices' }, act.demos().map((d) => h('li', null, h('button', { type: 'button', 'aria-current': state.demo === d.id ? 'true' : null, onclick: () => act.demo(d.id) }, h('b', null, d.name), h('span', null, d.about), h('span', { class: 'q' }, d.variants.length ? `As recipe, ${d.variants.join(', ')}` : ''))))),
  ]];
}

/** @param {State} state @param {Act} act @returns {[string, any]} */
function more(state, act) {
  return ['More', [
    h('p', null, h('b', null, state.doc.line.name), ` ${fileWords(state)}`),
    h('div', { class: 'stack' }, button('Lines', () => act.panel('lines', 0), 'btn'), button('Open a file', act.open, 'btn'), button('Save to a file', act.save, 'btn'), button('Undo', act.undo, 'btn', { disabled: !state.past.length && !state.edit }), button('Redo', act.redo, 'btn', { disabled: !state.future.length }), button('Print the board', act.print, 'btn'), button('About and licences', () => act.panel('about', 0), 'btn')),
  ]];
}

/** @param {State} state @param {Act} act @returns {[string, any]} */
function about(state, act) {
  const licences = act.licences();
  return ['About', [
    h('p', null, 'Leeway tells whether each wanted or unwanted reaction goes in each zone at the readings shown, how far that is from turning, which lever brings it back, and how sure that is.'),
    h('p', null, 'It tells what can happen, not how fast. It judges no gas, no furnace and no person safe: local code and licensed practice come first.'),
    h('p', null, `Data ${state.dataVersion}. All computing is done in this page; nothing is sent anywhere.`),
    h('div', { class: 'keys' }, button('Print the board', act.print, 'btn')),
    h('h3', null, 'The five standings'),
    h('ul', { class: 'legend' }, act.legend()),
    h('h3', null, 'Keys'),
    h('dl', { class: 'keyslist' }, [['Ctrl Z', 'undo'], ['Ctrl Shift Z, Ctrl Y', 'redo'], ['Ctrl S', 'save to a file'], ['Ctrl O', 'open a file'], ['Enter', 'keep what is typed'], ['Esc', 'take back, close, back to the board']].flatMap(([k, t]) => [h('dt', null, k), h('dd', null, t)])),
    licences ? h('details', null, h('summary', null, 'Licences of what is inside'), h('pre', { tabindex: 0 }, licences)) : null,
  ]];
}

let serial = 0;
/** @param {string} label @param {any} input @param {import('../types.js').Field | undefined} field @param {string} [hint] */
function labelled(label, input, field, hint) {
  const id = input.id || `f${(serial += 1)}`;
  input.id = id;
  return h('div', { class: 'f', 'data-key': `f-${id}` }, h('label', { for: id }, label), h('div', null, input, field?.problem ? trouble(field.problem) : field?.readBack ? h('p', { class: 'q ok' }, say(field.readBack)) : hint ? h('p', { class: 'q' }, hint) : null));
}

/** A text of the line. @param {State} state @param {Act} act @param {string} key @param {string} label @param {string} now @param {(text: string) => Line | null} edit @param {{hint?: string, area?: boolean, check?: (text: string) => string | null}} [more] */
function textField(state, act, key, label, now, edit, more = {}) {
  const field = state.fields[key];
  const input = h(more.area ? 'textarea' : 'input', {
    id: `t-${key}`, type: more.area ? null : 'text', rows: more.area ? 2 : null, autocomplete: 'off', spellcheck: 'false', value: field?.text ?? now, 'aria-invalid': field?.problem ? 'true' : null,
    oninput: (/** @type {any} */ e) => act.field(key, { text: e.target.value }),
    onchange: (/** @type {any} */ e) => act.text(key, e.target.value, now, edit, label, more.check),
  });
  return labelled(label, input, field, more.hint);
}

/** A quantity of the line. @param {State} state @param {Act} act @param {Target} target @param {{hint?: string, empty?: string, unit?: string}} [more] */
function quantityField(state, act, target, more = {}) {
  const key = `q-${target.kind}-${target.field}-${target.key ?? ''}-${target.index ?? ''}-${target.zones.join('.')}`;
  const field = state.fields[key];
  const q = quantityAt(state.doc.line, target);
  const flat = q;
  const input = h('input', {
    id: key, type: 'text', autocomplete: 'off', spellcheck: 'false', value: field?.text ?? typed(flat), placeholder: more.empty ?? '', 'aria-invalid': field?.problem ? 'true' : null,
    oninput: (/** @type {any} */ e) => act.field(key, { text: e.target.value }),
    onchange: (/** @type {any} */ e) => act.quantity(key, target, e.target.value, more.unit),
  });
  const extra = flat && typeof flat === 'object' ? [flat.instrument ? `${flat.instrument}, IEC 60584-1 limits` : '', flat.tolerance_kind === 'standard' ? 'tolerance is one standard uncertainty' : '', flat.over ? `over ${flat.over}` : '', flat.basis ? `${flat.basis}` : '', flat.source ? `source: ${flat.source}` : ''].filter(Boolean).join('; ') : '';
  return labelled(target.label, input, field, extra || more.hint);
}

/** @param {State} state @param {Act} act @param {string} key @param {string} label @param {string} now @param {[string, string][]} options @param {(v: string) => Line} edit */
function choice(state, act, key, label, now, options, edit) {
  const field = state.fields[key];
  return labelled(label, h('select', { id: `s-${key}`, value: now, onchange: (/** @type {any} */ e) => act.edit(edit(e.target.value), `${label}: ${e.target.value}`, { field: key }) }, options.map(([v, t]) => h('option', { value: v }, t))), field);
}

/** Move, copy and delete. @param {Act} act @param {{up: string, down: string, at: number, count: number, what: string, move: (to: number) => void, copy: () => void, remove: () => void, asked: boolean}} p */
function order(act, p) {
  return h('div', { class: 'keys order' },
    button(p.up, () => p.move(p.at - 1), 'btn small', { disabled: p.at === 0, 'aria-label': `Move ${p.what} ${p.up.toLowerCase()}` }), button(p.down, () => p.move(p.at + 1), 'btn small', { disabled: p.at >= p.count - 1, 'aria-label': `Move ${p.what} ${p.down.toLowerCase()}` }),
    button('Copy', p.copy, 'btn small', { 'aria-label': `Copy ${p.what}` }), button('Delete', p.remove, 'btn small', { 'aria-label': `Delete ${p.what}` }));
}

/** @param {State} state @param {Act} act @returns {[string, any]} */
function lineForm(state, act) {
  const { line } = state.doc;
  return ['The line', [
    textField(state, act, 'line-name', 'Name', line.name, (t) => ({ ...line, name: t }), { check: (t) => (t.trim() ? null : 'a name') }),
    textField(state, act, 'line-about', 'About', line.about ?? '', (t) => withKey(line, 'about', t || undefined), { area: true }),
    textField(state, act, 'line-readings', 'Readings', line.readings_note ?? '', (t) => withKey(line, 'readings_note', t || undefined), { hint: 'when and by whom', area: true }),
    quantityField(state, act, { kind: 'line', field: 'pressure', label: 'Pressure', zones: [] }, { hint: 'absolute; of every zone that has none of its own' }),
    h('div', { class: 'keys' }, button('The charge', () => act.panel('charge', 0), 'btn'), button('Add a zone', () => act.panel('addzone', 0), 'btn'), button('Add a change', () => act.panel('addchange', 0), 'btn'), button('Another line', () => act.panel('lines', 0), 'btn')),
    state.shown?.notes.length ? [h('h3', null, 'Notes on the file'), h('ul', { class: 'takenlist' }, state.shown.notes.map((n) => h('li', null, n.at ? h('code', null, n.at) : null, ' ', sentence(n.text))))] : null,
  ]];
}

/** @param {State} state @param {Act} act @param {number} i @returns {[string, any]} */
function zoneForm(state, act, i) {
  const { line } = state.doc;
  const zone = zonesOf(line)[i];
  if (!zone) return ['Zone', h('p', null, 'This zone is gone.')];
  const gas = zone.gas ?? {};
  const taken = state.shown?.zones[i];
  const set = (/** @type {any} */ z) => setZone(line, i, z);
  const channels = Object.keys(gas.analysis ?? {});
  const bases = /** @type {[string, string][]} */ ([['dry', 'dry: its water taken out'], ['wet', 'wet: as it is']]);
  return [`Zone ${i + 1}, ${zone.name}`, [
    taken?.refused ? trouble(taken.refused) : null,
    textField(state, act, `zone-name-${i}`, 'Name', zone.name, (t) => renameZone(line, i, t.trim()), { check: (t) => (!t.trim() ? 'a name' : zonesOf(line).some((z, j) => j !== i && z.name === t.trim()) ? 'a name that no other zone has' : null) }),
    quantityField(state, act, { kind: 'zone', field: 'temperature', label: zone.leaving ? 'Entering' : 'Temperature', zones: [i] }),
    quantityField(state, act, { kind: 'zone', field: 'leaving', label: 'Leaving', zones: [i] }, { hint: 'only where the charge heats or cools through the zone', empty: 'one temperature' }),
    zone.leaving ? quantityField(state, act, { kind: 'zone', field: 'rate', label: 'Rate', zones: [i] }, { hint: 'how fast it heats or cools', empty: 'not known' }) : null,
    quantityField(state, act, { kind: 'zone', field: 'pressure', label: 'Pressure', zones: [i] }, { empty: line.pressure ? `the line’s, ${typed(line.pressure)}` : '', hint: 'absolute; only where it differs from the line' }),
    h('h3', null, 'Gas'),
    choice(state, act, `basis-${i}`, 'Analysis is', gas.basis ?? 'dry', bases, (v) => set(withGas(zone, 'basis', v))),
    h('p', { class: 'q' }, 'A share is typed as 35 ppm, 1,2 % ± 0,1, < 0.1 % at the detection limit, or 12 mbar.'),
    channels.map((c) => h('div', { class: 'channel', 'data-key': `ch-${c}` },
      quantityField(state, act, { kind: 'channel', field: 'gas', key: c, label: `${formulas(c)} share`, zones: [i] }),
      h('div', { class: 'keys' },
        h('button', { type: 'button', class: 'btn small', onclick: () => { const q = gas.analysis?.[c]; if (q) act.edit(set({ ...zone, gas: { ...gas, analysis: { ...gas.analysis, [c]: withKey(q, 'basis', (q.basis ?? gas.basis) === 'wet' ? 'dry' : 'wet') } } }), `${c} basis`, { field: `basis-${i}` }); }, 'aria-label': `${c} is read ${gas.analysis?.[c]?.basis ?? gas.basis ?? 'dry'}: change` }, `read ${gas.analysis?.[c]?.basis ?? (c === 'H2O' ? 'wet' : gas.basis ?? 'dry')}`),
        button('Copy to all zones', () => act.edit(zonesOf(line).reduce((l, _, j) => putQuantity(l, { kind: 'channel', field: 'gas', key: c, label: c, zones: [j] }, gas.analysis?.[c]), line), `${c} in all zones`, { reading: true }), 'btn small', { 'aria-label': `Copy ${c} to all zones` }),
        button('Delete', () => act.edit(putQuantity(line, { kind: 'channel', field: 'gas', key: c, label: c, zones: [i] }, undefined), `${c} deleted`, { field: `basis-${i}` }), 'btn small', { 'aria-label': `Delete ${c}` })))),
    addRow(state, act, `gasadd-${i}`, ['Gas', 'Share'], ['CO2', '2 % ± 0.1'], 'Add a gas', (formula, text) => act.addChannel(`gasadd-${i}`, i, formula, text)),
    choice(state, act, `balance-${i}`, 'The rest is', gas.balance ?? '', ['', ...new Set(['N2', 'H2', 'Ar', 'H2O', 'He', 'CO2', 'CO', 'O2', ...(gas.balance ? [gas.balance] : [])])].map((g) => /** @type {[string, string]} */ ([g, g ? formulas(g) : 'nothing: the analysis is whole'])), (v) => set(withGas(zone, 'balance', v || undefined))),
    quantityField(state, act, { kind: 'gas', field: 'dew_point', label: 'Dew or frost point', zones: [i] }, { empty: 'not read', hint: '“-48 C fp” is over ice, “-48 C dp” over water; “75 ppm” is taken as water' }),
    gas.dew_point ? quantityField(state, act, { kind: 'dew', field: 'pressure', label: 'Its pressure', zones: [i] }, { empty: 'the zone’s', hint: 'of the instrument, absolute, where it differs' }) : null,
    quantityField(state, act, { kind: 'gas', field: 'oxygen_cell', label: 'Oxygen cell', zones: [i] }, { empty: 'not read', hint: 'mV against air unless the file says otherwise' }),
    gas.oxygen_cell ? quantityField(state, act, { kind: 'cell', field: 'temperature', label: 'Cell temperature', zones: [i] }, { empty: 'the zone’s' }) : null,
    zonesOf(line).length > 1 ? button('This gas in every zone', () => act.edit(zonesOf(line).reduce((l, z, j) => setZone(l, j, { ...z, gas: zone.gas }), line), 'One gas in every zone', { reading: true }), 'btn') : null,
    taken?.notes.length ? h('ul', { class: 'takenlist' }, taken.notes.map((t) => h('li', null, sentence(t)))) : null,
    taken && Object.keys(taken.partial_pressures_bar).length ? h('p', { class: 'q' }, `Taken as, bar: ${Object.entries(taken.partial_pressures_bar).sort((a, b) => b[1] - a[1]).map(([g, p]) => `${formulas(g)} ${number(p, 4)}`).join(', ')}.`) : null,
    h('h3', null, 'Place in the line'),
    order(act, { up: 'Earlier', down: 'Later', at: i, count: zonesOf(line).length, what: zone.name, asked: false, move: (to) => act.edit(moveZone(line, i, to), `${zone.name} moved`, { panel: { kind: 'zone', index: to } }), copy: () => act.edit(copyZone(line, i), `${zone.name} copied`, { panel: { kind: 'zone', index: i + 1 } }), remove: () => act.edit(removeZone(line, i), `${zone.name} deleted`, { panel: null }) }),
  ]];
}

/** Two texts and a key. @param {State} state @param {Act} act @param {string} key @param {[string, string]} labels @param {[string, string]} examples @param {string} verb @param {(a: string, b: string) => void} add */
function addRow(state, act, key, labels, examples, verb, add) {
  const [a, b] = [state.fields[`${key}-a`]?.text ?? '', state.fields[`${key}-b`]?.text ?? ''];
  const problem = state.fields[key]?.problem;
  // What stands in the fields now, not when they were drawn: Enter may come at once.
  const now = (/** @type {'a' | 'b'} */ which) => /** @type {HTMLInputElement | null} */ (document.getElementById(`${key}-${which}`))?.value ?? '';
  const go = () => add(now('a'), now('b'));
  const input = (/** @type {'a' | 'b'} */ which, /** @type {string} */ v, /** @type {number} */ n) => h('input', { id: `${key}-${which}`, type: 'text', autocomplete: 'off', spellcheck: 'false', 'aria-label': `${verb}: ${labels[n].toLowerCase()}`, placeholder: examples[n], value: v, oninput: (/** @type {any} */ e) => act.field(`${key}-${which}`, { text: e.target.value }), onkeydown: (/** @type {KeyboardEvent} */ e) => { if (e.key === 'Enter') { e.preventDefault(); go(); } } });
  return h('div', { class: 'addrow', 'data-key': key }, h('div', { class: 'pair' }, input('a', a, 0), input('b', b, 1), button(verb, go, 'btn small')), problem ? trouble(problem) : null);
}

/** @param {State} state @param {Act} act @returns {[string, any]} */
function addZoneForm(state, act) {
  const { line } = state.doc;
  const zones = zonesOf(line);
  const get = (/** @type {string} */ k, /** @type {string} */ d) => state.fields[`new-${k}`]?.text ?? d;
  const input = (/** @type {string} */ k, /** @type {string} */ label, /** @type {string} */ d, /** @type {string} */ hint) => labelled(label, h('input', { id: `new-${k}`, type: 'text', autocomplete: 'off', spellcheck: 'false', value: get(k, d), oninput: (/** @type {any} */ e) => act.field(`new-${k}`, { text: e.target.value }), onkeydown: (/** @type {KeyboardEvent} */ e) => { if (e.key === 'Enter') { e.preventDefault(); act.addZone(); } } }), state.fields[`new-${k}`], hint);
  return ['Add a zone', [
    zones.length ? [h('p', { class: 'q' }, 'Copy one and change it, or begin a new one.'), h('div', { class: 'keys wrap' }, zones.map((z, i) => button(`Copy ${z.name}`, () => act.edit(copyZone(line, i), `${z.name} copied`, { panel: { kind: 'zone', index: i + 1 } }), 'btn small'))), h('h3', null, 'A new one, at the end')] : h('p', null, 'Begin with the hottest: its temperature, its gas, its dew point.'),
    input('name', 'Name', '', zones.length ? '' : 'for example Soak'),
    input('temperature', 'Temperature', '', '“1080 ± 5”, “1 976 F”'),
    h('h3', null, 'Gas'),
    labelled('The rest is', h('select', { id: 'new-balance', value: get('balance', 'N2'), onchange: (/** @type {any} */ e) => act.field('new-balance', { text: e.target.value }) }, ['N2', 'H2', 'Ar', 'H2O', 'CO2'].map((g) => h('option', { value: g }, formulas(g)))), undefined),
    get('balance', 'N2') === 'H2' ? null : input('h2', 'H₂ share', '', 'dry, “75 %”; leave empty for none'),
    input('dew', 'Dew or frost point', '', '“-48 C” is taken over ice; leave empty where not read'),
    state.fields['new-zone']?.problem ? trouble(/** @type {any} */ (state.fields['new-zone'].problem)) : null,
    h('p', { class: 'q' }, 'Other gases, a course or a pressure of its own are added once it stands.'),
    h('div', { class: 'keys' }, button('Add this zone', act.addZone, 'btn main')),
  ]];
}

/** @param {State} state @param {Act} act @returns {[string, any]} */
function chargeForm(state, act) {
  const { line } = state.doc;
  const list = chargeOf(line);
  return ['The charge', [
    textField(state, act, 'charge-name', 'Name', line.charge_name ?? '', (t) => withKey(line, 'charge_name', t || undefined), { hint: 'as it is called on site' }),
    list.length ? null : h('p', { class: 'q' }, 'No member yet. An alloy by weight per cent, a stone by its assay.'),
    list.map((m, i) => h('fieldset', { class: 'member', 'data-key': `m-${i}-${m.substance}` }, h('legend', null, formulas(m.substance)),
      textField(state, act, `mem-s-${i}`, 'Substance', m.substance, (t) => setMember(line, i, 'substance', t.trim()), { hint: 'formula, with a phase if it must be: SiO2(quartz)', check: (t) => (t.trim() ? null : 'a formula') }),
      quantityField(state, act, { kind: 'member', field: 'share_wt', label: 'Share by mass', zones: [], index: i }, { empty: 'not given', unit: '%' }),
      numberField(state, act, i, 'activity', 'Activity', m.activity),
      m.activity === undefined ? numberField(state, act, i, 'activity_coefficient', 'Activity coefficient', m.activity_coefficient) : null,
      m.activity !== undefined || m.activity_coefficient !== undefined ? numberField(state, act, i, 'doubt_factor', 'Doubt, a factor', m.doubt_factor, 'up and down, 1 or more; limits') : h('p', { class: 'q' }, 'Without either: pure stone, or in an alloy its mole fraction (Raoult’s law).'),
      textField(state, act, `mem-src-${i}`, 'Source', m.source ?? '', (t) => setMember(line, i, 'source', t || undefined)),
      order(act, { up: 'Up', down: 'Down', at: i, count: list.length, what: m.substance, asked: false, move: (to) => act.edit(moveMember(line, i, to), `${m.substance} moved`, {}), copy: () => act.edit(copyMember(line, i), `${m.substance} copied`, { field: `mem-s-${i}` }), remove: () => act.edit(removeMember(line, i), `${m.substance} deleted`, {}) }))),
    h('h3', null, 'Add a member'),
    addRow(state, act, 'memadd', ['Substance', 'Share by mass'], ['Cr', '18.1 % ± 0.2'], 'Add', (s, t) => act.addMember('memadd', s, t)),
    h('h3', null, 'Next'),
    h('div', { class: 'keys' }, button('Propose changes', () => act.panel('addchange', 0), 'btn')),
  ]];
}

/** @param {State} state @param {Act} act @param {number} i @param {string} name @param {string} label @param {number | undefined} now @param {string} [hint] */
function numberField(state, act, i, name, label, now, hint) {
  const { line } = state.doc;
  const key = `mem-${name}-${i}`;
  const field = state.fields[key];
  const input = h('input', { id: key, type: 'text', inputmode: 'decimal', autocomplete: 'off', value: field?.text ?? (now === undefined ? '' : typed(now)), 'aria-invalid': field?.problem ? 'true' : null, oninput: (/** @type {any} */ e) => act.field(key, { text: e.target.value }), onchange: (/** @type {any} */ e) => act.plain(key, name === 'doubt_factor' ? 'number' : name, e.target.value, (v) => setMember(line, i, name, v), label) });
  return labelled(label, input, field, hint);
}

/** @param {State} state @param {Act} act @param {number} i @returns {[string, any]} */
function changeForm(state, act, i) {
  const { line } = state.doc;
  const c = changesOf(line)[i];
  if (!c) return ['Change', h('p', null, 'This change is gone.')];
  const taken = state.shown?.changes[i];
  const zones = zonesOf(line);
  const watched = (/** @type {string} */ name) => !c.zones || c.zones.includes(name);
  const toggle = (/** @type {string} */ name) => {
    const now = zones.map((z) => z.name).filter((z) => (z === name ? !watched(z) : watched(z)));
    if (!now.length) return act.field(`zones-${i}`, { problem: { code: 'page.zones', at: '', place: '', message: 'A change is watched in one zone at least', found: '', expected: '', hints: ['Delete the change if it is not wanted'] } });
    act.edit(setChange(line, i, 'zones', now.length === zones.length ? undefined : now), `${c.name}: zones`, { field: `zones-${i}` });
  };
  const setAct = (/** @type {string} */ t) => setChange(line, i, 'acts_above', c.acts_above ? withKey(c.acts_above, 'source', t || undefined) : undefined);
  return [`Change ${i + 1}, ${c.name}`, [
    taken?.refused ? trouble(taken.refused) : null,
    textField(state, act, `ch-name-${i}`, 'Name', c.name, (t) => setChange(line, i, 'name', t.trim()), { check: (t) => (!t.trim() ? 'a name' : changesOf(line).some((x, j) => j !== i && x.name === t.trim()) ? 'a name that no other change has' : null) }),
    textField(state, act, `ch-eq-${i}`, 'Equation', c.equation, (t) => setChange(line, i, 'equation', t), { hint: taken && !taken.refused ? `taken as ${equation(taken.equation)}` : 'coefficients may be left out: Cr + H2O = Cr2O3 + H2' }),
    choice(state, act, `ch-wish-${i}`, 'Wish', c.wish, [['avoid', 'avoid: it should not go'], ['want', 'want: it should go']], (v) => setChange(line, i, 'wish', v)),
    quantityField(state, act, { kind: 'change', field: 'acts_above', label: 'Acts above', zones: [], index: i }, { empty: 'not known', hint: 'below it the change is known to be too slow' }),
    c.acts_above ? textField(state, act, `ch-src-${i}`, 'Its source', String(c.acts_above.source ?? ''), setAct) : null,
    quantityField(state, act, { kind: 'change', field: 'allowed', label: 'Time allowed', zones: [], index: i }, { empty: 'none', hint: 'past the turn, on a course with a rate' }),
    h('fieldset', { class: 'zonesof' }, h('legend', null, 'Watched in'), zones.map((z) => h('label', { class: 'tick' }, h('input', { type: 'checkbox', checked: watched(z.name), onchange: () => toggle(z.name) }), z.name)), state.fields[`zones-${i}`]?.problem ? trouble(/** @type {any} */ (state.fields[`zones-${i}`].problem)) : null),
    h('label', { class: 'tick' }, h('input', { type: 'checkbox', checked: !!c.tolerated, onchange: () => act.edit(setChange(line, i, 'tolerated', c.tolerated ? undefined : true), `${c.name}: ${c.tolerated ? 'not tolerated' : 'tolerated'}`, {}) }), 'The site tolerates it; the figures stand as they are'),
    c.activities && Object.keys(c.activities).length ? h('p', { class: 'q' }, `Activities of this change: ${Object.entries(c.activities).map(([k, v]) => `${formulas(k)} ${typeof v === 'object' && v ? /** @type {any} */ (v).value : v}`).join(', ')}.`) : null,
    taken?.notes.length ? h('ul', { class: 'takenlist' }, taken.notes.map((t) => h('li', null, sentence(t)))) : null,
    h('h3', null, 'Place in the list'),
    order(act, { up: 'Up', down: 'Down', at: i, count: changesOf(line).length, what: c.name, asked: false, move: (to) => act.edit(moveChange(line, i, to), `${c.name} moved`, { panel: { kind: 'change', index: to } }), copy: () => act.edit(copyChange(line, i), `${c.name} copied`, { panel: { kind: 'change', index: i + 1 } }), remove: () => act.edit(removeChange(line, i), `${c.name} deleted`, { panel: null }) }),
  ]];
}

/** @param {State} state @param {Act} act @returns {[string, any]} */
function addChangeForm(state, act) {
  const get = (/** @type {string} */ k, /** @type {string} */ d) => state.fields[`nc-${k}`]?.text ?? d;
  const key = (/** @type {KeyboardEvent} */ e) => { if (e.key === 'Enter') { e.preventDefault(); act.addChange(); } };
  const have = new Set(changesOf(state.doc.line).map((c) => c.equation.replace(/\s/g, '')));
  const list = (state.proposals ?? []).filter((p) => !have.has(p.equation.replace(/\s/g, '')));
  return ['Add a change', [
    labelled('Equation', h('input', { id: 'nc-eq', type: 'text', autocomplete: 'off', spellcheck: 'false', placeholder: 'Cr + H2O = Cr2O3 + H2', value: get('eq', ''), oninput: (/** @type {any} */ e) => act.tryEquation(e.target.value), onkeydown: key }), state.fields['nc-eq'], 'coefficients may be left out'),
    labelled('Name', h('input', { id: 'nc-name', type: 'text', autocomplete: 'off', placeholder: 'Chromium oxidises', value: get('name', ''), oninput: (/** @type {any} */ e) => act.field('nc-name', { text: e.target.value }), onkeydown: key }), undefined),
    labelled('Wish', h('select', { id: 'nc-wish', value: get('wish', 'avoid'), onchange: (/** @type {any} */ e) => act.field('nc-wish', { text: e.target.value }) }, h('option', { value: 'avoid' }, 'avoid: it should not go'), h('option', { value: 'want' }, 'want: it should go')), undefined),
    h('div', { class: 'keys' }, button('Add this change', act.addChange, 'btn main')),
    h('h3', null, 'Proposed ', h('small', null, 'from charge and gas, the nearest to turning first; tap to add')),
    state.proposals === null ? h('p', { class: 'q' }, 'Looking …') : list.length ? h('ol', { class: 'choices proposals' }, list.map((p) => h('li', { 'data-key': p.equation }, h('button', { type: 'button', onclick: () => act.addProposal(p) }, h('b', null, say(p.name)), h('span', null, equation(p.equation)), h('span', { class: 'q' }, `${p.wish}; nearest in ${p.nearest_zone}, dG ${fixed(p.dG_kJ, 1)} kJ, ${reading(Number(Math.abs(p.leeway_u).toPrecision(2)))} u from its turn`))))) : h('p', { class: 'q' }, zonesOf(state.doc.line).length && chargeOf(state.doc.line).length ? 'Nothing more is proposed from this charge and gas.' : 'Proposals need a zone with a gas and a charge.'),
    chargeOf(state.doc.line).length ? null : h('div', { class: 'keys' }, button('Name the charge', () => act.panel('charge', 0), 'btn')),
  ]];
}
