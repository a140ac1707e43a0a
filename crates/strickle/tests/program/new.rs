//! `strickle new`.

use crate::folder::Folder;

#[test]
fn the_starter_is_itself_a_part_that_can_be_weighed() {
    let folder = Folder::new();
    let ran = folder.run(&["new", "Fog bell"]);
    assert_eq!(ran.status, Some(0), "{ran:?}");
    assert!(ran.out.contains("fog_bell.toml"));
    assert!(folder.read("fog_bell.toml").contains("Fog bell"));
    let ran = folder.run(&["weigh", "fog_bell.toml"]);
    assert_eq!(ran.status, Some(0), "{ran:?}");
    assert!(ran.out.contains("Fog bell"));
}

#[test]
fn a_file_that_is_there_is_never_overwritten() {
    let folder = Folder::with(&[("bell.toml", "mine")]);
    for name in ["bell", "bell.toml"] {
        let ran = folder.run(&["new", name]);
        assert_eq!(ran.status, Some(3));
        assert!(ran.err.contains("bell.toml"), "{}", ran.err);
        assert!(ran.err.contains("stays as it is"), "{}", ran.err);
        assert_eq!(folder.read("bell.toml"), "mine");
    }
    // Nothing half-written lies beside it.
    assert_eq!(std::fs::read_dir(folder.path()).unwrap().count(), 1);
}

#[test]
fn a_folder_that_is_not_there_is_no_place_to_write() {
    let folder = Folder::new();
    let ran = folder.run(&["new", "parts/bell"]);
    assert_eq!(ran.status, Some(3));
    assert!(ran.err.contains("could not write"), "{}", ran.err);
}

#[test]
fn quiet_writes_and_says_nothing() {
    let folder = Folder::new();
    let ran = folder.run(&["new", "-q", "bell"]);
    assert_eq!(
        (ran.status, ran.out.as_str(), ran.err.as_str()),
        (Some(0), "", "")
    );
    assert!(folder.file("bell.toml").exists());
}

#[cfg(unix)]
#[test]
fn it_is_as_readable_as_any_new_file() {
    use std::os::unix::fs::PermissionsExt as _;
    let folder = Folder::with(&[("other", "")]);
    folder.run(&["new", "bell"]);
    let mode = |name: &str| {
        let file = folder.file(name);
        std::fs::metadata(file).unwrap().permissions().mode()
    };
    assert_eq!(mode("bell.toml"), mode("other"));
}
