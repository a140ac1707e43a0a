//! The part file that `strickle new` writes.

/// The text of a new part file called `name`: commented, and itself a legal part.
pub fn starter(name: &str) -> String {
    let name = quoted(name);
    format!(
        r#"# A part of revolution: its half section is drawn step by step, and turned about the axis z.
format = 1

[part]
name    = {name}
number  = "0001"                    # free text, for the title block
unit    = "mm"                      # what a bare number means: mm, cm, m, in or ft
revolve = 360                       # degrees
general_tolerance = "ISO 2768-m"    # for every size without a tolerance of its own

[size]                              # named dimensions; `--set bore=26` tries another value
outside = {{ is = 120, tol = 0.5 }}   # to both sides
bore    = {{ is = 25, tol = "H7" }}   # a class of ISO 286
hub     = {{ is = 48, tol = [-0.5, 1.0] }}
height  = 60
flange  = "height / 5"              # an expression over other sizes
gauge   = "3/4 in"                  # a unit after a number

[[body]]                            # one or several; they may touch
name     = "hub"
material = "CC480K"                 # `strickle materials bronze` finds designations; or density = "8800 kg/m3"
outline  = [
  {{ d = "bore", z = 0, chamfer = 1 }},               # the first step gives both coordinates
  {{ d = "outside", chamfer = 1, name = "face" }},    # a coordinate left out stays as it was
  {{ z = "flange", chamfer = 1, name = "rim" }},
  {{ d = "hub", round = 6 }},                         # d diameter, r radius, z station; dd, dr, dz are increments
  {{ z = "height - gauge", taper = "-1:20" }},        # the taper gives the diameter
  {{ dz = "gauge", name = "neck" }},
  {{ d = "bore", chamfer = 1, name = "end" }},
]                                                   # the last step runs straight back to the first

[expect]                            # what the drawing says of the finished part; `weigh` and `prove` judge it
largest_d = "120 mm +- 0.5 mm"
length    = "60 mm +- 0.3 mm"
"#
    )
}

/// `name` as a TOML string.
fn quoted(name: &str) -> String {
    let mut quoted = String::from('"');
    for c in name.chars() {
        match c {
            '"' => quoted.push_str("\\\""),
            '\\' => quoted.push_str("\\\\"),
            // Control characters have four digits at most.
            c if c.is_control() => {
                quoted.push_str("\\u");
                quoted.extend(
                    (0..4).rev().filter_map(|digit| {
                        char::from_digit((u32::from(c) >> (4 * digit)) & 15, 16)
                    }),
                );
            }
            c => quoted.push(c),
        }
    }
    quoted.push('"');
    quoted
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn any_name_is_a_string_of_toml() {
        for name in [
            "Fog bell",
            "3/4\" \\ valve",
            "two\nlines \u{7f}\u{9}",
            "Glöckchen 🔔",
            "",
            "\0",
        ] {
            let table: toml::Table = starter(name).parse().unwrap();
            assert_eq!(table["part"]["name"].as_str(), Some(name));
        }
    }
}
