//! The tables of the trade. So far: materials.
//!
//! [`Table::built_in`] holds engineering materials by their standard designations, each with density, what the density
//! may vary by, and the source. [`Table::extended`] adds a user's own, from a file in the same form. Densities are kg/m3
//! at 20 C. The crate does no input or output and shows nothing.
//!
//! ```
//! let table = shop::Table::built_in();
//! let bronze = table.find("cc 480 k").expect("CC480K is built in");
//! assert_eq!((bronze.name.as_str(), bronze.density), ("CC480K", 8700.0));
//! assert_eq!(table.nearest("CC48OK"), Some("CC480K"));
//! ```

mod density;
mod fault;
mod file;
mod material;
mod search;
mod table;

pub use density::density;
pub use fault::Fault;
pub use material::{Contraction, Material};
pub use search::nearest;
pub use table::Table;
