//! What a part file may be at most. Past each of these the file is refused, in little memory.

/// Bytes of text.
pub(crate) const TEXT: usize = 16 << 20;

/// Edges of one part, after repeats.
pub(crate) const EDGES: usize = 100_000;

/// Lists and tables inside each other.
pub(crate) const NESTING: usize = 64;

/// Values of a file, tables and lists included: more than [`EDGES`] steps of the longest kind need, in 100 MB.
pub(crate) const VALUES: usize = 1_250_000;

/// Keys of one table.
pub(crate) const KEYS: usize = 65_536;

/// Repeats inside each other.
pub(crate) const REPEATS: usize = 8;

/// Bytes of one expression.
pub(crate) const EXPRESSION: usize = 65_536;

/// Parentheses, signs and powers inside each other in one expression.
pub(crate) const PARENTHESES: usize = 100;

/// Metres of one length: a million kilometres. The fifth power of it, which a moment of inertia takes, is far from
/// overflowing.
pub(crate) const LENGTH: f64 = 1e9;
