//! What people type, in the habits of many sites, and how it is read back.

use leeway_api::request::EntryRequest;
use leeway_quantity::entry::{Share, number, parse, parse_any, share, unit};
use leeway_quantity::instrument::limits_k;
use leeway_quantity::{Kind, Quantity, Unit};
use leeway_tests::session;

#[test]
fn numbers_in_every_habit() {
    for (text, value) in [
        ("1050", 1050.0),
        ("  1050  ", 1050.0),
        ("1050.5", 1050.5),
        ("1050,5", 1050.5),
        ("+12", 12.0),
        ("-48", -48.0),
        ("\u{2212}48", -48.0),
        ("\u{2013}48", -48.0),
        ("\u{2212} 48", -48.0),
        ("-44,5", -44.5),
        ("0,012", 0.012),
        ("0.125", 0.125),
        (".5", 0.5),
        (",5", 0.5),
        ("5.", 5.0),
        ("1 050", 1050.0),
        ("1\u{2009}050", 1050.0),
        ("1\u{202f}050", 1050.0),
        ("1\u{a0}050,5", 1050.5),
        ("1'050", 1050.0),
        ("1\u{2019}050.25", 1050.25),
        ("1 050.125", 1050.125),
        ("1 234 567", 1_234_567.0),
        ("1,234,567", 1_234_567.0),
        ("1.234.567", 1_234_567.0),
        ("1,234.5", 1234.5),
        ("1.234,5", 1234.5),
        ("1,234,567.125", 1_234_567.125),
        ("1234.567", 1234.567),
        ("12.3456", 12.3456),
        ("1e-3", 1e-3),
        ("1E3", 1e3),
        ("1.2e+2", 120.0),
        ("1,2e-3", 1.2e-3),
        ("1.2\u{d7}10^-3", 1.2e-3),
        ("1,2 \u{b7} 10\u{207b}\u{b3}", 1.2e-3),
        ("1.2 x 10^-3", 1.2e-3),
        ("3*10\u{b2}", 300.0),
        ("10^-6", 1e-6),
        ("10\u{207b}\u{b3}", 1e-3),
        ("10", 10.0),
    ] {
        let read = number(text).unwrap_or_else(|e| panic!("{text}: {e}"));
        assert!((read - value).abs() <= 1e-12 * value.abs(), "{text}: {read}");
    }
}

#[test]
fn what_may_be_two_numbers_is_refused_with_both() {
    for (text, hints) in [
        ("1,050", ["1050", "1.0500"]),
        ("1.050", ["1050", "1.0500"]),
        ("12,345", ["12345", "12.3450"]),
        ("-1.050", ["-1050", "-1.0500"]),
    ] {
        let e = number(text).expect_err(text);
        assert_eq!(e.hints(), hints, "{text}");
        let values: Vec<f64> = e.hints().iter().map(|h| number(h).unwrap_or_else(|e| panic!("{h}: {e}"))).collect();
        assert!((values[0] / values[1] - 1000.0).abs() < 1e-9, "{text}: {values:?}");
    }
    // A ready answer is the whole entry: taking it changes the number and nothing else.
    for (text, unit_wanted) in
        [("<1,050 ppm", Unit::Ppm), ("1,050 F", Unit::Fahrenheit), ("980 K \u{b1} 1,050", Unit::Kelvin)]
    {
        for hint in parse_any(text, Unit::Celsius).expect_err(text).hints() {
            let typed = parse_any(&hint, Unit::Celsius).unwrap_or_else(|e| panic!("{hint}: {e}"));
            assert_eq!(typed.quantity.unit, unit_wanted, "{hint}");
            assert_eq!(typed.bound, text.starts_with('<'), "{hint}");
            assert_eq!(typed.quantity.tolerance.is_some(), text.contains('\u{b1}'), "{hint}");
        }
    }
}

#[test]
fn units_in_many_spellings() {
    for (unit_wanted, spellings) in [
        (Unit::Celsius, &["C", "c", "\u{b0}C", "\u{ba}C", "deg C", "degC", "deg. C", "\u{2103}", "Celsius"][..]),
        (Unit::Fahrenheit, &["F", "\u{b0}F", "degF", "\u{2109}"]),
        (Unit::Kelvin, &["K", "k", "kelvin"]),
        (Unit::Bar, &["bar", "Bar", "bara", "bar(a)", "bar abs", "bar (abs.)"]),
        (Unit::Millibar, &["mbar", "mbara", "mbar(a)", "hPa"]),
        (Unit::Pascal, &["Pa"]),
        (Unit::Kilopascal, &["kPa", "kPa(a)", "KPA"]),
        (Unit::Atmosphere, &["atm"]),
        (Unit::Torr, &["Torr", "torr", "mmHg", "mm Hg"]),
        (Unit::Psi, &["psi", "psia", "psi(a)"]),
        (Unit::Percent, &["%", "vol%", "Vol.-%", "vol-%", "% vol", "wt%", "wt.%", "mol%"]),
        (Unit::Ppm, &["ppm", "ppmv", "ppm(v)", "vol ppm", "vpm"]),
        (Unit::Ppb, &["ppb", "ppbv"]),
        (Unit::Volt, &["V"]),
        (Unit::Millivolt, &["mV", "mv"]),
        (Unit::KelvinPerSecond, &["K/s", "C/s", "\u{b0}C/s", "k/s"]),
        (Unit::KelvinPerMinute, &["K/min", "\u{b0}C/min"]),
        (Unit::KelvinPerHour, &["K/h", "C/h", "\u{b0}C/h"]),
        (Unit::Second, &["s", "sec"]),
        (Unit::Minute, &["min"]),
        (Unit::Hour, &["h", "hr"]),
    ] {
        for text in spellings {
            assert_eq!(unit(text), Some(unit_wanted), "{text}");
        }
    }
    for text in ["", "grd", "barg", "bar(g)", "mA", "\u{b0}", "%%", "K/K"] {
        assert_eq!(unit(text), None, "{text}");
    }
}

#[test]
fn readings_as_they_are_typed() {
    for (text, value, unit_wanted, tolerance, bound, over) in [
        ("950", 950.0, Unit::Celsius, None, false, None),
        ("950 \u{b1} 4", 950.0, Unit::Celsius, Some(4.0), false, None),
        ("950 +- 4 C", 950.0, Unit::Celsius, Some(4.0), false, None),
        ("950\u{b0}C +/- 4 K", 950.0, Unit::Celsius, Some(4.0), false, None),
        ("1740 F \u{b1} 5 K", 1740.0, Unit::Fahrenheit, Some(9.0), false, None),
        ("-48 C dp", -48.0, Unit::Celsius, None, false, None),
        ("\u{2212}48,5 \u{b0}C fp", -48.5, Unit::Celsius, None, false, Some("ice")),
        ("-48 frost", -48.0, Unit::Celsius, None, false, Some("ice")),
        ("-20 C dew point over water \u{b1} 2", -20.0, Unit::Celsius, Some(2.0), false, Some("water")),
        ("35 ppm", 35.0, Unit::Ppm, None, false, None),
        ("<0,1 ppm", 0.1, Unit::Ppm, None, true, None),
        ("<= 5 ppb", 5.0, Unit::Ppb, None, true, None),
        ("\u{2264} 5 ppb", 5.0, Unit::Ppb, None, true, None),
        ("1.2 Vol.-% \u{b1} 0.1", 1.2, Unit::Percent, Some(0.1), false, None),
        ("1025 mbar", 1025.0, Unit::Millibar, None, false, None),
        ("1,2\u{d7}10\u{207b}\u{b2} bar", 0.012, Unit::Bar, None, false, None),
        ("1136 mV \u{b1} 5", 1136.0, Unit::Millivolt, Some(5.0), false, None),
    ] {
        let t = parse_any(text, Unit::Celsius).unwrap_or_else(|e| panic!("{text}: {e}"));
        assert!((t.quantity.given - value).abs() < 1e-9, "{text}: {}", t.quantity.given);
        assert_eq!((t.quantity.unit, t.bound, t.over), (unit_wanted, bound, over), "{text}");
        let steps = t.quantity.tolerance.map(|(s, _)| s);
        assert!(
            steps.zip(tolerance).map_or(steps.is_none() && tolerance.is_none(), |(a, b)| (a - b).abs() < 1e-9),
            "{text}: {steps:?}"
        );
    }
}

/// What would be read as another quantity in silence is refused with what may be meant.
#[test]
fn what_may_be_two_quantities_is_refused_with_both() {
    // A plus stands before a pressure over the hall's, not before an absolute one.
    let e = parse("+12 mbar", Kind::Pressure, Unit::Bar).expect_err("+12 mbar");
    assert_eq!(e.hints(), ["1.02525 bar", "12 mbar"]);
    let e = parse("+1.025 bar", Kind::Pressure, Unit::Bar).expect_err("+1.025 bar");
    assert_eq!(e.hints(), ["2.03825 bar", "1.0250 bar"]);
    // Is the K the tolerance's only, or the reading's as well?
    let e = parse("950 \u{b1} 4 K", Kind::Temperature, Unit::Celsius).expect_err("950 +- 4 K");
    assert_eq!(e.hints(), ["950 C \u{b1} 4 K", "950 K \u{b1} 4 K"]);
    let kelvin: Vec<f64> =
        e.hints().iter().map(|h| parse(h, Kind::Temperature, Unit::Celsius).unwrap().quantity.value).collect();
    assert!((kelvin[0] - 1223.15).abs() < 1e-9 && (kelvin[1] - 950.0).abs() < 1e-9, "{kelvin:?}");
    // Nothing is 48 below 0 K: only one of the two can be meant.
    let t = parse("-48 \u{b1} 2 K fp", Kind::Temperature, Unit::Celsius).unwrap();
    assert_eq!((t.quantity.unit, t.quantity.given, t.over), (Unit::Celsius, -48.0, Some("ice")));
    // Ten percent of 5 ppm, not ten percent of the gas.
    for (text, hint, kind) in [
        ("5 ppm \u{b1} 10 %", "5 ppm \u{b1} 0.5", Kind::Fraction),
        ("1013 mbar +- 1 %", "1013 mbar +- 10.13", Kind::Pressure),
        ("950 C +/- 0.75%", "950 C +/- 7.125", Kind::Temperature),
    ] {
        let e = parse(text, kind, Unit::Bar).expect_err(text);
        assert_eq!(e.hints(), [hint], "{text}");
    }
    // A tolerance of a reading in percent is in percent of the gas.
    let t = parse("75 % \u{b1} 2 %", Kind::Fraction, Unit::Percent).unwrap();
    assert!((t.quantity.tolerance.unwrap().0 - 2.0).abs() < 1e-12);
}

#[test]
fn a_share_by_mass_is_no_share_by_volume() {
    for (text, of) in [
        ("wt%", Some(Share::Mass)),
        ("Gew.-%", Some(Share::Mass)),
        ("% w/w", Some(Share::Mass)),
        ("mol-%", Some(Share::Volume)),
        ("ppmv", Some(Share::Volume)),
        ("% v/v", Some(Share::Volume)),
        ("%", None),
        ("ppm", None),
        ("V", None),
    ] {
        assert_eq!(share(text), of, "{text}");
    }
}

#[test]
fn the_words_of_a_dew_point_stand_where_they_are_written() {
    for (text, value, over) in [
        ("dp -48 C", -48.0, None),
        ("dew point: \u{2212}20,5", -20.5, None),
        ("frost point -50 C", -50.0, Some("ice")),
        ("-10 C \u{b1} 2 over water", -10.0, Some("water")),
    ] {
        let t = parse(text, Kind::Temperature, Unit::Celsius).unwrap_or_else(|e| panic!("{text}: {e}"));
        assert_eq!((t.quantity.given, t.over), (value, over), "{text}");
    }
    let water = parse_any("35 ppm H2O", Unit::Celsius).unwrap();
    assert_eq!((water.quantity.given, water.quantity.unit), (35.0, Unit::Ppm));
}

#[test]
fn gauge_pressures_are_refused_with_the_absolute_value() {
    for (text, hint) in [
        ("12 mbarg", "1.02525 bar"),
        ("12 mbar(g)", "1.02525 bar"),
        ("0,5 barg", "1.51325 bar"),
        ("-3 mbar (g)", "1.01025 bar"),
        ("14.5 psig", "2.01299 bar"),
        ("12 mbar over", "1.02525 bar"),
        ("12 mbar gauge", "1.02525 bar"),
        ("12 mbar \u{fc}", "1.02525 bar"),
        ("12 mmH2O", "1.01443 bar"),
        ("-5 mbar", "1.00825 bar"),
    ] {
        let e = parse(text, Kind::Pressure, Unit::Bar).expect_err(text);
        assert_eq!(e.hints(), [hint], "{text}");
        assert!(parse(hint, Kind::Pressure, Unit::Bar).is_ok(), "{hint}");
    }
}

/// Prints a number as a site of some habit would.
fn habit(value: f64, decimals: usize, style: u8) -> String {
    let plain = format!("{value:.decimals$}");
    let (sign, digits) = plain.strip_prefix('-').map_or(("", plain.as_str()), |d| ("-", d));
    let (whole, part) = digits.split_once('.').unwrap_or((digits, ""));
    let grouped = |by: &str| {
        let mut out = String::new();
        for (i, c) in whole.chars().enumerate() {
            if i > 0 && (whole.len() - i) % 3 == 0 {
                out += by;
            }
            out.push(c);
        }
        out
    };
    let join = |whole: String, mark: &str| if part.is_empty() { whole } else { format!("{whole}{mark}{part}") };
    match style {
        0 => format!("{sign}{}", join(whole.to_string(), ".")),
        1 => format!("{sign}{}", join(whole.to_string(), ",")),
        2 => format!("{}{}", sign.replace('-', "\u{2212}"), join(grouped("\u{2009}"), ",")),
        3 => format!("{sign}{}", join(grouped("\u{2019}"), ".")),
        _ => format!("{sign}{}", join(grouped(" "), ".")),
    }
}

#[test]
fn printed_and_read_again_is_the_same() {
    arbtest::arbtest(|u| {
        let unit = *u.choose(&Unit::ALL)?;
        let decimals = u.int_in_range(0..=5usize)?;
        let scaled = u.int_in_range(0..=999_999_999i64)?;
        let negative = u.arbitrary::<bool>()?;
        #[expect(clippy::cast_precision_loss, reason = "below 2^53")]
        let mut value = scaled as f64 / f64::from(10u32.pow(u32::try_from(decimals).unwrap_or(0)));
        if negative {
            value = -value;
        }
        let value: f64 = format!("{value:.decimals$}").parse().unwrap_or(0.0);
        let style = u.int_in_range(0..=4u8)?;
        let text = format!("{} {}", habit(value, decimals, style), unit.symbol());
        let wanted = Quantity::new(value, unit);
        match (parse(&text, unit.kind(), unit), wanted) {
            (Ok(t), Ok(q)) => assert_eq!((t.quantity.given, t.quantity.unit), (q.given, q.unit), "{text}"),
            (Err(_), Err(_)) => {}
            // One mark before three digits may be either: refused, and one of the ready answers is what was meant.
            (Err(e), Ok(q)) => {
                let meant = |h: &String| parse(h, unit.kind(), unit).is_ok_and(|t| t.quantity.given == q.given);
                assert!(e.hints().iter().any(meant), "{text}: {e} {:?}", e.hints());
            }
            (Ok(t), Err(e)) => panic!("{text}: read as {:?}, but {e}", t.quantity),
        }
        Ok(())
    });
}

#[test]
fn no_text_is_too_strange() {
    const PIECES: [&str; 30] = [
        "1",
        "050",
        "0",
        ".",
        ",",
        "-",
        "\u{2212}",
        "+",
        " ",
        "\u{2009}",
        "'",
        "e",
        "E",
        "\u{d7}10^",
        "10",
        "^",
        "\u{207b}",
        "\u{b3}",
        "\u{b1}",
        "+-",
        "<",
        "C",
        "\u{b0}",
        "%",
        "ppm",
        "bar(g)",
        "frost",
        "over water",
        "\u{1f525}",
        "\u{0}",
    ];
    arbtest::arbtest(|u| {
        let any: String = u.arbitrary()?;
        let mut text = String::new();
        for _ in 0..u.int_in_range(0..=12)? {
            text += *u.choose(&PIECES)?;
        }
        for text in [any, text] {
            for unit in Unit::ALL {
                if let Err(e) = parse_any(&text, unit) {
                    assert!(!e.found.is_empty() && !e.expected.is_empty() && e.column >= 1, "{text:?}: {e:?}");
                    assert!(e.column <= text.chars().count() + 1, "{text:?}: column {}", e.column);
                }
            }
            let _ = number(&text);
            let _ = limits_k(&text, 1200.0);
        }
        Ok(())
    });
}

/// Limits of error of IEC 60584-1:2013 table 12, from public tabulations of it.
#[test]
fn thermocouple_classes() {
    for (name, celsius, limits) in [
        ("type K class 1", 925.0, 3.7),
        ("type K class 2", 925.0, 6.9375),
        ("type N class 1", 300.0, 1.5),
        ("Type n Class 2", 300.0, 2.5),
        ("type K class 3", -180.0, 2.7),
        ("type S class 1", 1050.0, 1.0),
        ("type S class 1", 1300.0, 1.6),
        ("type R class 2", 1050.0, 2.625),
        ("type B class 2", 1500.0, 3.75),
        ("type B class 3", 1500.0, 7.5),
        ("type B class 3", 700.0, 4.0),
        ("type J class 1", 700.0, 2.8),
        ("type T class 1", 300.0, 1.2),
        ("type E class 2", 800.0, 6.0),
    ] {
        let got = limits_k(name, celsius + 273.15).unwrap_or_else(|e| panic!("{name}: {e}"));
        assert!((got - limits).abs() < 1e-9, "{name} at {celsius} C: {got}");
    }
    for (name, celsius) in [
        ("type K class 1", 1100.0),
        ("type B class 1", 1500.0),
        ("type X class 1", 500.0),
        ("type K", 500.0),
        ("K class 1", 500.0),
        ("type K class 1 new", 500.0),
        ("", 500.0),
    ] {
        assert!(limits_k(name, celsius + 273.15).is_err(), "{name} at {celsius} C");
    }
}

fn asked(field: &str, text: &str, unit: &str) -> EntryRequest {
    EntryRequest { field: field.into(), text: text.into(), unit: unit.into(), ..Default::default() }
}

#[test]
fn an_entry_is_read_back_in_full_with_its_consequence() {
    let s = session();
    let request = EntryRequest { pressure_bar: Some(1.025), ..asked("dew_point", "-44,5 \u{b0}C frost \u{b1} 2", "C") };
    let e = s.read_entry(&request).expect("an entry");
    assert_eq!(e.quantity, serde_json::json!({"value": -44.5, "unit": "C", "tolerance": 2.0, "over": "ice"}));
    assert_eq!(
        (e.field.as_str(), e.read_back.as_str()),
        ("dew_point", "\u{2212}44.5\u{2009}\u{b0}C frost point, over ice \u{b1} 2\u{2009}K")
    );
    // 7.63 Pa over ice at -44.5 C (Sonntag 1990) in 1.025 bar.
    assert_eq!(e.consequence, "74.5\u{2009}ppm H2O at 1.025\u{2009}bar (58.8\u{2009}ppm to 94.1\u{2009}ppm)");

    let request = EntryRequest { pressure_bar: Some(1.025), ..asked("dew_point", "35 ppm", "C") };
    let e = s.read_entry(&request).expect("an entry");
    assert_eq!(e.quantity, serde_json::json!({"value": 35.0, "unit": "ppm", "basis": "wet"}));
    assert_eq!(e.field, "H2O");
    assert!(e.consequence.starts_with("frost point \u{2212}5"), "{}", e.consequence);

    let e = s.read_entry(&asked("gas", "< 0.1 ppm", "%")).expect("an entry");
    assert_eq!(e.quantity, serde_json::json!({"value": 0.1, "unit": "ppm", "bound": "upper"}));
    assert!(e.read_back.contains("detection limit"), "{}", e.read_back);

    let e = s.read_entry(&asked("temperature", "950.125 K", "C")).expect("an entry");
    assert_eq!(e.read_back, "950.125\u{2009}K", "no digit is lost");

    let kept = EntryRequest { tolerance: Some(4.0), ..asked("temperature", "960", "C") };
    let e = s.read_entry(&kept).expect("an entry");
    assert_eq!(
        e.quantity,
        serde_json::json!({"value": 960.0, "unit": "C", "tolerance": 4.0}),
        "the old tolerance stays"
    );
    let kept = EntryRequest { tolerance: Some(4.0), ..asked("temperature", "1760 F", "C") };
    let e = s.read_entry(&kept).expect("an entry");
    assert_eq!(e.quantity["tolerance"].as_f64().map(|t| (t * 1e9).round() / 1e9), Some(7.2), "4 K are 7.2 F degrees");

    let e = s.read_entry(&asked("activity", "0,25", "")).expect("an entry");
    assert_eq!((e.quantity, e.read_back.as_str()), (serde_json::json!(0.25), "0.25"));
}

#[test]
fn a_read_back_reads_back() {
    let s = session();
    arbtest::arbtest(|u| {
        let (field, unit) = *u.choose(&[
            ("temperature", "C"),
            ("pressure", "bar"),
            ("rate", "K/s"),
            ("allowed", "s"),
            ("oxygen_cell", "mV"),
            ("gas", "%"),
            ("dew_point", "C"),
        ])?;
        let decimals = u.int_in_range(0..=6usize)?;
        let text = format!("{:.decimals$}", f64::from(u.int_in_range(0..=999_999u32)?) / 1e3);
        let Ok(first) = s.read_entry(&asked(field, &text, unit)) else { return Ok(()) };
        match s.read_entry(&asked(field, &first.read_back, unit)) {
            Ok(again) => assert_eq!(again.quantity, first.quantity, "{text}: {}", first.read_back),
            // Three digits behind the point may be thousands: said, with what was meant among the answers.
            Err(p) => assert!(p.message.contains("may be") && p.hints.len() == 2, "{text}: {} {p:?}", first.read_back),
        }
        Ok(())
    });
}
