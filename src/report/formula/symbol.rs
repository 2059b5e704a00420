//! The symbol of a quantity: what a name of a sheet looks like in a formula.

/// A symbol: a letter or a word, and what stands below it on the right.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(in crate::report) struct Symbol {
    /// Whether a capital delta for a difference stands before it.
    pub(in crate::report) delta: bool,
    /// A letter, which is set in italics, or a word, which is set upright.
    pub(in crate::report) base: String,
    /// The parts of the subscript, in order.
    pub(in crate::report) subscripts: Vec<Subscript>,
}

/// A part of a subscript.
#[derive(Clone, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(in crate::report) struct Subscript {
    pub(in crate::report) text: String,
    /// Set in italics, because it is the symbol of a quantity: the p of the isobaric heat capacity.
    pub(in crate::report) italic: bool,
}

impl Subscript {
    fn upright(text: impl Into<String>) -> Self {
        Self { text: text.into(), italic: false }
    }
}

impl Symbol {
    /// The symbol of a name: `p_1` is p with 1 below, `cold.rho` is ρ with "cold" below, `x_long_name` x with "long name".
    pub(in crate::report) fn of_name(name: &str) -> Self {
        match name.rsplit_once('.') {
            Some((owner, field)) => Self::of_field(owner, field),
            None => Self::of_word(name),
        }
    }

    /// The symbol of a property with nothing it belongs to: `cp` is c with an italic p below.
    pub(in crate::report) fn of_property(field: &str) -> Self {
        match field {
            "cp" | "cv" => {
                let below = Subscript { text: field[1..].to_owned(), italic: true };
                Self { delta: false, base: "c".to_owned(), subscripts: vec![below] }
            }
            "altitude" => Self::of_word("z"),
            _ => Self::of_word(field),
        }
    }

    fn of_field(owner: &str, field: &str) -> Self {
        let mut symbol = Self::of_property(field);
        symbol.subscripts.push(Subscript::upright(owner.replace(['_', '.'], " ")));
        symbol
    }

    fn of_word(word: &str) -> Self {
        let mut parts = word.split('_').filter(|part| !part.is_empty());
        let first = parts.next().unwrap_or(word);
        let mut rest: Vec<&str> = parts.collect();
        let (mut base, mut delta) = (first, false);
        if first == "Delta" && !rest.is_empty() {
            (base, delta) = (rest.remove(0), true);
        }
        // `p1` is read as `p_1`: a digit behind a single letter counts.
        let letters = base.trim_end_matches(|c: char| c.is_ascii_digit());
        let mut subscripts = Vec::new();
        if letters.len() < base.len() && (letters.chars().count() == 1 || greek(letters).is_some()) {
            subscripts.push(Subscript::upright(&base[letters.len()..]));
            base = letters;
        }
        let rest: Vec<&str> = rest.into_iter().map(|part| greek(part).unwrap_or(part)).collect();
        if !rest.is_empty() {
            subscripts.push(Subscript::upright(rest.join(" ")));
        }
        Self { delta, base: greek(base).unwrap_or(base).to_owned(), subscripts }
    }

    /// Whether the base is a single letter, which is set in italics.
    pub(in crate::report) fn is_letter(&self) -> bool {
        self.base.chars().count() == 1
    }
}

/// Names of Greek letters and the letters. `omicron` and the capitals that look Latin stay words.
const GREEK: [(&str, &str); 35] = [
    ("alpha", "α"),
    ("beta", "β"),
    ("gamma", "γ"),
    ("delta", "δ"),
    ("epsilon", "ε"),
    ("eps", "ε"),
    ("zeta", "ζ"),
    ("eta", "η"),
    ("theta", "θ"),
    ("iota", "ι"),
    ("kappa", "κ"),
    ("lambda", "λ"),
    ("mu", "μ"),
    ("nu", "ν"),
    ("xi", "ξ"),
    ("pi", "π"),
    ("rho", "ρ"),
    ("sigma", "σ"),
    ("tau", "τ"),
    ("upsilon", "υ"),
    ("phi", "φ"),
    ("chi", "χ"),
    ("psi", "ψ"),
    ("omega", "ω"),
    ("Gamma", "Γ"),
    ("Delta", "Δ"),
    ("Theta", "Θ"),
    ("Lambda", "Λ"),
    ("Xi", "Ξ"),
    ("Pi", "Π"),
    ("Sigma", "Σ"),
    ("Upsilon", "Υ"),
    ("Phi", "Φ"),
    ("Psi", "Ψ"),
    ("Omega", "Ω"),
];

/// The Greek letter of a word.
pub(in crate::report) fn greek(word: &str) -> Option<&'static str> {
    GREEK.iter().find(|(name, _)| *name == word).map(|(_, letter)| *letter)
}

/// The word of a Greek letter, for LaTeX.
pub(in crate::report) fn greek_word(letter: &str) -> Option<&'static str> {
    GREEK.iter().find(|(_, other)| *other == letter).map(|(name, _)| *name)
}

#[cfg(test)]
mod tests {
    use super::*;

    fn shape(name: &str) -> String {
        let symbol = Symbol::of_name(name);
        let below: Vec<String> =
            symbol.subscripts.iter().map(|part| if part.italic { format!("/{}/", part.text) } else { part.text.clone() }).collect();
        format!("{}{}|{}", if symbol.delta { "Δ" } else { "" }, symbol.base, below.join(","))
    }

    #[test]
    fn names_become_letters_with_subscripts() {
        for (name, expected) in [
            ("m", "m|"),
            ("p_1", "p|1"),
            ("T2", "T|2"),
            ("rho", "ρ|"),
            ("cold.p", "p|cold"),
            ("full.rho", "ρ|full"),
            ("full.cp", "c|/p/,full"),
            ("x_long_name", "x|long name"),
            ("Delta_p_1", "Δp|1"),
            ("Delta", "Δ|"),
            ("Re", "Re|"),
            ("n2.T_c", "T|c,n2"),
            ("site.p", "p|site"),
            ("vent.inner.x", "x|vent inner"),
            ("V_rho", "V|ρ"),
            ("tank2_volume", "tank2|volume"),
            ("_", "_|"),
        ] {
            assert_eq!(shape(name), expected, "{name}");
        }
    }
}
