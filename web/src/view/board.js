/** The line as it is built, and below it one row per change with one gauge per zone. */
import { figureOf, firstLever, inUnit, leversOf, scaleOf, unitOf } from '../chart/figure.js';
import { ends, gauge } from '../chart/gauge.js';
import { standing } from '../chart/mark.js';
import { trace } from '../chart/trace.js';
import { h, s } from '../dom.js';
import { celsius, difference, formulas, leeway, number, reading, value, withUnit } from '../format.js';
import { changesOf, quantityAt, zonesOf } from '../line.js';
import { beforeWord, lineBefore, lineOnShow } from '../state.js';
import { button, frame, say, sentence, trouble } from './frame.js';
import { pad } from './pad.js';

/**
 * @typedef {import('../types.js').State} State
 * @typedef {import('../types.js').Target} Target
 * @typedef {import('../types.js').Finding} Finding
 * @typedef {import('../main.js').Act} Act
 */

const K0 = 273.15;

/** The lever on show. @param {State} state */
export const leverOf = (state) => {
  const findings = state.shown?.findings ?? [];
  if (state.lever === 'kJ' || leversOf(findings).some((l) => l.lever === state.lever)) return state.lever ?? 'kJ';
  return firstLever(findings);
};

/** @param {import('../types.js').Assessment | null} a @param {number} zone @param {number} change @returns {Finding | null} */
export const findingAt = (a, zone, change) => a?.findings.find((f) => f.zone_index === zone && f.change_index === change) ?? null;
/** The same finding before, found by name. @param {State} state @param {Finding} f */
export const findingBefore = (state, f) => state.compared?.findings.find((g) => g.zone === f.zone && g.change === f.change) ?? null;

/** Reads out a figure. @param {import('../chart/figure.js').Figure} figure */
export function sayFigure(figure) {
  if (figure.kind === 'turns') return { big: leeway(figure.leeway, figure.unit), unit: difference(figure.unit) };
  if (figure.kind === 'no turn') return { big: 'no turn', unit: '' };
  if (figure.kind === 'absent') return { big: '–', unit: '' };
  return { big: '', unit: '' };
}

/** The change whose turn is drawn on the line: the one chosen, else the worst, else the first. @param {State} state */
export function selectedOf(state) {
  const a = state.shown;
  const worst = a && a.summary.worst !== null ? a.findings[a.summary.worst]?.change_index : undefined;
  const wanted = state.change >= 0 ? state.change : worst ?? 0;
  return Math.min(wanted, Math.max(0, changesOf(lineOnShow(state)).length - 1));
}

/** Chips of one zone. @param {State} state @param {number} i @param {Set<string>} shared @returns {Target[]} */
function zoneTargets(state, i, shared) {
  const zone = zonesOf(lineOnShow(state))[i];
  /** @type {Target[]} */
  const list = [{ kind: 'zone', field: 'temperature', label: 'Temperature', zones: [i] }];
  if (zone.leaving) list.push({ kind: 'zone', field: 'leaving', label: 'Leaving', zones: [i] });
  if (zone.rate) list.push({ kind: 'zone', field: 'rate', label: 'Rate', zones: [i] });
  if (zone.pressure) list.push({ kind: 'zone', field: 'pressure', label: 'Pressure', zones: [i] });
  if (zone.gas?.dew_point && !shared.has('dew_point')) list.push({ kind: 'gas', field: 'dew_point', label: dewName(zone.gas.dew_point), zones: [i] });
  for (const f of Object.keys(zone.gas?.analysis ?? {})) if (!shared.has(f)) list.push({ kind: 'channel', field: 'gas', key: f, label: `${formulas(f)} share`, zones: [i] });
  if (zone.gas?.oxygen_cell && !shared.has('oxygen_cell')) list.push({ kind: 'gas', field: 'oxygen_cell', label: 'Oxygen cell', zones: [i] });
  return list;
}

/** @param {import('../types.js').Quantity} q */
export const dewName = (q) => (q.over === 'water' || (q.over === undefined && q.value >= (q.unit === 'F' ? 32 : q.unit === 'K' ? K0 : 0)) ? 'Dew point' : 'Frost point');

/** Readings that stand the same in every zone. @param {import('../types.js').Line} line @returns {Set<string>} */
function sharedOf(line) {
  const zones = zonesOf(line);
  /** @type {Set<string>} */
  const shared = new Set();
  if (zones.length < 3) return shared;
  const same = (/** @type {(z: import('../types.js').Zone) => unknown} */ pick) => {
    const first = JSON.stringify(pick(zones[0]));
    return first !== undefined && zones.every((z) => JSON.stringify(pick(z)) === first);
  };
  for (const f of Object.keys(zones[0].gas?.analysis ?? {})) if (same((z) => z.gas?.analysis?.[f])) shared.add(f);
  return shared;
}

/** @param {import('../types.js').Quantity | undefined} q @param {Target} target */
function chipText(q, target) {
  if (!q) return { big: '–', small: '' };
  const tolerance = q.instrument ? String(q.instrument) : q.tolerance !== undefined ? `± ${withUnit(reading(q.tolerance), q.unit === 'C' || q.unit === 'K' ? 'K' : difference(q.unit))}` : 'no tolerance';
  const v = value(q.value, q.unit);
  switch (target.kind) {
    case 'gas': return target.field === 'oxygen_cell' ? { big: v, small: `cell ${tolerance}` } : { big: v, small: `${q.over === 'water' ? 'dew' : dewName(q) === 'Frost point' ? 'frost' : 'dew'} ${tolerance}` };
    case 'channel': return { big: `${formulas(target.key ?? '')} ${q.bound === 'upper' ? '< ' : ''}${v}`, small: q.bound === 'upper' ? 'detection limit' : `${tolerance}${q.basis ? ` ${q.basis}` : ''}` };
    case 'zone': return target.field === 'leaving' ? { big: `to ${v}`, small: tolerance } : { big: v, small: tolerance };
    default: return { big: v, small: tolerance };
  }
}

/** @param {State} state @param {Act} act @param {Target} target @param {string} [under] */
function chip(state, act, target, under) {
  const line = lineOnShow(state);
  const before = lineBefore(state);
  const q = quantityAt(line, target);
  const was = before ? quantityAt(before, target) : undefined;
  const { big, small } = chipText(q, target);
  const changed = was !== undefined && q !== undefined && (was.value !== q.value || was.unit !== q.unit);
  const isOpen = state.edit && sameTarget(state.edit.target, target);
  const place = target.zones.length === 1 && zonesOf(line).length ? `${target.zones[0] + 1} ${zonesOf(line)[target.zones[0]].name}: ` : 'All zones: ';
  return h('button', {
    type: 'button', class: `chip${changed ? ' changed' : ''}${isOpen ? ' open' : ''}`, 'data-key': `chip-${target.kind}-${target.field}-${target.key ?? ''}-${target.zones.join('.')}`,
    'aria-label': `${place}${target.label} ${big}, ${small}${changed ? `, was ${value(was.value, was.unit)}` : ''}. Change`, 'aria-expanded': isOpen ? 'true' : null,
    onclick: () => act.startEdit(target),
  }, h('b', null, big), h('span', null, changed ? h('s', null, was.unit === q.unit ? reading(was.value) : value(was.value, was.unit)) : null, changed ? (under ?? small).replace(/ ?±.*$/, '') : under ?? small));
}

/** @param {Target} a @param {Target} b */
export const sameTarget = (a, b) => a.kind === b.kind && a.field === b.field && a.key === b.key && a.index === b.index && a.zones.join() === b.zones.join();

/** @param {State} state @param {Act} act @param {ReturnType<typeof frame>} f */
export function head(state, act, f) {
  const line = lineOnShow(state);
  const a = state.shown;
  const variants = (state.doc.variant ? state.doc.recipe ?? line : line).variants ?? [];
  const none = zonesOf(line).length === 0;
  const first = none ? 'No zone yet. Begin with the hottest.' : a ? say(a.summary.sentence) : 'Reading the line …';
  const second = state.edit?.tentative ? tryWords(state) : a?.summary.remedy ? say(a.summary.remedy) : '';
  const about = state.doc.variant ? variants.find((v) => v.name === state.doc.variant)?.about ?? '' : '';
  const hidden = a && !none ? countsWords(a) : '';
  return [
    h('h1', { 'data-key': 'h1', 'aria-live': 'polite' }, first),
    second ? h('p', { class: `back${state.edit?.tentative ? ' trying' : ''}`, 'data-key': 'second' }, second) : null,
    state.lineProblem ? h('div', { 'data-key': 'lineproblem' }, trouble(state.lineProblem)) : null,
    h('div', { class: 'bar', 'data-key': 'bar' },
      h('p', { class: 'under' },
        line.invented ? h('span', { class: 'invented' }, 'Invented line') : null,
        h('button', { type: 'button', class: 'linename', onclick: () => act.panel('line', 0), 'aria-label': `${line.name}: name and notes of the line` }, line.name),
        h('span', { class: 'rest' }, [about || line.readings_note, hidden].filter(Boolean).map((t) => ` ${say(t ?? '')}`).join(' '))),
      variants.length
        ? h('div', { class: 'modes', role: 'group', 'aria-label': line.invented ? 'Demo line as' : 'Line as' },
            h('button', { type: 'button', 'aria-pressed': String(!state.doc.variant), 'data-key': 'recipe', onclick: () => state.doc.variant && act.recipe() }, 'As recipe'),
            variants.map((v) => h('button', { type: 'button', 'data-key': `v-${v.name}`, title: v.about, 'aria-pressed': String(state.doc.variant === v.name), onclick: () => act.variant(v.name) }, v.name)))
        : null,
      state.doc.variant ? button('Back to recipe', act.recipe, 'btn backkey', { 'data-key': 'back' }) : null),
  ];
}

/** @param {import('../types.js').Assessment} a */
function countsWords(a) {
  const c = a.summary.counts;
  const total = a.findings.length;
  if (!total) return '';
  const parts = [[c.off_side, 'off side'], [c.too_close, 'too close'], [c.on_side, 'on side'], [c.on_paper, 'on paper'], [c.no_data, 'no data']].filter(([n]) => n).map(([n, w]) => `${n} ${w}`);
  return `${total} finding${total === 1 ? '' : 's'}: ${parts.join(', ')}.`;
}

/** What the value being tried changes. @param {State} state */
function tryWords(state) {
  const { edit, shown, compared } = state;
  if (!edit?.entry || !shown || !compared || state.shownLine !== edit.tentative) return 'Not kept yet.';
  const zones = zonesOf(lineOnShow(state));
  const place = edit.target.zones.length === 1 ? `${zones[edit.target.zones[0]].name} at ` : '';
  const lever = leverOf(state);
  const moved = shown.findings.flatMap((f) => {
    const was = compared.findings.find((g) => g.zone === f.zone && g.change === f.change);
    return was && was.standing !== f.standing ? [{ f, was }] : [];
  });
  const told = moved.slice(0, 2).map(({ f, was }) => {
    const [a, b] = [figureOf(was, lever), figureOf(f, lever)];
    const figures = a.kind === 'turns' && b.kind === 'turns' ? `${leeway(a.leeway, a.unit)} to ${withUnit(leeway(b.leeway, b.unit), difference(b.unit))}, ` : '';
    return `${f.change} in ${f.zone}: ${figures}${standing(was.standing).short} to ${standing(f.standing).short}`;
  });
  const more = moved.length > 2 ? ` ${moved.length - 2} more change side.` : '';
  return `Not kept yet: ${place}${say(edit.entry.read_back)}. ${told.length ? `${told.join('; ')}.${more}` : 'No standing changes.'}`;
}

/** @param {State} state @param {Act} act */
export function board(state, act) {
  const f = frame();
  const line = lineOnShow(state);
  const zones = zonesOf(line);
  const n = zones.length;
  if (f.phone) return phone(state, act, f);
  const least = f.tablet ? 112 : 120;
  const total = Math.max(f.width, f.label + n * least);
  const col = n ? (total - f.label) / n : total - f.label;
  const columns = f.label ? `${f.label}px repeat(${Math.max(n, 1)}, minmax(0, 1fr))` : `repeat(${Math.max(n, 1)}, minmax(0, 1fr))`;
  const selected = selectedOf(state);
  const wide = total > f.width + 1;
  return h('main', { class: `board-view${state.edit ? ' editing' : ''}`, id: 'main' },
    head(state, act, f),
    welcome(state, act),
    n === 0 ? emptyLine(state, act) : h('div', { class: `scroll${wide ? ' wide' : ''}`, tabindex: wide ? 0 : null, role: wide ? 'region' : null, 'aria-label': wide ? 'The board; scrolls sideways' : null, 'data-key': 'scroll' },
      h('div', { class: 'board', css: `width:${wide || f.paper ? `${total}px` : '100%'};--cols:${columns};--label:${f.label}px` },
        h('div', { class: 'cuts', 'aria-hidden': 'true' }, zones.map((_, i) => h('i', { css: `left:${(f.label + i * col).toFixed(1)}px` }))),
        tabs(state, act, f),
        drawLine(state, act, f, total, selected),
        chips(state, act, f, col),
        state.edit ? pad(state, act, { f, col, n }) : null,
        gridHead(state, act, f),
        grid(state, act, f, col, selected))),
    notes(state, act));
}

/** @param {State} state @param {Act} act @param {ReturnType<typeof frame>} f */
function tabs(state, act, f) {
  const zones = zonesOf(lineOnShow(state));
  const names = zones.map((z) => z.name);
  return h('div', { class: 'tabs' }, f.label ? h('span', { class: 'corner' }) : null, zones.map((z, i) => {
    const refused = state.shown?.zones[i]?.refused;
    return h('div', { class: 'bay', 'data-key': `bay-${names[i]}` }, h('button', { type: 'button', class: 'tab', onclick: () => act.panel('zone', i), 'aria-label': `Zone ${i + 1}, ${z.name}: open to change, copy, move or delete` }, h('b', null, String(i + 1)), h('span', null, z.name), refused ? h('em', { title: 'its gas is not taken' }, '?') : null));
  }));
}

/** @param {State} state @param {Act} act @param {ReturnType<typeof frame>} f @param {number} width @param {number} selected */
function drawLine(state, act, f, width, selected) {
  const line = lineOnShow(state);
  const a = state.shown;
  const same = a && a.zones.length === zonesOf(line).length;
  if (!same) return h('div', { class: 'trace-wait', css: `height:${f.tall ? 190 : 140}px` });
  const bays = a.zones.map((z, i) => {
    const finding = findingAt(a, i, selected);
    return { name: z.name, from: z.temperature_K - K0, to: z.leaving_K === null ? null : z.leaving_K - K0, finding, before: finding ? findingBefore(state, finding) : null };
  });
  const change = changesOf(line)[selected]?.name ?? 'No change';
  return h('button', { type: 'button', class: 'line', onclick: () => act.panel('charge', 0), 'aria-label': `The charge: ${line.charge_name || 'not named'}. Open to change`, 'data-key': 'trace' },
    trace(document, { bays, change: say(change), charge: say(line.charge_name ?? '') || (line.charge?.length ? line.charge.map((m) => formulas(m.substance)).join(', ') : 'No charge yet: tap to name it'), width, height: f.roomy && f.tall ? 200 : f.tablet ? 150 : 140, label: f.label, beforeWord: beforeWord(state) }));
}

/** @param {State} state @param {Act} act @param {ReturnType<typeof frame>} f @param {number} col */
function chips(state, act, f, col) {
  const line = lineOnShow(state);
  const zones = zonesOf(line);
  const shared = sharedOf(state.edit ? state.doc.line : line);
  const every = zones.map((_, i) => i);
  /** @type {any[]} */
  const all = [];
  for (const key of shared) all.push(chip(state, act, { kind: 'channel', field: 'gas', key, label: `${formulas(key)} share`, zones: every }, 'all zones'));
  if (line.pressure && zones.some((z) => !z.pressure)) all.push(chip(state, act, { kind: 'line', field: 'pressure', label: 'Pressure', zones: [] }, zones.some((z) => z.pressure) ? 'other zones' : 'all zones'));
  return h('div', { class: `chips${col >= 168 ? ' pairs' : ''}` },
    h('div', { class: 'all', 'data-key': 'all' }, all),
    zones.map((z, i) => h('div', { 'data-key': `chips-${z.name}` }, zoneTargets(state, i, shared).map((t) => chip(state, act, t)), state.shown?.zones[i]?.refused ? h('p', { class: 'refusal' }, sentence(state.shown.zones[i].refused?.message ?? '')) : null)));
}

/** @param {State} state @param {Act} act @param {ReturnType<typeof frame>} f */
function gridHead(state, act, f) {
  const lever = leverOf(state);
  const [less, more] = ends(lever);
  const word = beforeWord(state);
  return h('div', { class: 'head' },
    leverPick(state, act), doubtPick(state, act),
    h('div', { class: 'key' },
      h('span', null, less, s(document, 'svg', { width: 44, height: 12, viewBox: '0 0 60 12', 'aria-hidden': 'true' }, s(document, 'path', { d: 'M1 6H59M7 1L1 6l6 5M53 1l6 5l-6 5', fill: 'none', stroke: 'currentColor', 'stroke-width': 1.3 })), more),
      state.compared && lineBefore(state) ? h('span', null, s(document, 'svg', { width: 12, height: 12, viewBox: '0 0 12 12', 'aria-hidden': 'true' }, s(document, 'circle', { cx: 6, cy: 6, r: 4, class: 'was' })), word) : null),
    h('div', { class: 'push' }, button('Add a zone', () => act.panel('addzone', 0), 'text'), button('Add a change', () => act.panel('addchange', 0), 'text'), f.tablet ? button('Charge', () => act.panel('charge', 0), 'text') : null));
}

/** @param {State} state @param {Act} act */
export function leverPick(state, act) {
  const lever = leverOf(state);
  const list = leversOf(state.shown?.findings ?? []);
  return h('label', { class: 'pick' }, h('span', null, 'Leeway in'), h('select', { 'aria-label': 'Leeway in', value: lever, onchange: (/** @type {any} */ e) => act.lever(e.target.value) }, list.map((l) => h('option', { value: l.lever }, formulas(l.label))), h('option', { value: 'kJ' }, 'kJ of dG')));
}
/** @param {State} state @param {Act} act */
export function doubtPick(state, act) {
  const k = String(lineOnShow(state).coverage_factor ?? 2);
  return h('label', { class: 'pick' }, h('span', null, 'Doubt'), h('select', { 'aria-label': 'Coverage factor k of the doubt', value: k, onchange: (/** @type {any} */ e) => act.coverage(Number(e.target.value)) }, [...new Set(['1', '2', '3', k])].sort().map((v) => h('option', { value: v }, `k = ${v}`))));
}

/** @param {State} state @param {Act} act @param {ReturnType<typeof frame>} f @param {number} col @param {number} selected */
function grid(state, act, f, col, selected) {
  const line = lineOnShow(state);
  const a = state.shown;
  const changes = changesOf(line);
  if (!changes.length) return h('div', { class: 'nochange' }, h('p', null, 'No change is watched yet. The charge and the gas suggest some.'), button('Add a change', () => act.panel('addchange', 0), 'btn main'));
  if (!a || a.changes.length !== changes.length) return h('div', { class: 'rows' });
  const groups = [['avoid', 'Avoid', 'hatched: it goes'], ['want', 'Want', 'hatched: it does not go']];
  return h('div', { class: 'rows' }, groups.flatMap(([wish, word, says]) => {
    const list = changes.map((c, i) => ({ c, i })).filter(({ c }) => c.wish === wish);
    if (!list.length) return [];
    return [h('p', { class: 'group', 'data-key': `group-${wish}` }, word, ' ', h('small', null, says)), ...list.map(({ c, i }) => row(state, act, f, col, i, i === selected))];
  }));
}

/** @param {State} state @param {Act} act @param {ReturnType<typeof frame>} f @param {number} col @param {number} i @param {boolean} selected */
function row(state, act, f, col, i, selected) {
  const a = /** @type {import('../types.js').Assessment} */ (state.shown);
  const lever = leverOf(state);
  const taken = a.changes[i];
  const change = changesOf(lineOnShow(state))[i];
  const findings = a.findings.filter((x) => x.change_index === i);
  const span = scaleOf(findings, lever, a.coverage_factor);
  const unit = unitOf(findings, lever);
  const scale = span && unit ? `±${withUnit(number(span, 3), difference(unit))}` : '';
  return h('div', { class: `row${selected ? ' selected' : ''}`, 'data-key': `row-${taken.name}` },
    h('div', { class: 'what' },
      h('button', { type: 'button', class: 'name', onclick: () => act.select(i), 'aria-pressed': String(selected), 'aria-label': `${taken.name}: show where it turns on the line` }, say(change.name)),
      h('button', { type: 'button', class: 'eq', onclick: () => act.panel('change', i), 'aria-label': `${taken.name}: open to change, copy, move or delete` }, taken.refused ? 'not understood' : formulas(taken.short), change.tolerated ? ', tolerated' : ''),
      h('span', { class: 'scale' }, scale)),
    taken.refused ? h('div', { class: 'rowtrouble' }, trouble(taken.refused), button('Change it', () => act.panel('change', i), 'text')) :
    a.zones.map((_, zi) => {
      const finding = findings.find((x) => x.zone_index === zi);
      return finding ? cell(state, act, f, col, finding, lever, span) : h('div', { class: 'cell none', 'data-key': `cell-${zi}` }, h('span', null, 'not watched here'));
    }));
}

/** @param {State} state @param {Act} act @param {ReturnType<typeof frame>} f @param {number} col @param {Finding} finding @param {string} lever @param {number | null} span */
function cell(state, act, f, col, finding, lever, span) {
  const k = state.shown?.coverage_factor ?? 2;
  const own = unitOf((state.shown?.findings ?? []).filter((x) => x.change_index === finding.change_index), lever);
  const figure = figureOf(finding, lever);
  const before = findingBefore(state, finding);
  const st = standing(finding.standing);
  const { big, unit: u } = sayFigure(figure);
  const at = finding.course.length && finding.standing !== 'no data' ? `at ${celsius(finding.judged_at_K)}` : '';
  const doubt = figure.kind === 'turns' ? `, doubt ${withUnit(number(k * figure.u, 2), u)}` : '';
  const why = finding.standing === 'no data' ? finding.notes[0] ?? finding.sentence : '';
  const differs = finding.shifted && finding.shifted.standing !== finding.standing;
  return h('button', {
    type: 'button', class: `cell s-${st.tone}`, 'data-key': `cell-${finding.zone_index}`, title: why ? sentence(why) : null,
    'aria-label': `${finding.change}, ${finding.zone_index + 1} ${finding.zone}: ${st.word}${big ? `, leeway ${big} ${u}` : ''}${doubt}${at ? `, judged ${at}` : ''}${why ? `. ${why}` : ''}${differs ? `; shifted: ${finding.shifted?.standing}` : ''}`,
    onclick: () => act.openCell(finding.zone_index, finding.change_index),
  },
  h('span', { class: 'say' }, big ? h('b', { class: figure.kind === 'turns' ? '' : 'small' }, big) : null, u ? h('span', null, u) : null, h('i', null, st.short), differs ? h('span', { class: 'at' }, 'not if shifted') : at && (big.length * 10 + (u.length + st.short.length + at.length) * 7.3 + 40 < col) ? h('span', { class: 'at' }, at) : null),
  why ? h('span', { class: 'why' }, sentence(why)) : gauge(document, { figure: inUnit(figure, own), before: before ? inUnit(figureOf(before, lever), own) : null, standing: finding.standing, span, width: Math.floor(col) - 15, k }));
}

/** @param {State} state @param {Act} act */
function emptyLine(state, act) {
  return h('div', { class: 'empty', 'data-key': 'empty' },
    s(document, 'svg', { viewBox: '0 0 436 92', width: 436, height: 92, 'aria-hidden': 'true' },
      s(document, 'path', { d: 'M.5 24V.5h92V24', class: 'olddash', fill: 'none' }), s(document, 'path', { d: 'M0 25h436M0 90h436', class: 'turnline' }), s(document, 'path', { d: 'M144 26v64M290 26v64', class: 'cut' }),
      s(document, 'path', { d: 'M82 58h336m-8 -5l8 5l-8 5', class: 'dim' }), s(document, 'text', { x: 10, y: 17, class: 'q' }, '1'), s(document, 'text', { x: 14, y: 62, class: 'q' }, 'charge in'), s(document, 'text', { x: 422, y: 80, class: 'q', 'text-anchor': 'end' }, 'charge out')),
    h('p', null, 'Its temperature, its gas, its dew point. Then the charge: changes are proposed from both.'),
    h('div', { class: 'keys' }, button('Add a zone', () => act.panel('addzone', 0), 'btn main'), button('Name the charge', () => act.panel('charge', 0), 'btn'), button('Open a file', act.open, 'btn'), button('Look at an invented line', () => act.panel('lines', 0), 'btn')));
}

/** @param {State} state @param {Act} act */
function welcome(state, act) {
  if (!state.welcome) return null;
  const item = (/** @type {string} */ title, /** @type {string} */ text, /** @type {string} */ key, /** @type {() => void} */ go, main = false) =>
    h('li', null, h('p', null, h('b', null, title), h('span', null, text)), button(key, go, `btn${main ? ' main' : ''}`));
  return h('ul', { class: 'welcome', 'data-key': 'welcome', 'aria-label': 'Where to begin' },
    item('Build your line', 'zones, gas, charge; four readings are enough', 'Begin', act.newLine, true),
    item('Open a file', 'a line saved before', 'Open', act.open),
    item('Turn this one', 'tap a reading, watch the dots; one key takes it back', 'Try', () => act.hear('welcome')));
}

/** @param {State} state @param {Act} act */
export function notes(state, act) {
  const a = state.shown;
  if (!a) return null;
  const line = lineOnShow(state);
  const small = [
    ...a.zones.flatMap((z) => z.notes.map((t) => `${z.name}: ${t}`)),
    ...a.changes.flatMap((c) => c.notes.map((t) => `${c.name}: ${t}`)),
    ...a.notes.map((t) => (t.at ? `${t.at}: ${t.text}` : t.text)),
  ];
  // The same remark for several zones or changes is said once.
  /** @type {Map<string, string[]>} */
  const grouped = new Map();
  for (const t of small) {
    const at = t.indexOf(': ');
    const [who, text] = at > 0 && at < 60 ? [t.slice(0, at), t.slice(at + 2)] : ['', t];
    grouped.set(text, [...(grouped.get(text) ?? []), ...(who ? [who] : [])]);
  }
  const judged = [...new Set(a.findings.filter((x) => x.judged_why && x.standing !== 'no data').map((x) => `${x.zone} is judged at ${celsius(x.judged_at_K)} for ${lower(x.change)}: ${x.judged_why}`))];
  return h('div', { class: 'foot', 'data-key': 'foot' },
    a.cautions.map((c) => h('p', { class: 'gas', 'data-key': `c-${c.title}` }, h('b', null, `${c.title}. `), say(c.text))),
    grouped.size + judged.length ? h('details', { class: 'notes', 'data-key': 'notes', ontoggle: null }, h('summary', null, `${grouped.size + judged.length} ${grouped.size + judged.length === 1 ? 'note' : 'notes'} on how the readings are taken`),
      h('ul', null, [...grouped].map(([text, who]) => h('li', null, sentence(who.length ? `${who.join(', ')}: ${text}` : text))), judged.map((t) => h('li', null, sentence(t))))) : null,
    h('p', { class: 'drawing' }, h('span', null, 'What can happen, not how fast. Air, steam and open doors are never proposed. Leeways are rounded against you.'), h('span', null, `${line.invented ? 'Invented line. ' : ''}Data ${a.data_version}`)));
}

/** @param {string} t */
const lower = (t) => (/^[A-Z][a-z]/.test(t) ? t[0].toLowerCase() + t.slice(1) : t);

/** One change at a time, for a telephone. @param {State} state @param {Act} act @param {ReturnType<typeof frame>} f */
function phone(state, act, f) {
  const line = lineOnShow(state);
  const zones = zonesOf(line);
  const changes = changesOf(line);
  const a = state.shown;
  const ready = a && a.zones.length === zones.length && a.changes.length === changes.length;
  const i = selectedOf(state);
  const lever = leverOf(state);
  const shared = sharedOf(state.edit ? state.doc.line : line);
  const findings = ready ? a.findings.filter((x) => x.change_index === i) : [];
  const span = scaleOf(findings, lever, a?.coverage_factor ?? 2);
  const unit = unitOf(findings, lever);
  const scale = span && unit ? `Scale ${withUnit(number(span, 3), difference(unit))} each way; bar: k = ${a?.coverage_factor}. ` : '';
  const step = (/** @type {number} */ by) => act.select((i + by + changes.length) % changes.length);
  return h('main', { class: `board-view phone${state.edit ? ' editing' : ''}`, id: 'main' },
    head(state, act, f), welcome(state, act),
    zones.length === 0 ? emptyLine(state, act) : [
      changes.length && ready ? h('div', { class: 'picker', 'data-key': 'picker' },
        button('‹', () => step(-1), 'arrow', { 'aria-label': 'Change before' }),
        h('button', { type: 'button', class: 'which', onclick: () => act.panel('change', i) }, h('b', null, `${say(changes[i].name)}, ${changes[i].wish}`), h('span', null, `${i + 1} of ${changes.length}; ${a.changes[i].refused ? 'not understood' : formulas(a.changes[i].short)}`)),
        button('›', () => step(1), 'arrow', { 'aria-label': 'Next change' })) : null,
      h('div', { class: 'picks', 'data-key': 'picks' }, leverPick(state, act), doubtPick(state, act)),
      ready && a.changes[i]?.refused ? trouble(/** @type {any} */ (a.changes[i].refused)) : null,
      h('ol', { class: 'zones', 'data-key': 'zones' }, zones.map((z, zi) => {
        const finding = findings.find((x) => x.zone_index === zi);
        return h('li', { 'data-key': `z-${z.name}` },
          h('div', { class: 'ztop' }, h('button', { type: 'button', class: 'tab', onclick: () => act.panel('zone', zi) }, h('b', null, String(zi + 1)), h('span', null, z.name)), h('div', { class: 'chips' }, h('div', null, zoneTargets(state, zi, shared).map((t) => chip(state, act, t))))),
          finding ? cell(state, act, f, f.width, finding, lever, span) : h('div', { class: 'cell none' }, h('span', null, changes.length ? 'not watched here' : '')),
          state.shown?.zones[zi]?.refused ? h('p', { class: 'refusal' }, sentence(state.shown.zones[zi].refused?.message ?? '')) : null);
      })),
      h('div', { class: 'chips shared', 'data-key': 'shared' }, h('div', { class: 'all' }, [...shared].map((key) => chip(state, act, { kind: 'channel', field: 'gas', key, label: `${formulas(key)} share`, zones: zones.map((_, x) => x) }, 'all zones')), line.pressure ? chip(state, act, { kind: 'line', field: 'pressure', label: 'Pressure', zones: [] }, 'all zones') : null)),
      h('p', { class: 'q small', 'data-key': 'scale' }, `${scale}Tap a gauge for its levers.`),
      h('div', { class: 'push', 'data-key': 'push' }, button('Add a zone', () => act.panel('addzone', 0), 'text'), button('Add a change', () => act.panel('addchange', 0), 'text'), button('Charge', () => act.panel('charge', 0), 'text')),
      state.edit ? pad(state, act, { f, col: f.width, n: 1 }) : null,
    ],
    notes(state, act));
}
