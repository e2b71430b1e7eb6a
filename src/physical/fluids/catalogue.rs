//! The list of fluids known by name.

/// A fluid known by name, as it is written and what it is.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct CatalogueEntry {
    /// Its name.
    pub name: &'static str,
    /// A specification as one would write it, with its parameter if it needs one.
    pub example: &'static str,
    /// What it is, in words.
    pub description: &'static str,
    /// Other names under which it is found.
    pub aliases: &'static [&'static str],
}

const fn entry(
    name: &'static str,
    example: &'static str,
    description: &'static str,
    aliases: &'static [&'static str],
) -> CatalogueEntry {
    CatalogueEntry { name, example, description, aliases }
}

/// Every fluid known by name.
pub const CATALOGUE: &[CatalogueEntry] = &[
    entry("water", "water", "pure water, 0 to 100 degC", &["h2o"]),
    entry("heavy-water", "heavy-water", "heavy water, 20 to 37 degC", &["d2o"]),
    entry("air", "air", "dry air at 101325 Pa, -40 to 100 degC", &[]),
    entry(
        "glycerol",
        "glycerol:60%",
        "glycerol in water by mass (`60%vol` by volume), 0 to 100 degC",
        &["glycerine", "glycerin"],
    ),
    entry("sucrose", "sucrose:20%", "sucrose in water by mass, up to 65 %, 5 to 60 degC", &[]),
    entry("saline", "saline", "0.9 % sodium chloride in water, 4 to 45 degC", &[]),
    entry("pbs", "pbs", "phosphate-buffered saline, 4 to 45 degC", &[]),
    entry("plasma", "plasma", "blood plasma, 20 to 40 degC", &["blood-plasma"]),
    entry("culture-medium", "culture-medium", "culture medium with 10 % serum, 20 to 40 degC", &["medium"]),
    entry(
        "silicone-oil",
        "silicone-oil:1000cSt",
        "silicone oil by its grade at 25 degC, 10 to 60,000 cSt, 0 to 100 degC",
        &["silicone"],
    ),
];

/// The examples of all fluids in one line.
pub(super) fn known_forms() -> String {
    let forms: Vec<&str> = CATALOGUE.iter().map(|entry| entry.example).collect();
    format!("{} and `viscosity=1mPa.s,density=1g/mL`", forms.join(", "))
}

/// Every name and alias.
pub(super) fn all_names() -> impl Iterator<Item = &'static str> {
    CATALOGUE.iter().flat_map(|entry| std::iter::once(entry.name).chain(entry.aliases.iter().copied()))
}

/// The name behind a name or an alias, whatever its case, spaces and underscores.
pub(super) fn canonical(written: &str) -> Option<&'static str> {
    let plain = plain_name(written);
    CATALOGUE
        .iter()
        .find(|entry| entry.name == plain || entry.aliases.contains(&plain.as_str()))
        .map(|entry| entry.name)
}

/// Lower case, with hyphens for spaces and underscores.
pub(super) fn plain_name(written: &str) -> String {
    written.trim().to_lowercase().replace([' ', '_'], "-")
}
