/**
 * Edits of the line: each takes a line file's object and gives a new one, sharing what it leaves alone.
 * Fields that the page does not know stay as they are.
 *
 * @typedef {import('./types.js').Line} Line
 * @typedef {import('./types.js').Zone} Zone
 * @typedef {import('./types.js').Target} Target
 * @typedef {import('./types.js').Quantity} Quantity
 */

/** @returns {Line} */
export const empty = () => ({ leeway: 1, name: 'New line', coverage_factor: 2, pressure: { value: 1.013, unit: 'bar', tolerance: 0.005 }, charge: [], zones: [], changes: [] });

/** @template T @param {T[]} list @param {number} i @param {T} item */
const withAt = (list, i, item) => list.map((was, at) => (at === i ? item : was));
/** @template {object} T @param {T} object @param {string} key @param {unknown} value `undefined` takes the key away @returns {T} */
export function withKey(object, key, value) {
  if (value === undefined) {
    const { [key]: _, ...rest } = /** @type {any} */ (object);
    return rest;
  }
  return { ...object, [key]: value };
}
/** @template T @param {T[]} list @param {number} from @param {number} to */
function moved(list, from, to) {
  if (to < 0 || to >= list.length || from === to) return list;
  const rest = list.filter((_, i) => i !== from);
  rest.splice(to, 0, list[from]);
  return rest;
}

/** @param {Line} line */ export const zonesOf = (line) => line.zones ?? [];
/** @param {Line} line */ export const changesOf = (line) => line.changes ?? [];
/** @param {Line} line */ export const chargeOf = (line) => line.charge ?? [];

/** A name that no other has: `Soak`, `Soak 2`. @param {string} wanted @param {string[]} taken */
export function freeName(wanted, taken) {
  const root = wanted.replace(/ \d+$/, '');
  if (!taken.includes(wanted)) return wanted;
  for (let n = 2; ; n += 1) if (!taken.includes(`${root} ${n}`)) return `${root} ${n}`;
}

/** @param {Line} line @param {number} i @param {Zone} zone @returns {Line} */
export const setZone = (line, i, zone) => ({ ...line, zones: withAt(zonesOf(line), i, zone) });

/** Renames a zone and every mention of it in the changes. @param {Line} line @param {number} i @param {string} name @returns {Line} */
export function renameZone(line, i, name) {
  const old = zonesOf(line)[i].name;
  const changes = changesOf(line).map((c) => (c.zones?.includes(old) ? { ...c, zones: c.zones.map((z) => (z === old ? name : z)) } : c));
  return { ...setZone(line, i, { ...zonesOf(line)[i], name }), changes };
}

/** @param {Line} line @param {number} at @param {Zone} zone @returns {Line} */
export function addZone(line, at, zone) {
  const zones = [...zonesOf(line)];
  zones.splice(at, 0, zone);
  return { ...line, zones };
}
/** @param {Line} line @param {number} i @returns {Line} */
export function copyZone(line, i) {
  const zone = zonesOf(line)[i];
  const name = freeName(zone.name, zonesOf(line).map((z) => z.name));
  const changes = changesOf(line).map((c) => (c.zones?.includes(zone.name) ? { ...c, zones: [...c.zones, name] } : c));
  return { ...addZone(line, i + 1, { ...zone, name }), changes };
}
/** Takes a zone away; a change that was watched only there goes with it. @param {Line} line @param {number} i @returns {Line} */
export function removeZone(line, i) {
  const { name } = zonesOf(line)[i];
  const changes = changesOf(line)
    .map((c) => (c.zones?.includes(name) ? { ...c, zones: c.zones.filter((z) => z !== name) } : c))
    .filter((c) => !(c.zones && c.zones.length === 0));
  return { ...line, zones: zonesOf(line).filter((_, at) => at !== i), changes };
}
/** @param {Line} line @param {number} i @param {number} to @returns {Line} */
export const moveZone = (line, i, to) => ({ ...line, zones: moved(zonesOf(line), i, to) });

/** @param {Line} line @param {import('./types.js').Change} change @returns {Line} */
export const addChange = (line, change) => ({ ...line, changes: [...changesOf(line), { ...change, name: freeName(change.name, changesOf(line).map((c) => c.name)) }] });
/** @param {Line} line @param {number} i @param {string} key @param {unknown} value @returns {Line} */
export const setChange = (line, i, key, value) => ({ ...line, changes: withAt(changesOf(line), i, withKey(changesOf(line)[i], key, value)) });
/** @param {Line} line @param {number} i @returns {Line} */
export function copyChange(line, i) {
  const change = changesOf(line)[i];
  const changes = [...changesOf(line)];
  changes.splice(i + 1, 0, { ...change, name: freeName(change.name, changes.map((c) => c.name)) });
  return { ...line, changes };
}
/** @param {Line} line @param {number} i @returns {Line} */
export const removeChange = (line, i) => ({ ...line, changes: changesOf(line).filter((_, at) => at !== i) });
/** @param {Line} line @param {number} i @param {number} to @returns {Line} */
export const moveChange = (line, i, to) => ({ ...line, changes: moved(changesOf(line), i, to) });

/** @param {Line} line @param {import('./types.js').Member} member @returns {Line} */
export const addMember = (line, member) => ({ ...line, charge: [...chargeOf(line), member] });
/** @param {Line} line @param {number} i @param {string} key @param {unknown} value @returns {Line} */
export const setMember = (line, i, key, value) => ({ ...line, charge: withAt(chargeOf(line), i, withKey(chargeOf(line)[i], key, value)) });
/** @param {Line} line @param {number} i @returns {Line} */
export const removeMember = (line, i) => ({ ...line, charge: chargeOf(line).filter((_, at) => at !== i) });
/** @param {Line} line @param {number} i @returns {Line} */
export function copyMember(line, i) {
  const charge = [...chargeOf(line)];
  charge.splice(i + 1, 0, charge[i]);
  return { ...line, charge };
}
/** @param {Line} line @param {number} i @param {number} to @returns {Line} */
export const moveMember = (line, i, to) => ({ ...line, charge: moved(chargeOf(line), i, to) });

/** @param {Zone} zone @param {string} key @param {unknown} value @returns {Zone} */
export const withGas = (zone, key, value) => ({ ...zone, gas: withKey(zone.gas ?? {}, key, value) });
/** @param {Zone} zone @param {string} formula @param {Quantity | undefined} quantity @returns {Zone} */
export const withChannel = (zone, formula, quantity) => withGas(zone, 'analysis', withKey(zone.gas?.analysis ?? {}, formula, quantity));

/** Quantity at a target, of its first zone. @param {Line} line @param {Target} target @returns {any} */
export function quantityAt(line, target) {
  const zone = zonesOf(line)[target.zones[0] ?? -1];
  switch (target.kind) {
    case 'line': return /** @type {any} */ (line)[target.field];
    case 'zone': return /** @type {any} */ (zone)?.[target.field];
    case 'gas': return /** @type {any} */ (zone?.gas)?.[target.field];
    case 'cell': return /** @type {any} */ (zone?.gas?.oxygen_cell)?.[target.field];
    case 'dew': return /** @type {any} */ (zone?.gas?.dew_point)?.[target.field];
    case 'channel': return zone?.gas?.analysis?.[target.key ?? ''];
    case 'member': return /** @type {any} */ (chargeOf(line)[target.index ?? -1])?.[target.field];
    case 'change': return /** @type {any} */ (changesOf(line)[target.index ?? -1])?.[target.field];
    default: return undefined;
  }
}

const OWN = ['value', 'unit', 'tolerance', 'tolerance_kind', 'instrument', 'over', 'basis', 'bound'];

/**
 * What an entry makes of the quantity before it: value and unit are new; the kind of tolerance or the instrument
 * stays unless another tolerance was typed; fields of others stay.
 * @param {any} was @param {any} now
 */
export function merged(was, now) {
  if (typeof now !== 'object' || now === null || typeof was !== 'object' || was === null) return now;
  const kept = Object.fromEntries(Object.entries(was).filter(([k]) => !OWN.includes(k)));
  const out = { ...now };
  if (was.instrument !== undefined && out.tolerance === undefined) out.instrument = was.instrument;
  if (was.tolerance_kind !== undefined && out.tolerance !== undefined) out.tolerance_kind = was.tolerance_kind;
  if (was.basis !== undefined && out.basis === undefined) out.basis = was.basis;
  return { ...out, ...kept };
}

/**
 * The line with a quantity put at a target, in all its zones. `field` is what the engine says it belongs to:
 * water typed for a dew point becomes a wet water channel and the dew point goes.
 * @param {Line} line @param {Target} target @param {any} quantity `undefined` takes it away @param {string} [field] @returns {Line}
 */
export function putQuantity(line, target, quantity, field) {
  const next = quantity === undefined ? undefined : merged(quantityAt(line, target), quantity);
  if (target.kind === 'line') return withKey(line, target.field, next);
  if (target.kind === 'member') return setMember(line, target.index ?? 0, target.field, next);
  if (target.kind === 'change') return setChange(line, target.index ?? 0, target.field, next);
  let out = line;
  for (const i of target.zones) {
    const zone = zonesOf(out)[i];
    const was = quantityAt(out, { ...target, zones: [i] });
    const own = quantity === undefined ? undefined : merged(was, quantity);
    let now;
    if (target.kind === 'gas' && target.field === 'dew_point' && field && field !== 'dew_point') now = withChannel(withGas(zone, 'dew_point', undefined), field, quantity);
    else if (target.kind === 'gas') now = withGas(zone, target.field, own);
    else if (target.kind === 'cell') now = withGas(zone, 'oxygen_cell', withKey(zone.gas.oxygen_cell ?? {}, target.field, own));
    else if (target.kind === 'dew') now = withGas(zone, 'dew_point', withKey(zone.gas.dew_point ?? {}, target.field, own));
    else if (target.kind === 'channel') now = withChannel(zone, target.key ?? '', own);
    else now = withKey(zone, target.field, own);
    out = setZone(out, i, now);
  }
  return out;
}

/** Target of a finding's lever, or `null` where the line holds no such reading. @param {Line} line @param {number} zone @param {string} lever @returns {Target | null} */
export function leverTarget(line, zone, lever) {
  const z = zonesOf(line)[zone];
  if (!z) return null;
  if (lever === 'temperature') return { kind: 'zone', field: 'temperature', label: 'Temperature', zones: [zone] };
  if (lever === 'rate') return z.rate ? { kind: 'zone', field: 'rate', label: 'Rate', zones: [zone] } : null;
  if (lever === 'pressure') return z.pressure ? { kind: 'zone', field: 'pressure', label: 'Pressure', zones: [zone] } : { kind: 'line', field: 'pressure', label: 'Pressure', zones: [] };
  if (lever === 'dew_point') return z.gas?.dew_point ? { kind: 'gas', field: 'dew_point', label: 'Dew point', zones: [zone] } : null;
  if (z.gas?.analysis?.[lever]) return { kind: 'channel', field: 'gas', key: lever, label: `${lever} share`, zones: [zone] };
  return null;
}
