//! Physical constants in SI units, each with its source.

/// Standard gravity, m/s2. Exact by definition (3rd General Conference on Weights and Measures, 1901).
pub const STANDARD_GRAVITY_M_PER_S2: f64 = 9.80665;

/// Boltzmann constant, J/K. Exact by definition (SI, 2019).
pub const BOLTZMANN_J_PER_K: f64 = 1.380_649e-23;

/// Molar gas constant, J/(mol K). Exact: the product of the Boltzmann and Avogadro constants (SI, 2019).
pub const GAS_CONSTANT_J_PER_MOL_K: f64 = 8.314_462_618_153_24;

/// 0 degC in kelvin. Exact by definition of the degree Celsius (SI).
pub const ZERO_CELSIUS_K: f64 = 273.15;

/// Standard atmosphere, Pa. Exact by definition (10th General Conference on Weights and Measures, 1954).
pub const STANDARD_ATMOSPHERE_PA: f64 = 101_325.0;

/// Temperature that is taken, and said aloud, when none is given, degC. A convention of this program.
pub const DEFAULT_TEMPERATURE_C: f64 = 20.0;
