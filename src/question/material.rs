//! Materials on their own: the answers to `material` and `material NAME`.

use schemars::JsonSchema;
use serde::{Deserialize, Serialize};

use super::cautions::material_cautions;
use crate::physical::Material;

/// Name and version of the layout of [`MaterialReport`].
pub const MATERIAL_SCHEMA: &str = "slowmote.material.1";

/// Name and version of the layout of [`MaterialCatalogue`].
pub const MATERIALS_SCHEMA: &str = "slowmote.materials.1";

/// The usual density of a material.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct MaterialReport {
    /// Name and version of this layout: `slowmote.material.1`.
    pub schema: String,
    /// Its name.
    pub name: String,
    /// Other names under which it is found.
    pub aliases: Vec<String>,
    /// Density, kg/m3.
    pub density_kg_m3: f64,
    /// Half width of the range in which products lie, kg/m3.
    pub spread_kg_m3: f64,
    /// Where the density comes from.
    pub source: String,
    /// What else to know of it; null if nothing.
    pub note: Option<String>,
    /// What to beware of.
    pub cautions: Vec<String>,
}

/// The materials known by name.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize, JsonSchema)]
#[serde(deny_unknown_fields)]
pub struct MaterialCatalogue {
    /// Name and version of this layout: `slowmote.materials.1`.
    pub schema: String,
    /// The materials.
    pub materials: Vec<MaterialReport>,
}

impl MaterialReport {
    /// The report on a material.
    pub fn of(material: &Material) -> Self {
        let density = material.density();
        Self {
            schema: MATERIAL_SCHEMA.to_owned(),
            name: material.name().to_owned(),
            aliases: material.aliases().iter().map(|alias| (*alias).to_owned()).collect(),
            density_kg_m3: density.value_si(),
            spread_kg_m3: density.uncertainty_si(),
            source: material.source().to_owned(),
            note: Some(material.note()).filter(|note| !note.is_empty()).map(str::to_owned),
            cautions: material_cautions(material),
        }
    }
}

impl MaterialCatalogue {
    /// All materials.
    pub fn all() -> Self {
        let materials = Material::all().iter().map(MaterialReport::of).collect();
        Self { schema: MATERIALS_SCHEMA.to_owned(), materials }
    }
}
