//! Finds the place for a reference line's words: beside the line, clear of curves, other lines and other words.

/// The inside of a chart.
pub(crate) struct Frame {
    pub(crate) left: f64,
    pub(crate) right: f64,
    pub(crate) top: f64,
    pub(crate) foot: f64,
}

const ROW: f64 = 14.0;

/// A line through points as points a few units apart.
pub(crate) fn sampled(points: &[(f64, f64)]) -> Vec<(f64, f64)> {
    let mut dense: Vec<(f64, f64)> = points.first().copied().into_iter().collect();
    for pair in points.windows(2) {
        let [(x0, y0), (x1, y1)] = pair else { continue };
        for n in 1..=24 {
            let part = f64::from(n) / 24.0;
            dense.push((x0 + (x1 - x0) * part, y0 + (y1 - y0) * part));
        }
    }
    dense
}

/// Middle and base of the words of line `own`; `lines` are (upright, place), `taken` (middle, base, half width).
pub(crate) fn quietest(
    frame: &Frame,
    lines: &[(bool, f64)],
    own: usize,
    width: f64,
    drawn: &[(f64, f64)],
    taken: &[(f64, f64, f64)],
) -> (f64, f64) {
    let half = width / 2.0;
    let (upright, at) = lines.get(own).copied().unwrap_or((false, frame.top));
    let (first, last) = (frame.left + half + 4.0, (frame.right - half - 4.0).max(frame.left + half + 4.0));
    let spots: Vec<(f64, f64)> = if upright {
        let rows = (0..12).map(|n| frame.top + 12.0 + f64::from(n) * ROW).filter(|y| *y < frame.foot - 4.0);
        rows.flat_map(|y| [(at + half + 5.0, y), (at - half - 5.0, y)]).collect()
    } else {
        let steps = (0..=6).map(|n| last - (last - first) * f64::from(n) / 6.0);
        steps.flat_map(|x| [(x, at - 5.0), (x, at + 14.0)]).collect()
    };
    let cost = |(x, y): (f64, f64)| -> usize {
        let (left, right, top, foot) = (x - half - 3.0, x + half + 3.0, y - 12.0, y + 4.0);
        let inside = |px: f64, py: f64| px > left && px < right && py > top && py < foot;
        let off = left < frame.left || right > frame.right + 1.0 || top < frame.top - 2.0 || foot > frame.foot;
        let on_words = taken.iter().filter(|(m, b, h)| (x - m).abs() < half + h + 12.0 && (y - b).abs() < 13.0).count();
        let on_lines = lines
            .iter()
            .enumerate()
            .filter(|(n, _)| *n != own)
            .filter(|(_, (up, at))| if *up { *at > left && *at < right } else { *at > top && *at < foot })
            .count();
        let on_curves = drawn.iter().filter(|(px, py)| inside(*px, *py)).count();
        usize::from(off) * 4000 + on_words * 2000 + on_lines * 300 + on_curves * 10
    };
    spots.into_iter().min_by_key(|spot| cost(*spot)).unwrap_or((first, frame.top + 12.0))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn words_keep_clear_of_curves_lines_and_each_other() {
        let frame = Frame { left: 58.0, right: 338.0, top: 26.0, foot: 206.0 };
        // A curve along the right half, just above the level line: its words go left, or below.
        let drawn = sampled(&[(200.0, 94.0), (338.0, 94.0)]);
        let lines = [(false, 100.0), (false, 104.0), (true, 70.0)];
        let first = quietest(&frame, &lines, 0, 80.0, &drawn, &[]);
        assert!(drawn.iter().all(|(x, y)| (x - first.0).abs() > 43.0 || *y < first.1 - 12.0 || *y > first.1 + 4.0));
        let second = quietest(&frame, &lines, 1, 80.0, &drawn, &[(first.0, first.1, 40.0)]);
        assert!((second.0 - first.0).abs() >= 86.0 || (second.1 - first.1).abs() >= 13.0, "{first:?} {second:?}");
        let upright = quietest(&frame, &lines, 2, 80.0, &drawn, &[]);
        assert!(upright.0 - 40.0 > 70.0, "left of it is no room: {upright:?}");
    }
}
