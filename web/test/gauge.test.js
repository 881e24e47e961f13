import assert from 'node:assert/strict';
import { test } from 'node:test';
import { figureOf, firstLever, inUnit, leversOf, nearest, nice, scaleOf, unitOf } from '../src/chart/figure.js';
import { bigGauge, gauge, place, ticks } from '../src/chart/gauge.js';
import { STANDINGS } from '../src/chart/mark.js';
import { curve } from '../src/chart/curve.js';
import { finding, paper } from './paper.js';

const draw = (f, span, more = {}) => gauge(paper, { figure: figureOf(f, 'dew_point'), before: null, standing: f.standing, span, width: 180, k: 2, ...more });
const at = (el) => Number(el.attributes.cx ?? Number(el.attributes.x) + Number(el.attributes.width) / 2);

test('the line stands in the middle and the hatch fills the off side', () => {
  const above = draw(finding(), 20).of('hatch')[0].attributes;
  assert.equal(above.x, '90');
  assert.equal(above.width, '90');
  const below = draw(finding({ lever: { off_side: 'below', reading: -30, leeway: 8 } }), 20).of('hatch')[0].attributes;
  assert.equal(below.x, '0');
});

test('the dot stands on the hatch exactly when the leeway is negative', () => {
  for (const off of ['above', 'below']) {
    for (const d of [-19, -7, -0.5, 0.5, 7, 19]) {
      const leeway = off === 'above' ? -d : d;
      const f = finding({ standing: leeway < 0 ? 'off side' : 'on side', lever: { reading: -38 + d, off_side: off, leeway, u: 0.1 } });
      const svg = draw(f, 20);
      const dot = at(svg.of(leeway < 0 ? 'f-off' : 'f-on')[0]);
      const hatch = svg.of('hatch')[0].attributes;
      assert.equal(dot > Number(hatch.x) && dot < Number(hatch.x) + Number(hatch.width), leeway < 0, `${off} ${d}`);
    }
  }
});

test('the doubt bar crosses the line exactly when k times the doubt is more than the leeway', () => {
  for (const u of [1, 3, 5.9, 6.1, 9]) {
    const f = figureOf(finding({ lever: { u } }), 'dew_point');
    const p = place(f, 40, 300, 2);
    assert.equal(p.dot + p.bar > p.middle, 2 * u > 12, `u ${u}`);
  }
});

test('beyond the scale a dot sits at the edge with a chevron and no bar', () => {
  const svg = draw(finding({ lever: { reading: -90, leeway: 52, u: 8 } }), 20);
  const p = place(figureOf(finding({ lever: { reading: -90, leeway: 52 } }), 'dew_point'), 20, 180, 2);
  assert.equal(p.beyond, true);
  assert.ok(at(svg.of('f-on')[0]) < 30);
  const strokes = svg.of('l-on');
  assert.equal(strokes.length, 1);
  assert.match(strokes[0].attributes.d, /L4 13L/);
});

test('the mark before is left out where it would touch the mark, and drops inside the bar', () => {
  const before = (reading) => figureOf(finding({ lever: { reading } }), 'dew_point');
  assert.equal(draw(finding(), 20, { before: before(-51) }).of('was').length, 0);
  const aside = draw(finding(), 20, { before: before(-40) }).of('was')[0];
  assert.equal(aside.attributes.cy, '13');
  const inside = draw(finding({ lever: { u: 8 } }), 20, { before: before(-44) }).of('was')[0];
  assert.equal(inside.attributes.cy, '21');
});

test('each standing has a shape of its own', () => {
  const shapes = Object.keys(STANDINGS).filter((n) => n !== 'no data').map((standing) => {
    const svg = gauge(paper, { figure: figureOf(finding(), 'dew_point'), before: null, standing, span: 20, width: 180, k: 2 });
    const last = svg.children.at(-1);
    return last.all().map((e) => `${e.nodeName}.${e.attributes.class ?? ''}`).join(' ');
  });
  assert.equal(new Set(shapes).size, shapes.length);
});

test('a finding without a turning point, a reading or data still shows its standing', () => {
  const none = finding({ standing: 'off side', lever: { turning_points: [], leeway: null, u: null } });
  assert.equal(figureOf(none, 'dew_point').kind, 'no turn');
  assert.equal(draw(none, 20).of('f-off').length, 1);
  assert.equal(figureOf(finding(), 'pressure').kind, 'absent');
  const nothing = finding({ standing: 'no data', dG_kJ: null });
  assert.equal(figureOf(nothing, 'dew_point').kind, 'no data');
  assert.equal(draw(nothing, 20).of('l-nodata').length, 1);
});

test('in kJ the line is dG = 0 and the off side follows the wish', () => {
  assert.equal(figureOf(finding(), 'kJ').off, 'below');
  assert.equal(figureOf(finding({ wish: 'want' }), 'kJ').off, 'above');
});

test('the nearest of several turning points counts', () => {
  assert.equal(nearest([-70, -38, 10], -50), -38);
  assert.equal(nearest([-70, -38, 10], -60), -70);
});

test('a row has one scale that is a round number and holds whatever is urgent', () => {
  const list = [finding(), finding({ standing: 'off side', lever: { reading: -30, leeway: -8, u: 4 } }), finding({ lever: { reading: -160, leeway: 122 } })];
  const span = scaleOf(list, 'dew_point', 2);
  assert.equal(span, nice(span));
  assert.ok(span >= 8 + 2 * 4);
  assert.equal(scaleOf([finding({ lever: { turning_points: [], leeway: null } })], 'dew_point', 2), null);
  for (const [x, n] of [[0.9, 1], [1, 1], [1.1, 2], [21, 30], [31, 50], [0.0011, 0.002], [0, 1]]) assert.equal(nice(x), n);
});

test('a row read partly in per cent and partly in ppm has one scale', () => {
  const share = (reading, turn, unit) => finding({ lever: { lever: 'H2', unit, reading, turning_points: [turn], leeway: reading - turn, u: Math.abs(turn) / 10, off_side: 'below' } });
  const list = [share(0.5, 0.3, '%'), share(20, 230, 'ppm')];
  assert.equal(unitOf(list, 'H2'), '%');
  const span = scaleOf(list, 'H2', 2);
  const small = inUnit(figureOf(list[1], 'H2'), '%');
  assert.ok(Math.abs(small.d - -0.021) < 1e-12 && Math.abs(small.u - 0.0023) < 1e-12);
  assert.equal(place(small, span, 180, 2).beyond, false, '210 ppm lie inside a scale of tenths of a per cent');
  assert.equal(inUnit(small, null), small);
  const other = figureOf(share(12, 10, 'mbar'), 'H2');
  assert.equal(inUnit({ ...other, unit: 'kJ' }, '%').d, other.d, 'what does not compare keeps its own figures');
});

test('the lever to begin with is one that turns the findings', () => {
  assert.equal(firstLever([finding()]), 'dew_point');
  const temperature = { lever: 'temperature', label: 'Temperature', unit: 'C', leeway: 5, turning_points: [1] };
  const dry = { lever: 'dew_point', label: 'Frost point', unit: 'C', leeway: null, turning_points: [] };
  assert.equal(firstLever([finding({ levers: undefined }), { ...finding(), levers: [dry, temperature] }].slice(1)), 'temperature');
  assert.equal(firstLever([]), 'kJ');
  assert.deepEqual(leversOf([{ ...finding(), levers: [{ ...temperature, lever: 'activity Cr' }] }]), []);
});

test('the large gauge says all of it in words', () => {
  const f = finding({ standing: 'off side', lever: { reading: -30, leeway: -8, u: 4 } });
  const svg = bigGauge(paper, { figure: figureOf(f, 'dew_point'), before: null, beforeWord: '', standing: f.standing, lever: 'dew_point', width: 800, k: 2 });
  const says = svg.attributes['aria-label'];
  for (const part of ['−38', '−30', '−8.0', 'off side']) assert.ok(says.includes(part), `${part} in “${says}”`);
  const words = svg.words().join(' ');
  for (const part of ['drier', 'wetter', 'turns at']) assert.ok(words.includes(part), part);
});

test('words of the large gauge stay inside it and off each other, wherever dot and line stand', () => {
  for (const width of [358, 500, 820]) {
    for (const reading of [-75, -50, -39, -38.2, -37, -30, 0]) {
      for (const u of [0.5, 4, 20]) {
        const off = reading > -38;
        const f = finding({ standing: off ? 'off side' : 'on side', lever: { reading, leeway: -38 - reading, u } });
        const svg = bigGauge(paper, { figure: figureOf(f, 'dew_point'), before: null, beforeWord: '', standing: f.standing, lever: 'dew_point', width, k: 2 });
        const boxes = svg.all().filter((e) => e.nodeName === 'text' && e.attributes.y === '14').map((e) => {
          const w = e.words().join('').length * 6.6;
          const x = Number(e.attributes.x);
          const from = e.attributes['text-anchor'] === 'end' ? x - w : e.attributes['text-anchor'] === 'middle' ? x - w / 2 : x;
          return { from, to: from + w, text: e.words().join('') };
        }).sort((a, b) => a.from - b.from);
        boxes.forEach((b, i) => {
          assert.ok(b.from >= -6 && b.to <= width + 6, `“${b.text}” leaves the gauge of ${width} at ${reading}, u ${u}: ${b.from} to ${b.to}`);
          if (i) assert.ok(b.from >= boxes[i - 1].to - 4, `“${boxes[i - 1].text}” and “${b.text}” meet in ${width} at ${reading}, u ${u}`);
        });
      }
    }
  }
});

test('ticks are round numbers inside the range', () => {
  assert.deepEqual(ticks(-63, -21, 5), [-60, -50, -40, -30]);
  assert.deepEqual(ticks(0, 1, 4), [0, 0.5, 1]);
  for (const [a, z] of [[-1e-5, 3e-5], [100, 104], [0, 2e6]]) assert.ok(ticks(a, z, 5).every((t) => t >= a - 1e-12 && t <= z + 1e-12));
});

test('a curve is drawn through its points, and read where it is asked', () => {
  const c = { name: 'cr', x: [300, 400, 500], y: [10, 20, 40], main: true };
  const svg = curve(paper, { title: 'Cp', curves: [c], at: 450, width: 300 });
  assert.equal(svg.of('pen')[0].attributes.d.match(/[ML]/g).length, 3);
  assert.ok(svg.words().includes('30'));
});
