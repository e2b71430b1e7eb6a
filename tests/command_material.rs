//! The materials that are known by name, as a user finds them.

mod command;

use command::{run, slowmote};
use slowmote::physical::Material;
use slowmote::question::{MATERIAL_SCHEMA, MaterialCatalogue, MaterialReport};

#[test]
fn a_material_tells_its_density_and_source() {
    let text = slowmote("material pmma").ends_with(0).stdout;
    for piece in ["pmma", "1.19 ± 0.01 g/mL", "DIN EN 12524", "acrylic"] {
        assert!(text.contains(piece), "{piece} is missing in:\n{text}");
    }
    let report = slowmote("material acrylic --json").ends_with(0).stdout;
    let report: MaterialReport = serde_json::from_str(&report).unwrap();
    assert_eq!((report.schema.as_str(), report.name.as_str()), (MATERIAL_SCHEMA, "pmma"));
    assert_eq!((report.density_kg_m3, report.spread_kg_m3), (1185.0, 10.0));
}

#[test]
fn the_list_names_every_material() {
    let text = slowmote("material").ends_with(0).stdout;
    let list: MaterialCatalogue = serde_json::from_str(&slowmote("material --json").ends_with(0).stdout).unwrap();
    assert_eq!(list.materials.len(), Material::all().len());
    for material in Material::all() {
        assert!(text.contains(material.name()), "{}", material.name());
    }
    assert!(text.lines().all(|line| line.chars().count() <= 100));
}

/// What has no published source says so.
#[test]
fn common_practice_is_named_as_such() {
    let text = slowmote("material yeast").ends_with(0).stdout;
    assert!(text.contains("common practice, no source"), "{text}");
}

#[test]
fn an_unknown_material_is_told_with_its_neighbour() {
    run(["material", "polystirene"]).refuses(1, &["did you mean `polystyrene`", "hint: ", "slowmote material"]);
    run(["regime", "--size", "2um", "--material", "unobtainium"]).refuses(1, &["unobtainium", "slowmote material"]);
}
