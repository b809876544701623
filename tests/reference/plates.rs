//! Published values on nameplates: speed, torque, power, efficiency, tables, and a motor off its rated frequency.

use crate::Run;
use crate::case::{Case, Results};
use engineering::checks::connection_fit::base_frequency;
use engineering::checks::power_balance::product_from_ratings;
use engineering::checks::rated_volts_per_hertz::volts_per_hertz;
use engineering::formulas::efficiency_class::{Class, at_50_hertz, at_60_hertz};
use engineering::formulas::{
    full_load_table, locked_rotor, power_flow, slip, synchronous, tolerance, torque, variable_frequency,
};
use engineering::{ApparentPower, Current, Frequency, Kind, Power, Ratio, Resistance, Speed, Torque, Voltage};

pub const RUNS: &[(&str, Run)] = &[
    ("synchronous-speed", synchronous_speed),
    ("slip", slip_of_a_motor),
    ("pole-inference", pole_inference),
    ("rated-torque", rated_torque),
    ("rated-torque-us", rated_torque_us),
    ("power-flow", power_through),
    ("efficiency-powerfactor", efficiency_and_power_factor),
    ("nameplate-consistency", consistency),
    ("unit-conversion", horsepower),
    ("ie-class-efficiency", class_efficiency),
    ("premium-efficiency-60hz", premium_efficiency),
    ("iec-60034-1-tolerance", tolerances),
    ("nec-430-250", full_load_current),
    ("locked-rotor-kva-code", code_letter),
    ("locked-rotor-current-scaling", locked_rotor_scaling),
    ("voltage-drop-on-torque", torque_at_low_voltage),
    ("v-per-hz", volts_by_frequency),
    ("87-hz", stretched_base),
    ("slip-speed-constancy", constant_slip),
];

fn power(case: &Case, name: &str) -> Power {
    let symbol = match case.unit(name) {
        "W" => "W",
        "kW" => "kW",
        "hp" | "hp_mechanical" => "hp",
        "hp_metric" => "PS",
        other => panic!("{}: power in {other}", case.id()),
    };
    let number = case.number(name, case.unit(name));
    Power::from_watts(Kind::Power.unit(symbol).expect("a known unit").to_coherent(number))
}

fn ratio(case: &Case, name: &str) -> Ratio {
    Ratio::from_fraction(case.number(name, "1"))
}

fn hertz(case: &Case, name: &str) -> Frequency {
    Frequency::from_hertz(case.number(name, "Hz"))
}

fn volts(case: &Case, name: &str) -> Voltage {
    Voltage::from_volts(case.number(name, "V"))
}

fn amperes(case: &Case, name: &str) -> Current {
    Current::from_amperes(case.number(name, "A"))
}

fn rpm(case: &Case, name: &str) -> Speed {
    Speed::from_rpm(case.number(name, "rpm"))
}

pub fn poles(case: &Case) -> u32 {
    let poles = case.number("poles", "1");
    (2..=40).find(|n| n % 2 == 0 && f64::from(*n) == poles).expect("an even number of poles")
}

fn synchronous(case: &Case) -> Speed {
    synchronous::synchronous_speed(hertz(case, "frequency"), poles(case) / 2)
}

fn synchronous_speed(case: &Case) -> Results {
    Results::new().number("synchronous_speed", synchronous(case).rpm(), "rpm")
}

fn slip_of_a_motor(case: &Case) -> Results {
    if case.has("slip") {
        let field = slip::synchronous_speed(rpm(case, "speed"), ratio(case, "slip"));
        return Results::new().number("synchronous_speed", field.rpm(), "rpm");
    }
    let field = synchronous(case);
    let found = synchronous::slip(field, rpm(case, "speed"));
    Results::new().number("synchronous_speed", field.rpm(), "rpm").number("slip", found.fraction(), "1").number(
        "rotor_frequency",
        slip::rotor_frequency(found, hertz(case, "frequency")).hertz(),
        "Hz",
    )
}

fn pole_inference(case: &Case) -> Results {
    let (frequency, speed) = (hertz(case, "frequency"), rpm(case, "rated_speed"));
    let pairs = synchronous::pole_pairs(frequency, speed).expect("a speed below a synchronous one");
    let field = synchronous::synchronous_speed(frequency, pairs);
    Results::new().number("poles", f64::from(2 * pairs), "1").number("synchronous_speed", field.rpm(), "rpm").number(
        "slip",
        synchronous::slip(field, speed).fraction(),
        "1",
    )
}

fn rated_torque(case: &Case) -> Results {
    let found = torque::torque(power(case, "rated_power"), rpm(case, "rated_speed"));
    Results::new().number("rated_torque", found.newton_metres(), "N.m")
}

fn pound_force_feet(torque: Torque) -> f64 {
    Kind::Torque.unit("lbf·ft").expect("a known unit").from_coherent(torque.newton_metres())
}

fn rated_torque_us(case: &Case) -> Results {
    let found = torque::torque(power(case, "rated_power"), rpm(case, "speed"));
    Results::new().number("rated_torque", pound_force_feet(found), "lbf.ft")
}

/// Three textbook problems, each from another end of the same chain of losses.
fn power_through(case: &Case) -> Results {
    if case.has("air_gap_power") {
        let air_gap = power(case, "air_gap_power");
        let slip = power_flow::slip_of(air_gap, power(case, "rotor_copper_loss"));
        let field = synchronous(case);
        return Results::new()
            .number("slip", slip.fraction(), "1")
            .number("speed", field.rpm() * (1.0 - slip.fraction()), "rpm")
            .number("mechanical_power", power_flow::mechanical(air_gap, slip).watts(), "W")
            .number("torque", power_flow::air_gap_torque(air_gap, field).newton_metres(), "N.m");
    }
    if case.has("stator_resistance_per_phase") {
        let phase = Resistance::from_ohms(case.number("stator_resistance_per_phase", "Ohm"));
        let stator = power_flow::copper_loss(amperes(case, "current"), phase);
        let slip = synchronous::slip(synchronous(case), rpm(case, "speed"));
        let air_gap = power_flow::after(power(case, "input_power"), stator);
        return Results::new()
            .number("stator_copper_loss", stator.watts(), "W")
            .number("slip", slip.fraction(), "1")
            .number("rotor_copper_loss", power_flow::rotor_loss(air_gap, slip).watts(), "W");
    }
    let (input, slip) = (power(case, "stator_input_power"), ratio(case, "slip"));
    let air_gap = power_flow::after(input, power(case, "stator_losses"));
    let mechanical = power_flow::mechanical(air_gap, slip);
    let output = power_flow::after(mechanical, power(case, "friction_windage"));
    Results::new()
        .number("rotor_copper_loss", power_flow::rotor_loss(air_gap, slip).watts(), "W")
        .number("mechanical_power", mechanical.watts(), "W")
        .number("output_power", output.watts(), "W")
        .number("efficiency", power_flow::efficiency(output, input).fraction(), "1")
}

fn efficiency_and_power_factor(case: &Case) -> Results {
    let shaft = power(case, "shaft_power");
    let input = power_flow::input(shaft, ratio(case, "efficiency"));
    let apparent = power_flow::apparent(volts(case, "voltage_ll"), amperes(case, "current"));
    Results::new()
        .number("input_power", input.watts(), "W")
        .number("apparent_power", apparent.volt_amperes(), "VA")
        .number("power_factor", power_flow::power_factor(input, apparent).fraction(), "1")
        .number("total_losses", power_flow::after(input, shaft).watts(), "W")
}

fn consistency(case: &Case) -> Results {
    let from_ratings =
        product_from_ratings(power(case, "rated_power"), volts(case, "rated_voltage"), amperes(case, "rated_current"))
            .fraction();
    let stated = ratio(case, "power_factor").fraction() * ratio(case, "efficiency").fraction();
    Results::new()
        .number("efficiency_times_pf_from_ratings", from_ratings, "1")
        .number("efficiency_times_pf_stated", stated, "1")
        .number("relative_difference", from_ratings / stated - 1.0, "1")
}

fn horsepower(case: &Case) -> Results {
    Results::new().number("power_kw", power(case, "power").watts() / 1e3, "kW")
}

fn class_efficiency(case: &Case) -> Results {
    assert!(case.number("frequency", "Hz") == 50.0, "{}: at 50 Hz", case.id());
    let class = *Class::ALL.iter().find(|c| c.words() == case.text("ie_class")).expect("a class");
    let found = at_50_hertz(class, power(case, "rated_power"), poles(case)).expect("a rating in range");
    Results::new().number("nominal_efficiency", found.fraction() * 100.0, "%")
}

fn premium_efficiency(case: &Case) -> Results {
    assert!(case.number("frequency", "Hz") == 60.0, "{}: at 60 Hz", case.id());
    let found = at_60_hertz(Class::Ie3, power(case, "rated_power"), poles(case)).expect("a rating in the table");
    Results::new().number("nominal_efficiency", found.fraction() * 100.0, "%")
}

fn tolerances(case: &Case) -> Results {
    let (rated, declared) = (power(case, "rated_power"), |name| ratio(case, name));
    let (efficiency, cosine, slip) =
        (declared("efficiency_declared"), declared("power_factor_declared"), declared("slip_declared"));
    let of_slip = tolerance::of_slip(rated, slip).fraction();
    Results::new()
        .number(
            "efficiency_lowest",
            efficiency.fraction() - tolerance::of_efficiency(rated, efficiency).fraction(),
            "1",
        )
        .number("power_factor_lowest", cosine.fraction() - tolerance::of_power_factor(cosine).fraction(), "1")
        .number("slip_lowest", slip.fraction() - of_slip, "1")
        .number("slip_highest", slip.fraction() + of_slip, "1")
}

fn full_load_current(case: &Case) -> Results {
    let entry =
        full_load_table::entry(power(case, "rated_power"), volts(case, "rated_voltage")).expect("a row of the table");
    Results::new().number("table_full_load_current", entry.current.amperes(), "A")
}

fn code_letter(case: &Case) -> Results {
    let horsepower = case.number("rated_power", "hp");
    let inrush = |name: &str| {
        let apparent = ApparentPower::from_volt_amperes(case.number(name, "kVA/hp") * horsepower * 1e3);
        locked_rotor::line_current(apparent, volts(case, "voltage_ll")).amperes()
    };
    Results::new().number("inrush_low", inrush("code_kva_per_hp_low"), "A").number(
        "inrush_high",
        inrush("code_kva_per_hp_high"),
        "A",
    )
}

fn locked_rotor_scaling(case: &Case) -> Results {
    let rated = (volts(case, "rated_voltage"), hertz(case, "rated_frequency"));
    let applied = (volts(case, "voltage"), hertz(case, "frequency"));
    let found = locked_rotor::scaled_current(amperes(case, "locked_rotor_current"), rated, applied);
    Results::new().number("locked_rotor_current_new", found.amperes(), "A")
}

fn torque_at_low_voltage(case: &Case) -> Results {
    let rated = torque::torque(power(case, "rated_power"), rpm(case, "speed"));
    let left = locked_rotor::torque_at_voltage(rated, ratio(case, "voltage_ratio"));
    Results::new().number("rated_torque", pound_force_feet(rated), "lbf.ft").number(
        "torque_lost_at_same_speed",
        pound_force_feet(rated) - pound_force_feet(left),
        "lbf.ft",
    )
}

fn volts_by_frequency(case: &Case) -> Results {
    let (rated, base, output) =
        (volts(case, "rated_voltage"), hertz(case, "base_frequency"), hertz(case, "output_frequency"));
    Results::new()
        .number("v_per_hz", volts_per_hertz(rated, base).volts_per_hertz(), "V/Hz")
        .number("voltage", variable_frequency::voltage(rated, base, output).volts(), "V")
        .number("torque_available_constant_power", variable_frequency::torque_share(base, output).fraction(), "1")
        .number("breakdown_torque_factor_ideal", variable_frequency::breakdown_share(base, output).fraction(), "1")
}

fn stretched_base(case: &Case) -> Results {
    let (winding, rated) = (volts(case, "delta_voltage"), hertz(case, "nameplate_frequency"));
    let base = base_frequency(winding, rated, volts(case, "drive_voltage"));
    let ideal = base_frequency(winding, rated, Voltage::from_volts(winding.volts() * 3.0_f64.sqrt()));
    let raised = variable_frequency::stretched_power(power(case, "rated_power"), rated, base);
    Results::new()
        .number("base_frequency_setting", base.hertz(), "Hz")
        .number("base_frequency_sqrt3", ideal.hertz(), "Hz")
        .number("synchronous_speed", synchronous::synchronous_speed(base, poles(case) / 2).rpm(), "rpm")
        .number("power_at_constant_torque", raised.watts() / 1e3, "kW")
        .number("current", same_flux_current(case, base), "A")
}

/// At the stretched base frequency the winding has its rated volts per hertz, so rated torque takes its rated current.
fn same_flux_current(case: &Case, base: Frequency) -> f64 {
    let at_plate = volts_per_hertz(volts(case, "delta_voltage"), hertz(case, "nameplate_frequency")).volts_per_hertz();
    let on_drive = volts_per_hertz(volts(case, "drive_voltage"), base).volts_per_hertz();
    amperes(case, "delta_current").amperes() * on_drive / at_plate
}

fn constant_slip(case: &Case) -> Results {
    let pairs = poles(case) / 2;
    let field = synchronous::synchronous_speed(hertz(case, "base_frequency"), pairs);
    let rated_slip = Speed::from_rpm(field.rpm() - rpm(case, "rated_speed").rpm());
    let torque = ratio(case, "torque_fraction");
    if case.has("wanted_speed") {
        let found = variable_frequency::frequency(rpm(case, "wanted_speed"), pairs, rated_slip, torque);
        return Results::new().number("frequency", found.hertz(), "Hz");
    }
    let found = variable_frequency::speed(hertz(case, "frequency"), pairs, rated_slip, torque);
    Results::new().number("speed", found.rpm(), "rpm")
}
