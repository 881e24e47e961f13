/**
 * What the engine answers, and what the page holds. Units stand in the names.
 *
 * @typedef {{at: string, text: string}} Note
 * @typedef {{title: string, text: string}} Caution
 * @typedef {{code: string, at: string, place: string, message: string, found: string, expected: string, hints: string[]}} Problem
 * @typedef {{on_side: number, off_side: number, too_close: number, on_paper: number, no_data: number}} Counts
 * @typedef {{sentence: string, remedy: string, worst: number | null, counts: Counts}} Summary
 * @typedef {{name: string, temperature_K: number, leaving_K: number | null, pressure_bar: number, partial_pressures_bar: Record<string, number>,
 *   shifted_partial_pressures_bar: Record<string, number> | null, frost_point_K: number | null, refused: Problem | null, notes: string[]}} ZoneTaken
 * @typedef {{name: string, equation: string, short: string, wish: string, standard_turning_temperatures_K: number[], refused: Problem | null, notes: string[]}} ChangeTaken
 * @typedef {{lever: string, label: string, unit: string, reading: number, u_reading: number, turning_points: number[], leeway: number | null,
 *   leeway_u: number | null, u: number | null, off_side: string | null, searched: [number, number], held: string, allowed: boolean, why_not: string}} Lever
 * @typedef {{source: string, share: number, u_kJ: number}} Share
 * @typedef {{lever: string, label: string, unit: string, from: number, just_turns: number, beyond_doubt: number, sentence: string}} Remedy
 * @typedef {{temperature_K: number, dG0_kJ: number, dH0_kJ: number, dS0_J_per_K: number, q_symbols: string, q_numbers: string, ln_q: number, RT_ln_Q_kJ: number, dG_kJ: number}} Arithmetic
 * @typedef {{formula: string, phase: string, state: string, coefficient: number, activity: number, activity_from: string, source: string, cite: string, u_kJ: number, extrapolated: boolean}} Used
 * @typedef {{standing: string, dG_kJ: number, u_dG_kJ: number, partial_pressures_bar: Record<string, number>, how: string}} Shifted
 * @typedef {{temperature_K: number, dG_kJ: number, standing: string}} CoursePoint
 * @typedef {{zone: string, change: string, zone_index: number, change_index: number, equation: string, wish: string, standing: string, sentence: string,
 *   judged_at_K: number, judged_why: string, dG_kJ: number | null, u_dG_kJ: number | null, driving_force_per_mole_kJ: number | null, per_mole_of: string | null,
 *   leeway_kJ: number | null, leeway_u: number | null, chance_wrong: number | null, nonlinear: boolean, levers: Lever[], budget: Share[], measure_next: string,
 *   remedies: Remedy[], shifted: Shifted | null, arithmetic: Arithmetic | null, phases: Record<string, string>, used: Used[], course: CoursePoint[],
 *   acts_above_K: number | null, seconds_past_turn: number | null, allowed_s: number | null, notes: string[]}} Finding
 * @typedef {{line: string, invented: boolean, data_version: string, coverage_factor: number, summary: Summary, zones: ZoneTaken[], changes: ChangeTaken[],
 *   findings: Finding[], cautions: Caution[], notes: Note[]}} Assessment
 * @typedef {{name: string, equation: string, wish: string, nearest_zone: string, leeway_u: number, dG_kJ: number}} Proposal
 * @typedef {{equation: string, temperature_K: number, dH_kJ: number, dS_J_per_K: number, dG_kJ: number, log10_K: number, goes: string, notes: string[]}} Reaction
 * @typedef {{formula: string, name: string, elements: string[], phases: string[], sets: number, gas: boolean, condensed: boolean}} SubstanceRow
 * @typedef {{phase: string, state: string, from_K: number, to_K: number, metastable: boolean, temperature_K: number[], Cp_J_per_K: number[], H_minus_H298_kJ: number[], S_J_per_K: number[], G_kJ: number[]}} PhaseRow
 * @typedef {{source: string, cite: string, preferred: boolean, why: string, made: string, gas: boolean, H298_kJ: number, u_H298_kJ: number, S298_J_per_K: number, u_S298_J_per_K: number, doubt: string, phases: PhaseRow[]}} SetRow
 * @typedef {{formula: string, name: string, molar_mass_g: number, sets: SetRow[]}} Substance
 * @typedef {{quantity: any, field: string, read_back: string, consequence: string}} Entry
 * @typedef {{text: string, variants: {name: string, about: string}[], notes: Note[]}} Opened
 *
 * A quantity as the line file writes it, and the line itself; unknown fields are kept, so these say only what the page reads.
 * @typedef {{value: number, unit: string, tolerance?: number, tolerance_kind?: string, instrument?: string, over?: string, basis?: string, bound?: string, source?: string, [more: string]: unknown}} Quantity
 * @typedef {{basis?: string, analysis?: Record<string, Quantity>, balance?: string, dew_point?: Quantity, oxygen_cell?: Quantity, [more: string]: unknown}} Gas
 * @typedef {{name: string, temperature: Quantity, leaving?: Quantity, rate?: Quantity, pressure?: Quantity, gas: Gas, [more: string]: unknown}} Zone
 * @typedef {{substance: string, share_wt?: Quantity | number, activity?: number, activity_coefficient?: number, doubt_factor?: number, source?: string, [more: string]: unknown}} Member
 * @typedef {{name: string, equation: string, wish: string, zones?: string[], activities?: Record<string, unknown>, acts_above?: Quantity, allowed?: Quantity, tolerated?: boolean, [more: string]: unknown}} Change
 * @typedef {{leeway: number, name: string, invented?: boolean, about?: string, charge_name?: string, readings_note?: string, coverage_factor?: number, pressure?: Quantity,
 *   charge?: Member[], zones?: Zone[], changes?: Change[], variants?: {name: string, about?: string, patch: unknown[]}[], [more: string]: unknown}} Line
 *
 * A document: the line, what it is compared with, and where it comes from. History is a list of these.
 * @typedef {{line: Line, before: Line | null, beforeWord: string, recipe: Line | null, variant: string | null, what: string, clean?: Line | null}} Doc
 *
 * Something that can be typed into: where it stands in the line and how it is read.
 * @typedef {{kind: string, field: string, label: string, zones: number[], key?: string, index?: number}} Target
 * @typedef {{target: Target, text: string, fresh: boolean, unit: string, over: string, tolerance: number | null, old: Quantity | null, oldText: string,
 *   entry: Entry | null, problem: Problem | null, tentative: Line | null, onTolerance: boolean}} Edit
 * @typedef {{id: string, title: string, text: string, problem?: Problem | null, file?: string, keys?: {label: string, act: string, main?: boolean, value?: string}[]}} Notice
 * @typedef {{text?: string, problem?: Problem | null, readBack?: string}} Field
 * @typedef {{kind: string, index: number}} Panel
 * @typedef {{doc: Doc, past: Doc[], future: Doc[], saved: Line | null, savedAt: string, fileName: string, demo: string | null, storage: boolean | null,
 *   view: string, cell: {zone: number, change: number} | null, change: number, lever: string | null, edit: Edit | null, panel: Panel | null, menu: string | null,
 *   fields: Record<string, Field>, notices: Notice[], welcome: boolean, confirm: string | null,
 *   shown: Assessment | null, shownLine: Line | null, compared: Assessment | null, lineProblem: Problem | null, working: boolean,
 *   proposals: Proposal[] | null, query: string, rows: SubstanceRow[] | null, formula: string | null, substance: Substance | null, phase: number, readTemperature: number | null, dataVersion: string}} State
 */
export {};
