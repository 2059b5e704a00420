//! Atomic weights of the elements that occur in gases, and the molar mass of a formula.

/// The standard atomic weight of one element.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct AtomicWeight {
    /// Symbol of the element, `He`. `D` stands for the isotope hydrogen-2.
    pub symbol: &'static str,
    /// Name of the element.
    pub name: &'static str,
    /// Abridged standard atomic weight: the mass of one mole of atoms, g/mol.
    pub weight_g_mol: f64,
    /// Its stated uncertainty, g/mol: normal terrestrial material lies within it.
    pub uncertainty_g_mol: f64,
}

const fn weight(symbol: &'static str, name: &'static str, weight_g_mol: f64, uncertainty_g_mol: f64) -> AtomicWeight {
    AtomicWeight { symbol, name, weight_g_mol, uncertainty_g_mol }
}

/// Where the atomic weights come from.
pub const ATOMIC_WEIGHT_SOURCE: &str =
    "CIAAW, Standard atomic weights of the elements 2021, abridged (Prohaska et al. 2022, Pure Appl. Chem. 94)";

/// Source of all rows but `D`: [`ATOMIC_WEIGHT_SOURCE`]. The wide interval of argon covers all terrestrial sources; argon made from
/// air has 39.948(1), 5e-5 less.
///
/// `D` is the isotopic mass of hydrogen-2 (atomic mass evaluation 2020, from memory; the molar mass 4.028204 g/mol of D2 that
/// compilations print agrees with it).
static WEIGHTS: [AtomicWeight; 17] = [
    weight("H", "hydrogen", 1.0080, 0.0002),
    weight("D", "deuterium", 2.014_101_778, 0.000_000_001),
    weight("He", "helium", 4.002_602, 0.000_002),
    weight("C", "carbon", 12.011, 0.002),
    weight("N", "nitrogen", 14.007, 0.001),
    weight("O", "oxygen", 15.999, 0.001),
    weight("F", "fluorine", 18.998_403_162, 0.000_000_005),
    weight("Ne", "neon", 20.1797, 0.0006),
    weight("Si", "silicon", 28.085, 0.001),
    weight("P", "phosphorus", 30.973_761_998, 0.000_000_005),
    weight("S", "sulfur", 32.06, 0.02),
    weight("Cl", "chlorine", 35.45, 0.01),
    weight("Ar", "argon", 39.95, 0.16),
    weight("Br", "bromine", 79.904, 0.003),
    weight("Kr", "krypton", 83.798, 0.002),
    weight("I", "iodine", 126.904_47, 0.000_03),
    weight("Xe", "xenon", 131.293, 0.006),
];

/// All atomic weights, in the order of the elements.
#[must_use]
pub fn atomic_weights() -> &'static [AtomicWeight] {
    &WEIGHTS
}

/// The atomic weight of an element by its symbol.
#[must_use]
pub fn atomic_weight(symbol: &str) -> Option<&'static AtomicWeight> {
    WEIGHTS.iter().find(|element| element.symbol == symbol)
}

/// What a formula says: how heavy a molecule is and of how many atoms.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Molecule {
    /// Molar mass, kg/mol: the sum of the atomic weights.
    pub molar_mass_kg_mol: f64,
    /// Its uncertainty, kg/mol: the sum of those of the atomic weights, each as stated.
    pub uncertainty_kg_mol: f64,
    /// Atoms of one molecule.
    pub atoms: u32,
}

/// Reads a formula without brackets, such as `C2H4F2`.
///
/// `None` for an empty formula, an element that has no weight here, a count of zero, or anything that is not a formula.
///
/// ```
/// use gaswright::gas::atomic_weight::molecule;
/// let nitrogen = molecule("N2").unwrap();
/// assert_eq!((nitrogen.molar_mass_kg_mol, nitrogen.atoms), (0.028014, 2));
/// assert!(molecule("Qq3").is_none());
/// ```
#[must_use]
pub fn molecule(formula: &str) -> Option<Molecule> {
    let mut rest = formula;
    let (mut grams, mut uncertainty) = (0.0, 0.0);
    let mut atoms = 0_u32;
    while !rest.is_empty() {
        let length = if rest.as_bytes().get(1).is_some_and(u8::is_ascii_lowercase) { 2 } else { 1 };
        let element = atomic_weight(rest.get(..length)?)?;
        rest = &rest[length..];
        let digits = rest.bytes().take_while(u8::is_ascii_digit).count();
        let count: u16 = if digits == 0 { 1 } else { rest[..digits].parse().ok()? };
        if count == 0 {
            return None;
        }
        rest = &rest[digits..];
        grams += element.weight_g_mol * f64::from(count);
        uncertainty += element.uncertainty_g_mol * f64::from(count);
        atoms = atoms.checked_add(count.into())?;
    }
    (atoms > 0).then_some(Molecule { molar_mass_kg_mol: grams / 1000.0, uncertainty_kg_mol: uncertainty / 1000.0, atoms })
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn two_letter_symbols_win_over_one_letter_ones() {
        // C, H3, Cl and not C, H3, C and a stray l.
        let chloride = molecule("CH3Cl").unwrap();
        assert_eq!(chloride.atoms, 5);
        assert!((chloride.molar_mass_kg_mol - 0.050_485).abs() < 1e-15);
    }

    #[test]
    fn what_is_no_formula_is_refused() {
        for text in ["", "2H", "H0", "N 2", "n2", "Cl-", "C99999", "µ", "Hé"] {
            assert_eq!(molecule(text), None, "{text}");
        }
    }
}
