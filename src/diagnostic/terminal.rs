//! A finding drawn on the source, for people.
//!
//! The drawing library gets excerpts of our own cutting: only the lines around the marked places, long lines cut to a
//! window, every range within the text and on character borders, and characters that a terminal would obey escaped.

use annotate_snippets::{AnnotationKind, Element, Level, Renderer, Snippet};

use super::{Diagnostic, LineIndex, Place, Severity, Span, visible, visible::push_visible};

/// Marked places at most this many lines apart are shown in one piece.
const LINES_BETWEEN: u32 = 3;

/// A marked place shows at most this many lines.
const LINES_OF_A_PLACE: u32 = 6;

/// Further places drawn for one finding; how many more there are is said in words.
const FURTHER_PLACES: usize = 8;

/// A line longer than this many bytes is cut to a window around the marked place.
const LONG_LINE: usize = 400;

/// Characters shown before the marked place of a long line.
const BEFORE: usize = 40;

/// Characters shown from the start of the marked place of a long line on.
const AFTER: usize = 80;

/// Longest note, help or label in characters.
const LONG_TEXT: usize = 1_500;

/// The finding drawn on its source, with a line end behind it.
///
/// The first line is `error[code]: message`, the second holds `PATH:LINE:COLUMN`; then come the lines of the sheet with
/// the exact text underlined, facts, and what to do.
#[must_use]
pub fn terminal(finding: &Diagnostic, path: &str, text: &str, lines: &LineIndex, colour: bool) -> String {
    let level = match finding.severity {
        Severity::Error => Level::ERROR,
        Severity::Warning => Level::WARNING,
        Severity::Note => Level::NOTE,
    };
    let path = visible(path);
    let mut elements: Vec<Element<'_>> = Vec::new();
    let mut columns = Vec::new();
    for excerpt in excerpts(finding, text, lines) {
        columns.push((excerpt.drawn_column(), excerpt.place));
        let annotations = excerpt.marks.into_iter().map(|mark| {
            let kind = if mark.primary { AnnotationKind::Primary } else { AnnotationKind::Context };
            kind.span(mark.start..mark.end).label(Some(mark.label).filter(|label| !label.is_empty()))
        });
        let snippet = Snippet::source(excerpt.source).line_start(excerpt.first_line as usize).path(path.clone());
        elements.push(snippet.annotations(annotations).into());
    }
    elements.extend(notes(finding).into_iter().map(|note| Level::NOTE.message(note).into()));
    elements.extend(helps(finding).into_iter().map(|help| Level::HELP.message(help).into()));
    let report = [level.primary_title(shown_text(&finding.message)).id(finding.code).elements(elements)];
    let renderer = if colour { Renderer::styled() } else { Renderer::plain() };
    let mut drawn = renderer.render(&report);
    drawn.push('\n');
    correct_columns(drawn, &path, columns)
}

/// Puts the columns of the sheet where the library counted those of a cut or escaped excerpt: it has no way to be told.
fn correct_columns(mut drawn: String, path: &str, columns: Vec<(usize, Place)>) -> String {
    let mut from = drawn.find('\n').unwrap_or(0);
    for (counted, Place { line, column }) in columns {
        let heading = format!("{path}:{line}:{counted}");
        let Some(at) = drawn[from..].find(&heading).map(|at| from + at) else { continue };
        let corrected = format!("{path}:{line}:{column}");
        drawn.replace_range(at..at + heading.len(), &corrected);
        from = at + corrected.len();
    }
    drawn
}

/// Facts, and the places that are not drawn.
fn notes(finding: &Diagnostic) -> Vec<String> {
    let mut notes: Vec<String> = finding.notes.iter().map(|note| shown_lines(note)).collect();
    let elsewhere = finding.related.iter().filter_map(|label| label.path.as_ref().map(|path| (path, label)));
    notes.extend(elsewhere.map(|(path, label)| format!("{}: {}", visible(path), shown_text(&label.text))));
    let here = finding.related.iter().filter(|label| label.path.is_none()).count();
    if here > FURTHER_PLACES {
        notes.push(format!("{} more places belong to it", here - FURTHER_PLACES));
    }
    notes
}

/// What to do, and the text to write where the help does not already say it.
fn helps(finding: &Diagnostic) -> Vec<String> {
    let mut helps: Vec<String> = finding.help.iter().map(|help| shown_lines(help)).collect();
    if let Some(edit) = &finding.edit {
        let replacement = edit.replacement.trim();
        if replacement.is_empty() {
            if helps.is_empty() && edit.span.start < edit.span.end {
                helps.push("leave it out".to_owned());
            }
        } else if !finding.help.as_ref().is_some_and(|help| help.contains(replacement)) {
            helps.push(format!("write `{}`", shown_text(replacement)));
        }
    }
    helps
}

/// Text on one line, cut where it is very long.
fn shown_text(text: &str) -> String {
    let mut shown = String::with_capacity(text.len());
    for (count, character) in text.chars().enumerate() {
        if count == LONG_TEXT {
            shown.push('…');
            break;
        }
        push_visible(&mut shown, character);
    }
    shown
}

/// Text that may hold line ends of our own.
fn shown_lines(text: &str) -> String {
    text.lines().map(shown_text).collect::<Vec<_>>().join("\n")
}

/// A marked range: of the text, and once it is cut, of the excerpt's source.
struct Mark {
    start: usize,
    end: usize,
    label: String,
    primary: bool,
}

/// Lines of the sheet to be shown in one piece.
struct Excerpt {
    first_line: u32,
    source: String,
    marks: Vec<Mark>,
    place: Place,
}

impl Excerpt {
    /// The column that the library counts for the place of this excerpt: that of its exact text, else of its first mark.
    fn drawn_column(&self) -> usize {
        let mark = self.marks.iter().find(|mark| mark.primary).or(self.marks.first());
        let before = mark.map_or("", |mark| &self.source[..mark.start]);
        before.rsplit('\n').next().unwrap_or(before).chars().count() + 1
    }
}

/// A marked range with the lines that it shows.
struct MarkedLines {
    mark: Mark,
    first: u32,
    last: u32,
    has_long_line: bool,
}

/// The excerpts of a finding, the one with the exact text first, the others in the order of the text.
fn excerpts(finding: &Diagnostic, text: &str, lines: &LineIndex) -> Vec<Excerpt> {
    let label = if finding.label == finding.message { String::new() } else { shown_text(&finding.label) };
    let mut marked = vec![marked_lines(finding.span, label, true, text, lines)];
    let further = finding.related.iter().filter(|related| related.path.is_none()).take(FURTHER_PLACES);
    marked.extend(further.map(|related| marked_lines(related.span, shown_text(&related.text), false, text, lines)));
    // The sort is stable: of places on one line the exact text stays the first.
    marked.sort_by_key(|place| (place.first, place.last));

    let mut groups: Vec<Vec<MarkedLines>> = Vec::new();
    for place in marked {
        match groups.last_mut() {
            Some(group) if joins(group, &place) => group.push(place),
            _ => groups.push(vec![place]),
        }
    }
    groups.sort_by_key(|group| !group.iter().any(|place| place.mark.primary));
    groups.into_iter().map(|group| excerpt(group, text, lines)).collect()
}

/// Whether a place is shown together with the places of a group that stands before it.
fn joins(group: &[MarkedLines], place: &MarkedLines) -> bool {
    let last = group.iter().map(|other| other.last).max().unwrap_or(0);
    let long = place.has_long_line || group.iter().any(|other| other.has_long_line);
    !long && place.first <= last + LINES_BETWEEN
}

/// A range of the text with the lines that it shows, clamped to the text and to character borders.
fn marked_lines(span: Span, label: String, primary: bool, text: &str, lines: &LineIndex) -> MarkedLines {
    let start = border(text, span.start as usize);
    let end = border(text, span.end as usize).max(start);
    let first = lines.line(start as u32);
    // A range that ends with a line end shows the line before it.
    let last = lines.line(end.saturating_sub(1).max(start) as u32);
    let shown = last.min(first + LINES_OF_A_PLACE - 1);
    let end = if shown < last { lines.line_span(text, shown).end as usize } else { end };
    let has_long_line = (first..=shown).any(|line| lines.line_span(text, line).of(text).len() > LONG_LINE);
    MarkedLines { mark: Mark { start, end, label, primary }, first, last: shown, has_long_line }
}

/// The excerpt that shows a group of places.
fn excerpt(group: Vec<MarkedLines>, text: &str, lines: &LineIndex) -> Excerpt {
    let first_line = group.iter().map(|place| place.first).min().unwrap_or(1);
    let last_line = group.iter().map(|place| place.last).max().unwrap_or(1);
    let main = group.iter().find(|place| place.mark.primary).or(group.first()).map_or(0, |place| place.mark.start);
    let place = lines.place(text, main as u32);
    let long = group.iter().any(|place| place.has_long_line);
    let mut marks: Vec<Mark> = group.into_iter().map(|place| place.mark).collect();

    let mut from = lines.line_span(text, first_line).start as usize;
    let mut to = lines.line_span(text, last_line).end as usize;
    let (mut cut_before, mut cut_after) = (false, false);
    if long {
        let line = lines.line_span(text, first_line);
        let main = main.min(line.end as usize);
        from = text[line.start as usize..main].char_indices().rev().take(BEFORE).last().map_or(main, |(at, _)| line.start as usize + at);
        to = text[main..line.end as usize].char_indices().nth(AFTER).map_or(line.end as usize, |(at, _)| main + at);
        (cut_before, cut_after) = (from > line.start as usize, to < line.end as usize);
    }
    for mark in &mut marks {
        mark.start = mark.start.clamp(from, to);
        mark.end = mark.end.clamp(mark.start, to);
    }
    let mut source = String::with_capacity(to - from + 8);
    if cut_before {
        source.push('…');
    }
    let wanted = marks.iter().flat_map(|mark| [mark.start, mark.end]).collect();
    let shown = copy_visible(&text[from..to], from, wanted, &mut source);
    for (mark, range) in marks.iter_mut().zip(shown.chunks_exact(2)) {
        (mark.start, mark.end) = (range[0], range[1]);
    }
    if cut_after {
        source.push('…');
    }
    Excerpt { first_line, source, marks, place }
}

/// Appends lines to `source`, escaped, and tells where the `wanted` bytes of the text came to stand.
fn copy_visible(piece: &str, from: usize, wanted: Vec<usize>, source: &mut String) -> Vec<usize> {
    let mut order: Vec<usize> = (0..wanted.len()).collect();
    order.sort_by_key(|index| wanted[*index]);
    let mut pending = order.into_iter().peekable();
    let mut shown = vec![0; wanted.len()];
    let mut characters = piece.char_indices().peekable();
    while let Some((at, character)) = characters.next() {
        while let Some(index) = pending.next_if(|index| wanted[*index] <= from + at) {
            shown[index] = source.len();
        }
        match character {
            '\r' if characters.peek().is_some_and(|(_, next)| *next == '\n') => {}
            '\n' => source.push('\n'),
            other => push_visible(source, other),
        }
    }
    pending.for_each(|index| shown[index] = source.len());
    shown
}

/// The nearest character border at or before byte `at`.
fn border(text: &str, at: usize) -> usize {
    let mut at = at.min(text.len());
    while !text.is_char_boundary(at) {
        at -= 1;
    }
    at
}

#[cfg(test)]
mod tests {
    use super::*;

    fn draw(finding: &Diagnostic, text: &str) -> String {
        terminal(finding, "receiver.gw", text, &LineIndex::new(text), false)
    }

    fn span_of(text: &str, part: &str) -> Span {
        let at = text.find(part).unwrap();
        Span::new(at, at + part.len())
    }

    #[test]
    fn a_finding_shows_code_place_label_note_and_help() {
        let text = "given V = 3.20 m3 \"Größe\" from \"Plate\"\ngiven m = 3.90 kgg \"Mass\"\nanswer V\n";
        let finding = Diagnostic::error("unknown-unit", span_of(text, "kgg"), "`kgg` is no unit")
            .label("no unit")
            .related(span_of(text, "m3"), "a volume")
            .fact("units are listed by `gaswright units`")
            .help("the nearest name is `kg`")
            .safe_edit(span_of(text, "kgg"), "kg");
        assert_eq!(
            draw(&finding, text),
            "\
error[unknown-unit]: `kgg` is no unit
 --> receiver.gw:2:16
  |
1 | given V = 3.20 m3 \"Größe\" from \"Plate\"
  |                -- a volume
2 | given m = 3.90 kgg \"Mass\"
  |                ^^^ no unit
  |
  = note: units are listed by `gaswright units`
  = help: the nearest name is `kg`
"
        );
    }

    #[test]
    fn a_far_place_is_an_excerpt_of_its_own() {
        let text = format!("given V = 3.20 m3\n{}let V = 2 m3\n", "# filler\n".repeat(5_000));
        let second = text.rfind("V =").unwrap();
        let finding =
            Diagnostic::error("doubled-name", Span::new(second, second + 1), "`V` is defined twice").related(Span::new(6, 7), "first here");
        let drawn = draw(&finding, &text);
        assert!(drawn.contains("receiver.gw:5002:5"), "{drawn}");
        assert!(drawn.contains("::: receiver.gw:1:7"), "{drawn}");
        assert!(drawn.lines().count() < 14, "{drawn}");
    }

    #[test]
    fn a_very_long_line_is_cut_around_the_place() {
        let text = format!("let x = {}kgg + {}\n", "a + ".repeat(15_000), "b + ".repeat(15_000));
        let finding =
            Diagnostic::error("unknown-unit", span_of(&text, "kgg"), "`kgg` is no unit").related(Span::new(4, 5), "declared here");
        let drawn = draw(&finding, &text);
        assert!(drawn.len() < 1_000, "{drawn}");
        assert!(drawn.contains("receiver.gw:1:60009"), "{drawn}");
        assert!(drawn.contains("kgg + b"), "{drawn}");
        assert!(drawn.contains("…"), "{drawn}");
    }

    #[test]
    fn controls_and_direction_marks_are_escaped_and_still_underlined() {
        let text = "given V\u{202e} = 3 m3\u{1b}[2J\r\nanswer W\r\n";
        let finding = Diagnostic::error("hidden-character", span_of(text, "\u{202e}"), "a hidden character\u{7}").label("here\u{202e}");
        let drawn = draw(&finding, text);
        assert!(drawn.contains(r"1 | given V\u{202e} = 3 m3\u{1b}[2J"), "{drawn}");
        assert!(drawn.contains(r"  |        ^^^^^^^^ here\u{202e}"), "{drawn}");
        assert!(!drawn.chars().any(|c| c != '\n' && c.is_control()), "{drawn:?}");
    }

    #[test]
    fn no_range_makes_it_panic() {
        let texts = ["", "\n", "ä", "a\r\nß\n\n", "x\u{0}y", "\t\tgiven", "日本\n語"];
        for text in texts {
            for start in 0..12 {
                for end in 0..12 {
                    let finding = Diagnostic::note("a-code", Span { start, end }, "m")
                        .related(Span { start: end, end: start }, "r")
                        .edit(Span { start, end }, "");
                    let drawn = draw(&finding, text);
                    assert!(drawn.starts_with("note[a-code]: m\n"), "{drawn}");
                    assert!(drawn.contains("--> receiver.gw:"), "{text:?} {start} {end}: {drawn}");
                }
            }
        }
    }

    #[test]
    fn a_range_of_many_lines_shows_its_first() {
        let text = format!("let x = (1\n{})\n", "  + 1\n".repeat(1_000));
        let drawn = draw(&Diagnostic::error("too-deep", Span::new(0, text.len()), "too long"), &text);
        assert!(drawn.lines().count() < 14, "{drawn}");
    }

    #[test]
    fn the_text_to_write_is_said_once() {
        let text = "given m = 3.90 kgg";
        let finding = Diagnostic::error("unknown-unit", span_of(text, "kgg"), "`kgg` is no unit").edit(span_of(text, "kgg"), "kg");
        assert!(draw(&finding, text).contains("= help: write `kg`"));
        let finding = finding.help("did you mean `kg`?");
        assert!(!draw(&finding, text).contains("write"));
    }

    #[test]
    fn colour_only_where_asked() {
        let text = "answer V";
        let finding = Diagnostic::error("unknown-name", span_of(text, "V"), "`V` is not defined");
        assert!(!draw(&finding, text).contains('\u{1b}'));
        assert!(terminal(&finding, "a.gw", text, &LineIndex::new(text), true).contains('\u{1b}'));
    }
}
