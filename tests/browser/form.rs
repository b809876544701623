//! Reads the form on a page as a person sees it, and fills it in by typing and tapping.

use super::tablet::Tablet;
use serde::Deserialize;
use thirtyfour::prelude::*;

/// What kind of control it is.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Deserialize)]
#[serde(rename_all = "lowercase")]
pub enum Kind {
    /// Typed: a number, words, a date, a password.
    Text,
    /// A list to pick from.
    Select,
    /// One of several side by side.
    Radio,
    /// A tick.
    Tick,
    /// A picture.
    File,
}

/// A control of a form.
#[derive(Clone, Debug, Deserialize)]
pub struct Control {
    pub name: String,
    pub kind: Kind,
    /// What stands in it; a tick's is `yes` or empty.
    pub value: String,
    /// What can be picked, with the words shown.
    pub options: Vec<(String, String)>,
    /// Its label or legend.
    pub label: String,
    /// The page says that it is needed.
    pub needed: bool,
}

/// What to put into a control.
#[derive(Clone, Debug, PartialEq, Eq)]
pub enum Put {
    /// Typed or picked.
    Value(String),
    /// Left as it is.
    Nothing,
}

const READ: &str = r"
const form = document.querySelector(arguments[0]);
const seen = new Map();
for (const el of form.elements) {
  if (!el.name || el.type === 'hidden' || el.tagName === 'BUTTON' || el.matches(':disabled') || !el.checkVisibility()) continue;
  const group = el.closest('fieldset.field, div.field');
  const title = el.type === 'radio' ? group?.querySelector('legend') : (el.labels?.[0] ?? group?.querySelector('label, legend'));
  const label = (title?.innerText ?? el.getAttribute('aria-label') ?? '').trim();
  const needed = !!title?.querySelector('.needed');
  const kind = el.tagName === 'SELECT' ? 'select' : ({ radio: 'radio', checkbox: 'tick', file: 'file' })[el.type] ?? 'text';
  let one = seen.get(el.name);
  if (!one) { one = { name: el.name, kind, value: '', options: [], label, needed }; seen.set(el.name, one); }
  if (kind === 'select') { one.options = [...el.options].map(o => [o.value, o.text.trim()]); one.value = el.value; }
  else if (kind === 'radio') { one.options.push([el.value, el.labels[0].innerText.trim()]); if (el.checked) one.value = el.value; }
  else if (kind === 'tick') { one.options.push([el.value, label]); if (el.checked) one.value = el.value; }
  else if (kind === 'text') one.value = el.value;
}
return [...seen.values()];
";

/// The controls of a form that can be seen and used.
pub async fn controls(tablet: &Tablet, form: &str) -> Vec<Control> {
    tablet.one(form).await;
    let found = tablet.web.execute(READ, vec![form.into()]).await.expect("the form is read");
    found.convert().expect("controls")
}

/// Fills in what `answer` says for each control.
pub async fn fill(tablet: &Tablet, form: &str, mut answer: impl FnMut(&Control) -> Put) {
    for control in controls(tablet, form).await {
        if let Put::Value(value) = answer(&control) {
            put(tablet, form, &control, &value).await;
        }
    }
}

/// Puts one value into a control.
pub async fn put(tablet: &Tablet, form: &str, control: &Control, value: &str) {
    let name = &control.name;
    match control.kind {
        Kind::Text => {
            let input = tablet.one(&format!("{form} [name='{name}']:not([type=hidden])")).await;
            if control.value == value {
                return;
            }
            if !control.value.is_empty() {
                input.clear().await.expect("clears");
            }
            if let Err(e) = input.send_keys(value).await {
                panic!("{name} takes no typing at {}: {e}", tablet.path().await);
            }
        }
        Kind::File => tablet
            .one(&format!("{form} input[type=file][name='{name}']"))
            .await
            .send_keys(value)
            .await
            .expect("takes a file"),
        Kind::Select => {
            let offered = control.options.iter().any(|(v, _)| v == value);
            assert!(offered, "{name} does not offer “{value}”: {:?}", control.options);
            tablet
                .one(&format!("{form} select[name='{name}'] option[value='{value}']"))
                .await
                .click()
                .await
                .expect("picks");
        }
        Kind::Radio | Kind::Tick => {
            if control.value == value {
                return;
            }
            let input = tablet.one(&format!("{form} input[name='{name}'][value='{value}']")).await;
            let label = input.find(By::XPath("ancestor::label")).await.expect("a label to tap");
            tablet.tap(&label).await;
        }
    }
}
