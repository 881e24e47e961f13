import assert from 'node:assert/strict';
import { test } from 'node:test';
import { Refused, createClient } from '../src/core/client.js';

/** A worker that does as it is told by its script: method to answer, refusal or trap. */
function workers(script) {
  const made = [];
  const make = () => {
    const worker = {
      seen: [], dead: false, onmessage: null, onerror: null,
      terminate() { worker.dead = true; },
      postMessage(m) {
        worker.seen.push(m);
        setTimeout(() => {
          if (worker.dead || m.method === 'start') return;
          const out = script(m, made.length);
          if (out) worker.onmessage({ data: { id: m.id, ...out } });
        }, 0);
      },
    };
    made.push(worker);
    return worker;
  };
  return { made, make };
}

test('answers find who asked, and a refusal carries its problem', async () => {
  const { make } = workers((m) => (m.method === 'bad' ? { problem: { message: 'no line', code: 'x', hints: [] } } : { answer: m.args[0] * 2 }));
  const client = createClient(make, new ArrayBuffer(0), () => {});
  assert.deepEqual(await Promise.all([client.ask('double', [1]), client.ask('double', [2])]), [2, 4]);
  await assert.rejects(client.ask('bad', []), (e) => e instanceof Refused && e.problem.message === 'no line');
});

test('after a trap another worker starts, is told once, and what else was asked is answered', async () => {
  let told = 0;
  const { made, make } = workers((m) => (m.method === 'crash' ? { trapped: 'unreachable' } : { answer: 'kept' }));
  const client = createClient(make, new ArrayBuffer(8), () => { told += 1; });
  const fell = client.ask('crash', []);
  const other = client.ask('assess', ['line']);
  await assert.rejects(fell, /started again/);
  assert.equal(await other, 'kept');
  assert.equal(told, 1);
  assert.equal(made.length, 2);
  assert.equal(made[0].dead, true);
  assert.equal(made[1].seen[0].method, 'start');
  assert.equal(await client.ask('assess', ['again']), 'kept');
});

test('of many asked at once only the newest answer counts, and few are asked', async () => {
  const { made, make } = workers((m) => ({ answer: m.args[0] }));
  const client = createClient(make, new ArrayBuffer(0), () => {});
  const answers = await Promise.all([1, 2, 3, 4, 5].map((n) => client.latest('assess', 'assess', [n])));
  assert.deepEqual(answers.map((a) => a.stale), [true, true, true, true, false]);
  assert.equal(answers[4].answer, 5);
  assert.ok(made[0].seen.length <= 3, `${made[0].seen.length} messages`);
});
