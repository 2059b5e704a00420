//! The syntax from outside: no text makes the reader fail, and laying a sheet out changes nothing of what it says.

use gaswright::diagnostic::{Diagnostic, LineIndex};
use gaswright::syntax::tree::{Statement, StatementKind};
use gaswright::syntax::{Tree, canonical, decode, limits, parse, tidy};
use proptest::prelude::*;

/// Pieces of the language and of what is pasted into it, whole and broken.
const PIECES: &[&str] = &[
    "given",
    "let",
    "unknown",
    "state",
    "gas",
    "site",
    "reference",
    "assume",
    "require",
    "caution",
    "answer",
    "correlate",
    "section",
    "cases",
    "method",
    "if",
    "then",
    "else",
    "and",
    "or",
    "not",
    "in",
    "within",
    "near",
    "from",
    "because",
    "at",
    "of",
    "by",
    "when",
    "exact",
    "figures",
    "altitude",
    "pressure",
    "normal",
    "mole",
    "real",
    "ideal",
    "abs",
    "gauge",
    "diff",
    "triangular",
    "u-shaped",
    "k=2",
    "dof=9",
    "x",
    "T_1",
    "cold.p",
    "n2",
    "sqrt(",
    "min(",
    "pi",
    "R",
    "giben",
    "1",
    "2.40",
    "1e309",
    "0..5",
    ".5",
    "5.",
    "2,40",
    "-8.0",
    "bar",
    "m3",
    "kJ/(kg.K)",
    "%",
    "°C",
    "m³",
    "µm",
    "1/K",
    "m/",
    "(",
    ")",
    "[",
    "]",
    "{",
    "}",
    "=",
    "==",
    ":=",
    "+",
    "-",
    "−",
    "*",
    "×",
    "·",
    "/",
    "^",
    "**",
    "±",
    "+-",
    "<=",
    "≤",
    ">",
    ",",
    ";",
    ":",
    "..",
    "\"",
    "\"text\"",
    "\"a # b\"",
    "\\\"",
    "'",
    "“",
    "# comment",
    "> prose {x in bar} {{",
    "> {",
    "---",
    "title: x",
    "figures: 5",
    "limits: {ideal gas: 1 %}",
    "*a",
    "&a",
    "\n",
    "\n",
    "\n  ",
    "\n\t",
    "\r\n",
    "\r",
    " ",
    "  ",
    "\t",
    "\u{A0}",
    "\u{202E}",
    "\u{200B}",
    "\0",
    "\u{FEFF}",
    "é",
    "漢",
    "𝜌",
    "√",
];

/// Text made of pieces of the language, some of them touching.
fn scraps() -> impl Strategy<Value = String> {
    let piece = (0..PIECES.len(), any::<bool>()).prop_map(|(index, blank)| format!("{}{}", PIECES[index], if blank { " " } else { "" }));
    proptest::collection::vec(piece, 0..60).prop_map(|pieces| pieces.concat())
}

/// Blanks between two tokens, as people and word processors make them.
fn gap() -> impl Strategy<Value = &'static str> {
    prop_oneof![
        8 => Just(" "),
        2 => Just("   "),
        1 => Just("\t"),
        1 => Just("\u{A0}"),
        1 => Just("\n   "),
        1 => Just(" # a comment, \"quoted\"\n  "),
        1 => Just("\n\n # alone\r\n\t"),
    ]
}

fn name() -> impl Strategy<Value = String> {
    prop_oneof![
        Just("m".to_owned()),
        Just("T_1".to_owned()),
        Just("volume_of_the_receiver".to_owned()),
        Just("ρ_2".to_owned()),
        Just("min_2".to_owned()),
        Just("k".to_owned()),
        Just("h".to_owned()),
    ]
}

fn quantity() -> impl Strategy<Value = Vec<String>> {
    let number = prop_oneof![Just("2.40"), Just("12"), Just("1e4"), Just("1.5E−3"), Just("0.5")];
    let unit = prop_oneof![
        Just(vec![]),
        Just(vec!["bar", "abs"]),
        Just(vec!["m³"]),
        Just(vec!["kJ/(kg·K)"]),
        Just(vec!["%"]),
        Just(vec!["°C"]),
        Just(vec!["1/K"]),
        Just(vec!["min"]),
        Just(vec!["bar", "gauge", "exact"]),
    ];
    (number, unit).prop_map(|(number, unit)| std::iter::once(number).chain(unit).map(str::to_owned).collect())
}

/// The tokens of an expression; blanks may stand between any two.
fn expression() -> impl Strategy<Value = Vec<String>> {
    let leaf = prop_oneof![quantity(), name().prop_map(|name| vec![name]), Just(vec!["cold.p".to_owned()]), Just(vec!["pi".to_owned()])];
    leaf.prop_recursive(4, 40, 3, |inner| {
        let operator = prop_oneof![Just("+"), Just("-"), Just("*"), Just("/"), Just("×"), Just("−")];
        prop_oneof![
            (inner.clone(), operator, inner.clone()).prop_map(|(left, operator, right)| [left, vec![operator.to_owned()], right].concat()),
            inner.clone().prop_map(|inner| [vec!["(".to_owned()], inner, vec![")".to_owned()]].concat()),
            (name(), inner.clone()).prop_map(|(name, inner)| [
                vec![name, "^".to_owned(), "-".to_owned(), "(".to_owned()],
                inner,
                vec![")".to_owned()]
            ]
            .concat()),
            inner.clone().prop_map(|inner| [vec!["sqrt".to_owned(), "(".to_owned()], inner, vec![")".to_owned()]].concat()),
            (inner.clone(), inner.clone()).prop_map(|(a, b)| [
                vec!["max".to_owned(), "(".to_owned()],
                a,
                vec![",".to_owned()],
                b,
                vec![")".to_owned()]
            ]
            .concat()),
            inner.prop_map(|inner| [vec!["-".to_owned()], inner].concat()),
        ]
    })
}

fn words(text: &str) -> Vec<String> {
    text.split(' ').map(str::to_owned).collect()
}

/// The tokens of a statement that can be read.
fn statement() -> impl Strategy<Value = Vec<String>> {
    let body = prop_oneof![
        (name(), quantity()).prop_map(|(name, value)| [vec!["given".to_owned(), name, "=".to_owned()], value].concat()),
        (name(), expression()).prop_map(|(name, value)| [vec!["let".to_owned(), name, "=".to_owned()], value, words("in kg/h")].concat()),
        (expression(), expression())
            .prop_map(|(left, right)| [vec!["q".to_owned(), "+".to_owned()], left, vec!["=".to_owned()], right].concat()),
        (expression(), expression()).prop_map(|(left, right)| {
            [words("require not"), left, vec![">=".to_owned()], right.clone(), words("and x <"), right, vec!["\"needed\"".to_owned()]]
                .concat()
        }),
        expression().prop_map(|value| [words("state s of n2 at p = 2 bar abs , T ="), value].concat()),
        expression().prop_map(|value| [words("unknown y in m within .."), value, words("near 3 m")].concat()),
        Just(words("given z = -8.0 degC ± 1.5 K k=2 dof=9")),
        Just(words("gas air = 0.79 nitrogen + 21 % oxygen by volume , ideal")),
        Just(words("site altitude = 12 m ± 1 m")),
        Just(words("answer cold.p in bar gauge figures 4 , m")),
        Just(words("correlate a , b -0.5")),
        Just(vec!["assume".to_owned(), "\"nothing leaks\"".to_owned(), "because".to_owned(), "\"it is tight\"".to_owned()]),
    ];
    let tail = prop_oneof![
        3 => Just(vec![]),
        1 => Just(vec!["from".to_owned(), "\"Plate, row 4\"".to_owned()]),
        1 => Just(vec!["because".to_owned(), "\"a \\\"reason\\\" # 3\"".to_owned()]),
    ];
    // A reason that stands there already would be a second one.
    (body, tail).prop_map(|(body, tail)| if body.contains(&"because".to_owned()) { body } else { [body, tail].concat() })
}

/// A sheet of statements that can be read, laid out anyhow.
fn sheet() -> impl Strategy<Value = String> {
    let other = prop_oneof![
        Just("> Prose {cold.p  in °C} and }} {{ so on\n".to_owned()),
        Just(">\n> - item\n".to_owned()),
        Just("# a comment\n".to_owned()),
        Just("\n".to_owned()),
        Just("\n\n\n".to_owned()),
        Just("section  Vessel  as \"filled # in\" # c\n".to_owned()),
        Just("caution when x > 3 \"mind the\n   gap\" # said\r\n".to_owned()),
    ];
    let line = (statement(), proptest::collection::vec(gap(), 60), any::<bool>()).prop_map(|(tokens, gaps, comment)| {
        let mut line = String::new();
        for (index, token) in tokens.iter().enumerate() {
            // A name touches the bracket behind it, or it would be no function.
            if index > 0 {
                line.push_str(if token == "(" && tokens[index - 1].chars().all(char::is_alphanumeric) {
                    ""
                } else {
                    gaps[index % gaps.len()]
                });
            }
            line.push_str(token);
        }
        line + if comment { "  # trailing\n" } else { "\n" }
    });
    let head = prop_oneof![Just(""), Just("---\ntitle:  Receiver\nrevision: 03\n---\n"), Just("---\r\nfigures: 5\r\n---\r\n\r\n")];
    (head, proptest::collection::vec(prop_oneof![3 => line, 1 => other], 0..12)).prop_map(|(head, lines)| head.to_owned() + &lines.concat())
}

/// The tree without places, as text.
fn shape(tree: &Tree) -> String {
    let names = (0..).map_while(|index| (index < tree.expressions.len()).then_some(index)).count();
    let whole = format!("{:?} {:?} {names} {:?}", tree.head, tree.statements, tree.expressions);
    let mut out = String::new();
    let mut rest = whole.as_str();
    while let Some(at) = rest.find("Span {") {
        out.push_str(&rest[..at]);
        rest = rest[at..].find('}').map_or("", |end| &rest[at + end + 1..]);
    }
    out + rest
}

fn canonical_lines(tree: &Tree, text: &str) -> Vec<String> {
    tree.statements.iter().map(|statement| canonical(tree, text, statement)).collect()
}

fn errors(findings: &[Diagnostic]) -> Vec<&str> {
    findings.iter().map(|finding| finding.code).collect()
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 400, failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn no_text_makes_the_reader_fail(text in scraps()) {
        let (tree, findings) = parse(&text);
        let index = LineIndex::new(&text);
        for finding in &findings {
            let (start, end) = (finding.span.start as usize, finding.span.end as usize);
            prop_assert!(start <= end && end <= text.len(), "{finding:?}");
            prop_assert!(text.is_char_boundary(start) && text.is_char_boundary(end), "{finding:?}");
            prop_assert!(index.place(&text, finding.span.start).line >= 1);
            prop_assert!(!finding.message.is_empty() && finding.message.len() < 400, "{finding:?}");
        }
        for statement in &tree.statements {
            prop_assert!(!canonical(&tree, &text, statement).contains('\n'));
        }
        let bad = tree.statements.iter().any(|statement| matches!(statement.kind, StatementKind::Bad { .. }));
        prop_assert!(!bad || findings.iter().any(Diagnostic::is_error), "a bad statement without a finding");
        if let Ok(once) = tidy(&text) {
            prop_assert_eq!(tidy(&once), Ok(once.clone()));
            let (again, none) = parse(&once);
            prop_assert_eq!(errors(&none), Vec::<&str>::new());
            prop_assert_eq!(shape(&again), shape(&tree));
        }
    }

    #[test]
    fn any_characters_at_all_are_read(text in "\\PC{0,80}|[\\x00-\\x7F]{0,80}") {
        let (_, findings) = parse(&text);
        prop_assert!(findings.iter().all(|finding| text.is_char_boundary(finding.span.start as usize)));
    }

    #[test]
    fn laying_out_changes_nothing_but_the_layout(text in sheet()) {
        let (tree, findings) = parse(&text);
        prop_assert_eq!(errors(&findings), Vec::<&str>::new());
        let once = tidy(&text).expect("the sheet can be read");
        let (again, none) = parse(&once);
        prop_assert_eq!(errors(&none), Vec::<&str>::new(), "{}", &once);
        prop_assert_eq!(canonical_lines(&again, &once), canonical_lines(&tree, &text));
        prop_assert_eq!(shape(&again), shape(&tree), "{}", &once);
        prop_assert_eq!(again.comments.len(), tree.comments.len());
        prop_assert_eq!(tidy(&once), Ok(once.clone()));
    }

    #[test]
    fn the_canonical_text_of_a_statement_reads_as_itself(text in sheet()) {
        let (tree, _) = parse(&text);
        for statement in &tree.statements {
            let line = canonical(&tree, &text, statement);
            let (again, findings) = parse(&line);
            prop_assert_eq!(errors(&findings), Vec::<&str>::new(), "{}", &line);
            if !matches!(statement.kind, StatementKind::Prose { .. }) {
                prop_assert_eq!(canonical_lines(&again, &line), vec![line.clone()]);
            }
        }
    }
}

fn first(text: &str) -> (Statement, Vec<(&'static str, String)>) {
    let (tree, findings) = parse(text);
    let found = findings.iter().map(|finding| (finding.code, finding.span.of(text).to_owned())).collect();
    (tree.statements[0].clone(), found)
}

#[test]
fn each_slip_is_named_where_it_stands() {
    let slips = [
        ("giben T_1 = 20.0 degC", "unknown-statement", "giben"),
        ("requier m > 1.0 kg \"x\"", "unknown-statement", "requier"),
        ("The receiver is filled.", "bad-line", "The"),
        ("given V = 2,40 m3", "decimal-comma", "2,40"),
        ("state a of g at T = 288,15 K, p = 1 bar abs", "decimal-comma", "288,15"),
        ("given x = .5", "missing-digit", ".5"),
        ("given x = 5. m", "missing-digit", "5."),
        ("given a = 9.81 m / s2", "unit-with-blanks", "/ s2"),
        ("given c = 1.2 kJ/(kg K)", "unit-with-blanks", "/(kg K)"),
        ("let v = a in m / s", "unit-with-blanks", "/ s"),
        ("let A = 2 m^2", "unit-power", "2 m^2"),
        ("given A = 2 m^2", "unit-power", "m^2"),
        ("let A == 2", "foreign-sign", "=="),
        ("let A = x ** 2", "foreign-sign", "**"),
        ("let A = x²", "foreign-sign", "²"),
        ("a = b = c", "wrong-equals", "="),
        ("a + b", "wrong-equals", "b"),
        ("given V_2 2.3 m3", "missing-equals", "2.3"),
        ("given V = 3 m3 \"Volume", "unclosed-text", "\"Volume"),
        ("given V = 3 m3 \"Volume from \"Plate\"", "unclosed-text", "\"Volume"),
        ("let A = (V / 2.0 m", "unbalanced-bracket", "("),
        ("let A = V)", "unbalanced-bracket", ")"),
        ("given b = 2 * a", "given-expression", "2 * a"),
        ("given answer = 3.90 kg", "reserved-name", "answer"),
        ("let site = 2 * V", "reserved-name", "site"),
        ("let x = 2 * answer", "reserved-name", "answer"),
        ("given V = 3 m3 \"a\" \"b\"", "said-twice", "\"b\""),
        ("given V = 3 m3 from Plate", "text-without-quotes", "Plate"),
        ("given V = 3 m3 'Volume'", "wrong-quote", "'"),
        ("given d = 6 in \"Bore\"", "inch-word", "in"),
        ("given d = 80.0mm", "missing-blank", "80.0mm"),
        ("let x = 2 (a + b)", "missing-operator", "2 ("),
        ("let x = a (b + c)", "missing-operator", "a (b + c)"),
        ("let b = 2 m ± 3 m", "misplaced-uncertainty", "±"),
        ("require 1 < a < 2 \"x\"", "chained-comparison", "<"),
        ("require a > b", "missing-text", "require"),
        ("let x = sqrt(a, b)", "argument-count", "sqrt(a, b)"),
        ("let x = if a > b then 2 else 3", "word-not-offered", "if"),
        ("let x = integral(a, y from 0 to 1)", "word-not-offered", "integral"),
        ("cases bank\n  V | T\n  2 m3 | 3 K\n", "word-not-offered", "cases"),
        ("site altitud = 12 m", "unknown-word", "altitud"),
        ("given V = 3 m3 \"a\" form \"b\"", "unknown-word", "form"),
        ("> holds {V / 2}", "bad-live-value", "{V / 2}"),
        ("let x = a +", "bad-line", "+"),
        ("let x\u{202E} = a", "hidden-character", "\u{202E}"),
    ];
    for (text, code, place) in slips {
        let found = first(text).1;
        assert_eq!(found, [(code, place.to_owned())], "{text}");
    }
}

#[test]
fn a_bad_line_hides_neither_its_name_nor_the_lines_around_it() {
    let text = "giben T_1 = 20 degC\ngiven V_2 2.3 m3\nlet A = (V /\n2 m\ngiven p = 3 bar abs\n";
    let (tree, findings) = parse(text);
    assert_eq!(errors(&findings), ["unknown-statement", "missing-equals", "unbalanced-bracket"]);
    let declared: Vec<Option<&str>> = tree
        .statements
        .iter()
        .map(|statement| match &statement.kind {
            StatementKind::Bad { declares } => declares.map(|named| tree.names.text(named.name)),
            StatementKind::Given { name, .. } => Some(tree.names.text(name.name)),
            _ => None,
        })
        .collect();
    assert_eq!(declared, [Some("T_1"), Some("V_2"), Some("A"), Some("p")]);
}

#[test]
fn safe_edits_cure_what_they_are_offered_for() {
    for text in [
        "giben x = 3\n",
        "given V = 2,40 m3\n",
        "given x = .5\n",
        "given a = 9.81 m / s2\n",
        "let A == 2\n",
        "given V 3 m3\n",
        "given A = 2 m^2\n",
    ] {
        let (_, findings) = parse(text);
        let edit = findings[0].edit.as_ref().expect("an edit");
        assert!(edit.safe, "{text}");
        let mut cured = text.to_owned();
        cured.replace_range(edit.span.start as usize..edit.span.end as usize, &edit.replacement);
        assert_eq!(errors(&parse(&cured).1), Vec::<&str>::new(), "{cured}");
    }
}

#[test]
fn what_is_too_large_or_too_deep_is_refused_with_a_place() {
    let brackets = format!("given V = 3 m3\nlet x = {}V{}\nanswer V\n", "(".repeat(10_000), ")".repeat(10_000));
    let unit = format!("given k = 3.20 {}s{} \"Constant\"\n", "kg/(".repeat(10_000), ")".repeat(10_000));
    let sum = format!("let x = V{}\n", " + V".repeat(limits::MOST_OPERATORS + 1));
    let powers = format!("let x = {}2\n", "2^".repeat(limits::MOST_OPERATORS + 1));
    let signs = format!("let x = {}2\n", "-".repeat(limits::MOST_OPERATORS + 1));
    let nots = format!("require {}a > b \"x\"\n", "not ".repeat(limits::MOST_OPERATORS + 1));
    let long = format!("given V = 3 m3 \"{}\"\nanswer V\n", "x".repeat(limits::LONGEST_LINE));
    let statements = "answer V\n".repeat(limits::MOST_STATEMENTS + 1);
    let comments = "#\n".repeat(limits::MOST_COMMENTS + 1);
    for (text, code) in [
        (brackets, "too-deep"),
        (unit, "too-deep"),
        (sum, "too-deep"),
        (powers, "too-deep"),
        (signs, "too-deep"),
        (nots, "too-deep"),
        (long, "too-long"),
        (statements, "too-many"),
        (comments, "too-many"),
    ] {
        let (_, findings) = parse(&text);
        assert_eq!(errors(&findings), [code]);
        assert!(findings[0].message.len() < 200);
    }
}

#[test]
fn what_is_just_within_the_limits_is_read() {
    let nested = |inner: &str| format!("{}{inner}{}", "(".repeat(limits::DEEPEST_BRACKETS), ")".repeat(limits::DEEPEST_BRACKETS));
    let unit = format!("{}s{}", "kg/(".repeat(limits::DEEPEST_BRACKETS), ")".repeat(limits::DEEPEST_BRACKETS));
    let text = format!(
        "let x = {}\nrequire {} \"x\"\nrequire {} < 3 \"x\"\ngiven k = 3 {unit}\nlet y = V{}\n",
        nested("V"),
        nested("V > 2"),
        nested("V"),
        " + V".repeat(limits::MOST_OPERATORS),
    );
    let (tree, findings) = parse(&text);
    assert_eq!(errors(&findings), Vec::<&str>::new());
    assert_eq!(tree.statements.len(), 5);
    assert!(tidy(&text).is_ok());
}

#[test]
fn errors_beyond_the_limit_are_counted() {
    let text = "answer =\n".repeat(limits::MOST_ERRORS + 500);
    let (tree, findings) = parse(&text);
    assert_eq!(tree.statements.len(), limits::MOST_ERRORS + 500);
    assert_eq!(findings.len(), limits::MOST_ERRORS + 1);
    let last = &findings[limits::MOST_ERRORS];
    assert_eq!(last.code, "too-many-errors");
    assert!(last.message.starts_with("500 more errors"), "{}", last.message);
}

#[test]
fn bytes_are_utf8_and_a_byte_order_mark_is_no_text() {
    assert_eq!(decode(b"\xEF\xBB\xBFanswer V").ok(), Some("answer V"));
    let finding = decode(b"given V = 3 m3\nanswer \xE4\n").expect_err("no UTF-8");
    assert_eq!(finding.code, "not-utf8");
    assert!(finding.message.contains("UTF-8") && finding.message.contains("line 2"), "{}", finding.message);
    let shown = String::from_utf8_lossy(b"given V = 3 m3\nanswer \xE4\n").into_owned();
    assert_eq!(LineIndex::new(&shown).place(&shown, finding.span.start).line, 2);
}
