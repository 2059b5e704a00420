//! Properties of the solver: random solvable systems, shuffled, renamed, in other units; one relation too few or too many.

use gaswright::solve;
use proptest::prelude::*;

/// A system of `n` unknowns with a known solution: each relation ties an unknown to earlier ones.
#[derive(Clone, Debug)]
struct System {
    solution: Vec<f64>,
    relations: Vec<String>,
}

/// How a relation is written: which of its operations, and which way round.
fn system() -> impl Strategy<Value = System> {
    prop::collection::vec((1u32..900, 0u8..6, any::<bool>(), any::<prop::sample::Index>(), any::<prop::sample::Index>()), 2..30).prop_map(
        |rows| {
            let mut solution: Vec<f64> = Vec::new();
            let mut relations = Vec::new();
            for (at, (value, operation, turned, first, second)) in rows.into_iter().enumerate() {
                let x = f64::from(value) / 64.0 + 0.25;
                let (left, right) = if at == 0 {
                    ("x0".to_owned(), format!("{x:?}"))
                } else {
                    let (a, b) = (first.index(at), second.index(at));
                    let (a_value, b_value) = (solution[a], solution[b]);
                    match operation {
                        0 => (format!("x{at} + x{a}"), format!("{:?} * x{b}", (x + a_value) / b_value)),
                        1 => (format!("x{at} * x{a}"), format!("x{b} + {:?}", x * a_value - b_value)),
                        2 => (format!("x{a} / x{at}"), format!("{:?}", a_value / x)),
                        3 => (format!("ln(x{at}) - x{a} / x{b}"), format!("{:?}", x.ln() - a_value / b_value)),
                        4 => (format!("sqrt(x{at}) * {:?}", b_value / x.sqrt()), format!("x{b}")),
                        _ => (format!("x{at}"), format!("x{a} - {:?}", a_value - x)),
                    }
                };
                relations.push(if turned { format!("{right} = {left}") } else { format!("{left} = {right}") });
                solution.push(x);
            }
            System { solution, relations }
        },
    )
}

fn sheet(system: &System, relations: &[String], name: &str) -> String {
    let mut lines: Vec<String> = (0..system.solution.len()).map(|at| format!("unknown x{at}")).collect();
    lines.extend(relations.iter().cloned());
    lines.push(format!("answer {}", (0..system.solution.len()).map(|at| format!("x{at}")).collect::<Vec<_>>().join(", ")));
    lines.join("\n").replace('x', name)
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(96))]

    #[test]
    fn a_shuffled_system_gives_its_known_solution(system in system(), seed in any::<u64>(), renamed in any::<bool>()) {
        let mut relations = system.relations.clone();
        // A fixed permutation by the seed.
        for at in (1..relations.len()).rev() {
            relations.swap(at, (seed.rotate_left(at as u32 % 64) % (at as u64 + 1)) as usize);
        }
        let name = if renamed { "quantity_" } else { "x" };
        let text = sheet(&system, &relations, name);
        let solved = solve(&text);
        let solution = solved.solution.as_ref();
        prop_assert!(solution.is_some(), "{text}\n{:?}", solved.findings);
        for (at, expected) in system.solution.iter().enumerate() {
            let id = solved.sheet.find(&format!("{name}{at}")).expect("declared");
            let found = solution.map_or(f64::NAN, |solution| solution.values[id.0 as usize]);
            // Each relation is written with rounded numbers; a chain of thirty loses some figures.
            prop_assert!((found / expected - 1.0).abs() < 1e-6, "{name}{at} = {found}, expected {expected}\n{text}");
        }
    }

    #[test]
    fn a_relation_too_few_is_told(system in system(), gone in any::<prop::sample::Index>()) {
        let mut relations = system.relations.clone();
        relations.remove(gone.index(relations.len()));
        let solved = solve(&sheet(&system, &relations, "x"));
        prop_assert!(solved.solution.is_none());
        prop_assert!(solved.findings.iter().any(|finding| finding.code == "under-determined"), "{:?}", solved.findings);
    }

    #[test]
    fn a_relation_doubled_is_a_check_and_one_doubled_wrongly_a_conflict(system in system(), which in any::<prop::sample::Index>()) {
        let at = which.index(system.relations.len());
        let mut relations = system.relations.clone();
        relations.push(system.relations[at].clone());
        let solved = solve(&sheet(&system, &relations, "x"));
        prop_assert!(solved.solution.is_some(), "{:?}", solved.findings);
        prop_assert_eq!(solved.solution.as_ref().map_or(0, |solution| solution.surplus.len()), 1);
        let (left, right) = system.relations[at].split_once('=').expect("a relation");
        let last = relations.len() - 1;
        relations[last] = format!("{left} = ({right}) * 1.25 + 0.5");
        let solved = solve(&sheet(&system, &relations, "x"));
        prop_assert!(solved.solution.is_none());
        prop_assert!(solved.findings.iter().any(|finding| finding.is_error()), "{:?}", solved.findings);
    }
}

/// The same sheet with its givens in other units.
#[test]
fn other_units_change_no_result() {
    let text = |p: &str, t: &str, v: &str| {
        format!(
            "gas n2 = nitrogen\ngiven p = {p} \"Pressure\" from \"PI\"\ngiven T = {t} \"Temperature\" from \"TI\"\ngiven V = {v} \"Volume\" from \"Plate\"\n\
             state full of n2 at p = p, T = T\nlet m = V * full.rho in kg\nanswer m, full.h, full.w\n"
        )
    };
    let result = |text: &str| {
        let solved = solve(text);
        let solution = solved.solution.expect("in order");
        ["m", "full.h", "full.w"].map(|name| solution.values[solved.sheet.find(name).expect("declared").0 as usize])
    };
    let first = result(&text("8.00 bar abs", "27.0 degC", "2.5 m3"));
    for (p, t, v) in
        [("800 kPa abs", "300.15 K", "2500 L"), ("0.8 MPa abs", "80.6 degF", "2.5e6 cm3"), ("8000 mbar abs", "540.27 degR", "2.5e9 mm3")]
    {
        for (found, expected) in result(&text(p, t, v)).iter().zip(first) {
            assert!((found / expected - 1.0).abs() < 1e-12, "{p}, {t}, {v}: {found} against {expected}");
        }
    }
}

/// The same text gives the same digits, and so does a plan that is solved again.
#[test]
fn a_plan_solved_again_gives_the_digits_of_the_sheet() {
    let text = include_str!("../benches/receiver-vent.gw");
    let solved = solve(text);
    let solution = solved.solution.expect("in order");
    let (tree, _) = gaswright::syntax::parse(text);
    let (mut sheet, _) = gaswright::sheet::read(&tree, text);
    let program = gaswright::solve::Program::new(&mut sheet).expect("in order");
    let inputs: Vec<f64> = program.inputs().map(|(_, value)| value).collect();
    let mut runner = program.runner(&sheet).expect("solved");
    let mut moved = inputs.clone();
    moved.iter_mut().for_each(|input| *input *= 1.01);
    assert!(runner.solve(&moved));
    assert!(runner.solve(&inputs));
    for name in ["n", "m", "t", "E", "Z"] {
        let id = sheet.find(name).expect("declared");
        let expected = solution.values[solved.sheet.find(name).expect("declared").0 as usize];
        assert!((runner.value(id) / expected - 1.0).abs() < 1e-14, "{name}");
    }
}
