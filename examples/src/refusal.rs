//! Why a row was refused, as a sentence that names the field and what was given.

use std::fmt;

use floodmark::Status;

use crate::field::Field;

/// The longest stretch of a refused text that is repeated, in characters.
const LONGEST: usize = 60;

/// What a row must keep to. Few in number, so that refusals can be counted by rule in constant memory.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(crate) enum Rule {
    /// The text of this column must be a number.
    Number(Field),
    /// This column must not be empty.
    Present(Field),
    /// The row must reach this column.
    Reach(Field),
    /// The row must have as many fields as the header.
    Width,
    /// A quote that is opened must be closed in the same line.
    Quotes,
    /// The identifier must be text.
    Text,
    /// A rule of the core, by its number.
    Core(i32),
}

impl fmt::Display for Rule {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self {
            Rule::Number(field) => write!(f, "{field} must be a number"),
            Rule::Present(field) => write!(f, "{field} is missing"),
            Rule::Reach(field) => write!(f, "{field} is missing: the row has fewer fields than the header"),
            Rule::Width => f.write_str("the row must have as many fields as the header"),
            Rule::Quotes => f.write_str("a quote is opened and not closed in the same line"),
            Rule::Text => f.write_str("id must be UTF-8 text"),
            Rule::Core(code) => match Status::from_code(*code) {
                Some(status) => f.write_str(status.rule()),
                None => write!(f, "refused with status {code}"),
            },
        }
    }
}

/// A broken rule and, where there is something to show, what was given.
#[derive(Clone, Debug, PartialEq, Eq)]
pub(crate) struct Refusal {
    pub(crate) rule: Rule,
    given: Option<String>,
}

impl Refusal {
    pub(crate) fn new(rule: Rule) -> Refusal {
        Refusal { rule, given: None }
    }

    /// With what was given, which need not be valid text and may be long.
    pub(crate) fn given(rule: Rule, text: &[u8]) -> Refusal {
        let text = String::from_utf8_lossy(text);
        let mut short: String = text.chars().take(LONGEST).collect();
        if short.len() < text.len() {
            short.push('…');
        }
        Refusal { rule, given: Some(short) }
    }

    /// A refusal by the core; `text` is what the row has in the column of which the status speaks.
    pub(crate) fn by_core<'r>(code: i32, text: impl Fn(Field) -> &'r [u8]) -> Refusal {
        let status = Status::from_code(code);
        let named = status.map_or("", Status::field);
        match Field::ALL.into_iter().find(|field| field.name() == named) {
            Some(field) if text(field).is_empty() => Refusal::new(Rule::Present(field)),
            // The rule itself says what was given.
            Some(field) if status != Some(Status::RebateAtHit) => Refusal::given(Rule::Core(code), text(field)),
            _ => Refusal::new(Rule::Core(code)),
        }
    }
}

impl fmt::Display for Refusal {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        self.rule.fmt(f)?;
        match &self.given {
            Some(given) => write!(f, ", got {given}"),
            None => Ok(()),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_refusal_is_a_sentence_with_field_and_value() {
        let sentences = [
            (Refusal::given(Rule::Number(Field::Vol), b"20%"), "vol must be a number, got 20%"),
            (Refusal::by_core(Status::Vol.code(), |_| b"-0.2"), "vol must be from 0 to 1000, got -0.2"),
            (Refusal::by_core(Status::Barrier.code(), |_| b""), "barrier is missing"),
            (Refusal::by_core(Status::RebateAtHit.code(), |_| b"hit"), Status::RebateAtHit.rule()),
            (Refusal::by_core(Status::Overflow.code(), |_| b""), Status::Overflow.rule()),
            (Refusal::given(Rule::Number(Field::Spot), b"\xff"), "spot must be a number, got \u{fffd}"),
        ];
        for (refusal, sentence) in sentences {
            assert_eq!(refusal.to_string(), sentence);
        }
    }

    #[test]
    fn a_long_text_is_cut() {
        let refusal = Refusal::given(Rule::Number(Field::Spot), "é".repeat(1000).as_bytes());
        assert_eq!(refusal.to_string(), format!("spot must be a number, got {}…", "é".repeat(LONGEST)));
    }
}
