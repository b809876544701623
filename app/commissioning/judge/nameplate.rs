//! Inputs of the nameplate and fit checks.

use super::{Runs, View, once};
use crate::plant::Sheet::{Drive, DrivePlate, Further, Load, Motor, Site, Supply};
use engineering::checks::{
    connection_fit, drive_current_fit, efficiency_class, full_load_current, low_speed_cooling, misreading,
    overload_fit, pole_pairs, power_balance, rated_torque, rated_volts_per_hertz,
};
use engineering::formulas::efficiency_class::Class;
use engineering::overload::Overload;
use engineering::plate::usual::is_rating;
use engineering::plate::{MOST_COLUMNS, Mark, Name, Plate};
use engineering::printed::Printed;
use engineering::quantity::Quantity;
use engineering::{Frequency, Kind, Ratio, Voltage};

/// Every rating column that has anything in it, with its words when there are several.
fn columns(view: &View<'_>) -> Vec<(u8, String)> {
    let filled: Vec<u8> = (0..Motor.columns())
        .filter(|c| {
            view.drive.fields.keys().any(|p| p.sheet == Motor && p.column == *c && view.drive.field(p).is_some())
        })
        .collect();
    let several = filled.len() > 1;
    let words = |c: u8| if several { format!("rating column {}", c + 1) } else { String::new() };
    if filled.is_empty() { vec![(0, String::new())] } else { filled.into_iter().map(|c| (c, words(c))).collect() }
}

/// A figure of a rating column as printed, with the half step of its last digit.
fn printed<Q: Quantity>(view: &View<'_>, column: u8, field: &str, kind: Kind) -> Option<Printed<Q>> {
    let typed = view.value(Motor, column, field)?;
    let unit = kind.unit(typed.unit.as_deref().unwrap_or_default()).unwrap_or(kind.usual());
    // A rating by name is exact: 11 kW is no rounding of 11.4 kW.
    if kind == Kind::Power && typed.number_in_unit(kind).is_some_and(|n| is_rating(n, *unit)) {
        return Some(Printed::nominal(Q::from_coherent(typed.number()?)));
    }
    Some(Printed::from_text(Q::from_coherent(typed.number()?), &typed.text, Q::from_coherent(unit.factor)))
}

pub(super) fn pole_pairs(view: &View<'_>) -> Runs {
    columns(view)
        .into_iter()
        .map(|(c, of)| {
            let inputs = pole_pairs::Inputs {
                rated_frequency: view.motor_in(c, "hertz"),
                rated_speed: printed(view, c, "rpm", Kind::Speed),
                rated_power: view.motor_in(c, "power"),
                printed_poles: view.count(Motor, "poles"),
            };
            (of, pole_pairs::check(&inputs))
        })
        .collect()
}

pub(super) fn power_balance(view: &View<'_>) -> Runs {
    columns(view)
        .into_iter()
        .map(|(c, of)| {
            let inputs = power_balance::Inputs {
                voltage: printed(view, c, "volts", Kind::Voltage),
                current: printed(view, c, "amps", Kind::Current),
                power: printed(view, c, "power", Kind::Power),
                power_factor: printed(view, c, "power-factor", Kind::Number),
                efficiency: printed(view, c, "efficiency", Kind::Percent),
            };
            (of, power_balance::check(&inputs))
        })
        .collect()
}

/// The whole plate with its figures as typed.
fn whole_plate(view: &View<'_>) -> Plate {
    let mark = |column: u8, name: Name, field: &str| -> Option<Mark> {
        let typed = view.value(Motor, column, field)?;
        let as_typed = Mark::read(name, &typed.text, typed.unit.as_deref().unwrap_or_default());
        // Text that is understood but no plain decimal: its number alone, without digits to be misread.
        as_typed.or_else(|| {
            let coherent = name.kind().units().iter().find(|u| (u.factor - 1.0).abs() < f64::EPSILON)?;
            Mark::read(name, typed.si.as_deref()?, coherent.symbol)
        })
    };
    let mut plate = Plate { class: printed_class(view), poles: mark(0, Name::Poles, "poles"), ..Plate::default() };
    for (column, place) in (0..Motor.columns()).zip(0..MOST_COLUMNS) {
        for name in Name::OF_A_COLUMN {
            let field = match name {
                Name::Volts => "volts",
                Name::Amps => "amps",
                Name::Hertz => "hertz",
                Name::Speed => "rpm",
                Name::Power => "power",
                Name::PowerFactor => "power-factor",
                Name::Efficiency => "efficiency",
                Name::Poles => continue,
            };
            plate.columns[place] = plate.columns[place].with(name, mark(column, name, field));
        }
    }
    plate
}

pub(super) fn misreading(view: &View<'_>) -> Runs {
    once(misreading::check(&misreading::Inputs { plate: whole_plate(view) }))
}

pub(super) fn rated_torque(view: &View<'_>) -> Runs {
    once(rated_torque::check(&rated_torque::Inputs {
        rated_power: view.motor("power"),
        rated_speed: view.motor("rpm"),
    }))
}

pub(super) fn rated_volts_per_hertz(view: &View<'_>) -> Runs {
    once(rated_volts_per_hertz::check(&rated_volts_per_hertz::Inputs {
        rated_voltage: view.motor("volts"),
        rated_frequency: view.motor("hertz"),
    }))
}

fn printed_class(view: &View<'_>) -> Option<Class> {
    match view.choice(Motor, "efficiency-class") {
        Some("ie1") => Some(Class::Ie1),
        Some("ie2") => Some(Class::Ie2),
        Some("ie3") => Some(Class::Ie3),
        Some("ie4") => Some(Class::Ie4),
        _ => None,
    }
}

pub(super) fn efficiency_class(view: &View<'_>) -> Runs {
    use efficiency_class::{Inputs, check};
    let poles = match (view.motor::<Frequency>("hertz"), view.motor("rpm")) {
        (Some(f), Some(n)) => engineering::formulas::synchronous::pole_pairs(f, n).map(|pairs| pairs * 2),
        _ => None,
    };
    once(check(&Inputs {
        rated_power: view.motor("power"),
        poles,
        rated_frequency: view.motor("hertz"),
        efficiency: view.motor("efficiency"),
        printed_class: printed_class(view),
    }))
}

/// A table of North American practice: asked for 60 Hz plates, and where the site follows that rule.
pub(super) fn full_load_current(view: &View<'_>) -> Runs {
    let sixty = view.motor::<Frequency>("hertz").is_some_and(|f| f.hertz() > 55.0);
    if !sixty && view.choice(Site, "overload-rule") != Some("nfpa-70") {
        return Vec::new();
    }
    once(full_load_current::check(&full_load_current::Inputs {
        rated_power: view.motor("power"),
        rated_voltage: view.motor("volts"),
        rated_current: view.motor("amps"),
    }))
}

/// The drive's overload as printed.
pub(super) fn overload(view: &View<'_>) -> Option<Overload> {
    Some(Overload {
        multiple: view.plate(DrivePlate, "overload")?,
        lasting: view.plate(DrivePlate, "overload-time")?,
        every: view.plate(DrivePlate, "overload-period")?,
    })
}

pub(super) fn drive_current_fit(view: &View<'_>) -> Runs {
    once(drive_current_fit::check(&drive_current_fit::Inputs {
        drive_current: view.plate(DrivePlate, "continuous-current"),
        overload: overload(view),
        motor_current: view.motor("amps"),
        maker_reduction: view.plate(DrivePlate, "reduction"),
        altitude_rated: view.plate(DrivePlate, "altitude-rated"),
        ambient_rated: view.plate(DrivePlate, "ambient-rated"),
        altitude: view.plate(Drive, "altitude").or_else(|| view.plate(Site, "altitude")),
        ambient: view.plate(Drive, "ambient-high").or_else(|| view.plate(Site, "ambient-high")),
        lost_per_hundred_metres: view.plate(DrivePlate, "lost-per-hundred-metres"),
        lost_per_kelvin: view.plate(DrivePlate, "lost-per-kelvin"),
    }))
}

pub(super) fn overload_fit(view: &View<'_>) -> Runs {
    let (breakaway_torque, acceleration_torque) = super::motion::torques(view);
    super::drive_train::told(
        view,
        once(overload_fit::check(&overload_fit::Inputs {
            drive_current: view.plate(DrivePlate, "continuous-current"),
            overload: overload(view),
            rated_current: view.motor("amps"),
            power_factor: view.motor("power-factor"),
            breakdown: view.plate(Motor, "breakdown-torque"),
            rated_power: view.motor("power"),
            rated_speed: view.motor("rpm"),
            breakaway_torque,
            acceleration_torque,
            acceleration_time: super::motion::start_time(view),
            time_between_starts: view.plate(Further, "start-interval"),
        })),
    )
}

pub(super) fn connection_fit(view: &View<'_>) -> Runs {
    use connection_fit::{Connection, Inputs, check};
    let in_use = view.column_in_use();
    let hertz: Option<Frequency> = view.motor("hertz");
    let volts_of = |wanted: &[&str]| -> Option<Voltage> {
        (0..Motor.columns())
            .filter(|c| view.motor_in::<Frequency>(*c, "hertz") == hertz)
            .find(|c| view.value(Motor, *c, "connection").is_some_and(|t| wanted.contains(&t.text.as_str())))
            .and_then(|c| view.motor_in(c, "volts"))
    };
    let mut star_voltage = volts_of(&["star", "high"]);
    let mut delta_voltage = volts_of(&["delta", "low"]);
    let understood = |key: Option<&str>| match key {
        Some("star" | "high") => Some(Connection::Star),
        Some("delta" | "low") => Some(Connection::Delta),
        _ => None,
    };
    let planned = understood(view.value(Motor, in_use, "connection").map(|t| t.text.as_str()));
    // Nobody has looked until the links are entered: what the plate draws does not stand in for them.
    let links = view.chosen("links-found");
    let found = match links {
        // Sealed, only one way: that is the connection of the column in use, whatever the plate calls it.
        Some("single") => Some(planned.unwrap_or(Connection::Star)),
        other => understood(other),
    };
    if links == Some("single") {
        match found {
            Some(Connection::Delta) => delta_voltage = view.motor("volts"),
            _ => star_voltage = view.motor("volts"),
        }
    }
    once(check(&Inputs {
        star_voltage,
        delta_voltage,
        plate_frequency: hertz,
        supply_voltage: view.plate(Supply, "volts"),
        output_voltage: view.plate(DrivePlate, "output-volts").or_else(|| view.in_force("base-volts")),
        base_frequency: view.in_force("base-frequency").or_else(|| view.plate(Further, "design-base-hertz")),
        found,
        maker_allows_raised_base: view.flag(Motor, "raised-base-allowed"),
    }))
}

pub(super) fn low_speed_cooling(view: &View<'_>) -> Runs {
    use low_speed_cooling::{Cooling, Inputs, check};
    let cooling = match view.choice(Motor, "cooling") {
        Some("self") => Some(Cooling::SelfCooled),
        Some("surface" | "air-stream") => Some(Cooling::ByItsPlace),
        Some("separate" | "liquid") => Some(Cooling::Separate),
        _ => None,
    };
    let percent = |number: f64| Ratio::from_fraction(number / 100.0);
    let maker_curve = view
        .choice(Motor, "low-speed-torque")
        .and_then(|text| crate::plant::field::table(text).ok())
        .map(|pairs| pairs.into_iter().map(|(speed, torque)| (percent(speed), percent(torque))).collect())
        .unwrap_or_default();
    let rated = super::motion::rated_torque(view).map(engineering::Torque::newton_metres);
    // What the load asks at that very speed: a fan or pump asks little there, a conveyor all of it.
    let lowest = view.in_force::<Frequency>("minimum-frequency").and_then(|f| super::motion::speed_at(view, f));
    let load = match lowest {
        Some(speed) => super::motion::load_at_motor_speed(view, speed),
        None => super::motion::load_torque_at_shaft(view).filter(|_| view.choice(Load, "profile") == Some("constant")),
    };
    let share = match (load.map(engineering::Torque::newton_metres), rated) {
        (Some(load), Some(rated)) if rated > 0.0 => Some(Ratio::from_fraction(load / rated)),
        _ => None,
    };
    super::drive_train::told(
        view,
        once(check(&Inputs {
            cooling,
            lowest_frequency: view.in_force("minimum-frequency"),
            rated_frequency: view.motor("hertz"),
            load_torque: share,
            maker_curve,
            turndown: view.plate(Motor, "turndown"),
        })),
    )
}
