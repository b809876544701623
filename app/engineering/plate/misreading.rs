//! Every single misreading that a plate's figures leave possible.

use super::digits::Digits;
use super::proposal::{Mistake, Proposal};
use super::{Mark, Name, Plate, usual};
use crate::quantity::Frequency;
use crate::unit::Kind;

/// Hands every possible misreading to `see`.
pub(super) fn each(plate: &Plate, see: &mut impl FnMut(Proposal)) {
    for (at, column) in plate.columns.iter().enumerate() {
        for name in Name::OF_A_COLUMN {
            let Some(now) = column.get(name) else { continue };
            of_digits(at, name, now, see);
            of_meaning(at, name, now, see);
        }
        if let (Some(cosine), Some(efficiency)) = (column.get(Name::PowerFactor), column.get(Name::Efficiency)) {
            factors(at, cosine, efficiency, see);
        }
        for (other, column_there) in plate.columns.iter().enumerate().skip(at + 1) {
            for name in [Name::Amps, Name::Speed, Name::Hertz, Name::Power] {
                let (Some(here), Some(there)) = (column.get(name), column_there.get(name)) else { continue };
                if (here.value / there.value - 1.0).abs() > 0.005 {
                    let one = Proposal::new(Mistake::ColumnsExchanged, at, name, here, there);
                    see(Proposal { with: Some((other, name, there, here)), ..one });
                }
            }
        }
    }
    if let Some(now) = plate.poles {
        for poles in [2.0, 4.0, 6.0, 8.0, 10.0, 12.0] {
            if let Some(mark) = Digits::read(&poles.to_string()).and_then(|d| Mark::of(Name::Poles, d, now.unit)) {
                see(Proposal::new(Mistake::PoleNumber, 0, Name::Poles, now, mark));
            }
        }
    }
}

/// Digits exchanged, lost, doubled; the point in another place.
fn of_digits(at: usize, name: Name, now: Mark, see: &mut impl FnMut(Proposal)) {
    let Some(digits) = now.digits else { return };
    let mut tell = |mistake, digits: Digits, extra: f64| {
        if name == Name::Hertz && !usual::is_supply(Frequency::from_hertz(digits.number() * now.unit.factor)) {
            return;
        }
        // Plates print whole speeds of up to four digits, and rarely more than three of anything else.
        let (most, decimals) = if name == Name::Speed { (4, digits.has_decimals()) } else { (3, false) };
        let surplus = digits.significant().saturating_sub(most) + usize::from(decimals);
        let extra = extra + if surplus > 0 { 1.5 } else { 0.0 };
        if let Some(mark) = Mark::of(name, digits, now.unit) {
            see(Proposal { extra, ..Proposal::new(mistake, at, name, now, mark) });
        }
    };
    digits.exchanged().for_each(|d| tell(Mistake::DigitsExchanged, d, 0.0));
    digits.with_one_less().for_each(|d| tell(Mistake::DigitDoubled, d, 0.0));
    digits.with_one_more().for_each(|d| tell(Mistake::DigitLost, d, 0.0));
    for (left, extra) in [(1, 0.0), (-1, 0.0), (2, 0.5), (-2, 0.5), (3, 1.0), (-3, 1.0)] {
        if let Some(moved) = digits.shifted(left) {
            tell(Mistake::DecimalPoint, moved, extra);
        }
    }
}

/// Another unit, connection, frequency or number of poles.
fn of_meaning(at: usize, name: Name, now: Mark, see: &mut impl FnMut(Proposal)) {
    let mut tell = |mistake, mark: Mark, extra| see(Proposal { extra, ..Proposal::new(mistake, at, name, now, mark) });
    match name {
        Name::Power => {
            for unit in Kind::Power.units().iter().filter(|u| ["kW", "hp", "PS"].contains(&u.symbol)) {
                if unit.symbol != now.unit.symbol {
                    let read_so = now.digits.and_then(|d| Mark::of(name, d, *unit));
                    let extra = if unit.symbol == "PS" || now.unit.symbol == "PS" { 1.0 } else { 0.0 };
                    tell(Mistake::Unit, read_so.unwrap_or(now.times(unit.factor / now.unit.factor)), extra);
                }
            }
        }
        Name::Amps | Name::Volts => {
            let root = 3.0_f64.sqrt();
            for (factor, extra) in [(root, 0.0), (1.0 / root, 0.0), (2.0, 0.5), (0.5, 0.5)] {
                let mut mark = now.times(factor);
                if name == Name::Volts {
                    mark.value = usual::nearest_voltage(mark.value);
                }
                tell(Mistake::OtherConnection, mark, extra);
            }
        }
        Name::Hertz => {
            for text in ["50", "60"] {
                let other = Digits::read(text).and_then(|d| Mark::of(name, d, *Kind::Frequency.usual()));
                if let Some(other) = other.filter(|o| (o.value / now.value - 1.0).abs() > 0.01) {
                    let near = (0.8..1.25).contains(&(other.value / now.value));
                    tell(Mistake::OtherFrequency, other, if near { 0.0 } else { 2.0 });
                }
            }
        }
        Name::Speed => {
            tell(Mistake::SpeedOfOtherFrequency, now.times(50.0 / 60.0), 0.0);
            tell(Mistake::SpeedOfOtherFrequency, now.times(60.0 / 50.0), 0.0);
            for (numerator, divisor) in
                (1..=6).flat_map(|n| (1..=6).map(move |d| (n, d))).filter(|(n, d)| n != d && lowest_terms(*n, *d))
            {
                tell(Mistake::SpeedOfOtherPoles, now.times(f64::from(numerator) / f64::from(divisor)), 0.0);
            }
        }
        Name::PowerFactor | Name::Efficiency | Name::Poles => {}
    }
}

fn lowest_terms(a: u32, b: u32) -> bool {
    (2..=a.min(b)).all(|d| !a.is_multiple_of(d) || !b.is_multiple_of(d))
}

/// The digits of each stand in the other's place; a percentage is a power factor times a hundred.
fn factors(at: usize, cosine: Mark, efficiency: Mark, see: &mut impl FnMut(Proposal)) {
    let percent = (efficiency.unit.factor - 0.01).abs() < 1e-12;
    let places = if percent { 2 } else { 0 };
    let moved = |mark: Mark, left, name, unit| Mark::of(name, mark.digits?.shifted(left)?, unit);
    let (Some(new_cosine), Some(new_efficiency)) = (
        moved(efficiency, places, Name::PowerFactor, cosine.unit),
        moved(cosine, -places, Name::Efficiency, efficiency.unit),
    ) else {
        return;
    };
    let one = Proposal::new(Mistake::FactorsExchanged, at, Name::PowerFactor, cosine, new_cosine);
    see(Proposal { with: Some((at, Name::Efficiency, efficiency, new_efficiency)), ..one });
}
