import assert from 'node:assert/strict';
import { test } from 'node:test';
import * as F from '../src/format.js';

const T = F.THIN;

test('a leeway is rounded towards the line: less where it holds, more lack where it does not', () => {
  const cases = [
    [13.99, 'C', '+13.9'], [-6.01, 'C', '−6.1'], [0.04, 'C', '0.0'], [-0.04, 'C', '−0.1'], [127.9, 'C', '+127'], [-127.1, 'C', '−128'], [78.8, 'K', '+78.8'], [5.56, 'F', '+5.5'],
    [12.34, 'kJ', '+12.3'], [-12.31, 'kJ', '−12.4'], [0.0123456, '%', '+0.012'], [-0.0123456, '%', '−0.013'], [1699, 'ppm', '+1\u202f600'], [2.66, 'bar', '+2.6'],
  ];
  for (const [x, unit, says] of cases) assert.equal(F.leeway(x, unit), says, `${x} ${unit}`);
});

test('no rounding of a leeway takes it past the line or away from it', () => {
  // Over sizes and both signs: what is shown is never more than what is.
  let x = 7;
  for (let i = 0; i < 4000; i += 1) {
    x = (x * 16807) % 2147483647;
    const v = (x / 2147483647 - 0.5) * 10 ** ((i % 9) - 3);
    for (const unit of ['C', 'bar']) {
      const shown = Number(F.leeway(v, unit).replace('−', '-').replace('\u202f', '').replace(/ × 10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)/, (_, e) => `e${[...e].map((c) => (c === '⁻' ? '-' : '⁰¹²³⁴⁵⁶⁷⁸⁹'.indexOf(c))).join('')}`));
      assert.ok(shown <= v + Math.abs(v) * 1e-6 + 1e-12, `${v} ${unit} is shown as ${shown}`);
      assert.ok(Math.abs(shown - v) <= Math.max(Math.abs(v) * 0.101, unit === 'C' ? 1 : 0), `${v} ${unit} is shown as ${shown}`);
    }
  }
});

test('a reading keeps its digits, with a thin space before the unit and U+2212 for minus', () => {
  assert.equal(F.value(-48, 'C'), `−48${T}°C`);
  assert.equal(F.value(1080, 'C'), `1\u202f080${T}°C`);
  assert.equal(F.value(99.9, '%'), `99.9${T}%`);
  assert.equal(F.value(0.1 + 0.2, 'bar'), `0.3${T}bar`);
  assert.equal(F.value(12345678, 'ppm'), `12\u202f345\u202f678${T}ppm`);
  assert.equal(F.value(0.00002, 'bar'), `2 × 10⁻⁵${T}bar`);
  assert.equal(F.value(0.25, 'fraction'), '0.25');
  assert.equal(F.reading(Number.NaN), '–');
});

test('a difference of temperatures is in K, or in F degrees', () => {
  assert.equal(F.difference('C'), 'K');
  assert.equal(F.difference('K'), 'K');
  assert.match(F.difference('F'), /^F/);
  assert.equal(F.difference('%'), '%');
});

test('formulas are set with subscripts, other words and units are not', () => {
  assert.equal(F.formulas('Cr2O3'), 'Cr₂O₃');
  assert.equal(F.formulas('2 Cr + 3 H2O'), '2 Cr + 3 H₂O');
  assert.equal(F.formulas('Ca(OH)2'), 'Ca(OH)₂');
  assert.equal(F.formulas('the H2 share in Heat 2'), 'the H₂ share in Heat 2');
  for (const plain of ['Stage 2, front', 'K4', 'IEC 60584-1', 'type K class 1', 'Shaft kiln K4', 'Heron 2']) assert.equal(F.formulas(plain), plain);
  assert.equal(F.equation('2 Cr + 3 H2O = Cr2O3 + 3 H2').replaceAll('\u202f', ' '), '2 Cr + 3 H₂O → Cr₂O₃ + 3 H₂');
});

test('a chance never reads as none', () => {
  assert.match(F.chance(0), /^less than 0\.1/);
  assert.equal(F.chance(0.5), `50${T}%`);
  assert.equal(F.chance(0.0036), `0.36${T}%`);
});

test('what is shown in a field is what would be typed into it', () => {
  assert.equal(F.typed({ value: -48, unit: 'C', tolerance: 2 }), '−48 C ± 2');
  assert.equal(F.typed({ value: 0.1, unit: '%', bound: 'upper' }), '<0.1 %');
  assert.equal(F.typed({ value: 0.75, unit: 'fraction' }), '0.75');
  assert.equal(F.typed(0.25), '0.25');
  assert.equal(F.typed(undefined), '');
});
