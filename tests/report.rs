//! The report, the result object and the text table of whole sheets.

use std::collections::BTreeMap;

use gaswright::Solved;
use gaswright::report::{Format, Input, SCHEMA, Templates, built_in_templates, report, result, table};
use serde_json::Value;

/// Nitrogen in a buffer vessel that cools overnight: every part of a report has something to say.
const BUFFER: &str = include_str!("reference/report/buffer.gw");

/// Markup and template text in every place where a sheet may hold text of its own.
const MARKUP: &str = r##"---
title: "Receiver <script>alert(1)</script> {{ 7*191 }}"
document: "<script>alert(2)</script> \"};</style> {{ 7*191 }}"
revision: "*B* | `x` $y$"
purpose: "<b>bold</b> {% for x in y %} [a](javascript:alert(3))"
---
section Vessel <script>alert(4)</script> # {{ 7*191 }}

> Raw <script>alert('prose')</script> and <b>bold</b>, ![x](http://example.org/x.png) [y](javascript:alert(5)).
> <!-- answers -->
>
> ```
> left open

given V = 3.20 m3 "Volume | <script>alert(6)</script> $x$" from "Plate <img src=x onerror=alert(7)> **b**"
require V >= 3.00 m3 "Large enough <script>alert(8)</script> {{ 7*191 }}"
assume "Rigid </section> <!-- /answers -->" because "<i>because</i> {% raw %}"
caution "Oxygen <a id=\"x\"></a> {{ 7*191 }}"
answer V
"##;

/// Two unknowns that only hold together, a surplus relation, a requirement that fails, reference volumes.
const BLOCK: &str = r#"
section Junction
reference normal at 0 degC, 101.325 kPa abs "Of the supply contract" from "Contract, annex 2"
given q = 60.0 kg/h ± 2 % "Flow of both branches" from "FI-4"
given r = 1.50 "Ratio of the branches" from "Drawing 12"
given M = 28.0 g/mol "Molar mass" from "Data sheet"
unknown a in kg/h "Flow of branch a"
unknown b in kg/h "Flow of branch b"
unknown x within 1 .. 2 "Root of a cubic"
a + b = q "Balance of the junction"
a = r * b
x^3 - x = 2.00 "Cubic"
a^2 - b^2 = q * (a - b) "Follows from the balance"
let n = a / M in Nm3/h "Branch a at reference conditions"
require a >= 40.0 kg/h and b >= 20.0 kg/h "Enough for both halls"
answer a, b, x, n
"#;

/// The same argon ideal and real, humid air, a saturation pressure, a viscosity: what a report says of models.
const MODELS: &str = r#"
gas ar_i = argon
gas ar   = argon, real
gas co2  = carbon dioxide
gas air  = humid air
given p = 200 bar abs "Cylinder" from "PI-1"
given T = 20.0 degC "Yard" from "TI-1"
given RH = 60.0 % "Yard" from "MI-1"
given p_y = 1.013 bar abs "Yard" from "Barometer"
state ideal of ar_i at p = p, T = T "As an ideal gas"
state low   of ar_i at p = p_y, T = T "Let down"
state full  of ar   at p = p, T = T "As it is"
state yard  of air  at p = p_y, T = T, RH = RH "Air of the yard"
let eta = full.mu in uPa.s "Viscosity"
let w   = ideal.w in m/s "Speed of sound"
let h   = full.h - low.h in kJ/kg "Enthalpy"
let m   = ar.M in g/mol "Molar mass"
let p_l = co2.p_sat(T) in bar abs "Over the liquid"
answer ideal.rho, full.rho, yard.rho, eta, w, h, m, p_l, yard.T_dew
"#;

fn with<T>(text: &str, make: impl FnOnce(&Input) -> T) -> T {
    let Solved { tree, sheet, solution, findings, .. } = &gaswright::solve(text);
    make(&Input { path: "sheet.gw", text, tree, sheet, solution: solution.as_ref(), findings })
}

fn rendered(text: &str, format: Format) -> String {
    with(text, |input| {
        assert!(input.solution.is_some(), "{:?}", input.findings);
        report(input, format, &Templates::built_in()).expect("the templates that ship are in order")
    })
}

/// The words of a page, without what stands in its head and its style sheet.
fn words(html: &str) -> String {
    let body = &html[html.find("<body>").expect("a page has a body")..];
    let mut text = String::new();
    let mut inside = false;
    for character in body.chars() {
        match character {
            '<' => inside = true,
            '>' if inside => inside = false,
            other if !inside => text.push(other),
            _ => {}
        }
    }
    let text = text.replace("&lt;", "<").replace("&gt;", ">").replace("&quot;", "\"").replace("&#39;", "'").replace("&amp;", "&");
    text.split_whitespace().collect::<Vec<_>>().join(" ")
}

fn assert_in_order(text: &str, parts: &[&str]) {
    let mut from = 0;
    for part in parts {
        let at = text[from..].find(part).unwrap_or_else(|| panic!("{part:?} does not stand where it should in:\n{text}"));
        from += at + part.len();
    }
}

#[test]
fn the_parts_stand_in_their_order_in_both_forms() {
    let parts = [
        "Nitrogen buffer vessel",
        "28.2 kg",
        "Packing line needs 7.5 bar",
        "Given",
        "PI-31, class 1.0",
        "Assumptions",
        "Leak test certificate",
        "Working",
        "Vessel as filled",
        "isolated, and left to cool. It then holds 28.2 kg.",
        "Nitrogen held",
        "Coldest night",
        "States",
        "Cautions",
        "Nitrogen displaces air",
        "Local codes and licensed practice decide",
        "Independent checks",
        "The sheet",
        "state full of n2 at p = p_1, T = T_1",
        "Computed by gaswright",
    ];
    let plain = |text: String| text.replace(['\u{a0}', '\u{202f}'], " ");
    assert_in_order(&plain(words(&rendered(BUFFER, Format::Html))), &parts);
    assert_in_order(&plain(rendered(BUFFER, Format::Markdown)), &parts);
}

#[test]
fn the_markdown_of_the_buffer_vessel_is_as_it_was_read_and_found_good() {
    let expected = include_str!("reference/report/buffer.md");
    let digest = with(BUFFER, |input| input.digest());
    let short: String =
        digest[7..19].chars().enumerate().map(|(at, c)| if at > 0 && at % 4 == 0 { format!(" {c}") } else { c.to_string() }).collect();
    let written = rendered(BUFFER, Format::Markdown);
    let written = written.replace(&digest, "sha256:DIGEST").replace(&short, "DIGEST").replace(env!("CARGO_PKG_VERSION"), "VERSION");
    for (number, (written, expected)) in written.lines().zip(expected.lines()).enumerate() {
        assert_eq!(written, expected, "line {}", number + 1);
    }
    assert_eq!(written.lines().count(), expected.lines().count());
}

#[test]
fn nothing_of_a_sheet_runs_or_expands() {
    let html = rendered(MARKUP, Format::Html);
    for forbidden in
        ["<script", "<b>", "<i>because", "<img", "onerror=alert(7)>", "1337", "href=\"javascript", "src=\"http", "\"};</style>"]
    {
        assert!(!html.contains(forbidden), "{forbidden}");
    }
    // The one style sheet ends once, and the blocks of the layout are those of the template.
    assert_eq!((html.matches("</style>").count(), html.matches("class=\"answers\"").count()), (1, 1));
    let words = words(&html);
    for shown in [
        "Receiver <script>alert(1)</script> {{ 7*191 }}",
        "<script>alert(2)</script> \"};</style> {{ 7*191 }}",
        "*B* | `x` $y$",
        "<b>bold</b> {% for x in y %} [a](javascript:alert(3))",
        "Vessel <script>alert(4)</script>",
        "Raw <script>alert('prose')</script> and <b>bold</b>, [x] y.",
        "<!-- answers -->",
        "left open",
        "Volume | <script>alert(6)</script> $x$",
        "Plate <img src=x onerror=alert(7)> **b**",
        "Large enough <script>alert(8)</script> {{ 7*191 }}",
        "Rigid </section> <!-- /answers -->",
        "<i>because</i> {% raw %}",
        "Oxygen <a id=\"x\"></a> {{ 7*191 }}",
    ] {
        assert!(words.contains(shown), "{shown}\n{words}");
    }
    assert_in_order(&words, &["left open", "Cautions", "Independent checks", "The sheet"]);
    let markdown = rendered(MARKUP, Format::Markdown);
    let listing = markdown.find("## The sheet").expect("the sheet is listed");
    assert!(!markdown[..listing].contains("<script") && !markdown[..listing].contains("<img"), "{markdown}");
}

#[test]
fn a_page_stands_on_its_own() {
    let html = rendered(BUFFER, Format::Html);
    for needed in ["<!doctype html>", "charset", "viewport", "<math", "@media print", "@page", "data:font/woff2;base64,", "<svg"] {
        assert!(html.contains(needed), "{needed}");
    }
    for loaded in ["src=\"http", "@import", "url(http", "<link", "<script", "src=\"//"] {
        assert!(!html.contains(loaded), "{loaded}");
    }
    let digest = with(BUFFER, |input| input.digest());
    assert!(html.contains(&digest));
}

#[test]
fn every_link_leads_somewhere() {
    for text in [BUFFER, BLOCK, MODELS] {
        let html = rendered(text, Format::Html);
        let mut links = 0;
        for link in html.split("href=\"#").skip(1) {
            let target = &link[..link.find('"').expect("an attribute ends")];
            assert_eq!(html.matches(&format!("id=\"{target}\"")).count(), 1, "{target}");
            links += 1;
        }
        assert!(links > 10);
        let markdown = rendered(text, Format::Markdown);
        for link in markdown.split("](#").skip(1) {
            let target = &link[..link.find(')').expect("a link ends")];
            assert_eq!(markdown.matches(&format!("<a id=\"{target}\">")).count(), 1, "{target}");
        }
    }
}

#[test]
fn what_is_solved_together_says_so_and_a_failure_is_shown() {
    let words = words(&rendered(BLOCK, Format::Html)).replace(['\u{a0}', '\u{202f}'], " ");
    assert_in_order(
        &words,
        &[
            "36.0 kg/h",
            "Enough for both halls",
            "NOT MET",
            "Reference temperature of Nm³",
            "0 °C",
            "273.15 K",
            "largest scaled residual",
            "1.521",
            "One Nm³ is",
            "Surplus relation",
            "The sheet",
        ],
    );
}

#[test]
fn comments_are_left_out_of_the_listing_and_lines_keep_their_numbers() {
    let text = "# for the writers\ngiven V = 3.20 m3 \"Volume\" from \"Plate # 3\" # a secret\n\nanswer V # another\n";
    let markdown = rendered(text, Format::Markdown);
    let listing = &markdown[markdown.find("```text").expect("the sheet is listed")..];
    assert!(listing.starts_with("```text\n1\n2  given V = 3.20 m3 \"Volume\" from \"Plate # 3\"\n3\n4  answer V\n```"), "{listing}");
    assert!(!markdown.contains("secret") && !markdown.contains("for the writers"));
}

#[test]
fn live_values_are_rounded_as_answers_and_givens_stay_as_written() {
    let text = "> It holds {m}, at {T}, or {T in K}, in {N} cylinders; {m in g}.\n\n\
                given V = 2.50 m3 \"Volume\" from \"Plate\"\ngiven rho = 1.187 kg/m3 \"Density\" from \"Table\"\n\
                given T = -8.0 degC ± 1.5 K \"Night\" from \"Site\"\ngiven N = 12 exact \"Cylinders\" from \"Count\"\n\
                let m = N * V * rho in kg \"Mass\"\nanswer m figures 4, T\n";
    let words = words(&rendered(text, Format::Html)).replace(['\u{a0}', '\u{202f}'], " ");
    assert!(words.contains("It holds 35.61 kg, at −8.0 °C, or 265 K, in 12 cylinders; 35 610 g."), "{words}");
}

#[test]
fn results_follow_the_schema() {
    let schema: Value = serde_json::from_str(SCHEMA).expect("the schema is JSON");
    let validator = jsonschema::draft202012::new(&schema).expect("the schema is a schema");
    let broken = "given V = 3.20 m3\nlet m = V * rho\ngiben x = 2\nanswer m\n";
    for (text, status) in
        [(BUFFER, "solved"), (MODELS, "solved"), (BLOCK, "solved"), (MARKUP, "solved"), (broken, "failed"), ("", "solved")]
    {
        let object = with(text, |input| serde_json::to_value(result(input)).expect("the result is JSON"));
        let errors: Vec<String> = validator.iter_errors(&object).map(|error| format!("{error} at {}", error.instance_path())).collect();
        assert!(errors.is_empty(), "{errors:#?}");
        assert_eq!(object["status"], status);
    }
    // The schema does not allow just anything.
    assert!(!validator.is_valid(&serde_json::json!({ "status": "solved" })));
}

#[test]
fn the_margin_of_a_temperature_is_an_interval() {
    let text = "given T = 31.0 degC \"Gas\" from \"TI-30\"\nlet U = T + 3 K in degC \"Header\"\nrequire U < 40 degC \"Cool\"\nanswer U\n";
    let object = with(text, |input| serde_json::to_value(result(input)).expect("JSON"));
    let requirement = &object["requirements"][0];
    assert_eq!((&requirement["unit"], &requirement["margin_unit"]), (&Value::from("degC"), &Value::from("K")));
    let margin = requirement["margin"].as_f64().expect("a number");
    // Three roundings of numbers of 313.
    assert!((margin - 6.0).abs() < 1e-12, "{margin}");
}

#[test]
fn a_failed_sheet_has_findings_and_no_value() {
    let object = with("given V = 3.20 m3 \"Volume\" from \"Plate\"\nlet m = V * rho\nanswer m\n", |input| {
        serde_json::to_value(result(input)).expect("JSON")
    });
    assert_eq!(object["status"], "failed");
    assert_eq!(object["checks"], Value::Null);
    assert!(object["findings"].as_array().is_some_and(|findings| !findings.is_empty()));
    for quantity in object["quantities"].as_array().expect("a list") {
        assert_eq!((&quantity["value"], &quantity["si"]), (&Value::Null, &Value::Null));
    }
}

#[test]
fn the_result_holds_values_in_their_units_and_in_si() {
    let object = with(BUFFER, |input| serde_json::to_value(result(input)).expect("JSON"));
    let quantity = |name: &str| {
        object["quantities"].as_array().and_then(|all| all.iter().find(|one| one["name"] == name)).cloned().expect("it is there")
    };
    let filling = quantity("p_1");
    assert_eq!(
        (&filling["value"], &filling["unit"], &filling["origin"], &filling["figures"]),
        (&9.6.into(), &"bar gauge".into(), &"given".into(), &2.into())
    );
    // 9.6 bar above the ISO 2533 atmosphere at 12 m, 101 180.9 Pa.
    assert!((filling["si"].as_f64().expect("a number") - 1_061_180.9).abs() < 0.1);
    // Limits of 0.1 bar: a rectangular distribution, JCGM 100:2008, 4.3.7.
    let uncertainty = &filling["uncertainty"];
    assert_eq!(uncertainty["distribution"], "rectangular");
    assert!((uncertainty["standard"].as_f64().expect("a number") - 0.1 / 3f64.sqrt()).abs() < 1e-15);
    assert!((uncertainty["expanded"].as_f64().expect("a number") - 0.2 / 3f64.sqrt()).abs() < 1e-15);
    assert_eq!(quantity("V")["uncertainty"]["monte_carlo"], Value::Null);
    let mass = quantity("m");
    assert_eq!(
        (&mass["uncertainty"], &mass["origin"], &mass["steps"]["expression"]),
        (&Value::Null, &"solved".into(), &"V * full.rho".into())
    );
    assert_eq!(object["answers"][1]["text"], "8.24 bar gauge");
    assert_eq!(object["states"][0]["rules"]["a"], true);
    assert_eq!(object["requirements"][0]["met"], true);
    assert_eq!(object["assumptions"][0]["verdict"], "for judgement");
    assert_eq!(object["cautions"][0]["shown"], true);
}

/// The error that the verdict tells is that of the ideal state beside the real one of the same sheet.
#[test]
fn the_result_tells_models_and_errors() {
    let object = with(MODELS, |input| serde_json::to_value(result(input)).expect("JSON"));
    let state = |name: &str| {
        object["states"].as_array().and_then(|all| all.iter().find(|one| one["name"] == name)).cloned().expect("the state is there")
    };
    let (ideal, low, full, yard) = (state("ideal"), state("low"), state("full"), state("yard"));
    let number = |value: &Value| value.as_f64().expect("a number");
    let error = 100.0 * (number(&ideal["properties"]["rho"]) / number(&full["properties"]["rho"]) - 1.0);
    let errors = &ideal["ideal_errors"];
    // The two molar masses and gas constants differ by some parts in a million.
    assert!((number(&errors["density_percent"]) - error).abs() < 0.01, "{errors} {error}");
    assert_eq!((&ideal["ideal_error_percent"], &ideal["verdict"]), (&errors["density_percent"], &"failed".into()));
    assert!(number(&errors["w_percent"]) < -5.0 && number(&errors["h_difference"]) > 0.0, "{errors}");
    assert_eq!((&errors["judge"], &errors["limit_percent"]), (&"reference equation of state".into(), &1.0.into()));
    assert!(errors["judge_source"].as_str().is_some_and(|source| source.starts_with("Tegeler")), "{errors}");
    assert_eq!((&low["verdict"], &low["model_kind"]), (&"confirmed".into(), &"ideal gas law".into()));
    assert_eq!((&full["model"], &full["model_kind"]), (&"real".into(), &"reference equation of state".into()));
    assert_eq!((&full["ideal_errors"], &full["verdict"], &full["extrapolated"]), (&Value::Null, &Value::Null, &false.into()));
    assert_eq!((&yard["gas"], &yard["model_kind"]), (&"humid air".into(), &"CIPM-2007".into()));
}

#[test]
fn a_report_says_by_what_each_gas_was_calculated() {
    let html = rendered(MODELS, Format::Html);
    // Failed and confirmed have marks of their own, and the line of the limit is drawn.
    assert!(html.contains("<polygon") && html.contains("<circle") && html.contains("<polyline"));
    let words = words(&html).replace(['\u{a0}', '\u{202f}'], " ");
    assert_in_order(
        &words,
        &[
            "Argon is an ideal gas",
            "FAILED",
            "that of the reference equation of state: Tegeler",
            "largest error of the ideal law, by the reference equation of state: in density",
            "in speed of sound",
            "common practice:",
            "Error of the ideal gas law for argon",
            "Judged by the reference equation of state: Tegeler",
            "Density and speed of sound decide",
            "Rules of common practice, no source",
            "first reaches 1 %",
            "State full by the reference equation of state for argon (source under States)",
            "Saturation of carbon dioxide by its reference equation of state (Span, Wagner 1996",
            "Model of argon: ideal gas.",
            "zero for the ideal gas at 298.15 K and 100 kPa",
            "Model of argon: reference equation of state (Tegeler",
            "published for 83.806 K to 700 K, up to 1 000 MPa",
            "stated uncertainty: density 0.02 % up to 12 MPa",
            "Gas constant and molar mass are its own",
            "zero for the ideal gas at 298.15 K and 100 kPa",
            "No ideal-gas assumption. Reduced pressure and temperature: full 4.11 and 1.95.",
            "Viscosity by the correlation of",
            "Density at yard by CIPM-2007",
        ],
    );
}

#[test]
fn the_table_is_plain_text_of_bounded_width() {
    let text = with(BUFFER, table);
    assert_in_order(
        &text,
        &[
            "answers",
            "m ",
            "28.2 kg",
            "cold.p",
            "8.24 bar gauge",
            "requirements",
            "met",
            "above",
            "assumptions",
            "confirmed",
            "for judgement",
            "checks:",
        ],
    );
    assert!(text.lines().all(|line| line.chars().count() <= 100), "{text}");
    assert!(text.chars().all(|c| c == '\n' || !c.is_control()));
    assert_eq!(with("let m = rho\n", table), "");
}

#[test]
fn a_user_may_replace_templates_one_by_one() {
    let files = BTreeMap::from([
        ("report.md".to_owned(), "# {{ head.title }}\n\n{% include \"foot.md\" %}".to_owned()),
        ("foot.md".to_owned(), "*ours*".to_owned()),
    ]);
    let templates = Templates::from_files(files);
    with(BUFFER, |input| {
        let markdown = report(input, Format::Markdown, &templates).expect("it is in order");
        assert_eq!(markdown, "# Nitrogen buffer vessel for the packing hall\n\n*ours*");
        let html = report(input, Format::Html, &templates).expect("the other templates ship");
        assert!(html.contains("<em>ours</em>") && html.contains("@page"));
    });
    let broken = Templates::from_files(BTreeMap::from([("report.md".to_owned(), "a\n{{ answers.nothing }}".to_owned())]));
    let error = with(BUFFER, |input| report(input, Format::Html, &broken).expect_err("nothing of that name"));
    assert_eq!((error.template.as_str(), error.line), ("report.md", Some(2)));
    assert_eq!(built_in_templates().count(), 3);
}

#[test]
fn the_same_sheet_gives_the_same_report() {
    assert_eq!(rendered(BUFFER, Format::Html), rendered(BUFFER, Format::Html));
}
