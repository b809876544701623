//! What must hold for every chart drawn.

use super::*;
use crate::{Chart, Look, Style};

fn coordinates(svg: &str) -> usize {
    let mut count = 0;
    for rest in svg.split("=\"").skip(1) {
        let text = rest.split('"').next().unwrap();
        for word in text.split(['M', 'L', 'Z', ' ']).filter(|w| w.starts_with(|c: char| c.is_ascii_digit() || c == '-'))
        {
            assert!(word.parse::<f64>().unwrap_or(f64::NAN).is_finite(), "`{word}` in {svg}");
            count += 1;
        }
    }
    assert!(!svg.contains("NaN") && !svg.contains("inf"));
    count
}

fn every_chart() -> Vec<Chart> {
    let curve = |f: fn(f64) -> f64| (0..=20).map(|n| (f64::from(n) * 75.0, f(f64::from(n) / 20.0))).collect::<Vec<_>>();
    vec![
        insulation_over_time(
            &[(15.0, 210.0), (30.0, 290.0), (60.0, 410.0), (600.0, 1650.0)],
            Some((20.0, "at least 20.0 MΩ at 20 °C")),
        ),
        volts_per_hertz(
            &[(0.0, 0.0), (50.0, 400.0), (60.0, 400.0)],
            &[(0.0, 8.0), (50.0, 400.0)],
            &[(25.0, 201.0)],
            &[(25.0, "lowest".into()), (50.0, "highest".into())],
        ),
        torque_against_speed(&TorqueSpeed {
            motor: curve(|_| 150.0),
            load: curve(|s| 100.0 * s * s),
            current: curve(|s| 40.0 + 60.0 * s),
            current_limit: Some(110.0),
        }),
        ramp(&Ramp {
            title: "Start".into(),
            label: "speed".into(),
            unit: "rpm".into(),
            set: vec![(0.0, 0.0), (15.0, 1500.0)],
            predicted: curve(|s| 1500.0 * s).into_iter().map(|(x, n)| (x / 100.0, n * n / 1500.0)).collect(),
            measured: vec![(0.0, 0.0), (15.3, 1490.0)],
            level: None,
        }),
        load_run(
            &[(50.0, 62.0), (75.0, 84.0), (100.0, 118.0)],
            &[(50.0, 58.0), (100.0, 112.0)],
            &[(50.0, 66.0), (100.0, 124.0)],
            Some(133.0),
        ),
        harmonics(
            &[(5.0, 38.0), (7.0, 15.0), (11.0, 7.0)],
            &[(5.0, 40.0), (7.0, 14.0), (11.0, 7.5)],
            &[(5.0, 12.0), (7.0, 12.0), (11.0, 5.5)],
        ),
    ]
}

#[test]
fn every_chart_names_its_axes_its_series_and_draws_finite_numbers() {
    for chart in every_chart() {
        assert!(!chart.series.is_empty(), "{}", chart.title);
        for style in [Style::Screen, Style::Print] {
            let svg = chart.draw(style);
            assert!(coordinates(&svg) > 40, "{svg}");
            assert!(svg.contains("role=\"img\"") && svg.contains(&format!("<title>{}", chart.title)));
            assert!(!svg.contains(" id=") && !svg.contains("style="));
            for s in &chart.series {
                assert!(svg.contains(&format!(">{}</text>", s.name)), "{} has no legend", s.name);
            }
            assert_eq!(style == Style::Screen, svg.contains("class=\"chart\""));
        }
    }
}

#[test]
fn a_chart_says_its_numbers_in_words() {
    let chart = insulation_over_time(&[(15.0, 210.0), (60.0, 410.0)], Some((20.0, "at least 20.0 MΩ")));
    let words = chart.words();
    assert!(words.contains("insulation resistance, MΩ against time, s"), "{words}");
    assert!(words.contains("as read: 2 points from 210.0 at 15.00 to 410.0 at 60.00, highest 410.0."), "{words}");
    assert!(words.contains("Line at 20.00: at least 20.0 MΩ."), "{words}");
}

#[test]
fn what_cannot_be_drawn_is_left_out_and_an_empty_chart_still_draws() {
    let chart = Chart::new("Empty", ("x", ""), ("y", "")).with("none", Look::Line, vec![(f64::NAN, 1.0)]);
    assert!(chart.series.is_empty());
    coordinates(&chart.draw(Style::Print));
    let log = insulation_over_time(&[(0.0, 5.0), (15.0, 0.0), (60.0, 12.0)], Some((-1.0, "no")));
    assert_eq!(log.series[0].points, [(60.0, 12.0)], "zero has no place among decades");
    coordinates(&log.draw(Style::Screen));
}

#[test]
fn points_fall_where_the_axes_say() {
    let chart = Chart::new("Known", ("x", ""), ("y", "")).with("a", Look::Points, vec![(0.0, 0.0), (10.0, 100.0)]);
    let svg = chart.draw(Style::Screen);
    // x: 0 to 10 over 58..338; y: 0 to 108 over 206..30.
    assert!(svg.contains(r#"<circle cx="58" cy="206" r="3.4""#), "{svg}");
    assert!(svg.contains(r#"<circle cx="338" cy="43.04" r="3.4""#), "{svg}");
}

/// The table holds what is drawn, thinned for a long curve but with both its ends; the picture says it in `<desc>`.
#[test]
fn the_table_of_a_chart_is_its_numbers() {
    for chart in every_chart() {
        let (rows, svg) = (chart.table(), chart.draw(Style::Screen));
        assert!(svg.contains("<desc>") && svg.contains("</desc>"));
        for s in &chart.series {
            let own: Vec<_> = rows.iter().filter(|r| r.name == s.name).collect();
            assert_eq!(own.len(), s.points.len().min(12), "{}", s.name);
            for (row, point) in [(own.first(), s.points.first()), (own.last(), s.points.last())] {
                let (row, point) = (row.unwrap(), point.unwrap());
                assert!((row.across.parse::<f64>().unwrap() - point.0).abs() <= point.0.abs() * 1e-3, "{row:?}");
                assert!((row.up.parse::<f64>().unwrap() - point.1).abs() <= point.1.abs() * 1e-3, "{row:?}");
            }
        }
        assert!(chart.marks.iter().all(|m| rows.iter().any(|r| r.name == m.label)));
    }
}

#[test]
fn a_chart_without_numbers_is_a_sentence() {
    let chart = insulation_over_time(&[], None);
    assert!(chart.is_empty() && chart.table().is_empty());
    assert_eq!(chart.words(), "Insulation resistance over time: nothing to draw yet.");
}

/// The words stay inside the picture and, at 320 pixels, at least ten pixels high.
#[test]
fn words_stay_inside_and_legible() {
    for chart in every_chart() {
        let svg = chart.draw(Style::Screen);
        let wide: f64 = svg.split("viewBox=\"0 0 ").nth(1).unwrap().split(' ').next().unwrap().parse().unwrap();
        assert!(crate::svg::TEXT * 320.0 / wide >= 10.0);
        for text in svg.split("<text ").skip(1) {
            let x: f64 = text.split("x=\"").nth(1).unwrap().split('"').next().unwrap().parse().unwrap();
            let words = text.split('>').nth(1).unwrap().split('<').next().unwrap();
            let long = crate::labels::width(words, text.contains("700"));
            let left = if text.contains("\"end\"") {
                x - long
            } else if text.contains("\"middle\"") {
                x - long / 2.0
            } else {
                x
            };
            assert!(left >= -1.0 && left + long <= wide + 1.0, "{}: {words}", chart.title);
        }
    }
}

#[test]
fn words_in_a_chart_are_escaped() {
    let svg = Chart::new("<b>", ("a&b", "\""), ("'", ""))
        .with("</svg>", Look::Line, vec![(0.0, 0.0), (1.0, 1.0)])
        .draw(Style::Screen);
    assert!(!svg.contains("<b>") && svg.matches("</svg>").count() == 1 && svg.contains("a&amp;b"));
}
