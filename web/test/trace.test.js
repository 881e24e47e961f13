import assert from 'node:assert/strict';
import { test } from 'node:test';
import { along, trace, turnOf } from '../src/chart/trace.js';
import { finding, paper } from './paper.js';

const temperature = (at, off = 'below', reading = 900) => ({ levers: [{ lever: 'temperature', label: 'Temperature', unit: 'C', reading, turning_points: [at], leeway: reading - at, leeway_u: 3, u: 10, off_side: off, searched: [0, 2000], held: '', allowed: true, why_not: '', u_reading: 2 }] });
const bay = (name, from, to, f) => ({ name, from, to, finding: f, before: null });
const draw = (bays, width = 1150) => trace(paper, { bays, change: 'Chromium oxidises', charge: 'strip', width, height: 150, label: 200, beforeWord: '' });

test('a place on a course follows from its ends, either way', () => {
  assert.equal(along(bay('c', 1000, 100), 550), 0.5);
  assert.equal(along(bay('h', 100, 1000), 550), 0.5);
  assert.equal(along(bay('h', 100, 1000), 1100), null);
  assert.equal(along(bay('flat', 900, null), 900), null);
});

test('the turning line is hatched on the side where the wish fails', () => {
  const f = finding({ ...temperature(850) });
  assert.deepEqual(turnOf(f), { at: 850, off: 'below' });
  for (const off of ['above', 'below']) {
    const svg = draw([bay('a', 900, null, finding(temperature(850, off))), bay('b', 950, null, finding(temperature(850, off)))]);
    const line = svg.of('turnline').map((e) => e.attributes.d)[0];
    const y = Number(line.split(' ')[1].split('H')[0]);
    const hatch = svg.of('hatch')[0].attributes;
    if (off === 'below') assert.ok(Math.abs(Number(hatch.y) - y) < 1e-6);
    else assert.ok(Math.abs(Number(hatch.y) + Number(hatch.height) - y) < 1e-6);
  }
});

test('a turning line shared by neighbours is drawn once', () => {
  const svg = draw([1, 2, 3].map((i) => bay(`z${i}`, 800 + i * 50, null, finding(temperature(850)))));
  assert.equal(svg.of('hatch').length, 1);
});

test('hotter stands higher, and every zone has its mark', () => {
  const svg = draw([bay('a', 700, null, finding({ ...temperature(600) })), bay('b', 1000, null, finding({ ...temperature(600) }))]);
  const [a, b] = svg.of('f-on').map((e) => Number(e.attributes.cy));
  assert.ok(b < a);
});

test('the drawing says in words what it shows', () => {
  const svg = draw([bay('Heat', 700, null, finding(temperature(850, 'below', 700))), bay('Cool', 1000, 80, finding({ ...temperature(850), standing: 'off side' }))]);
  const says = svg.attributes['aria-label'];
  for (const part of ['Heat at 700', 'Cool from 1000 to 80', 'off side', 'turns at 850']) assert.ok(says.includes(part), part);
});

test('words on the trace stay inside it and off each other', () => {
  for (const width of [820, 1150, 1150 + 400]) {
    const course = [1100, 1000, 900, 800, 700, 600, 500].map((t) => ({ temperature_K: t + 273.15, dG_kJ: t - 850, standing: t > 850 ? 'on side' : 'off side' }));
    const svg = draw([bay('a', 700, null, finding({ standing: 'off side', ...temperature(753, 'below', 700) })), bay('b', 900, null, finding(temperature(883))), bay('c', 1050, null, finding(temperature(883))), bay('d', 1100, 80, finding({ standing: 'off side', ...temperature(883), judged_at_K: 1077, judged_why: '8 s before 500 C', acts_above_K: 773.15, allowed_s: 8, course }))], width);
    const boxes = svg.all().filter((e) => e.nodeName === 'text' && /halo/.test(e.attributes.class ?? '')).map((e) => {
      const text = e.words().join('');
      const w = text.length * 6.4;
      const x = Number(e.attributes.x);
      const from = e.attributes['text-anchor'] === 'middle' ? x - w / 2 : e.attributes['text-anchor'] === 'end' ? x - w : x;
      return { text, from, to: from + w, y: Number(e.attributes.y) };
    });
    for (const b of boxes) assert.ok(b.from >= 195 && b.to <= width + 4, `“${b.text}” leaves the drawing: ${b.from} to ${b.to} of ${width}`);
    boxes.forEach((b, i) => boxes.slice(i + 1).forEach((c) => assert.ok(b.to <= c.from + 2 || c.to <= b.from + 2 || Math.abs(b.y - c.y) >= 12, `“${b.text}” and “${c.text}” meet at ${width}`)));
  }
});
