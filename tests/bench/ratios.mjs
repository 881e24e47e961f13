// What the benchmarks of the engine gave, as ratios to their own reference, and the process time of the command.
import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

const here = dirname(fileURLToPath(import.meta.url));
const root = join(here, '..', '..');
const folder = join(here, 'target', 'criterion');

/** Median time in ms that criterion found; it names folders after what it measured. */
function median(name) {
  const file = join(folder, name.replace(/[?"/\\*<>:|^]/g, '_'), 'new', 'estimates.json');
  if (!existsSync(file)) throw new Error(`no measurement of "${name}": ${file}`);
  return JSON.parse(readFileSync(file, 'utf8')).median.point_estimate / 1e6;
}

const show = (name, ms, reference, promised = '') =>
  console.log(`${name.padEnd(58)} ${ms.toFixed(2).padStart(8)} ms  ${(ms / reference).toFixed(2).padStart(7)} x reference${promised && `  (promised ${promised})`}`);

const loop = median('reference: a million multiply-adds');
console.log(`reference: a million multiply-adds ${loop.toFixed(2)} ms`);
for (const name of ['assess 8 zones x 12 changes', 'assess and write JSON', 'load the data']) show(name, median(name), loop);

const scratch = mkdtempSync(join(tmpdir(), 'leeway-bench-'));
const file = join(scratch, 'line.leeway.json');
writeFileSync(file, execFileSync('cargo', ['run', '--quiet', '--release', '--bin', 'line'], { cwd: here }));
const command = join(root, 'target', 'release', 'leeway');

/** From the start of a process to its end in ms, median of many. */
function processTime(words) {
  const times = [];
  for (let i = 0; i < 41; i += 1) {
    const start = performance.now();
    const { status } = spawnSync(words[0], words.slice(1), { stdio: ['ignore', 'pipe', 'inherit'] });
    if (status !== 0) throw new Error(`${words.join(' ')} ended with ${status}`);
    times.push(performance.now() - start);
  }
  return times.sort((a, b) => a - b)[20];
}

const nothing = processTime([command, '--version']);
console.log(`reference: the command started to say its version ${nothing.toFixed(2)} ms`);
show('leeway assess --json, from start to end', processTime([command, 'assess', '--json', file]), nothing, 'under 10 ms');
show('leeway assess, from start to end', processTime([command, 'assess', file]), nothing, 'under 10 ms');
rmSync(scratch, { recursive: true });
