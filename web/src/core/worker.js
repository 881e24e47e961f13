/* The only file that names the engine's exports. It answers {id, method, args} with {id, answer} or {id, problem}; after a trap it says so and is of no more use. */

/** @type {any} */
const bindgen = /** @type {any} */ (globalThis)['wasm_bindgen'];
/** @type {any} */
let session = null;

/** @type {Record<string, (args: any[]) => unknown>} */
const methods = {
  dataVersion: () => session.dataVersion(),
  assess: ([text]) => session.assess(text),
  propose: ([text]) => session.propose(text),
  change: ([asked]) => session.change(asked),
  substances: ([query]) => session.substances(query),
  substance: ([formula]) => session.substance(formula),
  readEntry: ([asked]) => session.readEntry(asked),
  open: ([bytes]) => session.open(bytes),
  variant: ([text, name]) => session.variant(text, name),
  crash: () => session.crash(),
};

self.onmessage = ({ data }) => {
  const { id, method, args } = data;
  try {
    if (method === 'start') {
      bindgen.initSync({ module: new Uint8Array(args[0]) });
      session = new bindgen.Session();
      self.postMessage({ id, answer: session.dataVersion() });
      return;
    }
    self.postMessage({ id, answer: methods[method](args) });
  } catch (error) {
    const thrown = /** @type {any} */ (error);
    if (thrown && thrown.problem) self.postMessage({ id, problem: thrown.problem });
    else self.postMessage({ id, trapped: String(thrown && thrown.message ? thrown.message : thrown) });
  }
};
