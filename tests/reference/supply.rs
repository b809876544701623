//! Published values on supply, bus, cables, harmonics and earthing.

use crate::Run;
use crate::case::{Case, Results, exact};
use engineering::checks::reflected_wave::{Withstand, withstand_limit};
use engineering::checks::{bus_discharged, pe_conductor, short_circuit_rating, supply_voltage};
use engineering::formulas::copper::Conductor;
use engineering::formulas::fault_current::{self, Transformer};
use engineering::formulas::{
    capacitor, conductor, distortion_limit, rectifier, reflection, sharing_resistor, synchronous, triple, unbalance,
    voltage_drop,
};
use engineering::{
    ApparentPower, Capacitance, CrossSection, Current, Duration, Frequency, Length, Ratio, Resistance, Temperature,
    TemperatureRise, Verdict, Voltage,
};

pub const RUNS: &[(&str, Run)] = &[
    ("dc-bus-from-line", bus_from_line),
    ("dc-bus-phase-loss", phase_loss),
    ("dc-bus-discharge", discharge),
    ("residual-voltage-rule", residual_voltage),
    ("precharge", precharge),
    ("balance-resistor", balance_resistor),
    ("reflection-coefficient", reflection_coefficient),
    ("reflected-wave", reflected_wave),
    ("motor-peak-voltage-limit", peak_limit),
    ("cable-voltage-drop", cable_drop),
    ("conductor-resistance", conductor_resistance),
    ("iec-60228-resistance", conductor_table),
    ("transformer-fault-current", fault_current),
    ("sccr-check", short_circuit),
    ("percent-impedance", percent_impedance),
    ("line-reactor", line_reactor),
    ("six-pulse-harmonics", harmonics),
    ("ieee-519-limit", distortion),
    ("supply-voltage-tolerance", supply_tolerance),
    ("voltage-unbalance", voltage_unbalance),
    ("unbalance-heating", unbalance_heating),
    ("unbalance-derating", unbalance_derating),
    ("protective-conductor", protective_conductor),
    ("pe-continuity-expected", pe_continuity),
    ("trade-facts", trade_facts),
];

fn volts(case: &Case, name: &str) -> Voltage {
    Voltage::from_volts(case.number(name, "V"))
}

fn amperes(case: &Case, name: &str) -> Current {
    Current::from_amperes(case.number(name, "A"))
}

fn ohms(case: &Case, name: &str) -> Resistance {
    Resistance::from_ohms(case.number(name, "Ohm"))
}

fn percent(case: &Case, name: &str) -> Ratio {
    Ratio::from_fraction(case.number(name, "%") / 100.0)
}

fn capacitance(case: &Case) -> Capacitance {
    Capacitance::from_farads(case.number("capacitance", "uF") * 1e-6)
}

fn bus_from_line(case: &Case) -> Results {
    let line = volts(case, "line_voltage");
    Results::new()
        .number("mean_unsmoothed", rectifier::mean(line).volts(), "V dc")
        .number("peak", rectifier::peak(line).volts(), "V dc")
        .number("ripple_peak_to_peak_unsmoothed", rectifier::ripple(line).volts(), "V")
        .number("ripple_rms_percent_of_mean", rectifier::ripple_of_mean().fraction() * 100.0, "%")
}

fn phase_loss(case: &Case) -> Results {
    let (line, supply) = (volts(case, "line_voltage"), Frequency::from_hertz(case.number("line_frequency", "Hz")));
    Results::new()
        .number("mean_three_phase", rectifier::mean(line).volts(), "V dc")
        .number("ripple_frequency_three_phase", rectifier::ripple_frequency(supply, false).hertz(), "Hz")
        .number("mean_one_phase_lost_unsmoothed", rectifier::mean_with_a_phase_lost(line).volts(), "V dc")
        .number("ripple_frequency_one_phase_lost", rectifier::ripple_frequency(supply, true).hertz(), "Hz")
}

fn discharge(case: &Case) -> Results {
    let (resistance, capacitance) = (ohms(case, "resistance"), capacitance(case));
    let time = capacitor::discharge_time(
        resistance,
        capacitance,
        volts(case, "initial_voltage"),
        volts(case, "target_voltage"),
    );
    Results::new().number("time_constant", capacitor::time_constant(resistance, capacitance).seconds(), "s").number(
        "time_to_target",
        time.seconds(),
        "s",
    )
}

fn residual_voltage(case: &Case) -> Results {
    assert!(case.maybe("stored_charge", "uC").is_none(), "{}: the charge is not stated", case.id());
    let needed = bus_discharged::needs_waiting_time_marked(volts(case, "voltage_after_5s"), None);
    Results::new().flag("needs_warning_and_delay_marking", needed)
}

fn precharge(case: &Case) -> Results {
    let (resistance, capacitance, supply) =
        (ohms(case, "resistance"), capacitance(case), volts(case, "supply_dc_voltage"));
    Results::new()
        .number("time_constant", capacitor::time_constant(resistance, capacitance).seconds(), "s")
        .number("time_to_95_percent", capacitor::charged_to_95_percent(resistance, capacitance).seconds(), "s")
        .number("peak_current", capacitor::first_current(resistance, supply).amperes(), "A")
        .number("resistor_energy", capacitor::energy(capacitance, supply).joules(), "J")
}

fn balance_resistor(case: &Case) -> Results {
    let leakage = Current::from_amperes(case.number("leakage_current_difference", "mA") * 1e-3);
    let largest =
        sharing_resistor::largest(volts(case, "capacitor_rated_voltage"), volts(case, "bus_voltage"), leakage);
    Results::new().number("max_resistance", largest.expect("capacitors that stand the bus").ohms(), "Ohm")
}

/// The incident wave is what the load's voltage is a (1 + G)th of.
fn reflection_coefficient(case: &Case) -> Results {
    let coefficient = reflection::coefficient(ohms(case, "load_impedance"), ohms(case, "cable_impedance")).fraction();
    let incident = volts(case, "load_voltage").volts() / (1.0 + coefficient);
    Results::new()
        .number("voltage_reflection_coefficient", coefficient, "1")
        .number("incident_voltage", incident, "V")
        .number("reflected_voltage", incident * coefficient, "V")
}

fn reflected_wave(case: &Case) -> Results {
    let coefficient = reflection::coefficient(ohms(case, "motor_surge_impedance"), ohms(case, "cable_impedance"));
    let a_second = Length::from_metres(case.number("propagation_speed", "m/us") * 1e6);
    let critical = reflection::critical_length(a_second, Duration::from_seconds(case.number("rise_time", "us") * 1e-6));
    let cable = Length::from_metres(case.number("cable_length", "m"));
    let peak = reflection::peak(volts(case, "dc_bus_voltage"), coefficient, cable, critical);
    Results::new()
        .number("reflection_coefficient", coefficient.fraction(), "1")
        .number("critical_length", critical.metres(), "m")
        .number("peak_voltage", peak.volts(), "V")
}

/// The limits are of rated voltage; the bus plays no part in these two.
fn peak_limit(case: &Case) -> Results {
    let withstand = match case.text("standard") {
        "NEMA MG 1 Part 30" => Withstand::GeneralPurpose,
        "NEMA MG 1 Part 31 (3.1 x rated)" => Withstand::InverterDuty,
        other => panic!("{}: standard {other}", case.id()),
    };
    let rated = volts(case, "rated_voltage");
    let (peak, rise) = withstand_limit(withstand, rated, rectifier::peak(rated)).expect("a rated voltage in range");
    Results::new().number("peak_limit", peak.volts(), "V").number(
        "min_rise_time",
        rise.expect("a rise time").seconds() * 1e6,
        "us",
    )
}

fn cable_drop(case: &Case) -> Results {
    let kilometre = |name| Resistance::from_ohms(case.number(name, "Ohm/km"));
    let temperature = Temperature::from_celsius(case.number("conductor_temperature", "degC"));
    let warm = conductor::at_temperature(kilometre("resistance_20C"), temperature);
    let cosine = Ratio::from_fraction(case.number("power_factor", "1"));
    let length = Length::from_metres(case.number("length", "m"));
    let drop = voltage_drop::voltage_drop(amperes(case, "current"), length, warm, kilometre("reactance"), cosine);
    Results::new()
        .number("resistance_at_temperature", warm.ohms(), "Ohm/km")
        .number("voltage_drop", drop.volts(), "V")
        .number("voltage_drop_percent", drop.volts() / volts(case, "voltage_ll").volts() * 100.0, "%")
}

fn conductor_resistance(case: &Case) -> Results {
    let per_kelvin = Ratio::from_fraction(case.number("alpha_20", "1/K"));
    let temperature = Temperature::from_celsius(case.number("temperature", "degC"));
    let found = conductor::by_coefficient(ohms(case, "r_at_20C"), per_kelvin, temperature);
    Results::new().number("r_at_temperature", found.ohms(), "Ohm")
}

fn conductor_table(case: &Case) -> Results {
    assert_eq!(case.text("material"), "plain copper");
    let build = match case.text("conductor_class") {
        "2" => conductor::Build::Class2,
        "5" => conductor::Build::Class5,
        other => panic!("{}: class {other}", case.id()),
    };
    let section = CrossSection::from_square_millimetres(case.number("cross_section", "mm2"));
    let found = conductor::largest_per_kilometre(section, build).expect("a section of the table");
    Results::new().number("max_resistance_20C", found.ohms(), "Ohm/km")
}

fn fault_current(case: &Case) -> Results {
    let transformer = Transformer {
        rating: ApparentPower::from_volt_amperes(case.number("rating", "kVA") * 1e3),
        secondary: volts(case, "secondary_voltage"),
        impedance: percent(case, "impedance_percent"),
    };
    let source = case.maybe("source_fault_level", "MVA").map(|s| ApparentPower::from_volt_amperes(s * 1e6));
    let none = Resistance::from_ohms(0.0);
    let found = fault_current::prospective(&transformer, source, none, none).amperes();
    let results = Results::new().number("symmetrical_fault_current", found, "A");
    if case.expects("full_load_current") {
        results.number("full_load_current", transformer.full_load().amperes(), "A")
    } else {
        results
    }
}

fn short_circuit(case: &Case) -> Results {
    let kiloamperes = |name| Some(Current::from_amperes(case.number(name, "kA") * 1e3));
    let outcome = short_circuit_rating::check(&short_circuit_rating::Inputs {
        rating: kiloamperes("equipment_sccr"),
        stated_prospective: kiloamperes("available_fault_current"),
        ..short_circuit_rating::Inputs::default()
    });
    assert!(matches!(outcome.verdict, Verdict::Within | Verdict::Outside), "{}: {}", case.id(), outcome.summary);
    Results::new().flag("acceptable", outcome.verdict == Verdict::Within)
}

fn percent_impedance(case: &Case) -> Results {
    let found = fault_current::impedance(percent(case, "percent_resistance"), percent(case, "percent_reactance"));
    Results::new().number("percent_impedance", found.fraction() * 100.0, "%")
}

fn line_reactor(case: &Case) -> Results {
    let base = ApparentPower::from_volt_amperes(case.number("base_apparent_power", "kVA") * 1e3);
    let reactance = fault_current::base_impedance(percent(case, "impedance_percent"), volts(case, "voltage_ll"), base);
    let henries = fault_current::henries(reactance, Frequency::from_hertz(case.number("frequency", "Hz")));
    Results::new().number("reactance", reactance.ohms(), "Ohm").number("inductance", henries * 1e3, "mH")
}

/// All orders together: the distortion of a wave whose fundamental is this part of the whole.
fn harmonics(case: &Case) -> Results {
    assert!(case.number("pulse_number", "1") == 6.0, "{}: a six-pulse bridge", case.id());
    let factor = rectifier::distortion_factor().fraction();
    let orders: Vec<f64> = rectifier::characteristic_orders(25).into_iter().map(f64::from).collect();
    // The ideal distortion of a single order is its own share.
    let share = |order: u32| {
        let up_to = |highest| rectifier::ideal_distortion(highest).fraction();
        (up_to(order).powi(2) - up_to(order - 1).powi(2)).sqrt() * 100.0
    };
    Results::new()
        .numbers("orders_to_25", orders, "1")
        .number("i5_percent", share(5), "%")
        .number("i7_percent", share(7), "%")
        .number("thd_infinite", (1.0 / (factor * factor) - 1.0).sqrt() * 100.0, "%")
        .number("thd_to_25", rectifier::ideal_distortion(25).fraction() * 100.0, "%")
        .number("thd_to_50", rectifier::ideal_distortion(50).fraction() * 100.0, "%")
        .number("distortion_factor", factor, "1")
}

fn distortion(case: &Case) -> Results {
    assert_eq!(case.text("pcc_voltage"), "120 V to 69 kV");
    let ratio = distortion_limit::short_circuit_ratio(
        amperes(case, "short_circuit_current"),
        amperes(case, "max_demand_current"),
    );
    let of_five =
        distortion_limit::of_order(ratio, 5, distortion_limit::Edition::Of2022).expect("an order with a limit");
    Results::new()
        .number("isc_over_il", ratio.fraction(), "1")
        .number("tdd_limit", distortion_limit::total(ratio).fraction() * 100.0, "%")
        .number("limit_h_below_11", of_five.fraction() * 100.0, "%")
}

fn supply_tolerance(case: &Case) -> Results {
    let (nominal, measured) = (volts(case, "nominal_voltage"), volts(case, "measured_voltage"));
    assert!((supply_voltage::DEVIATION.value * 100.0 - case.number("tolerance_percent", "%")).abs() < 1e-9);
    let line = || Some(exact(measured));
    // A drive that takes anything leaves the decision to the tolerance.
    let outcome = supply_voltage::check(&supply_voltage::Inputs {
        lines: [line(), line(), line()],
        nominal: Some(nominal),
        drive_lowest: Some(Voltage::from_volts(1.0)),
        drive_highest: Some(Voltage::from_volts(1e5)),
        ..supply_voltage::Inputs::default()
    });
    assert!(matches!(outcome.verdict, Verdict::Within | Verdict::Outside), "{}: {}", case.id(), outcome.summary);
    Results::new()
        .number("deviation_percent", supply_voltage::deviation(measured, nominal).fraction() * 100.0, "%")
        .flag("within", outcome.verdict == Verdict::Within)
}

fn voltage_unbalance(case: &Case) -> Results {
    let lines = ["v_ab", "v_bc", "v_ca"].map(|name| volts(case, name));
    let spread = triple::spread(&lines.map(exact)).expect("three voltages");
    Results::new()
        .number("mean", spread.mean, "V")
        .number("max_deviation", spread.largest.value / 100.0 * spread.mean, "V")
        .number("unbalance_nema_percent", spread.largest.value, "%")
        .number("unbalance_negative_sequence_percent", unbalance::negative_sequence(lines).fraction() * 100.0, "%")
}

fn unbalance_heating(case: &Case) -> Results {
    let rated = TemperatureRise::from_kelvins(case.number("rated_temperature_rise", "K"));
    let heated = unbalance::heated_by(rated, percent(case, "unbalance_nema_percent")).kelvins();
    Results::new()
        .number("rise_increase_percent", (heated / rated.kelvins() - 1.0) * 100.0, "%")
        .number("new_rise", heated, "K")
}

fn unbalance_derating(case: &Case) -> Results {
    let factor = unbalance::load_factor(percent(case, "unbalance_nema_percent"));
    match factor {
        Some(factor) if case.expects("derating_factor") => {
            Results::new().number("derating_factor", factor.fraction(), "1")
        }
        other => Results::new().flag("operation_allowed", other.is_some()),
    }
}

fn protective_conductor(case: &Case) -> Results {
    assert!(case.flag("single_pe_copper"), "{}: a single conductor of copper", case.id());
    let milliamperes = |name| Current::from_amperes(case.number(name, "mA") * 1e-3);
    let (ac, dc) = (milliamperes("touch_current_ac"), milliamperes("touch_current_dc"));
    let outcome = pe_conductor::check(&pe_conductor::Inputs {
        phase_section: Some(CrossSection::from_square_millimetres(case.number("phase_conductor", "mm2"))),
        metal: Some(Conductor::Copper),
        routing: Some(pe_conductor::Routing::InCable),
        touch_current_ac: Some(ac),
        touch_current_dc: Some(dc),
        second_pe: Some(false),
        disconnects_on_break: Some(false),
        ..pe_conductor::Inputs::default()
    });
    let rule = outcome.rule.expect("the limit is there before the conductor is");
    Results::new()
        .number("pe_min_section", rule.bands[0].from.expect("a lower limit"), "mm2")
        .flag("special_measures_required", pe_conductor::high_leakage(ac, dc))
}

/// The table gives this section its resistance; the case repeats it.
fn pe_continuity(case: &Case) -> Results {
    let section = CrossSection::from_square_millimetres(case.number("cross_section", "mm2"));
    let kilometre =
        conductor::largest_per_kilometre(section, conductor::Build::Class2).expect("a section of the table");
    assert!((kilometre.ohms() - case.number("resistance_20C", "Ohm/km")).abs() < 1e-12);
    let warm = conductor::at_temperature(kilometre, Temperature::from_celsius(case.number("temperature", "degC")));
    let found = conductor::of_length(warm, Length::from_metres(case.number("length", "m")));
    Results::new().number("expected_resistance", found.ohms(), "Ohm")
}

fn trade_facts(case: &Case) -> Results {
    if case.has("poles") {
        let frequency = Frequency::from_hertz(case.number("frequency", "Hz"));
        let found = synchronous::synchronous_speed(frequency, crate::plates::poles(case) / 2);
        return Results::new().number("synchronous_speed", found.rpm(), "rpm");
    }
    assert_eq!(case.text("rectifier"), "six-pulse diode bridge");
    let line = Frequency::from_hertz(case.number("line_frequency", "Hz"));
    let ripple = rectifier::ripple_frequency(line, false);
    Results::new().number("dc_ripple_frequency", ripple.hertz(), "Hz").number(
        "pulses_per_cycle",
        ripple.hertz() / line.hertz(),
        "1",
    )
}
