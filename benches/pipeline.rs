//! The stages of a sheet on the examples, and a plan solved again: `cargo bench --bench pipeline`.

use std::hint::black_box;

use criterion::{BatchSize, Criterion, criterion_group, criterion_main};
use gaswright::report::{self, Format, Input, Templates};
use gaswright::solve::Program;
use gaswright::{sheet, solve, syntax};

/// The allocator of the program.
#[global_allocator]
static ALLOCATOR: mimalloc::MiMalloc = mimalloc::MiMalloc;

/// The sheets of the benches: name and text.
const SHEETS: [(&str, &str); 3] = [
    ("nitrogen-buffer", include_str!("../sheets/examples/nitrogen-buffer.gw")),
    ("two-hall-junction", include_str!("../sheets/examples/two-hall-junction.gw")),
    ("receiver-vent", include_str!("receiver-vent.gw")),
];

fn stages(criterion: &mut Criterion) {
    for (name, text) in SHEETS {
        let mut group = criterion.benchmark_group(name);
        group.bench_function("parse", |bencher| bencher.iter(|| syntax::parse(black_box(text))));
        let (tree, _) = syntax::parse(text);
        group.bench_function("sheet", |bencher| bencher.iter(|| sheet::read(black_box(&tree), text)));
        let (read, _) = sheet::read(&tree, text);
        group.bench_function("solve", |bencher| {
            bencher.iter_batched(|| read.clone(), |mut sheet| solve::solve(&mut sheet), BatchSize::SmallInput)
        });
        group.bench_function("whole way", |bencher| bencher.iter(|| gaswright::solve(black_box(text))));
        let solved = gaswright::solve(text);
        let input = Input {
            path: "bench.gw",
            text,
            tree: &solved.tree,
            sheet: &solved.sheet,
            solution: solved.solution.as_ref(),
            findings: &solved.findings,
        };
        let templates = Templates::built_in();
        group.bench_function("report", |bencher| bencher.iter(|| report::report(&input, Format::Html, &templates)));
        let mut again = read.clone();
        let program = Program::new(&mut again).expect("the sheet is in order");
        let inputs: Vec<f64> = program.inputs().map(|(_, value)| value).collect();
        let mut runner = program.runner(&again).expect("the sheet has a solution");
        let mut turn = 0u32;
        group.bench_function("solve again", |bencher| {
            bencher.iter(|| {
                turn = turn.wrapping_add(1);
                let factor = 1.0 + f64::from(turn % 64) * 1e-4;
                let inputs: Vec<f64> = inputs.iter().map(|value| value * factor).collect();
                black_box(runner.solve(&inputs))
            });
        });
        group.finish();
    }
}

criterion_group!(benches, stages);
criterion_main!(benches);
