//! The rest of the part file around a piece of one.

use part::Setting;

const PART: &str = "format = 1\npart = { name = \"bell\", unit = \"mm\" }\n";
const BODY: &str = "[[body]]\nname = \"bell\"\nmaterial = \"CC480K\"\n";
const OUTLINE: &str = "outline = [ { d = 40, z = 0 }, { d = 60 }, { z = 12 } ]\n";

/// The whole part file of the case `title`, whose frame stands in parentheses, and what is set from outside.
pub(crate) fn whole(title: &str, piece: &str) -> (String, Vec<Setting>) {
    let frame = title
        .split_once('(')
        .and_then(|(_, rest)| rest.strip_suffix(')'))
        .unwrap_or("file");
    let (frame, settings) = frame.split_once(" --set ").unwrap_or((frame, ""));
    let text = match frame {
        // The piece is the whole file.
        "file" => piece.to_owned(),
        // The piece is the top of the file, without `format`.
        "top" => format!("format = 1\n{piece}\n{BODY}{OUTLINE}"),
        // The piece is what stands under [size].
        "size" => format!("{PART}[size]\n{piece}\n{BODY}{OUTLINE}"),
        // The piece is one step, the second of three.
        "step" => format!(
            "{PART}{BODY}outline = [\n  {{ d = 40, z = 0 }},\n  {piece},\n  {{ d = 60, z = 12 }},\n]\n"
        ),
        // The piece is a list of steps.
        "steps" => format!("{PART}{BODY}outline = {piece}\n"),
        // The piece is what stands under [[body]], in place of material and outline.
        "body" => format!("{PART}[[body]]\nname = \"bell\"\n{piece}\n"),
        // The piece goes after a sound body.
        "end" => format!("{PART}{BODY}{OUTLINE}{piece}\n"),
        other => panic!("{title}: there is no frame {other}"),
    };
    let settings = settings
        .split(" --set ")
        .filter_map(|setting| {
            let (name, value) = setting.split_once('=')?;
            Some(Setting {
                name: name.to_owned(),
                value: value.to_owned(),
            })
        })
        .collect();
    (text, settings)
}
