//! Where a constant of a species comes from.

/// The source of one constant. The table `data/species.csv` names it by [`key`](Source::key).
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
#[non_exhaustive]
pub enum Source {
    /// The reference equation of state of the species: stored with it, or calculated from it (boiling point, triple pressure).
    Equation,
    /// Mathews 1972.
    Mathews,
    /// Horstmann et al. 2005.
    Horstmann,
    /// CRC Handbook.
    Handbook,
    /// NIST Chemistry WebBook.
    WebBook,
    /// Staveley, Lobo, Calado 1981.
    Staveley,
    /// The critically evaluated series of Ambrose, Young, Tsonopoulos and others.
    Ambrose,
    /// Huber et al. 2022.
    Huber,
    /// Calculated by definition from a vapour pressure correlation.
    Definition,
}

/// Key in the table, source, and what it is called in a report.
const SOURCES: [(&str, Source, &str); 9] = [
    ("equation", Source::Equation, "reference equation of state"),
    ("mathews", Source::Mathews, "Mathews 1972, Chem. Rev. 72: 71-100 (critically evaluated)"),
    ("psrk", Source::Horstmann, "Horstmann et al. 2005, Fluid Phase Equilib. 227: 157-164 (appendix)"),
    ("crc", Source::Handbook, "CRC Handbook of Chemistry and Physics, 95th ed. 2014"),
    ("webbook", Source::WebBook, "NIST Chemistry WebBook (collected values)"),
    ("staveley", Source::Staveley, "Staveley, Lobo, Calado 1981, Cryogenics 21: 131-144"),
    ("iupac", Source::Ambrose, "Ambrose, Young, Tsonopoulos et al. 1995-2015, J. Chem. Eng. Data (critically evaluated series)"),
    ("huber", Source::Huber, "Huber et al. 2022, Ind. Eng. Chem. Res. 61: 15449-15472"),
    ("definition", Source::Definition, "calculated by definition from a vapour pressure correlation"),
];

impl Source {
    /// The source that the table calls `key`.
    #[must_use]
    pub fn from_key(key: &str) -> Option<Self> {
        SOURCES.iter().find(|(known, ..)| *known == key).map(|(_, source, _)| *source)
    }

    /// Its name in the table.
    #[must_use]
    pub fn key(self) -> &'static str {
        SOURCES.iter().find(|(_, source, _)| *source == self).map_or("", |(key, ..)| key)
    }

    /// Its name in a report; `equation` is the citation of the equation of state of the species.
    #[must_use]
    pub fn text(self, equation: &str) -> String {
        let text = SOURCES.iter().find(|(_, source, _)| *source == self).map_or("", |(.., text)| text);
        if self == Self::Equation { format!("{text}: {equation}") } else { text.to_owned() }
    }
}
