//! Real gases: density by the reference equation (the work of the peers' W5), states, saturation, mixtures and the verdict:
//! `cargo bench --bench real_gas`.

use std::hint::black_box;

use criterion::{Criterion, criterion_group, criterion_main};
use gaswright::gas::eos::Property;
use gaswright::gas::verdict::Judge;
use gaswright::gas::{Gas, RealGas, ShareBasis, find};

fn pure(name: &str) -> Option<Gas> {
    find(name).ok().map(Gas::named)
}

/// The grid of the peers: 400 temperatures from 150 to 450 K, 250 pressures from 0.1 to 30 MPa.
fn grid() -> Vec<(f64, f64)> {
    (0..400).flat_map(|i| (0..250).map(move |j| (150.0 + 300.0 * f64::from(i) / 399.0, 1e5 + 29.9e6 * f64::from(j) / 249.0))).collect()
}

fn nitrogen(criterion: &mut Criterion) {
    let Some(gas) = pure("nitrogen") else { return };
    let Ok(real) = RealGas::new(&gas) else { return };
    let points = grid();
    criterion.bench_function("nitrogen, density of 100 000 states", |bencher| {
        bencher.iter(|| points.iter().filter_map(|(t, p)| real.density_kg_m3(black_box(*t), black_box(*p)).ok()).sum::<f64>());
    });
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
    let parts = [("nitrogen", 0.79), ("oxygen", 0.21)];
    let parts: Vec<_> = parts.iter().filter_map(|(name, x)| Some((find(name).ok()?, *x))).collect();
    let Some(real) = Gas::mixture(&parts, ShareBasis::Mole).ok().and_then(|gas| RealGas::new(&gas).ok()) else { return };
    criterion.bench_function("nitrogen with oxygen by GERG-2008, density", |bencher| {
        bencher.iter(|| real.density_kg_m3(black_box(300.0), black_box(5e6)));
    });
}

criterion_group!(benches, nitrogen, saturation, mixture);
criterion_main!(benches);
