//! The tree agrees with the `toml` crate's.

use super::table::Table;
use super::{Document, Kind, Value, parse};
use crate::fault::Found;
use proptest::prelude::*;

/// The text as this crate reads it, or how many faults it has.
fn ours(text: &str) -> Result<toml::Table, usize> {
    let mut found = Found::default();
    let document = parse(text, &mut found);
    if found.is_empty() {
        assert!(!document.damaged, "damaged without a fault: {text}");
        let table = table(&document.root);
        // Dates are refused in a part file whatever they are, so their days and months are not looked at.
        let dates = dates(text, &document.root);
        dates.then_some(table).ok_or(1)
    } else {
        Err(found.count())
    }
}

/// True where every date of `table` is one.
fn dates(text: &str, table: &Table<'_>) -> bool {
    fn right(text: &str, value: &Value<'_>) -> bool {
        match &value.kind {
            Kind::Date => text[value.span()].parse::<toml::value::Datetime>().is_ok(),
            Kind::List(list) => list.items.iter().all(|item| right(text, item)),
            Kind::Table(table) => dates(text, table),
            _ => true,
        }
    }
    table.entries.iter().all(|entry| right(text, &entry.value))
}

fn table(table: &Table<'_>) -> toml::Table {
    table
        .entries
        .iter()
        .map(|entry| {
            let again = table.get(&entry.key).unwrap();
            assert_eq!(again.key_span(), entry.key_span());
            (entry.key.to_string(), value(&entry.value))
        })
        .collect()
}

fn value(value: &Value<'_>) -> toml::Value {
    match &value.kind {
        Kind::String(text) => toml::Value::String(text.to_string()),
        Kind::Integer(value) => toml::Value::Integer(*value),
        Kind::Float(value) => toml::Value::Float(*value),
        Kind::Boolean(value) => toml::Value::Boolean(*value),
        // Dates are told apart and refused; their values do not matter.
        Kind::Date => toml::Value::String("a date".to_owned()),
        Kind::List(list) => toml::Value::Array(list.items.iter().map(self::value).collect()),
        Kind::Table(inner) => toml::Value::Table(table(inner)),
        Kind::Broken => panic!("a broken value without a fault"),
    }
}

fn theirs(text: &str) -> Result<toml::Table, String> {
    fn undated(value: &mut toml::Value) {
        match value {
            toml::Value::Datetime(_) => *value = toml::Value::String("a date".to_owned()),
            toml::Value::Array(items) => items.iter_mut().for_each(undated),
            toml::Value::Table(table) => table.iter_mut().for_each(|(_, value)| undated(value)),
            _ => {}
        }
    }
    let mut table: toml::Table = text
        .parse()
        .map_err(|error: toml::de::Error| error.to_string())?;
    for (_, value) in &mut table {
        undated(value);
    }
    Ok(table)
}

/// Both read the text alike, or both refuse it.
fn compare(text: &str) {
    match (ours(text), theirs(text)) {
        (Ok(ours), Ok(theirs)) => {
            assert_eq!(format!("{ours:?}"), format!("{theirs:?}"), "{text}");
        }
        (Err(_), Err(_)) => {}
        (Ok(_), Err(error)) => panic!("read here, refused there: {error}\n{text}"),
        (Err(count), Ok(_)) => panic!("{count} faults here, read there\n{text}"),
    }
}

#[test]
fn legal_texts_are_read_alike() {
    let texts = [
        "",
        "\u{feff}a = 1",
        "a = 1\r\nb = 'x' # remark\r\n\r\n",
        "a.b.c = 1\na.b.d = 2\na.e = 3",
        "[a.b]\nc = 1\n[a]\nd = 2\n[a.e]",
        "[[a]]\nb = 1\n[[a]]\nb = 2\n[a.c]\nd = 3\n[[a.e]]\n[[a.e]]",
        "a = [1, [2, 3,], [], { b = 1, c.d = 2 }, ]",
        "a = [ # one\n 1, # two\n\n 2\n]\n",
        "\"quoted key\" = 1\n'x' . \"y\" . z = 2\n1234 = 3\n-_ = 4",
        "a = 0x1F\nb = 0o17\nc = 0b11\nd = 1_000\ne = -0\nf = +7",
        "a = 1.5\nb = 1e3\nc = -1.5E-3\nd = inf\ne = -nan\nf = 6.02_2e2_3",
        "a = \"tab\\t quote\\\" \\u00e9 \\U0001F600\"\nb = 'raw \\t'",
        "a = \"\"\"\none\ntwo \\\n   three\"\"\"\nb = '''\nx''y'''",
        "a = \"\"\"two quotes\"\"\"\"\"\nb = ''",
        "a = 1979-05-27\nb = 1979-05-27T07:32:00Z\nc = 1979-05-27 07:32:00\nd = 07:32:00",
        "a = true\nb = false",
        "a = {}\nb = { c = 1 }\nd = { e = { f = [ { g = 1 } ] } }",
        "a = {\n b = 1,\n c = 2,\n}",
        "[ a . b ]\n[[ c . d ]]",
        "[a]\nb.c = 1\n[a.d]\n",
        "a = [[[[[[[[1]]]]]]]]",
    ];
    for text in texts {
        assert!(theirs(text).is_ok(), "{text}: {:?}", theirs(text));
        compare(text);
    }
}

#[test]
fn faulty_texts_are_refused_alike() {
    let texts = [
        "a",
        "a =",
        "a = 1 b = 2",
        "= 1",
        "a = 1\na = 2",
        "[a]\n[a]",
        "[a]\nb = 1\n[a.b]",
        "a = 1\n[a]",
        "a = 1\na.b = 2",
        "a = {}\n[a]",
        "a = { b = 1 }\na.c = 2",
        "a = []\n[[a]]",
        "[[a]]\n[a]",
        "[a]\n[[a]]",
        "a = { b = 1, b = 2 }",
        "a = { b.c = 1, b = 2 }",
        "[a.b]\n[a]\nb.c = 1",
        "a.b = 1\n[a]",
        "a.b = 1\n[a.b]",
        "a = [1",
        "a = { b = 1",
        "a = [1 2]",
        "a = [,]",
        "a = [1,,2]",
        "a = {,}",
        "[a",
        "[]",
        "[[a]",
        "[[]]",
        "[a]]",
        "a = \"x",
        "a = 'x",
        "a = \"\"\"x",
        "a = '''x",
        "a = \"\\q\"",
        "a = \"\\u12\"",
        "a = \"x\ny\"",
        "a = 01",
        "a = 1__0",
        "a = 1_",
        "a = _1",
        "a = 1.",
        "a = .5",
        "a = 1e",
        "a = 0xG",
        "a = +-1",
        "a = True",
        "a = 99999999999999999999",
        "a = 1e999",
        "a = yes",
        "a: 1",
        "é = 1",
        "a = 1 # \u{1}",
        "a\u{0} = 1",
        "a = 1\rb = 2",
        "\"\"\"a\"\"\" = 1",
        "a = 1979-13-01x",
        "[a] b = 1",
        "a.= 1",
        ".a = 1",
        "[a..b]",
        "a = 1 ]",
    ];
    for text in texts {
        assert!(theirs(text).is_err(), "the toml crate reads {text}");
        compare(text);
    }
}

/// The table `key` of `table`.
fn inner<'r, 't>(table: &'r Table<'t>, key: &str) -> &'r Table<'t> {
    match &table.get(key).unwrap().value.kind {
        Kind::Table(inner) => inner,
        other => panic!("{key} is {other:?}"),
    }
}

#[test]
fn a_broken_value_leaves_the_others() {
    let text = "a = [ { b = 2, c [3] }, 5, x y ]\n[d]\ne = 4x\nf = 5\n";
    let mut found = Found::default();
    let Document { root, damaged } = parse(text, &mut found);
    assert_eq!(
        found.codes(),
        ["toml::equals", "toml::unquoted", "toml::unquoted"]
    );
    assert!(!damaged);
    let Kind::List(list) = &root.get("a").unwrap().value.kind else {
        panic!("a is a list");
    };
    let kinds: Vec<&Kind<'_>> = list.items.iter().map(|item| &item.kind).collect();
    assert!(matches!(
        kinds[..],
        [Kind::Broken, Kind::Integer(5), Kind::Broken]
    ));
    let d = inner(&root, "d");
    assert!(matches!(d.get("e").unwrap().value.kind, Kind::Broken));
    assert!(matches!(d.get("f").unwrap().value.kind, Kind::Integer(5)));
}

#[test]
fn a_broken_statement_leaves_the_others() {
    let text = "a = [ 1,\n { b = 2\n[c]\nd = [ 3,\ne = 4\n[f\ng = 5\n[h]\ni = \"x\nj = 6\n";
    let mut found = Found::default();
    let Document { root, damaged } = parse(text, &mut found);
    let codes = [
        "toml::unclosed",
        "toml::unclosed",
        "toml::header",
        "toml::unclosed_text",
    ];
    assert_eq!(found.codes(), codes);
    assert!(damaged);
    assert!(matches!(root.get("a").unwrap().value.kind, Kind::Broken));
    let c = inner(&root, "c");
    assert!(matches!(c.get("d").unwrap().value.kind, Kind::Broken));
    assert!(matches!(c.get("e").unwrap().value.kind, Kind::Integer(4)));
    assert!(
        c.get("g").is_none(),
        "a key below a broken header belongs nowhere"
    );
    let h = inner(&root, "h");
    assert!(matches!(h.get("i").unwrap().value.kind, Kind::Broken));
    assert!(matches!(h.get("j").unwrap().value.kind, Kind::Integer(6)));
}

#[test]
fn places_are_those_of_the_text() {
    let text = "[part]\nname = 'bell'\n\n[[body]]\noutline = [ { d = 4.5 } ]\n";
    let mut found = Found::default();
    let root = parse(text, &mut found).root;
    let part = root.get("part").unwrap();
    assert_eq!(&text[part.value.span()], "[part]");
    let Kind::List(bodies) = &root.get("body").unwrap().value.kind else {
        panic!("bodies are a list");
    };
    assert_eq!(&text[bodies.items[0].span()], "[[body]]");
    let Kind::Table(body) = &bodies.items[0].kind else {
        panic!("a body is a table");
    };
    let outline = body.get("outline").unwrap();
    assert_eq!(&text[outline.key_span()], "outline");
    assert_eq!(&text[outline.value.span()], "[ { d = 4.5 } ]");
}

/// Pieces that TOML is made of, legal and not.
fn piece() -> impl Strategy<Value = &'static str> {
    prop::sample::select(vec![
        "a",
        "b",
        "c",
        ".",
        " ",
        "=",
        "\n",
        "\n",
        ",",
        "[",
        "]",
        "{",
        "}",
        "[[",
        "]]",
        "1",
        "2.5",
        "\"x\"",
        "'y'",
        "true",
        "# z\n",
        "a = 1\n",
        "[a]\n",
        "[[a]]\n",
        "[a.b]\n",
        "b = [1, 2]\n",
        "c = { a = 1 }\n",
        "\"",
        "'''",
        "\"\"\"",
        "-",
        "1979-05-27",
        "07:32:00",
        "\\",
        "\t",
        "\r\n",
        "é",
    ])
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(2000))]

    #[test]
    fn any_text_is_read_alike(pieces in prop::collection::vec(piece(), 0..40)) {
        compare(&pieces.concat());
    }

    #[test]
    fn statements_are_read_alike(
        lines in prop::collection::vec((prop::sample::select(vec![
            "a = 1", "b = 2", "a.b = 1", "a.c = { d = 1 }", "b.c.d = 2", "[a]", "[b]", "[a.b]", "[b.c]", "[[a]]", "[[c]]",
            "[a.c]", "[[a.c]]", "[c.d]", "c = [ { a = 1 } ]", "d.a = 1", "[d]", "[d.a]",
        ]), any::<bool>()), 0..12)
    ) {
        let lines: Vec<&str> = lines.iter().map(|(line, _)| *line).collect();
        compare(&lines.join("\n"));
    }
}
