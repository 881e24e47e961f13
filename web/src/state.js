/**
 * The page's state: one plain object, changed only by the pure functions here.
 *
 * @typedef {import('./types.js').State} State
 * @typedef {import('./types.js').Line} Line
 * @typedef {import('./types.js').Doc} Doc
 */

/** @param {Line} line @returns {State} */
export const initial = (line) => ({
  doc: { line, before: null, beforeWord: '', recipe: null, variant: null, what: '' },
  past: [], future: [], saved: line, savedAt: '', fileName: '', demo: null, storage: null,
  view: 'board', cell: null, change: -1, lever: null, edit: null, panel: null, menu: null, fields: {}, notices: [], welcome: false, confirm: null,
  shown: null, shownLine: null, compared: null, lineProblem: null, working: false,
  proposals: null, query: '', rows: null, formula: null, substance: null, phase: 0, readTemperature: null, dataVersion: '',
});

/** The line on show: the one being tried, else the one kept. @param {State} state */
export const lineOnShow = (state) => state.edit?.tentative ?? state.doc.line;
/** What it is compared with. @param {State} state */
export const lineBefore = (state) => (state.edit?.tentative ? state.doc.line : state.doc.before);
/** @param {State} state */
export const beforeWord = (state) => (state.edit?.tentative ? 'before' : state.doc.beforeWord);
/** @param {State} state */
export const unsaved = (state) => state.doc.line !== state.saved && state.doc.line !== state.doc.clean;

/** A new document, undoable. @param {State} state @param {Doc} doc @returns {State} */
export function put(state, doc) {
  return { ...state, doc, past: [...state.past, state.doc], future: [], edit: null, menu: null, confirm: null };
}

/** An edit of the line. `reading` says that it is a change of readings, which leaves a hollow mark. @param {State} state @param {Line} line @param {string} what @param {boolean} [reading] @returns {State} */
export function edited(state, line, what, reading = false) {
  if (line === state.doc.line) return { ...state, edit: null };
  const { doc } = state;
  const mark = reading ? { before: doc.variant && doc.before ? doc.before : doc.line, beforeWord: doc.variant && doc.before ? doc.beforeWord : 'before' } : { before: sameShape(doc.before, line) ? doc.before : null, beforeWord: doc.beforeWord };
  return put(state, { ...doc, ...mark, line, what });
}

/** Old marks make sense only while zones and changes are the same. @param {Line | null} a @param {Line} b */
function sameShape(a, b) {
  if (!a) return false;
  const names = (/** @type {{name: string}[] | undefined} */ list) => (list ?? []).map((x) => x.name).join('\n');
  return names(a.zones) === names(b.zones) && names(a.changes) === names(b.changes);
}

/** A variant of the recipe. @param {State} state @param {string} name @param {Line} line @returns {State} */
export function varied(state, name, line) {
  const recipe = state.doc.variant ? state.doc.recipe ?? state.doc.line : state.doc.line;
  // A variant is the file's own: showing it is no work that could be lost.
  const clean = recipe === state.saved || recipe === state.doc.clean ? line : null;
  return put(state, { line, before: recipe, beforeWord: 'as recipe', recipe, variant: name, what: name, clean });
}

/** Back to the recipe. @param {State} state @returns {State} */
export function recipe(state) {
  const { recipe: line } = state.doc;
  if (!line) return state;
  return put(state, { line, before: null, beforeWord: '', recipe: null, variant: null, what: 'Back to recipe' });
}

/** @param {State} state @returns {State} */
export function undo(state) {
  if (state.edit) return { ...state, edit: null };
  const doc = state.past.at(-1);
  if (!doc) return state;
  return settled({ ...state, doc, past: state.past.slice(0, -1), future: [state.doc, ...state.future], fields: {}, confirm: null });
}
/** @param {State} state @returns {State} */
export function redo(state) {
  const doc = state.future[0];
  if (!doc) return state;
  return settled({ ...state, doc, past: [...state.past, state.doc], future: state.future.slice(1), edit: null, fields: {}, confirm: null });
}

/** Another line altogether: its history begins anew, the old one stays one undo away. @param {State} state @param {Line} line @param {{fileName?: string, demo?: string | null, what: string}} from @returns {State} */
export function opened(state, line, from) {
  const next = put(state, { line, before: null, beforeWord: '', recipe: null, variant: null, what: from.what });
  return { ...next, saved: line, savedAt: '', fileName: from.fileName ?? '', demo: from.demo ?? null, view: 'board', cell: null, change: -1, lever: null, panel: null, fields: {}, confirm: null, lineProblem: null };
}

/** Points to things that no longer stand are let go. @param {State} state @returns {State} */
export function settled(state) {
  const zones = state.doc.line.zones?.length ?? 0;
  const changes = state.doc.line.changes?.length ?? 0;
  let next = state;
  if (next.cell && (next.cell.zone >= zones || next.cell.change >= changes)) next = { ...next, cell: null, view: next.view === 'cell' ? 'board' : next.view };
  if (next.change >= changes) next = { ...next, change: Math.max(0, changes - 1) };
  const { panel } = next;
  if (panel && ((panel.kind === 'zone' && panel.index >= zones) || (panel.kind === 'change' && panel.index >= changes))) next = { ...next, panel: null };
  return next;
}

/** @param {State} state @param {import('./types.js').Notice} notice @returns {State} */
export const told = (state, notice) => ({ ...state, notices: [...state.notices.filter((n) => n.id !== notice.id), notice] });
/** @param {State} state @param {string} id @returns {State} */
export const heard = (state, id) => ({ ...state, notices: state.notices.filter((n) => n.id !== id) });
/** @param {State} state @param {string} key @param {import('./types.js').Field | null} field @returns {State} */
export function field(state, key, field) {
  const fields = { ...state.fields };
  if (field) fields[key] = field;
  else delete fields[key];
  return { ...state, fields };
}
