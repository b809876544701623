//! Measures a page as it is drawn: whether it scrolls sideways, how large what is tapped is, how well what is read stands out.

use super::tablet::Tablet;
use serde::Deserialize;

/// What was found.
#[derive(Clone, Debug, Deserialize)]
pub struct Measured {
    /// Width of the page less that of the screen.
    pub sideways: f64,
    /// What is to be tapped and is lower than a gloved finger needs, with its height.
    pub small: Vec<String>,
    /// Text that stands out less than it has to, with its contrast.
    pub faint: Vec<String>,
    /// How many things to tap and texts were looked at.
    pub targets: usize,
    pub texts: usize,
}

/// Targets: 48 px, as the project's own rule has it (WCAG 2.2, 2.5.8 asks for 24 and 2.5.5 for 44).
/// Contrast: 7:1, for large text 4.5:1, by the formula of WCAG 2.2, 1.4.6.
const MEASURE: &str = r"
const pen = Object.assign(document.createElement('canvas'), { width: 1, height: 1 }).getContext('2d', { willReadFrequently: true });
const known = new Map();
const rgba = (colour) => {
  if (!known.has(colour)) {
    pen.clearRect(0, 0, 1, 1); pen.fillStyle = colour; pen.fillRect(0, 0, 1, 1);
    const [r, g, b, a] = pen.getImageData(0, 0, 1, 1).data;
    known.set(colour, [r, g, b, a / 255]);
  }
  return known.get(colour);
};
const over = (top, under) => top.slice(0, 3).map((c, i) => c * top[3] + under[i] * (1 - top[3])).concat(1);
const behind = (el) => {
  const layers = [];
  for (let e = el; e; e = e.parentElement) {
    const c = rgba(getComputedStyle(e).backgroundColor);
    if (c[3] > 0) layers.push(c);
    if (c[3] === 1) break;
  }
  return layers.reverse().reduce((under, top) => over(top, under), [255, 255, 255, 1]);
};
const light = ([r, g, b]) => [r, g, b].map(c => (c /= 255) <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4).reduce((s, c, i) => s + c * [0.2126, 0.7152, 0.0722][i], 0);
const shown = (el) => el.checkVisibility({ checkOpacity: true, checkVisibilityCSS: true }) && el.getClientRects().length > 0;
const named = (el) => el.tagName.toLowerCase() + (el.className && typeof el.className === 'string' ? '.' + el.className.trim().replaceAll(' ', '.') : '') + ' “' + (el.innerText ?? el.name ?? '').trim().slice(0, 40) + '”';

const small = []; let targets = 0;
for (const el of document.querySelectorAll('a, button, input:not([type=hidden]), select, textarea, summary')) {
  if (!el.checkVisibility() || el.closest('svg') || el.classList.contains('skip') || el.matches(':disabled')) continue;
  // A link in running text is as high as its line.
  if (el.tagName === 'A' && getComputedStyle(el).display === 'inline') continue;
  const label = ['radio', 'checkbox'].includes(el.type) ? el.labels[0] : el;
  const { width, height } = (label ?? el).getBoundingClientRect();
  if (width === 0 || height === 0) continue;
  targets += 1;
  if (height < 47.5) small.push(Math.round(height * 10) / 10 + ' px: ' + named(el));
}

const faint = []; let texts = 0;
for (const el of document.body.querySelectorAll('*')) {
  if (el.closest('svg, option, .unseen, .skip') || el.matches(':disabled') || !shown(el)) continue;
  const words = [...el.childNodes].filter(n => n.nodeType === 3).map(n => n.data.trim()).join(' ').trim();
  if (!words) continue;
  const style = getComputedStyle(el), under = behind(el), ink = rgba(style.color);
  const [a, b] = [light(over(ink, under)), light(under)].sort((x, y) => y - x);
  const contrast = (a + 0.05) / (b + 0.05);
  const size = parseFloat(style.fontSize), large = size >= 24 || (size >= 18.66 && +style.fontWeight >= 700);
  texts += 1;
  if (contrast < (large ? 4.5 : 7)) faint.push(contrast.toFixed(2) + ': ' + named(el) + ' ' + words.slice(0, 30));
}
const { scrollWidth, clientWidth } = document.documentElement;
return { sideways: scrollWidth - clientWidth, small, faint, targets, texts };
";

/// Measures the page on screen.
pub async fn page(tablet: &Tablet) -> Measured {
    let found = tablet.web.execute(MEASURE, vec![]).await.expect("measures");
    found.convert().expect("measures")
}

impl Measured {
    /// What is wrong with it, a sentence each.
    pub fn faults(&self, whose: &str) -> Vec<String> {
        let mut faults = Vec::new();
        if self.sideways > 0.0 {
            faults.push(format!("{whose}: scrolls sideways by {} px", self.sideways));
        }
        faults.extend(self.small.iter().map(|s| format!("{whose}: low target, {s}")));
        faults.extend(self.faint.iter().map(|s| format!("{whose}: faint text, {s}")));
        faults
    }
}
