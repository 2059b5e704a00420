//! The sheet: names, units, dimensions and kinds settled, states turned into relations.
//!
//! In comes a [`Tree`](crate::syntax::Tree); out go a [`Sheet`] and what is wrong with it. After this room there are no
//! strings to look up and no unit left to convert: quantities, gases and states are numbers, every value is in SI base
//! units, pressures and temperatures are absolute. Read [`model`](Sheet) first, then `reader`, which names the passes in
//! their order. This room knows nothing of how relations are solved.

mod check;
mod clause;
mod constant;
mod expr;
mod expression;
mod gas;
mod inference;
mod law;
mod model;
mod property;
mod reader;
mod slip;
mod state;
mod value;
mod write;
mod wrong_unit;

pub use expr::{Constant, Expr, ExprId, Exprs, GasFunction, StateFunction};
pub use model::{
    Answer, Clause, Condition, Correlation, GasId, GasModel, Kind, LiveValue, Origin, Property, PropertyRow, Quantity, QuantityId, Reading,
    ReferenceConditions, Relation, RelationOrigin, Sheet, SheetGas, ShownLiteral, ShownUnit, State, StateId, StatedUncertainty,
    TypedNumber,
};
pub use reader::read;
pub use write::write_expr;
