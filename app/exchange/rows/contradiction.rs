//! Whether the plate a row gives contradicts itself: the same power balance that the nameplate check runs.

use super::DriveRow;
use commissioning::plant::{Place, Sheet};
use engineering::checks::power_balance::{Inputs, check};
use engineering::printed::Printed;
use engineering::{Kind, Quantity, Verdict};

/// The check's sentence when the plate contradicts itself.
pub(super) fn of(row: &DriveRow) -> Option<String> {
    let columns = 0..Sheet::Motor.columns();
    columns.into_iter().find_map(|column| {
        let inputs = Inputs {
            voltage: printed(row, column, "volts", Kind::Voltage),
            current: printed(row, column, "amps", Kind::Current),
            power: printed(row, column, "power", Kind::Power),
            power_factor: printed(row, column, "power-factor", Kind::Number),
            efficiency: printed(row, column, "efficiency", Kind::Percent),
        };
        if inputs.voltage.is_none() || inputs.current.is_none() || inputs.power.is_none() {
            return None;
        }
        let outcome = check(&inputs);
        (outcome.verdict == Verdict::Outside).then_some(outcome.summary)
    })
}

fn printed<Q: Quantity>(row: &DriveRow, column: u8, field: &str, kind: Kind) -> Option<Printed<Q>> {
    let typed = &row.value(&Place::in_column(Sheet::Motor, column, field))?.typed;
    let unit = kind.unit(typed.unit.as_deref().unwrap_or_default()).unwrap_or(kind.usual());
    Some(Printed::from_text(Q::from_coherent(typed.number()?), &typed.text, Q::from_coherent(unit.factor)))
}
