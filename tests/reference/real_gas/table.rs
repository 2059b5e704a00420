//! Reading a table of reference values.

use std::collections::BTreeMap;

/// A row by the names of its columns.
pub(super) struct Row(BTreeMap<&'static str, &'static str>);

impl Row {
    pub(super) fn text(&self, column: &str) -> &'static str {
        self.0[column]
    }

    pub(super) fn number(&self, column: &str) -> f64 {
        self.0[column].parse().unwrap_or_else(|_| panic!("no number in {column}: {}", self.0[column]))
    }

    pub(super) fn optional(&self, column: &str) -> Option<f64> {
        self.0[column].parse().ok()
    }
}

/// All rows of a table, whose fields may stand in quotes.
pub(super) fn rows(text: &'static str) -> Vec<Row> {
    let mut lines = text.lines().filter(|line| !line.is_empty() && !line.starts_with('#'));
    let header = fields(lines.next().unwrap());
    let rows: Vec<Row> = lines
        .map(|line| {
            let row = fields(line);
            assert_eq!(row.len(), header.len(), "{line}");
            Row(header.iter().copied().zip(row).collect())
        })
        .collect();
    assert!(!rows.is_empty());
    rows
}

fn fields(line: &'static str) -> Vec<&'static str> {
    let mut out = Vec::new();
    let (mut start, mut quoted) = (0, false);
    for (at, c) in line.char_indices() {
        match c {
            '"' => quoted = !quoted,
            ',' if !quoted => {
                out.push(line[start..at].trim_matches('"'));
                start = at + 1;
            }
            _ => {}
        }
    }
    out.push(line[start..].trim_matches('"'));
    out
}

/// The worst of many deviations, with its place.
#[derive(Default)]
pub(super) struct Worst(pub(super) BTreeMap<String, (f64, String)>);

impl Worst {
    pub(super) fn see(&mut self, what: &str, deviation: f64, place: impl FnOnce() -> String) {
        let known = self.0.get(what).map_or(-1.0, |(worst, _)| *worst);
        // Not a number is the worst of all.
        if deviation.is_nan() || deviation.abs() > known {
            self.0.insert(what.to_owned(), (deviation.abs(), place()));
        }
    }

    /// Fails when the worst of `what` is above `tolerance`.
    pub(super) fn within(&self, what: &str, tolerance: f64) {
        let (worst, place) = &self.0[what];
        assert!(*worst <= tolerance, "{what}: {worst:e} above {tolerance:e} at {place}");
    }

    pub(super) fn print(&self) {
        for (what, (worst, place)) in &self.0 {
            println!("{what}: {worst:.2e} at {place}");
        }
    }
}
