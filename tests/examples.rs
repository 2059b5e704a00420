//! The sheets of `sheets/examples/`: each solves with nothing to complain of, gives what was worked out outside the program, and
//! gives the same whatever the order of its lines and the units of its givens.

use std::fs;
use std::path::Path;

use gaswright::diagnostic::{Diagnostic, LineIndex, terminal};
use gaswright::report::{self, Input};
use gaswright::syntax::{self, ProsePiece, StatementKind, Tree};
use gaswright::{ExitStatus, Solved};

/// A sheet, its warnings by code, and its answers: name, text as shown, value in SI.
///
/// The values were worked outside the program, in Python with nothing but its `math`: ideal law with R = 8.31446261815324 J/(mol K), molar masses from CIAAW 2021
/// abridged weights, ISO 2533 pressure at 12 m, the nitrogen polynomial of McBride, Zehe and Gordon (NASA/TP-2002-211556), roots by bisection. Real
/// gases and humid air: the terms of Tegeler 1999, Span and Wagner 1996, Lemmon 2000 and IAPWS-95 summed in 40 digits with numeric derivatives,
/// saturation by equal pressure and Gibbs energy, the virial coefficient of air with water of Harvey and Huang 2007.
struct Example {
    name: &'static str,
    warnings: &'static [&'static str],
    answers: &'static [(&'static str, &'static str, f64)],
}

/// The sheet whose ideal law has to fail: it shows beside each other what the ideal and the real gas hold.
const FAILS: &str = "argon-bank-real";

impl Example {
    fn status(&self) -> ExitStatus {
        if self.name == FAILS { ExitStatus::Fails } else { ExitStatus::Solved }
    }
}

const EXAMPLES: &[Example] = &[
    Example {
        name: "argon-bank-real",
        warnings: &["ideal-law-fails", "ideal-law-fails"],
        answers: &[
            ("m", "215 kg", 214.626_999_961_629_63),
            ("m_i", "201 kg", 201.111_450_169_021_49),
            ("off", "-6.3 %", -0.062_972_271_871_779_48),
            ("n", "120 Nm3", 5_372.659_456_333_975),
            ("cold.p", "186 bar gauge", 18_695_532.931_457_788),
            ("cold_i.p", "191 bar gauge", 19_194_308.282_696_253),
        ],
    },
    Example {
        name: "carbon-dioxide-cylinders",
        warnings: &[],
        answers: &[
            ("p_s", "53.6 bar gauge", 5_465_105.217_470_299),
            ("p_hot", "66.3 bar gauge", 6_736_148.578_184_652),
            ("heated.rho", "120 kg/m3", 123.180_884_187_020_11),
            ("off", "-26 %", -0.261_864_627_328_379_8),
            ("c", "5 m/s", 4.785_342_759_005_12),
            ("h", "0.6 kW", 641.023_091_136_019),
        ],
    },
    Example {
        name: "cold-room-oxygen",
        warnings: &[],
        answers: &[
            ("V_g", "5.81 m3", 5.805_273_241_044_374),
            ("x_low", "19.92 %", 0.199_193_180_135_603_41),
            ("x_mix", "19.94 %", 0.199_442_606_556_346_5),
            ("t_lim", "175 s", 174.946_872_943_964_68),
            ("t_a", "15.7 min", 940.211_875_729_097_1),
        ],
    },
    Example {
        name: "compressed-air-condensate",
        warnings: &[],
        answers: &[
            ("intake.W", "20 g/kg", 0.020_062_007_017_108_288),
            ("wet.W", "4 g/kg", 0.004_483_832_204_833_055),
            ("q_w", "8 kg/h", 0.002_332_850_924_677_407_7),
            ("q_t", "2.1 kg/h", 0.000_585_908_398_771_076_2),
            ("main.RH", "40 %", 0.445_611_931_911_264_4),
            ("free.T_dew", "-21.1 degC", 252.002_106_256_002_97),
        ],
    },
    Example {
        name: "cylinder-bank",
        warnings: &[],
        answers: &[
            ("c_use", "107 Nm3", 4_780.946_979_730_199),
            ("q_n", "4.18 Nm3/h", 0.051_807_084_127_119_34),
            ("t", "25.6 h", 92_283.653_100_397_66),
            ("N_need", "7.49", 7.489_950_568_472_039_5),
        ],
    },
    Example {
        name: "drum-in-the-sun",
        warnings: &[],
        answers: &[
            ("m", "3.98 kg", 3.977_522_450_242_636),
            ("sun.p", "7.13 bar gauge", 814_432.737_155_882_8),
            ("rise", "1.1 bar diff", 113_132.737_155_882_76),
            ("opens.T", "93.3 degC", 366.470_404_962_213),
            ("p_fill", "6.75 bar gauge", 776_100.543_560_32),
        ],
    },
    Example {
        name: "header-pressure-drop",
        warnings: &[],
        answers: &[
            ("Re", "158000", 157_842.788_257_630_4),
            ("f", "0.0221", 0.022_053_130_431_482_3),
            ("p_2", "6.27 bar gauge", 728_374.379_472_964_4),
            ("dp", "0.23 bar diff", 22_806.546_054_657_78),
            ("c", "7.77 m/s", 7.766_591_458_302_29),
            ("q_top", "454 Nm3/h", 5.629_139_004_173_945),
        ],
    },
    Example {
        name: "leak-test",
        warnings: &[],
        answers: &[
            ("q_m", "1.2 g/h", 3.405_084_533_289_825e-7),
            ("q_V", "16 cm3/min", 2.724_404_263_131_177e-7),
            ("dp", "6.2 mbar diff", 624.910_485_933_534_8),
            ("times", "6.9", 6.880_985_511_991_004),
            ("share", "0.069 %", 0.000_692_498_322_178_133_4),
        ],
    },
    Example {
        name: "nitrogen-booster",
        warnings: &[],
        answers: &[
            ("P", "13.6 kW", 13_599.963_997_173_245),
            ("hot_1.T", "156 degC", 429.608_313_433_795_16),
            ("hot_2.T", "168 degC", 441.091_919_650_120_3),
            ("Q_c", "6.31 kW", 6_305.544_900_366_117),
            ("eta_m", "77.4 %", 0.774_434_111_698_087_1),
        ],
    },
    Example {
        name: "nitrogen-buffer",
        warnings: &[],
        answers: &[("m", "28.2 kg", 28.213_294_045_565_19), ("cold.p", "8.24 bar gauge", 925_109.723_503_695_6)],
    },
    Example {
        name: "packing-gas",
        warnings: &[],
        answers: &[
            ("dp_c", "1.31 bar diff", 131_439.0),
            ("dp_n", "2.89 bar diff", 288_561.0),
            ("p_x", "2.11 bar gauge", 312_739.0),
            ("x_e", "31.3 %", 0.313_304_506_901_712_96),
            ("m", "13.0 kg", 13.040_658_671_054_565),
        ],
    },
    Example {
        name: "relief-valve",
        warnings: &[],
        answers: &[
            ("q_m", "856 kg/h", 0.237_907_496_854_939_98),
            ("A_need", "190 mm2", 0.000_189_653_244_470_051_38),
            ("load", "83.6 %", 0.835_550_209_849_808_7),
            ("r_c", "0.52835", 0.528_351_273_636_784_5),
        ],
    },
    Example {
        name: "ring-main-velocity",
        warnings: &[],
        answers: &[
            ("q_m", "231 kg/h", 0.064_228_173_882_460_12),
            ("q_V", "32.0 m3/h", 0.008_876_897_786_477_555),
            ("c", "6.44 m/s", 6.437_886_145_735_816),
            ("q_max", "431 Nm3/h", 5.341_932_761_500_557),
        ],
    },
    Example {
        name: "two-hall-junction",
        warnings: &[],
        answers: &[
            ("p_j", "6.04 bar gauge", 705_601.507_557_102_7),
            ("q_a", "747 kg/h", 0.207_391_758_295_607_8),
            ("q_b", "373 kg/h", 0.103_516_196_367_397_48),
            ("q_c", "374 kg/h", 0.103_875_561_928_210_25),
            ("Q_a", "597 Nm3/h", 7.403_146_937_088_876),
        ],
    },
];

/// How far an answer may lie from the value worked outside, relative. The leak test takes the difference of two pressures that
/// agree to three digits, which leaves thirteen of sixteen; a hundred times that covers the other roundings.
const CLOSE: f64 = 1e-11;

fn text_of(name: &str) -> String {
    let path = Path::new(env!("CARGO_MANIFEST_DIR")).join(format!("sheets/examples/{name}.gw"));
    fs::read_to_string(&path).unwrap_or_else(|error| panic!("{}: {error}", path.display()))
}

fn told(findings: &[Diagnostic]) -> String {
    findings.iter().map(|finding| format!("\n    {}[{}]: {}", finding.severity.word(), finding.code, finding.message)).collect()
}

/// The value of a quantity in SI.
fn si(solved: &Solved, name: &str) -> f64 {
    let solution = solved.solution.as_ref().unwrap_or_else(|| panic!("no solution:{}", told(&solved.findings)));
    let quantity = solved.sheet.find(name).unwrap_or_else(|| panic!("no quantity {name}"));
    solution.values[quantity.0 as usize]
}

fn assert_close(what: &str, found: f64, expected: f64, relative: f64) {
    assert!((found - expected).abs() <= relative * expected.abs(), "{what}: {found}, expected {expected}");
}

#[test]
fn every_example_is_in_the_list_and_every_entry_has_its_sheet() {
    let folder = Path::new(env!("CARGO_MANIFEST_DIR")).join("sheets/examples");
    let mut sheets: Vec<String> = fs::read_dir(folder)
        .expect("the examples are there")
        .filter_map(|file| file.expect("the folder can be read").file_name().to_str()?.strip_suffix(".gw").map(str::to_owned))
        .collect();
    sheets.sort();
    let listed: Vec<&str> = EXAMPLES.iter().map(|example| example.name).collect();
    assert_eq!(sheets, listed);
}

#[test]
fn every_example_solves_with_nothing_to_complain_of() {
    for example in EXAMPLES {
        let solved = gaswright::solve(&text_of(example.name));
        let warnings: Vec<&str> = solved.findings.iter().map(|finding| finding.code).collect();
        assert_eq!(warnings, example.warnings, "{}:{}", example.name, told(&solved.findings));
        assert_eq!(solved.exit_status(), example.status(), "{}: a requirement or an assumption fails", example.name);
        let solution = solved.solution.as_ref().unwrap();
        assert!(solution.largest_residual < 1e-9, "{}: largest residual {}", example.name, solution.largest_residual);
        assert_eq!(solution.n_relations, solution.n_unknowns, "{}", example.name);
    }
}

#[test]
fn every_answer_is_what_was_worked_out_outside() {
    for example in EXAMPLES {
        let text = text_of(example.name);
        let solved = gaswright::solve(&text);
        let input = Input {
            path: example.name,
            text: &text,
            tree: &solved.tree,
            sheet: &solved.sheet,
            solution: solved.solution.as_ref(),
            findings: &solved.findings,
        };
        let answers = report::result(&input).answers;
        let shown: Vec<(&str, &str)> = answers.iter().map(|answer| (answer.name.as_str(), answer.text.as_str())).collect();
        let expected: Vec<(&str, &str)> = example.answers.iter().map(|(name, text, _)| (*name, *text)).collect();
        assert_eq!(shown, expected, "{}", example.name);
        for (name, _, value) in example.answers {
            assert_close(&format!("{}: {name}", example.name), si(&solved, name), *value, CLOSE);
        }
    }
}

/// An example is a calculation that a person could sign: head, sections, prose that cannot go stale, every input with its source, what is
/// assumed with its reason, what is required, what to beware of, and the class of an instrument.
#[test]
fn every_example_is_complete() {
    for example in EXAMPLES {
        let name = example.name;
        let text = text_of(name);
        let tree = gaswright::check(&text).tree;
        let head = &tree.head;
        for (key, value) in [("title", &head.title), ("document", &head.document), ("revision", &head.revision), ("purpose", &head.purpose)]
        {
            assert!(value.as_ref().is_some_and(|value| !value.text.is_empty()), "{name}: no {key}");
        }
        let count = |wanted: fn(&StatementKind) -> bool| tree.statements.iter().filter(|statement| wanted(&statement.kind)).count();
        assert!(count(|kind| matches!(kind, StatementKind::Section { .. })) >= 2, "{name}: sections");
        assert!(count(|kind| matches!(kind, StatementKind::Require { .. })) >= 1, "{name}: requirements");
        assert!(count(|kind| matches!(kind, StatementKind::Assume { .. })) >= 1, "{name}: assumptions");
        assert!(count(|kind| matches!(kind, StatementKind::Caution { .. })) >= 1, "{name}: cautions");
        assert!(count(|kind| matches!(kind, StatementKind::Given { uncertainty: Some(_), .. })) >= 1, "{name}: uncertainties");
        let live = |kind: &StatementKind| match kind {
            StatementKind::Prose { pieces } => pieces.iter().any(|piece| matches!(piece, ProsePiece::Live { .. })),
            _ => false,
        };
        assert!(tree.statements.iter().any(|statement| live(&statement.kind)), "{name}: prose with a live value");
        for statement in &tree.statements {
            let line = statement.span.of(&text);
            match statement.kind {
                StatementKind::Given { .. } => {
                    assert!(statement.source.is_some() && statement.description.is_some(), "{name}: {line}");
                }
                StatementKind::Assume { .. } => assert!(statement.because.is_some(), "{name}: {line}"),
                StatementKind::Let { .. } | StatementKind::Unknown { .. } | StatementKind::State { .. } => {
                    assert!(statement.description.is_some(), "{name}: {line}");
                }
                _ => {}
            }
        }
    }
}

#[test]
fn every_example_is_in_the_canonical_layout() {
    for example in EXAMPLES {
        let text = text_of(example.name);
        assert_eq!(syntax::tidy(&text).as_deref().unwrap_or_default(), text, "{}", example.name);
    }
}

/// What the README shows of the sheet that is refused is what the program says of it.
#[test]
fn the_refused_steam_line_is_told_as_the_readme_shows() {
    let name = "sheets/examples/refused/steam-line.gw";
    let root = Path::new(env!("CARGO_MANIFEST_DIR"));
    let text = fs::read_to_string(root.join(name)).expect("the sheet is there");
    assert_eq!(syntax::tidy(&text).as_deref().unwrap_or_default(), text);
    let solved = gaswright::solve(&text);
    assert_eq!(solved.exit_status(), ExitStatus::Errors);
    let [finding] = &solved.findings[..] else { panic!("one finding:{}", told(&solved.findings)) };
    let told = terminal(finding, name, &text, &LineIndex::new(&text), false);
    let told = told.trim_end();
    let readme = fs::read_to_string(root.join("README.md")).expect("the README is there");
    assert!(readme.contains(told), "not in the README:\n{told}");
}

/// A sequence of numbers that is the same on every run (an LCG of Knuth's, MMIX).
struct Sequence(u64);

impl Sequence {
    fn below(&mut self, limit: usize) -> usize {
        self.0 = self.0.wrapping_mul(6_364_136_223_846_793_005).wrapping_add(1_442_695_040_888_963_407);
        ((self.0 >> 33) as usize) % limit
    }
}

/// The sheet with its statements in another order. Head first; comments and titles left out, since neither says where anything belongs.
fn shuffled(text: &str, tree: &Tree, seed: u64) -> String {
    let mut statements: Vec<&str> = tree
        .statements
        .iter()
        .filter(|statement| !matches!(statement.kind, StatementKind::Section { .. } | StatementKind::Prose { .. }))
        .map(|statement| statement.span.of(text))
        .collect();
    let mut sequence = Sequence(seed);
    for last in (1..statements.len()).rev() {
        statements.swap(last, sequence.below(last + 1));
    }
    let head = tree.head.span.map_or("", |span| span.of(text));
    format!("{head}\n{}\n", statements.join("\n"))
}

/// Another order may round a sum or a block another way, no more: a relative 1e-12, and a hundred times that for the leak test, whose
/// difference of nearly equal pressures multiplies a rounding by that much.
#[test]
fn the_order_of_lines_changes_no_answer() {
    for example in EXAMPLES {
        let text = text_of(example.name);
        let solved = gaswright::solve(&text);
        let relative = if example.name == "leak-test" { 1e-10 } else { 1e-12 };
        for seed in 1..=5 {
            let other = gaswright::solve(&shuffled(&text, &solved.tree, seed));
            assert_eq!(other.exit_status(), example.status(), "{} in order {seed}:{}", example.name, told(&other.findings));
            for quantity in &solved.sheet.quantities {
                let (here, there) = (si(&solved, &quantity.name), si(&other, &quantity.name));
                assert_close(&format!("{} in order {seed}: {}", example.name, quantity.name), there, here, relative);
            }
        }
    }
}

/// The unit as it stands in a given, the unit to write instead, and the value in it from the value here.
type Conversion = (&'static str, &'static str, fn(f64) -> f64);

/// Another unit of the same quantity for every unit of the examples, by exact definitions.
const OTHER_UNITS: &[Conversion] = &[
    ("bar abs", "kPa abs", |value| value * 100.0),
    ("bar gauge", "psi gauge", |value| value * 1e5 / (0.453_592_37 * 9.806_65 / (0.0254 * 0.0254))),
    ("bar diff", "mbar diff", |value| value * 1000.0),
    ("kPa abs", "atm abs", |value| value / 101.325),
    ("mbar abs", "torr abs", |value| value * 100.0 * 760.0 / 101_325.0),
    ("degC", "degF", |value| value * 1.8 + 32.0),
    ("K diff", "degF diff", |value| value * 1.8),
    ("K", "degR", |value| value * 1.8),
    ("m3", "ft3", |value| value / (0.3048 * 0.3048 * 0.3048)),
    ("L", "m3", |value| value / 1000.0),
    ("mm", "inch", |value| value / 25.4),
    ("m", "ft", |value| value / 0.3048),
    ("kg/h", "lb/min", |value| value / 0.453_592_37 / 60.0),
    ("L/min", "m3/h", |value| value * 0.06),
    ("m3/h", "ft3/min", |value| value / (0.3048 * 0.3048 * 0.3048) / 60.0),
    ("cm3/min", "L/h", |value| value * 0.06),
    ("Nm3/h", "kmol/h", |value| value * 101_325.0 / (8.314_462_618_153_24 * 273.15) / 1000.0),
    ("Nm3", "lbmol", |value| value * 101_325.0 / (8.314_462_618_153_24 * 273.15) / 453.592_37),
    ("%", "", |value| value / 100.0),
    ("s", "min", |value| value / 60.0),
    ("h", "s", |value| value * 3600.0),
    ("m/s", "km/h", |value| value * 3.6),
    ("Pa.s", "cP", |value| value * 1000.0),
];

/// The sheet with the value of every given in another unit; what stands behind `±` is left as it is.
fn in_other_units(text: &str, tree: &Tree) -> String {
    let mut other = text.to_owned();
    for statement in tree.statements.iter().rev() {
        let value = match &statement.kind {
            StatementKind::Given { value, .. } | StatementKind::SitePressure { value, .. } | StatementKind::SiteAltitude { value, .. } => {
                value
            }
            _ => continue,
        };
        let Some(unit) = value.unit else { continue };
        let written = unit.whole().of(text);
        let (_, instead, convert) =
            OTHER_UNITS.iter().find(|(here, _, _)| *here == written).unwrap_or_else(|| panic!("another unit for `{written}`"));
        let exact = if value.exact.is_some() { " exact" } else { "" };
        let literal = format!("{:e} {instead}{exact}", convert(value.value));
        other.replace_range(value.span.start as usize..value.span.end as usize, literal.trim_end());
    }
    other
}

/// A conversion there and back rounds a value a few times: a relative 1e-12, and where a difference of nearly equal readings multiplies that (up to
/// a thousand times for the pressures of the leak test, which agree to three digits) 1e-9.
#[test]
fn the_units_of_the_givens_change_no_answer() {
    for example in EXAMPLES {
        let text = text_of(example.name);
        let tree = gaswright::check(&text).tree;
        let other_text = in_other_units(&text, &tree);
        assert_ne!(other_text, text);
        let other = gaswright::solve(&other_text);
        assert_eq!(other.exit_status(), example.status(), "{}:{}", example.name, told(&other.findings));
        let relative = if example.name == "leak-test" { 1e-9 } else { 1e-12 };
        for (name, _, value) in example.answers {
            assert_close(&format!("{}: {name}", example.name), si(&other, name), *value, relative);
        }
    }
}
