//! The JSON Schemas of everything that is read and written as JSON, made from the types themselves.

use schemars::{JsonSchema, Schema, schema_for};

use super::case::Case;
use super::fluid::CATALOGUE_SCHEMA;
use super::{
    AGAIN_SCHEMA, AgainReport, CASE_SCHEMA, DRAG_SCHEMA, DragAnswer, FLUID_SCHEMA, FluidCatalogue, FluidReport,
    MATERIAL_SCHEMA, MATERIALS_SCHEMA, MaterialCatalogue, MaterialReport, RECORD_SCHEMA, REGIME_SCHEMA, Record,
    RegimeAnswer, SURFACE_SCHEMA, SurfaceReport,
};

/// The layout of an input or an output.
#[derive(Debug, Clone, Copy)]
pub struct Layout {
    /// Name and version, as in `slowmote.drag.1`.
    pub name: &'static str,
    /// What it is, in a few words.
    pub what: &'static str,
    make: fn() -> Schema,
}

impl Layout {
    /// All layouts.
    pub const ALL: &'static [Self] = &[
        layout::<Case>(CASE_SCHEMA, "a case file, which is read in the place of BODY"),
        layout::<DragAnswer>(DRAG_SCHEMA, "the answer of `drag`"),
        layout::<SurfaceReport>(SURFACE_SCHEMA, "the answer of `surface`"),
        layout::<RegimeAnswer>(REGIME_SCHEMA, "the answer of `regime`"),
        layout::<FluidReport>(FLUID_SCHEMA, "the answer of `fluid NAME`"),
        layout::<FluidCatalogue>(CATALOGUE_SCHEMA, "the answer of `fluid`"),
        layout::<MaterialReport>(MATERIAL_SCHEMA, "the answer of `material NAME`"),
        layout::<MaterialCatalogue>(MATERIALS_SCHEMA, "the answer of `material`"),
        layout::<Record>(RECORD_SCHEMA, "a record, which `--record` writes and `again` reads"),
        layout::<AgainReport>(AGAIN_SCHEMA, "the answer of `again`"),
    ];

    /// The layout of that name; the version may be left out, and `slowmote.` too.
    pub fn find(name: &str) -> Option<&'static Self> {
        let short = |full: &'static str| full.trim_start_matches("slowmote.");
        let bare = |full: &'static str| short(full).rsplit_once('.').map_or(full, |(bare, _)| bare);
        Self::ALL.iter().find(|layout| [layout.name, short(layout.name), bare(layout.name)].contains(&name))
    }

    /// The JSON Schema (draft 2020-12), with the layout's name as its identifier.
    pub fn schema(&self) -> Schema {
        let mut schema = (self.make)();
        schema.insert("$id".to_owned(), self.name.into());
        schema.insert("title".to_owned(), self.what.into());
        schema
    }
}

const fn layout<T: JsonSchema>(name: &'static str, what: &'static str) -> Layout {
    Layout { name, what, make: || schema_for!(T) }
}
