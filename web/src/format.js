/**
 * Figures for people: a thin space before a unit and between thousands, U+2212 for minus, subscripts in
 * formulas. A leeway is rounded against the user, towards the line; a reading keeps the digits it was given.
 */

export const THIN = '\u2009';
export const NARROW = '\u202f';
const SUB = '₀₁₂₃₄₅₆₇₈₉';
const SUP = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** Minus signs and thin spaces between thousands. @param {string} text */
export function dressed(text) {
  const [whole, rest] = text.replace('-', '−').split('.');
  const grouped = whole.replace(/\d+/, (d) => (d.length > 3 ? d.replace(/\B(?=(\d{3})+$)/g, NARROW) : d));
  return rest === undefined ? grouped : `${grouped}.${rest}`;
}

/** A reading: the digits it was given, at most ten. @param {number} x */
export function reading(x) {
  if (!Number.isFinite(x)) return '–';
  const size = Math.abs(x);
  if (size !== 0 && (size < 1e-4 || size >= 1e9)) return power(x, 4);
  return dressed(String(Number(x.toPrecision(10))));
}

/** With a power of ten. @param {number} x @param {number} digits */
function power(x, digits) {
  const exponent = Math.floor(Math.log10(Math.abs(x)));
  return `${dressed(String(Number((x / 10 ** exponent).toPrecision(digits))))} × 10${raised(String(exponent))}`;
}

/** Digits raised. @param {string} text */
export const raised = (text) => [...text].map((c) => (c === '-' || c === '−' ? '⁻' : c === '.' ? '·' : c === '/' ? 'ᐟ' : SUP[Number(c)] ?? c)).join('');

/** A number with so many significant digits, trailing zeros kept away. @param {number} x @param {number} digits */
export function number(x, digits) {
  if (!Number.isFinite(x)) return '–';
  if (x === 0) return '0';
  const size = Math.abs(x);
  if (size < 1e-4 || size >= 1e7) return power(x, digits);
  return dressed(String(Number(x.toPrecision(digits))));
}

/** A number with so many decimals. @param {number} x @param {number} places */
export const fixed = (x, places) => (Number.isFinite(x) ? dressed(x.toFixed(places)) : '–');

/** A unit as people write it. @param {string} unit */
export function unit(unit) {
  if (unit === 'C') return '°C';
  if (unit === 'F') return '°F';
  if (unit === 'fraction') return '';
  return unit;
}

/** Unit of a difference. @param {string} of */
export function difference(of) {
  if (of === 'C' || of === 'K') return 'K';
  if (of === 'F') return 'F\u00a0deg';
  return unit(of);
}

/** @param {string} text @param {string} name */
export const withUnit = (text, name) => (name ? `${text}${THIN}${name}` : text);

/** A reading with its unit. @param {number} x @param {string} name as the line file writes it */
export const value = (x, name) => withUnit(reading(x), unit(name));

/** A turning point: temperatures to 0.1, else three digits. @param {number} x @param {string} name */
export function turn(x, name) {
  const text = name === 'C' || name === 'F' || name === 'K' ? dressed(String(Number(x.toFixed(Math.abs(x) >= 200 ? 0 : 1)))) : number(x, 3);
  return withUnit(text, unit(name));
}

/**
 * A leeway with its sign, rounded against the user: less where it holds, more lack where it does not.
 * @param {number} x @param {string} name unit of the lever
 */
export function leeway(x, name) {
  const size = Math.abs(x);
  const degrees = name === 'C' || name === 'F' || name === 'K' || name === 'kJ';
  const step = degrees ? (size < 100 ? 0.1 : 1) : size > 0 ? 10 ** (Math.floor(Math.log10(size)) - 1) : 1;
  const steps = Math.floor(x / step + 1e-9);
  const rounded = steps * step;
  if (degrees) {
    const sign = rounded > 0 ? '+' : '';
    return `${sign}${dressed(rounded.toFixed(size < 100 ? 1 : 0))}`.replace('−0.0', '0.0');
  }
  const sign = rounded > 0 ? '+' : '';
  return `${sign}${number(Number(rounded.toPrecision(6)), 3)}`;
}

/** Kelvin as degrees Celsius. @param {number} kelvin @param {number} [places] */
export const celsius = (kelvin, places = 0) => withUnit(fixed(kelvin - 273.15, places).replace(/^−0(\.0+)?$/, '0'), '°C');

const ELEMENT = '(?:H|He|Li|Be|B|C|N|O|F|Ne|Na|Mg|Al|Si|P|S|Cl|Ar|K|Ca|Sc|Ti|V|Cr|Mn|Fe|Co|Ni|Cu|Zn|Ga|Ge|As|Se|Br|Zr|Nb|Mo|Ru|Rh|Pd|Ag|Cd|In|Sn|Sb|Te|I|Ba|La|Ce|Hf|Ta|W|Pt|Au|Hg|Pb|Bi|U)';
const FORMULA = new RegExp(`(?<![A-Za-z])(?:${ELEMENT}(?:\\d+(?:\\.\\d+)?)?|\\((?:${ELEMENT}\\d*)+\\)\\d*)+(?![a-z])`, 'g');
const ALONE = new Set(['H2', 'O2', 'N2', 'S2', 'C2', 'P2', 'P4', 'F2', 'I2', 'O3', 'S8', 'Cl2', 'Br2']);

/** Subscripts in every formula of a text, powers raised; a name such as “P7” is left as it is. @param {string} text */
export function formulas(text) {
  return text
    .replace(/\^([−-]?[\d./]+)/g, (_, e) => raised(e))
    .replace(FORMULA, (found) => {
      if (!/\d/.test(found)) return found;
      const single = /^(?:[A-Z][a-z]?)\d+$/.test(found);
      if (single && !ALONE.has(found)) return found;
      return found.replace(/\d/g, (d) => SUB[Number(d)]);
    });
}

/** An equation with arrows and subscripts. @param {string} text */
export const equation = (text) => formulas(text).replace(/\s=\s/g, ' → ').replace(/(?<=\d) (?=[A-Z(])/g, NARROW);

/** A chance as a percentage. @param {number} p */
export const chance = (p) => (p < 0.0005 ? `less than 0.1${THIN}%` : `${number(p * 100, 2)}${THIN}%`);

/** A quantity as a person would type it: `950 C ± 4`. @param {any} q */
export function typed(q) {
  if (q === null || q === undefined) return '';
  if (typeof q === 'number') return String(q).replace('-', '−');
  const shown = String(Number(Number(q.value).toPrecision(12))).replace('-', '−');
  const name = q.unit === undefined ? '' : q.unit === 'fraction' ? '' : ` ${q.unit}`;
  const bound = q.bound === 'upper' ? '<' : '';
  return `${bound}${shown}${name}${q.tolerance !== undefined ? ` ± ${q.tolerance}` : ''}`;
}
