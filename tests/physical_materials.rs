//! Densities of materials against published tables (`tests/scripts/materials_reference.py`).

use slowmote::physical::Material;

/// DIN EN 12524 (2000-07), through package ht 1.2.0, all digits printed: kg/m3. Design values for products at large, so the
/// spread must hold them, and of polyethylene both kinds.
const BUILDING_MATERIALS: [(&str, f64); 13] = [
    ("polystyrene", 1050.0),
    ("pmma", 1180.0),
    ("polyethylene", 980.0),
    ("polyethylene", 920.0),
    ("polypropylene", 910.0),
    ("nylon", 1150.0),
    ("polycarbonate", 1200.0),
    ("ptfe", 2200.0),
    ("su-8", 1200.0),
    ("fused-silica", 2200.0),
    ("soda-lime-glass", 2500.0),
    ("steel", 7800.0),
    ("stainless-steel", 7900.0),
];

/// CRC Handbook of Chemistry and Physics, 80th edition (1999), through package periodictable 2.1.0, all digits printed: g/cm3
/// of the elements.
const CRC: [(&str, f64); 8] = [
    ("copper", 8.96),
    ("nickel", 8.902),
    ("silver", 10.5),
    ("gold", 19.3),
    ("tungsten", 19.3),
    ("silicon", 2.33),
    ("aluminium", 2.6989),
    ("titanium", 4.54),
];

#[test]
fn densities_hold_what_their_source_says() {
    let crc = CRC.map(|(name, density)| (name, 1000.0 * density, "CRC Handbook"));
    let building = BUILDING_MATERIALS.map(|(name, density)| (name, density, "DIN EN 12524"));
    for (name, published, source) in crc.into_iter().chain(building) {
        let material = Material::find(name).unwrap();
        let density = material.density();
        let off = (density.value_si() - published).abs();
        // A rounding of the sum is no difference.
        assert!(off <= density.uncertainty_si() + 1e-9, "{name}: {published} and {}", density.value_si());
        assert!(material.source().starts_with(source), "{name}: {}", material.source());
    }
}

#[test]
fn whatever_has_a_source_is_checked() {
    let checked = CRC.iter().chain(&BUILDING_MATERIALS).map(|(name, _)| *name).collect::<Vec<_>>();
    for material in Material::all() {
        let is_common = material.source() == "common practice, no source";
        assert_eq!(is_common, !checked.contains(&material.name()), "{}", material.name());
    }
}
