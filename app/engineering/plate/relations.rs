//! The relations that a plate's figures form: within a column, and between two columns.

use super::relation::{Relates, Relation};
use super::{Column, Mark, Name, Plate, usual};
use crate::checks::pole_pairs::{SLIP, SMALL_SLIP};
use crate::checks::power_balance::{POWER_FACTORS, least_and_most_product};
use crate::formulas::efficiency_class::{Class, at_50_hertz, at_60_hertz};
use crate::formulas::synchronous::{pole_pairs, synchronous_speed};
use crate::formulas::tolerance;
use crate::quantity::{Frequency, Power, Ratio, Speed};

/// Most of the losses that a rotor takes at rated load, and the least, as shares (common practice, row MN-23).
pub const ROTOR_SHARE: (f64, f64) = (0.05, 0.75);
/// Beyond this share tolerances of slip and losses cannot bring it back to the whole: 1.15/0.8 (IEC 60034-1, clause 12).
const ROTOR_SHARE_AT_MOST: f64 = 1.15 / 0.8;
/// Most poles that a motor usually has (common practice, row MN-23).
pub const MOST_POLES: f64 = 16.0;
/// An efficiency stays between these multiples of the losses of the highest and of the lowest class listed (row MN-24).
pub const LOSSES_AT_50_HERTZ: (f64, f64) = (0.6, 2.2);
/// The same at 60 Hz, where fewer classes are listed.
pub const LOSSES_AT_60_HERTZ: (f64, f64) = (0.5, 3.0);
/// Up to here above a synchronous speed a plate is read as that speed.
const ABOVE: f64 = 1.005;
/// Volts this far apart belong to two connections of one winding, not to two points of one range.
const RECONNECTED: f64 = 1.4;

/// Hands every relation of the plate to `see`.
pub(super) fn each(plate: &Plate, see: &mut impl FnMut(Relation)) {
    let mut pairs = [None; super::MOST_COLUMNS];
    for (at, column) in plate.columns.iter().enumerate() {
        pairs[at] = speed(plate, at, column, see);
        balance(plate, at, column, pairs[at], see);
    }
    for a in 0..plate.columns.len() {
        for b in a + 1..plate.columns.len() {
            between(plate, (a, b), (pairs[a], pairs[b]), see);
        }
    }
}

fn relation(relates: Relates, at: usize, value: f64, possible: (f64, f64), usual: (f64, f64), firm: bool) -> Relation {
    Relation { relates, columns: (at, None), open: (value, value), value, possible, usual, firm }
}

/// Slip and poles of a column; gives back its pole pairs.
fn speed(plate: &Plate, at: usize, column: &Column, see: &mut impl FnMut(Relation)) -> Option<u32> {
    let (hertz, rpm) = (column.get(Name::Hertz)?, column.get(Name::Speed)?);
    let frequency = Frequency::from_hertz(hertz.value);
    let below = pole_pairs(frequency, Speed::from_rpm(rpm.value));
    let synchronous = |pairs: u32| synchronous_speed(frequency, pairs).rpm();
    // Above the fastest synchronous speed, or a hair above another: read as that one, with a slip below nought.
    let pairs = match below {
        None if rpm.value < synchronous(1) => {
            let poles = 2.0 * (synchronous(1) / rpm.value).floor();
            see(relation(Relates::PoleCount, at, poles, (2.0, MOST_POLES), (4.0, 4.0), true));
            return None;
        }
        None => 1,
        Some(pairs) if rpm.value <= synchronous(pairs + 1) * ABOVE => pairs + 1,
        Some(pairs) => pairs,
    };
    let n_s = synchronous(pairs);
    let slip = (n_s - rpm.value) / n_s;
    let power = column.get(Name::Power).map(|p| p.value);
    let limit = if power.is_some_and(|w| w < 1000.0) { SMALL_SLIP.value } else { SLIP.value };
    let efficiency = column.get(Name::Efficiency).map(|e| e.value).filter(|e| *e < 1.0);
    let table = class_range(plate, column, Some(pairs));
    // About a fifth of the losses are the rotor's (common practice): the slip to expect.
    let expected = 0.2 * (1.0 - efficiency.or(table.map(|t| t.2)).unwrap_or(0.9));
    let usual = (expected, (expected * 0.5).max(0.002));
    let open = ((n_s - rpm.high()) / n_s, slip);
    let reached = slip <= 1e-6;
    see(Relation {
        open: if reached { (slip, slip) } else { open },
        ..relation(Relates::Slip, at, slip, (1e-6, limit), usual, reached)
    });
    let poles = f64::from(2 * pairs);
    if let Some(printed) = plate.poles {
        see(relation(Relates::Poles, at, poles, (printed.value, printed.value), (printed.value, 1.0), true));
    }
    see(relation(Relates::PoleCount, at, poles, (2.0, MOST_POLES), (4.0, 4.0), false));
    if let (Some(efficiency), false) = (efficiency, reached) {
        let share = |s: f64| s / (1.0 - s) * efficiency / (1.0 - efficiency);
        let open = (share(open.0.max(0.0)), share((n_s - rpm.low()) / n_s));
        let of = |possible, firm| Relation {
            open,
            ..relation(Relates::RotorShare, at, share(slip), possible, (0.2, 0.12), firm)
        };
        if open.0 > ROTOR_SHARE_AT_MOST {
            see(of((0.0, ROTOR_SHARE_AT_MOST), true));
        } else {
            see(of(ROTOR_SHARE, false));
        }
    }
    Some(pairs)
}

/// Volts, amperes, power, power factor and efficiency of a column.
fn balance(plate: &Plate, at: usize, column: &Column, pairs: Option<u32>, see: &mut impl FnMut(Relation)) {
    let cosine = column.get(Name::PowerFactor);
    let efficiency = column.get(Name::Efficiency);
    for part in [cosine, efficiency].into_iter().flatten().filter(|p| p.value >= 1.0) {
        see(relation(Relates::PartOfOne, at, part.value, (0.0, 0.999), (0.8, 0.1), true));
    }
    let cosine = cosine.filter(|c| c.value < 1.0);
    let efficiency = efficiency.filter(|e| e.value < 1.0);
    let table = class_range(plate, column, pairs);
    let power = column.get(Name::Power);
    let expected = power.map_or(0.8, |p| {
        usual::power_factor(Power::from_watts(p.value), pairs.unwrap_or(2)).fraction().clamp(0.3, 0.95)
    });
    if let Some(c) = cosine {
        let open = (c.low(), c.high());
        see(Relation { open, ..relation(Relates::PowerFactor, at, c.value, POWER_FACTORS, (expected, 0.08), false) });
    }
    if let (Some(e), Some((least, most, middle))) = (efficiency, table) {
        let stray = ((1.0 - middle) * 0.35).max(0.004).max(e.half);
        let open = (e.low(), e.high());
        see(Relation { open, ..relation(Relates::ClassTable, at, e.value, (least, most), (middle, stray), false) });
    }
    let (Some(power), Some(volts), Some(amps)) = (power, column.get(Name::Volts), column.get(Name::Amps)) else {
        return;
    };
    let apparent = |u: f64, i: f64| 3.0_f64.sqrt() * u * i;
    let value = power.value / apparent(volts.value, amps.value);
    let open = (
        power.low() / apparent(volts.high(), amps.high()),
        power.high() / apparent(volts.low(), amps.low().max(f64::MIN_POSITIVE)),
    );
    let (least, most) = least_and_most_product(Power::from_watts(power.value));
    match (cosine, efficiency) {
        (Some(c), Some(e)) => see(product(at, (value, open), power, c, e)),
        (Some(c), None) => {
            let implied = value / c.value;
            let open = (open.0 / c.high(), open.1 / c.low());
            let of = |possible, usual, firm| Relation {
                open,
                ..relation(Relates::ImpliedEfficiency, at, implied, possible, usual, firm)
            };
            let widest = ((least / c.value).min(0.5), 0.98);
            match table {
                Some((low, high, middle)) if !of(widest, (0.0, 1.0), true).is_broken() => {
                    let off = tolerance::of_power_factor(Ratio::from_fraction(c.value)).fraction() / c.value;
                    let possible = (low * (1.0 - off), (high * (1.0 + off)).min(0.99));
                    see(of(possible, (middle, 0.04), false));
                }
                _ => see(of(widest, (table.map_or(0.88, |t| t.2), 0.04), true)),
            }
        }
        (None, Some(e)) => see(Relation {
            open: (open.0 / e.high(), open.1 / e.low()),
            ..relation(Relates::ImpliedPowerFactor, at, value / e.value, POWER_FACTORS, (expected, 0.08), true)
        }),
        (None, None) => {
            let middle = table.map_or(0.88, |t| t.2) * expected;
            see(Relation { open, ..relation(Relates::Ratings, at, value, (least, most), (middle, 0.09), true) });
        }
    }
}

/// η·cos φ as printed with what the ratings give: tolerances of IEC 60034-1 either way, and all rounding.
fn product(at: usize, (value, open): (f64, (f64, f64)), power: Mark, c: Mark, e: Mark) -> Relation {
    let of_e = tolerance::of_efficiency(Power::from_watts(power.value), Ratio::from_fraction(e.value)).fraction();
    let of_c = tolerance::of_power_factor(Ratio::from_fraction(c.value)).fraction();
    let possible = ((e.low() - of_e) * (c.low() - of_c), (e.high() + of_e).min(1.0) * (c.high() + of_c).min(1.0));
    let usual = (c.value * e.value, (possible.1 - possible.0) / 5.0);
    Relation { open, ..relation(Relates::Product, at, value, possible, usual, true) }
}

/// Lowest, highest and middle efficiency that the class tables suggest.
fn class_range(plate: &Plate, column: &Column, pairs: Option<u32>) -> Option<(f64, f64, f64)> {
    let power = Power::from_watts(column.get(Name::Power)?.value);
    let poles = 2 * pairs?;
    let fifty = match column.get(Name::Hertz)?.value {
        f if (f - 50.0).abs() < 0.5 => true,
        f if (f - 60.0).abs() < 0.5 => false,
        _ => return None,
    };
    let nominal = |c: Class| if fifty { at_50_hertz(c, power, poles) } else { at_60_hertz(c, power, poles) };
    let losses = |c: Class| Some(1.0 - nominal(c)?.fraction());
    let lowest = Class::ALL.into_iter().find_map(losses)?;
    let highest = Class::ALL.into_iter().rev().find_map(losses)?;
    let (less, more) = if fifty { LOSSES_AT_50_HERTZ } else { LOSSES_AT_60_HERTZ };
    let mut least = (1.0 - lowest * more).max(0.01);
    let mut middle = 1.0 - (lowest + highest) / 2.0;
    if let Some(printed) = plate.class.and_then(losses) {
        // A printed class promises its nominal efficiency, less the tolerance on the losses. Plates for both
        // frequencies mark the class of 50 Hz, so that more is left open at 60 Hz.
        least = least.max(1.0 - printed * if fifty { 1.15 } else { 1.4 });
        middle = 1.0 - printed * 0.95;
    }
    Some((least, 1.0 - highest * less, middle))
}

/// What two columns of one motor have in common.
fn between(plate: &Plate, (a, b): (usize, usize), pairs: (Option<u32>, Option<u32>), see: &mut impl FnMut(Relation)) {
    let (one, other) = (&plate.columns[a], &plate.columns[b]);
    let mut tell = |relates, value: f64, open: f64, possible: (f64, f64), stray: f64| {
        see(Relation {
            columns: (a, Some(b)),
            open: (value * (1.0 - open), value * (1.0 + open)),
            ..relation(relates, a, value, possible, (1.0, stray), false)
        });
    };
    let both = |name| Some((one.get(name)?, other.get(name)?));
    let doubt = |(x, y): (Mark, Mark)| x.half / x.value + y.half / y.value;
    let Some(hertz) = both(Name::Hertz) else { return };
    let ratio = hertz.0.value / hertz.1.value;
    let same = (ratio - 1.0).abs() < 0.01;
    let power = both(Name::Power);
    let differ = power.is_some_and(|p| (p.0.value / p.1.value / ratio - 1.0).abs() > 0.1);
    if let (Some(p), Some(q)) = pairs {
        let of = f64::from(p) / f64::from(q);
        // A motor for two speeds prints another power for each.
        if p != q && same && differ {
            return;
        }
        tell(Relates::PolesOfColumns, of, 0.0, (0.99, 1.01), 0.05);
        if p != q {
            return;
        }
    }
    if let Some(n) = both(Name::Speed) {
        tell(Relates::SpeedsOfColumns, n.0.value / n.1.value / ratio, doubt(n), (0.97, 1.03), 0.006);
    }
    let Some(power) = power else { return };
    if let (Some(volts), Some(amps)) = (both(Name::Volts), both(Name::Amps)) {
        let apparent = volts.0.value * amps.0.value / (volts.1.value * amps.1.value) * power.1.value / power.0.value;
        let apart = volts.0.value / volts.1.value;
        let reconnected = same && !(1.0 / RECONNECTED..=RECONNECTED).contains(&apart);
        let (slack, stray) = if reconnected { (0.06, 0.01) } else { (0.20, 0.05) };
        let open = doubt(amps) + doubt(power);
        tell(Relates::ApparentOfColumns, apparent, open, (1.0 - slack, 1.0 + slack), stray);
        // Amperes in step with two powers are a plate for two duties.
        if same && differ && (apparent - 1.0).abs() <= slack + open {
            return;
        }
    }
    // The same power at both frequencies, or more of it in step with them.
    let value = power.0.value / power.1.value / ratio;
    let slack = if same { 0.03 } else { 0.05 };
    let possible = ((1.0 / ratio).min(1.0) - slack, (1.0 / ratio).max(1.0) + slack);
    tell(Relates::PowersOfColumns, value, doubt(power), possible, if same { 0.01 } else { 0.1 });
}
