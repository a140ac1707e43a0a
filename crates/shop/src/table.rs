//! The table of materials.

use crate::file::{self, Placed};
use crate::search::{folded, nearest, occurs};
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

    /// The materials in whose designation, aliases or words each of `words` occurs, from the start of a word on; those
    /// first whose own designation begins with the first of them.
    pub fn search(&self, words: &[impl AsRef<str>]) -> Vec<&Material> {
        let words: Vec<String> = words.iter().map(|word| folded(word.as_ref())).collect();
        let mut found: Vec<&Material> = self
            .materials()
            .filter(|material| {
                words.iter().all(|word| {
                    names(material)
                        .chain(material.words.iter().map(String::as_str))
                        .any(|text| occurs(word, text))
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

#[cfg(test)]
mod tests {
    use super::*;

    fn found(table: &Table, words: &[&str]) -> Vec<String> {
        let found = table.search(words);
        found.iter().map(|material| material.name.clone()).collect()
    }

    /// The fault's code and the text that it points at.
    fn told<'a>(text: &'a str, fault: &Fault) -> (&'static str, &'a str) {
        (fault.code, &text[fault.span.clone()])
    }

    #[test]
    fn the_built_in_table_is_whole() {
        let table = Table::built_in();
        assert!(table.materials().count() >= 60);
        for material in table.materials() {
            let name = &material.name;
            assert!(!material.source.is_empty(), "{name}");
            // Between a light wood and osmium.
            assert!((100.0..22_600.0).contains(&material.density), "{name}");
            if let Some([least, greatest]) = material.range {
                assert!(least < greatest, "{name}");
            }
        }
    }

    #[test]
    fn densities_are_those_of_the_standards_and_handbooks() {
        let table = Table::built_in();
        for (name, density) in [
            ("S235JR", 7850.0),
            ("1.4301", 7900.0),
            ("1.4404", 8000.0),
            ("EN-GJL-250", 7200.0),
            ("EN AW-6082", 2700.0),
            ("CW614N", 8470.0),
            ("Pb99.985", 11340.0),
            ("water", 998.2),
        ] {
            assert_eq!(
                table.find(name).map(|found| found.density),
                Some(density),
                "{name}"
            );
        }
    }

    #[test]
    fn a_designation_is_found_however_it_is_written() {
        let table = Table::built_in();
        for word in ["CC480K", "cc480k", "CC 480 K", "CuSn10", "cusn 10"] {
            assert_eq!(
                table.find(word).map(|found| found.name.as_str()),
                Some("CC480K"),
                "{word}"
            );
        }
        assert_eq!(table.find("en aw 6082"), table.find("EN AW-6082"));
        assert_eq!(table.find("bronze"), None);
        assert_eq!(table.find(""), None);
    }

    #[test]
    fn words_find_all_that_have_each_of_them() {
        let table = Table::built_in();
        assert_eq!(found(&table, &["bell"]), ["bell metal"]);
        assert_eq!(found(&table, &["tin", "bronze"]), ["CC480K", "CC483K"]);
        assert_eq!(found(&table, &["Aluminium Bronze"]), ["CC333G"]);
        assert_eq!(found(&table, &["tin"])[0], "tin");
        assert_eq!(found(&table, &["unobtainium"]), [""; 0]);
        assert_eq!(found(&table, &[]).len(), table.materials().count());
        assert_eq!(table.nearest_word("bronce"), Some("bronze"));
    }

    #[test]
    fn a_users_file_adds_and_replaces() {
        let table = Table::built_in()
            .extended(
                "[[material]]\nname = \"house bronze\"\ndensity = \"8.81 g/cm3\"\nwords = [\"bronze\"]\n\
                 [[material]]\nname = \"oak\"\ndensity = 710\nsource = \"weighed\"\n",
                "own file",
            )
            .unwrap();
        let house = table.find("House Bronze").unwrap();
        assert_eq!((house.density, house.source.as_str()), (8810.0, "own file"));
        let oak = table.find("oak").unwrap();
        assert_eq!(
            (oak.density, oak.range, oak.source.as_str()),
            (710.0, None, "weighed")
        );
        assert_eq!(found(&table, &["oak"]), ["oak"]);
        assert!(found(&table, &["bronze"]).contains(&"house bronze".to_owned()));
        assert_eq!(
            table.materials().count(),
            Table::built_in().materials().count() + 1
        );
    }

    #[test]
    fn an_empty_file_adds_nothing() {
        let table = Table::built_in().extended("# none yet\n", "own").unwrap();
        assert_eq!(
            table.materials().count(),
            Table::built_in().materials().count()
        );
    }

    #[test]
    fn faults_of_form_are_told_with_their_place() {
        for (text, place, word) in [
            ("[[material]]\nname = ", "", "string"),
            ("[[material]]\nname = \"x\"\n", "[[material]]", "density"),
            (
                "[[material]]\nname = \"x\"\ndensity = 1\nmass = 2\n",
                "mass",
                "mass",
            ),
            ("[[materials]]\nname = \"x\"\n", "materials", "materials"),
            (
                "[[material]]\nname = \"x\"\ndensity = [1]\n",
                "[1]",
                "kg/m3",
            ),
        ] {
            let faults = Table::built_in().extended(text, "own").unwrap_err();
            assert_eq!(faults.len(), 1);
            let (code, pointed) = told(text, &faults[0]);
            assert_eq!(code, "materials::form");
            assert!(pointed.contains(place), "{text}: {pointed}");
            assert!(
                faults[0].message.contains(word),
                "{text}: {}",
                faults[0].message
            );
        }
    }

    #[test]
    fn all_faults_of_values_are_told_at_once() {
        let text = "\
            [[material]]\nname = \"a\"\ndensity = -1\n\
            [[material]]\nname = \" \"\ndensity = \"8 lumps\"\n\
            [[material]]\nname = \"c\"\ndensity = 5\nrange = [6, 7]\n\
            [[material]]\nname = \"d\"\ndensity = 5\ncontraction = [2, 1, 1.5]\n";
        let faults = Table::built_in().extended(text, "own").unwrap_err();
        let told: Vec<_> = faults.iter().map(|fault| told(text, fault)).collect();
        assert_eq!(
            told,
            [
                ("materials::density", "-1"),
                ("materials::name", "\" \""),
                ("materials::density", "\"8 lumps\""),
                ("materials::range", "[6, 7]"),
                ("materials::contraction", "[2, 1, 1.5]"),
            ]
        );
    }

    #[test]
    fn a_name_that_one_file_gives_twice_is_told() {
        let text = "\
            [[material]]\nname = \"House Bronze\"\ndensity = 8800\naliases = [\"hb\"]\n\
            [[material]]\nname = \"house-bronze\"\ndensity = 8810\n\
            [[material]]\nname = \"x\"\ndensity = 1\naliases = [\"HB\"]\n";
        let faults = Table::built_in().extended(text, "own").unwrap_err();
        let told: Vec<_> = faults.iter().map(|fault| told(text, fault)).collect();
        assert_eq!(
            told,
            [
                ("materials::duplicate", "\"house-bronze\""),
                ("materials::duplicate", "\"HB\""),
            ]
        );
    }
}
