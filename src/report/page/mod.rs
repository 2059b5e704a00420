//! The page: the Markdown of a report as HTML, with what Markdown cannot draw.
//!
//! [`body`] turns the Markdown into the body of a page and obeys the comments that lay it out. `grid` aligns the numbers of a
//! table, [`plane`](Plane) is the figure of the reduced plane, `font` the face of the formulas.

mod font;
mod grid;
mod html;
mod plane;

pub(super) use font::math_font;
pub(super) use html::body;
pub(super) use plane::{Plane, Point};
