//! Densities of common materials by name, each with an honest spread.
//!
//! They are values for a first estimate. Those with a published source name it; the others are common practice without one,
//! and say so.
//! A catalogue density of the very product is always better.

use crate::physical::nearest::nearest;
use crate::physical::quantity::{Dimension, Quantity, echo};
use thiserror::Error;

/// A material known by name.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Material {
    name: &'static str,
    aliases: &'static [&'static str],
    density_kg_m3: f64,
    spread_kg_m3: f64,
    source: &'static str,
    note: &'static str,
}

/// Why a name is no known material.
#[derive(Debug, Clone, PartialEq, Error)]
#[non_exhaustive]
pub enum MaterialError {
    /// No material of that name is known.
    #[error("no material is called `{name}`{}; known are {known}", guess(.nearest))]
    Unknown {
        /// The name as written, shortened.
        name: String,
        /// The known name that is spelt nearly so.
        nearest: Option<&'static str>,
        /// The known names, joined by commas.
        known: String,
    },
}

fn guess(nearest: &Option<&'static str>) -> String {
    nearest.map_or_else(String::new, |name| format!(", did you mean `{name}`"))
}

impl Material {
    /// The material of that name; case, spaces and underscores do not matter.
    ///
    /// # Errors
    /// [`MaterialError::Unknown`], with the known names and the nearest of them.
    ///
    /// # Examples
    /// ```
    /// use slowmote::physical::Material;
    ///
    /// let beads = Material::find("polystyrene")?;
    /// assert_eq!(beads.density().value_si(), 1050.0);
    /// # Ok::<(), slowmote::physical::MaterialError>(())
    /// ```
    pub fn find(name: &str) -> Result<&'static Material, MaterialError> {
        let plain = plain_name(name);
        let has_name = |material: &&Material| material.name == plain || material.aliases.contains(&plain.as_str());
        if let Some(found) = MATERIALS.iter().find(has_name) {
            return Ok(found);
        }
        let names: Vec<&str> = MATERIALS.iter().map(|material| material.name).collect();
        let all = MATERIALS.iter().flat_map(|material| std::iter::once(&material.name).chain(material.aliases));
        let near = nearest(&plain, all.copied());
        let meant = near.and_then(|near| {
            MATERIALS.iter().find(|material| material.name == near || material.aliases.contains(&near))
        });
        Err(MaterialError::Unknown {
            name: echo(name),
            nearest: meant.map(|material| material.name),
            known: names.join(", "),
        })
    }

    /// Every known material.
    pub fn all() -> &'static [Material] {
        MATERIALS
    }

    /// Its name.
    pub fn name(&self) -> &'static str {
        self.name
    }

    /// Other names under which it is found.
    pub fn aliases(&self) -> &'static [&'static str] {
        self.aliases
    }

    /// Its density with the spread between products, kg/m3.
    pub fn density(&self) -> Quantity {
        Quantity::trusted(self.density_kg_m3, self.spread_kg_m3, Dimension::DENSITY)
    }

    /// Where the density comes from.
    pub fn source(&self) -> &'static str {
        self.source
    }

    /// What to know about it; empty if nothing.
    pub fn note(&self) -> &'static str {
        self.note
    }
}

fn plain_name(written: &str) -> String {
    written.trim().to_lowercase().replace([' ', '_'], "-")
}

const COMMON_PRACTICE: &str = "common practice, no source";

/// Checked through package ht 1.2.0 (`tests/scripts/materials_reference.py`).
const BUILDING_MATERIALS: &str = "DIN EN 12524 (2000), Building materials and products, tabulated design values";

/// Checked through package periodictable 2.1.0.
const CRC: &str = "CRC Handbook of Chemistry and Physics, 80th edition (1999)";

const fn material(
    name: &'static str,
    aliases: &'static [&'static str],
    density_kg_m3: f64,
    spread_kg_m3: f64,
    note: &'static str,
) -> Material {
    Material { name, aliases, density_kg_m3, spread_kg_m3, source: COMMON_PRACTICE, note }
}

impl Material {
    /// The same with its published source.
    const fn from(self, source: &'static str) -> Self {
        Self { source, ..self }
    }
}

/// Half widths are the spread between products, not the uncertainty of one.
const MATERIALS: &[Material] = &[
    material("polystyrene", &["ps"], 1050.0, 10.0, "solid beads; porous or magnetic ones differ")
        .from(BUILDING_MATERIALS),
    material("pmma", &["acrylic"], 1185.0, 10.0, "").from(BUILDING_MATERIALS),
    material(
        "polyethylene",
        &["pe", "hdpe"],
        950.0,
        30.0,
        "low-density 0.92, high-density 0.96 g/mL; filled beads differ",
    )
    .from(BUILDING_MATERIALS),
    material("polypropylene", &["pp"], 905.0, 10.0, "").from(BUILDING_MATERIALS),
    material("nylon", &["polyamide"], 1140.0, 15.0, "takes up water").from(BUILDING_MATERIALS),
    material("polycarbonate", &["pc"], 1200.0, 10.0, "").from(BUILDING_MATERIALS),
    material("peek", &[], 1310.0, 20.0, ""),
    material("ptfe", &[], 2170.0, 40.0, "").from(BUILDING_MATERIALS),
    material("pla", &["polylactide"], 1245.0, 15.0, "printed parts hold voids"),
    material("pdms", &["silicone-rubber"], 970.0, 20.0, "unfilled; filled silicone rubber reaches 1.2 g/mL"),
    material("melamine", &["melamine-resin"], 1510.0, 20.0, ""),
    material(
        "printing-resin",
        &["resin", "photoresin"],
        1180.0,
        30.0,
        "cured acrylate resins for printing lie at 1.15 to 1.20 g/mL",
    ),
    material("su-8", &["su8", "epoxy"], 1200.0, 40.0, "the source is for epoxy resins at large")
        .from(BUILDING_MATERIALS),
    material("agarose-gel", &["agarose", "hydrogel"], 1010.0, 10.0, "a gel of a few percent in water"),
    material(
        "silica-stober",
        &["silica", "stober-silica"],
        2000.0,
        100.0,
        "grown from solution and porous on the nanometre scale; fused silica is denser",
    ),
    material("fused-silica", &["quartz-glass"], 2200.0, 10.0, "").from(BUILDING_MATERIALS),
    material("quartz", &["sand"], 2650.0, 10.0, ""),
    material("soda-lime-glass", &["glass"], 2500.0, 30.0, "hollow beads are far lighter").from(BUILDING_MATERIALS),
    material("borosilicate", &["borosilicate-glass"], 2230.0, 30.0, ""),
    material("alumina", &[], 3950.0, 50.0, "dense; porous grades are lighter"),
    material("zirconia", &[], 6000.0, 100.0, "stabilised with yttria"),
    material("steel", &["carbon-steel"], 7850.0, 50.0, "").from(BUILDING_MATERIALS),
    material("stainless-steel", &["stainless"], 7950.0, 100.0, "300 and 400 series lie at 7.7 to 8.0 g/mL")
        .from(BUILDING_MATERIALS),
    material("aluminium", &["aluminum"], 2700.0, 30.0, "").from(CRC),
    material("titanium", &[], 4510.0, 30.0, "").from(CRC),
    material("copper", &[], 8950.0, 30.0, "").from(CRC),
    material("nickel", &[], 8900.0, 30.0, "").from(CRC),
    material("silver", &[], 10_490.0, 30.0, "").from(CRC),
    material("gold", &[], 19_300.0, 50.0, "").from(CRC),
    material("tungsten", &[], 19_250.0, 100.0, "").from(CRC),
    material("silicon", &[], 2330.0, 5.0, "").from(CRC),
    material(
        "iron-oxide",
        &["magnetite"],
        5180.0,
        200.0,
        "magnetite; maghemite is 4.9 g/mL, and beads that hold iron oxide are far lighter",
    ),
    material("ndfeb", &["neodymium-magnet"], 7500.0, 100.0, "sintered; bonded with resin it is 5 to 6 g/mL"),
    material("red-cell", &["rbc", "erythrocyte"], 1100.0, 10.0, "1.09 to 1.11 g/mL, by age and hydration"),
    material(
        "white-cell",
        &["leukocyte", "lymphocyte"],
        1070.0,
        15.0,
        "lymphocytes 1.06 to 1.07, granulocytes 1.08 to 1.09 g/mL",
    ),
    material("platelet", &[], 1045.0, 10.0, ""),
    material("mammalian-cell", &["cell"], 1060.0, 20.0, "in medium; depends on hydration and cycle"),
    material("yeast", &[], 1100.0, 20.0, "wet cell"),
    material("bacterium", &["bacteria"], 1100.0, 30.0, "wet cell"),
    material("bacterial-spore", &["spore"], 1250.0, 100.0, "1.2 when wet to 1.4 g/mL when dry"),
    material("pollen", &[], 1200.0, 200.0, "0.8 to 1.4 g/mL, by species and moisture"),
    material("protein", &[], 1350.0, 30.0, "dry volume without its water"),
    material("cellulose", &[], 1520.0, 30.0, "the wall material, without voids"),
    material("oil-droplet", &["vegetable-oil"], 915.0, 10.0, "vegetable oil; a drop is not rigid"),
];

#[cfg(test)]
mod tests {
    use super::*;
    use std::collections::HashSet;

    #[test]
    fn names_are_unique_and_plain() {
        let mut seen = HashSet::new();
        for material in Material::all() {
            for name in std::iter::once(&material.name).chain(material.aliases) {
                assert_eq!(*name, plain_name(name));
                assert!(seen.insert(*name), "{name} occurs twice");
            }
        }
    }

    #[test]
    fn every_spread_is_honest() {
        for material in Material::all() {
            let relative = material.density().relative_uncertainty();
            assert!(relative > 1e-3 && relative < 0.2, "{}", material.name);
            assert!(!material.source.is_empty());
        }
    }

    #[test]
    fn a_mistyped_name_finds_its_neighbour() {
        assert_eq!(Material::find("Stainless Steel").map(Material::name), Ok("stainless-steel"));
        let error = Material::find("polystirene").expect_err("mistyped");
        assert!(matches!(error, MaterialError::Unknown { nearest: Some("polystyrene"), .. }));
        for hostile in ["", "±", "🦀", &"x".repeat(10_000)] {
            assert!(Material::find(hostile).is_err());
        }
    }
}
