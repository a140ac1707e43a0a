//! One material.

/// A material of the table.
#[derive(Debug, Clone, PartialEq)]
pub struct Material {
    /// Its designation.
    pub name: String,
    /// Other designations of the same material.
    pub aliases: Vec<String>,
    /// What it is called in the trade and what it is used for; many materials share a word.
    pub words: Vec<String>,
    /// Density, kg/m3.
    pub density: f64,
    /// Least and greatest density that the designation leaves open, kg/m3; `None` where it is taken as fixed.
    pub range: Option<[f64; 2]>,
    /// Patternmaker's contraction, by common practice.
    pub contraction: Option<Contraction>,
    /// Where the figures come from.
    pub source: String,
}

/// How much shorter a casting is than its mould, in percent of length, by common practice: tables differ.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Contraction {
    /// The least that tables give.
    pub least: f64,
    /// The greatest that tables give.
    pub greatest: f64,
    /// What is usually taken.
    pub usual: f64,
}
