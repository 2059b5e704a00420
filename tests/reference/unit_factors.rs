//! Every unit name against its exact definition.
//!
//! Definitions: NIST Special Publication 811, 2008 edition (A. Thompson, B. N. Taylor), appendix B with its footnotes, unless
//! the group says otherwise. The factors are composed here of the exact numbers of the definitions, in double precision: at most eight
//! roundings of 1.1e-16, so that 1e-12 leaves room for nothing but the rounding of both sides.

use gaswright::units::{Dimension, ReferenceVolume, parse, registry};

const TOLERANCE: f64 = 1e-12;

// Exact definitions: international yard and pound (1959), conventional values, International Table calorie (1956).
const INCH: f64 = 0.0254;
const FOOT: f64 = 0.3048;
const YARD: f64 = 0.9144;
const MILE: f64 = 1609.344;
const NAUTICAL_MILE: f64 = 1852.0;
const POUND: f64 = 0.453_592_37;
const GRAIN: f64 = POUND / 7000.0;
const GRAVITY: f64 = 9.806_65;
const POUND_FORCE: f64 = POUND * GRAVITY;
const ATMOSPHERE: f64 = 101_325.0;
const WATER_COLUMN: f64 = 1000.0 * GRAVITY;
const MERCURY_COLUMN: f64 = 13_595.1 * GRAVITY;
const CALORIE_IT: f64 = 4.1868;
const CALORIE_TH: f64 = 4.184;
/// The Btu heats a pound by a degree Fahrenheit where the calorie heats a gram by a kelvin.
const BTU_IT: f64 = CALORIE_IT * 1000.0 * POUND * 5.0 / 9.0;
const BTU_TH: f64 = CALORIE_TH * 1000.0 * POUND * 5.0 / 9.0;
const GALLON_US: f64 = 231.0 * INCH * INCH * INCH;
const GALLON_UK: f64 = 4.546_09e-3;
const PI: f64 = std::f64::consts::PI;

/// Source, SI unit, and the names with their factors to it.
type Group = (&'static str, &'static str, &'static [(&'static str, f64)]);

const GROUPS: &[Group] = &[
    (
        "section 4.1 and table 5 (prefixes)",
        "m",
        &[("m", 1.0), ("km", 1e3), ("dm", 1e-1), ("cm", 1e-2), ("mm", 1e-3), ("um", 1e-6), ("nm", 1e-9), ("pm", 1e-12)],
    ),
    (
        "appendix B.6 (international foot) and B.8",
        "m",
        &[
            ("inch", INCH),
            ("ft", FOOT),
            ("yd", YARD),
            ("mi", MILE),
            ("nmi", NAUTICAL_MILE),
            ("mil", INCH / 1000.0),
            ("uinch", INCH / 1e6),
            ("angstrom", 1e-10),
        ],
    ),
    ("appendix B.8, hectare", "m2", &[("ha", 1e4)]),
    (
        "appendix B.8, darcy: 1 cm2 through which 1 cm3/s of 1 cP flows at 1 atm/cm",
        "m2",
        &[("darcy", 1e-3 * 1e-4 / ATMOSPHERE), ("mdarcy", 1e-6 * 1e-4 / ATMOSPHERE)],
    ),
    (
        "table 6, litre, and table 5",
        "m3",
        &[
            ("L", 1e-3),
            ("kL", 1.0),
            ("hL", 1e-1),
            ("daL", 1e-2),
            ("dL", 1e-4),
            ("cL", 1e-5),
            ("mL", 1e-6),
            ("uL", 1e-9),
            ("nL", 1e-12),
            ("pL", 1e-15),
        ],
    ),
    (
        "appendix B.8, gallon (U.S.) 231 in3 and its parts, barrel 42 gallons, gallon (Imperial) and its parts",
        "m3",
        &[
            ("gal_us", GALLON_US),
            ("qt_us", GALLON_US / 4.0),
            ("pt_us", GALLON_US / 8.0),
            ("floz_us", GALLON_US / 128.0),
            ("bbl", 42.0 * GALLON_US),
            ("gal_uk", GALLON_UK),
            ("qt_uk", GALLON_UK / 4.0),
            ("pt_uk", GALLON_UK / 8.0),
            ("floz_uk", GALLON_UK / 160.0),
        ],
    ),
    (
        "section 4.1, table 5, table 6 (metric ton)",
        "kg",
        &[("kg", 1.0), ("g", 1e-3), ("dag", 1e-2), ("mg", 1e-6), ("ug", 1e-9), ("ng", 1e-12), ("pg", 1e-15), ("t", 1e3)],
    ),
    (
        "appendix B.8, pound avoirdupois and what is made of it; slug: 1 lbf s2/ft",
        "kg",
        &[
            ("lb", POUND),
            ("klb", 1000.0 * POUND),
            ("oz", POUND / 16.0),
            ("grain", GRAIN),
            ("oz_troy", 480.0 * GRAIN),
            ("slug", POUND_FORCE / FOOT),
            ("ton_us", 2000.0 * POUND),
            ("ton_uk", 2240.0 * POUND),
        ],
    ),
    (
        "section 4.1, table 5, table 6; a week is 7 d",
        "s",
        &[
            ("s", 1.0),
            ("ms", 1e-3),
            ("us", 1e-6),
            ("ns", 1e-9),
            ("ps", 1e-12),
            ("ks", 1e3),
            ("min", 60.0),
            ("h", 3600.0),
            ("d", 86_400.0),
            ("week", 604_800.0),
        ],
    ),
    (
        "table 3, hertz; rpm as rotational frequency, ISO 80000-3:2019, item 3-17",
        "1/s",
        &[("Hz", 1.0), ("uHz", 1e-6), ("mHz", 1e-3), ("kHz", 1e3), ("MHz", 1e6), ("GHz", 1e9), ("THz", 1e12), ("rpm", 1.0 / 60.0)],
    ),
    (
        "table 3, becquerel; appendix B.8, curie",
        "1/s",
        &[
            ("Bq", 1.0),
            ("kBq", 1e3),
            ("MBq", 1e6),
            ("GBq", 1e9),
            ("TBq", 1e12),
            ("Ci", 3.7e10),
            ("mCi", 3.7e7),
            ("uCi", 3.7e4),
            ("nCi", 37.0),
        ],
    ),
    ("appendix B.8, mile per hour, knot (nautical mile per hour)", "m/s", &[("mph", MILE / 3600.0), ("knot", NAUTICAL_MILE / 3600.0)]),
    (
        "table 3, newton",
        "N",
        &[("N", 1.0), ("GN", 1e9), ("MN", 1e6), ("kN", 1e3), ("daN", 10.0), ("cN", 1e-2), ("mN", 1e-3), ("uN", 1e-6), ("nN", 1e-9)],
    ),
    (
        "appendix B.8, dyne, kilogram-force, pound-force, kip, ounce-force, ton-force, poundal",
        "N",
        &[
            ("dyn", 1e-5),
            ("kgf", GRAVITY),
            ("gf", GRAVITY / 1000.0),
            ("tf", GRAVITY * 1000.0),
            ("lbf", POUND_FORCE),
            ("klbf", 1000.0 * POUND_FORCE),
            ("kip", 1000.0 * POUND_FORCE),
            ("ozf", POUND_FORCE / 16.0),
            ("tonf_us", 2000.0 * POUND_FORCE),
            ("tonf_uk", 2240.0 * POUND_FORCE),
            ("pdl", POUND * FOOT),
        ],
    ),
    (
        "table 3, pascal; bar",
        "Pa",
        &[
            ("Pa", 1.0),
            ("TPa", 1e12),
            ("GPa", 1e9),
            ("MPa", 1e6),
            ("kPa", 1e3),
            ("hPa", 1e2),
            ("daPa", 1e1),
            ("mPa", 1e-3),
            ("uPa", 1e-6),
            ("nPa", 1e-9),
            ("pPa", 1e-12),
            ("bar", 1e5),
            ("kbar", 1e8),
            ("dbar", 1e4),
            ("mbar", 1e2),
            ("ubar", 1e-1),
        ],
    ),
    (
        "appendix B.8, standard atmosphere, torr (atm/760)",
        "Pa",
        &[
            ("atm", ATMOSPHERE),
            ("matm", ATMOSPHERE / 1e3),
            ("uatm", ATMOSPHERE / 1e6),
            ("torr", ATMOSPHERE / 760.0),
            ("mtorr", ATMOSPHERE / 760_000.0),
        ],
    ),
    (
        "appendix B.8, pound-force per square inch and per square foot, kip per square inch; ounce-force per square inch",
        "Pa",
        &[
            ("psi", POUND_FORCE / (INCH * INCH)),
            ("psf", POUND_FORCE / (FOOT * FOOT)),
            ("ksi", 1000.0 * POUND_FORCE / (INCH * INCH)),
            ("osi", POUND_FORCE / 16.0 / (INCH * INCH)),
        ],
    ),
    (
        "appendix B.8, conventional columns of water (1000 kg/m3) and mercury (13 595.1 kg/m3)",
        "Pa",
        &[
            ("mmH2O", WATER_COLUMN / 1000.0),
            ("cmH2O", WATER_COLUMN / 100.0),
            ("mH2O", WATER_COLUMN),
            ("inH2O", WATER_COLUMN * INCH),
            ("ftH2O", WATER_COLUMN * FOOT),
            ("umHg", MERCURY_COLUMN / 1e6),
            ("mmHg", MERCURY_COLUMN / 1000.0),
            ("cmHg", MERCURY_COLUMN / 100.0),
            ("inHg", MERCURY_COLUMN * INCH),
        ],
    ),
    (
        "table 3, joule; watt hour",
        "J",
        &[
            ("J", 1.0),
            ("EJ", 1e18),
            ("PJ", 1e15),
            ("TJ", 1e12),
            ("GJ", 1e9),
            ("MJ", 1e6),
            ("kJ", 1e3),
            ("mJ", 1e-3),
            ("uJ", 1e-6),
            ("nJ", 1e-9),
            ("pJ", 1e-12),
            ("TWh", 3.6e15),
            ("GWh", 3.6e12),
            ("MWh", 3.6e9),
            ("kWh", 3.6e6),
            ("Wh", 3.6e3),
            ("mWh", 3.6),
            ("erg", 1e-7),
        ],
    ),
    (
        "appendix B.8, footnote on the International Table calorie and Btu",
        "J",
        &[
            ("cal", CALORIE_IT),
            ("kcal", 1e3 * CALORIE_IT),
            ("Mcal", 1e6 * CALORIE_IT),
            ("Gcal", 1e9 * CALORIE_IT),
            ("Tcal", 1e12 * CALORIE_IT),
            ("Btu", BTU_IT),
            ("kBtu", 1e3 * BTU_IT),
            ("MMBtu", 1e6 * BTU_IT),
        ],
    ),
    ("appendix B.8, thermochemical calorie and Btu", "J", &[("cal_th", CALORIE_TH), ("kcal_th", 1e3 * CALORIE_TH), ("Btu_th", BTU_TH)]),
    (
        "SI Brochure, 9th edition (2019): elementary charge",
        "J",
        &[("eV", 1.602_176_634e-19), ("keV", 1.602_176_634e-16), ("MeV", 1.602_176_634e-13)],
    ),
    (
        "table 3, watt; volt ampere",
        "W",
        &[
            ("W", 1.0),
            ("TW", 1e12),
            ("GW", 1e9),
            ("MW", 1e6),
            ("kW", 1e3),
            ("mW", 1e-3),
            ("uW", 1e-6),
            ("nW", 1e-9),
            ("pW", 1e-12),
            ("VA", 1.0),
            ("kVA", 1e3),
            ("MVA", 1e6),
        ],
    ),
    (
        "appendix B.8, horsepower (550 ft lbf/s), metric (75 kgf m/s), electric (746 W); ton of refrigeration (12 000 Btu_IT/h)",
        "W",
        &[
            ("hp", 550.0 * FOOT * POUND_FORCE),
            ("hp_metric", 75.0 * GRAVITY),
            ("hp_electric", 746.0),
            ("ton_refrigeration", 12_000.0 * BTU_IT / 3600.0),
        ],
    ),
    (
        "section 4.1, table 5; pound-mole: as many as in a mole, times pound over gram",
        "mol",
        &[
            ("mol", 1.0),
            ("kmol", 1e3),
            ("mmol", 1e-3),
            ("umol", 1e-6),
            ("nmol", 1e-9),
            ("pmol", 1e-12),
            ("fmol", 1e-15),
            ("lbmol", POUND * 1000.0),
        ],
    ),
    (
        "section 4.1, table 5; appendix B.8, kelvin and its relatives",
        "K",
        &[("K", 1.0), ("kK", 1e3), ("mK", 1e-3), ("uK", 1e-6), ("degC", 1.0), ("degF", 5.0 / 9.0), ("degR", 5.0 / 9.0)],
    ),
    (
        "appendix B.8, poise; reyn: lbf s/in2",
        "Pa.s",
        &[("P", 0.1), ("cP", 1e-3), ("mP", 1e-4), ("uP", 1e-7), ("reyn", POUND_FORCE / (INCH * INCH))],
    ),
    ("appendix B.8, stokes", "m2/s", &[("St", 1e-4), ("cSt", 1e-6)]),
    ("section 7.10, percent and parts per million", "", &[("%", 1e-2), ("ppm", 1e-6), ("ppb", 1e-9)]),
    (
        "table 6, degree, minute, second; appendix B.8, gon; table 3, radian",
        "",
        &[
            ("rad", 1.0),
            ("mrad", 1e-3),
            ("urad", 1e-6),
            ("deg", PI / 180.0),
            ("arcmin", PI / 10_800.0),
            ("arcsec", PI / 648_000.0),
            ("gon", PI / 200.0),
        ],
    ),
    ("section 4.1, table 5", "A", &[("A", 1.0), ("kA", 1e3), ("mA", 1e-3), ("uA", 1e-6), ("nA", 1e-9), ("pA", 1e-12)]),
    ("section 4.1, table 5", "cd", &[("cd", 1.0), ("mcd", 1e-3)]),
    ("table 3, coulomb, as ampere hour", "A.s", &[("Ah", 3600.0), ("mAh", 3.6)]),
    ("table 3, volt", "V", &[("V", 1.0), ("MV", 1e6), ("kV", 1e3), ("mV", 1e-3), ("uV", 1e-6), ("nV", 1e-9)]),
    ("table 3, ohm", "Ohm", &[("Ohm", 1.0), ("TOhm", 1e12), ("GOhm", 1e9), ("MOhm", 1e6), ("kOhm", 1e3), ("mOhm", 1e-3), ("uOhm", 1e-6)]),
    ("table 3, siemens", "S", &[("S", 1.0), ("mS", 1e-3), ("uS", 1e-6), ("nS", 1e-9), ("pS", 1e-12)]),
    ("table 3, farad", "A.s/V", &[("mF", 1e-3), ("uF", 1e-6), ("nF", 1e-9), ("pF", 1e-12)]),
    ("table 3, henry", "V.s/A", &[("mH", 1e-3), ("uH", 1e-6), ("nH", 1e-9)]),
];

/// Reference volumes: their volume, since the conditions are those of a sheet.
const REFERENCE_VOLUMES: [(&str, ReferenceVolume, f64); 3] =
    [("Nm3", ReferenceVolume::Normal, 1.0), ("Sm3", ReferenceVolume::Standard, 1.0), ("scf", ReferenceVolume::Scf, FOOT * FOOT * FOOT)];

fn agree(found: f64, expected: f64) -> bool {
    ((found - expected) / expected).abs() <= TOLERANCE
}

#[test]
fn every_factor_is_that_of_the_definition() {
    for (source, si_unit, names) in GROUPS {
        let dimension = if si_unit.is_empty() { Dimension::NONE } else { parse(si_unit).unwrap().dimension };
        for (name, factor) in *names {
            let unit = parse(name).unwrap_or_else(|error| panic!("{name}: {error:?}"));
            assert!(agree(unit.factor, *factor), "{name}: {:e}, by definition {factor:e} ({source})", unit.factor);
            assert_eq!(unit.dimension, dimension, "{name} ({source})");
            assert!(unit.references.is_empty(), "{name}");
        }
    }
}

#[test]
fn every_name_has_exactly_one_definition() {
    let mut defined: Vec<&str> = GROUPS.iter().flat_map(|(_, _, names)| names.iter().map(|(name, _)| *name)).collect();
    defined.extend(REFERENCE_VOLUMES.iter().map(|(name, _, _)| *name));
    defined.sort_unstable();
    let names: Vec<&str> = registry().names().collect();
    assert_eq!(defined, names);
}

#[test]
fn scales_have_their_zero_and_all_others_none() {
    // NIST SP 811, appendix B.8: t/K = t/degC + 273.15; t/K = (t/degF + 459.67)/1.8.
    for name in registry().names() {
        let offset = parse(name).unwrap().offset;
        match name {
            "degC" => assert!(agree(offset, 273.15)),
            "degF" => assert!(agree(offset, 459.67 / 1.8)),
            _ => assert_eq!(offset, 0.0, "{name}"),
        }
    }
}

#[test]
fn reference_volumes_have_the_factor_of_their_volume() {
    for (name, reference, volume) in REFERENCE_VOLUMES {
        let unit = parse(name).unwrap();
        assert!(agree(unit.factor, volume), "{name}");
        assert_eq!(unit.dimension, Dimension::AMOUNT);
        assert_eq!(unit.references, [(reference, 1.into())]);
    }
}

#[test]
fn compound_units_multiply_out() {
    let compounds: &[(&str, f64)] = &[
        ("kJ/(kg.K)", 1000.0),
        ("Btu/(lb.degF)", 4186.8),
        ("Btu/(h.ft2.degF)", BTU_IT / (3600.0 * FOOT * FOOT * 5.0 / 9.0)),
        ("kcal/(kg.degC)", 4186.8),
        ("lb/ft3", POUND / (FOOT * FOOT * FOOT)),
        ("ft3/min", FOOT * FOOT * FOOT / 60.0),
        ("m3/(h.bar)", 1.0 / 3.6e8),
        ("kgf/cm2", GRAVITY * 1e4),
        ("lbf/in2", POUND_FORCE / (INCH * INCH)),
        ("in3", INCH * INCH * INCH),
        ("kg/kmol", 1e-3),
        ("lb/lbmol", 1e-3),
        ("mPa.s", 1e-3),
        ("mbar.L/s", 0.1),
        ("psi.ft3/(lbmol.degR)", POUND_FORCE / (INCH * INCH) * FOOT * FOOT * FOOT / (POUND * 1000.0 * 5.0 / 9.0)),
    ];
    for (text, factor) in compounds {
        assert!(agree(parse(text).unwrap().factor, *factor), "{text}");
    }
}

/// Factors as NIST SP 811, appendix B.8, prints them, with seven digits: they show that the definitions above are the meant ones.
const PRINTED: &[(&str, &str)] = &[
    ("psi", "6.894757e3"),
    ("ksi", "6.894757e6"),
    ("psf", "4.788026e1"),
    ("torr", "1.333224e2"),
    ("mmHg", "1.333224e2"),
    ("cmHg", "1.333224e3"),
    ("inHg", "3.386389e3"),
    ("inH2O", "2.490889e2"),
    ("ftH2O", "2.989067e3"),
    ("mmH2O", "9.80665e0"),
    ("lb", "4.535924e-1"),
    ("oz", "2.834952e-2"),
    ("oz_troy", "3.110348e-2"),
    ("grain", "6.479891e-5"),
    ("slug", "1.459390e1"),
    ("ton_us", "9.071847e2"),
    ("ton_uk", "1.016047e3"),
    ("lbf", "4.448222e0"),
    ("kip", "4.448222e3"),
    ("ozf", "2.780139e-1"),
    ("tonf_us", "8.896443e3"),
    ("pdl", "1.382550e-1"),
    ("Btu", "1.055056e3"),
    ("Btu_th", "1.054350e3"),
    ("hp", "7.456999e2"),
    ("hp_metric", "7.354988e2"),
    ("ton_refrigeration", "3.516853e3"),
    ("ft3", "2.831685e-2"),
    ("in3", "1.638706e-5"),
    ("yd3", "7.645549e-1"),
    ("gal_us", "3.785412e-3"),
    ("qt_us", "9.463529e-4"),
    ("pt_us", "4.731765e-4"),
    ("floz_us", "2.957353e-5"),
    ("gal_uk", "4.54609e-3"),
    ("floz_uk", "2.841306e-5"),
    ("bbl", "1.589873e-1"),
    ("darcy", "9.869233e-13"),
    ("knot", "5.144444e-1"),
    ("mph", "4.4704e-1"),
    ("ft.lbf", "1.355818e0"),
    ("Btu/h", "2.930711e-1"),
    ("Btu/(h.ft2.degF)", "5.678263e0"),
    ("Btu/(h.ft.degF)", "1.730735e0"),
    ("Btu/ft3", "3.725895e4"),
    ("lb/ft3", "1.601846e1"),
    ("lb/(ft.h)", "4.133789e-4"),
    ("ft3/min", "4.719474e-4"),
    ("gal_us/min", "6.309020e-5"),
    ("lb/h", "1.259979e-4"),
];

#[test]
fn factors_round_to_the_printed_ones() {
    for (text, printed) in PRINTED {
        let (mantissa, exponent) = printed.split_once('e').unwrap();
        let unit_of_last_digit: f64 = format!("1e{}", exponent.parse::<i32>().unwrap() - (mantissa.len() as i32 - 2)).parse().unwrap();
        let off = (parse(text).unwrap().factor - printed.parse::<f64>().unwrap()) / unit_of_last_digit;
        // Half a unit of the last digit, and the rounding of a double in units of it: hp_metric is a tie.
        assert!(off.abs() <= 0.5 + 1e-6, "{text} is off {printed} by {off} of its last digit");
    }
}
