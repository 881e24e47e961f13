/** Opening and saving: the only place where the page meets files. */

/** @typedef {import('./types.js').Line} Line */

/** The text of a line as it is saved. @param {Line} line */
export const textOf = (line) => `${JSON.stringify(line, null, 2)}\n`;

/** A file name from the line's name. @param {Line} line */
export function nameOf(line) {
  const root = line.name.normalize('NFKD').toLowerCase().replace(/[^a-z0-9]+/g, '-').replace(/^-+|-+$/g, '').slice(0, 60);
  return `${root || 'line'}.leeway.json`;
}

/** @type {any} */
let handle = null;

/** Asks for a file. @param {(name: string, bytes: Uint8Array) => void} take @param {(problem: string) => void} fail */
export async function pick(take, fail) {
  const open = /** @type {any} */ (window).showOpenFilePicker;
  if (open && !/** @type {any} */ (window).__leewayTest) {
    try {
      const [found] = await open({ types: [{ description: 'Line of Leeway', accept: { 'application/json': ['.json'] } }] });
      const file = await found.getFile();
      handle = found;
      take(file.name, new Uint8Array(await file.arrayBuffer()));
      return;
    } catch (error) {
      if (/** @type {any} */ (error)?.name === 'AbortError') return;
      // Some places (a file address among them) refuse the picker: the plain way works there.
    }
  }
  const input = document.createElement('input');
  input.type = 'file';
  input.accept = '.json,application/json';
  input.id = 'file-input';
  input.hidden = true;
  document.querySelector('#file-input')?.remove();
  document.body.append(input);
  input.onchange = () => {
    const file = input.files?.[0];
    input.remove();
    if (file) read(file, take, fail);
  };
  input.click();
}

/** @param {File} file @param {(name: string, bytes: Uint8Array) => void} take @param {(problem: string) => void} fail */
export async function read(file, take, fail) {
  try {
    // A record of a campaign is no line; what is too large is refused before it is loaded.
    const bytes = file.size > 8_000_000 ? new Uint8Array(await file.slice(0, 4_000_001).arrayBuffer()) : new Uint8Array(await file.arrayBuffer());
    take(file.name, bytes);
  } catch {
    fail(file.name);
  }
}

/** Saves; the name it was saved under, or `null` where the user left it. @param {Line} line @returns {Promise<string | null>} */
export async function save(line) {
  const text = textOf(line);
  const name = nameOf(line);
  const picker = /** @type {any} */ (window).showSaveFilePicker;
  if (picker && !/** @type {any} */ (window).__leewayTest) {
    try {
      handle = await picker({ suggestedName: name, types: [{ description: 'Line of Leeway', accept: { 'application/json': ['.leeway.json', '.json'] } }] });
      const out = await handle.createWritable();
      await out.write(text);
      await out.close();
      return handle.name;
    } catch (error) {
      if (/** @type {any} */ (error)?.name === 'AbortError') return null;
    }
  }
  const url = URL.createObjectURL(new Blob([text], { type: 'application/json' }));
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  document.body.append(link);
  link.click();
  link.remove();
  setTimeout(() => URL.revokeObjectURL(url), 10_000);
  return name;
}
