//! Systems of equations with known solutions, written as sheets.
//!
//! Moré, Garbow, Hillstrom, ACM Transactions on Mathematical Software 7 (1981) 17-41, in the form of the MINPACK test driver for square systems
//! (Argonne, ANL-80-74). The solutions are printed to 14 figures and were confirmed by a Newton iteration with 40 digits.
//!
//! Tolerance: a root is wanted to 1e-10 of the largest component of its system, a hundred times what double precision leaves
//! where a system is well conditioned. Where it is not, the reason stands beside the number.

use super::worked_sheet::{WorkedSheet, told};

/// A tolerance for well-conditioned systems, relative to the largest component.
const CLOSE: f64 = 1e-10;

/// A sheet of the unknowns `x1`, `x2`, … with what stands behind each name, and relations.
fn system(unknowns: &[String], relations: &[String]) -> String {
    let mut sheet = String::from("---\ntitle: A system with a known solution\n---\n");
    for (at, rest) in unknowns.iter().enumerate() {
        sheet.push_str(&format!("unknown x{} {rest} \"Component {}\"\n", at + 1, at + 1));
    }
    for relation in relations {
        sheet.push_str(relation);
        sheet.push('\n');
    }
    let names: Vec<String> = (1..=unknowns.len()).map(|at| format!("x{at}")).collect();
    sheet.push_str(&format!("answer {}\n", names.join(", ")));
    sheet
}

/// The unknowns with a start each.
fn near(starts: &[f64]) -> Vec<String> {
    starts.iter().map(|start| format!("near {start}")).collect()
}

fn owned(relations: &[&str]) -> Vec<String> {
    relations.iter().map(|relation| (*relation).to_owned()).collect()
}

#[track_caller]
fn assert_root(worked: &WorkedSheet, root: &[f64], tolerance: f64) {
    let size = root.iter().fold(0f64, |size, component| size.max(component.abs())).max(1e-300);
    for (at, expected) in root.iter().enumerate() {
        worked.assert_within(&format!("x{}", at + 1), *expected, tolerance * size);
    }
    assert!(worked.largest_residual() < 1e-9, "largest residual {}", worked.largest_residual());
}

/// The start of the driver, and ten and a hundred times it.
fn starts_of_the_driver(start: &[f64]) -> [Vec<String>; 3] {
    [1.0, 10.0, 100.0].map(|factor| near(&start.iter().map(|component| component * factor).collect::<Vec<_>>()))
}

/// No. 1.
#[test]
fn rosenbrock() {
    let relations = owned(&["10 * (x2 - x1^2) = 0", "1 - x1 = 0"]);
    for unknowns in starts_of_the_driver(&[-1.2, 1.0]) {
        assert_root(&WorkedSheet::of(&system(&unknowns, &relations)), &[1.0, 1.0], CLOSE);
    }
}

/// No. 2. The derivative matrix is singular at the root, and two relations are squares: a residual at the limit of double precision, 1e-16 of
/// its terms, leaves the components known to 1e-8 only; ten times that is allowed.
#[test]
fn powell_singular() {
    let relations = owned(&["x1 + 10 * x2 = 0", "sqrt(5) * (x3 - x4) = 0", "(x2 - 2 * x3)^2 = 0", "sqrt(10) * (x1 - x4)^2 = 0"]);
    for unknowns in starts_of_the_driver(&[3.0, -1.0, 0.0, 1.0]) {
        let worked = WorkedSheet::of(&system(&unknowns, &relations));
        for name in ["x1", "x2", "x3", "x4"] {
            worked.assert_within(name, 0.0, 1e-7);
        }
    }
}

/// No. 3. The components differ by six orders of magnitude, so each is compared with its own size. The second relation holds the small
/// one beside 1, which leaves it 1e-16/1e-5 = 1e-11 of relative accuracy; ten times that is allowed. Without bounds the mirrored root
/// fits as well, and it is told.
#[test]
fn powell_badly_scaled() {
    let relations = owned(&["1e4 * x1 * x2 - 1 = 0", "exp(-x1) + exp(-x2) - 1.0001 = 0"]);
    let root = [1.098_159_329_699_8e-5, 9.106_146_739_866_5];
    let assert_both = |worked: &WorkedSheet| {
        worked.assert_within("x1", root[0], 1e-10 * root[0]);
        worked.assert_within("x2", root[1], 1e-10 * root[1]);
    };
    for unknowns in starts_of_the_driver(&[0.0, 1.0]) {
        let worked = WorkedSheet::of(&system(&unknowns, &relations));
        assert_both(&worked);
        let told = worked.found("several-roots");
        assert!(told.len() == 1 && told[0].contains("9.1061"), "{told:?}");
    }
    let bounded = owned(&["within 0 .. 1", "within 1 .. 100"]);
    let worked = WorkedSheet::of(&system(&bounded, &relations));
    assert_both(&worked);
    assert!(worked.found("several-roots").is_empty());
}

fn wood() -> Vec<String> {
    owned(&[
        "-200 * x1 * (x2 - x1^2) - (1 - x1) = 0",
        "200 * (x2 - x1^2) + 20.2 * (x2 - 1) + 19.8 * (x4 - 1) = 0",
        "-180 * x3 * (x4 - x3^2) - (1 - x3) = 0",
        "180 * (x4 - x3^2) + 20.2 * (x4 - 1) + 19.8 * (x2 - 1) = 0",
    ])
}

/// The second root of no. 4, where its standard start leads.
const WOOD_SECOND: [f64; 4] = [-0.967_974_024_937_59, 0.947_139_140_817_84, -0.969_516_310_331_59, 0.951_247_665_792_33];

/// No. 4. The start of the driver leads to the second root; bounds lead to either.
#[test]
fn wood_by_its_start_and_by_bounds() {
    let worked = WorkedSheet::of(&system(&near(&[-3.0, -1.0, -3.0, -1.0]), &wood()));
    assert_root(&worked, &WOOD_SECOND, CLOSE);
    let first = WorkedSheet::of(&system(&owned(&["within 0 .. 2"; 4]), &wood()));
    assert_root(&first, &[1.0; 4], CLOSE);
    let second = owned(&["within -2 .. -0.5", "within 0 .. 2", "within -2 .. -0.5", "within 0 .. 2"]);
    assert_root(&WorkedSheet::of(&system(&second, &wood())), &WOOD_SECOND, CLOSE);
}

/// No. 4 with bounds that hold both printed roots, and the saddle between them: nothing is picked, all are told.
#[test]
fn wood_with_room_for_several_roots_gives_none_of_them() {
    let unknowns = owned(&["within -2 .. 2", "within 0 .. 2", "within -2 .. 2", "within 0 .. 2"]);
    let solved = gaswright::solve(&system(&unknowns, &wood()));
    assert!(solved.solution.is_none());
    let finding = solved.findings.iter().find(|finding| finding.code == "several-roots");
    let finding = finding.unwrap_or_else(|| panic!("{}", told(&solved)));
    let roots_of_a_component = [("x1", ["1.0000", "-0.96797"]), ("x3", ["1.0000", "-0.96952"])];
    let named = roots_of_a_component
        .iter()
        .any(|(name, roots)| finding.message.contains(name) && roots.iter().all(|root| finding.message.contains(root)));
    assert!(named, "{}", finding.message);
}

/// No. 5, its angle written by half angles, which is the angle of the driver wherever x2 is not negative. The start of the driver lies on
/// the far side of the valley.
#[test]
fn helical_valley() {
    let relations =
        owned(&["10 * (x3 - 10 * 2 * atan(x2 / (x1 + sqrt(x1^2 + x2^2))) / (2 * pi)) = 0", "10 * (sqrt(x1^2 + x2^2) - 1) = 0", "x3 = 0"]);
    let starts = [near(&[-1.0, 0.0, 0.0]), near(&[-10.0, 0.0, 0.0]), near(&[-100.0, 0.0, 0.0])];
    for unknowns in starts {
        assert_root(&WorkedSheet::of(&system(&unknowns, &relations)), &[1.0, 0.0, 0.0], CLOSE);
    }
}

/// No. 6: sums over 29 points, each with a sum and a term of its own, in the form of the gradient.
///
/// The matrix of its derivatives has a condition of some 1e8 for six unknowns, so a residual of 1e-16 leaves a relative 1e-8 at worst.
#[test]
fn watson() {
    const N: usize = 6;
    let mut relations = Vec::new();
    for i in 1..=29 {
        let powers: Vec<String> = (1..=N).map(|j| format!("x{j} * ({i} / 29)^{}", j - 1)).collect();
        relations.push(format!("let s_{i} = {} \"Sum at point {i}\"", powers.join(" + ")));
        let slopes: Vec<String> = (2..=N).map(|j| format!("{} * x{j} * ({i} / 29)^{}", j - 1, j - 2)).collect();
        relations.push(format!("let f_{i} = {} - s_{i}^2 - 1 \"Term at point {i}\"", slopes.join(" + ")));
    }
    for k in 1..=N {
        let mut terms: Vec<String> = (1..=29)
            .map(|i| {
                if k == 1 {
                    format!("f_{i} * (-2 * s_{i})")
                } else {
                    format!("f_{i} * ({} * ({i} / 29)^{} - 2 * s_{i} * ({i} / 29)^{})", k - 1, k - 2, k - 1)
                }
            })
            .collect();
        match k {
            1 => terms.push("x1 - 2 * x1 * (x2 - x1^2 - 1)".to_owned()),
            2 => terms.push("x2 - x1^2 - 1".to_owned()),
            _ => {}
        }
        relations.push(format!("{} = 0", terms.join(" + ")));
    }
    let root = [
        -0.015_725_086_401_458,
        1.012_434_869_369_1,
        -0.232_991_625_956_74,
        1.260_430_087_799_6,
        -1.513_728_922_722_3,
        0.992_996_432_431_13,
    ];
    let worked = WorkedSheet::of(&system(&near(&[0.0; N]), &relations));
    assert_root(&worked, &root, 1e-8);
}

fn brown(n: usize) -> Vec<String> {
    let names: Vec<String> = (1..=n).map(|k| format!("x{k}")).collect();
    let mut relations: Vec<String> = (1..n).map(|k| format!("x{k} + {} - {} = 0", names.join(" + "), n + 1)).collect();
    relations.push(format!("{} - 1 = 0", names.join(" * ")));
    relations
}

/// The second root of no. 8.
fn brown_second() -> Vec<f64> {
    let mut root = vec![0.979_430_303_349_86; 9];
    root.push(1.205_696_966_501_4);
    root
}

/// No. 8. Its starts lead to one printed root or the other, never to a number that is neither; bounds lead to either. At the root of all
/// ones the derivative matrix is nearly singular, so that twice the digits of the residual are lost: 1e-8.
#[test]
fn brown_almost_linear() {
    for unknowns in starts_of_the_driver(&[0.5; 10]) {
        let worked = WorkedSheet::of(&system(&unknowns, &brown(10)));
        let root = if worked.si("x10") > 1.1 { brown_second() } else { vec![1.0; 10] };
        assert_root(&worked, &root, 1e-8);
    }
    let mut ones = owned(&["within 0.99 .. 1.01"; 9]);
    ones.push("within 0.9 .. 1.1".to_owned());
    assert_root(&WorkedSheet::of(&system(&ones, &brown(10))), &[1.0; 10], 1e-8);
    let mut second = owned(&["within 0.97 .. 0.99"; 9]);
    second.push("within 1.1 .. 1.3".to_owned());
    assert_root(&WorkedSheet::of(&system(&second, &brown(10))), &brown_second(), 1e-8);
}

/// No. 8 with bounds that hold both printed roots: nothing is picked, both are told.
#[test]
fn brown_with_room_for_both_roots_gives_none_of_them() {
    let solved = gaswright::solve(&system(&owned(&["within 0.5 .. 1.5"; 10]), &brown(10)));
    assert!(solved.solution.is_none());
    let told = told(&solved);
    assert!(told.contains("several-roots") && told.contains("1.0000") && (told.contains("1.2057") || told.contains("0.97943")), "{told}");
}

/// No. 9, with h = 1/11 and the start kh(kh - 1).
#[test]
fn discrete_boundary_value() {
    let relations: Vec<String> = (1..=10)
        .map(|k| {
            let before = if k > 1 { format!(" - x{}", k - 1) } else { String::new() };
            let after = if k < 10 { format!(" - x{}", k + 1) } else { String::new() };
            format!("2 * x{k}{before}{after} + (1 / 11)^2 * (x{k} + {k} / 11 + 1)^3 / 2 = 0")
        })
        .collect();
    let start: Vec<f64> = (1..=10).map(|k| f64::from(k) / 11.0 * (f64::from(k) / 11.0 - 1.0)).collect();
    let root = [
        -0.043_164_982_518_765,
        -0.081_577_156_535_387,
        -0.114_485_714_380_53,
        -0.140_973_576_862_6,
        -0.159_908_696_181_98,
        -0.169_877_202_312_77,
        -0.169_089_983_781_21,
        -0.155_249_535_221_83,
        -0.125_355_891_678_93,
        -0.075_416_533_685_892,
    ];
    for unknowns in starts_of_the_driver(&start) {
        assert_root(&WorkedSheet::of(&system(&unknowns, &relations)), &root, CLOSE);
    }
}

/// No. 13. The system may be followed from its first component to its last, which multiplies an error of the first by some 1e4: 1e-10
/// leaves room for that.
#[test]
fn broyden_tridiagonal() {
    let relations: Vec<String> = (1..=10)
        .map(|k| {
            let before = if k > 1 { format!(" - x{}", k - 1) } else { String::new() };
            let after = if k < 10 { format!(" - 2 * x{}", k + 1) } else { String::new() };
            format!("(3 - 2 * x{k}) * x{k}{before}{after} + 1 = 0")
        })
        .collect();
    let root = [
        -0.570_722_132_011_22,
        -0.681_806_949_984_28,
        -0.702_210_076_017_66,
        -0.705_510_629_895_08,
        -0.704_906_155_728_74,
        -0.701_496_607_029_85,
        -0.691_889_322_354_8,
        -0.665_796_514_405_85,
        -0.596_035_109_026_37,
        -0.416_412_257_528_69,
    ];
    for unknowns in starts_of_the_driver(&[-1.0; 10]) {
        let worked = WorkedSheet::of(&system(&unknowns, &relations));
        assert_root(&worked, &root, CLOSE);
        // By bisection with 60 digits the system has another real root, whose x1 is 1.8326. Near -0.45208 and 1.5746 the chain of its
        // relations only comes closest to zero: 1.3 is left of the last one.
        for told in worked.found("several-roots") {
            assert!(told.contains("1.8326") && !told.contains("0.45208") && !told.contains("1.5746"), "{told}");
        }
    }
}
