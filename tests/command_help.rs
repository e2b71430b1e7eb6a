//! The whole help text, so that no change of it goes unseen.

mod command;

use command::slowmote;

#[test]
fn help_of_the_program() {
    insta::assert_snapshot!("help", slowmote("--help").ends_with(0).stdout);
}

#[test]
fn help_of_drag() {
    insta::assert_snapshot!("help_drag", slowmote("drag --help").ends_with(0).stdout);
}

#[test]
fn help_of_fluid() {
    insta::assert_snapshot!("help_fluid", slowmote("fluid --help").ends_with(0).stdout);
}

#[test]
fn help_of_surface() {
    insta::assert_snapshot!("help_surface", slowmote("surface --help").ends_with(0).stdout);
}

#[test]
fn version() {
    assert_eq!(slowmote("--version").ends_with(0).stdout, concat!("slowmote ", env!("CARGO_PKG_VERSION"), "\n"));
}

#[test]
fn help_of_regime() {
    insta::assert_snapshot!("help_regime", slowmote("regime --help").ends_with(0).stdout);
}
