//! Progress of a solve on stderr: after a moment, and only where somebody looks at it.

use std::io::IsTerminal;
use std::sync::OnceLock;
use std::time::{Duration, Instant};

use indicatif::{ProgressBar, ProgressDrawTarget, ProgressStyle};
use slowmote::stokes::solve::{Observer, Stage};

/// What is done sooner needs no progress.
const PATIENCE: Duration = Duration::from_secs(1);

/// Steps of the bar.
const STEPS: f64 = 1000.0;

/// Redraws a second.
const REDRAWS_PER_S: u8 = 8;

/// Draws the progress of one solve, and wipes it away when dropped.
pub struct Progress {
    start: Instant,
    visible: bool,
    bar: OnceLock<ProgressBar>,
}

impl Progress {
    /// Progress that is drawn if stderr is a terminal and quiet was not asked for.
    pub fn new(quiet: bool) -> Self {
        Self { start: Instant::now(), visible: !quiet && std::io::stderr().is_terminal(), bar: OnceLock::new() }
    }
}

impl Observer for Progress {
    fn progress(&self, stage: Stage, unknowns: usize, fraction: f64) {
        if !self.visible || self.start.elapsed() < PATIENCE {
            return;
        }
        let bar = self.bar.get_or_init(new_bar);
        let doing = match stage {
            Stage::Assembling => "integrating",
            Stage::Factorising => "factorising",
            Stage::Solving => "solving",
        };
        bar.set_message(format!("{doing}, {unknowns} unknowns"));
        bar.set_position((STEPS * fraction.clamp(0.0, 1.0)) as u64);
    }
}

impl Drop for Progress {
    fn drop(&mut self) {
        if let Some(bar) = self.bar.get() {
            bar.finish_and_clear();
        }
    }
}

fn new_bar() -> ProgressBar {
    let bar = ProgressBar::with_draw_target(Some(STEPS as u64), ProgressDrawTarget::stderr_with_hz(REDRAWS_PER_S));
    // A template that can't be read leaves the plain bar.
    let style = ProgressStyle::with_template("  {msg:<34} {bar:30} {percent:>3} %  {elapsed}");
    bar.set_style(style.unwrap_or_else(|_| ProgressStyle::default_bar()).progress_chars("=> "));
    bar
}
