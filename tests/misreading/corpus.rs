//! Consistent plates, built from the published efficiency and full-load-current tables.
//!
//! Efficiency: IEC 60034-30-1 at 50 Hz and 10 CFR 431.25 at 60 Hz. Power factor: what the amperes of NFPA 70 table
//! 430.250 (460 V) leave, a little more for two plates of three, since that table is made for sizing. Slip: 12 to 26 %
//! of all losses in the rotor, at most 7 % from 1 kW and 14 % below; amperes up to 1.5 % off the exact ones (both common
//! practice, no source).

use engineering::formulas::efficiency_class::{Class, at_50_hertz, at_60_hertz};
use engineering::formulas::full_load_table::entry;
use engineering::plate::{Column, Mark, Name, Plate};
use engineering::{Power, Voltage};

/// Kilowatts of the rows of IEC 60034-30-1 (table A of the reference values), and two ratings beyond 200 kW.
const KILOWATTS: [f64; 29] = [
    0.12, 0.18, 0.25, 0.37, 0.55, 0.75, 1.1, 1.5, 2.2, 3.0, 4.0, 5.5, 7.5, 11.0, 15.0, 18.5, 22.0, 30.0, 37.0, 45.0,
    55.0, 75.0, 90.0, 110.0, 132.0, 160.0, 200.0, 250.0, 315.0,
];
/// Horsepower of the rows of 10 CFR 431.25.
const HORSEPOWER: [f64; 19] =
    [1.0, 1.5, 2.0, 3.0, 5.0, 7.5, 10.0, 15.0, 20.0, 25.0, 30.0, 40.0, 50.0, 60.0, 75.0, 100.0, 125.0, 150.0, 200.0];
const WATTS_PER_HORSEPOWER: f64 = 745.699_871_582_270_2;

/// A figure as it stands on a plate: digits and unit.
#[derive(Clone, Debug, PartialEq)]
pub struct Text {
    pub digits: String,
    pub unit: &'static str,
}

/// A plate in text, as a person copies it.
#[derive(Clone, Debug)]
pub struct Printed {
    /// Figures in the order of `Name::OF_A_COLUMN`; empty ones are not printed.
    pub columns: Vec<Vec<Text>>,
    pub poles: Option<String>,
    pub class: Option<Class>,
    /// What the plate was made from, for messages.
    pub of: String,
    /// Pole pairs and slip it was made with.
    pub pairs: u32,
    pub slip: f64,
}

impl Printed {
    pub fn plate(&self) -> Plate {
        let mut plate = Plate { class: self.class, ..Plate::default() };
        for (at, figures) in self.columns.iter().enumerate() {
            plate.columns[at] = Name::OF_A_COLUMN
                .into_iter()
                .zip(figures)
                .fold(Column::default(), |c, (name, t)| c.with(name, Mark::read(name, &t.digits, t.unit)));
        }
        plate.poles = self.poles.as_ref().and_then(|p| Mark::read(Name::Poles, p, ""));
        plate
    }

    pub fn at(&self, column: usize, name: Name) -> &Text {
        &self.columns[column][name as usize]
    }

    pub fn at_mut(&mut self, column: usize, name: Name) -> &mut Text {
        &mut self.columns[column][name as usize]
    }
}

/// Numbers that look drawn and are the same every time.
pub struct Draw(u64);

impl Draw {
    pub fn new(seed: u64) -> Self {
        Self(seed.wrapping_mul(0x9E37_79B9_7F4A_7C15) | 1)
    }

    /// From 0 up to, not including, 1.
    pub fn next(&mut self) -> f64 {
        self.0 ^= self.0 << 13;
        self.0 ^= self.0 >> 7;
        self.0 ^= self.0 << 17;
        (self.0 >> 11) as f64 / (1u64 << 53) as f64
    }

    pub fn below(&mut self, count: usize) -> usize {
        ((self.next() * count as f64) as usize).min(count.saturating_sub(1))
    }
}

/// What a motor truly is.
struct Motor {
    efficiency: f64,
    cosine: f64,
    pairs: u32,
    slip: f64,
}

/// Power factor that the table's amperes at 460 V leave beside the efficiency of the lower class.
fn table_power_factor(watts: f64) -> f64 {
    let power = Power::from_watts(watts.max(0.5 * WATTS_PER_HORSEPOWER));
    let row = entry(power, Voltage::from_volts(460.0)).expect("the table has the row");
    let rated = row.horsepower * WATTS_PER_HORSEPOWER;
    let efficiency = at_60_hertz(Class::Ie2, Power::from_watts(rated.clamp(746.0, 149_000.0)), 4).expect("listed");
    rated / (3.0_f64.sqrt() * 460.0 * row.current.amperes() * efficiency.fraction())
}

fn motor(watts: f64, efficiency: f64, poles: u32, draw: &mut Draw) -> Motor {
    let more = [0.0, 0.04, 0.08][draw.below(3)];
    let cosine = (table_power_factor(watts) + more - 0.02 * (f64::from(poles) / 2.0 - 2.0)).clamp(0.45, 0.92);
    let rotor = (0.12 + 0.14 * draw.next()) * (1.0 / efficiency - 1.0);
    let most = if watts < 1000.0 { 0.14 } else { 0.07 };
    Motor { efficiency, cosine, pairs: poles / 2, slip: (rotor / (1.0 + rotor)).min(most) }
}

fn text(digits: impl Into<String>, unit: &'static str) -> Text {
    Text { digits: digits.into(), unit }
}

/// Three digits as plates print amperes.
fn amperes(value: f64) -> String {
    let places = if value < 10.0 { 2 } else { usize::from(value < 100.0) };
    format!("{value:.places$}")
}

fn number(value: f64) -> String {
    format!("{value}")
}

impl Motor {
    /// One rating column: volts, hertz, power as printed, that power in watts.
    fn column(&self, volts: f64, hertz: f64, power: &Text, watts: f64, draw: &mut Draw) -> Vec<Text> {
        let off = 1.0 + 0.015 * (2.0 * draw.next() - 1.0);
        let amps = watts / (3.0_f64.sqrt() * volts * self.cosine * self.efficiency) * off;
        let synchronous = 60.0 * hertz / f64::from(self.pairs);
        let speed = synchronous * (1.0 - self.slip);
        let step = if draw.below(4) == 0 && synchronous - speed > 5.0 { 5.0 } else { 1.0 };
        let speed = ((speed / step).round() * step).min(synchronous - 1.0);
        vec![
            text(number(volts), "V"),
            text(amperes(amps), "A"),
            text(number(hertz), "Hz"),
            text(number(speed), "rpm"),
            power.clone(),
            text(format!("{:.2}", self.cosine), ""),
            text(format!("{:.1}", self.efficiency * 100.0), "%"),
        ]
    }
}

fn without(mut columns: Vec<Vec<Text>>, names: &[Name]) -> Vec<Vec<Text>> {
    for column in &mut columns {
        for name in names {
            column[*name as usize].digits.clear();
        }
    }
    columns
}

/// A plate for 50 Hz, in one of eight forms.
fn at_fifty(kilowatts: f64, class: Class, poles: u32, form: usize, draw: &mut Draw) -> Option<Printed> {
    let watts = kilowatts * 1000.0;
    let m = motor(watts, at_50_hertz(class, Power::from_watts(watts), poles)?.fraction(), poles, draw);
    let power = text(number(kilowatts), "kW");
    let mut at = |volts: f64| m.column(volts, 50.0, &power, watts, draw);
    let (delta, star) = if kilowatts <= 4.0 { (230.0, 400.0) } else { (400.0, 690.0) };
    let columns = match form {
        1 => vec![at(delta), at(star)],
        2 => {
            let more = text(number((kilowatts * 115.0).round() / 100.0), "kW");
            vec![at(400.0), m.column(460.0, 60.0, &more, kilowatts * 1150.0, draw)]
        }
        3 => without(vec![at(400.0)], &[Name::Efficiency]),
        4 => without(vec![at(400.0)], &[Name::PowerFactor]),
        6 => without(vec![at(delta), at(star)], &[Name::Efficiency]),
        7 => vec![at(380.0), at(400.0), at(415.0)],
        _ => vec![at(400.0)],
    };
    Some(Printed {
        columns,
        poles: [4, 5].contains(&form).then(|| poles.to_string()),
        class: (form.is_multiple_of(2)).then_some(class),
        of: format!("{kilowatts} kW {} {poles} poles, form {form}", class.words()),
        pairs: m.pairs,
        slip: m.slip,
    })
}

/// A plate for 60 Hz in horsepower, in one of four forms.
fn at_sixty(horsepower: f64, class: Class, poles: u32, form: usize, draw: &mut Draw) -> Option<Printed> {
    let watts = horsepower * WATTS_PER_HORSEPOWER;
    let m = motor(watts, at_60_hertz(class, Power::from_watts(watts), poles)?.fraction(), poles, draw);
    let power = text(number(horsepower), "hp");
    let mut at = |volts: f64| m.column(volts, 60.0, &power, watts, draw);
    let columns = match form {
        1 => vec![at(230.0), at(460.0)],
        2 => without(vec![at(460.0)], &[Name::PowerFactor]),
        3 => vec![at(575.0)],
        _ => vec![at(460.0)],
    };
    Some(Printed {
        columns,
        poles: (form == 2).then(|| poles.to_string()),
        class: None,
        of: format!("{horsepower} hp {} {poles} poles, form {form}", class.words()),
        pairs: m.pairs,
        slip: m.slip,
    })
}

/// Every plate.
pub fn plates() -> Vec<Printed> {
    let mut all = Vec::new();
    for class in Class::ALL {
        for poles in [2, 4, 6, 8] {
            for kilowatts in KILOWATTS {
                let n = all.len();
                all.extend(at_fifty(kilowatts, class, poles, n % 8, &mut Draw::new(n as u64 + 1)));
            }
            for horsepower in HORSEPOWER {
                let n = all.len();
                all.extend(at_sixty(horsepower, class, poles, n % 4, &mut Draw::new(n as u64 + 1)));
            }
        }
    }
    all
}
