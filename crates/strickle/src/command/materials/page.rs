//! Materials for people: a line each, or all that is known of a few.

use crate::grid::{Cell, Grid, shortened};
use crate::style::{QUIET, STRONG};
use shop::{Contraction, Material};
use std::path::Path;
use strickle::figures::{densities, plain};
use unicode_width::UnicodeWidthStr as _;

/// Columns of the page.
const WIDTH: usize = 80;

/// Most columns of a designation in the list.
const NAME: usize = 24;

/// So many materials, or fewer, are shown with all that is known of them.
const FEW: usize = 3;

/// The page of what was found.
pub(super) fn of(found: &[&Material]) -> String {
    if found.len() <= FEW {
        let all: Vec<String> = found.iter().map(|material| in_full(material)).collect();
        all.join("\n")
    } else {
        list(found)
    }
}

/// Where the user's own materials stand, or would.
pub(super) fn of_own(file: Option<&Path>) -> String {
    let Some(file) = file else {
        return String::new();
    };
    let yet = if file.exists() {
        ""
    } else {
        " (not there yet)"
    };
    let file = plain(&file.display().to_string());
    format!("\n{QUIET}Your own: [[material]] in {file}{yet}{QUIET:#}\n")
}

/// A line a material.
fn list(found: &[&Material]) -> String {
    let names: Vec<String> = found
        .iter()
        .map(|material| shortened(&plain(&material.name), NAME))
        .collect();
    let ranges: Vec<String> = found
        .iter()
        .map(|material| material.range.map_or_else(String::new, range))
        .collect();
    let widest = |texts: &[String]| texts.iter().map(|text| text.width()).max().unwrap_or(0);
    // Between the four columns are three gaps of two blanks; a density has at most seven columns.
    let left = WIDTH.saturating_sub(widest(&names) + 7 + widest(&ranges).max(5) + 6);
    let densities = densities(
        &found
            .iter()
            .map(|material| material.density)
            .collect::<Vec<f64>>(),
    );
    let mut grid = Grid::new(2);
    grid.row(
        [
            Cell::left("material"),
            Cell::right("kg/m3"),
            Cell::left("range"),
            Cell::left("also known as"),
        ]
        .map(|cell| cell.styled(QUIET)),
    );
    for (((material, name), density), range) in found.iter().zip(names).zip(densities).zip(ranges) {
        grid.row([
            Cell::left(name),
            Cell::right(density),
            Cell::left(range),
            Cell::left(first_of(&known_as(material), left)),
        ]);
    }
    grid.lines()
}

/// All that is known of a material.
fn in_full(material: &Material) -> String {
    let mut grid = Grid::new(2);
    let mut line = |label: &str, text: String| {
        grid.row([Cell::left(format!("  {label}")), Cell::left(text)]);
    };
    let open = material
        .range
        .map_or_else(String::new, |span| format!(", {}", range(span)));
    line("density", format!("{} kg/m3{open}", material.density));
    if let Some(contraction) = material.contraction {
        line("contraction", by_practice(contraction));
    }
    let known_as = known_as(material);
    if !known_as.is_empty() {
        line("also known as", known_as);
    }
    line("source", plain(&material.source));
    format!(
        "{STRONG}{}{STRONG:#}\n{}",
        plain(&material.name),
        grid.lines()
    )
}

/// As many of the words of `text`, between commas, as fit in `width` columns.
fn first_of(text: &str, width: usize) -> String {
    let fits = |end: &usize| text[..*end].width() <= width;
    let ends = text.match_indices(", ").map(|(end, _)| end);
    let end = ends.chain([text.len()]).filter(fits).last().unwrap_or(0);
    text[..end].to_owned()
}

/// What it is called first, then other designations, then more words of the trade.
fn known_as(material: &Material) -> String {
    let (first, others) = material.words.split_at(material.words.len().min(1));
    let words: Vec<String> = first
        .iter()
        .chain(&material.aliases)
        .chain(others)
        .map(|word| plain(word))
        .collect();
    words.join(", ")
}

/// The contraction and how far tables differ.
fn by_practice(contraction: Contraction) -> String {
    let Contraction {
        least,
        greatest,
        usual,
    } = contraction;
    let tables = if least < greatest {
        format!(" (tables give {least} to {greatest} %)")
    } else {
        String::new()
    };
    format!("{usual} %{tables}, common practice; ask the foundry")
}

fn range([least, greatest]: [f64; 2]) -> String {
    format!("{least} to {greatest}")
}
