//! Published values on overload settings, trip classes, thermal models and derating.

use crate::Run;
use crate::case::{Case, Results};
use engineering::checks::overload_setting::nfpa_factor;
use engineering::formulas::derating;
use engineering::formulas::trip_class::{TripClass, time_to_trip};
use engineering::overload::Overload;
use engineering::{Current, Duration, Length, Ratio, Temperature, TemperatureRise};

pub const RUNS: &[(&str, Run)] = &[
    ("nec-430-32-overload", overload_setting),
    ("trip-class", trip_class),
    ("thermal-model", thermal_model),
    ("overload-duty", overload_duty),
    ("derating-common-practice", drive_derating),
];

fn amperes(case: &Case, name: &str) -> Current {
    Current::from_amperes(case.number(name, "A"))
}

fn overload_setting(case: &Case) -> Results {
    let service_factor = case.maybe("service_factor", "1").map(Ratio::from_fraction);
    let rise = case.maybe("temperature_rise_marked", "K").map(TemperatureRise::from_kelvins);
    let factor = nfpa_factor(service_factor, rise, false).value;
    Results::new().number("percent", factor * 100.0, "%").number(
        "max_overload_setting",
        factor * amperes(case, "nameplate_current").amperes(),
        "A",
    )
}

fn trip_class(case: &Case) -> Results {
    assert!(
        case.text("state") == "cold" && case.number("current_multiple", "x Ir") == 7.2,
        "{}: the published test",
        case.id()
    );
    let class = match case.text("trip_class") {
        "10" => TripClass::Class10,
        "20" => TripClass::Class20,
        other => panic!("{}: class {other}", case.id()),
    };
    Results::new().flag("within_class", class.admits(Duration::from_seconds(case.number("trip_time", "s"))))
}

fn thermal_model(case: &Case) -> Results {
    let time = time_to_trip(
        Duration::from_seconds(case.number("tau", "s")),
        Ratio::from_fraction(case.number("k", "1")),
        amperes(case, "basic_current"),
        amperes(case, "current"),
        amperes(case, "previous_current"),
    );
    match time {
        Some(time) if case.expects("operate_time") => Results::new().number("operate_time", time.seconds(), "s"),
        other => Results::new().flag("trips", other.is_some()),
    }
}

fn overload_duty(case: &Case) -> Results {
    let duty = match case.text("duty") {
        "normal" => Overload::NORMAL,
        "heavy" => Overload::HEAVY,
        other => panic!("{}: duty {other}", case.id()),
    };
    Results::new()
        .number("overload_current", duty.current(amperes(case, "rated_output_current")).amperes(), "A")
        .number("duration", duty.lasting.seconds(), "s")
}

fn drive_derating(case: &Case) -> Results {
    let rate = |name, unit| Ratio::from_fraction(case.number(name, unit) / 100.0);
    let altitude = derating::by_altitude(
        Length::from_metres(case.number("altitude", "m")),
        derating::FREE_ALTITUDE,
        rate("altitude_rate", "%/100 m"),
    );
    let ambient = derating::by_ambient(
        Temperature::from_celsius(case.number("ambient", "degC")),
        derating::FREE_AMBIENT,
        rate("ambient_rate", "%/K"),
    );
    let factor = altitude.fraction() * ambient.fraction();
    Results::new().number("factor", factor, "1").number(
        "derated_current",
        factor * amperes(case, "rated_current").amperes(),
        "A",
    )
}
