/** The rail, the bar below it on a tablet, and what must be told. */
import { h } from '../dom.js';
import { unsaved } from '../state.js';
import { board } from './board.js';
import { cell } from './cell.js';
import { button, frame, glyph, logo, sentence } from './frame.js';
import { panel } from './panel.js';
import { substances } from './substances.js';

/** @typedef {import('../types.js').State} State */
/** @typedef {import('../main.js').Act} Act */

const BOARD = 'M2 5h18v12H2zM8 5v12M14 5v12M2 11h18';
const SUBSTANCES = 'M3 3v16h16M5 16c3 0 4-9 13-11M5 18c5-1 9-4 13-5';
const MORE = 'M3 6h16M3 11h16M3 16h16';

/** @param {State} state */
export function fileWords(state) {
  if (unsaved(state)) return state.storage === false ? 'not saved' : 'not saved to a file';
  if (state.savedAt) return `saved ${state.savedAt} to file`;
  if (state.fileName) return `from ${state.fileName}`;
  return state.doc.line.invented ? 'invented line' : 'nothing to save';
}

/** @param {State} state @param {Act} act */
export function shell(state, act) {
  const f = frame();
  const item = (/** @type {string} */ view, /** @type {string} */ d, /** @type {string} */ label) => h('li', null, h('button', { type: 'button', 'aria-current': state.view === view || (view === 'board' && state.view === 'cell') ? 'page' : null, onclick: () => act.go(view) }, glyph(d), label));
  const view = state.view === 'cell' ? cell : state.view === 'substances' ? substances : board;
  return h('div', { id: 'page', class: 'frame' },
    h('a', { class: 'skip', href: '#main', onclick: (/** @type {Event} */ e) => { e.preventDefault(); document.querySelector('#main h1')?.scrollIntoView(); /** @type {HTMLElement | null} */ (document.querySelector('#main button, #main input'))?.focus(); } }, 'To the findings'),
    h('nav', { class: 'rail', 'aria-label': 'Views', 'data-key': 'rail' },
      h('div', { class: 'brand' }, logo(), 'Leeway'),
      h('ul', { class: 'views' }, item('board', BOARD, 'Board'), f.tablet ? item('substances', SUBSTANCES, 'Substances') : null,
        f.tablet ? h('li', null, h('button', { type: 'button', onclick: act.undo, disabled: !state.past.length && !state.edit }, glyph('M8 5L3 10l5 5M3 10h10a5 5 0 0 1 0 10h-2'), 'Undo')) : null,
        f.tablet ? h('li', null, h('button', { type: 'button', 'aria-expanded': String(state.panel?.kind === 'more'), onclick: () => act.panel('more', 0) }, glyph(MORE), 'More')) : null),
      f.tablet ? null : h('ul', { class: 'second' }, item('substances', SUBSTANCES, 'Substances')),
      f.tablet ? null : h('div', { class: 'file' },
        h('b', null, state.doc.line.name), h('span', { role: 'status' }, fileWords(state)),
        h('div', null, button('Lines', () => act.panel('lines', 0), ''), button('Open', act.open, ''), button('Save', act.save, '')),
        h('div', null, button('Undo', act.undo, '', { disabled: !state.past.length && !state.edit, title: state.edit ? 'Take back what is typed (Ctrl Z)' : state.past.length ? `Undo: ${state.doc.what} (Ctrl Z)` : 'Nothing to undo' }), button('Redo', act.redo, '', { disabled: !state.future.length, title: state.future.length ? `Redo: ${state.future[0].what} (Ctrl Shift Z)` : 'Nothing to redo' }), button('About', () => act.panel('about', 0), '')))),
    h('div', { class: 'content', 'data-key': 'content' },
      state.notices.map((n) => h('div', { class: 'notice', role: 'alert', 'data-key': `n-${n.id}` },
        h('p', { class: 'say' }, n.title), n.text ? h('p', null, n.text) : null,
        n.problem ? h('dl', null, n.file ? [h('dt', null, 'File'), h('dd', null, n.file)] : null,
          n.problem.place || n.problem.at ? [h('dt', null, 'Place'), h('dd', null, n.problem.at ? h('code', null, n.problem.at) : null, n.problem.at && n.problem.place ? ' ' : null, n.problem.place)] : null,
          n.problem.found ? [h('dt', null, 'Found'), h('dd', null, h('code', null, n.problem.found))] : [h('dt', null, 'Found'), h('dd', null, sentence(n.problem.message))],
          n.problem.expected ? [h('dt', null, 'Expected'), h('dd', null, n.problem.expected)] : null,
          n.problem.hints.length ? [h('dt', null, 'What to do'), h('dd', null, n.problem.hints.map((x) => sentence(x)).join(' '))] : null) : null,
        h('div', { class: 'keys' }, (n.keys ?? [{ label: 'I know', act: 'hear' }]).map((k) => button(k.label, () => act.notice(n.id, k.act), `btn${k.main ? ' main' : ''}`))))),
      Object.assign(view(state, act), {})),
    state.panel ? panel(state, act) : null);
}
