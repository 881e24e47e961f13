/** One change in one zone: how far, by which lever, what brings it back, how sure, and the arithmetic. */
import { figureOf, inUnit, scaleOf, unitOf } from '../chart/figure.js';
import { bigGauge, gauge } from '../chart/gauge.js';
import { standing } from '../chart/mark.js';
import { h } from '../dom.js';
import { THIN, celsius, chance, difference, equation, fixed, formulas, leeway, number, turn, value, withUnit } from '../format.js';
import { changesOf, leverTarget, zonesOf } from '../line.js';
import { beforeWord, lineOnShow } from '../state.js';
import { findingAt, findingBefore, leverOf, leverPick, doubtPick, sayFigure } from './board.js';
import { button, chipMark, frame, glyph, say, sentence } from './frame.js';

/** @typedef {import('../types.js').State} State */
/** @typedef {import('../types.js').Finding} Finding */
/** @typedef {import('../main.js').Act} Act */

const left = () => glyph('M14 4L7 11l7 7');

/** @param {State} state @param {Act} act */
export function cell(state, act) {
  const f = frame();
  const { shown: a, cell: at } = state;
  const finding = at && findingAt(a, at.zone, at.change);
  const line = lineOnShow(state);
  const back = button('Board', () => act.go('board'), 'text back');
  back.prepend(left());
  if (!a || !at) return h('main', { id: 'main', class: 'cell-view' }, back);
  if (!finding) {
    const refused = a.changes[at.change]?.refused;
    return h('main', { id: 'main', class: 'cell-view' }, h('div', { class: 'where' }, back), h('h1', null, `${changesOf(line)[at.change]?.name ?? 'This change'} is not watched in ${zonesOf(line)[at.zone]?.name ?? 'this zone'}.`), refused ? h('p', null, sentence(refused.message)) : null);
  }
  const lever = leverOf(state);
  const k = a.coverage_factor;
  const figure = figureOf(finding, lever);
  const before = findingBefore(state, finding);
  const laptop = f.roomy;
  const wideWidth = laptop ? f.width - 292 - 34 : f.width;
  const st = standing(finding.standing);
  const row = a.findings.filter((x) => x.change_index === at.change);
  const column = a.findings.filter((x) => x.zone_index === at.zone && x.change_index !== at.change);
  const steps = [row[row.indexOf(finding) - 1] ?? null, row[row.indexOf(finding) + 1] ?? null];
  const nextChange = a.findings.find((x) => x.zone_index === at.zone && x.change_index > at.change) ?? a.findings.find((x) => x.zone_index === at.zone && x.change_index < at.change);
  const lev = finding.levers.find((l) => l.lever === lever);
  return h('main', { id: 'main', class: 'cell-view', 'aria-label': `${finding.change} in ${finding.zone}` },
    laptop ? others(state, act, finding, row, column, lever, k, back) : null,
    h('article', { class: 'one-cell', 'data-key': 'article' },
      h('div', { class: 'where' }, laptop ? null : back, h('span', { class: 'q' }, line.name),
        h('span', { class: 'steps' },
          steps[0] ? button(`‹ ${steps[0].zone_index + 1} ${steps[0].zone}`, () => act.openCell(/** @type {Finding} */ (steps[0]).zone_index, at.change), 'text', { 'aria-label': `Zone before, ${steps[0].zone}` }) : null,
          steps[1] ? button(`${steps[1].zone_index + 1} ${steps[1].zone} ›`, () => act.openCell(/** @type {Finding} */ (steps[1]).zone_index, at.change), 'text', { 'aria-label': `Next zone, ${steps[1].zone}` }) : null,
          nextChange ? button(`${say(nextChange.change)} ⌄`, () => act.openCell(at.zone, nextChange.change_index), 'text', { 'aria-label': `Next change in this zone, ${nextChange.change}` }) : null)),
      h('h1', null, sentence(finding.sentence || `${finding.change} in ${finding.zone}: ${st.word}`)),
      h('p', { class: 'eqline' }, h('b', null, `${finding.wish === 'avoid' ? 'Avoid' : 'Want'}: `), equation(finding.equation), '. ', judged(finding), changesOf(line)[at.change]?.tolerated ? ' The site tolerates it.' : ''),
      h('div', { class: 'picks' }, leverPick(state, act), doubtPick(state, act), h('span', { class: `standing s-${st.tone}` }, chipMark(finding.standing), `${st.word}: ${st.meaning}`)),
      bigGauge(document, { figure, before: before ? figureOf(before, lever) : null, beforeWord: beforeWord(state), standing: finding.standing, lever, width: wideWidth, k }),
      finding.standing === 'no data' ? noData(finding, act, at) : h('div', { class: 'halves' },
        levers(state, act, finding),
        doubt(finding, lev, k),
        remedies(state, act, finding),
        finding.course.length ? course(finding) : null,
        shifted(finding),
        byHand(finding),
        takenAs(finding)),
      finding.notes.length ? h('ul', { class: 'findnotes' }, finding.notes.map((t) => h('li', null, sentence(t)))) : null,
      a.cautions.map((c) => h('p', { class: 'gas' }, h('b', null, `${c.title}. `), say(c.text)))),
    h('p', { class: 'drawing' }, h('span', null, 'What can happen, not how fast. Air, steam and open doors are never proposed.'), h('span', null, `${line.invented ? 'Invented line. ' : ''}Data ${a.data_version}`)));
}

/** @param {Finding} f */
const judged = (f) => (f.judged_why ? `Judged at ${celsius(f.judged_at_K)}, ${say(f.judged_why)}.` : `At ${celsius(f.judged_at_K)}.`);

/** @param {State} state @param {Act} act @param {Finding} finding @param {Finding[]} row @param {Finding[]} column @param {string} lever @param {number} k @param {HTMLElement} back */
function others(state, act, finding, row, column, lever, k, back) {
  const span = scaleOf(row, lever, k);
  const unit = unitOf(row, lever);
  const scale = span && unit ? `; ±${withUnit(number(span, 3), difference(unit))}` : '';
  const label = finding.levers.find((l) => l.lever === lever)?.label ?? 'kJ of dG';
  return h('aside', { class: 'others', 'aria-label': `${finding.change}, every zone`, 'data-key': 'others' },
    h('div', { class: 'top' }, back),
    h('h2', null, say(finding.change)),
    h('p', { class: 'sub' }, `${finding.wish === 'avoid' ? 'Avoid' : 'Want'}. Leeway in ${lowerLabel(label)}${scale}`),
    row.map((x) => {
      const figure = figureOf(x, lever);
      const was = findingBefore(state, x);
      const s = sayFigure(figure);
      const st = standing(x.standing);
      return h('button', { type: 'button', class: `one${x === finding ? ' held' : ''}`, 'aria-current': x === finding ? 'true' : null, 'data-key': `o-${x.zone_index}`, onclick: () => act.openCell(x.zone_index, x.change_index) },
        h('span', { class: `say s-${st.tone}` }, h('span', { class: 'tabname' }, `${x.zone_index + 1} ${x.zone}`), h('span', { class: 'q' }, celsius(x.judged_at_K)), h('b', { class: figure.kind === 'turns' ? '' : 'small' }, s.big), st.short),
        gauge(document, { figure: inUnit(figure, unit), before: was ? inUnit(figureOf(was, lever), unit) : null, standing: x.standing, span, width: 276, k }));
    }),
    column.length ? h('h2', { class: 'next' }, `In ${finding.zone} `, h('small', null, 'the other changes')) : null,
    column.map((x) => {
      const s = sayFigure(figureOf(x, lever));
      const st = standing(x.standing);
      return h('button', { type: 'button', class: 'go', 'data-key': `g-${x.change_index}`, onclick: () => act.openCell(x.zone_index, x.change_index) }, h('span', { class: 'gname' }, say(x.change)), h('b', { class: `s-${st.tone}` }, chipMark(x.standing), s.big === 'no turn' ? '' : s.big), h('span', { class: `s-${st.tone}` }, st.short));
    }));
}

/** @param {string} t */
const lowerLabel = (t) => (/^[A-Z][a-z]+ /.test(t) || t === 'Temperature' || t === 'Pressure' ? t[0].toLowerCase() + t.slice(1) : formulas(t));

/** @param {State} state @param {Act} act @param {Finding} finding */
function levers(state, act, finding) {
  const chosen = leverOf(state);
  const notOffered = finding.levers.filter((l) => l.why_not && l.turning_points.length);
  return h('section', { class: 'wide', 'data-key': 'levers' },
    h('h2', null, 'Levers ', h('small', null, 'one at a time; leeway rounded against you')),
    h('div', { class: 'tablewrap', tabindex: 0, role: 'region', 'aria-label': 'Levers' },
      h('table', { class: 'lev' },
        h('thead', null, h('tr', null, ['lever', 'reading', 'turns at', 'leeway', 'in u', 'held'].map((t) => h('th', { scope: 'col' }, t)))),
        h('tbody', null, finding.levers.map((l) => {
          const label = formulas(l.label);
          const name = l.lever.startsWith('activity') ? h('td', null, label) : h('td', null, h('button', { type: 'button', class: 'cellname', 'aria-pressed': String(l.lever === chosen), onclick: () => act.lever(l.lever) }, label));
          if (l.leeway === null) return h('tr', null, name, h('td', null, value(l.reading, l.unit)), h('td', { colspan: 3, class: 'noturn' }, say(l.why_not || 'no turn')), h('td', null, say(l.held)));
          return h('tr', null, name, h('td', null, turnLike(l.reading, l.unit)), h('td', null, l.turning_points.map((t) => turn(t, l.unit)).join(', ')), h('td', null, h('b', null, withUnit(leeway(l.leeway, l.unit), difference(l.unit)))), h('td', null, l.leeway_u === null ? '–' : fixed(l.leeway_u, 1)), h('td', null, say(l.held)));
        })))),
    notOffered.length ? h('p', { class: 'note q' }, notOffered.map((l) => `${formulas(l.label)}: ${say(l.why_not)}`).join('. '), '.') : null);
}

/** @param {number} x @param {string} u */
const turnLike = (x, u) => (u === 'fraction' ? number(x, 3) : value(Number(x.toPrecision(7)), u));

/** @param {Finding} finding @param {import('../types.js').Lever | undefined} lev @param {number} k */
function doubt(finding, lev, k) {
  const main = finding.budget.filter((b) => b.share >= 0.005);
  const most = Math.max(...main.map((b) => b.share), 0.01);
  const rest = finding.budget.length - main.length;
  // Shares are rounded so that they add up to 100.
  const shown = wholes(main.map((b) => b.share));
  return h('section', { class: 'doubt', 'data-key': 'doubt' },
    h('h2', null, 'Doubt ', h('small', null, `u = ${[lev?.u != null ? `${withUnit(number(lev.u, 2), difference(lev.unit))} of ${lowerLabel(lev.label)}` : '', finding.u_dG_kJ === null ? '' : withUnit(number(finding.u_dG_kJ, 3), 'kJ')].filter(Boolean).join(', ')}; k\u00a0=\u00a0${k}`)),
    h('ol', { class: 'bars' }, main.map((b, i) => h('li', null, h('span', { class: 'q' }, say(b.source.replace(`, ${finding.zone}`, ''))), h('span', { class: 'bartrack', 'aria-hidden': 'true' }, h('i', { css: `width:${((b.share / most) * 100).toFixed(1)}%` })), h('b', null, withUnit(String(shown[i]), '%'))))),
    rest > 0 ? h('p', { class: 'note q' }, `${rest} more below half a per cent.`) : null,
    h('p', { class: 'note' }, finding.chance_wrong === null ? null : ['Chance that the sign is wrong: ', h('b', null, chance(finding.chance_wrong)), '. '], finding.measure_next ? say(finding.measure_next) : 'Nothing more to measure here: the doubt does not decide.'));
}

/** Percentages that add up to what they are of. @param {number[]} shares */
export function wholes(shares) {
  const total = Math.round(shares.reduce((a, b) => a + b, 0) * 100);
  const floors = shares.map((v) => Math.floor(v * 100));
  let left = total - floors.reduce((a, b) => a + b, 0);
  const order = shares.map((v, i) => ({ i, r: v * 100 - Math.floor(v * 100) })).sort((a, b) => b.r - a.r);
  for (const { i } of order) if (left > 0) { floors[i] += 1; left -= 1; }
  return floors;
}

/** @param {State} state @param {Act} act @param {Finding} finding */
function remedies(state, act, finding) {
  const bad = finding.standing === 'off side' || finding.standing === 'too close to call';
  const line = lineOnShow(state);
  return h('section', { class: 'wide', 'data-key': 'remedies' },
    h('h2', null, (finding.leeway_kJ ?? 0) >= 0 && finding.remedies.length ? 'What puts it beyond doubt ' : 'What brings it back ', h('small', null, 'rounded to the safe side')),
    !finding.remedies.length ? h('p', { class: 'note q' }, bad ? 'No lever that may be turned brings it back by itself.' : 'Nothing to bring back: it stands as you wish.') :
    h('div', { class: 'mend' }, finding.remedies.map((r, i) => {
      const target = leverTarget(line, finding.zone_index, r.lever);
      const says = value(r.beyond_doubt, r.unit);
      return [h('p', null, h('b', null, `${i ? 'Or ' : ''}${say(i ? lowerLabel(r.sentence) : r.sentence)}`), h('small', null, (finding.leeway_kJ ?? 0) >= 0 ? `puts it beyond doubt; now ${value(Number(r.from.toPrecision(7)), r.unit)}` : `${turn(r.just_turns, r.unit)} only just turns; now ${value(Number(r.from.toPrecision(7)), r.unit)}`)),
        target ? button(`Try ${says}`, () => act.tryValue(target, `${r.beyond_doubt} ${r.unit}`, `${r.label} ${says} in ${finding.zone}`), `btn${i ? '' : ' main'}`) : h('span')];
    })));
}

/** Stretches of a course with one standing. @param {Finding} finding */
export function stretches(finding) {
  /** @type {{standing: string, from: number, to: number}[]} */
  const list = [];
  for (const p of finding.course) {
    const last = list.at(-1);
    if (last && last.standing === p.standing) last.to = p.temperature_K;
    else {
      // The place where it grows too slow is known; other ends are those of the points computed.
      const slow = finding.acts_above_K;
      const paper = p.standing === 'on paper' || last?.standing === 'on paper';
      const end = last && slow != null && paper && (slow - last.to) * (slow - p.temperature_K) <= 0 ? slow : p.temperature_K;
      if (last) last.to = end;
      list.push({ standing: p.standing, from: end, to: p.temperature_K });
    }
  }
  return list;
}

/** @param {Finding} finding */
function course(finding) {
  const past = finding.seconds_past_turn;
  return h('section', { class: 'wide', 'data-key': 'course' },
    h('h2', null, 'On the way ', h('small', null, 'along the course, as travelled')),
    h('ul', { class: 'course' }, stretches(finding).map((p) => h('li', { class: `s-${standing(p.standing).tone}` }, chipMark(p.standing), h('b', null, `${celsius(p.from)} to ${celsius(p.to)}`), h('span', null, standing(p.standing).word)))),
    past != null ? h('p', { class: 'note' }, `${withUnit(number(past, 3), 's')} are spent past the turn before it is too slow`, finding.allowed_s != null ? `; ${withUnit(number(finding.allowed_s, 3), 's')} are allowed.` : '.') : null,
    finding.acts_above_K != null ? h('p', { class: 'note q' }, `Below ${celsius(finding.acts_above_K)} it is known to be too slow.`) : null);
}

/** @param {Finding} finding */
function shifted(finding) {
  const sh = finding.shifted;
  const gases = (/** @type {Record<string, number>} */ p) => Object.entries(p).filter(([, v]) => v > 1e-12).sort((a, b) => b[1] - a[1]).slice(0, 5).map(([g, v]) => `${formulas(g)} ${number(v, 3)}`).join(', ');
  return h('section', { class: 'shifted', 'data-key': 'shifted' },
    h('h2', null, 'As read and shifted'),
    !sh ? h('p', { class: 'note' }, 'Nothing in this gas shifts at this temperature: as read and shifted are the same.') :
    [h('p', { class: 'note' }, h('b', null, sh.standing === finding.standing ? 'The standing is the same. ' : `The standing differs: ${sh.standing} once shifted. `), sentence(sh.how)),
      h('table', { class: 'calc' }, h('tbody', null,
        h('tr', null, h('td', null, 'as read'), h('td', null, standing(finding.standing).word), h('td', null, withUnit(fixed(finding.dG_kJ ?? 0, 1), 'kJ'))),
        h('tr', null, h('td', null, 'shifted'), h('td', null, standing(sh.standing).word), h('td', null, withUnit(fixed(sh.dG_kJ, 1), 'kJ'))))),
      h('p', { class: 'note q' }, `Shifted, bar: ${gases(sh.partial_pressures_bar)}.`)]);
}

/** @param {Finding} finding */
function byHand(finding) {
  const a = finding.arithmetic;
  if (!a) return null;
  const plus = (/** @type {number} */ v) => `${v > 0 ? '+' : ''}${fixed(v, 2)}${THIN}kJ`;
  const used = finding.used.map((u) => `${formulas(u.formula)}(${u.phase})`).join(', ');
  return h('section', { class: 'wide', 'data-key': 'byhand' },
    h('h2', null, 'By hand ', h('small', null, `per mole as written, at ${fixed(a.temperature_K, 2)}${THIN}K`)),
    h('table', { class: 'calc' }, h('tbody', null,
      h('tr', null, h('td', null, 'dG°'), h('td', null, `${used}; dH° ${fixed(a.dH0_kJ, 2)}${THIN}kJ, dS° ${fixed(a.dS0_J_per_K, 2)}${THIN}J/K`), h('td', null, plus(a.dG0_kJ))),
      h('tr', null, h('td', null, 'Q'), h('td', null, `${say(a.q_symbols)} = ${say(a.q_numbers)}`), h('td', null, `ln Q ${fixed(a.ln_q, 4)}`)),
      h('tr', null, h('td', null, 'RT ln Q'), h('td', null, `8.31446 · ${fixed(a.temperature_K, 2)} · ${fixed(a.ln_q, 4)} / 1${THIN}000`), h('td', null, plus(a.RT_ln_Q_kJ))),
      h('tr', null, h('td', null, 'dG'), h('td', null, `${fixed(a.dG0_kJ, 2)} ${a.RT_ln_Q_kJ < 0 ? '−' : '+'} ${fixed(Math.abs(a.RT_ln_Q_kJ), 2)}; ${a.dG_kJ < 0 ? 'negative: it goes' : 'positive: it does not go'}`), h('td', null, plus(a.dG_kJ))))),
    finding.driving_force_per_mole_kJ !== null && finding.per_mole_of ? h('p', { class: 'note q' }, `Driving force ${plus(finding.driving_force_per_mole_kJ)} per mole of ${formulas(finding.per_mole_of)}.`) : null);
}

/** @param {Finding} finding */
function takenAs(finding) {
  const cites = [...new Map(finding.used.map((u) => [u.source, u.cite]))];
  return h('section', { class: 'taken', 'data-key': 'taken' },
    h('h2', null, 'Taken as'),
    h('ul', { class: 'takenlist' }, finding.used.map((u) => h('li', null, h('b', null, formulas(u.formula)), ` ${u.phase}, ${u.state === 'g' ? `${number(u.activity, 4)}${THIN}bar` : `activity ${number(u.activity, 3)}`}: ${say(u.activity_from)}. ${u.source}, ±${number(u.u_kJ, 2)}${THIN}kJ${u.extrapolated ? ', beyond its fitted range' : ''}.`))),
    h('details', null, h('summary', null, 'Sources'), h('ul', { class: 'takenlist' }, cites.map(([name, cite]) => h('li', null, h('b', null, name), `: ${cite}`)))));
}

/** @param {Finding} finding @param {Act} act @param {{zone: number, change: number}} at */
function noData(finding, act, at) {
  return h('div', { class: 'nodata' }, h('p', null, h('b', null, 'No data. '), finding.notes[0] ? sentence(finding.notes[0]) : sentence(finding.sentence)),
    h('div', { class: 'keys' }, button(`Change the readings of ${finding.zone}`, () => act.panel('zone', at.zone), 'btn'), button('Change the equation', () => act.panel('change', at.change), 'btn'), button('Change the charge', () => act.panel('charge', 0), 'btn')));
}
