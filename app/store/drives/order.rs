//! How tags sort and how text is looked for.

/// How a tag sorts: any letter case, and P-2 before P-10.
pub(crate) fn tag_order(tag: &str) -> String {
    let mut order = String::new();
    let mut digits = String::new();
    for c in tag.to_lowercase().chars().chain(std::iter::once('\0')) {
        if c.is_ascii_digit() {
            digits.push(c);
            continue;
        }
        if !digits.is_empty() {
            order.push_str(&format!("{digits:0>12}"));
            digits.clear();
        }
        if c != '\0' {
            order.push(c);
        }
    }
    order
}

/// Text as it is searched: lower case.
pub(crate) fn searched(text: &str) -> String {
    text.trim().to_lowercase()
}

/// A pattern for text that begins so; what a person types is never a wildcard.
pub(crate) fn begins_with(text: &str) -> String {
    format!("{}%", escaped(text))
}

/// A pattern for text that holds this.
pub(crate) fn holds(text: &str) -> String {
    format!("%{}%", escaped(text))
}

fn escaped(text: &str) -> String {
    searched(text).replace('\\', "\\\\").replace('%', "\\%").replace('_', "\\_")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn numbers_in_tags_sort_as_numbers() {
        let mut tags = ["P-10", "p-2", "P-2A", "FAN-1"];
        tags.sort_by_key(|t| tag_order(t));
        assert_eq!(tags, ["FAN-1", "p-2", "P-2A", "P-10"]);
    }

    #[test]
    fn wildcards_are_taken_as_typed() {
        assert_eq!(holds("5%_\\"), "%5\\%\\_\\\\%");
        assert_eq!(begins_with(" Fan "), "fan%");
    }
}
