//! Layout: statements in their canonical form, one by one for digests, or a whole file.

mod canonical;
mod digest;
mod tidy;

pub use canonical::canonical;
pub use digest::digest;
pub use tidy::tidy;
