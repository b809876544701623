//! A field of a form: label, input, its own state line, error, hint; all tied to the input for those who hear the page.

use crate::clock_words;
use commissioning::plant::{Field, FieldKind, Recorded, Slot};
use commissioning::{EventId, Typed};
use engineering::Kind;
use maud::{Markup, html};

/// What kind of input it is.
#[derive(Clone, Debug)]
pub enum InputKind {
    /// A number with a unit picked from the quantity's.
    Quantity(Kind),
    /// One of several: key and label.
    Choice(Vec<(String, String)>),
    /// Yes or no.
    Flag,
    /// A line of words.
    Line(usize),
    /// Several lines of words.
    Lines(usize),
    /// A table of pairs, a line each.
    Table,
    /// An input of this HTML type: `password`, `date`.
    Html(&'static str),
}

/// A field, ready to be shown.
#[derive(Clone, Debug)]
pub struct FieldInput {
    /// Form name.
    pub name: String,
    /// Label.
    pub label: String,
    /// One sentence under the input; may be empty.
    pub hint: String,
    /// Which input.
    pub kind: InputKind,
    /// What stands in it: recorded, or typed and sent back.
    pub text: String,
    /// Unit picked.
    pub unit: String,
    /// Must not stay empty.
    pub required: bool,
    /// What was wrong.
    pub error: Option<String>,
    /// State line: "recorded 10:42 · I. Lund".
    pub state: Option<Markup>,
    /// Events that stand here now.
    pub seen: Vec<EventId>,
    /// The largest thing on the screen.
    pub big: bool,
    /// Browser's autocomplete hint.
    pub autocomplete: &'static str,
    /// Shown as words to somebody who may not change it.
    pub fixed: bool,
    /// The cursor stands here when the page opens.
    pub focus: bool,
}

/// An input for a date.
#[must_use]
pub const fn date_kind() -> InputKind {
    InputKind::Html("date")
}

impl FieldInput {
    /// An empty field.
    #[must_use]
    pub fn new(name: impl Into<String>, label: impl Into<String>, kind: InputKind) -> Self {
        Self {
            name: name.into(),
            label: label.into(),
            hint: String::new(),
            kind,
            text: String::new(),
            unit: String::new(),
            required: false,
            error: None,
            state: None,
            seen: Vec::new(),
            big: false,
            autocomplete: "off",
            fixed: false,
            focus: false,
        }
    }

    /// From the description of a plant field, under this form name.
    #[must_use]
    pub fn of(field: &Field, name: impl Into<String>) -> Self {
        let (kind, unit) = match field.kind {
            FieldKind::Quantity { kind, unit, .. } => (InputKind::Quantity(kind), unit),
            FieldKind::Choice(options) => {
                (InputKind::Choice(options.iter().map(|(k, l)| ((*k).to_owned(), (*l).to_owned())).collect()), "")
            }
            FieldKind::Flag => (InputKind::Flag, ""),
            FieldKind::Text(most) if most > 200 => (InputKind::Lines(most), ""),
            FieldKind::Text(most) => (InputKind::Line(most), ""),
            FieldKind::Table => (InputKind::Table, ""),
        };
        Self {
            hint: field.hint.to_owned(),
            unit: unit.to_owned(),
            required: field.required,
            ..Self::new(name, first_capital(field.label), kind)
        }
    }

    /// With what stands in a slot of a sheet.
    #[must_use]
    pub fn standing(mut self, slot: Option<&Slot<Option<Typed>>>) -> Self {
        let Some(slot) = slot else { return self };
        self.seen = slot.seen();
        if let Some(typed) = slot.current().and_then(|r| r.value.as_ref()) {
            self.text.clone_from(&typed.text);
            if let Some(unit) = &typed.unit {
                self.unit.clone_from(unit);
            }
        }
        self.state = Some(state_line(slot.standing(), slot.earlier(), |v| {
            v.as_ref().map_or_else(|| "empty".to_owned(), Typed::shown)
        }));
        self
    }

    /// With a hint.
    #[must_use]
    pub fn hint(mut self, hint: &str) -> Self {
        hint.clone_into(&mut self.hint);
        self
    }

    /// With this text in it.
    #[must_use]
    pub fn with(mut self, text: &str) -> Self {
        text.clone_into(&mut self.text);
        self
    }

    /// Must not stay empty.
    #[must_use]
    pub const fn needed(mut self) -> Self {
        self.required = true;
        self
    }

    /// As words, for somebody who may not change it.
    #[must_use]
    pub fn fixed(mut self) -> Self {
        self.fixed = true;
        self.hint.clear();
        self
    }

    /// What stands in it, in words; empty where nothing does.
    #[must_use]
    pub fn words(&self) -> String {
        match &self.kind {
            InputKind::Choice(options) => {
                options.iter().find(|(key, _)| *key == self.text).map_or_else(|| self.text.clone(), |(_, l)| l.clone())
            }
            InputKind::Quantity(_) if !self.text.is_empty() && !self.unit.is_empty() => {
                format!("{} {}", self.text, self.unit)
            }
            _ => self.text.clone(),
        }
    }

    /// With the browser's autocomplete hint.
    #[must_use]
    pub const fn autocomplete(mut self, hint: &'static str) -> Self {
        self.autocomplete = hint;
        self
    }

    /// With what was typed and sent, and the error that belongs to this field among those refused.
    #[must_use]
    pub fn sent_back(mut self, posted: &crate::posted::Posted, errors: &[commissioning::FieldError]) -> Self {
        if posted.has(&self.name) {
            posted.text(&self.name).clone_into(&mut self.text);
        }
        let unit = format!("{}.unit", self.name);
        if posted.has(&unit) {
            posted.text(&unit).clone_into(&mut self.unit);
        }
        if posted.has(&format!("{}.seen", self.name)) {
            self.seen = posted.seen(&self.name);
        }
        self.error = errors.iter().find(|e| e.field == self.name).map(|e| e.message.clone());
        self
    }
}

/// The id of the input of this name: labels and links to a faulty field use it.
#[must_use]
pub fn input_id(name: &str) -> String {
    format!("i-{name}")
}

/// Who recorded what stands, when; earlier values one tap away; two that stand beside each other are both shown.
pub fn state_line<T>(standing: &[Recorded<T>], earlier: &[Recorded<T>], words: impl Fn(&T) -> String) -> Markup {
    html! {
        @match standing {
            [] => {}
            [one] => { span { "recorded " (who_when(one)) } }
            several => {
                strong { "needs a choice: " }
                @for (n, r) in several.iter().enumerate() { @if n > 0 { " or " } (words(&r.value)) " (" (who_when(r)) ")" }
            }
        }
        (earlier_values(earlier, words))
    }
}

/// When and by whom.
#[must_use]
pub fn who_when<T>(r: &Recorded<T>) -> String {
    format!("{} · {}", clock_words::moment(r.received), r.by_name)
}

/// What stood before, folded.
pub fn earlier_values<T>(earlier: &[Recorded<T>], words: impl Fn(&T) -> String) -> Markup {
    html! {
        @if !earlier.is_empty() {
            details.earlier {
                summary { "earlier values: " (earlier.len()) }
                ul { @for r in earlier.iter().rev() { li { s { (words(&r.value)) } " " (who_when(r)) @if let Some(reason) = &r.reason { ": " (reason) } } } }
            }
        }
    }
}

/// The field.
#[must_use]
pub fn field(f: &FieldInput) -> Markup {
    if f.fixed {
        return as_words(f);
    }
    let id = input_id(&f.name);
    let grouped =
        matches!(&f.kind, InputKind::Flag) || matches!(&f.kind, InputKind::Choice(options) if options.len() <= 4);
    let below = html! {
        @if let Some(error) = &f.error { p.error id=(format!("e-{}", f.name)) { (error) } }
        @if !f.hint.is_empty() { p.hint id=(format!("h-{}", f.name)) { (f.hint) } }
        @if let Some(state) = &f.state { div.state id=(format!("s-{}", f.name)) { (state) } }
        @if !f.seen.is_empty() { input type="hidden" name=(format!("{}.seen", f.name)) value=(joined(&f.seen)); }
    };
    html! {
        @if grouped {
            fieldset.field.bad[f.error.is_some()].big[f.big] aria-describedby=[described(f)] {
                legend { (f.label) @if f.required { span.needed { " needed" } } }
                (segments(f, &id))
                (below)
            }
        } @else {
            div.field.bad[f.error.is_some()].big[f.big] {
                label for=(id) { (f.label) @if f.required { span.needed { " needed" } } }
                (input(f, &id))
                (below)
            }
        }
    }
}

fn as_words(f: &FieldInput) -> Markup {
    let words = f.words();
    html! {
        div.field.fixed {
            p.label { (f.label) }
            @if words.is_empty() { p.value-words.quiet { "not stated" } } @else { p.value-words { (words) } }
            @if let Some(state) = &f.state { div.state { (state) } }
        }
    }
}

fn input(f: &FieldInput, id: &str) -> Markup {
    let described = described(f);
    let invalid = f.error.is_some().then_some("true");
    html! {
        @match &f.kind {
            InputKind::Quantity(kind) => {
                div.quantity {
                    input id=(id) name=(f.name) value=(f.text) inputmode="decimal" autocomplete="off" spellcheck="false" aria-describedby=[described] aria-invalid=[invalid];
                    @match kind.units() {
                        [one] => { @if !one.symbol.is_empty() { span.unit { (one.symbol) } } }
                        units => {
                            select name=(format!("{}.unit", f.name)) aria-label=(format!("Unit of {}", f.label)) {
                                @for unit in units { option value=(unit.symbol) selected[unit.symbol == f.unit] { (unit.symbol) } }
                            }
                        }
                    }
                }
            }
            InputKind::Choice(options) => {
                select.input id=(id) name=(f.name) aria-describedby=[described] aria-invalid=[invalid] {
                    option value="" { "not stated" }
                    @for (key, label) in options { option value=(key) selected[*key == f.text] { (label) } }
                    @if !f.text.is_empty() && options.iter().all(|(k, _)| *k != f.text) { option value=(f.text) selected { (commissioning::typed::shorten(&f.text)) } }
                }
            }
            InputKind::Lines(most) => { textarea.input id=(id) name=(f.name) rows="3" data-most=(most) autofocus[f.focus] aria-describedby=[described] aria-invalid=[invalid] { "\n" (f.text) } }
            InputKind::Table => { textarea.input.table id=(id) name=(f.name) rows="6" spellcheck="false" aria-describedby=[described] aria-invalid=[invalid] { "\n" (f.text) } }
            InputKind::Line(_) | InputKind::Flag => { input.input id=(id) name=(f.name) value=(f.text) autocomplete=(f.autocomplete) aria-describedby=[described] aria-invalid=[invalid]; }
            InputKind::Html(kind) => { input.input id=(id) type=(kind) name=(f.name) value=(if *kind == "password" { "" } else { f.text.as_str() }) autocomplete=(f.autocomplete) aria-describedby=[described] aria-invalid=[invalid]; }
        }
    }
}

/// Few options stand side by side; "not stated" is one of them, so that a choice can be taken back.
fn segments(f: &FieldInput, id: &str) -> Markup {
    let options = match &f.kind {
        InputKind::Choice(options) => options.clone(),
        _ => vec![("yes".to_owned(), "yes".to_owned()), ("no".to_owned(), "no".to_owned())],
    };
    let known = options.iter().any(|(k, _)| *k == f.text);
    let decided = f.required && known && matches!(&f.kind, InputKind::Flag);
    let unstated = (!decided).then(|| (String::new(), "not stated".to_owned()));
    html! {
        div.segments {
            @for (n, (key, label)) in unstated.iter().chain(&options).enumerate() {
                label { input type="radio" id=(if n == 0 { id.to_owned() } else { format!("{id}-{n}") }) name=(f.name) value=(key) checked[*key == f.text || (key.is_empty() && !known)]; span { (label) } }
            }
        }
    }
}

fn described(f: &FieldInput) -> Option<String> {
    let parts = [(f.error.is_some(), "e"), (!f.hint.is_empty(), "h"), (f.state.is_some(), "s")];
    let ids: Vec<String> = parts.iter().filter(|(on, _)| *on).map(|(_, p)| format!("{p}-{}", f.name)).collect();
    (!ids.is_empty()).then(|| ids.join(" "))
}

fn joined(seen: &[EventId]) -> String {
    seen.iter().map(|e| e.0.as_str()).collect::<Vec<_>>().join(" ")
}

fn first_capital(label: &str) -> String {
    let mut letters = label.chars();
    letters.next().map_or_else(String::new, |c| c.to_uppercase().chain(letters).collect())
}
