/**
 * The engine as promises. It runs in a worker; after a trap the worker is thrown away, another started from
 * the same bytes, and what was asked is asked once more unless it was what made the engine fall.
 *
 * @typedef {import('../types.js').Problem} Problem
 */

/** An answer of the engine that is a refusal. */
export class Refused extends Error {
  /** @param {Problem} problem */
  constructor(problem) {
    super(problem.message);
    this.problem = problem;
  }
}

/** @type {Problem} */
export const FELL = { code: 'engine.stopped', at: '', place: 'the engine', message: 'The engine stopped on this and was started again', found: '', expected: '', hints: [] };

/**
 * @param {() => Worker} make makes a worker
 * @param {ArrayBuffer} bytes of the engine
 * @param {() => void} onRestart told after each trap
 */
export function createClient(make, bytes, onRestart) {
  /** @type {Map<number, {method: string, args: any[], done: (answer: any) => void, fail: (error: Error) => void}>} */
  const open = new Map();
  let next = 1;
  /** @type {Worker} */
  let worker;

  function start() {
    worker = make();
    worker.onmessage = ({ data }) => {
      const asked = open.get(data.id);
      if (data.trapped !== undefined) return restart(data.id);
      if (!asked) return;
      open.delete(data.id);
      if (data.problem) asked.fail(new Refused(data.problem));
      else asked.done(data.answer);
    };
    worker.onerror = (event) => {
      event.preventDefault();
      restart(open.keys().next().value ?? 0);
    };
    worker.postMessage({ id: 0, method: 'start', args: [bytes] });
  }

  /** @param {number} culprit */
  function restart(culprit) {
    worker.terminate();
    const fallen = open.get(culprit);
    open.delete(culprit);
    start();
    for (const [id, { method, args }] of open) worker.postMessage({ id, method, args });
    onRestart();
    fallen?.fail(new Refused(FELL));
  }

  /** @param {string} method @param {any[]} args @returns {Promise<any>} */
  const ask = (method, args) =>
    new Promise((done, fail) => {
      const id = next++;
      open.set(id, { method, args, done, fail });
      worker.postMessage({ id, method, args });
    });

  start();
  return { ask, latest: latestOf(ask) };
}

/**
 * Asks of one kind at a time: while one is out only the newest waits, and an answer that is no longer the
 * newest is dropped.
 * @param {(method: string, args: any[]) => Promise<any>} ask
 */
export function latestOf(ask) {
  /** @type {Map<string, number>} */
  const turn = new Map();
  /** @type {Map<string, Promise<unknown>>} */
  const out = new Map();
  /** @param {string} kind @param {string} method @param {any[]} args @returns {Promise<{stale: true} | {stale: false, answer: any} | {stale: false, problem: Problem}>} */
  return async (kind, method, args) => {
    const mine = (turn.get(kind) ?? 0) + 1;
    turn.set(kind, mine);
    await out.get(kind)?.catch(() => {});
    if (turn.get(kind) !== mine) return { stale: true };
    const asked = ask(method, args);
    out.set(kind, asked);
    try {
      const answer = await asked;
      return turn.get(kind) === mine ? { stale: false, answer } : { stale: true };
    } catch (error) {
      if (turn.get(kind) !== mine) return { stale: true };
      if (error instanceof Refused) return { stale: false, problem: error.problem };
      throw error;
    }
  };
}

/** @typedef {ReturnType<typeof createClient>} Client */
