//! Published values on insulation, windings and their sensors.

use crate::Run;
use crate::case::{Case, Results, exact};
use engineering::checks::insulation_resistance::{self, Construction, System, correction};
use engineering::checks::{insulation_test_voltage, polarization_index, sensor_resistance};
use engineering::formulas::copper::{COPPER_IEEE, Conductor, temperature_by_constant, temperature_from};
use engineering::formulas::{installation_insulation, platinum};
use engineering::{Resistance, Temperature, Verdict, Voltage};

pub const RUNS: &[(&str, Run)] = &[
    ("insulation-temperature-correction", temperature_correction),
    ("insulation-acceptance", acceptance),
    ("insulation-minimum", minimum),
    ("insulation-test-voltage", test_voltage),
    ("polarization-index", polarization),
    ("installation-insulation", installation),
    ("winding-temperature-from-resistance", winding_temperature),
    ("pt100", pt100),
    ("pt100-inverse", pt100_inverse),
    ("ptc-cold-check", thermistors_cold),
    ("ptc-triplet-limits", thermistors_hot),
];

fn megohms(value: f64) -> Resistance {
    Resistance::from_ohms(value * 1e6)
}

fn system(case: &Case) -> System {
    match case.text("insulation_type") {
        "thermoplastic" => System::Thermoplastic,
        "thermosetting" => System::Thermosetting,
        other => panic!("{}: insulation type {other}", case.id()),
    }
}

fn at_40(case: &Case) -> (f64, f64) {
    let celsius = case.number("winding_temperature", "degC");
    let (k, _) = correction(Some(system(case)), celsius).expect("a temperature with a rule");
    (k, k * case.number("ir_measured", "MOhm"))
}

fn temperature_correction(case: &Case) -> Results {
    let (k, corrected) = at_40(case);
    Results::new().number("k_t", k, "1").number("ir_at_40C", corrected, "MOhm")
}

fn acceptance(case: &Case) -> Results {
    let outcome = insulation_resistance::check(&insulation_resistance::Inputs {
        reading: Some(exact(megohms(case.number("ir_measured", "MOhm")))),
        winding_temperature: Some(exact(Temperature::from_celsius(case.number("winding_temperature", "degC")))),
        system: Some(system(case)),
        maker_minimum: Some(megohms(case.number("ir_minimum_at_40C", "MOhm"))),
        ..insulation_resistance::Inputs::default()
    });
    Results::new().number("ir_at_40C", at_40(case).1, "MOhm").flag("accept", outcome.verdict == Verdict::Within)
}

fn minimum(case: &Case) -> Results {
    let construction = match case.text("construction") {
        "random-wound" => Construction::RandomWound,
        "form-wound, after 1970" => Construction::FormWound,
        "any, before about 1970" => Construction::Old,
        other => panic!("{}: construction {other}", case.id()),
    };
    let outcome = insulation_resistance::check(&insulation_resistance::Inputs {
        rated_voltage: Some(Voltage::from_volts(case.number("rated_voltage_ll", "V"))),
        construction: Some(construction),
        ..insulation_resistance::Inputs::default()
    });
    let rule = outcome.rule.expect("the limit is there before the reading");
    Results::new().number("ir_minimum_at_40C", rule.bands[0].from.expect("a lower limit"), "MOhm")
}

fn test_voltage(case: &Case) -> Results {
    let rated = Voltage::from_volts(case.number("rated_voltage_ll", "V"));
    let (low, high) = insulation_test_voltage::span(rated).expect("a voltage in the table");
    Results::new().number("test_voltage_min", low.volts(), "V dc").number("test_voltage_max", high.volts(), "V dc")
}

fn polarization(case: &Case) -> Results {
    let class = match case.text("thermal_class") {
        "B" => polarization_index::ThermalClass::B,
        "F" => polarization_index::ThermalClass::F,
        other => panic!("{}: thermal class {other}", case.id()),
    };
    let one = case.number("ir_1min", "MOhm");
    assert!((one - case.number("ir_1min_at_40C", "MOhm")).abs() < 1e-9, "{}: measured at 40 °C", case.id());
    let outcome = polarization_index::check(&polarization_index::Inputs {
        one_minute: Some(exact(megohms(one))),
        ten_minutes: Some(exact(megohms(case.number("ir_10min", "MOhm")))),
        winding_temperature: Some(exact(Temperature::from_celsius(40.0))),
        system: Some(System::Thermosetting),
        construction: Some(Construction::FormWound),
        thermal_class: Some(class),
        ..polarization_index::Inputs::default()
    });
    let index = outcome.figures.iter().find(|f| f.name == "polarization index").expect("the figure");
    let judged = match outcome.verdict {
        Verdict::Within => Some(true),
        Verdict::Outside => Some(false),
        Verdict::Figure => None,
        other => panic!("{}: {other:?}, {}", case.id(), outcome.summary),
    };
    Results::new()
        .number("pi", index.value.parse().expect("a number"), "1")
        .number("pi_minimum", polarization_index::minimum(class).value, "1")
        .flag("pi_meaningful", judged.is_some())
        .judged("pi_ok", judged)
}

fn installation(case: &Case) -> Results {
    let nominal = Voltage::from_volts(case.number("nominal_voltage", "V"));
    let (test, least) = installation_insulation::requirement(nominal, case.flag("selv_or_pelv"));
    Results::new().number("test_voltage", test.volts(), "V dc").number("ir_minimum", least.ohms() / 1e6, "MOhm")
}

fn winding_temperature(case: &Case) -> Results {
    assert_eq!(case.text("material"), "copper");
    let ohms = |name| Resistance::from_ohms(case.number(name, "Ohm"));
    let (cold, hot, at) = (ohms("r_cold"), ohms("r_hot"), Temperature::from_celsius(case.number("t_cold", "degC")));
    Results::new().number("t_hot_k235", temperature_from(cold, at, hot, Conductor::Copper).celsius(), "degC").number(
        "t_hot_k234_5",
        temperature_by_constant(cold, at, hot, COPPER_IEEE).celsius(),
        "degC",
    )
}

fn pt100(case: &Case) -> Results {
    let at = Temperature::from_celsius(case.number("temperature", "degC"));
    Results::new()
        .number("resistance", platinum::resistance(Resistance::from_ohms(100.0), at).ohms(), "Ohm")
        .number("class_b_tolerance", platinum::class_b(at).kelvins(), "K")
        .number("class_a_tolerance", platinum::class_a(at).kelvins(), "K")
}

fn pt100_inverse(case: &Case) -> Results {
    let measured = Resistance::from_ohms(case.number("resistance", "Ohm"));
    let found = platinum::temperature(Resistance::from_ohms(100.0), measured).expect("a temperature in range");
    Results::new().number("temperature", found.celsius(), "degC")
}

fn in_series(case: &Case) -> u32 {
    let count = case.number("sensors_in_series", "1");
    (1..=12).find(|n| f64::from(*n) == count).expect("a count of sensors")
}

fn thermistors_cold(case: &Case) -> Results {
    let outcome = sensor_resistance::check(&sensor_resistance::Inputs {
        sensor: Some(sensor_resistance::Sensor::Thermistor),
        reading: Some(exact(Resistance::from_ohms(case.number("resistance_cold", "Ohm")))),
        in_series: Some(in_series(case)),
        ..sensor_resistance::Inputs::default()
    });
    let state = &outcome.figures.iter().find(|f| f.name == "state").expect("the state").value;
    let state = match (outcome.verdict, state.as_str()) {
        (Verdict::Within, "plausible") => "ok",
        (Verdict::Outside, "short circuit") => "short_circuit",
        (Verdict::Outside, "too high, or open") => "high_or_open",
        other => panic!("{}: {other:?}", case.id()),
    };
    let most = sensor_resistance::cold_most(in_series(case)).ohms();
    Results::new().number("max_cold_resistance", most, "Ohm").text("state", state)
}

fn thermistors_hot(case: &Case) -> Results {
    let [below, above, far_above] = sensor_resistance::response_bounds(in_series(case)).map(Resistance::ohms);
    Results::new().number("max_at_tnat_minus_5K", below, "Ohm").number("min_at_tnat_plus_5K", above, "Ohm").number(
        "min_at_tnat_plus_15K",
        far_above,
        "Ohm",
    )
}
