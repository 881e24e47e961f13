/** Holds the state, tells those who listen, and keeps the work in the browser's storage where it allows. */

/** @typedef {import('./types.js').State} State */

const KEY = 'leeway.work.1';

/** @param {State} first */
export function createStore(first) {
  let state = first;
  /** @type {((state: State, was: State) => void)[]} */
  const listeners = [];
  return {
    get: () => state,
    /** @param {(state: State) => State} change */
    set(change) {
      const was = state;
      state = change(state);
      if (state !== was) for (const listen of listeners) listen(state, was);
    },
    /** @param {(state: State, was: State) => void} listen */
    listen: (listen) => void listeners.push(listen),
  };
}

/** Keeps the work; `false` where the browser refuses. @param {State} state @param {Storage | null} storage */
export function keep(state, storage) {
  try {
    if (!storage) return false;
    const { doc, fileName, savedAt, demo } = state;
    storage.setItem(KEY, JSON.stringify({ doc, fileName, savedAt, demo, unsaved: doc.line !== state.saved }));
    return true;
  } catch {
    return false;
  }
}

/** The work kept before, if any. @param {Storage | null} storage @returns {{doc: import('./types.js').Doc, fileName: string, savedAt: string, demo: string | null, unsaved: boolean} | null} */
export function kept(storage) {
  try {
    const text = storage?.getItem(KEY);
    const found = text ? JSON.parse(text) : null;
    return found?.doc?.line ? found : null;
  } catch {
    return null;
  }
}

/** The browser's storage, or `null` where it is closed to this page. */
export function storageOf() {
  try {
    const { localStorage } = window;
    localStorage.setItem('leeway.try', '1');
    localStorage.removeItem('leeway.try');
    return localStorage;
  } catch {
    return null;
  }
}
