//! YAML as pairs of keys and values with their places, without what its schema makes of numbers and booleans.

use std::fmt;

use serde::de::{Deserialize, Deserializer, IgnoredAny, MapAccess, SeqAccess, Visitor};
use serde_yaml::options::{DuplicateKeyPolicy, MergeKeyPolicy, NonFiniteFloatPolicy};
use serde_yaml::{Location, Spanned};

use crate::diagnostic::Span;

/// Nesting beyond which a head is refused: a mapping in a mapping is all that it can use.
const DEEPEST: usize = 8;

/// Nodes beyond which a head is refused.
const MOST_NODES: usize = 2_000;

/// A value of the head, with what the schema of YAML makes of it left aside.
pub(super) enum Value {
    /// A text, quotes and folding resolved.
    Text(String),
    /// Something that YAML takes for a number, a boolean or nothing: what counts is how it is written.
    Plain,
    /// A mapping.
    Map(Pairs),
    /// A list.
    List,
}

/// Keys and values with their places.
pub(super) type Pairs = Vec<(Spanned<String>, Spanned<Value>)>;

impl<'de> Deserialize<'de> for Value {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        deserializer.deserialize_any(ValueVisitor)
    }
}

struct ValueVisitor;

impl<'de> Visitor<'de> for ValueVisitor {
    type Value = Value;

    fn expecting(&self, formatter: &mut fmt::Formatter<'_>) -> fmt::Result {
        formatter.write_str("a value")
    }

    fn visit_str<E>(self, text: &str) -> Result<Value, E> {
        Ok(Value::Text(text.to_owned()))
    }

    fn visit_bool<E>(self, _: bool) -> Result<Value, E> {
        Ok(Value::Plain)
    }

    fn visit_i64<E>(self, _: i64) -> Result<Value, E> {
        Ok(Value::Plain)
    }

    fn visit_u64<E>(self, _: u64) -> Result<Value, E> {
        Ok(Value::Plain)
    }

    fn visit_i128<E>(self, _: i128) -> Result<Value, E> {
        Ok(Value::Plain)
    }

    fn visit_u128<E>(self, _: u128) -> Result<Value, E> {
        Ok(Value::Plain)
    }

    fn visit_f64<E>(self, _: f64) -> Result<Value, E> {
        Ok(Value::Plain)
    }

    fn visit_unit<E>(self) -> Result<Value, E> {
        Ok(Value::Plain)
    }

    fn visit_none<E>(self) -> Result<Value, E> {
        Ok(Value::Plain)
    }

    fn visit_some<D: Deserializer<'de>>(self, deserializer: D) -> Result<Value, D::Error> {
        deserializer.deserialize_any(Self)
    }

    fn visit_seq<A: SeqAccess<'de>>(self, mut access: A) -> Result<Value, A::Error> {
        while access.next_element::<IgnoredAny>()?.is_some() {}
        Ok(Value::List)
    }

    fn visit_map<A: MapAccess<'de>>(self, mut access: A) -> Result<Value, A::Error> {
        let mut pairs = Vec::new();
        while let Some(pair) = access.next_entry()? {
            pairs.push(pair);
        }
        Ok(Value::Map(pairs))
    }
}

/// Reads a piece of YAML. Aliases have no use in a head and could grow without end, so none is followed.
pub(super) fn yaml(text: &str) -> Result<Spanned<Value>, serde_yaml::Error> {
    let options = serde_yaml::options! {
        duplicate_keys: DuplicateKeyPolicy::PassThrough,
        merge_keys: MergeKeyPolicy::AsOrdinary,
        non_finite_float_policy: NonFiniteFloatPolicy::PassThrough,
        with_snippet: false,
        alias_limits: serde_yaml::alias_limits! { max_total_replayed_events: 0 },
        budget: serde_yaml::budget! { max_depth: DEEPEST, max_nodes: MOST_NODES },
    };
    serde_yaml::from_str_with_options(text, options)
}

/// The range of the file at a place of a text that begins at byte `offset`.
pub(super) fn span_of(location: &Location, offset: usize) -> Span {
    let span = location.span();
    let start = span.byte_offset().unwrap_or(0) as usize + offset;
    Span::new(start, start + span.byte_len().unwrap_or(0) as usize)
}

/// What the YAML reader says of an error, without the place, which a finding has itself.
pub(super) fn reason(error: &serde_yaml::Error) -> String {
    let text = error.without_snippet().to_string();
    let text = text.lines().next().unwrap_or("").split(" at line ").next().unwrap_or("");
    match text {
        _ if text.contains("alias") => "aliases (`*name`) are not followed in a head".to_owned(),
        _ if text.contains("unclosed quote") => "a quote is not closed".to_owned(),
        _ if text.contains("budget") || text.contains("depth") || text.contains("recursion") => {
            "it is nested too deep, or too large".to_owned()
        }
        _ if text.contains("unexpected character") => "a text that begins with this character needs quotes".to_owned(),
        _ => text.replace(['`', '\''], ""),
    }
}
