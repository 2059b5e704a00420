//! `gaswright explain`: the page of a code.

use clap::{Arg, ArgMatches, Command};

use crate::cli::ExitCode;
use crate::cli::column::{Column, aligned};
use crate::cli::console::Console;
use crate::diagnostic::{code, nearest};

/// How the arguments are read.
pub(in crate::cli) fn command() -> Command {
    Command::new("explain")
        .about("Explain the code of a finding: what is wrong, why it matters, an example and its cure; without CODE all are listed")
        .arg(Arg::new("code").value_name("CODE").help("The code, as it stands in brackets behind the severity"))
}

/// Writes the list or the page.
pub(in crate::cli) fn run(matches: &ArgMatches, console: &mut Console) -> ExitCode {
    let Some(wanted) = matches.get_one::<String>("code") else {
        console.result(&aligned(
            &[Column::Text, Column::Text],
            code::ALL.iter().map(|page| vec![page.code.to_owned(), title(page.text).to_owned()]),
        ));
        return ExitCode::Success;
    };
    let plain = wanted.trim_start_matches("error[").trim_start_matches("warning[").trim_start_matches("note[").trim_end_matches(']');
    if let Some(page) = code::page(plain) {
        console.result(&shown(page));
        return ExitCode::Success;
    }
    match &nearest(plain, code::ALL.iter().map(|page| page.code))[..] {
        [] => console.wrong(&format!("`{wanted}` is no code; `gaswright explain` lists them")),
        near => console.wrong(&format!("`{wanted}` is no code; near: {}", near.join(", "))),
    }
}

/// The title of a page.
fn title(text: &str) -> &str {
    text.lines().find_map(|line| line.strip_prefix("# ")).unwrap_or_default()
}

/// The page for reading: its code, its text, sheets indented.
fn shown(page: &code::Page) -> String {
    let mut shown = format!("{}: {}\n", page.code, title(page.text));
    let mut in_sheet = false;
    let mut had_title = false;
    for line in page.text.trim().lines() {
        if let Some(mark) = line.strip_prefix("```") {
            in_sheet = !in_sheet;
            if mark.trim() == "gw cured" {
                shown.push_str("    # cured\n");
            }
        } else if !had_title && line.starts_with("# ") {
            had_title = true;
        } else if in_sheet && !line.is_empty() {
            shown.push_str("    ");
            shown.push_str(line);
            shown.push('\n');
        } else {
            shown.push_str(line);
            shown.push('\n');
        }
    }
    shown
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_code_has_a_title_and_a_page_that_shows_its_sheets() {
        for page in code::ALL {
            assert!(!title(page.text).is_empty(), "{}", page.code);
            let shown = shown(page);
            assert!(shown.starts_with(page.code) && !shown.contains("```"), "{shown}");
            assert!(shown.split_whitespace().count() >= 25, "{shown}");
        }
    }
}
