//! From the Markdown of a report to the body of its HTML page.
//!
//! Markdown cannot lay out a plate, a grid or a figure. Comments that a host of Markdown does not show do it: what stands between
//! `<!-- NAME -->` and `<!-- /NAME -->` becomes a block of class NAME, `<!-- plane 1 -->` the first figure, and
//! `<!-- aside -->` sends the rest of a paragraph to the edge of the page. No other HTML is obeyed: it is shown as text. Texts of a
//! sheet come with their angle brackets escaped, so none of these can come from a sheet.

use std::collections::BTreeMap;

use pulldown_cmark::{CowStr, Event, HeadingLevel, Parser, Tag, TagEnd};

use super::grid::{Cell, Grid};
use super::plane::Plane;
use crate::report::formula::escape;
use crate::report::markdown::OPTIONS;

/// Character of the Markdown for the box that the checker ticks.
const BOX: char = '☐';

/// The body of a page. `formulas` holds the MathML of each formula by its Markdown, `planes` the figures by number from 1.
pub(in crate::report) fn body(markdown: &str, formulas: &BTreeMap<String, String>, planes: &[Plane]) -> String {
    let mut page = Page {
        formulas,
        planes,
        out: String::with_capacity(4 * markdown.len()),
        layouts: Vec::new(),
        aside: Aside::None,
        grid: None,
        images: 0,
    };
    for event in Parser::new_ext(markdown, OPTIONS) {
        page.take(event);
    }
    while let Some(name) = page.layouts.pop() {
        page.out.push_str(&closing(&name));
    }
    page.out
}

/// Whether the rest of a paragraph goes to the edge.
#[derive(Clone, Copy, PartialEq, Eq)]
enum Aside {
    None,
    /// Its first words are still to come.
    Begun,
    Open,
}

struct Page<'a> {
    formulas: &'a BTreeMap<String, String>,
    planes: &'a [Plane],
    out: String,
    /// The blocks that are open, outermost first.
    layouts: Vec<String>,
    aside: Aside,
    /// The table that is open.
    grid: Option<Grid>,
    /// How many images are open: of an image only its text is shown, because a page loads nothing.
    images: usize,
}

impl Page<'_> {
    fn take(&mut self, event: Event) {
        match event {
            Event::Start(tag) => self.start(tag),
            Event::End(tag) => self.end(tag),
            Event::Text(text) => self.text(&text),
            Event::Code(text) => self.element("code", &text),
            Event::InlineMath(source) => self.formula(&format!("${source}$")),
            Event::DisplayMath(source) => self.formula(&format!("$${source}$$")),
            Event::Html(html) => self.block_html(&html),
            Event::InlineHtml(html) => self.inline_html(&html),
            Event::SoftBreak => self.push("\n"),
            Event::HardBreak => self.push("<br>"),
            Event::Rule => self.push("<hr>\n"),
            Event::FootnoteReference(label) => self.text(&label),
            Event::TaskListMarker(_) => {}
        }
    }

    /// Where inline content goes: the open cell, else the page.
    fn push(&mut self, html: &str) {
        match self.grid.as_mut().and_then(Grid::open_cell) {
            Some(cell) => cell.html.push_str(html),
            None => self.out.push_str(html),
        }
    }

    fn text(&mut self, text: &str) {
        if self.in_layout("sheet") {
            escape(text, &mut self.out);
            return;
        }
        let mut text = text;
        if self.aside == Aside::Begun {
            text = text.trim_start_matches(['·', ' ']);
            if text.is_empty() {
                return;
            }
            self.aside = Aside::Open;
        }
        if let Some(cell) = self.grid.as_mut().and_then(Grid::open_cell) {
            cell.text.push_str(text);
        }
        let mut html = String::with_capacity(text.len() + 16);
        for (at, part) in text.split(BOX).enumerate() {
            if at > 0 {
                html.push_str(r#"<span class="box" role="img" aria-label="box for a tick"></span>"#);
            }
            escape(part, &mut html);
        }
        self.push(&html);
    }

    fn element(&mut self, name: &str, text: &str) {
        let mut html = format!("<{name}>");
        escape(text, &mut html);
        html.push_str(&format!("</{name}>"));
        self.push(&html);
    }

    fn formula(&mut self, source: &str) {
        if self.aside == Aside::Begun {
            self.aside = Aside::Open;
        }
        let formulas = self.formulas;
        match formulas.get(source) {
            Some(mathml) => self.push(mathml),
            None => self.element("code", source),
        }
    }

    fn in_layout(&self, name: &str) -> bool {
        self.layouts.last().is_some_and(|layout| layout == name)
    }

    /// A line of HTML on its own: a comment of the layout, or text.
    fn block_html(&mut self, html: &str) {
        let comment = html.trim().strip_prefix("<!--").and_then(|rest| rest.strip_suffix("-->")).map(str::trim);
        match comment {
            Some(name) if is_name(name) => {
                self.out.push_str(&opening(name));
                self.layouts.push(name.to_owned());
            }
            Some(name) if name.strip_prefix('/').is_some_and(|name| self.in_layout(name)) => {
                if let Some(name) = self.layouts.pop() {
                    self.out.push_str(&closing(&name));
                }
            }
            Some(name) if name.strip_prefix("plane ").is_some() => {
                let number = name["plane ".len()..].trim().parse::<usize>().unwrap_or(0);
                let planes = self.planes;
                if let Some(plane) = number.checked_sub(1).and_then(|at| planes.get(at)) {
                    self.out.push_str(&plane.svg(number));
                    self.out.push('\n');
                }
            }
            _ if html.trim().is_empty() => {}
            _ => {
                self.out.push_str("<p>");
                escape(html.trim_end(), &mut self.out);
                self.out.push_str("</p>\n");
            }
        }
    }

    /// HTML within a line: a comment of the layout, an anchor, or text.
    fn inline_html(&mut self, html: &str) {
        let anchor = html.strip_prefix(r#"<a id=""#).and_then(|rest| rest.strip_suffix(r#"">"#));
        match (anchor, html) {
            // The lines of the listing carry the anchors of this block themselves.
            (Some(_), _) | (None, "</a>") if self.in_layout("sheet") => {}
            (Some(id), _) if is_anchor(id) => self.push(&format!(r#"<a id="{id}">"#)),
            (None, "</a>") => self.push("</a>"),
            (None, "<!-- aside -->") if self.aside == Aside::None => {
                self.push(r#"<span class="aside">"#);
                self.aside = Aside::Begun;
            }
            _ => {
                let mut text = String::new();
                escape(html, &mut text);
                self.push(&text);
            }
        }
    }

    fn end_aside(&mut self) {
        if self.aside != Aside::None {
            self.push("</span>");
            self.aside = Aside::None;
        }
    }

    fn start(&mut self, tag: Tag) {
        match tag {
            Tag::Paragraph => self.push("<p>"),
            Tag::Heading { level, .. } => {
                let level = self.level(level);
                self.push(&format!("<h{level}>"));
            }
            Tag::BlockQuote(_) => self.push("<blockquote>\n"),
            Tag::CodeBlock(_) if self.in_layout("sheet") => self.out.push_str("<pre class=\"listing\">"),
            Tag::CodeBlock(_) => self.push("<pre><code>"),
            Tag::List(Some(start)) => self.push(&format!("<ol start=\"{start}\">\n")),
            Tag::List(None) => self.push("<ul>\n"),
            Tag::Item => self.push("<li>"),
            Tag::Table(alignments) => {
                let layout = self.layouts.last().map(String::as_str).unwrap_or_default();
                self.grid = Some(Grid::new(&alignments, matches!(layout, "plate" | "step")));
            }
            Tag::TableHead | Tag::TableRow => {
                if let Some(grid) = &mut self.grid {
                    grid.rows.push(Vec::new());
                }
            }
            Tag::TableCell => {
                if let Some(grid) = &mut self.grid {
                    grid.begin_cell();
                }
            }
            Tag::Emphasis => self.push("<em>"),
            Tag::Strong => self.push("<strong>"),
            Tag::Strikethrough => self.push("<del>"),
            Tag::Link { dest_url, .. } => match destination(&dest_url) {
                Some(destination) => self.push(&format!("<a href=\"{destination}\">")),
                None => self.push("<a>"),
            },
            Tag::Image { .. } => {
                self.images += 1;
                self.push("[");
            }
            _ => {}
        }
    }

    fn end(&mut self, tag: TagEnd) {
        match tag {
            TagEnd::Paragraph => {
                self.end_aside();
                self.push("</p>\n");
            }
            TagEnd::Heading(level) => {
                let level = self.level(level);
                self.push(&format!("</h{level}>\n"));
            }
            TagEnd::BlockQuote(_) => self.push("</blockquote>\n"),
            TagEnd::CodeBlock if self.in_layout("sheet") => {
                self.number_lines();
                self.out.push_str("</pre>\n");
            }
            TagEnd::CodeBlock => self.push("</code></pre>\n"),
            TagEnd::List(true) => self.push("</ol>\n"),
            TagEnd::List(false) => self.push("</ul>\n"),
            TagEnd::Item => self.push("</li>\n"),
            TagEnd::Table => {
                if let Some(grid) = self.grid.take() {
                    grid.write(&mut self.out);
                }
            }
            TagEnd::TableCell => {
                self.end_aside();
                if let Some(grid) = &mut self.grid {
                    grid.end_cell();
                }
            }
            TagEnd::Emphasis => self.push("</em>"),
            TagEnd::Strong => self.push("</strong>"),
            TagEnd::Strikethrough => self.push("</del>"),
            TagEnd::Link => self.push("</a>"),
            TagEnd::Image if self.images > 0 => {
                self.images -= 1;
                self.push("]");
            }
            _ => {}
        }
    }

    /// Level of a heading: those of prose stand below those of the report.
    fn level(&self, level: HeadingLevel) -> usize {
        let level = level as usize;
        if self.in_layout("prose") { (level + 3).min(6) } else { level }
    }

    /// Gives each line of the listing, which begins with its number, an element of its own that links can lead to.
    fn number_lines(&mut self) {
        let Some(start) = self.out.rfind("<pre class=\"listing\">").map(|at| at + "<pre class=\"listing\">".len()) else { return };
        let listing = self.out.split_off(start);
        for line in listing.lines() {
            let digits = line.trim_start();
            let number = &digits[..digits.find(|c: char| !c.is_ascii_digit()).unwrap_or(digits.len())];
            let text = digits[number.len()..].strip_prefix("  ").unwrap_or(&digits[number.len()..]);
            self.out.push_str(&format!("<span id=\"line-{number}\"><i>{number}</i>{text}\n</span>"));
        }
    }
}

/// Whether a comment names a block: `answers`, `state-table`.
fn is_name(name: &str) -> bool {
    !name.is_empty() && name.bytes().all(|byte| byte.is_ascii_lowercase() || byte == b'-')
}

fn is_anchor(id: &str) -> bool {
    !id.is_empty() && id.chars().all(|c| c.is_alphanumeric() || matches!(c, '_' | '.' | '-'))
}

fn element_of(name: &str) -> &'static str {
    match name {
        "head" => "header",
        "figure" => "figure",
        "caption" => "figcaption",
        "answers" | "step" => "section",
        _ => "div",
    }
}

fn opening(name: &str) -> String {
    format!("<{} class=\"{name}\">\n", element_of(name))
}

fn closing(name: &str) -> String {
    format!("</{}>\n", element_of(name))
}

/// Where a link leads, escaped; `None` for what is neither a place of the page nor a web or mail address.
fn destination(url: &CowStr) -> Option<String> {
    let scheme = ["http://", "https://", "mailto:"]
        .iter()
        .any(|scheme| url.get(..scheme.len()).is_some_and(|start| start.eq_ignore_ascii_case(scheme)));
    (scheme || url.starts_with('#')).then(|| {
        let mut escaped = String::new();
        escape(url, &mut escaped);
        escaped
    })
}

/// A cell of a table begins empty.
impl Cell {
    pub(in crate::report) fn empty() -> Self {
        Self { html: String::new(), text: String::new() }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn page(markdown: &str) -> String {
        let formulas = BTreeMap::from([("$m$".to_owned(), "<math><mi>m</mi></math>".to_owned())]);
        body(markdown, &formulas, &[])
    }

    #[test]
    fn layouts_open_and_close_and_other_html_is_text() {
        assert_eq!(page("<!-- answers -->\n\na\n\n<!-- /answers -->\n"), "<section class=\"answers\">\n<p>a</p>\n</section>\n");
        assert_eq!(page("<!-- answers -->\n\n<!-- /step -->\n"), "<section class=\"answers\">\n<p>&lt;!-- /step --&gt;</p>\n</section>\n");
        assert_eq!(page("<div onclick=\"x\">\n\n<b>a</b>"), "<p>&lt;div onclick=&quot;x&quot;&gt;</p>\n<p>&lt;b&gt;a&lt;/b&gt;</p>\n");
    }

    #[test]
    fn formulas_are_looked_up_and_unknown_ones_shown_as_written() {
        assert_eq!(page("$m$ and $E<1$"), "<p><math><mi>m</mi></math> and <code>$E&lt;1$</code></p>\n");
    }

    #[test]
    fn nothing_is_loaded_and_no_link_runs() {
        assert_eq!(page("![a](http://example.org/x.png) [b](javascript:alert(1)) [c](#m)"), "<p>[a] <a>b</a> <a href=\"#m\">c</a></p>\n");
        assert_eq!(page("[d](JaVaScRiPt:1) [e](data:text/html,x)"), "<p><a>d</a> <a>e</a></p>\n");
    }

    #[test]
    fn the_rest_of_a_paragraph_goes_to_the_edge() {
        assert_eq!(
            page("<a id=\"full.rho\"></a>**Density**<!-- aside --> · [line 3](#line-3) ☐"),
            "<p><a id=\"full.rho\"></a><strong>Density</strong><span class=\"aside\"><a href=\"#line-3\">line 3</a> <span class=\"box\" role=\"img\" \
             aria-label=\"box for a tick\"></span></span></p>\n"
        );
    }

    #[test]
    fn lines_of_the_listing_can_be_linked_to() {
        assert_eq!(
            page("<!-- sheet -->\n\n<a id=\"line-1\"></a>\n\n```text\n 9  let a < b\n10\n```\n\n<!-- /sheet -->"),
            "<div class=\"sheet\">\n<p></p>\n<pre class=\"listing\"><span id=\"line-9\"><i>9</i>let a &lt; b\n</span><span id=\"line-10\"><i>10</i>\n</span></pre>\n</div>\n"
        );
    }
}
