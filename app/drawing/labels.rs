//! Keeps words apart: side by side first, then in further rows, never one upon the other.

use crate::svg::TEXT;

/// Words that belong to a point of the ruler, and where they ended up.
#[derive(Clone, Debug, PartialEq)]
pub(crate) struct Placed {
    /// Which of the words given.
    pub(crate) index: usize,
    /// Row, 0 nearest to the ruler.
    pub(crate) row: usize,
    /// Left end.
    pub(crate) left: f64,
    /// Width.
    pub(crate) width: f64,
    /// The words, cut to fit.
    pub(crate) words: String,
}

const GAP: f64 = 8.0;

/// A generous estimate of the width of words, so that no font in use is wider: DejaVu Sans, bold, is the widest met.
pub(crate) fn width(words: &str, strong: bool) -> f64 {
    let ems: f64 = words
        .chars()
        .map(|c| match c {
            'i' | 'l' | 'j' | 't' | 'f' | 'I' | '.' | ',' | ':' | ';' | '\'' | '|' | '·' | '\u{202f}' | '\u{2009}' => {
                0.34
            }
            ' ' | '(' | ')' | '-' | 'r' | '/' => 0.4,
            'm' | 'w' | 'M' | 'W' | '%' | '@' | '…' | '°' => 0.95,
            c if c.is_ascii_digit() => 0.6,
            c if c.is_ascii_lowercase() => 0.58,
            c if c.is_ascii() => 0.72,
            c if c.len_utf8() > 2 => 1.0,
            _ => 0.75,
        })
        .sum();
    ems * TEXT * if strong { 1.16 } else { 1.04 }
}

/// Cuts words to a width, with an ellipsis; the whole stands in the picture's title.
pub(crate) fn cut(words: &str, room: f64) -> String {
    if width(words, true) <= room {
        return words.to_owned();
    }
    let mut short = String::new();
    for c in words.chars() {
        if width(&short, true) + 2.0 * TEXT > room {
            break;
        }
        short.push(c);
    }
    short.push('…');
    short
}

/// Places words near their points between `from` and `to`; at most `rows` rows, the rest is left out.
pub(crate) fn place(points: &[(f64, &str)], from: f64, to: f64, rows: usize) -> Vec<Placed> {
    let mut sorted: Vec<Placed> = points
        .iter()
        .enumerate()
        .filter(|(_, (_, words))| !words.is_empty())
        .map(|(index, (x, words))| {
            let words = cut(words, to - from);
            let width = width(&words, true);
            Placed { index, row: 0, left: x - width / 2.0, width, words }
        })
        .collect();
    sorted.sort_by(|a, b| (a.left + a.width / 2.0).total_cmp(&(b.left + b.width / 2.0)));
    let total: f64 = sorted.iter().map(|p| p.width + GAP).sum();
    let needed = (1..=sorted.len().max(1)).find(|n| (0..*n).all(|row| fits(&sorted, row, *n, to - from))).unwrap_or(1);
    debug_assert!(total.is_finite());
    let mut placed = Vec::new();
    for row in 0..needed.min(rows) {
        let mut line: Vec<Placed> = sorted.iter().skip(row).step_by(needed).cloned().collect();
        for p in &mut line {
            p.row = row;
        }
        spread(&mut line, from, to);
        placed.extend(line);
    }
    placed
}

fn fits(sorted: &[Placed], row: usize, rows: usize, room: f64) -> bool {
    let line: Vec<&Placed> = sorted.iter().skip(row).step_by(rows).collect();
    line.iter().map(|p| p.width + GAP).sum::<f64>() - GAP <= room + 0.001 || line.len() <= 1
}

/// Pushes neighbours apart, then back inside the picture.
fn spread(line: &mut [Placed], from: f64, to: f64) {
    let mut edge = from;
    for p in line.iter_mut() {
        p.left = p.left.max(edge);
        edge = p.left + p.width + GAP;
    }
    let mut edge = to;
    for p in line.iter_mut().rev() {
        p.left = p.left.min(edge - p.width);
        edge = p.left - GAP;
    }
}

/// Whether a stretch is free of all placed words of row 0.
pub(crate) fn is_free(placed: &[Placed], left: f64, right: f64) -> bool {
    placed.iter().filter(|p| p.row == 0).all(|p| right + GAP <= p.left || left >= p.left + p.width + GAP)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn apart(placed: &[Placed]) {
        for (n, a) in placed.iter().enumerate() {
            assert!(a.left >= -0.01 && a.left + a.width <= 320.01, "{a:?}");
            for b in placed.iter().skip(n + 1).filter(|b| b.row == a.row) {
                assert!(a.left + a.width <= b.left + 0.01 || b.left + b.width <= a.left + 0.01, "{a:?} {b:?}");
            }
        }
    }

    #[test]
    fn words_at_one_point_stand_side_by_side() {
        let placed = place(&[(100.0, "409 V"), (101.0, "410 V"), (102.0, "411 V")], 0.0, 320.0, 3);
        assert_eq!(placed.len(), 3);
        assert!(placed.iter().all(|p| p.row == 0));
        apart(&placed);
    }

    #[test]
    fn long_words_go_to_further_rows_and_are_cut_to_the_picture() {
        let long = "at least 100 MΩ corrected to 40 °C, the maker of the motor says";
        let placed = place(&[(5.0, long), (160.0, long), (318.0, long), (319.0, long)], 0.0, 320.0, 3);
        assert_eq!(placed.len(), 3, "what has no row is left to the title");
        assert!(placed.iter().all(|p| p.words.ends_with('…')));
        apart(&placed);
    }
}
