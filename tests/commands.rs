//! Runs of the program: exit statuses, streams, files, wrong use. What a sheet means is tested elsewhere.

use std::fs;
use std::io::{Read, Write};
use std::path::{Path, PathBuf};
use std::process::{Command, Stdio};
use std::sync::atomic::{AtomicU32, Ordering};

use serde_json::Value;

/// A sheet that solves without a finding.
const GOOD: &str = "\
given V = 3.20 m3 \"Volume\" from \"Plate\"
given m = 3.90 kg \"Mass\" from \"Scale\"
let rho = m / V in kg/m3
answer rho
";

/// A sheet with an error on line 2.
const BAD: &str = "\
given V = 3.20 m3 \"Volume\" from \"Plate\"
given m = 3.90 kgg \"Mass\" from \"Scale\"
answer V
";

/// A sheet whose requirement fails.
const FAILS: &str = "\
given m = 3.90 kg \"Mass\" from \"Scale\"
require m >= 4.00 kg \"Enough for a shift\"
answer m
";

/// A folder of its own for one test, gone afterwards.
struct Folder(PathBuf);

/// What a run of the program gave.
struct Run {
    status: i32,
    results: String,
    notes: String,
}

impl Folder {
    fn new() -> Self {
        static COUNT: AtomicU32 = AtomicU32::new(0);
        let name = format!("gaswright-commands-{}-{}", std::process::id(), COUNT.fetch_add(1, Ordering::Relaxed));
        let folder = std::env::temp_dir().join(name);
        fs::create_dir_all(&folder).expect("a folder can be made");
        Self(folder)
    }

    /// With the three sheets above.
    fn with_sheets() -> Self {
        let folder = Self::new();
        for (name, text) in [("good.gw", GOOD), ("bad.gw", BAD), ("fails.gw", FAILS)] {
            folder.write(name, text);
        }
        folder
    }

    fn write(&self, name: &str, text: impl AsRef<[u8]>) {
        fs::write(self.0.join(name), text).expect("a file can be written");
    }

    fn read(&self, name: &str) -> String {
        fs::read_to_string(self.0.join(name)).expect("the file is there")
    }

    fn has(&self, name: &str) -> bool {
        self.0.join(name).exists()
    }

    fn command(&self, arguments: &[&str]) -> Command {
        let mut command = Command::new(env!("CARGO_BIN_EXE_gaswright"));
        command.args(arguments).current_dir(&self.0).env_remove("NO_COLOR").stdin(Stdio::null());
        command
    }

    fn run(&self, arguments: &[&str]) -> Run {
        Run::of(self.command(arguments).output().expect("the program starts"))
    }

    fn run_with_input(&self, arguments: &[&str], input: &str) -> Run {
        let mut child = self
            .command(arguments)
            .stdin(Stdio::piped())
            .stdout(Stdio::piped())
            .stderr(Stdio::piped())
            .spawn()
            .expect("the program starts");
        child.stdin.take().expect("it has a standard input").write_all(input.as_bytes()).expect("it reads its input");
        Run::of(child.wait_with_output().expect("the program ends"))
    }
}

impl Drop for Folder {
    fn drop(&mut self) {
        let _ = fs::remove_dir_all(&self.0);
    }
}

impl Run {
    fn of(output: std::process::Output) -> Self {
        let notes = String::from_utf8(output.stderr).expect("notes are UTF-8");
        assert!(!notes.contains("panicked at"), "{notes}");
        Self {
            status: output.status.code().expect("it ends by itself"),
            results: String::from_utf8(output.stdout).expect("results are UTF-8"),
            notes,
        }
    }

    /// The JSON objects, one a line.
    fn objects(&self) -> Vec<Value> {
        self.results.lines().map(|line| serde_json::from_str(line).expect("a line is JSON")).collect()
    }
}

#[test]
fn a_sheet_that_solves_gives_status_0() {
    let folder = Folder::with_sheets();
    let run = folder.run(&["solve", "good.gw"]);
    assert_eq!(run.status, 0, "{}", run.notes);
    for word in ["rho", "1.22", "kg/m3"] {
        assert!(run.results.contains(word), "{}", run.results);
    }
    let run = folder.run(&["check", "good.gw"]);
    assert_eq!((run.status, run.results.as_str()), (0, ""), "{}", run.notes);
}

#[test]
fn a_sheet_with_errors_gives_status_1_and_findings_for_people_on_standard_error() {
    let folder = Folder::with_sheets();
    for subcommand in ["check", "solve"] {
        let run = folder.run(&[subcommand, "bad.gw"]);
        assert_eq!((run.status, run.results.as_str()), (1, ""));
        assert!(run.notes.contains("bad.gw:2:16") && run.notes.contains("kgg"), "{}", run.notes);
        assert!(run.notes.ends_with("1 sheet: 1 error\n"), "{}", run.notes);
    }
}

#[test]
fn a_file_that_cannot_be_read_gives_status_2_and_the_others_still_run() {
    let folder = Folder::with_sheets();
    let run = folder.run(&["solve", "missing.gw", "good.gw", "."]);
    assert_eq!(run.status, 2);
    assert!(run.results.contains("1.22"), "{}", run.results);
    assert!(run.notes.contains("gaswright: missing.gw: no such file"), "{}", run.notes);
    assert!(run.notes.contains("gaswright: .: is a folder"), "{}", run.notes);
}

#[test]
fn a_requirement_that_fails_gives_status_3() {
    let folder = Folder::with_sheets();
    let run = folder.run(&["solve", "fails.gw"]);
    assert_eq!(run.status, 3, "{}", run.notes);
    assert!(run.results.contains("Enough for a shift"), "{}", run.results);
    assert_eq!(folder.run(&["check", "fails.gw"]).status, 0);
}

#[test]
fn of_several_sheets_the_gravest_status_counts() {
    let folder = Folder::with_sheets();
    for (sheets, status) in [
        (&["good.gw", "fails.gw"][..], 3),
        (&["fails.gw", "bad.gw", "good.gw"], 1),
        (&["bad.gw", "missing.gw", "fails.gw"], 2),
        (&["good.gw", "good.gw"], 0),
    ] {
        let arguments: Vec<&str> = std::iter::once("solve").chain(sheets.iter().copied()).collect();
        assert_eq!(folder.run(&arguments).status, status, "{sheets:?}");
    }
}

#[test]
fn wrong_use_gives_status_2_and_nothing_on_standard_output() {
    let folder = Folder::with_sheets();
    for (arguments, word) in [
        (&[][..], "Usage"),
        (&["slove", "good.gw"], "solve"),
        (&["solve"], "FILE"),
        (&["solve", "--jsn", "good.gw"], "--jsn"),
        (&["check", "--format", "xml", "good.gw"], "sarif"),
        (&["solve", "--json", "--format", "short", "good.gw"], "cannot be used with"),
        (&["tidy", "--write", "--check", "good.gw"], "cannot be used with"),
        (&["tidy", "--write", "-"], "standard input"),
        (&["explain", "no-such-code-at-all"], "no-such-code-at-all"),
        (&["gases", "nitrogne"], "nitrogen"),
        (&["units", "presure"], "pressure"),
        (&["report", "-"], "-o"),
        (&["report", "good.gw", "fails.gw", "-o", "one.html"], "one sheet"),
        (&["report", "good.gw", "-o", "one.pdf"], ".html or .md"),
        (&["report", "good.gw", "-o", "good.gw", "--format", "md"], "the sheet itself"),
        (&["report", "good.gw", "--template", "no-such-folder"], "no-such-folder"),
        (&["report", "good.gw", "-o", "no-such-folder/a.html"], "no such file or folder"),
        (&["completions", "no-shell"], "zsh"),
    ] {
        let run = folder.run(arguments);
        assert_eq!((run.status, run.results.as_str()), (2, ""), "{arguments:?}: {}", run.notes);
        assert!(run.notes.contains(word), "{arguments:?}: {}", run.notes);
    }
    assert_eq!(folder.read("good.gw"), GOOD);
}

#[test]
fn help_and_version_are_results() {
    let folder = Folder::new();
    for arguments in [&["--help"][..], &["--version"], &["solve", "--help"]] {
        let run = folder.run(arguments);
        assert_eq!((run.status, run.notes.as_str()), (0, ""), "{arguments:?}");
        assert!(run.results.contains("gaswright"), "{}", run.results);
    }
}

#[test]
fn findings_for_programs_go_to_standard_output() {
    let folder = Folder::with_sheets();
    for subcommand in ["check", "solve"] {
        let run = folder.run(&[subcommand, "--format", "short", "bad.gw"]);
        assert_eq!((run.status, run.notes.as_str()), (1, ""));
        assert_eq!(run.results.lines().count(), 1, "{}", run.results);
        assert!(run.results.starts_with("bad.gw:2:16: error["), "{}", run.results);

        let run = folder.run(&[subcommand, "--format", "json", "bad.gw"]);
        let object = &run.objects()[0];
        assert_eq!((run.status, &object["status"]), (1, &Value::from("failed")));
        assert_eq!((&object["findings"][0]["line"], &object["findings"][0]["end_column"]), (&Value::from(2), &Value::from(19)));

        let run = folder.run(&[subcommand, "--format", "sarif", "bad.gw", "good.gw"]);
        assert_eq!(run.status, 1);
        let log: Value = serde_json::from_str(&run.results).unwrap();
        assert_eq!(log["version"], "2.1.0");
        let result = &log["runs"][0]["results"][0];
        assert_eq!(result["locations"][0]["physicalLocation"]["region"]["startLine"], 2);
        assert_eq!(result["locations"][0]["physicalLocation"]["artifactLocation"]["uri"], "bad.gw");
        assert_eq!(log["runs"][0]["results"].as_array().unwrap().len(), 1);
    }
    let checked = folder.run(&["check", "--format", "json", "good.gw"]).objects().remove(0);
    assert_eq!(checked["status"], "checked");
    let schema: Value = serde_json::from_str(&folder.run(&["schema"]).results).unwrap();
    let validator = jsonschema::draft202012::new(&schema).unwrap();
    assert!(validator.is_valid(&checked), "{:?}", validator.iter_errors(&checked).map(|error| error.to_string()).collect::<Vec<_>>());
}

#[test]
fn results_come_in_the_order_of_the_command_line() {
    let folder = Folder::with_sheets();
    let names: Vec<String> = (0..40).rev().map(|number| format!("g{number}.gw")).collect();
    for name in &names {
        folder.write(name, GOOD);
    }
    let arguments: Vec<&str> = ["solve", "--json", "bad.gw"].into_iter().chain(names.iter().map(String::as_str)).collect();
    let run = folder.run(&arguments);
    assert_eq!(run.status, 1);
    let objects = run.objects();
    let paths: Vec<&str> = objects.iter().map(|object| object["sheet"]["path"].as_str().unwrap()).collect();
    assert_eq!(paths[0], "bad.gw");
    assert_eq!(paths[1..], names);
    assert_eq!((&objects[0]["status"], &objects[1]["status"]), (&Value::from("failed"), &Value::from("solved")));
}

#[test]
fn the_number_of_threads_changes_no_byte() {
    let folder = Folder::with_sheets();
    let sheets = ["good.gw", "bad.gw", "fails.gw", "missing.gw", "good.gw", "bad.gw"];
    let run = |threads: &str| {
        let arguments: Vec<&str> = ["solve", "--threads", threads].into_iter().chain(sheets).collect();
        let run = folder.run(&arguments);
        (run.status, run.results, run.notes)
    };
    let one = run("1");
    assert_eq!(one, run("2"));
    assert_eq!(one, run("9"));
}

#[test]
fn a_hyphen_is_standard_input() {
    let folder = Folder::new();
    let run = folder.run_with_input(&["solve", "-"], GOOD);
    assert_eq!(run.status, 0, "{}", run.notes);
    assert!(run.results.contains("1.22"), "{}", run.results);
    let run = folder.run_with_input(&["check", "-", "--format", "short"], BAD);
    assert!(run.results.starts_with("-:2:16: error["), "{}", run.results);
    let run = folder.run_with_input(&["tidy", "-"], "given V=3.20 m3   \"Volume\" from \"Plate\"\nanswer V\n");
    assert_eq!(run.status, 0, "{}", run.notes);
    assert!(run.results.contains("given V = 3.20 m3"), "{}", run.results);
    let run = folder.run_with_input(&["report", "-", "-o", "out.html"], GOOD);
    assert_eq!((run.status, run.results.as_str()), (0, "out.html\n"), "{}", run.notes);
}

#[test]
fn colour_only_where_it_is_asked_for() {
    let folder = Folder::with_sheets();
    for arguments in
        [&["check", "bad.gw"][..], &["check", "bad.gw", "--color", "auto"], &["solve", "good.gw"], &["gases", "nitrogen"], &["--help"]]
    {
        let run = folder.run(arguments);
        assert!(!run.results.contains('\u{1b}') && !run.notes.contains('\u{1b}'), "{arguments:?}");
    }
    assert!(folder.run(&["check", "--color", "always", "bad.gw"]).notes.contains('\u{1b}'));
    let wrong = Run::of(folder.command(&["slove"]).env("NO_COLOR", "1").output().unwrap());
    assert!(!wrong.notes.contains('\u{1b}'));
}

#[test]
fn control_characters_of_a_sheet_and_of_a_path_are_shown_escaped() {
    let folder = Folder::new();
    folder.write("bell.gw", "given V\u{7}\u{202e} = 3 m3 \"Vol\u{1b}[2Jume\" from \"Plate\"\nanswer V\n");
    for arguments in [&["check", "bell.gw"][..], &["check", "bell.gw", "--format", "short"], &["solve", "no\u{1b}[2Jfile.gw"]] {
        let run = folder.run(arguments);
        let hidden = |text: &str| text.chars().any(|c| (c.is_control() && c != '\n') || c == '\u{202e}');
        assert_ne!(run.status, 0);
        assert!(!hidden(&run.results) && !hidden(&run.notes), "{arguments:?}: {:?}{:?}", run.results, run.notes);
    }
}

#[test]
fn bytes_that_are_no_text_are_a_finding() {
    let folder = Folder::new();
    folder.write("latin.gw", b"given V = 3.20 m3 \"Volume\" from \"Plate\"\ngiven d = 80.0 mm \"Gew\xe4hlt\" from \"Drawing\"\nanswer V\n");
    folder.write("noise.gw", (0..102_400).map(|at| (at % 256) as u8).collect::<Vec<u8>>());
    let run = folder.run(&["check", "latin.gw"]);
    assert_eq!(run.status, 1);
    assert!(run.notes.contains("latin.gw:2:23") && run.notes.contains("UTF-8"), "{}", run.notes);
    assert!(folder.run(&["check", "latin.gw", "--format", "short"]).results.starts_with("latin.gw:2:23: error[not-utf8]"));
    let run = folder.run(&["solve", "--json", "noise.gw"]);
    assert_eq!((run.status, &run.objects()[0]["status"]), (1, &Value::from("failed")));
    let run = folder.run(&["tidy", "--write", "latin.gw"]);
    assert_eq!(run.status, 1);
    assert!(fs::read(folder.0.join("latin.gw")).unwrap().contains(&0xe4));
}

#[test]
fn a_file_longer_than_a_sheet_may_be_is_refused_without_being_read() {
    let folder = Folder::new();
    // A file with a hole takes no room on the disk.
    let file = fs::File::create(folder.0.join("long.gw")).unwrap();
    file.set_len(4 << 30).unwrap();
    drop(file);
    let run = folder.run(&["check", "long.gw"]);
    assert_eq!(run.status, 1);
    assert!(run.notes.contains("long.gw:1:1") && run.notes.len() < 20_000, "{}", run.notes);
}

#[test]
fn many_findings_are_cut_for_people_and_whole_for_programs() {
    let folder = Folder::new();
    let sheet: String = (0..300).map(|n| format!("given v{n} = {n}.00 mq3 \"Volume\" from \"Plate\"\n")).collect();
    folder.write("many.gw", sheet + "answer v1\n");
    let run = folder.run(&["check", "many.gw"]);
    assert!(run.notes.contains("… and 200 more in many.gw"), "{}", &run.notes[run.notes.len() - 300..]);
    assert_eq!(folder.run(&["check", "--format", "short", "many.gw"]).results.lines().count(), 300);
}

#[test]
fn safe_cures_are_written_on_demand() {
    let folder = Folder::new();
    folder.write("slip.gw", BAD.replacen("given V", "giben V", 1).replace("kgg", "kg"));
    let run = folder.run(&["check", "--fix", "slip.gw"]);
    assert_eq!(run.status, 0, "{}", run.notes);
    assert!(run.notes.contains("slip.gw: 1 cure written"), "{}", run.notes);
    assert_eq!(folder.read("slip.gw"), BAD.replace("kgg", "kg"));
    assert_eq!(folder.run(&["check", "--fix", "slip.gw"]).status, 0);
    assert_eq!(folder.read("slip.gw"), BAD.replace("kgg", "kg"));
    let run = folder.run_with_input(&["check", "--fix", "-"], &BAD.replace("answer", "anwser").replace("kgg", "kg"));
    assert_eq!((run.status, run.results), (0, BAD.replace("kgg", "kg")));
}

#[test]
fn a_report_stands_beside_its_sheet_unless_said() {
    let folder = Folder::with_sheets();
    let run = folder.run(&["report", "good.gw", "fails.gw"]);
    assert_eq!((run.status, run.results.as_str()), (3, "good.html\nfails.html\n"), "{}", run.notes);
    assert!(folder.read("good.html").contains("<math") && folder.has("fails.html"));
    let run = folder.run(&["report", "good.gw", "--format", "md"]);
    assert_eq!((run.status, run.results.as_str()), (0, "good.md\n"));
    let run = folder.run(&["report", "good.gw", "-o", "-", "--format", "md"]);
    assert_eq!((run.status, run.results), (0, folder.read("good.md")));
}

#[test]
fn a_sheet_with_errors_gets_no_report_and_an_old_one_stays() {
    let folder = Folder::with_sheets();
    folder.write("bad.html", "the last good one");
    let run = folder.run(&["report", "bad.gw", "good.gw"]);
    assert_eq!((run.status, run.results.as_str()), (1, "good.html\n"));
    assert_eq!(folder.read("bad.html"), "the last good one");
    assert!(run.notes.contains("kgg"), "{}", run.notes);
}

#[test]
fn two_sheets_with_one_place_for_their_report_are_refused() {
    let folder = Folder::with_sheets();
    folder.write("good.txt", GOOD);
    let run = folder.run(&["report", "good.gw", "good.txt"]);
    assert_eq!(run.status, 2);
    assert!(!folder.has("good.html"));
}

#[test]
fn templates_are_written_once_and_used_where_they_are_named() {
    let folder = Folder::with_sheets();
    let run = folder.run(&["template", "look"]);
    assert_eq!(run.status, 0, "{}", run.notes);
    let names: Vec<&str> = run.results.lines().collect();
    assert!(!names.is_empty() && names.iter().all(|name| folder.has(name)), "{names:?}");
    let again = folder.run(&["template", "look"]);
    assert_eq!(again.status, 2);
    assert!(again.notes.contains("exists already"), "{}", again.notes);

    let plain = folder.run(&["report", "good.gw", "-o", "-", "--format", "md"]).results;
    assert_eq!(folder.run(&["report", "good.gw", "-o", "-", "--format", "md", "--template", "look"]).results, plain);
    let markdown = names.iter().find(|name| name.ends_with(".md")).expect("a template of the Markdown report");
    folder.write(markdown, "Our own report of {{ no_such_thing }}\n");
    let broken = folder.run(&["report", "good.gw", "--template", "look"]);
    assert_eq!(broken.status, 2);
    assert!(broken.notes.contains("template") && !folder.has("good.html"), "{}", broken.notes);
}

#[test]
fn tidy_prints_checks_and_writes() {
    let folder = Folder::new();
    let loose = "given V=3.20 m3   \"Volume\" from \"Plate\"   # as built\nanswer V\n";
    folder.write("loose.gw", loose);
    let printed = folder.run(&["tidy", "loose.gw"]);
    assert_eq!((printed.status, printed.notes.as_str()), (0, ""));
    assert!(printed.results.contains("# as built"), "{}", printed.results);
    assert_eq!(folder.read("loose.gw"), loose);

    let check = folder.run(&["tidy", "--check", "loose.gw"]);
    assert_eq!(check.status, 1);
    assert!(check.results.contains("-given V=3.20 m3") && check.results.contains("+given V = 3.20 m3"), "{}", check.results);
    assert_eq!(folder.read("loose.gw"), loose);

    assert_eq!(folder.run(&["tidy", "--write", "loose.gw"]).status, 0);
    assert_eq!(folder.read("loose.gw"), printed.results);
    let check = folder.run(&["tidy", "--check", "loose.gw"]);
    assert_eq!((check.status, check.results.as_str()), (0, ""));
}

#[test]
fn tidy_leaves_a_sheet_with_syntax_errors_alone() {
    let folder = Folder::new();
    let broken = "given V=3.20 m3 \"Volume\" from \"Plate\"\ngiven = \n";
    folder.write("broken.gw", broken);
    let run = folder.run(&["tidy", "--write", "broken.gw"]);
    assert_eq!((run.status, run.results.as_str()), (1, ""));
    assert!(run.notes.contains("broken.gw:2:"), "{}", run.notes);
    assert_eq!(folder.read("broken.gw"), broken);
}

#[cfg(unix)]
#[test]
fn writing_in_place_keeps_permissions_and_follows_links() {
    use std::os::unix::fs::{PermissionsExt, symlink};
    let folder = Folder::new();
    folder.write("real.gw", "answer   V\n");
    fs::set_permissions(folder.0.join("real.gw"), fs::Permissions::from_mode(0o640)).unwrap();
    symlink("real.gw", folder.0.join("link.gw")).unwrap();
    assert_eq!(folder.run(&["tidy", "--write", "link.gw"]).status, 0);
    assert_eq!(folder.read("real.gw"), "answer V\n");
    assert!(folder.0.join("link.gw").symlink_metadata().unwrap().is_symlink());
    assert_eq!(fs::metadata(folder.0.join("real.gw")).unwrap().permissions().mode() & 0o777, 0o640);
}

#[test]
fn a_new_sheet_checks_solves_and_is_in_canonical_layout() {
    let folder = Folder::new();
    let run = folder.run(&["new", "first.gw"]);
    assert_eq!((run.status, run.results.as_str()), (0, ""), "{}", run.notes);
    let run = folder.run(&["check", "first.gw"]);
    assert_eq!((run.status, run.notes.as_str()), (0, "1 sheet: no findings\n"));
    let run = folder.run(&["tidy", "--check", "first.gw"]);
    assert_eq!((run.status, run.results.as_str()), (0, ""));
    let object = folder.run(&["solve", "--json", "first.gw"]).objects().remove(0);
    assert_eq!(object["status"], "solved");
    assert!(!object["answers"].as_array().unwrap().is_empty());
    assert_eq!(folder.run(&["new"]).results, folder.read("first.gw"));
}

#[test]
fn a_new_sheet_never_overwrites() {
    let folder = Folder::new();
    folder.write("mine.gw", "# mine\n");
    let run = folder.run(&["new", "mine.gw"]);
    assert_eq!(run.status, 2);
    assert!(run.notes.contains("exists already"), "{}", run.notes);
    assert_eq!(folder.read("mine.gw"), "# mine\n");
    assert_eq!(folder.run(&["new", "no-such-folder/first.gw"]).status, 2);
}

#[test]
fn gases_units_and_codes_are_listed_one_a_line_and_shown() {
    let folder = Folder::new();
    let gases = folder.run(&["gases"]).results;
    assert!(gases.lines().count() >= 60 && gases.contains("dry air") && gases.contains("R134a"), "{gases}");
    assert!(folder.run(&["gases", "carbon", "dioxide"]).results.contains("44.009"));
    let far = folder.run(&["gases", "nitrogen", "--temperature", "-10degC", "--limit", "0.5%"]).results;
    assert!(far.contains("ideal gas law at -10 degC (263.15 K), error in density within 0.5 %"), "{far}");
    assert!(folder.run(&["gases", "humid", "air"]).results.contains("CIPM-2007"));
    let units = folder.run(&["units"]).results;
    assert!(units.lines().count() >= 30 && units.contains("pressure"), "{units}");
    let pressure = folder.run(&["units", "pressure"]).results;
    assert!(pressure.lines().any(|line| line.split_whitespace().eq(["bar", "100000", "Pa"])), "{pressure}");
    let codes = folder.run(&["explain"]).results;
    let listed: Vec<&str> = codes.lines().filter_map(|line| line.split_whitespace().next()).collect();
    let known: Vec<&str> = gaswright::diagnostic::code::ALL.iter().map(|page| page.code).collect();
    assert_eq!(listed, known);
    let page = folder.run(&["explain", "error[bad-line]"]);
    assert_eq!(page.status, 0);
    assert!(page.results.starts_with("bad-line: "), "{}", page.results);
}

#[test]
fn the_schema_is_json_and_names_the_parts_of_the_result() {
    let run = Folder::new().run(&["schema"]);
    let schema: Value = serde_json::from_str(&run.results).unwrap();
    for part in ["quantities", "answers", "requirements", "findings"] {
        assert!(schema["properties"][part].is_object(), "{part}");
    }
}

#[test]
fn completions_and_manual_pages_name_the_subcommands() {
    let folder = Folder::new();
    for shell in ["bash", "zsh", "fish"] {
        let run = folder.run(&["completions", shell]);
        assert_eq!(run.status, 0);
        assert!(run.results.contains("gaswright") && run.results.contains("solve"), "{shell}");
    }
    let run = folder.run(&["man", "pages"]);
    assert_eq!(run.status, 0, "{}", run.notes);
    assert!(folder.read("pages/gaswright.1").contains("solve"));
    assert!(folder.read("pages/gaswright-check.1").contains("sarif"));
}

#[test]
fn a_reader_that_goes_away_is_no_fault() {
    let folder = Folder::with_sheets();
    let names: Vec<String> = (0..2_000).map(|_| "good.gw".to_owned()).collect();
    let arguments: Vec<&str> = ["solve", "--json"].into_iter().chain(names.iter().map(String::as_str)).collect();
    let mut child = folder.command(&arguments).stdout(Stdio::piped()).stderr(Stdio::piped()).spawn().unwrap();
    let mut first = [0; 1];
    child.stdout.take().unwrap().read_exact(&mut first).unwrap();
    let output = child.wait_with_output().unwrap();
    assert_eq!((output.status.code(), String::from_utf8_lossy(&output.stderr).as_ref()), (Some(0), ""));
}

#[cfg(target_os = "linux")]
#[test]
fn standard_output_that_cannot_be_written_gives_status_2() {
    if !Path::new("/dev/full").exists() {
        return;
    }
    let folder = Folder::with_sheets();
    let full = fs::OpenOptions::new().write(true).open("/dev/full").unwrap();
    let run = Run::of(folder.command(&["solve", "good.gw"]).stdout(full).output().unwrap());
    assert_eq!(run.status, 2);
    assert!(run.notes.contains("standard output"), "{}", run.notes);
}

#[cfg(target_os = "linux")]
#[test]
fn a_path_that_is_no_text_is_written_to_all_the_same() {
    use std::ffi::OsStr;
    use std::os::unix::ffi::OsStrExt;
    let folder = Folder::new();
    let name = OsStr::from_bytes(b"w\xe4chter.gw");
    fs::write(folder.0.join(name), "answer   V\n").unwrap();
    let run = Run::of(folder.command(&["tidy", "--write"]).arg(name).output().unwrap());
    assert_eq!(run.status, 0, "{}", run.notes);
    assert_eq!(fs::read_to_string(folder.0.join(name)).unwrap(), "answer V\n");
}
