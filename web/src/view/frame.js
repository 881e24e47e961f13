/** Sizes that drawings need before they are made, and small parts that views share. */
import { h, s } from '../dom.js';
import { formulas, NARROW } from '../format.js';
import { mark } from '../chart/mark.js';

let onPaper = false;
/** Drawings are made for A4 while the page is printed. @param {boolean} now */
export const paper = (now) => { onPaper = now; };

/** Width of the content and how it is laid out. */
export function frame() {
  if (onPaper) return { page: 1400, width: 1205, phone: false, tablet: false, roomy: true, tall: false, paper: true, label: 200 };
  const page = document.documentElement.clientWidth;
  const rail = page >= 900 ? 168 : 0;
  const pad = page < 700 ? 32 : 48;
  return { page, width: page - rail - pad, phone: page < 700, tablet: page < 900, roomy: page >= 1280, tall: window.innerHeight >= 880, paper: false, label: page >= 1280 ? 200 : page >= 1100 ? 186 : page >= 900 ? 168 : 0 };
}

/** @param {string} d @param {string} [cls] */
export const glyph = (d, cls = 'glyph') => s(document, 'svg', { class: cls, viewBox: '0 0 22 22', 'aria-hidden': 'true' }, s(document, 'path', { d }));

export const logo = () =>
  s(document, 'svg', { viewBox: '0 0 16 16', fill: 'currentColor', 'aria-hidden': 'true' }, s(document, 'path', { d: 'M7 .5h2v15H7zM9 5.5l5-5v1.7l-5 5zM9 9.65l5-5v1.7l-5 5zM9 13.8l5-5v1.7l-5 5z' }), s(document, 'circle', { cx: 3.1, cy: 8, r: 2.6 }));

/** A standing's mark beside words. @param {string} standing */
export const chipMark = (standing) => s(document, 'svg', { class: 'mk', viewBox: '-1 0 20 20', 'aria-hidden': 'true' }, mark(document, standing, 11, 10, 0.85));

/** @param {string} label @param {() => void} act @param {string} [cls] @param {Record<string, any>} [more] */
export const button = (label, act, cls = 'btn', more = {}) => h('button', { type: 'button', class: cls, onclick: act, ...more }, label);

/** A sentence of the engine. @param {string} text */
export const say = (text) => formulas(text).replace(/(?<=\d) (?=000|\d{3}\b)/g, NARROW);

/** What is wrong, beside where it is. @param {import('../types.js').Problem} p @param {((text: string) => void) | null} [answer] */
export function trouble(p, answer = null) {
  const ready = answer && p.code.startsWith('entry');
  return h('div', { class: 'trouble', role: 'alert' },
    h('p', null, h('b', null, sentence(p.message))),
    p.place && !/^character/.test(p.place) ? h('p', { class: 'q' }, sentence(p.place)) : null,
    p.hints.length && !ready ? h('p', { class: 'q' }, p.hints.map((x) => sentence(x)).join(' ')) : null,
    p.hints.length && ready ? h('div', { class: 'answers' }, p.hints.map((hint) => h('button', { type: 'button', class: 'btn small', onclick: () => answer(hint) }, hint))) : null);
}

/** A sentence with its capital and its stop. @param {string} text */
export const sentence = (text) => {
  const t = say(text.trim());
  if (!t) return '';
  return t[0].toUpperCase() + t.slice(1) + (/[.!?:]$/.test(t) ? '' : '.');
};

/** @typedef {import('../types.js').State} State */
/** @typedef {import('../main.js').Act} Act */
