//! Tables that ship with the crate: comma-separated, one header row, fields with commas in quotes, `#` lines left out.

/// The rows below a header of exactly these `columns`; none where the header is another one.
///
/// A row with another number of fields is left out. The tests count the rows, so a damaged table does not pass them.
pub(super) fn rows<const N: usize>(text: &'static str, columns: [&str; N]) -> impl Iterator<Item = [&'static str; N]> {
    let mut lines = text.lines().filter(|line| !line.is_empty() && !line.starts_with('#'));
    let fits = lines.next().and_then(fields::<N>).is_some_and(|header| header == columns);
    lines.filter(move |_| fits).filter_map(fields::<N>)
}

/// The fields of one line. A field in quotes holds no quote.
fn fields<const N: usize>(line: &'static str) -> Option<[&'static str; N]> {
    let mut found = [""; N];
    let mut rest = line;
    for (index, field) in found.iter_mut().enumerate() {
        let end = if let Some(quoted) = rest.strip_prefix('"') {
            let length = quoted.find('"')?;
            *field = &quoted[..length];
            length + 2
        } else {
            let length = rest.find(',').unwrap_or(rest.len());
            *field = &rest[..length];
            length
        };
        rest = if index + 1 == N { rest.get(end..)? } else { rest.get(end..)?.strip_prefix(',')? };
    }
    rest.is_empty().then_some(found)
}

/// A number of a field; `None` where the field is empty.
pub(super) fn number(field: &str) -> Option<f64> {
    field.parse().ok()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn quoted_fields_keep_their_commas_and_wrong_rows_are_left_out() {
        let text = "# a comment\nname,value\n\"1,3-butadiene\",2\nshort\nfour,4,4\n\"open,5\nlast,\n";
        let read: Vec<_> = rows(text, ["name", "value"]).collect();
        assert_eq!(read, [["1,3-butadiene", "2"], ["last", ""]]);
        assert_eq!(number(read[0][1]), Some(2.0));
        assert_eq!(number(read[1][1]), None);
    }

    #[test]
    fn another_header_gives_no_rows() {
        assert_eq!(rows("name,weight\na,1\n", ["name", "value"]).count(), 0);
    }
}
