//! Every way of misreading a plate, done to its text; written apart from the search that is to find it.

use super::corpus::{Draw, Printed, Text};
use engineering::plate::proposal::Mistake;
use engineering::plate::{Name, usual};

/// One plate misread in one way.
pub struct Misread {
    pub plate: Printed,
    pub mistake: Mistake,
    pub column: usize,
    pub name: Name,
}

/// Every kind in turn, each on every figure that it can befall; where a digit is, is drawn.
pub fn all(printed: &Printed, draw: &mut Draw) -> Vec<Misread> {
    let mut made = Vec::new();
    let column = draw.below(printed.columns.len());
    for name in Name::OF_A_COLUMN {
        let text = printed.at(column, name).clone();
        if text.digits.is_empty() {
            continue;
        }
        for mistake in Mistake::ALL {
            for wrong in misread(printed, column, name, &text, mistake, draw) {
                let same = wrong.unit == text.unit && number(&wrong) == number(&text);
                if same || number(&wrong).is_none_or(|n| n <= 0.0) {
                    continue;
                }
                let mut plate = printed.clone();
                *plate.at_mut(column, name) = wrong;
                made.push(Misread { plate, mistake, column, name });
            }
        }
    }
    made.extend(factors(printed, column));
    made
}

pub fn number(text: &Text) -> Option<f64> {
    text.digits.parse().ok()
}

fn like(text: &Text, digits: String) -> Text {
    Text { digits, unit: text.unit }
}

fn misread(printed: &Printed, column: usize, name: Name, text: &Text, mistake: Mistake, draw: &mut Draw) -> Vec<Text> {
    let value = number(text).expect("a figure");
    match (mistake, name) {
        (Mistake::Unit, Name::Power) => {
            vec![Text { digits: text.digits.clone(), unit: if text.unit == "kW" { "hp" } else { "kW" } }]
        }
        (Mistake::OtherConnection, Name::Amps) => vec![other_amperes(printed, column, text, value, draw)],
        (Mistake::OtherConnection, Name::Volts) => {
            let root = 3.0_f64.sqrt();
            let wanted = if value < 300.0 || draw.below(2) == 0 { value * root } else { value / root };
            let near = |v: &&f64| (**v / wanted - 1.0).abs() < 0.02;
            usual::VOLTS.iter().find(near).map(|v| like(text, format!("{v}"))).into_iter().collect()
        }
        (Mistake::OtherFrequency, Name::Hertz) => vec![like(text, if value < 55.0 { "60" } else { "50" }.to_owned())],
        (Mistake::SpeedOfOtherPoles, Name::Speed) => {
            let pairs = f64::from(printed.pairs);
            let others = [pairs - 1.0, pairs + 1.0].into_iter().filter(|p| (1.0..=5.0).contains(p));
            others.map(|p| like(text, format!("{:.0}", value * pairs / p))).collect()
        }
        (Mistake::DigitsExchanged, _) if name != Name::Hertz => one_of(&exchanged(&text.digits), text, draw),
        (Mistake::DigitLost, _) => one_of(&lost(&text.digits), text, draw),
        (Mistake::DigitDoubled, _) => one_of(&doubled(&text.digits), text, draw),
        (Mistake::DecimalPoint, Name::Amps | Name::Power | Name::PowerFactor | Name::Efficiency) => {
            one_of(&point_moved(&text.digits), text, draw)
        }
        _ => Vec::new(),
    }
}

/// Amperes of the other column where its connection is another; otherwise √3 times as many, or as few.
fn other_amperes(printed: &Printed, column: usize, text: &Text, value: f64, draw: &mut Draw) -> Text {
    let volts = |c: usize| number(printed.at(c, Name::Volts)).expect("volts");
    let hertz = |c: usize| printed.at(c, Name::Hertz).digits.clone();
    let other =
        (0..printed.columns.len()).find(|c| hertz(*c) == hertz(column) && (volts(*c) / volts(column)).ln().abs() > 0.4);
    if let Some(other) = other {
        return printed.at(other, Name::Amps).clone();
    }
    let root = 3.0_f64.sqrt();
    let wanted = if draw.below(2) == 0 { value * root } else { value / root };
    let places = text.digits.split_once('.').map_or(0, |(_, d)| d.len());
    like(text, format!("{wanted:.places$}"))
}

fn one_of(each: &[String], text: &Text, draw: &mut Draw) -> Vec<Text> {
    let different: Vec<&String> = each.iter().filter(|e| e.parse::<f64>().ok() != number(text)).collect();
    if different.is_empty() { Vec::new() } else { vec![like(text, different[draw.below(different.len())].clone())] }
}

/// Places of digits that a person reads; the nought in front of a decimal is not one.
fn places(digits: &str) -> Vec<usize> {
    let leading = digits.starts_with("0.");
    digits.char_indices().filter(|(i, c)| c.is_ascii_digit() && !(leading && *i == 0)).map(|(i, _)| i).collect()
}

fn exchanged(digits: &str) -> Vec<String> {
    let swap = |a: usize, b: usize| {
        let mut each: Vec<char> = digits.chars().collect();
        each.swap(a, b);
        each.into_iter().collect()
    };
    places(digits).windows(2).map(|pair| swap(pair[0], pair[1])).collect()
}

fn lost(digits: &str) -> Vec<String> {
    if places(digits).len() < 2 {
        return Vec::new();
    }
    let cut = |i: usize| {
        let text = format!("{}{}", &digits[..i], &digits[i + 1..]);
        let text = text.strip_suffix('.').unwrap_or(&text).to_owned();
        if text.starts_with('.') { format!("0{text}") } else { text }
    };
    places(digits).into_iter().map(cut).collect()
}

fn doubled(digits: &str) -> Vec<String> {
    places(digits).into_iter().map(|i| format!("{}{}", &digits[..=i], &digits[i..])).collect()
}

/// The point left out, or one place further left or right.
fn point_moved(digits: &str) -> Vec<String> {
    let whole = digits.find('.').unwrap_or(digits.len());
    let bare = digits.replace('.', "");
    let at = |place: usize| {
        let padded = if place >= bare.len() { format!("{bare:0<place$}") } else { bare.clone() };
        let (left, right) = padded.split_at(place);
        let left = if left.is_empty() { "0" } else { left };
        if right.is_empty() { left.to_owned() } else { format!("{left}.{right}") }
    };
    let mut each = vec![at(whole + 1)];
    if whole > 0 {
        each.push(at(whole - 1));
    }
    if digits.contains('.') {
        each.push(bare.clone());
    }
    each
}

/// Power factor and efficiency copied into each other's place: 0.83 and 91.4 % become 0.914 and 83 %.
fn factors(printed: &Printed, column: usize) -> Option<Misread> {
    let cosine = printed.at(column, Name::PowerFactor).digits.clone();
    let efficiency = printed.at(column, Name::Efficiency).digits.clone();
    if cosine.is_empty() || efficiency.is_empty() {
        return None;
    }
    let mut plate = printed.clone();
    plate.at_mut(column, Name::PowerFactor).digits = format!("0.{}", efficiency.replace('.', ""));
    plate.at_mut(column, Name::Efficiency).digits = cosine.trim_start_matches("0.").to_owned();
    Some(Misread { plate, mistake: Mistake::FactorsExchanged, column, name: Name::PowerFactor })
}
