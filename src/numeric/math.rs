//! Elementary functions that give the same bits on every platform.

use std::f64::consts::LN_10;

/// Natural logarithm.
pub fn ln(x: f64) -> f64 {
    libm::log(x)
}

/// Logarithm to base ten.
pub fn lg(x: f64) -> f64 {
    libm::log10(x)
}

/// Exponential.
pub fn exp(x: f64) -> f64 {
    libm::exp(x)
}

/// Ten to the power `x`.
pub fn power_of_ten(x: f64) -> f64 {
    libm::exp(x * LN_10)
}

/// `x` to the power `y`.
pub fn pow(x: f64, y: f64) -> f64 {
    libm::pow(x, y)
}

/// Cube root.
pub fn cbrt(x: f64) -> f64 {
    libm::cbrt(x)
}

/// Sine.
pub fn sin(x: f64) -> f64 {
    libm::sin(x)
}

/// Cosine.
pub fn cos(x: f64) -> f64 {
    libm::cos(x)
}

/// Tangent.
pub fn tan(x: f64) -> f64 {
    libm::tan(x)
}

/// Arc sine.
pub fn asin(x: f64) -> f64 {
    libm::asin(x)
}

/// Arc cosine.
pub fn acos(x: f64) -> f64 {
    libm::acos(x)
}

/// Arc tangent.
pub fn atan(x: f64) -> f64 {
    libm::atan(x)
}

/// Arc tangent of `y / x` in the right quadrant.
pub fn atan2(y: f64, x: f64) -> f64 {
    libm::atan2(y, x)
}
