//! The keys of a head: each value is typed here, so that all errors come in one run.

use serde_yaml::Spanned;

use super::block::{Entry, entries, next_line, plain_text_with_colon};
use super::yaml::{Pairs, Value, reason, span_of, yaml};
use crate::diagnostic::code::{bad_head, head_key_twice, head_needs_quotes, head_value, later_edition, unknown_head_key};
use crate::diagnostic::{Diagnostic, Span};
use crate::syntax::tree::{Head, Text};

/// The edition of the language that this version reads.
pub const EDITION: u64 = 1;

/// The keys of a head.
const KEYS: &[&str] =
    &["title", "document", "revision", "purpose", "edition", "limits", "figures", "strict", "coverage", "monte_carlo", "seed"];

/// The keys of `limits`.
const LIMIT_KEYS: &[&str] = &["ideal gas"];

/// The smallest and the largest number of figures that can be asked for.
const FIGURES: std::ops::RangeInclusive<u32> = 1..=17;

/// Reads the YAML of a head.
pub(super) struct HeadReader<'a> {
    /// The whole file.
    pub(super) text: &'a str,
    /// Where the YAML begins in it.
    pub(super) offset: usize,
    /// What has been read.
    pub(super) head: &'a mut Head,
    /// What is wrong with it.
    pub(super) findings: &'a mut Vec<Diagnostic>,
    /// The keys so far, with their places.
    pub(super) seen: Vec<(String, Span)>,
}

impl HeadReader<'_> {
    /// Reads the whole block, and where it is no YAML each of its entries alone.
    pub(super) fn block(&mut self, content: &str) {
        match yaml(content) {
            Ok(Spanned { value: Value::Map(pairs), .. }) => self.pairs(pairs, self.offset),
            Ok(Spanned { value: Value::Plain, .. }) if content.lines().all(|line| line.trim().is_empty() || line.starts_with('#')) => {}
            Ok(_) => self.findings.push(bad_head::finding(self.first_line(content, self.offset), "it holds no `key: value`")),
            Err(error) => {
                let before = self.findings.len();
                for entry in entries(content) {
                    self.entry(&entry);
                }
                if self.findings.len() == before {
                    let place = self.place_of_error(&error, content, self.offset);
                    self.findings.push(bad_head::finding(place, &reason(&error)));
                }
            }
        }
    }

    /// Reads one entry of a block that is no YAML as a whole.
    fn entry(&mut self, entry: &Entry<'_>) {
        let offset = self.offset + entry.start;
        match yaml(entry.text) {
            Ok(Spanned { value: Value::Map(pairs), .. }) => self.pairs(pairs, offset),
            Ok(_) => self.findings.push(bad_head::finding(self.first_line(entry.text, offset), "it is no `key: value`")),
            Err(error) => {
                // What stands behind a key that the head does not have is not worth a second finding.
                let key = entry.text.split_once(':').map(|(key, _)| key);
                if key.is_some_and(|key| !self.known_key(key, Span::new(offset, offset + key.len()))) {
                    return;
                }
                match plain_text_with_colon(entry.text) {
                    Some((start, end)) => {
                        let span = Span::new(offset + start, offset + end);
                        self.findings.push(head_needs_quotes::finding(span, key.unwrap_or(""), span.of(self.text)));
                    }
                    None => {
                        let place = self.place_of_error(&error, entry.text, offset);
                        self.findings.push(bad_head::finding(place, &reason(&error)));
                    }
                }
            }
        }
    }

    fn first_line(&self, content: &str, offset: usize) -> Span {
        Span::new(offset, offset + content.lines().next().unwrap_or("").trim_end().len())
    }

    /// The line of an error of the YAML reader, from its column on.
    fn place_of_error(&self, error: &serde_yaml::Error, content: &str, offset: usize) -> Span {
        let (line, column) = error.location().map_or((1, 1), |location| (location.line().max(1), location.column().max(1)));
        let mut start = offset;
        for _ in 1..line {
            start = next_line(self.text, start).unwrap_or(start);
        }
        let start = start.min(offset + content.trim_end().len());
        let rest = self.text[start..].lines().next().unwrap_or("").trim_end();
        let skip = rest.char_indices().nth(column as usize - 1).map_or(0, |(at, _)| at);
        Span::new(start + skip, start + rest.len())
    }

    /// Whether `key` is one of the head and stands there once.
    fn known_key(&mut self, key: &str, span: Span) -> bool {
        if !KEYS.contains(&key) {
            self.findings.push(unknown_head_key::finding(span, key, KEYS));
            return false;
        }
        if let Some((_, first)) = self.seen.iter().find(|(seen, _)| seen == key) {
            self.findings.push(head_key_twice::finding(span, key, *first));
            return false;
        }
        self.seen.push((key.to_owned(), span));
        true
    }

    fn pairs(&mut self, pairs: Pairs, offset: usize) {
        for (key, value) in pairs {
            let key_span = span_of(&key.defined, offset);
            if self.known_key(&key.value, key_span) {
                self.value(&key.value, key_span, value, offset);
            }
        }
    }

    fn value(&mut self, key: &str, key_span: Span, value: Spanned<Value>, offset: usize) {
        let span = span_of(&value.defined, offset);
        let written = span.of(self.text);
        if matches!(value.value, Value::Plain) && (span.start == span.end || written.is_empty()) {
            // A key without a value says nothing, and for a text nothing is missing.
            if !matches!(key, "title" | "document" | "revision" | "purpose") {
                self.wrong(key, key_span, "nothing");
            }
            return;
        }
        let text = match value.value {
            Value::Text(text) => text,
            Value::Plain => written.to_owned(),
            Value::Map(pairs) if key == "limits" => return self.limits(pairs, offset),
            Value::Map(_) => return self.wrong(key, span, "a mapping"),
            Value::List => return self.wrong(key, span, "a list"),
        };
        let found = format!("`{}`", shortened(&text));
        match key {
            "title" => self.head.title = Some(Text { span, text }),
            "document" => self.head.document = Some(Text { span, text }),
            "revision" => self.head.revision = Some(Text { span, text }),
            "purpose" => self.head.purpose = Some(Text { span, text }),
            "edition" => match whole_number(&text) {
                Some(edition) if edition > EDITION => self.findings.push(later_edition::finding(span, &text, EDITION)),
                Some(EDITION) => {}
                _ => self.wrong(key, span, &found),
            },
            "figures" => match whole_number(&text) {
                Some(_) => self.head.figures = figures(&text, span, self.findings),
                None => self.wrong(key, span, &found),
            },
            "strict" => match text.as_str() {
                "true" => self.head.strict = true,
                "false" => self.head.strict = false,
                _ => self.wrong(key, span, &found),
            },
            "coverage" => match ratio(&text) {
                Some(coverage) if coverage > 0.0 && coverage < 1.0 => self.head.coverage = Some((coverage, span)),
                _ => self.wrong(key, span, &found),
            },
            "monte_carlo" => match (text.as_str(), whole_number(&text)) {
                ("auto", _) => self.head.monte_carlo = Some((None, span)),
                (_, Some(trials)) if trials > 0 => self.head.monte_carlo = Some((Some(trials), span)),
                _ => self.wrong(key, span, &found),
            },
            "seed" => match whole_number(&text) {
                Some(seed) => self.head.seed = Some((seed, span)),
                None => self.wrong(key, span, &found),
            },
            _ => self.wrong(key, span, &found),
        }
    }

    fn limits(&mut self, pairs: Pairs, offset: usize) {
        let mut first: Option<Span> = None;
        for (key, value) in pairs {
            let key_span = span_of(&key.defined, offset);
            let span = span_of(&value.defined, offset);
            if !LIMIT_KEYS.contains(&key.value.as_str()) {
                self.findings.push(unknown_head_key::finding(key_span, &key.value, LIMIT_KEYS));
                continue;
            }
            if let Some(first) = first {
                self.findings.push(head_key_twice::finding(key_span, &key.value, first));
                continue;
            }
            first = Some(key_span);
            let text = match value.value {
                Value::Text(text) => text,
                Value::Plain => span.of(self.text).to_owned(),
                Value::Map(_) | Value::List => String::new(),
            };
            match ratio(&text) {
                Some(limit) if limit > 0.0 => self.head.ideal_gas_limit = Some((limit, span)),
                _ => self.wrong(&key.value, span, &format!("`{}`", shortened(&text))),
            }
        }
    }

    fn wrong(&mut self, key: &str, span: Span, found: &str) {
        let wanted = match key {
            "title" | "document" | "revision" | "purpose" => "a text",
            "edition" => "a whole number, at present 1",
            "limits" => "a mapping, such as `{ideal gas: 1 %}`",
            "figures" => "a whole number from 1 to 17",
            "strict" => "`true` or `false`",
            "coverage" => "a number between 0 % and 100 %, such as `99 %`",
            "monte_carlo" => "a whole number of trials, or `auto`",
            "seed" => "a whole number",
            _ => "a number above 0, such as `1 %`",
        };
        self.findings.push(head_value::finding(span, key, wanted, found));
    }
}

/// A number of figures within its range; a finding where it is not.
pub(crate) fn figures(text: &str, span: Span, findings: &mut Vec<Diagnostic>) -> Option<(u32, Span)> {
    match whole_number(text).and_then(|number| u32::try_from(number).ok()).filter(|number| FIGURES.contains(number)) {
        Some(figures) => Some((figures, span)),
        None => {
            findings.push(head_value::finding(span, "figures", "a whole number from 1 to 17", &format!("`{}`", shortened(text))));
            None
        }
    }
}

/// A whole number as written: digits alone.
fn whole_number(text: &str) -> Option<u64> {
    if text.is_empty() || !text.bytes().all(|byte| byte.is_ascii_digit()) { None } else { text.parse().ok() }
}

/// A number, or a percentage, as a ratio.
fn ratio(text: &str) -> Option<f64> {
    let (digits, scale) = text.strip_suffix('%').map_or((text, 1.0), |digits| (digits.trim_end(), 100.0));
    let plain = digits.bytes().all(|byte| byte.is_ascii_digit() || byte == b'.') && !digits.starts_with('.') && !digits.ends_with('.');
    if !plain {
        return None;
    }
    digits.parse::<f64>().ok().map(|value| value / scale)
}

/// A text that a finding can show.
fn shortened(text: &str) -> String {
    const MOST: usize = 40;
    let line = text.lines().next().unwrap_or("");
    if line.chars().count() <= MOST { line.to_owned() } else { line.chars().take(MOST).chain(['…']).collect() }
}
