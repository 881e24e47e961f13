//! Text for people: aligned, with units, coloured only where it is wanted.

use anstyle::{AnsiColor, Style};
use leeway_api::response::{Assessment, Finding, Lever, Problem, Proposal, Reaction, Substance, SubstanceRow};
use std::fmt::Write;

/// Widest line that is written.
const WIDTH: usize = 100;

/// Text that grows, with or without colour.
#[derive(Debug)]
pub(crate) struct Paper {
    text: String,
    colour: bool,
}

fn width(text: &str) -> usize {
    text.chars().count()
}

fn pad(text: &str, columns: usize) -> String {
    let gap = columns.saturating_sub(width(text));
    format!("{text}{}", " ".repeat(gap))
}

fn pad_left(text: &str, columns: usize) -> String {
    let gap = columns.saturating_sub(width(text));
    format!("{}{text}", " ".repeat(gap))
}

/// A number with a fixed count of decimals and a proper minus.
fn fixed(x: f64, decimals: usize) -> String {
    let text = format!("{x:.decimals$}");
    if text.trim_start_matches('-').chars().all(|c| matches!(c, '0' | '.')) {
        text.trim_start_matches('-').to_owned()
    } else {
        text.replacen('-', "\u{2212}", 1)
    }
}

/// A number to a few digits in the style of its size.
fn short(x: f64) -> String {
    let size = x.abs();
    let text = if size == 0.0 {
        "0".to_owned()
    } else if !(1e-3..1e6).contains(&size) {
        format!("{x:.3e}")
    } else {
        // Five significant digits, so that 1.025 bar stays 1.025 bar; below 1e-3 the exponent form is taken.
        let whole = (0..6).take_while(|n| size >= f64::from(10u32.pow(*n))).count();
        let zeros = (1..3).take_while(|n| size < 1.0 / f64::from(10u32.pow(*n))).count();
        let decimals = if whole > 0 { 5usize.saturating_sub(whole) } else { 5 + zeros };
        let text = format!("{x:.decimals$}");
        if text.contains('.') { text.trim_end_matches('0').trim_end_matches('.').to_owned() } else { text }
    };
    text.replacen('-', "\u{2212}", 1)
}

/// Rounds a leeway towards its turning point.
fn leeway(x: f64, unit: &str) -> String {
    let size = x.abs();
    let step: f64 = if size >= 100.0 {
        1.0
    } else if size >= 1.0 || matches!(unit, "C" | "F" | "K") {
        0.1
    } else {
        0.001
    };
    let steps = if x >= 0.0 { (size / step + 1e-9).floor() } else { (size / step - 1e-9).ceil() };
    let sign = if x < 0.0 { "\u{2212}" } else { "+" };
    format!("{sign}{}", short(steps * step))
}

/// A chance in percent: two digits, and never a false zero.
fn percent(x: f64) -> String {
    if x < 0.01 {
        "below 0.01".to_owned()
    } else if x < 1.0 {
        fixed(x, 2)
    } else {
        fixed(x, 0)
    }
}

fn celsius(kelvin: f64) -> String {
    format!("{} \u{b0}C", fixed(kelvin - 273.15, 1))
}

/// A unit as it stands behind a number.
fn unit_after(unit: &str) -> String {
    match unit {
        "fraction" => String::new(),
        "C" | "F" => format!(" \u{b0}{unit}"),
        other => format!(" {other}"),
    }
}

/// The unit of a distance along a lever: degrees become kelvin.
fn step_unit(unit: &str) -> &str {
    if unit == "C" {
        "K"
    } else if unit == "fraction" {
        ""
    } else {
        unit
    }
}

impl Paper {
    /// An empty sheet.
    pub(crate) fn new(colour: bool) -> Self {
        Self { text: String::new(), colour }
    }

    /// What was written.
    pub(crate) fn into_text(self) -> String {
        self.text
    }

    fn paint(&self, text: &str, style: Style) -> String {
        if self.colour { format!("{style}{text}{style:#}") } else { text.to_owned() }
    }

    fn bold(&self, text: &str) -> String {
        self.paint(text, Style::new().bold())
    }

    fn standing(&self, standing: &str, text: &str) -> String {
        let colour = match standing {
            "on side" => AnsiColor::Blue,
            "off side" => AnsiColor::Red,
            "too close to call" => AnsiColor::Yellow,
            "on paper" => AnsiColor::Magenta,
            _ => AnsiColor::BrightBlack,
        };
        self.paint(text, Style::new().fg_color(Some(colour.into())))
    }

    fn line(&mut self, text: &str) {
        self.text.push_str(text.trim_end());
        self.text.push('\n');
    }

    fn wrapped_bold(&mut self, text: &str) {
        let mut plain = Self::new(false);
        plain.wrapped(0, text);
        for row in plain.text.lines() {
            self.line(&self.bold(row));
        }
    }

    fn wrapped(&mut self, indent: usize, text: &str) {
        let space = " ".repeat(indent);
        let mut row = space.clone();
        for word in text.split(' ') {
            if width(&row) + 1 + width(word) > WIDTH && width(&row) > indent {
                self.line(&row.clone());
                row.clone_from(&space);
            }
            if width(&row) > indent {
                row.push(' ');
            }
            row.push_str(word);
        }
        self.line(&row);
    }

    /// A problem, for standard error.
    pub(crate) fn problem(&mut self, file: &str, p: &Problem) {
        let place = if p.place.is_empty() { String::new() } else { format!(" ({})", p.place) };
        let file = if file.is_empty() { String::new() } else { format!("{file}: ") };
        self.wrapped(0, &format!("leeway: {file}{}{place}", p.message));
        if !p.found.is_empty() && !p.message.contains(&p.found) {
            self.wrapped(2, &format!("found     {}", p.found));
        }
        if !p.expected.is_empty() && !p.message.contains(&p.expected) {
            self.wrapped(2, &format!("expected  {}", p.expected));
        }
        for hint in &p.hints {
            self.wrapped(2, &format!("mend      {hint}"));
        }
    }

    /// A line assessed.
    pub(crate) fn assessment(&mut self, a: &Assessment, zone: Option<&str>, change: Option<&str>) {
        let invented = if a.invented { " (invented line)" } else { "" };
        self.wrapped_bold(&a.summary.sentence);
        if !a.summary.remedy.is_empty() {
            self.wrapped(0, &a.summary.remedy);
        }
        self.line(&format!("{}{invented}; data {}, k = {}", a.line, a.data_version, short(a.coverage_factor)));
        let c = a.summary.counts;
        self.line(&format!(
            "{} on side, {} off side, {} too close to call, {} on paper, {} no data",
            c.on_side, c.off_side, c.too_close, c.on_paper, c.no_data
        ));
        let picked: Vec<&Finding> = a
            .findings
            .iter()
            .filter(|f| zone.is_none_or(|z| f.zone == z) && change.is_none_or(|c| f.change == c))
            .collect();
        self.table(&picked);
        let close_look = zone.is_some() || change.is_some();
        for f in picked.iter().filter(|f| close_look || matches!(f.standing.as_str(), "off side" | "too close to call"))
        {
            self.finding(f);
        }
        self.notes_of(a, &picked);
        for caution in &a.cautions {
            self.line("");
            self.wrapped(0, &format!("| {}. {}", caution.title, caution.text));
        }
        self.line("");
        self.line("What can happen, not how fast.");
    }

    fn table(&mut self, findings: &[&Finding]) {
        self.line("");
        let names = findings.iter().map(|f| width(&f.change)).max().unwrap_or(6).clamp(6, 30);
        let zones = findings.iter().map(|f| width(&f.zone)).max().unwrap_or(4).clamp(4, 22);
        let head = format!(
            "{}  {}  {}  {}  {}  {}",
            pad("change", names),
            pad("zone", zones),
            pad("standing", 19),
            pad_left("at \u{b0}C", 7),
            pad_left("dG kJ", 16),
            "leeway"
        );
        self.line(&self.bold(&head));
        for f in findings {
            let dg = f
                .dg_kj
                .zip(f.u_dg_kj)
                .map_or_else(|| "\u{2013}".to_owned(), |(g, u)| format!("{} \u{b1} {}", fixed(g, 1), fixed(u, 1)));
            let lever = f.levers.iter().find(|l| l.leeway.is_some());
            let room = lever.map_or_else(String::new, |l| {
                let z = f.leeway_u.map_or_else(String::new, |z| format!(", {} u", fixed(z, 1)));
                format!("{} {} {}{z}", leeway(l.leeway.unwrap_or(0.0), &l.unit), step_unit(&l.unit), short_label(l))
            });
            let standing = self.standing(&f.standing, &pad(&format!("{} {}", mark(&f.standing), f.standing), 19));
            self.line(&format!(
                "{}  {}  {standing}  {}  {}  {room}",
                pad(&clip(&f.change, names), names),
                pad(&clip(&f.zone, zones), zones),
                pad_left(&fixed(f.judged_at_k - 273.15, 0), 7),
                pad_left(&dg, 16)
            ));
        }
    }

    fn finding(&mut self, f: &Finding) {
        self.line("");
        let head = self.bold(&f.sentence);
        self.line(&self.standing(&f.standing, &head));
        let why = if f.judged_why.is_empty() { String::new() } else { format!(", {}", f.judged_why) };
        self.wrapped(2, &format!("{} ({}), judged at {}{why}", f.equation, f.wish, celsius(f.judged_at_k)));
        if !f.levers.is_empty() {
            self.line(&format!(
                "  {} {} {} {} {}",
                pad("lever", 15),
                pad_left("reading", 14),
                pad_left("turns at", 14),
                pad_left("leeway", 14),
                pad_left("in u", 6)
            ));
        }
        for l in &f.levers {
            let unit = unit_after(&l.unit);
            let turn = l.turning_points.iter().map(|t| short(*t)).collect::<Vec<_>>().join("; ");
            let turn = if turn.is_empty() { l.why_not.clone() } else { format!("{turn}{unit}") };
            let room = l.leeway.map_or_else(String::new, |x| format!("{} {}", leeway(x, &l.unit), step_unit(&l.unit)));
            let z = l.leeway_u.map_or_else(String::new, |z| fixed(z, 1));
            self.line(&format!(
                "  {} {} {} {} {}",
                pad(&l.label, 15),
                pad_left(&format!("{}{unit}", short(l.reading)), 14),
                pad_left(&turn, 14),
                pad_left(&room, 14),
                pad_left(&z, 6)
            ));
        }
        if let Some(l) = f.levers.iter().find(|l| l.leeway.is_some()) {
            self.wrapped(2, &format!("{}: held {}", l.label, l.held));
        }
        for r in &f.remedies {
            let just = if r.just_turns == r.from {
                String::new()
            } else {
                format!(" (only just turns at {}{})", short(r.just_turns), unit_after(&r.unit))
            };
            self.wrapped(2, &format!("brings it back: {}{just}", r.sentence));
        }
        if !f.budget.is_empty() {
            let parts: Vec<String> = f
                .budget
                .iter()
                .filter(|s| s.share >= 0.005)
                .map(|s| format!("{} {} %", s.source, fixed(s.share * 100.0, 0)))
                .collect();
            let chance = f
                .chance_wrong
                .map_or_else(String::new, |c| format!("; chance that the sign is wrong {} %", percent(c * 100.0)));
            self.wrapped(2, &format!("doubt: {}{chance}", parts.join(", ")));
        }
        if !f.measure_next.is_empty() {
            self.wrapped(2, &f.measure_next);
        }
        if let Some(s) = &f.shifted {
            self.wrapped(2, &format!("shifted ({}): {}, dG {} kJ", s.how, s.standing, fixed(s.dg_kj, 1)));
        }
        if let Some(h) = &f.arithmetic {
            self.wrapped(
                2,
                &format!(
                    "by hand: dG0 {} kJ + R T ln Q, Q = {} = {}, ln Q {}, 8.314463 \u{b7} {} \u{b7} ln Q / 1000 = {} kJ; dG {} kJ",
                    fixed(h.dg0_kj, 2), h.q_symbols, h.q_numbers, fixed(h.ln_q, 3), fixed(h.temperature_k, 2), fixed(h.rt_ln_q_kj, 2), fixed(h.dg_kj, 2)
                ),
            );
        }
        for n in &f.notes {
            self.wrapped(2, &format!("- {n}"));
        }
    }

    fn notes_of(&mut self, a: &Assessment, picked: &[&Finding]) {
        let mut notes: Vec<String> = a
            .notes
            .iter()
            .map(|n| if n.at.is_empty() { n.text.clone() } else { format!("{}: {}", n.at, n.text) })
            .collect();
        for z in &a.zones {
            notes.extend(z.notes.iter().map(|n| format!("{}: {n}", z.name)));
        }
        for c in &a.changes {
            notes.extend(c.notes.iter().map(|n| format!("{}: {n}", c.name)));
        }
        for f in picked.iter().filter(|f| f.standing == "no data") {
            notes.push(f.sentence.clone());
        }
        notes.dedup();
        if !notes.is_empty() {
            self.line("");
            self.line(&self.bold("Notes"));
            for n in notes {
                self.wrapped(2, &format!("- {n}"));
            }
        }
    }

    /// A reaction at its temperatures.
    pub(crate) fn reactions(&mut self, list: &[Reaction]) {
        let Some(first) = list.first() else { return };
        self.line(&self.bold(&first.equation));
        let range = if first.used.is_empty() { "searched" } else { "data" };
        self.line(&format!(
            "goes {} ({range} from {} to {})",
            first.goes,
            celsius(first.data_k[0]),
            celsius(first.data_k[1])
        ));
        if !first.turning_temperatures_k.is_empty() {
            let turns: Vec<String> = first.turning_temperatures_k.iter().map(|t| celsius(*t)).collect();
            self.line(&format!("turns at {}", turns.join(", ")));
        }
        self.line("");
        let head = format!(
            "{} {} {} {} {}",
            pad_left("T", 10),
            pad_left("dH kJ", 18),
            pad_left("dS J/K", 18),
            pad_left("dG kJ", 18),
            pad_left("log10 K", 18)
        );
        self.line(&self.bold(&head));
        for r in list {
            let with = |x: f64, u: f64, d: usize| format!("{} \u{b1} {}", fixed(x, d), fixed(u, d));
            self.line(&format!(
                "{} {} {} {} {}",
                pad_left(&celsius(r.temperature_k), 10),
                pad_left(&with(r.dh_kj, r.u_dh_kj, 2), 18),
                pad_left(&with(r.ds_j_per_k, r.u_ds_j_per_k, 2), 18),
                pad_left(&with(r.dg_kj, r.u_dg_kj, 2), 18),
                pad_left(&with(r.log10_k, r.u_log10_k, 3), 18)
            ));
        }
        if list.iter().any(|r| (r.dg_kj - r.dg0_kj).abs() > 1e-12) {
            self.line("dG at the activities given; log10 K is the constant.");
        }
        self.line("");
        for u in &first.used {
            self.line(&format!(
                "{} {} {}",
                pad(&u.formula, 12),
                pad(&format!("{} ({})", u.phase, u.state), 22),
                u.source
            ));
        }
        let mut notes: Vec<&String> = list.iter().flat_map(|r| &r.notes).collect();
        notes.dedup();
        for n in notes {
            self.wrapped(0, &format!("- {n}"));
        }
        self.line("Energies are per mole of the equation as written; \u{b1} is the standard uncertainty. What can happen, not how fast.");
    }

    /// Proposed changes.
    pub(crate) fn proposals(&mut self, list: &[Proposal]) {
        if list.is_empty() {
            self.line("Charge and gas suggest no change that the line does not watch already.");
        }
        for p in list {
            let side = if p.dg_kj < 0.0 { "goes" } else { "does not go" };
            self.line(&format!("{}  {}", pad(&clip(&p.name, 40), 40), p.equation));
            self.line(&format!(
                "    nearest in {}: {side}, {} kJ, {} u from its turn",
                p.nearest_zone,
                fixed(p.dg_kj, 1),
                fixed(p.leeway_u.abs(), 1)
            ));
        }
    }

    /// A list of substances.
    pub(crate) fn rows(&mut self, rows: &[SubstanceRow]) {
        for r in rows {
            self.line(&format!(
                "{} {} {}",
                pad(&r.formula, 16),
                pad(&clip(&r.name, 36), 36),
                clip(&r.phases.join(", "), 44)
            ));
        }
        self.line(&format!("{} substances", rows.len()));
    }

    /// One substance with its records.
    pub(crate) fn substance(&mut self, s: &Substance) {
        self.line(&self.bold(&format!("{}  {}", s.formula, s.name)));
        self.line(&format!("{} g/mol", fixed(s.molar_mass_g, 3)));
        for set in &s.sets {
            self.line("");
            let class = if set.gas { "gas" } else { "condensed" };
            let preferred = if set.preferred { ", preferred" } else { "" };
            self.line(&self.bold(&format!("{} ({class}{preferred})", set.source)));
            self.line(&format!(
                "  H298 {} \u{b1} {} kJ/mol   S298 {} \u{b1} {} J/(mol K)",
                fixed(set.h298_kj, 2),
                short(set.u_h298_kj),
                fixed(set.s298_j_per_k, 2),
                short(set.u_s298_j_per_k)
            ));
            for p in &set.phases {
                self.line(&format!(
                    "  {} ({}) {} to {}{}",
                    pad(&p.phase, 16),
                    p.state,
                    celsius(p.from_k),
                    celsius(p.to_k),
                    if p.metastable { ", only when named" } else { "" }
                ));
            }
            for (word, text) in
                [("doubt", &set.doubt), ("preferred because", &set.why), ("made", &set.made), ("source", &set.cite)]
            {
                if !text.is_empty() {
                    self.wrapped(2, &format!("{word}: {text}"));
                }
            }
        }
    }
}

/// The shape of a standing: colour is never its only carrier.
fn mark(standing: &str) -> char {
    match standing {
        "on side" => '\u{25cf}',
        "off side" => '\u{25a0}',
        "too close to call" => '\u{25c6}',
        "on paper" => '\u{25cb}',
        _ => '\u{25cc}',
    }
}

fn short_label(l: &Lever) -> String {
    let mut name = l.label.clone();
    if let Some(first) = name.get(..1)
        && matches!(l.lever.as_str(), "temperature" | "pressure" | "dew_point")
    {
        name = first.to_lowercase() + &name[1..];
    }
    name
}

fn clip(text: &str, columns: usize) -> String {
    if width(text) <= columns {
        return text.to_owned();
    }
    let mut piece: String = text.chars().take(columns.saturating_sub(1)).collect();
    let _ = write!(piece, "\u{2026}");
    piece
}
