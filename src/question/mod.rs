//! One file a question: made dimensionless here, asked of the solver, and given its units back.
//!
//! Everything above this room has SI units; everything below has none. Nothing here prints, and what goes wrong is
//! told with the facts that a message needs.

mod answer;
mod bands;
mod body;
mod body_source;
mod budget;
mod case;
mod cautions;
mod drag;
mod fluid;
mod material;
mod placing;
mod record;
mod regime;
mod schemas;
mod surface;
mod surface_flaws;
mod surface_report;
mod validity;

pub use answer::{
    BodyAnswer, Diffusion, DragAnswer, FlowAnswer, FluidAnswer, InputShare, MeanDrag, MobilityBlocks, MotionAnswer,
    NumberVerdict, OneBody, PrincipalDrag, RelativeErrorAnswer, ResistanceBlocks, SolverAnswer, Tensor, Validity,
    Vector, Verdict,
};
pub use bands::SPEED_LIMIT_REYNOLDS;
pub use body::{Body, Extent, KnownSize};
pub use body_source::{BodyError, LengthUnit, Pieces};
pub use budget::InputUncertainty;
pub use case::{CASE_SCHEMA, Case, CaseBody, CaseError, CaseFluid};
pub use drag::{DRAG_SCHEMA, DragError, DragQuestion, PrescribedMotion, StandingBody};
pub use fluid::{CataloguedFluid, FLUID_SCHEMA, FluidCatalogue, FluidReport};
pub use material::{MATERIAL_SCHEMA, MATERIALS_SCHEMA, MaterialCatalogue, MaterialReport};
pub use placing::{Placing, Turn};
pub use record::{AGAIN_SCHEMA, AgainReport, Comparison, Difference, RECORD_SCHEMA, Record, RecordError, RecordedFile};
pub use regime::{
    ChannelAnswer, Concern, Flow, Given, Input, REGIME_SCHEMA, RegimeAnswer, RegimeBody, RegimeBodyAnswer, RegimeError,
    RegimeMotion, RegimeNumber, RegimeQuestion, RegimeValidity, Section, Untold,
};
pub use schemas::Layout;
pub use surface::Surface;
pub use surface_report::{
    AngleBand, CreaseReport, FlawPlace, HoleReport, SURFACE_SCHEMA, ShellReport, SolvedAs, SurfaceReport, WrittenReport,
};
pub use validity::Regime;
