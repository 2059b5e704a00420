//! Syntax: the text of a sheet becomes a [`Tree`].
//!
//! Text comes in; a tree and all findings of the file come out. No meaning is judged here: whether a name is known, a unit
//! exists or dimensions agree is for the rooms behind. Read in this order: [`tree`] is the product; [`parse()`] the way
//! to it (head, logical lines, each by its own rule of `grammar/sheet.pest`); `slip` says why a line cannot be read;
//! `layout` writes statements in their canonical form, one by one or a whole file.
//!
//! Statements are checked each on its own. A bad one stays in the tree as `Bad` with the name that it would have
//! declared, so that later uses of the name stay silent. Limits on size and depth ([`limits`]) are counted before the
//! grammar sees the text.

mod character;
mod condition;
mod expression;
mod grammar;
mod head;
mod layout;
pub mod limits;
mod line;
mod parse;
mod prose;
mod quantity;
mod slip;
mod statement;
pub mod tree;
mod word;

pub use head::EDITION;
pub use layout::{canonical, digest, tidy};
pub use parse::{decode, parse};
pub use tree::{
    AnswerItem, Basis, BinaryOp, Comparison, Condition, ConditionKind, Expr, ExprId, ExprKind, Function, GasPart, Head, Literal, Model,
    Name, Named, Names, Path, ProsePiece, ReferenceName, Shape, ShareBasis, Statement, StatementKind, Text, Tree, Uncertainty, UnitText,
    Width, Within,
};
pub use word::{CONSTANTS, STATEMENT_WORDS, STATEMENT_WORDS_NOT_OFFERED, is_reserved, starts_statement};
