/** A document that only remembers what was drawn on it: enough for the charts, so that they are tested without a browser. */
export class Sheet {
  constructor(name) {
    this.nodeName = name;
    this.attributes = {};
    this.children = [];
    this.text = '';
  }
  setAttribute(name, value) {
    this.attributes[name] = value;
  }
  appendChild(child) {
    this.children.push(child);
    return child;
  }
  /** Every element below, itself first. */
  all() {
    return [this, ...this.children.flatMap((c) => c.all())];
  }
  /** Elements of a class. */
  of(cls) {
    return this.all().filter((e) => (e.attributes.class ?? '').split(' ').includes(cls));
  }
  /** All words on it. */
  words() {
    return this.all().map((e) => e.text).filter(Boolean);
  }
}
export const paper = {
  createElementNS: (_, name) => new Sheet(name),
  createTextNode: (text) => Object.assign(new Sheet('#text'), { text }),
};

/** A finding with one lever, as the engine would give it. */
export function finding(over = {}) {
  const { lever = {}, ...rest } = over;
  return {
    zone: 'Soak', change: 'Chromium oxidises', zone_index: 0, change_index: 0, equation: '2 Cr + 3 H2O = Cr2O3 + 3 H2', wish: 'avoid', standing: 'on side', sentence: '',
    judged_at_K: 1363.15, judged_why: '', dG_kJ: 20, u_dG_kJ: 5, driving_force_per_mole_kJ: null, per_mole_of: null, leeway_kJ: 20, leeway_u: 4, chance_wrong: 0.0001, nonlinear: false,
    levers: [{ lever: 'dew_point', label: 'Frost point', unit: 'C', reading: -50, u_reading: 1.15, turning_points: [-38], leeway: 12, leeway_u: 4, u: 3, off_side: 'above', searched: [-100, 30], held: '', allowed: true, why_not: '', ...lever }],
    budget: [], measure_next: '', remedies: [], shifted: null, arithmetic: null, phases: {}, used: [], course: [], acts_above_K: null, seconds_past_turn: null, allowed_s: null, notes: [],
    ...rest,
  };
}
