//! The gas re-equilibrated: at equilibrium, nothing lost; and the vapour pressure against its own inverse.

use leeway_api::request::ChangeRequest;
use leeway_gas::humidity::{frost_point_k, saturation_pressure_bar};
use leeway_gas::reading::Surface;
use leeway_gas::shift::Shift;
use leeway_quantity::math::pow;
use leeway_substances::Book;
use leeway_tests::session;

#[track_caller]
fn relative(found: f64, wanted: f64, within: f64, what: &str) {
    assert!((found / wanted - 1.0).abs() <= within, "{what}: found {found}, wanted {wanted}");
}

#[test]
fn the_shift_conserves_and_settles() {
    let book = Book::parse(leeway_dataset::TEXT).expect("data");
    let shift = Shift::new(&book);
    for (t_k, co2) in [(1198.15, 0.0015), (800.0, 0.05), (1500.0, 1e-9)] {
        let gas = [("CO", 0.20), ("CO2", co2), ("H2", 0.40), ("H2O", 0.004), ("N2", 0.3945)];
        let total: f64 = gas.iter().map(|(_, p)| p).sum();
        let after = shift.run(&book, &gas, t_k).expect("it shifts").partial_pressures_bar;
        let of = |f: &str| after.iter().find(|(g, _)| g == f).map_or(0.0, |(_, p)| *p);
        let asked = ChangeRequest {
            equation: "CO + H2O = CO2 + H2".into(),
            at: vec![format!("{t_k} K")],
            ..ChangeRequest::default()
        };
        let k = pow(10.0, session().change(&asked).expect("held")[0].log10_k);
        relative(of("CO2") * of("H2") / (of("CO") * of("H2O")), k, 1e-9, "at equilibrium");
        relative(of("CO") + of("CO2"), 0.2 + co2, 1e-12, "carbon");
        relative(of("H2") + of("H2O"), 0.404, 1e-12, "hydrogen");
        relative(of("CO") + 2.0 * of("CO2") + of("H2O"), 0.2 + 2.0 * co2 + 0.004, 1e-12, "oxygen");
        relative(after.iter().map(|(_, p)| p).sum(), total, 1e-12, "the pressure");
    }
}

/// Burning takes moles out of the gas; the pressure stays, and so do the ratios of the elements.
#[test]
fn burning_conserves() {
    let book = Book::parse(leeway_dataset::TEXT).expect("data");
    let shift = Shift::new(&book);
    let gas = [("H2", 0.5), ("CO", 0.1), ("O2", 0.02), ("N2", 0.38)];
    let after = shift.run(&book, &gas, 1200.0).expect("it burns").partial_pressures_bar;
    let of = |f: &str| after.iter().find(|(g, _)| g == f).map_or(0.0, |(_, p)| *p);
    let scale = of("N2") / 0.38;
    relative(of("H2") + of("H2O"), 0.5 * scale, 1e-12, "hydrogen");
    relative(of("CO") + of("CO2"), 0.1 * scale, 1e-12, "carbon");
    relative(of("CO") + 2.0 * of("CO2") + of("H2O"), (0.1 + 0.04) * scale, 1e-12, "oxygen");
    relative(after.iter().map(|(_, p)| p).sum(), 1.0, 1e-12, "the pressure");
    // More oxygen than fuel: the fuels are left at their own equilibrium beside it, far below any analyser.
    let lean =
        shift.run(&book, &[("H2", 0.01), ("O2", 0.2), ("N2", 0.79)], 1200.0).expect("it burns").partial_pressures_bar;
    let trace = lean.iter().find(|(f, _)| f == "H2").map_or(0.0, |(_, p)| *p);
    assert!(trace > 0.0 && trace < 1e-8, "{trace}");
}

#[test]
fn a_frost_point_is_the_inverse_of_its_pressure() {
    for over in [Surface::Ice, Surface::Water] {
        for t in [-95.0, -40.0, -5.0, 20.0] {
            let t_k = t + 273.15;
            let back = frost_point_k(saturation_pressure_bar(t_k, over).expect("inside"), over).expect("inside");
            assert!((back - t_k).abs() < 1e-9, "{t}: {back}");
        }
    }
    assert!(
        saturation_pressure_bar(150.0, Surface::Ice).is_none()
            && saturation_pressure_bar(400.0, Surface::Water).is_none()
    );
}
