//! What must hold for every limit rule drawn.

use super::*;

fn insulation() -> LimitRule {
    LimitRule::logarithmic("MΩ").at_least(5.0, "≥ 5 MΩ").reading(5.3, 0.4, "5.3 MΩ", Verdict::Marginal)
}

/// Every number in every attribute of the picture.
fn numbers(svg: &str) -> Vec<f64> {
    let mut found = Vec::new();
    for name in
        [" x=\"", " y=\"", "x1=\"", "x2=\"", "y1=\"", "y2=\"", "cx=\"", "cy=\"", " r=\"", "width=\"", "height=\""]
    {
        for rest in svg.split(name).skip(1) {
            let text = rest.split('"').next().unwrap();
            found.push(text.parse::<f64>().unwrap_or_else(|_| panic!("`{text}` is no number")));
        }
    }
    for rest in svg.split(" d=\"").skip(1) {
        for text in rest.split('"').next().unwrap().split(['M', 'L', 'Z', ' ']).filter(|t| !t.is_empty()) {
            found.push(text.parse::<f64>().unwrap_or_else(|_| panic!("`{text}` is no number")));
        }
    }
    assert!(!found.is_empty() && found.iter().all(|n| n.is_finite()));
    found
}

fn words_of(svg: &str) -> Vec<(f64, f64, f64)> {
    svg.split("<text ")
        .skip(1)
        .map(|t| {
            let take = |name: &str| t.split(name).nth(1).unwrap().split('"').next().unwrap().parse::<f64>().unwrap();
            let words = t.split('>').nth(1).unwrap().split('<').next().unwrap();
            let half = width(words, t.contains("700")) / 2.0;
            (take("x=\"") - half, take("x=\"") + half, take("y=\""))
        })
        .collect()
}

fn words_stay_apart(svg: &str) {
    let words = words_of(svg);
    for (n, a) in words.iter().enumerate() {
        assert!(a.0 >= -1.0 && a.1 <= 321.0, "{a:?} leaves the picture");
        for b in words.iter().skip(n + 1) {
            let same_row = (a.2 - b.2).abs() < 12.0;
            assert!(!same_row || a.1 <= b.0 + 0.5 || b.1 <= a.0 + 0.5, "{a:?} and {b:?} overlap in {svg}");
        }
    }
}

#[test]
fn a_rule_shows_span_limit_whisker_shape_and_numbers() {
    for style in [Style::Screen, Style::Print] {
        let svg = limit_rule(&insulation(), style);
        assert!(svg.contains("role=\"img\"") && svg.contains("<title>5.3 MΩ, marginal, between 4.900 and 5.700 MΩ"));
        assert!(svg.contains("mark ≥ 5 MΩ; acceptable from 5.000 MΩ up; logarithmic scale 1.00 to 100.0 MΩ"), "{svg}");
        assert!(
            svg.contains(">≥ 5 MΩ</text>") && svg.contains(">5.3 MΩ</text>") && svg.contains(">100 MΩ</text>"),
            "{svg}"
        );
        assert!(!svg.contains(" id=") && !svg.contains("style=") && !svg.contains("<script"));
        numbers(&svg);
        words_stay_apart(&svg);
    }
}

#[test]
fn each_verdict_has_its_own_shape() {
    let drawn =
        |v| limit_rule(&LimitRule::linear("%").at_most(1.0, "≤ 1 %").reading(0.5, 0.0, "0.5 %", v), Style::Screen);
    assert!(
        drawn(Verdict::Within).contains(r#"<circle cx="146.55" cy="35" r="6" class="dr-reading within""#),
        "{}",
        drawn(Verdict::Within)
    );
    assert!(drawn(Verdict::NotAssessed).contains(r#"r="5.2" class="dr-reading not-assessed" fill="none""#));
    assert!(drawn(Verdict::Marginal).contains("Z\" class=\"dr-reading marginal\""));
    assert!(drawn(Verdict::Outside).contains("width=\"11.2\" height=\"11.2\" class=\"dr-reading outside\""));
}

#[test]
fn the_span_begins_at_the_limit_and_runs_to_the_open_end() {
    let svg = limit_rule(&insulation(), Style::Screen);
    let band = svg.split("<rect ").nth(1).unwrap();
    // lg 5 of the two decades 1 to 100, over 296 units from 12 on.
    assert!(band.starts_with("x=\"115.45\""), "{band}");
    assert!(band.contains("width=\"198.55\""), "{band}");
    let mark = svg.split("<line ").find(|l| l.contains("dr-limit")).unwrap();
    assert!(mark.starts_with("x1=\"115.45\""), "{mark}");
}

#[test]
fn a_rule_without_a_reading_shows_the_limit_already() {
    let svg = limit_rule(&LimitRule::linear("V").between(342.0, "342 V", 418.0, "418 V"), Style::Print);
    assert!(svg.contains("No reading yet") && svg.contains(">342 V<") && svg.contains(">418 V<"));
    numbers(&svg);
}

#[test]
fn crowded_and_absurd_rules_stay_legible_and_finite() {
    let v = Verdict::Within;
    let crowd =
        LimitRule::linear("V").between(342.0, "≥ 342 V", 418.0, "≤ 418 V").reading(399.0, 2.0, "L1–L2 399 V", v);
    let crowd = crowd
        .reading(400.0, 2.0, "L2–L3 400 V", v)
        .reading(401.0, 2.0, "L3–L1 401 V", v)
        .tick(343.0, "drive from 343 V");
    let far = LimitRule::linear("%").at_most(1.0, "≤ 1 %").reading(4000.0, 1.0, "4000 %", Verdict::Outside);
    let zero = LimitRule::logarithmic("MΩ").at_least(100.0, "≥ 100 MΩ").reading(0.0, 0.0, "0 MΩ", Verdict::Outside);
    let exact = LimitRule::linear("Hz").between(50.0, "50 Hz", 50.0, "50 Hz").reading(50.0, 0.0, "50 Hz", v);
    let below = LimitRule::linear("A").between(-10.0, "−10 A", -5.0, "−5 A").reading(-7.5, 0.5, "−7.5 A", v);
    let mut broken = LimitRule::linear("A").at_most(f64::INFINITY, "∞").reading(f64::NAN, f64::NAN, "?", v);
    broken.bands.push(engineering::Band { from: None, to: None });
    let long = LimitRule::linear("Ω")
        .at_most(1.0, "twice what this conductor can have at the temperature it was measured at, 0.31 Ω");
    let nought = LimitRule::linear("Hz").between(0.0, "0 Hz", 0.0, "0 Hz").reading(0.0, 0.0, "0 Hz", v);
    let above_nought = LimitRule::linear("A").at_most(0.0, "0 A").reading(3.0, 0.1, "3 A", Verdict::Outside);
    let tiny = LimitRule::linear("F").at_most(2e-300, "2e-300 F").reading(1e-300, 0.0, "1e-300 F", v);
    let vast = LimitRule::logarithmic("Ω").at_least(1e-250, "?").reading(1e250, 0.0, "1e250 Ω", v);
    for rule in
        [crowd, far.clone(), zero, exact, below, broken, long, LimitRule::linear(""), nought, above_nought, tiny, vast]
    {
        for style in [Style::Screen, Style::Print] {
            let svg = limit_rule(&rule, style);
            numbers(&svg);
            words_stay_apart(&svg);
        }
    }
    assert!(limit_rule(&far, Style::Screen).contains("<path d=\"M313"), "an arrow stands at the ruler's end");
}

#[test]
fn words_of_people_cannot_break_the_picture() {
    let rule =
        LimitRule::linear("<b>").at_most(1.0, "\"><script>alert(1)</script>").reading(0.5, 0.0, "a&b", Verdict::Within);
    let svg = limit_rule(&rule, Style::Screen);
    assert!(!svg.contains("<script") && !svg.contains("<b>") && svg.contains("a&amp;b"));
}
