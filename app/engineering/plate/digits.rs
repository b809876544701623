//! The digits of a printed figure, and the ways in which they are misread or mistyped.

/// Longest figure taken apart.
const MOST: usize = 10;

const POWERS: [f64; MOST + 1] = [1.0, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10];

/// Decimal digits with the place of the point. `0.83` has three digits and two places.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct Digits {
    digit: [u8; MOST],
    count: usize,
    places: usize,
}

impl Digits {
    /// A plain decimal text with point or comma, blanks and apostrophes left out; `None` for any other.
    #[must_use]
    pub fn read(text: &str) -> Option<Self> {
        let text: String = text.chars().filter(|c| !c.is_whitespace() && !['\'', '’'].contains(c)).collect();
        let (whole, decimals) = text.split_once(['.', ',']).unwrap_or((text.as_str(), ""));
        let each: Vec<u8> = whole.bytes().chain(decimals.bytes()).map(|b| b.wrapping_sub(b'0')).collect();
        if each.is_empty() || each.iter().any(|d| *d > 9) {
            return None;
        }
        Self::from_slice(&each, decimals.len())
    }

    /// With the noughts in front that a decimal needs, and no others.
    fn from_slice(each: &[u8], places: usize) -> Option<Self> {
        let surplus = each.iter().take(each.len().saturating_sub(places + 1)).take_while(|d| **d == 0).count();
        let each = &each[surplus..];
        let lacking = (places + 1).saturating_sub(each.len());
        let count = each.len() + lacking;
        if count > MOST {
            return None;
        }
        let mut digit = [0; MOST];
        digit[lacking..count].copy_from_slice(each);
        Some(Self { digit, count, places })
    }

    fn slice(&self) -> &[u8] {
        &self.digit[..self.count]
    }

    const fn whole(&self) -> usize {
        self.count - self.places
    }

    /// The number.
    #[must_use]
    pub fn number(&self) -> f64 {
        self.slice().iter().fold(0.0, |n, d| n * 10.0 + f64::from(*d)) / POWERS[self.places]
    }

    /// Half a step of the last digit.
    #[must_use]
    pub fn half_step(&self) -> f64 {
        0.5 / POWERS[self.places]
    }

    /// How many digits count, from the first that is no nought.
    #[must_use]
    pub fn significant(&self) -> usize {
        self.count - self.slice().iter().take_while(|d| **d == 0).count()
    }

    /// Whether any digit stands behind the point.
    #[must_use]
    pub const fn has_decimals(&self) -> bool {
        self.places > 0
    }

    /// With a decimal point.
    #[must_use]
    pub fn text(&self) -> String {
        let all: String = self.slice().iter().map(|d| char::from(b'0' + d)).collect();
        let (whole, decimals) = all.split_at(self.whole());
        if decimals.is_empty() { whole.to_owned() } else { format!("{whole}.{decimals}") }
    }

    /// Every figure with two neighbouring digits exchanged.
    pub fn exchanged(&self) -> impl Iterator<Item = Self> {
        let this = *self;
        (1..this.count).filter_map(move |i| {
            let mut each = this.digit;
            each.swap(i - 1, i);
            (each[i - 1] != each[i]).then(|| Self::from_slice(&each[..this.count], this.places)).flatten()
        })
    }

    /// Every figure of which this one has lost a digit.
    pub fn with_one_more(&self) -> impl Iterator<Item = Self> {
        let this = *self;
        let whole = this.whole();
        // Where whole and decimals meet, a digit may have stood on either side of the point.
        let whole_places = (0..=whole).map(move |at| (at, this.places));
        let decimal_places = (whole..=this.count).map(move |at| (at, this.places + 1));
        whole_places.chain(decimal_places).flat_map(move |(at, places)| {
            (0..=9u8).filter_map(move |digit| {
                if this.count == MOST || (at == 0 && digit == 0) {
                    return None;
                }
                let mut each = [0; MOST];
                each[..at].copy_from_slice(&this.digit[..at]);
                each[at] = digit;
                each[at + 1..=this.count].copy_from_slice(&this.digit[at..this.count]);
                Self::from_slice(&each[..=this.count], places)
            })
        })
    }

    /// Every figure of which this one has a digit twice.
    pub fn with_one_less(&self) -> impl Iterator<Item = Self> {
        let this = *self;
        (1..this.count).filter_map(move |i| {
            let repeated = this.digit[i] == this.digit[i - 1] && (i < 2 || this.digit[i - 2] != this.digit[i]);
            if !repeated {
                return None;
            }
            let mut each = [0; MOST];
            each[..i].copy_from_slice(&this.digit[..i]);
            each[i..this.count - 1].copy_from_slice(&this.digit[i + 1..this.count]);
            let places = if i >= this.whole() { this.places - 1 } else { this.places };
            Self::from_slice(&each[..this.count - 1], places)
        })
    }

    /// The same digits with the point so many places further left (or right, below zero).
    #[must_use]
    pub fn shifted(&self, left: i32) -> Option<Self> {
        let wanted = i32::try_from(self.places).ok()? + left;
        if let Ok(places) = usize::try_from(wanted) {
            return Self::from_slice(self.slice(), places);
        }
        let noughts = usize::try_from(-wanted).ok()?;
        if self.count + noughts > MOST {
            return None;
        }
        Self::from_slice(&self.digit[..self.count + noughts], 0)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn texts(each: impl Iterator<Item = Digits>) -> Vec<String> {
        each.map(|d| d.text()).collect()
    }

    #[test]
    fn a_figure_is_read_and_written_as_it_stands() {
        for (text, shown, number) in [
            ("20.9", "20.9", 20.9),
            ("0,83", "0.83", 0.83),
            (".83", "0.83", 0.83),
            ("0152", "152", 152.0),
            ("8.", "8", 8.0),
            ("1 475", "1475", 1475.0),
            ("1 475", "1475", 1475.0),
        ] {
            let read = Digits::read(text).expect(text);
            assert_eq!((read.text().as_str(), read.number()), (shown, number), "{text}");
        }
        for none in ["", ".", "1e3", "-5", "7 1/2", "1.2.3", "12345678901"] {
            assert_eq!(Digits::read(none), None, "{none}");
        }
        assert!((Digits::read("20.90").expect("plain").half_step() - 0.005).abs() < 1e-12);
        assert_eq!(Digits::read("0.083").expect("plain").significant(), 2);
    }

    #[test]
    fn digits_are_exchanged_lost_doubled_and_the_point_moved() {
        let of = |text: &str| Digits::read(text).expect("plain");
        assert_eq!(texts(of("1475").exchanged()), ["4175", "1745", "1457"]);
        assert_eq!(texts(of("20.9").exchanged()), ["2.9", "29.0"]);
        assert_eq!(texts(of("1155").with_one_less()), ["155", "115"]);
        assert_eq!(texts(of("20.99").with_one_less()), ["20.9"]);
        assert_eq!(texts(of("111").with_one_less()), ["11"]);
        let more = texts(of("15").with_one_more());
        for wanted in ["152", "105", "315", "15.2"] {
            assert!(more.iter().any(|m| m == wanted), "{wanted} of {more:?}");
        }
        assert!(texts(of("0.3").with_one_more()).iter().any(|m| m == "0.83"));
        let moved = |text: &str, left| of(text).shifted(left).map(|d| d.text());
        assert_eq!(moved("209", 1).as_deref(), Some("20.9"));
        assert_eq!(moved("20.9", -1).as_deref(), Some("209"));
        assert_eq!(moved("1.1", -2).as_deref(), Some("110"));
        assert_eq!(moved("8.3", 1).as_deref(), Some("0.83"));
        assert_eq!(moved("0.83", -2).as_deref(), Some("83"));
    }
}
