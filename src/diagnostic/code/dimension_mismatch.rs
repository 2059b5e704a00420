//! Terms that do not have the same dimension.

use crate::diagnostic::{Diagnostic, Span};

use super::a;

/// The code.
pub(crate) const CODE: &str = "dimension-mismatch";

/// The page.
pub(crate) const PAGE: &str = r##"
# Terms that are not of one dimension

What is added, set equal or compared has to be the same kind of thing: a pressure with a pressure, an energy with an energy.
The finding names each term with its dimension and shows the lines where that comes from; one of them is not what it was
thought to be. In gas work a missing factor is the usual cause: a gas constant, a density, a time. Units that only look alike
(`kJ` and `kW`, `L` and `L/min`) are the other one. Functions and exponents take pure numbers.

```gw
given V = 3.20 m3 "Volume of the receiver" from "Vessel plate"
given T = 293 K "Temperature of the gas" from "TI-30"
given p = 9.6 bar abs "Filling pressure" from "PI-31"
unknown m in kg "Nitrogen held"
p * V = m * T
answer m
```

The gas constant of the gas is missing here.

```gw cured
gas n2 = nitrogen
given V = 3.20 m3 "Volume of the receiver" from "Vessel plate"
given T = 293 K "Temperature of the gas" from "TI-30"
given p = 9.6 bar abs "Filling pressure" from "PI-31"
unknown m in kg "Nitrogen held"
p * V = m * n2.R * T
answer m
```
"##;

/// Two sides of a sum, a relation or a comparison that do not agree. `place` says of what: "sum", "relation", "comparison".
pub(crate) fn terms(whole: Span, place: &str, left: (Span, &str, &str), right: (Span, &str, &str)) -> Diagnostic {
    let (verb, between) = match place {
        "sum" => ("added", "to"),
        "difference" => ("subtracted", "from"),
        "comparison" => ("compared", "with"),
        _ => ("set equal", "to"),
    };
    let (first, second) = if place == "difference" { (right, left) } else { (left, right) };
    Diagnostic::error(CODE, whole, format!("{} ({}) cannot be {verb} {between} {} ({})", first.1, first.2, second.1, second.2))
        .label("these terms do not agree")
        .related(left.0, format!("{}: {}", left.1, left.2))
        .related(right.0, format!("{}: {}", right.1, right.2))
        .help("check the terms, their powers and the units of what stands in them")
}

/// A value of one dimension where another one is asked for. `wanted` says by what: "the unit `L`".
pub(crate) fn expected(span: Span, what: &str, dimension: &str, wanted: &str, wanted_dimension: &str, wanted_span: Span) -> Diagnostic {
    let finding = Diagnostic::error(CODE, span, format!("{what} is {}, but {wanted} is {}", a(dimension), a(wanted_dimension)));
    let finding = if wanted_span == span { finding } else { finding.related(wanted_span, format!("{wanted}: {wanted_dimension}")) };
    finding.label(a(dimension)).help("check the relation and the unit")
}

/// A quantity whose unit is of another dimension than all that uses it asks for. `unit` is its unit as written.
pub(crate) fn by_its_uses(span: Span, name: &str, unit: Option<&str>, dimension: &str, wanted: &str) -> Diagnostic {
    let by = unit.map_or("without a unit".to_owned(), |unit| format!("by its unit `{unit}`"));
    Diagnostic::error(CODE, span, format!("`{name}` is {} {by}, but its uses ask for {}", a(dimension), a(wanted))).label(a(dimension))
}

/// The units that a quantity could have.
pub(crate) fn units_of(dimension: &str, units: &[&str]) -> String {
    if units.is_empty() {
        return format!("give it a unit of {dimension}, or check the relations that use it");
    }
    let all: Vec<String> = units.iter().map(|unit| format!("`{unit}`")).collect();
    format!("give it a unit of {dimension} ({}), or check the relations that use it", all.join(", "))
}

/// Reference conditions with the pressure first; `turned` are both in their order.
pub(crate) fn reference_order(span: Span, turned: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, "reference conditions begin with the temperature; here the pressure stands first")
        .label("the other way about")
        .help(format!("write `{turned}`"))
        .safe_edit(span, turned)
}

/// A function that takes a pure number and is given a quantity.
pub(crate) fn argument(span: Span, function: &str, dimension: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{function}` takes a pure number, this is {}", a(dimension)))
        .label(a(dimension))
        .help(format!("divide it by a quantity of its kind: `{function}(x / x_0)`"))
}

/// An argument of a function that takes something else.
pub(crate) fn argument_of(span: Span, function: &str, found: &str, wanted: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("`{function}` takes {}, this is {}", a(wanted), a(found)))
        .label(a(found))
        .help(format!("give {} to `{function}`", a(wanted)))
}

/// An exponent with a dimension.
pub(crate) fn exponent(span: Span, dimension: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("an exponent is a pure number, this is {}", a(dimension)))
        .label(a(dimension))
        .help("make the exponent a ratio of two quantities of its kind")
}

/// A base with a dimension raised to a power that is not a plain number.
pub(crate) fn base(span: Span, dimension: &str) -> Diagnostic {
    Diagnostic::error(CODE, span, format!("{} can only be raised to a power that is a number", a(dimension)))
        .label(a(dimension))
        .help("write the exponent as a number, or make the base a ratio")
}

/// A bare number beside a quantity.
pub(crate) fn bare_number(finding: Diagnostic) -> Diagnostic {
    finding.fact("a bare number is a pure number, whatever its neighbours are: give it its unit")
}
