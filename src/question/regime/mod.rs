//! Does creeping flow hold? Every dimensionless number that can be told from what is known, without solving anything.
//!
//! A question is a fluid, a body or a channel, and a list of given quantities. From these follow the flow in the channel
//! (`channel`), the motions of the body (`motion`), and the numbers on both (`body_numbers`,
//! `channel_numbers`); the whole is computed again with each uncertain input shifted, which gives the uncertainty of
//! every result to first order (`evaluation`).

mod answer;
mod body_numbers;
mod bounds;
mod cautions;
mod channel;
mod channel_numbers;
mod check;
mod duct;
mod evaluation;
mod figures;
mod flow_numbers;
mod given;
mod motion;
mod number;
mod path_numbers;
mod question;

pub use answer::{
    ChannelAnswer, Concern, REGIME_SCHEMA, RegimeAnswer, RegimeBodyAnswer, RegimeMotion, RegimeNumber, RegimeValidity,
    Untold,
};
pub use bounds::RegimeBody;
pub use channel::Section;
pub use check::RegimeError;
pub use given::{Flow, Given, Input};
pub use question::RegimeQuestion;
