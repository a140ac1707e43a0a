//! The table of materials.

use crate::file::{self, Placed};
use crate::search::{folded, nearest};
use crate::{Fault, Material};
use std::collections::HashMap;

/// The materials that come with the program.
const BUILT_IN: &str = include_str!("../../../assets/materials.toml");

/// Materials by their designations.
#[derive(Debug, Clone)]
pub struct Table {
    materials: Vec<Material>,
    /// Folded designations and aliases, each with the index of its material.
    index: HashMap<String, usize>,
}

impl Table {
    /// The materials that come with the program.
    pub fn built_in() -> Self {
        let empty = Self {
            materials: Vec::new(),
            index: HashMap::new(),
        };
        empty
            .extended(BUILT_IN, "built in")
            .expect("the built-in table is checked by a test of this crate")
    }

    /// The table and the materials of the file `text` behind it; `source` is the source of those that do not name one.
    ///
    /// The file is TOML: any number of `[[material]]`, each with `name` and `density` (a number in kg/m3, or a text with a
    /// unit as in a part file), and where known `range = [least, greatest]`, `aliases`, `words`, `contraction = [least,
    /// greatest, usual]` in percent, and `source`. A designation that the table has already now means the new material.
    ///
    /// # Errors
    /// All that is wrong with the file, as far as the faults are independent.
    pub fn extended(mut self, text: &str, source: &str) -> Result<Self, Vec<Fault>> {
        let placed = file::materials(text, source)?;
        let faults = duplicates(&placed);
        if !faults.is_empty() {
            return Err(faults);
        }
        for Placed { material, .. } in placed {
            let index = self.materials.len();
            for name in names(&material) {
                self.index.insert(folded(name), index);
            }
            self.materials.push(material);
        }
        Ok(self)
    }

    /// All materials that can be looked up, in the order of the files.
    pub fn materials(&self) -> impl Iterator<Item = &Material> {
        self.materials
            .iter()
            .enumerate()
            .filter(|(index, material)| self.index.get(&folded(&material.name)) == Some(index))
            .map(|(_, material)| material)
    }

    /// The material of this designation; capitals, spaces and hyphens do not matter.
    pub fn find(&self, designation: &str) -> Option<&Material> {
        self.index
            .get(&folded(designation))
            .and_then(|&index| self.materials.get(index))
    }

    /// The designation that is nearest to `word`, where `word` may be a slip of the keys.
    pub fn nearest(&self, word: &str) -> Option<&str> {
        nearest(word, self.materials().flat_map(names))
    }

    /// The materials in whose designation, aliases or words each of `words` occurs; those first whose own designation
    /// begins with the first of them.
    pub fn search(&self, words: &[impl AsRef<str>]) -> Vec<&Material> {
        let words: Vec<String> = words.iter().map(|word| folded(word.as_ref())).collect();
        let mut found: Vec<&Material> = self
            .materials()
            .filter(|material| {
                words.iter().all(|word| {
                    names(material)
                        .chain(material.words.iter().map(String::as_str))
                        .any(|text| folded(text).contains(word.as_str()))
                })
            })
            .collect();
        if let Some(first) = words.first() {
            found.sort_by_key(|material| !folded(&material.name).starts_with(first.as_str()));
        }
        found
    }

    /// The word that [`Table::search`] would have found something by and that is nearest to `word`.
    pub fn nearest_word(&self, word: &str) -> Option<&str> {
        let words = self
            .materials()
            .flat_map(|material| names(material).chain(material.words.iter().map(String::as_str)));
        nearest(word, words)
    }
}

/// The designations of a material, the main one first.
fn names(material: &Material) -> impl Iterator<Item = &str> {
    std::iter::once(&material.name)
        .chain(&material.aliases)
        .map(String::as_str)
}

/// The designations that one file gives twice.
fn duplicates(placed: &[Placed]) -> Vec<Fault> {
    let mut owners: HashMap<String, &str> = HashMap::new();
    let mut faults = Vec::new();
    for Placed { material, places } in placed {
        for (name, place) in names(material).zip(places) {
            if let Some(owner) = owners.insert(folded(name), &material.name) {
                faults.push(
                    Fault::new(
                        "materials::duplicate",
                        format!("`{name}` is already a name of `{owner}`"),
                        place.clone(),
                    )
                    .help("capitals, spaces and hyphens do not make a name another one"),
                );
            }
        }
    }
    faults
}
