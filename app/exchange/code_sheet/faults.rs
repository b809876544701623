//! What is wrong with a code sheet: each fault a sentence that names the function.

use super::entry::{CodeEntry, CodeSheet, as_field, same_code, unit_for};
use commissioning::plant::FieldKind;
use commissioning::typed::shorten;
use std::collections::BTreeMap;

impl CodeSheet {
    /// What is wrong with it; empty when it can be used.
    #[must_use]
    pub fn faults(&self) -> Vec<String> {
        let mut faults = Vec::new();
        let (mut functions, mut codes): (BTreeMap<&str, usize>, BTreeMap<String, Vec<&str>>) = Default::default();
        for entry in &self.entries {
            *functions.entry(&entry.function).or_default() += 1;
            codes.entry(same_code(&entry.code)).or_default().push(&entry.function);
            faults.extend(entry.faults());
        }
        for (function, _) in functions.iter().filter(|(_, n)| **n > 1) {
            faults.push(format!("“{}” stands twice. One function has one code.", shorten(function)));
        }
        for (code, named) in codes.iter().filter(|(code, named)| !code.is_empty() && named.len() > 1) {
            faults.push(format!(
                "Code “{}” is given for {}. One code sets one function.",
                shorten(code),
                named.join(" and ")
            ));
        }
        if self.drive_type.trim().is_empty() {
            faults.push("The sheet does not say for which type of drive it is. Name the type.".to_owned());
        }
        faults
    }
}

impl CodeEntry {
    /// What is wrong with this entry.
    #[must_use]
    pub fn faults(&self) -> Vec<String> {
        let Some(function) = self.generic() else {
            return vec![format!("“{}” is no function of the parameter record.", shorten(&self.function))];
        };
        let label = function.label;
        let mut faults = Vec::new();
        if self.code.trim().is_empty() {
            faults.push(format!("{label}: the drive's own code is missing."));
        }
        if self.code.chars().count() > 60 || self.code.chars().any(char::is_control) {
            faults.push(format!("{label}: a code has 60 characters at most, on one line."));
        }
        match function.kind {
            FieldKind::Quantity { .. } => self.figures(label, &mut faults),
            FieldKind::Choice(options) => {
                for (meaning, word) in &self.meanings {
                    if !options.iter().any(|(key, _)| key == meaning) {
                        let keys: Vec<&str> = options.iter().map(|(key, _)| *key).collect();
                        faults.push(format!(
                            "{label}: “{}” is none of its meanings: {}.",
                            shorten(meaning),
                            keys.join(", ")
                        ));
                    }
                    if word.trim().is_empty() {
                        faults.push(format!("{label}: the drive's word for “{}” is missing.", shorten(meaning)));
                    } else if self.meaning_of(word) != Some(meaning) {
                        faults.push(format!("{label}: the drive's word “{}” stands for two meanings.", shorten(word)));
                    }
                }
            }
            _ if !self.meanings.is_empty() && function.kind != FieldKind::Flag => {
                faults.push(format!("{label}: it has no choices, so the drive's words have no place."));
            }
            _ => {}
        }
        faults
    }

    fn figures(&self, label: &str, faults: &mut Vec<String>) {
        let number = |text: &str| text.trim().parse::<f64>().ok().filter(|n| n.is_finite());
        let (low, high) = (number(&self.lowest), number(&self.highest));
        for (what, text) in [
            ("resolution", &self.resolution),
            ("default", &self.default),
            ("lowest", &self.lowest),
            ("highest", &self.highest),
        ] {
            if !text.trim().is_empty() && number(text).is_none() {
                faults.push(format!("{label}: {what} “{}” is no plain number with a decimal point.", shorten(text)));
            }
        }
        if number(&self.resolution).is_some_and(|n| n <= 0.0) {
            faults.push(format!("{label}: the resolution must be above nought."));
        }
        if let (Some(low), Some(high)) = (low, high)
            && low >= high
        {
            faults.push(format!("{label}: the lowest setting is not below the highest."));
        }
        if let Some(default) = number(&self.default)
            && (low.is_some_and(|l| default < l) || high.is_some_and(|h| default > h))
        {
            faults.push(format!("{label}: the default is not between lowest and highest."));
        }
        // In the function's own unit the lowest setting may not lie above what the function can be at all.
        if let Some(function) = self.generic()
            && let (Some(unit), Some(low)) = (unit_for(function, &self.unit), low)
            && let FieldKind::Quantity { kind, high, .. } = as_field(function).kind
            && kind.unit(unit).is_some_and(|u| u.to_coherent(low) > high)
        {
            faults.push(format!(
                "{label}: the lowest setting {} {unit} is above all that it can be. Check the unit.",
                self.lowest
            ));
        }
    }
}
