//! Real gases: density by the reference equation (the work of the peers' W5), states, saturation, mixtures and the verdict:
//! `cargo bench --bench real_gas`.

use std::hint::black_box;

use criterion::{Criterion, Throughput, criterion_group, criterion_main};
use feos::multiparameter::{MultiParameter, MultiParameterRecord};
use feos_core::parameter::{Parameters, PureRecord};
use feos_core::{DensityInitialization, State};
use gaswright::gas::eos::{Equation, Property};
use gaswright::gas::verdict::Judge;
use gaswright::gas::{Gas, RealGas, ShareBasis, find};
use quantity::{KELVIN, PASCAL};

fn pure(name: &str) -> Option<Gas> {
    find(name).ok().map(Gas::named)
}

/// The grid of the peers: 400 temperatures from 150 to 450 K, 250 pressures from 0.1 to 30 MPa.
fn grid() -> Vec<(f64, f64)> {
    (0..400).flat_map(|i| (0..250).map(move |j| (150.0 + 300.0 * f64::from(i) / 399.0, 1e5 + 29.9e6 * f64::from(j) / 249.0))).collect()
}

/// Densities of the grid by the kernel and by the library `feos` from the same parameters; the library starts from a vapour.
fn density(criterion: &mut Criterion) {
    let points = grid();
    let mut group = criterion.benchmark_group("nitrogen, density of 100 000 states");
    group.throughput(Throughput::Elements(points.len() as u64)).sample_size(10);
    if let Some(real) = pure("nitrogen").and_then(|gas| RealGas::new(&gas).ok()) {
        let sum = || points.iter().filter_map(|(t, p)| real.density_kg_m3(black_box(*t), black_box(*p)).ok()).sum::<f64>();
        group.bench_function("with range and phase", |bencher| bencher.iter(sum));
    }
    if let Some(equation) = Equation::of_name("nitrogen") {
        let sum = || points.iter().filter_map(|(t, p)| equation.density(black_box(*t), black_box(*p)).ok()).sum::<f64>();
        group.bench_function("kernel", |bencher| bencher.iter(sum));
    }
    let text = include_str!("../src/gas/data/equations.jsonl").lines().find(|line| line.contains("\"name\":\"nitrogen\""));
    let record = text.and_then(|text| serde_json::from_str::<PureRecord<MultiParameterRecord, ()>>(text).ok());
    if let Some(library) = record.and_then(|record| Parameters::new_pure(record).ok()).map(MultiParameter::new) {
        let vapour = Some(DensityInitialization::Vapor);
        let one = |t: f64, p: f64| State::new_npt(&&library, t * KELVIN, p * PASCAL, (), vapour).map(|state| state.density);
        let count = || points.iter().filter(|(t, p)| black_box(one(black_box(*t), black_box(*p))).is_ok()).count();
        group.bench_function("feos", |bencher| bencher.iter(count));
    }
    group.finish();
}

/// Temperatures of nitrogen from pressure and specific volume, over the range of the peers' W2: 220 to 420 K, 1 to 200 bar.
fn temperature(criterion: &mut Criterion) {
    let Some(real) = pure("nitrogen").and_then(|gas| RealGas::new(&gas).ok()) else { return };
    let state = |i: i32| {
        // Golden ratio and its square: spread as evenly as random numbers are meant to be.
        let (x, y) = ((f64::from(i) * 0.618_034).fract(), (f64::from(i) * 0.381_966_3).fract());
        let (t, p) = (220.0 + 200.0 * x, 1e5 + 199e5 * y);
        real.density_kg_m3(t, p).ok().map(|rho| (p, 1.0 / rho))
    };
    let states: Vec<(f64, f64)> = (0..10_000).filter_map(state).collect();
    let mut group = criterion.benchmark_group("nitrogen, T of 10 000 states from p and v");
    group.throughput(Throughput::Elements(states.len() as u64)).sample_size(10);
    let one = |(p, v): &(f64, f64)| real.solve((Property::Pressure, *p), (Property::Volume, *v)).ok().map(|state| state.t_k);
    group.bench_function("by the reference equation", |bencher| bencher.iter(|| states.iter().filter_map(one).sum::<f64>()));
    group.finish();
}

fn nitrogen(criterion: &mut Criterion) {
    let Some(gas) = pure("nitrogen") else { return };
    let Ok(real) = RealGas::new(&gas) else { return };
    criterion.bench_function("nitrogen, all properties and slopes from T and rho", |bencher| {
        bencher.iter(|| real.properties(black_box(300.0), black_box(50.0)));
    });
    criterion.bench_function("nitrogen, state from p and s", |bencher| {
        bencher.iter(|| real.solve((Property::Pressure, black_box(1e6)), (Property::Entropy, black_box(-500.0))));
    });
    criterion.bench_function("nitrogen, verdict on ten states", |bencher| {
        bencher.iter(|| {
            let judge = Judge::of(&gas)?;
            (0..10).map(|i| judge.errors(280.0 + f64::from(i), 1e6).ok().map(|one| one.density_percent)).sum::<Option<f64>>()
        });
    });
}

fn saturation(criterion: &mut Criterion) {
    for name in ["propane", "water"] {
        let Some(real) = pure(name).and_then(|gas| RealGas::new(&gas).ok()) else { continue };
        let Some(equation) = real.equation() else { continue };
        let (t_c, p_c) = (equation.constants().t_c_k, equation.constants().p_c_pa);
        criterion.bench_function(&format!("{name}, p_sat"), |bencher| bencher.iter(|| equation.saturation(black_box(0.8 * t_c))));
        criterion
            .bench_function(&format!("{name}, T_sat"), |bencher| bencher.iter(|| equation.saturation_temperature(black_box(0.3 * p_c))));
    }
}

fn mixture(criterion: &mut Criterion) {
    let natural = [("methane", 0.9), ("nitrogen", 0.02), ("carbon dioxide", 0.015), ("ethane", 0.045), ("propane", 0.02)];
    let kinds = [
        ("two components by GERG-2008", vec![("nitrogen", 0.79), ("oxygen", 0.21)]),
        ("five components by GERG-2008", natural.to_vec()),
        ("two components by Peng-Robinson", vec![("nitrogen", 0.9), ("ammonia", 0.1)]),
    ];
    for (name, parts) in kinds {
        let parts: Vec<_> = parts.iter().filter_map(|(name, x)| Some((find(name).ok()?, *x))).collect();
        let Some(real) = Gas::mixture(&parts, ShareBasis::Mole).ok().and_then(|gas| RealGas::new(&gas).ok()) else { continue };
        let Ok(rho) = real.density_kg_m3(350.0, 5e6) else { continue };
        criterion.bench_function(&format!("{name}, density"), |bencher| {
            bencher.iter(|| real.density_kg_m3(black_box(350.0), black_box(5e6)));
        });
        criterion.bench_function(&format!("{name}, all properties and slopes from T and rho"), |bencher| {
            bencher.iter(|| real.properties(black_box(350.0), black_box(rho)));
        });
    }
}

criterion_group!(benches, density, temperature, nitrogen, saturation, mixture);
criterion_main!(benches);
