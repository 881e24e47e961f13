//! Every message for bad input, one snapshot per room. A message names the place, what was found, what was
//! expected and, where there is one, the mend; it never scolds. Snapshots in `golden/` guard the words.

use leeway_api::Session;
use leeway_api::request::{ChangeRequest, EntryRequest};
use leeway_api::response::Problem;
use leeway_tests::session;
use std::fmt::Write;

/// A line without fault; each case spoils one piece of its text.
const LINE: &str = r#"{
  "leeway": 1,
  "name": "Invented strip",
  "invented": true,
  "coverage_factor": 2,
  "pressure": {"value": 1.02, "unit": "bar", "tolerance": 0.005},
  "charge": [
    {"substance": "Fe", "share_wt": {"value": 80.1, "unit": "%"}},
    {"substance": "Cr", "share_wt": 17.2, "activity": 0.25, "doubt_factor": 1.6}
  ],
  "zones": [
    {"name": "Soak",
     "temperature": {"value": 1080, "unit": "C", "tolerance": 5},
     "gas": {"basis": "dry", "analysis": {"H2": {"value": 75, "unit": "%", "tolerance": 1}}, "balance": "N2",
             "dew_point": {"value": -48, "unit": "C", "tolerance": 2, "over": "ice"}}},
    {"name": "Cooling",
     "temperature": {"value": 1080, "unit": "C"}, "leaving": {"value": 80, "unit": "C"}, "rate": {"value": 38, "unit": "K/s"},
     "gas": {"basis": "dry", "analysis": {"H2": {"value": 75, "unit": "%"}, "O2": {"value": 5, "unit": "ppm"}}, "balance": "N2"}}
  ],
  "changes": [
    {"name": "Chromium oxidises", "equation": "Cr + H2O = Cr2O3 + H2", "wish": "avoid", "zones": ["Soak"]},
    {"name": "Iron scales", "equation": "Fe + O2 = Fe2O3", "wish": "avoid",
     "acts_above": {"value": 300, "unit": "C", "source": "invented"}, "allowed": {"value": 8, "unit": "s"}}
  ],
  "variants": [
    {"name": "Wetter", "about": "Frost point up", "patch": [{"op": "replace", "path": "/zones/0/gas/dew_point/value", "value": -38}]}
  ]
}
"#;

fn spoiled(from: &str, to: &str) -> String {
    assert!(LINE.contains(from), "the line does not hold {from}");
    LINE.replacen(from, to, 1)
}

/// Cases with their problems, written out for a snapshot and checked for what every message must have.
#[derive(Default)]
struct Sheet {
    text: String,
    cases: usize,
    faults: String,
}

impl Sheet {
    fn case(&mut self, name: &str, problem: Result<Problem, String>) {
        self.cases += 1;
        let p = match problem {
            Ok(p) => p,
            Err(why) => {
                let _ = writeln!(self.faults, "{name}: {why}");
                return;
            }
        };
        for (what, text) in
            [("place", &p.place), ("message", &p.message), ("found", &p.found), ("expected", &p.expected)]
        {
            if text.trim().is_empty() {
                let _ = writeln!(self.faults, "{name}: no {what} in {p:?}");
            }
        }
        for word in ["Error", "Oops", "please", "Please", "successfully", "invalid", "Sorry"] {
            if p.message.contains(word) || p.expected.contains(word) {
                let _ = writeln!(self.faults, "{name}: {word} in {}", p.message);
            }
        }
        if p.message.chars().count() > 600 {
            let _ = writeln!(self.faults, "{name}: {} characters", p.message.chars().count());
        }
        let _ = writeln!(self.text, "# {name}\n{} at {} ({})", p.code, or_dash(&p.at), p.place);
        self.body(&p);
        self.text.push('\n');
    }

    fn body(&mut self, p: &Problem) {
        let _ = writeln!(self.text, "  message   {}\n  found     {}\n  expected  {}", p.message, p.found, p.expected);
        for hint in &p.hints {
            let _ = writeln!(self.text, "  mend      {hint}");
        }
        for more in &p.more {
            let _ = writeln!(self.text, "  also      {} ({}): {}", more.at, more.place, more.message);
        }
    }

    fn check(&self, name: &str, at_least: usize) {
        assert!(self.faults.is_empty(), "{name}:\n{}", self.faults);
        assert!(self.cases >= at_least, "{name}: {} cases", self.cases);
        let mut settings = insta::Settings::clone_current();
        settings.set_snapshot_path("../golden");
        settings.set_prepend_module_to_snapshot(false);
        settings.set_omit_expression(true);
        settings.bind(|| insta::assert_snapshot!(name, self.text));
    }
}

fn or_dash(text: &str) -> &str {
    if text.is_empty() { "-" } else { text }
}

fn refused<T>(result: Result<T, Problem>) -> Result<Problem, String> {
    result.err().ok_or_else(|| "taken, though it is bad input".to_string())
}

#[test]
fn the_line_without_fault_is_taken() {
    let s = session();
    let assessment = s.assess(LINE).unwrap();
    assert!(assessment.zones.iter().all(|z| z.refused.is_none()));
    assert!(assessment.changes.iter().all(|c| c.refused.is_none()));
    assert!(s.variant(LINE, "Wetter").is_ok());
}

#[test]
fn equations() {
    let s = session();
    let mut sheet = Sheet::default();
    let long = "Fe + ".repeat(200) + "O2 = FeO";
    let wide = format!("{} = Fe", ["Fe"; 3].join(" + ") + &(1..26).map(|n| format!(" + Fe{n}O")).collect::<String>());
    for (name, equation) in [
        ("nothing typed", ""),
        ("only spaces", "   "),
        ("no sign between the sides", "2 Cr + 1.5 O2"),
        ("two signs", "Cr = Cr2O3 = CrO"),
        ("nothing on the right", "2 Cr + 1.5 O2 ="),
        ("nothing on the left", "= Cr2O3"),
        ("a plus with nothing after it", "Cr + = Cr2O3"),
        ("an element that is none", "Xx + O2 = XxO2"),
        ("lower case", "fe + o2 = feo"),
        ("letter o for zero", "Fe + O2 = Fe0"),
        ("a bracket left open", "Ca(OH2 = CaO + H2O"),
        ("a bracket too many", "CaOH)2 = CaO + H2O"),
        ("an empty bracket", "Ca() + O2 = CaO"),
        ("a subscript of zero", "Fe0O + O2 = Fe2O3"),
        ("a charge", "Fe2+ + O2 = Fe2O3"),
        ("a coefficient of zero", "0 Cr + O2 = Cr2O3"),
        ("a negative coefficient", "-2 Cr + O2 = Cr2O3"),
        ("a coefficient with two points", "1.5.2 Cr + O2 = Cr2O3"),
        ("a division by zero", "1/0 Cr + O2 = Cr2O3"),
        ("unbalanced with coefficients", "2 Cr + 2 O2 = Cr2O3"),
        ("unbalanced in two elements", "Cr + 2 H2O = Cr2O3 + H2"),
        ("element on one side only", "Cr + H2O = Al2O3 + H2"),
        ("unbalanceable", "CO + CO2 = C2O3 + CO3 + H2O + H2"),
        ("no conserving coefficients", "H2O = H2O2"),
        ("a member on the wrong side", "CO + H2 = CO2 + H2O"),
        ("a member that takes no part", "C + O2 + NaCl = CO2 + Na2Cl"),
        ("ambiguous balance", "C + O2 = CO + CO2"),
        ("ambiguous balance of four", "CH4 + O2 = CO + CO2 + H2 + H2O"),
        ("the same on both sides", "2*(C + O2 = CO2) - 2*(C + O2 = CO2)"),
        ("a sum with a step left open", "2*(C + O2 = CO2 - (CO + O2 = CO2)"),
        ("a sum without a sign", "(C + O2 = CO2) (CO + O2 = CO2)"),
        ("a sum with a bare step", "(C + O2 = CO2) - CO + O2 = CO2"),
        ("a state that is none", "Fe(x) + O2 = FeO"),
        ("a phase the data do not hold", "SiO2(stishovite) = SiO2(quartz)"),
        ("a substance the data do not hold", "Pu + O2 = PuO2"),
        ("a state the data do not hold", "CrO3(s) = Cr2O3 + O2"),
        ("a substance near to one that is held", "Cr + O2 = Cr5O12"),
        ("a word", "rust"),
        ("too long", long.as_str()),
        ("too many substances", wide.as_str()),
        ("control characters", "Fe\u{7} + O2 = FeO"),
    ] {
        let request = ChangeRequest { equation: equation.into(), at: vec!["1000 C".into()], ..Default::default() };
        sheet.case(name, refused(s.change(&request)));
    }
    sheet.check("equations", 35);
}

#[test]
fn requests() {
    let s = session();
    let mut sheet = Sheet::default();
    let request = |at: &str, activity: &str, dh: Option<&str>, ds: Option<&str>| ChangeRequest {
        equation: "Cr + H2O = Cr2O3 + H2".into(),
        at: if at.is_empty() { vec![] } else { vec![at.into()] },
        activities: if activity.is_empty() { vec![] } else { vec![activity.into()] },
        dh: dh.map(Into::into),
        ds: ds.map(Into::into),
    };
    for (name, r) in [
        ("a temperature without a number", request("hot", "", None, None)),
        ("a temperature with a pressure's unit", request("1000 bar", "", None, None)),
        ("a temperature that may be two", request("1,050 C", "", None, None)),
        ("a temperature below 0 K", request("-300 C", "", None, None)),
        ("0 K", request("0 K", "", None, None)),
        ("beyond the data", request("9000 C", "", None, None)),
        ("an activity without its value", request("1000 C", "Cr", None, None)),
        ("an activity of a stranger", request("1000 C", "Al=0.5", None, None)),
        ("an activity of zero", request("1000 C", "Cr=0", None, None)),
        ("an activity below zero", request("1000 C", "Cr=-1", None, None)),
        ("an activity in words", request("1000 C", "Cr=little", None, None)),
        ("an activity of no formula", request("1000 C", "=0.5", None, None)),
        ("an activity that may be two", request("1000 C", "H2=1,050", None, None)),
        ("a constant without the other", request("1000 C", "", Some("179.2 kJ"), None)),
        ("a constant without a unit", request("1000 C", "", Some("179.2"), Some("160.2 J/K"))),
        ("a constant with the other's unit", request("1000 C", "", Some("179.2 J/K"), Some("160.2 J/K"))),
        ("a constant in calories", request("1000 C", "", Some("42.8 kcal"), Some("160.2 J/K"))),
    ] {
        sheet.case(name, refused(s.change(&r)));
    }
    for (name, formula) in
        [("no formula", ""), ("a formula not held", "UO2"), ("no element", "Zz"), ("small letters", "cr2o3")]
    {
        sheet.case(name, refused(s.substance(formula)));
    }
    sheet.check("requests", 18);
}

#[test]
fn entries() {
    let s = session();
    let mut sheet = Sheet::default();
    for (name, field, text) in [
        ("nothing typed", "temperature", ""),
        ("a word", "temperature", "hot"),
        ("a unit that is none", "temperature", "950 grd"),
        ("a unit of another kind", "temperature", "950 mbar"),
        ("a sign alone", "temperature", "-"),
        ("two numbers", "temperature", "950 96"),
        ("a comma that may be two", "temperature", "1,050"),
        ("a tolerance that may be two", "temperature", "950 \u{b1} 1,050 K"),
        ("a bound that may be two", "gas", "<1.050 ppm"),
        ("a point that may be two", "temperature", "1.050 C"),
        ("two points", "pressure", "1.0.2"),
        ("point and comma mixed", "pressure", "1.02,3.4"),
        ("groups that are not of three", "temperature", "1,05,000"),
        ("below 0 K", "temperature", "-280 C"),
        ("0 K", "temperature", "0 K"),
        ("not a number", "temperature", "NaN"),
        ("infinity", "temperature", "1e999"),
        ("a negative tolerance", "temperature", "950 \u{b1} -2"),
        ("a tolerance without a number", "temperature", "950 \u{b1}"),
        ("a tolerance of another kind", "temperature", "950 C \u{b1} 2 mbar"),
        ("a bound on a temperature", "temperature", "< 950 C"),
        ("a gauge pressure", "pressure", "12 mbarg"),
        ("a gauge pressure in brackets", "pressure", "0,012 bar(g)"),
        ("a pressure over the hall in words", "pressure", "12 mbar over"),
        ("a column of water", "pressure", "5 inH2O"),
        ("a plus before a pressure", "pressure", "+12 mbar"),
        ("a draught", "pressure", "-5 mbar"),
        ("a tolerance that may be of another unit", "temperature", "950 \u{b1} 4 K"),
        ("a tolerance in percent", "gas", "5 ppm \u{b1} 10 %"),
        ("a gas by mass", "gas", "5 wt%"),
        ("a charge by volume", "share_wt", "17 vol%"),
        ("a gauge pressure below the vacuum", "pressure", "-2 barg"),
        ("a negative pressure", "pressure", "-1 bar"),
        ("no pressure at all", "pressure", "0 bar"),
        ("a gas with a temperature's unit", "gas", "12 C"),
        ("a gas above 103 %", "gas", "110 %"),
        ("a gas below zero", "gas", "-0.2 %"),
        ("a dew point in volts", "dew_point", "1136 mV"),
        ("a rate below zero", "rate", "-38 K/s"),
        ("a time in kelvin", "allowed", "8 K"),
        ("a share above 103 %", "share_wt", "120"),
        ("an activity of zero", "activity", "0"),
        ("an activity with a unit", "activity", "0.25 bar"),
        ("a tolerance below zero", "tolerance", "-1"),
        ("a cell in amperes", "oxygen_cell", "1136 mA"),
        ("a cell in volts for millivolts", "oxygen_cell", "1136 V"),
        ("a temperature of no furnace", "temperature", "1e30 C"),
        ("a pressure of no vessel", "pressure", "1e30 bar"),
        ("a field that is none", "colour", "1"),
        (
            "too long",
            "temperature",
            "1111111111111111111111111111111111111111111111111111111111111111111111111111111111111",
        ),
    ] {
        let request = EntryRequest { text: text.into(), field: field.into(), ..Default::default() };
        sheet.case(name, refused(s.read_entry(&request)));
    }
    sheet.check("entries", 30);
}

#[test]
fn files() {
    let s = session();
    let mut sheet = Sheet::default();
    let utf16: Vec<u8> = [0xff, 0xfe].into_iter().chain(LINE.encode_utf16().flat_map(u16::to_le_bytes)).collect();
    let utf16_bare: Vec<u8> = LINE.encode_utf16().flat_map(u16::to_be_bytes).collect();
    let mut latin = LINE.as_bytes().to_vec();
    let at = LINE.find("Invented").unwrap();
    latin[at] = 0xfc;
    let deep = format!("{{\"leeway\": 1, \"zones\": {}{}}}", "[".repeat(100_000), "]".repeat(100_000));
    let cases: Vec<(&str, Vec<u8>)> = vec![
        ("an empty file", vec![]),
        ("only a byte order mark", vec![0xef, 0xbb, 0xbf]),
        ("only white space", b" \n\n ".to_vec()),
        ("100 MB", vec![b' '; 100_000_000]),
        ("cut off", LINE.as_bytes()[..LINE.len() / 2].to_vec()),
        ("cut off in a text", LINE.as_bytes()[..LINE.find("strip").unwrap() + 2].to_vec()),
        ("cut off in a letter", {
            let mut b = spoiled("Invented strip", "Band Stra\u{df}e").into_bytes();
            let at = b.iter().position(|x| *x == 0xc3).unwrap();
            b.truncate(at + 1);
            b
        }),
        ("a picture", b"\x89PNG\r\n\x1a\n\0\0\0\rIHDR".to_vec()),
        ("a zip", b"PK\x03\x04\x14\0\x06\0".to_vec()),
        ("UTF-16 with its mark", utf16),
        ("UTF-16 without its mark", utf16_bare),
        ("Latin-1", latin),
        ("deep nesting", deep.into_bytes()),
        ("a key twice", spoiled("\"invented\": true", "\"name\": \"again\"").into_bytes()),
        ("a key twice, deep", spoiled("\"over\": \"ice\"", "\"value\": -47").into_bytes()),
        ("not a number", spoiled("\"value\": 1080", "\"value\": NaN").into_bytes()),
        ("infinity", spoiled("\"value\": 1080", "\"value\": 1e999").into_bytes()),
        ("a decimal comma", spoiled("1.02", "1,02").into_bytes()),
        ("a leading plus", spoiled("\"value\": 1080", "\"value\": +1080").into_bytes()),
        ("a comma too many", spoiled("\"unit\": \"s\"}}\n  ]", "\"unit\": \"s\"}},\n  ]").into_bytes()),
        ("a comma missing", spoiled("\"leeway\": 1,", "\"leeway\": 1").into_bytes()),
        ("single quotes", spoiled("\"leeway\"", "'leeway'").into_bytes()),
        ("a remark", spoiled("\"leeway\": 1,", "// remark\n\"leeway\": 1,").into_bytes()),
        ("something after the end", format!("{LINE}{{}}").into_bytes()),
        ("a list", b"[1, 2, 3]".to_vec()),
        ("a number", b"42".to_vec()),
        ("a table of readings", b"time;dew point\n02:10;-48\n".to_vec()),
        ("JSON of something else", b"{\"type\": \"Feature\", \"id\": 7}".to_vec()),
    ];
    for (name, bytes) in &cases {
        sheet.case(name, refused(s.open(bytes)));
    }
    sheet.check("files", 25);
}

#[test]
fn lines() {
    let s = session();
    let mut sheet = Sheet::default();
    for (name, from, to) in [
        ("no version", "\"leeway\": 1,", ""),
        ("a version that is none", "\"leeway\": 1,", "\"leeway\": \"one\","),
        ("version 0", "\"leeway\": 1,", "\"leeway\": 0,"),
        ("a name that is a number", "\"name\": \"Invented strip\"", "\"name\": 7"),
        ("invented in words", "\"invented\": true", "\"invented\": \"yes\""),
        ("a coverage factor of 9", "\"coverage_factor\": 2", "\"coverage_factor\": 9"),
        ("a negative pressure", "\"value\": 1.02", "\"value\": -1.02"),
        ("a pressure of zero", "\"value\": 1.02", "\"value\": 0"),
        ("a pressure in percent", "\"unit\": \"bar\"", "\"unit\": \"%\""),
        ("a gauge pressure", "\"unit\": \"bar\"", "\"unit\": \"mbarg\""),
        ("a quantity as a bare number", "{\"value\": 1.02, \"unit\": \"bar\", \"tolerance\": 0.005}", "1.02"),
        ("a quantity as a text", "{\"value\": 1.02, \"unit\": \"bar\", \"tolerance\": 0.005}", "\"1.02 bar\""),
        ("a value in quotes", "\"value\": 1080", "\"value\": \"1080\""),
        ("no value", "{\"value\": 1080, \"unit\": \"C\", \"tolerance\": 5}", "{\"unit\": \"C\"}"),
        ("no unit", "{\"value\": 1080, \"unit\": \"C\", \"tolerance\": 5}", "{\"value\": 1080}"),
        ("0 K", "{\"value\": 1080, \"unit\": \"C\", \"tolerance\": 5}", "{\"value\": 0, \"unit\": \"K\"}"),
        ("below 0 K", "\"value\": 1080", "\"value\": -300"),
        ("no temperature", "\"temperature\": {\"value\": 1080, \"unit\": \"C\", \"tolerance\": 5},", ""),
        ("a negative tolerance", "\"tolerance\": 5", "\"tolerance\": -5"),
        ("a tolerance in words", "\"tolerance\": 5", "\"tolerance\": \"small\""),
        ("a kind of tolerance that is none", "\"tolerance\": 5", "\"tolerance\": 5, \"tolerance_kind\": \"about\""),
        ("an instrument that is none", "\"tolerance\": 5", "\"instrument\": \"by eye\""),
        ("a class that is none", "\"tolerance\": 5", "\"instrument\": \"type B class 1\""),
        ("a thermocouple beyond its range", "\"tolerance\": 5", "\"instrument\": \"type T class 1\""),
        ("a thermocouple for a pressure", "\"tolerance\": 0.005", "\"instrument\": \"type K class 1\""),
        ("zones that are no list", "\"zones\": [\n", "\"zones\": 3, \"x\": [\n"),
        ("a zone that is a text", "\"zones\": [\n", "\"zones\": [\"Heat\",\n"),
        ("a zone without a name", "\"name\": \"Soak\",", ""),
        ("a zone with an empty name", "\"name\": \"Soak\"", "\"name\": \" \""),
        ("two zones of one name", "\"name\": \"Cooling\"", "\"name\": \"Soak\""),
        ("a rate below zero", "\"value\": 38", "\"value\": -38"),
        ("a rate in kelvin", "\"unit\": \"K/s\"", "\"unit\": \"K\""),
        ("a basis that is none", "\"basis\": \"dry\"", "\"basis\": \"moist\""),
        (
            "an analysis that is a list",
            "\"analysis\": {\"H2\": {\"value\": 75, \"unit\": \"%\", \"tolerance\": 1}}",
            "\"analysis\": [75]",
        ),
        ("a gas in degrees", "{\"value\": 75, \"unit\": \"%\", \"tolerance\": 1}", "{\"value\": 75, \"unit\": \"C\"}"),
        ("a gas by mass", "{\"value\": 75, \"unit\": \"%\", \"tolerance\": 1}", "{\"value\": 75, \"unit\": \"wt%\"}"),
        ("a gas of 110 %", "\"value\": 75", "\"value\": 110"),
        ("a gas below zero", "\"value\": 75", "\"value\": -75"),
        (
            "a bound that is none",
            "\"value\": 5, \"unit\": \"ppm\"",
            "\"value\": 5, \"unit\": \"ppm\", \"bound\": \"lower\"",
        ),
        ("a frost point over steel", "\"over\": \"ice\"", "\"over\": \"steel\""),
        ("a dew point in ppm", "\"value\": -48, \"unit\": \"C\"", "\"value\": 48, \"unit\": \"ppm\""),
        (
            "a cell without volts",
            "\"balance\": \"N2\",\n",
            "\"balance\": \"N2\", \"oxygen_cell\": {\"value\": 1136, \"unit\": \"C\"},\n",
        ),
        ("a cell that is a number", "\"balance\": \"N2\",\n", "\"balance\": \"N2\", \"oxygen_cell\": 1136,\n"),
        ("a balance that is a number", "\"balance\": \"N2\",\n", "\"balance\": 25,\n"),
        ("a charge above 100.5 %", "\"share_wt\": 17.2", "\"share_wt\": 27.2"),
        ("a charge by volume", "{\"value\": 80.1, \"unit\": \"%\"}", "{\"value\": 80.1, \"unit\": \"vol%\"}"),
        ("a share below zero", "\"share_wt\": 17.2", "\"share_wt\": -1"),
        ("a member without a substance", "\"substance\": \"Cr\", ", ""),
        ("an activity of zero", "\"activity\": 0.25", "\"activity\": 0"),
        ("activity and coefficient", "\"activity\": 0.25", "\"activity\": 0.25, \"activity_coefficient\": 1.3"),
        ("a factor of doubt below one", "\"doubt_factor\": 1.6", "\"doubt_factor\": 0.5"),
        ("a change without a name", "\"name\": \"Chromium oxidises\", ", ""),
        ("a change without an equation", "\"equation\": \"Cr + H2O = Cr2O3 + H2\", ", ""),
        ("a change without a wish", ", \"wish\": \"avoid\", \"zones\"", ", \"zones\""),
        ("a wish that is none", "\"wish\": \"avoid\"", "\"wish\": \"maybe\""),
        ("two changes of one name", "\"name\": \"Iron scales\"", "\"name\": \"Chromium oxidises\""),
        ("a zone that the line has not", "\"zones\": [\"Soak\"]", "\"zones\": [\"Soke\"]"),
        ("zones of a change as a text", "\"zones\": [\"Soak\"]", "\"zones\": \"Soak\""),
        ("an activity of a change below zero", "\"zones\": [\"Soak\"]", "\"activities\": {\"Cr\": -1}"),
        ("an activity of a change in words", "\"zones\": [\"Soak\"]", "\"activities\": {\"Cr\": \"low\"}"),
        ("acts above in seconds", "\"value\": 300, \"unit\": \"C\"", "\"value\": 300, \"unit\": \"s\""),
        ("an allowed time below zero", "{\"value\": 8,", "{\"value\": -8,"),
        ("tolerated in words", "\"wish\": \"avoid\"", "\"wish\": \"avoid\", \"tolerated\": \"a bit\""),
        ("variants that are no list", "\"variants\": [", "\"variants\": {\"x\": 1}, \"y\": ["),
        (
            "several at once",
            "\"value\": 75, \"unit\": \"%\", \"tolerance\": 1}}, \"balance\": \"N2\"",
            "\"value\": \"75\", \"unit\": \"per cent\", \"tolerance\": 1}}, \"balance\": 3, \"basis2\": 1",
        ),
    ] {
        sheet.case(name, refused(s.assess(&spoiled(from, to))));
    }
    let many = spoiled(
        "\"zones\": [\n",
        &format!("\"zones\": [\n{}", "{\"name\": \"Heat\", \"temperature\": 950},\n".repeat(40)),
    );
    let p = refused(s.assess(&many)).unwrap();
    assert_eq!(p.more.len(), 19, "twenty problems at most");
    sheet.check("lines", 55);
}

#[test]
fn variants() {
    let s = session();
    let mut sheet = Sheet::default();
    let op = "{\"op\": \"replace\", \"path\": \"/zones/0/gas/dew_point/value\", \"value\": -38}";
    for (name, variant, to) in [
        ("a variant the line has not", "Drier", op),
        ("a step that is none", "Wetter", "{\"op\": \"move\", \"path\": \"/zones/0\"}"),
        ("a step without a path", "Wetter", "{\"op\": \"remove\"}"),
        ("a path the line has not", "Wetter", "{\"op\": \"replace\", \"path\": \"/zones/7/name\", \"value\": 1}"),
        ("a path without its slash", "Wetter", "{\"op\": \"remove\", \"path\": \"zones\"}"),
        ("an index past the end", "Wetter", "{\"op\": \"add\", \"path\": \"/zones/9\", \"value\": {}}"),
        ("a step without a value", "Wetter", "{\"op\": \"add\", \"path\": \"/about\"}"),
    ] {
        sheet.case(name, refused(s.variant(&spoiled(op, to), variant)));
    }
    sheet.check("variants", 7);
}

/// What a zone or a change says where only it cannot be taken.
fn refusal(s: &Session, text: &str) -> Result<Problem, String> {
    let a = s.assess(text).map_err(|p| format!("the whole line is refused: {p:?}"))?;
    let zones = a.zones.iter().filter_map(|z| z.refused.clone());
    let found = zones.chain(a.changes.iter().filter_map(|c| c.refused.clone())).next();
    let found = found.ok_or("taken, though it is bad input")?;
    if !a.findings.iter().any(|f| f.standing == "no data") {
        return Err("a standing in spite of it".to_string());
    }
    Ok(found)
}

#[test]
fn gases() {
    let s = session();
    let mut sheet = Sheet::default();
    let gas = "\"basis\": \"dry\", \"analysis\": {\"H2\": {\"value\": 75, \"unit\": \"%\", \"tolerance\": 1}}, \"balance\": \"N2\",\n             \"dew_point\": {\"value\": -48, \"unit\": \"C\", \"tolerance\": 2, \"over\": \"ice\"}";
    for (name, to) in [
        ("an empty gas", ""),
        (
            "a sum of 110 %",
            "\"analysis\": {\"H2\": {\"value\": 75, \"unit\": \"%\"}, \"N2\": {\"value\": 35, \"unit\": \"%\"}}",
        ),
        (
            "a sum of 80 %",
            "\"analysis\": {\"H2\": {\"value\": 75, \"unit\": \"%\"}, \"N2\": {\"value\": 5, \"unit\": \"%\"}}",
        ),
        (
            "a sum of 110 % with a balance",
            "\"analysis\": {\"H2\": {\"value\": 60, \"unit\": \"%\"}, \"CO\": {\"value\": 50, \"unit\": \"%\"}}, \"balance\": \"N2\"",
        ),
        (
            "a partial pressure above the pressure",
            "\"analysis\": {\"H2\": {\"value\": 2, \"unit\": \"bar\"}}, \"balance\": \"N2\"",
        ),
        (
            "no basis in a wet gas",
            "\"analysis\": {\"H2\": {\"value\": 75, \"unit\": \"%\"}}, \"balance\": \"N2\", \"dew_point\": {\"value\": -48, \"unit\": \"C\"}",
        ),
        (
            "a gas that is no formula",
            "\"analysis\": {\"hydrogen\": {\"value\": 75, \"unit\": \"%\"}}, \"balance\": \"N2\"",
        ),
        (
            "a balance that is no formula",
            "\"analysis\": {\"H2\": {\"value\": 75, \"unit\": \"%\"}}, \"balance\": \"rest\"",
        ),
        (
            "a gas and its balance the same",
            "\"analysis\": {\"H2\": {\"value\": 75, \"unit\": \"%\"}}, \"balance\": \"H2\"",
        ),
        (
            "water twice",
            "\"basis\": \"dry\", \"analysis\": {\"H2O\": {\"value\": 1, \"unit\": \"%\"}}, \"balance\": \"N2\", \"dew_point\": {\"value\": -48, \"unit\": \"C\"}",
        ),
        ("a dew point of 101 C", "\"balance\": \"N2\", \"dew_point\": {\"value\": 101, \"unit\": \"C\"}"),
        ("a dew point of -120 C", "\"balance\": \"N2\", \"dew_point\": {\"value\": -120, \"unit\": \"C\"}"),
        (
            "more water than gas",
            "\"balance\": \"N2\", \"dew_point\": {\"value\": 60, \"unit\": \"C\", \"pressure\": {\"value\": 100, \"unit\": \"mbar\"}}",
        ),
        ("a dew point without a gas", "\"dew_point\": {\"value\": -48, \"unit\": \"C\"}"),
    ] {
        sheet.case(name, refusal(&s, &spoiled(gas, to)));
    }
    sheet.check("gases", 14);
}

#[test]
fn changes_of_a_line() {
    let s = session();
    let mut sheet = Sheet::default();
    for (name, from, to) in [
        ("an equation that does not balance", "Cr + H2O = Cr2O3 + H2", "2 Cr + H2O = Cr2O3 + H2"),
        ("an equation without a sign", "Cr + H2O = Cr2O3 + H2", "Cr + H2O"),
        ("a substance the data do not hold", "Cr + H2O = Cr2O3 + H2", "U + O2 = UO2"),
        ("an element that is none", "Cr + H2O = Cr2O3 + H2", "Qq + O2 = QqO2"),
        ("a phase the data do not hold", "Cr + H2O = Cr2O3 + H2", "Cr(q) + H2O = Cr2O3 + H2"),
        ("an equation that balances two ways", "Cr + H2O = Cr2O3 + H2", "C + O2 = CO + CO2"),
    ] {
        sheet.case(name, refusal(&s, &spoiled(from, to)));
    }
    sheet.check("changes_of_a_line", 6);
}
